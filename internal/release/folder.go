// Package release keeps what must not be lost: it writes output folders whole or
// not at all, keeps the register of labels, freezes revisions and compares them.
package release

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
)

// File is one finished document. Its name may lead into a folder, with slashes.
type File struct {
	Name string
	Data []byte
}

// WriteFolder makes dir hold exactly files. The new folder is written beside dir,
// flushed to disk, then changes places with it in one step where the system can do
// that (Linux); elsewhere dir is missing for the instant between two renamings. What
// an interrupted run left beside dir is cleared away. It reports whether anything
// differed from what dir held before.
func WriteFolder(dir string, files []File) (changed bool, err error) {
	if same(dir, files) {
		return false, nil
	}
	s, err := prepare(dir, files)
	if err != nil {
		return false, err
	}
	defer s.discard()
	if err := swap(s.dir, dir); err != nil {
		return false, fmt.Errorf("cannot replace %s: %w", dir, err)
	}
	if err := s.discard(); err != nil {
		return true, fmt.Errorf("%s is written, but the earlier one is still at %s: %w", dir, s.dir, err)
	}
	return true, syncDir(filepath.Dir(dir))
}

// NewFolder makes dir hold files, and fails with fs.ErrExist if there is a dir
// already. At any instant there is no dir or all of it.
func NewFolder(dir string, files []File) error {
	if _, err := os.Lstat(dir); err == nil {
		return fmt.Errorf("%s: %w", dir, fs.ErrExist)
	}
	s, err := prepare(dir, files)
	if err != nil {
		return err
	}
	defer s.discard()
	// A folder with files in it is never replaced by a renaming (POSIX rename).
	if err := os.Rename(s.dir, dir); err != nil {
		if _, there := os.Lstat(dir); there == nil {
			return fmt.Errorf("%s: %w", dir, fs.ErrExist)
		}
		return fmt.Errorf("cannot make %s: %w", dir, err)
	}
	return syncDir(filepath.Dir(dir))
}

// swap puts the folder tmp in the place of dir. Whatever was there is then at tmp.
func swap(tmp, dir string) error {
	if _, err := os.Lstat(dir); errors.Is(err, fs.ErrNotExist) {
		return os.Rename(tmp, dir)
	}
	err := exchange(tmp, dir)
	if !errors.Is(err, errors.ErrUnsupported) {
		return err
	}
	old := tmp + ".old"
	if err := os.Rename(dir, old); err != nil {
		return err
	}
	if err := os.Rename(tmp, dir); err != nil {
		return errors.Join(err, os.Rename(old, dir))
	}
	return os.Rename(old, tmp)
}

// staged is a finished folder that waits beside the place that it is made for. Its
// lock tells other runs that it is not left over.
type staged struct {
	dir  string
	lock *os.File
}

const stagedMark = ".new-"

func prepare(dir string, files []File) (*staged, error) {
	parent := filepath.Dir(dir)
	if err := os.MkdirAll(parent, 0o777); err != nil {
		return nil, fmt.Errorf("cannot make the folder %s: %w", parent, err)
	}
	prefix := "." + filepath.Base(dir) + stagedMark
	clearLeft(parent, prefix)
	tmp, lock, err := ownFolder(parent, prefix)
	if err != nil {
		return nil, fmt.Errorf("cannot write beside %s: %w", dir, err)
	}
	s := &staged{tmp, lock}
	for _, f := range files {
		if err := writeSynced(s.dir, f); err != nil {
			s.discard()
			return nil, err
		}
	}
	if err := syncDir(s.dir); err != nil {
		s.discard()
		return nil, err
	}
	return s, nil
}

// ownFolder makes a folder and takes its lock. Another run that clears up can get in
// between; then it is tried again.
func ownFolder(parent, prefix string) (string, *os.File, error) {
	const tries = 10
	var err error
	for range tries {
		var tmp string
		if tmp, err = os.MkdirTemp(parent, prefix+"*"); err != nil {
			return "", nil, err
		}
		var lock *os.File
		lock, err = lockAt(tmp)
		if errors.Is(err, errors.ErrUnsupported) {
			return tmp, nil, os.Chmod(tmp, 0o755)
		}
		if err != nil {
			continue
		}
		if err = os.Chmod(tmp, 0o755); err == nil {
			return tmp, lock, nil
		}
		lock.Close()
	}
	return "", nil, err
}

// discard removes the folder that is at the staged place now.
func (s *staged) discard() error {
	err := os.RemoveAll(s.dir)
	if s.lock != nil {
		s.lock.Close()
		s.lock = nil
	}
	return err
}

// clearLeft removes staged folders and files that no run holds any more. A failure
// does no harm: they only take room.
func clearLeft(parent, prefix string) {
	entries, err := os.ReadDir(parent)
	if err != nil {
		return
	}
	for _, e := range entries {
		if !strings.HasPrefix(e.Name(), prefix) {
			continue
		}
		name := filepath.Join(parent, e.Name())
		if lock, err := lockAt(name); err == nil {
			os.RemoveAll(name)
			lock.Close()
		}
	}
}

func writeSynced(dir string, f File) error {
	name := filepath.Join(dir, filepath.FromSlash(f.Name))
	if err := os.MkdirAll(filepath.Dir(name), 0o755); err != nil {
		return fmt.Errorf("cannot write %s: %w", f.Name, err)
	}
	w, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
	if err != nil {
		return fmt.Errorf("cannot write %s: %w", f.Name, err)
	}
	_, err = w.Write(f.Data)
	if err == nil {
		err = w.Sync()
	}
	if err = errors.Join(err, w.Close()); err != nil {
		return fmt.Errorf("cannot write %s: %w", f.Name, err)
	}
	return nil
}

// same reports whether dir holds exactly files already.
func same(dir string, files []File) bool {
	there := map[string]bool{}
	err := filepath.WalkDir(dir, func(name string, e fs.DirEntry, err error) error {
		if err != nil || e.IsDir() {
			return err
		}
		if !e.Type().IsRegular() {
			return fs.ErrInvalid
		}
		rel, err := filepath.Rel(dir, name)
		there[filepath.ToSlash(rel)] = true
		return err
	})
	if err != nil || len(there) != len(files) {
		return false
	}
	for _, f := range files {
		if !there[f.Name] {
			return false
		}
		data, err := os.ReadFile(filepath.Join(dir, filepath.FromSlash(f.Name)))
		if err != nil || !bytes.Equal(data, f.Data) {
			return false
		}
	}
	return true
}

// WriteFile writes one file whole or not at all.
func WriteFile(name string, data []byte) error {
	if old, err := os.ReadFile(name); err == nil && bytes.Equal(old, data) {
		return nil
	}
	dir, prefix := filepath.Dir(name), "."+filepath.Base(name)+stagedMark
	clearLeft(dir, prefix)
	f, err := os.CreateTemp(dir, prefix+"*")
	if err != nil {
		return fmt.Errorf("cannot write %s: %w", name, err)
	}
	defer os.Remove(f.Name())
	if err = lock(f); errors.Is(err, errors.ErrUnsupported) {
		err = nil
	}
	if err == nil {
		_, err = f.Write(data)
	}
	if err == nil {
		err = f.Chmod(0o644)
	}
	if err == nil {
		err = f.Sync()
	}
	if err == nil {
		err = os.Rename(f.Name(), name)
	}
	if err = errors.Join(err, f.Close()); err != nil {
		return fmt.Errorf("cannot write %s: %w", name, err)
	}
	return syncDir(dir)
}
