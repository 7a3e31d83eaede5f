//go:build !unix

package release

import (
	"errors"
	"os"
)

// lock cannot lock here. What an interrupted run left behind is therefore not cleared
// away.
func lock(*os.File) error { return errors.ErrUnsupported }

// lockAt cannot lock here.
func lockAt(string) (*os.File, error) { return nil, errors.ErrUnsupported }

// syncDir does nothing: folders cannot be flushed here.
func syncDir(string) error { return nil }
