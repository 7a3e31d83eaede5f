package main

import (
	"errors"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
)

func explainCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "explain FILE WHAT",
		Short: "Show how a figure came about, for a pocket calculator",
		Long: "Print every working of WHAT (a designation, a circuit or a stage), what it depends on and what depends on it.\n" +
			"A designation begins with a minus sign: put -- before it.",
		Example: "  gloamwright explain examples/bracken-reach.yaml Boathouse\n  gloamwright explain examples/bracken-reach.yaml store\n  gloamwright explain examples/bracken-reach.yaml -- -F103",
		Args:    takes(2, "a description and what to explain"),
		RunE: func(cmd *cobra.Command, args []string) error {
			d, err := job.Load(args[0], nil)
			if err != nil {
				return explainError(err)
			}
			err = job.Explain(cmd.OutOrStdout(), d, args[1])
			var n *job.NothingCalled
			if errors.As(err, &n) {
				return exitError{exitInput, err.Error()}
			}
			return err
		},
	}
}
