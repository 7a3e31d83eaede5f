package main

import (
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"gloamwright/internal/commission"
	"gloamwright/internal/describe"
	"gloamwright/internal/job"
	"gloamwright/internal/release"
)

func acceptCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "accept FILE READINGS",
		Short: "Judge the readings and write the commissioning record",
		Long: "Hold the filled sheet READINGS against the bands of FILE: inside, outside, missing, unit slips, swapped probes. For readings\n" +
			"outside, name the likely faults and the next reading to take. Write the commissioning record beside READINGS as PDF and JSON.\n" +
			"Exit code 0 when every reading passed, 1 when points are open.",
		Example: "  gloamwright accept site.yaml site.readings.yaml",
		Args:    takes(2, "a description and a filled readings sheet"),
		RunE: func(cmd *cobra.Command, args []string) error {
			d, err := job.Load(args[0], nil)
			if err != nil {
				return explainError(err)
			}
			src, err := os.ReadFile(args[1])
			if err != nil {
				return explainError(&job.Unreadable{Err: err})
			}
			file := filepath.Base(args[1])
			filled, list := commission.Read(file, src)
			if list.HasErrors() {
				return exitError{exitInput, list.Render(describe.Sources{file: src})}
			}
			r, err := commission.Accept(d, filled)
			var m *commission.Mismatch
			if errors.As(err, &m) {
				return exitError{exitInput, err.Error()}
			}
			if err != nil {
				return exitError{exitFailed, err.Error()}
			}
			files, err := job.Record(d, r)
			if err != nil {
				return exitError{exitFailed, err.Error()}
			}
			base := strings.TrimSuffix(args[1], filepath.Ext(args[1]))
			base = strings.TrimSuffix(base, ".readings")
			w := cmd.OutOrStdout()
			verdicts(w, r)
			for _, f := range files {
				name := base + "." + f.Name
				if err := release.WriteFile(name, f.Data); err != nil {
					return exitError{exitFailed, err.Error()}
				}
				fmt.Fprintf(w, "  %s\n", name)
			}
			if !r.Passed {
				return exitError{code: exitStop}
			}
			return nil
		},
	}
}

// verdicts prints what did not pass, the likely faults and the next reading.
func verdicts(w io.Writer, r *commission.Record) {
	if r.Passed {
		fmt.Fprintf(w, "All %d readings are inside their bands.\n\n", len(r.Judged))
		return
	}
	fmt.Fprintf(w, "%d of %d readings are open.\n\n", r.Open, len(r.Judged))
	missing := 0
	for _, j := range r.Judged {
		switch j.Verdict {
		case commission.Inside:
		case commission.Missing:
			missing++
		default:
			fmt.Fprintf(w, "  %-5s %-22s %-10s %.1f to %.1f V  %s: %s\n", j.Point, j.Name, j.Text, j.Low, j.High, j.Verdict, j.Says)
		}
	}
	if missing > 0 {
		fmt.Fprintf(w, "  %d readings were not taken.\n", missing)
	}
	if len(r.Likely) > 0 {
		fmt.Fprintln(w, "\n  Most likely:")
		for i, f := range r.Likely {
			fmt.Fprintf(w, "  %d  %s (explains %d of the readings outside)\n", i+1, f.What, f.Points)
		}
	}
	if r.Next != nil {
		fmt.Fprintf(w, "\n  Read next: %s\n", r.Next.Says)
	}
	fmt.Fprintln(w)
}
