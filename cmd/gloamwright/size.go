package main

import (
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
	"gloamwright/internal/results"
)

func sizeCommand() *cobra.Command {
	var asJSON bool
	var set []string
	c := &cobra.Command{
		Use:     "size FILE",
		Short:   "Print the sizing and the findings, write nothing",
		Long:    "Size the site that FILE describes and print what came out, without writing documents.",
		Example: "  gloamwright size site.yaml\n  gloamwright size site.yaml --set duty.outage=6h\n  gloamwright size site.yaml --json > results.json",
		Args:    cobra.ExactArgs(1),
		RunE: func(cmd *cobra.Command, args []string) error {
			d, err := job.Load(args[0], set)
			if err != nil {
				return explainError(err)
			}
			w := cmd.OutOrStdout()
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
	return c
}

// explainError turns an error of loading into its exit code.
func explainError(err error) error {
	var m *job.Mistakes
	var u *job.Unreadable
	var s *job.BadSet
	if errors.As(err, &m) || errors.As(err, &u) || errors.As(err, &s) {
		return exitError{exitInput, err.Error()}
	}
	return exitError{exitFailed, err.Error()}
}
