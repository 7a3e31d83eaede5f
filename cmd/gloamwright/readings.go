package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"gloamwright/internal/commission"
	"gloamwright/internal/job"
	"gloamwright/internal/release"
)

func readingsCommand() *cobra.Command {
	var asCSV bool
	c := &cobra.Command{
		Use:   "readings FILE",
		Short: "Write the readings sheet that the technician fills",
		Long: "Write one line for every measurement of the packet, with its band, beside FILE: FILE.readings.yaml, or .csv for a spreadsheet.\n" +
			"A sheet that is there already is never overwritten: it may be filled.",
		Example: "  gloamwright readings site.yaml\n  gloamwright readings site.yaml --csv",
		Args:    takes(1, "one description"),
		RunE: func(cmd *cobra.Command, args []string) error {
			d, err := job.Load(args[0], nil)
			if err != nil {
				return explainError(err)
			}
			ext, data := ".readings.yaml", commission.YAML(d)
			if asCSV {
				ext = ".readings.csv"
				if data, err = commission.CSV(d); err != nil {
					return exitError{exitFailed, err.Error()}
				}
			}
			name := strings.TrimSuffix(args[0], filepath.Ext(args[0])) + ext
			if _, err := os.Lstat(name); !errors.Is(err, fs.ErrNotExist) {
				return exitError{exitInput, name + " is there already and may be filled; move it away first"}
			}
			if err := release.WriteFile(name, data); err != nil {
				return exitError{exitFailed, err.Error()}
			}
			fmt.Fprintf(cmd.OutOrStdout(), "%s: %d readings to take. When they are filled in:\n  gloamwright accept %s %s\n", name, len(commission.Lines(d)), args[0], name)
			return nil
		},
	}
	c.Flags().BoolVar(&asCSV, "csv", false, "write comma-separated values")
	return c
}
