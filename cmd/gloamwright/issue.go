package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
)

func issueCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "issue FILE",
		Short: "Freeze the description's revision and its documents for construction",
		Long: `Freeze the revision that FILE names: its documents, the description as it is, results
and checksums go into issued/<name of FILE>/<revision>/ beside it and are never
overwritten, and the register takes up the labels given.

Refused with a stop finding, for a revision that is issued already or out of order, and
when nothing has changed. Interrupted at any moment, it leaves what was before or the
whole revision.`,
		Example: "  gloamwright issue site.yaml",
		Args:    takes(1, "one description"),
		RunE: func(cmd *cobra.Command, args []string) error {
			made, err := job.Issue(args[0])
			if err != nil {
				return explainError(err)
			}
			fmt.Fprintln(cmd.OutOrStdout(), made.String())
			return nil
		},
	}
}
