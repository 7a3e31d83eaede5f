package describe

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path"
	"strings"
)

// FolderReader returns a function for Options.ReadFile that reads files below dir and
// nothing outside it, links included.
func FolderReader(dir string) func(name string) ([]byte, error) {
	return func(name string) ([]byte, error) {
		root, err := os.OpenRoot(dir)
		if err != nil {
			return nil, err
		}
		defer root.Close()
		f, err := root.Open(name)
		if err != nil {
			return nil, err
		}
		defer f.Close()
		if info, err := f.Stat(); err != nil || !info.Mode().IsRegular() {
			return nil, fmt.Errorf("%s is not a plain file", name)
		}
		return io.ReadAll(io.LimitReader(f, MaxSize+1))
	}
}

// checkPath accepts the name of a file or folder below the description's folder.
func checkPath(s string) error {
	bad := func(why string) error {
		return &valueError{codeShared, "bad file name", fmt.Sprintf("%q %s. A file is named from the description's folder, inside it, with /, such as house.yaml or firm/house.yaml.", clip(s), why)}
	}
	switch {
	case s == "" || len(s) > maxText:
		return bad("is empty or too long")
	case strings.ContainsFunc(s, unprintable):
		return bad("has a character that cannot stand in a file name")
	case strings.ContainsAny(s, `\:`):
		return bad(`has \ or : in it`)
	case path.IsAbs(s) || !fs.ValidPath(path.Clean(s)) || path.Clean(s) == ".":
		return bad("leads out of the description's folder")
	}
	return nil
}

// plainError drops the operation and path that package os puts before a reason.
func plainError(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		return p.Err
	}
	return err
}
