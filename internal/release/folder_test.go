package release

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strconv"
	"strings"
	"testing"
	"time"
)

// TestMain lets the test binary play the process that is killed.
func TestMain(m *testing.M) {
	if dir := os.Getenv("RELEASE_TEST_WRITE"); dir != "" {
		for i := 0; ; i++ {
			if _, err := WriteFolder(dir, edition(i%2)); err != nil {
				fmt.Fprintln(os.Stderr, err)
				os.Exit(1)
			}
		}
	}
	os.Exit(m.Run())
}

// edition returns the files of one of two versions of a folder. They differ in
// number, names and contents.
func edition(n int) []File {
	files := []File{
		{"a.txt", bytes.Repeat([]byte(strconv.Itoa(n)), 20000)},
		{"sub/b.txt", []byte("edition " + strconv.Itoa(n))},
	}
	if n == 1 {
		files = append(files, File{"only-1.txt", []byte("x")})
	}
	return files
}

func TestWriteFolder(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "deep", "A")
	for _, step := range []struct {
		n       int
		changed bool
	}{{0, true}, {0, false}, {1, true}, {1, false}, {0, true}} {
		changed, err := WriteFolder(dir, edition(step.n))
		if err != nil {
			t.Fatal(err)
		}
		if changed != step.changed {
			t.Errorf("edition %d: changed = %v", step.n, changed)
		}
		if !same(dir, edition(step.n)) || same(dir, edition(1-step.n)) {
			t.Errorf("the folder does not hold edition %d", step.n)
		}
	}
	checkAlone(t, filepath.Dir(dir), "A")
}

func TestNewFolderKeepsWhatIsThere(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "A")
	if err := NewFolder(dir, edition(0)); err != nil {
		t.Fatal(err)
	}
	if err := NewFolder(dir, edition(1)); !errors.Is(err, fs.ErrExist) {
		t.Errorf("second: %v", err)
	}
	if !same(dir, edition(0)) {
		t.Error("the folder has been touched")
	}
	checkAlone(t, filepath.Dir(dir), "A")
}

// A process that does nothing but replace the folder is killed over and over: what
// stands there is always one whole edition.
func TestWriteFolderKilled(t *testing.T) {
	if runtime.GOOS != "linux" {
		t.Skip("folders cannot change places in one step here")
	}
	parent := t.TempDir()
	dir := filepath.Join(parent, "A")
	if _, err := WriteFolder(dir, edition(0)); err != nil {
		t.Fatal(err)
	}
	for i := range 40 {
		cmd := exec.Command(os.Args[0])
		cmd.Env = append(os.Environ(), "RELEASE_TEST_WRITE="+dir)
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		time.Sleep(time.Duration(3+i*2) * time.Millisecond)
		if err := cmd.Process.Kill(); err != nil {
			t.Fatal(err)
		}
		if err := cmd.Wait(); err == nil || !strings.Contains(err.Error(), "killed") {
			t.Fatalf("the writer ended by itself: %v", err)
		}
		if !same(dir, edition(0)) && !same(dir, edition(1)) {
			t.Fatalf("round %d: the folder is neither edition", i)
		}
	}
	for n := range 2 { // one of the two is a change, which clears up
		if _, err := WriteFolder(dir, edition(n)); err != nil {
			t.Fatal(err)
		}
	}
	checkAlone(t, parent, "A")
}

func TestWriteFile(t *testing.T) {
	dir := t.TempDir()
	name := filepath.Join(dir, "x.yaml")
	if err := os.WriteFile(filepath.Join(dir, ".x.yaml.new-1"), []byte("left over"), 0o600); err != nil {
		t.Fatal(err)
	}
	for _, text := range []string{"one", "two", "two"} {
		if err := WriteFile(name, []byte(text)); err != nil {
			t.Fatal(err)
		}
		if got, err := os.ReadFile(name); err != nil || string(got) != text {
			t.Errorf("holds %q, %v", got, err)
		}
	}
	checkAlone(t, dir, "x.yaml")
}

// checkAlone fails if anything but name stands in dir.
func checkAlone(t *testing.T, dir, name string) {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range entries {
		if e.Name() != name {
			t.Errorf("%s is left behind", e.Name())
		}
	}
}
