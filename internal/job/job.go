// Package job takes a description from its file to the finished documents. It joins
// the rooms and computes nothing itself.
package job

import (
	"errors"
	"fmt"
	"io/fs"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
)

// Mistakes is returned when a description is wrong: every mistake, with its place.
type Mistakes struct {
	List    describe.List
	Sources describe.Sources
}

// Error returns the mistakes as they are shown to the user.
func (m *Mistakes) Error() string { return m.List.Render(m.Sources) }

// Unreadable is returned when a description cannot be read.
type Unreadable struct{ Err error }

// Error says which file and why.
func (u *Unreadable) Error() string {
	var p *fs.PathError
	if errors.As(u.Err, &p) {
		if errors.Is(u.Err, fs.ErrNotExist) {
			return fmt.Sprintf("there is no file %s", p.Path)
		}
		return fmt.Sprintf("cannot read %s: %v", p.Path, p.Err)
	}
	return u.Err.Error()
}

// Load reads the description at path and designs it. set holds changes of single
// values, as "duty.outage=6h", that are made to the text in memory only.
func Load(path string, set []string) (*design.Design, error) {
	j, err := Open(path, set)
	if err != nil {
		return nil, err
	}
	return j.Design, nil
}
