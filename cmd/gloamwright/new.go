package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"gloamwright/internal/release"
	"gloamwright/templates"
)

func newCommand() *cobra.Command {
	var from string
	var list strings.Builder
	for _, s := range templates.Starters() {
		fmt.Fprintf(&list, "  %-18s %s\n", s, templates.StarterTitle(s))
	}
	c := &cobra.Command{
		Use:     "new NAME",
		Short:   "Write a commented description to start from",
		Long:    "Write NAME.yaml, a commented description to start from.\n\nStarters:\n" + list.String(),
		Example: "  gloamwright new clinic --from two-boards-24v",
		Args:    takes(1, "a name for the description"),
		RunE: func(cmd *cobra.Command, args []string) error {
			text, err := templates.Starter(from)
			if err != nil {
				return exitError{exitInput, err.Error()}
			}
			name := args[0]
			if filepath.Ext(name) != ".yaml" {
				name += ".yaml"
			}
			if _, err := os.Lstat(name); err == nil {
				return exitError{exitInput, fmt.Sprintf("%s is there already; choose another name or remove it first", name)}
			} else if !errors.Is(err, fs.ErrNotExist) {
				return exitError{exitFailed, err.Error()}
			}
			if err := release.WriteFile(name, text); err != nil {
				return exitError{exitFailed, err.Error()}
			}
			fmt.Fprintf(cmd.OutOrStdout(), "%s is written. Change it to your site, then:\n  gloamwright build %s\n", name, name)
			return nil
		},
	}
	c.Flags().StringVar(&from, "from", "building-24v", "starter to begin with")
	return c
}
