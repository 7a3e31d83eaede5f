package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

// asProgram makes the test binary be the program.
const asProgram = "GLOAMWRIGHT_TEST_AS_PROGRAM"

func TestMain(m *testing.M) {
	program := func() { os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr)) }
	if os.Getenv(asProgram) != "" {
		program()
	}
	testscript.Main(m, map[string]func(){"gloamwright": program})
}

// TestScripts runs the stories of testdata/script: each is one user's way through some
// commands. Besides the commands of testscript they know
//
//	example NAME          copy examples/NAME.yaml here
//	edit FILE OLD NEW     replace the only OLD in FILE by NEW
//	code N COMMAND...     run a command that must end with exit code N
func TestScripts(t *testing.T) {
	examples, err := filepath.Abs("../../examples")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
		Cmds: map[string]func(ts *testscript.TestScript, neg bool, args []string){
			"example": func(ts *testscript.TestScript, neg bool, args []string) {
				src, err := os.ReadFile(filepath.Join(examples, args[0]+".yaml"))
				ts.Check(err)
				ts.Check(os.WriteFile(ts.MkAbs(args[0]+".yaml"), src, 0o644))
			},
			"edit": func(ts *testscript.TestScript, neg bool, args []string) {
				if len(args) != 3 {
					ts.Fatalf("usage: edit FILE OLD NEW")
				}
				text := ts.ReadFile(args[0])
				if n := strings.Count(text, args[1]); n != 1 {
					ts.Fatalf("%s has %q %d times", args[0], args[1], n)
				}
				ts.Check(os.WriteFile(ts.MkAbs(args[0]), []byte(strings.Replace(text, args[1], args[2], 1)), 0o644))
			},
			"code": func(ts *testscript.TestScript, neg bool, args []string) {
				want := args[0]
				err := ts.Exec(args[1], args[2:]...)
				got := "0"
				if err != nil {
					got = strings.TrimPrefix(err.Error(), "exit status ")
				}
				if got != want {
					ts.Fatalf("exit code %s, want %s", got, want)
				}
			},
		},
	})
}
