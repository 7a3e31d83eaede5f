package main

import (
	"bytes"
	"errors"
	"io/fs"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
	"time"

	"gloamwright/internal/release"
)

// program starts the program as a process of its own in dir.
func program(dir string, args ...string) *exec.Cmd {
	cmd := exec.Command(os.Args[0], args...)
	cmd.Dir = dir
	cmd.Env = append(os.Environ(), asProgram+"=1")
	return cmd
}

// Killed at any moment while it writes, issue leaves what was before or the whole
// revision, and the next run goes on from either.
func TestIssueKilled(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("no SIGKILL")
	}
	src, err := os.ReadFile("../../examples/juniper-flat.yaml")
	if err != nil {
		t.Fatal(err)
	}
	second := bytes.Replace(bytes.Replace(src, []byte("revision: A"), []byte("revision: B"), 1), []byte("outage: 3 h"), []byte("outage: 4 h"), 1)

	dir := t.TempDir()
	path := filepath.Join(dir, "site.yaml")
	write := func(text []byte) {
		t.Helper()
		if err := os.WriteFile(path, text, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	write(src)
	if out, err := program(dir, "issue", "site.yaml").CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	register, err := os.ReadFile(release.RegisterPath(path))
	if err != nil {
		t.Fatal(err)
	}
	write(second)
	reset := func() {
		t.Helper()
		err := errors.Join(os.RemoveAll(filepath.Join(release.IssuedPath(path), "B")), os.WriteFile(release.RegisterPath(path), register, 0o644))
		if err != nil {
			t.Fatal(err)
		}
	}
	// How long it writes, measured on an undisturbed run.
	undisturbed := program(dir, "issue", "site.yaml")
	if err := undisturbed.Start(); err != nil {
		t.Fatal(err)
	}
	awaitWriting(path)
	begin := time.Now()
	if err := undisturbed.Wait(); err != nil {
		t.Fatal(err)
	}
	writes := time.Since(begin)
	want := files(t, dir)

	const rounds = 12
	random := rand.New(rand.NewPCG(7, 7))
	before, after, between := 0, 0, 0
	for range rounds {
		reset()
		cmd := program(dir, "issue", "site.yaml")
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		awaitWriting(path)
		time.Sleep(time.Duration(random.Float64() * 1.2 * float64(writes)))
		if err := cmd.Process.Kill(); err != nil && !errors.Is(err, os.ErrProcessDone) {
			t.Fatal(err)
		}
		cmd.Wait()

		p, err := release.Open(path)
		if err != nil {
			t.Fatalf("what was left cannot be opened: %v", err)
		}
		switch b := p.Find("B"); {
		case b == nil:
			before++
			if now, err := os.ReadFile(release.RegisterPath(path)); err != nil || !bytes.Equal(now, register) {
				t.Fatalf("revision B is not there, but the register has changed: %v", err)
			}
		default:
			if err := b.Verify(); err != nil {
				t.Fatalf("revision B is not whole: %v", err)
			}
			if p.Pending {
				between++
			} else {
				after++
			}
		}
		if err := p.Find("A").Verify(); err != nil {
			t.Fatalf("revision A was touched: %v", err)
		}
		// The next run completes it, or says that it is issued already.
		out, err := program(dir, "issue", "site.yaml").CombinedOutput()
		if err != nil && !strings.Contains(string(out), "Revision B is issued already") {
			t.Fatalf("the next run: %v\n%s", err, out)
		}
		got := files(t, dir)
		for name, data := range want {
			if !bytes.Equal(got[name], data) {
				t.Fatalf("%s differs from that of an undisturbed run", name)
			}
		}
		for name := range got {
			if _, ok := want[name]; !ok {
				t.Fatalf("%s is left over", name)
			}
		}
	}
	t.Logf("killed %d times: %d before, %d between folder and register, %d after", rounds, before, between, after)
	if before == 0 {
		t.Error("no run was killed before the revision stood")
	}
}

// awaitWriting returns when a revision begins to be written, or after a while.
func awaitWriting(path string) {
	for deadline := time.Now().Add(20 * time.Second); time.Now().Before(deadline) && !writing(path); {
		time.Sleep(100 * time.Microsecond)
	}
}

// writing reports whether a revision is being written beside the description.
func writing(path string) bool {
	entries, err := os.ReadDir(release.IssuedPath(path))
	if err != nil {
		return false
	}
	for _, e := range entries {
		if e.Name() != "A" {
			return true
		}
	}
	return false
}

// files returns every file under dir with its contents.
func files(t *testing.T, dir string) map[string][]byte {
	t.Helper()
	out := map[string][]byte{}
	err := filepath.WalkDir(dir, func(name string, e fs.DirEntry, err error) error {
		if err != nil || e.IsDir() {
			return err
		}
		data, err := os.ReadFile(name)
		rel, _ := filepath.Rel(dir, name)
		out[rel] = data
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	return out
}
