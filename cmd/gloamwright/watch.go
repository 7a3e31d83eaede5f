package main

import (
	"os"
	"os/signal"
	"syscall"

	"github.com/spf13/cobra"

	"gloamwright/internal/job"
)

func watchCommand() *cobra.Command {
	var out string
	c := &cobra.Command{
		Use:   "watch FILE",
		Short: "Build again whenever the description is saved",
		Long: `Build FILE, then again whenever it, or a file that it reads, is saved, and print what
changed. While the description has a mistake, the last good documents stay. Ctrl-C ends.`,
		Example: "  gloamwright watch site.yaml",
		Args:    takes(1, "one description"),
		RunE: func(cmd *cobra.Command, args []string) error {
			if _, err := os.Stat(args[0]); err != nil {
				return explainError(&job.Unreadable{Err: err})
			}
			ctx, stop := signal.NotifyContext(cmd.Context(), os.Interrupt, syscall.SIGTERM)
			defer stop()
			clear := "\n"
			if isTerminal(cmd.OutOrStdout()) {
				clear = clearScreen
			}
			if err := job.Watch(ctx, args[0], out, clear, cmd.OutOrStdout()); err != nil {
				return exitError{exitFailed, err.Error()}
			}
			return nil
		},
	}
	c.Flags().StringVarP(&out, "out", "o", "out", "folder for the documents")
	return c
}
