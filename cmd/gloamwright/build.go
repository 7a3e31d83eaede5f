package main

import (
	"errors"
	"fmt"
	"io"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
)

func buildCommand() *cobra.Command {
	var out string
	c := &cobra.Command{
		Use:   "build FILE...",
		Short: "Size sites and write their documents",
		Long: `Size the site that FILE describes, prove it, and write schematic, packet, tables and
results into OUT/<job number>/<revision>/. Files appear whole or not at all. Several
files, or every description in a folder, are built side by side.`,
		Example: "  gloamwright build examples/bracken-reach.yaml\n  gloamwright build examples",
		Args:    takesSome("one or more descriptions, or a folder of them"),
		RunE: func(cmd *cobra.Command, args []string) error {
			paths, err := job.Find(args)
			if err != nil {
				return explainError(err)
			}
			if len(paths) == 1 {
				return buildOne(cmd.OutOrStdout(), paths[0], out)
			}
			return buildSeveral(cmd.OutOrStdout(), cmd.ErrOrStderr(), paths, out)
		},
	}
	c.Flags().StringVarP(&out, "out", "o", "out", "folder for the documents")
	return c
}

func buildOne(w io.Writer, path, out string) error {
	d, err := job.NewDraft(path, out)
	if err != nil {
		return explainError(err)
	}
	if err := d.Write(); err != nil {
		return exitError{exitFailed, err.Error()}
	}
	job.Summary(w, d.Design)
	fmt.Fprintf(w, "\n  %s\n", d.Where())
	if t := d.Caution(); t != "" {
		fmt.Fprintf(w, "  %s\n", t)
	}
	if !d.Design.ForConstruction() {
		fmt.Fprintln(w, "  NOT FOR CONSTRUCTION: a stop finding stands.")
		return exitError{code: exitStop}
	}
	return nil
}

// buildSeveral builds all paths and exits with the worst code of any.
func buildSeveral(w, complaints io.Writer, paths []string, out string) error {
	live := isTerminal(w)
	var all []job.Outcome
	worst := exitOK
	job.Several(paths, out, func(i int, o job.Outcome) {
		all = append(all, o)
		if live {
			fmt.Fprintf(w, "%s  %d of %d: %s", clearLine, i+1, len(paths), o.Path)
		}
		worst = max(worst, codeOf(o))
	})
	if live {
		fmt.Fprint(w, clearLine)
	}
	if err := job.Table(w, all); err != nil {
		return exitError{exitFailed, err.Error()}
	}
	fmt.Fprintf(w, "\n  Documents are in %s.\n", out)
	for _, o := range all {
		if o.Err != nil {
			fmt.Fprintf(complaints, "\n%s: not built\n%v\n", o.Path, o.Err)
		}
	}
	if worst == exitOK {
		return nil
	}
	return exitError{code: worst}
}

// codeOf returns the exit code that building this description alone would have had.
func codeOf(o job.Outcome) int {
	var e exitError
	switch {
	case o.Err != nil && errors.As(explainError(o.Err), &e):
		return e.code
	case !o.Draft.Design.ForConstruction():
		return exitStop
	}
	return exitOK
}
