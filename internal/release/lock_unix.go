//go:build unix

package release

import (
	"errors"
	"io/fs"
	"os"

	"golang.org/x/sys/unix"
)

// lock takes the lock of a file or folder, or fails at once if another run holds it.
// The lock goes when the file is closed or the process ends in whatever way.
func lock(f *os.File) error { return unix.Flock(int(f.Fd()), unix.LOCK_EX|unix.LOCK_NB) }

// lockAt opens and locks what stands at name, and fails if it has gone meanwhile.
func lockAt(name string) (*os.File, error) {
	f, err := os.Open(name)
	if err != nil {
		return nil, err
	}
	err = lock(f)
	if err == nil {
		var held, there os.FileInfo
		if held, err = f.Stat(); err == nil {
			if there, err = os.Lstat(name); err == nil && !os.SameFile(held, there) {
				err = fs.ErrNotExist
			}
		}
	}
	if err != nil {
		f.Close()
		return nil, err
	}
	return f, nil
}

// syncDir flushes the names in a folder to disk. File systems that cannot do that
// for a folder say EINVAL; it is no failure.
func syncDir(dir string) error {
	f, err := os.Open(dir)
	if err != nil {
		return err
	}
	defer f.Close()
	if err := f.Sync(); err != nil && !errors.Is(err, unix.EINVAL) {
		return err
	}
	return nil
}
