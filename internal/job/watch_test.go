package job

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"
)

// screen collects what is printed, for reading while it is written.
type screen struct {
	mu   sync.Mutex
	text strings.Builder
}

func (s *screen) Write(p []byte) (int, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.text.Write(p)
}

// after returns what was printed from a position on.
func (s *screen) after(pos int) string {
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.text.String()[pos:]
}

// await returns once every part of want stands after pos, with the position after the
// report that it stands in.
func (s *screen) await(t *testing.T, pos int, want ...string) int {
	t.Helper()
	const end = "--\n" // printed before every report; see clear below
	for deadline := time.Now().Add(60 * time.Second); time.Now().Before(deadline); time.Sleep(10 * time.Millisecond) {
		text := s.after(pos)
		all := strings.Contains(text, end)
		for _, w := range want {
			all = all && strings.Contains(text, w)
		}
		if all {
			time.Sleep(3 * quiet) // no second report may follow from one save
			if n := strings.Count(s.after(pos), end); n != 1 {
				t.Errorf("%d reports for one save:\n%s", n, s.after(pos))
			}
			return pos + len(s.after(pos))
		}
	}
	t.Fatalf("%q was not printed within a minute:\n%s", want, s.after(pos))
	return 0
}

func example(t *testing.T, name string) []byte {
	t.Helper()
	src, err := os.ReadFile(filepath.Join("..", "..", "examples", name+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	return src
}

// However an editor saves, a save is one build; a mistake leaves the last good documents.
func TestWatch(t *testing.T) {
	dir := t.TempDir()
	path, out := filepath.Join(dir, "site.yaml"), filepath.Join(dir, "out")
	house := filepath.Join(dir, "house.yaml")
	src := string(example(t, "juniper-flat"))
	cut := strings.Index(src, "practice:")
	src = src[:cut] + "practice: house.yaml\n" + src[strings.Index(src, "\nduty:"):]
	practice := "conductors: awg\npaper: ansi\nlamp_drop: 6 %\n"
	save := func(name, text string) {
		t.Helper()
		if err := os.WriteFile(name, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	save(path, src)
	save(house, practice)

	ctx, stop := context.WithCancel(context.Background())
	var s screen
	ended := make(chan error)
	go func() { ended <- Watch(ctx, path, out, "--\n", &s) }()
	pos := s.await(t, 0, "Battery", "documents in "+out, "Watching")

	// Written in place.
	src = strings.Replace(src, "outage: 3 h", "outage: 4 h", 1)
	save(path, src)
	pos = s.await(t, pos, "Outage that the lights last: 3 h -> 4 h", "documents in "+out)
	results := filepath.Join(out, "JF-118", "A", "results.json")
	good, err := os.ReadFile(results)
	if err != nil {
		t.Fatal(err)
	}

	// Another file renamed over it, with a mistake.
	wrong := filepath.Join(dir, ".site.yaml.swp")
	save(wrong, strings.Replace(src, "outage: 4 h", "outage: 4 W", 1))
	if err := os.Rename(wrong, path); err != nil {
		t.Fatal(err)
	}
	pos = s.await(t, pos, "site.yaml:", "error:", "stay as they were")
	if now, err := os.ReadFile(results); err != nil || !bytes.Equal(now, good) {
		t.Errorf("the good documents did not stay: %v", err)
	}

	// The old one renamed away, a new one written, the backup removed: corrected.
	if err := os.Rename(path, path+"~"); err != nil {
		t.Fatal(err)
	}
	save(path, src)
	if err := os.Remove(path + "~"); err != nil {
		t.Fatal(err)
	}
	pos = s.await(t, pos, "The mistake is gone; nothing else has changed", "Nothing changed: the ")

	// A file that the description reads.
	save(house, strings.Replace(practice, "6 %", "4 %", 1))
	pos = s.await(t, pos, "drop to the farthest light, at most: 6 % -> 4 %")

	// Emptied first, then written.
	save(path, "")
	save(path, strings.Replace(src, "14 ft bulkhead at desk", "19 ft bulkhead at desk", 1))
	s.await(t, pos, "Office, cable to desk: 14 ft -> 19 ft")

	stop()
	select {
	case err := <-ended:
		if err != nil {
			t.Error(err)
		}
	case <-time.After(10 * time.Second):
		t.Error("watching does not end")
	}
}
