package main

import (
	"errors"
	"fmt"
	"io"

	"github.com/spf13/cobra"
)

// Exit codes.
const (
	exitOK     = 0
	exitStop   = 1 // a stop finding stands: built, but not issued
	exitInput  = 2 // the description or the command line is wrong, nothing written
	exitFailed = 3 // something failed, nothing written
)

// exitError carries an exit code. Its text has been printed already when it is empty.
type exitError struct {
	code int
	text string
}

func (e exitError) Error() string { return e.text }

const longHelp = `Gloamwright sizes extra-low-voltage DC standby lighting from one description,
proves it by solving the circuit in every operating condition, and writes the
schematic and the build packet.

Exit codes: 0 good; 1 a stop finding stands: build writes its documents, issue writes
nothing; 2 the description, the register or the command line is wrong, nothing written;
3 something failed, nothing written. Of several descriptions, the worst.`

// execute runs the command. A fault of the program itself becomes an error with a
// sentence for the user instead of a crash.
func execute(root *cobra.Command) (err error) {
	defer func() {
		if r := recover(); r != nil {
			err = exitError{exitFailed, fmt.Sprintf("a fault in gloamwright itself: %v\nNothing was written. Please report it with the description that shows it.", r)}
		}
	}()
	return root.Execute()
}

// takes refuses a command line that has not exactly n arguments, in words.
func takes(n int, what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if len(args) != n {
			return fmt.Errorf("%s needs %s, such as:\n%s", cmd.CommandPath(), what, cmd.Example)
		}
		return nil
	}
}

// takesSome refuses a command line without arguments.
func takesSome(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if len(args) == 0 {
			return fmt.Errorf("%s needs %s, such as:\n%s", cmd.CommandPath(), what, cmd.Example)
		}
		return nil
	}
}

// run is the program without its process. It returns the exit code.
func run(args []string, stdin io.Reader, stdout, stderr io.Writer) int {
	root := &cobra.Command{
		Use:           "gloamwright",
		Short:         "Size, prove and document DC standby lighting",
		Long:          longHelp,
		Example:       "  gloamwright new my-site --from building-24v\n  gloamwright build my-site.yaml",
		SilenceErrors: true,
		SilenceUsage:  true,
	}
	root.SetArgs(args)
	root.SetIn(stdin)
	root.SetOut(stdout)
	root.SetErr(stderr)
	root.CompletionOptions.HiddenDefaultCmd = true
	root.AddCommand(buildCommand(), sizeCommand(), explainCommand(), changesCommand(), issueCommand(), watchCommand(), newCommand(), readingsCommand(), acceptCommand())
	err := execute(root)
	if err == nil {
		return exitOK
	}
	var e exitError
	if errors.As(err, &e) {
		if e.text != "" {
			fmt.Fprintln(stderr, e.text)
		}
		return e.code
	}
	fmt.Fprintf(stderr, "%v\nSee 'gloamwright --help'.\n", err)
	return exitInput
}
