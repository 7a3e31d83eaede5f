package main

import (
	"bytes"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write what the commands print into docs/guide.md")

// TestGuide does what docs/guide.md does, in a folder of its own, and compares what the
// commands print with what the guide says. After a change that is meant:
//
//	go test ./cmd/gloamwright -run Guide -update
//
// In a block "console" a line that starts with "$ " is a command, and what follows is its
// output; an exit code other than 0 stands in brackets after it. A block "diff FILE"
// changes a file: its lines with "-" are replaced by those with "+".
func TestGuide(t *testing.T) {
	const guide = "../../docs/guide.md"
	text, err := os.ReadFile(guide)
	if err != nil {
		t.Fatal(err)
	}
	t.Chdir(t.TempDir())
	played, err := play(string(text))
	if err != nil {
		t.Fatal(err)
	}
	if played == string(text) {
		return
	}
	if *update {
		t.Log("the guide is written anew")
	} else {
		t.Errorf("the guide does not say what the commands print; see the comment of this test.\n%s", firstDifference(string(text), played))
	}
	if *update {
		if err := os.WriteFile(filepath.Join(repository, "docs", "guide.md"), []byte(played), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

// repository is the folder of the module; tests start in the folder of their package.
var repository = func() string {
	dir, err := filepath.Abs("../..")
	if err != nil {
		panic(err)
	}
	return dir
}()

// play runs every block of a guide and returns the guide as it should be.
func play(guide string) (string, error) {
	var out strings.Builder
	lines := strings.SplitAfter(guide, "\n")
	for i := 0; i < len(lines); i++ {
		out.WriteString(lines[i])
		info, ok := strings.CutPrefix(strings.TrimSpace(lines[i]), "```")
		if !ok || info == "" {
			continue
		}
		end := i + 1
		for end < len(lines) && strings.TrimSpace(lines[end]) != "```" {
			end++
		}
		if end == len(lines) {
			return "", fmt.Errorf("line %d: the block has no end", i+1)
		}
		block := lines[i+1 : end]
		kind, file, _ := strings.Cut(info, " ")
		switch kind {
		case "console":
			for _, l := range block {
				if command, ok := strings.CutPrefix(l, "$ "); ok {
					out.WriteString(l)
					out.WriteString(typed(strings.Fields(command)))
				}
			}
		case "diff":
			if err := patch(file, block); err != nil {
				return "", fmt.Errorf("line %d: %w", i+1, err)
			}
			out.WriteString(strings.Join(block, ""))
		default:
			out.WriteString(strings.Join(block, ""))
		}
		out.WriteString(lines[end])
		// A block without a name ends here as well.
		i = end
	}
	return out.String(), nil
}

// typed runs one command and returns what it prints.
func typed(words []string) string {
	var b bytes.Buffer
	code := 0
	switch words[0] {
	case "gloamwright":
		code = run(words[1:], strings.NewReader(""), &b, &b)
	case "ls":
		entries, err := os.ReadDir(words[1])
		if err != nil {
			return err.Error() + "\n"
		}
		for _, e := range entries {
			fmt.Fprintln(&b, e.Name())
		}
	case "head":
		data, err := os.ReadFile(words[2])
		if err != nil {
			return err.Error() + "\n"
		}
		n, err := strconv.Atoi(strings.TrimPrefix(words[1], "-"))
		if err != nil {
			return err.Error() + "\n"
		}
		lines := strings.SplitAfter(string(data), "\n")
		b.WriteString(strings.Join(lines[:min(n, len(lines))], ""))
	default:
		return "no such command: " + words[0] + "\n"
	}
	if code != 0 {
		fmt.Fprintf(&b, "[exit code %d]\n", code)
	}
	return b.String()
}

// patch changes a file as a block "diff" says.
func patch(file string, block []string) error {
	data, err := os.ReadFile(file)
	if err != nil {
		return err
	}
	var was, is strings.Builder
	for _, l := range block {
		switch l[0] {
		case '-':
			was.WriteString(l[1:])
		case '+':
			is.WriteString(l[1:])
		case ' ':
			was.WriteString(l[1:])
			is.WriteString(l[1:])
		default:
			return fmt.Errorf("%q does not start with -, + or a space", l)
		}
	}
	if n := strings.Count(string(data), was.String()); n != 1 {
		return fmt.Errorf("%s has these lines %d times:\n%s", file, n, was.String())
	}
	return os.WriteFile(file, []byte(strings.Replace(string(data), was.String(), is.String(), 1)), 0o644)
}

// firstDifference shows where two texts part.
func firstDifference(a, b string) string {
	x, y := strings.Split(a, "\n"), strings.Split(b, "\n")
	for i := range min(len(x), len(y)) {
		if x[i] != y[i] {
			return fmt.Sprintf("line %d\nguide:   %s\nprinted: %s", i+1, x[i], y[i])
		}
	}
	return fmt.Sprintf("one is longer: %d and %d lines", len(x), len(y))
}
