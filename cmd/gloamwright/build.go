package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
	"gloamwright/internal/release"
)

func buildCommand() *cobra.Command {
	var out string
	c := &cobra.Command{
		Use:     "build FILE",
		Short:   "Size the site and write its documents",
		Long:    "Size the site that FILE describes, prove it, and write schematic, packet, tables and results\ninto OUT/<job number>/<revision>/. Files appear whole or not at all.",
		Example: "  gloamwright build examples/bracken-reach.yaml",
		Args:    cobra.ExactArgs(1),
		RunE: func(cmd *cobra.Command, args []string) error {
			d, err := job.Load(args[0], nil)
			if err != nil {
				return explainError(err)
			}
			files, err := job.Documents(d)
			if err != nil {
				return exitError{exitFailed, err.Error()}
			}
			dir := job.Folder(out, d)
			changed, err := release.WriteFolder(dir, files)
			if err != nil {
				return exitError{exitFailed, err.Error()}
			}
			w := cmd.OutOrStdout()
			job.Summary(w, d)
			if changed {
				fmt.Fprintf(w, "\n  %d documents in %s\n", len(files), dir)
			} else {
				fmt.Fprintf(w, "\n  Nothing changed: the %d documents in %s stand as they are.\n", len(files), dir)
			}
			if !d.ForConstruction() {
				fmt.Fprintln(w, "  NOT FOR CONSTRUCTION: a stop finding stands.")
				return exitError{code: exitStop}
			}
			return nil
		},
	}
	c.Flags().StringVarP(&out, "out", "o", "out", "folder for the documents")
	return c
}
