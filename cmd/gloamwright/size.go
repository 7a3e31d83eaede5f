package main

import (
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
	"gloamwright/internal/release"
	"gloamwright/internal/results"
)

func sizeCommand() *cobra.Command {
	var asJSON bool
	var set []string
	var sweep string
	c := &cobra.Command{
		Use:     "size FILE",
		Short:   "Print the sizing and the findings, write nothing",
		Long:    "Size the site that FILE describes and print what came out, without writing documents.",
		Example: "  gloamwright size site.yaml\n  gloamwright size site.yaml --set duty.outage=6h\n  gloamwright size site.yaml --sweep duty.outage=2h..12h/1h\n  gloamwright size site.yaml --json > results.json",
		Args:    takes(1, "one description"),
		RunE: func(cmd *cobra.Command, args []string) error {
			w := cmd.OutOrStdout()
			if sweep != "" {
				if err := job.Sweep(w, args[0], set, sweep); err != nil {
					return explainError(err)
				}
				return nil
			}
			d, err := job.Load(args[0], set)
			if err != nil {
				return explainError(err)
			}
			if asJSON {
				js, err := results.JSON(d)
				if err != nil {
					return exitError{exitFailed, err.Error()}
				}
				if _, err := w.Write(js); err != nil {
					return exitError{exitFailed, err.Error()}
				}
			} else {
				job.Summary(w, d)
				if len(set) > 0 {
					was, err := job.Load(args[0], nil)
					if err != nil {
						return explainError(err)
					}
					fmt.Fprintln(w)
					job.Differences(w, was, d)
				}
			}
			if !d.ForConstruction() {
				if !asJSON {
					fmt.Fprintln(w, "\n  NOT FOR CONSTRUCTION: a stop finding stands.")
				}
				return exitError{code: exitStop}
			}
			return nil
		},
	}
	c.Flags().BoolVar(&asJSON, "json", false, "print results.json instead")
	c.Flags().StringArrayVar(&set, "set", nil, "compute with a value changed, as duty.outage=6h; the file stays as it is")
	c.Flags().StringVar(&sweep, "sweep", "", "print a table over a range of one value, as duty.outage=2h..12h/1h")
	return c
}

// explainError turns an error of loading into its exit code.
func explainError(err error) error {
	var m *job.Mistakes
	var u *job.Unreadable
	var s *job.BadSet
	var d *release.Damaged
	var r *release.Refused
	switch {
	case errors.As(err, &r) && r.Stop:
		return exitError{exitStop, err.Error()}
	case errors.As(err, &m), errors.As(err, &u), errors.As(err, &s), errors.As(err, &d), errors.As(err, &r):
		return exitError{exitInput, err.Error()}
	}
	return exitError{exitFailed, err.Error()}
}
