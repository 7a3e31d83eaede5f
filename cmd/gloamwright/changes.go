package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
	"gloamwright/internal/release"
)

func changesCommand() *cobra.Command {
	var from string
	var asJSON bool
	c := &cobra.Command{
		Use:   "changes FILE",
		Short: "Say what a technician has to redo since an issued revision",
		Long: `Compare the description with the last issued revision, or the one that --from names:
which values changed, and what follows from them, in the order in which a technician
works. Nothing is written.`,
		Example: "  gloamwright changes site.yaml\n  gloamwright changes site.yaml --from A\n  gloamwright changes site.yaml --json > changes.json",
		Args:    takes(1, "one description"),
		RunE: func(cmd *cobra.Command, args []string) error {
			j, err := job.Open(args[0], nil)
			if err != nil {
				return explainError(err)
			}
			base, err := baseOf(j, from)
			if err != nil {
				return err
			}
			if err := j.Compare(base); err != nil {
				return explainError(err)
			}
			w, changes := cmd.OutOrStdout(), j.Design.Changes
			if asJSON {
				js, err := release.NoticeJSON(changes)
				if err != nil {
					return exitError{exitFailed, err.Error()}
				}
				if _, err := w.Write(js); err != nil {
					return exitError{exitFailed, err.Error()}
				}
				return nil
			}
			to := "to revision " + changes.To
			if changes.To == changes.From {
				to = "to the description as it is"
			}
			fmt.Fprintf(w, "%s  Changes from revision %s %s\n\n", j.Design.Site.Job.Number.Val, base.Revision, to)
			release.WriteNotice(w, changes)
			return nil
		},
	}
	c.Flags().StringVar(&from, "from", "", "issued revision to compare with; the last one without it")
	c.Flags().BoolVar(&asJSON, "json", false, "print the change notice as data")
	return c
}

// baseOf returns the issued revision to compare with.
func baseOf(j *job.Job, from string) (*release.Issued, error) {
	fail := func(format string, a ...any) (*release.Issued, error) {
		return nil, exitError{exitInput, fmt.Sprintf(format, a...)}
	}
	last := j.Released.Register.Last()
	if from == "" {
		from = last
	}
	switch base := j.Released.Find(from); {
	case base != nil:
		return base, nil
	case last == "":
		return fail("No revision of %[1]s is issued: there is nothing to compare with. Issue one with:\n  gloamwright issue %[1]s", j.Path)
	case j.Released.Has(from):
		return fail("Revision %s was issued, but it is not in %s: bring it back from version control or a backup.", from, release.IssuedPath(j.Path))
	}
	return fail("No revision %s of %s is issued; the last one is %s.", from, j.Path, last)
}
