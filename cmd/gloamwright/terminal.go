package main

import (
	"io"
	"os"

	"golang.org/x/term"
)

// Control sequences of ECMA-48.
const (
	clearScreen = "\x1b[2J\x1b[H"
	clearLine   = "\r\x1b[K"
)

// isTerminal reports whether w is shown to a person as it is written.
func isTerminal(w io.Writer) bool {
	f, ok := w.(*os.File)
	return ok && term.IsTerminal(int(f.Fd()))
}
