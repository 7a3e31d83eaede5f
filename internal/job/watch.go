package job

import (
	"context"
	"fmt"
	"io"
	"path/filepath"
	"time"

	"github.com/fsnotify/fsnotify"

	"gloamwright/internal/design"
	"gloamwright/internal/release"
	"gloamwright/internal/stage"
)

// quiet is how long nothing may happen to the files before they are read. Editors save
// in several steps: they write another file and rename it, or empty the file first.
const quiet = 150 * time.Millisecond

// Watch builds the description at path, then again whenever it or a file that it reads
// is saved, until ctx is done. It prints what changed. While the description has a
// mistake, the last good documents stay. clear is printed before every report.
func Watch(ctx context.Context, path, out, clear string, w io.Writer) error {
	n, err := fsnotify.NewWatcher()
	if err != nil {
		return fmt.Errorf("files cannot be watched here: %w", err)
	}
	defer n.Close()
	s := &watcher{path: path, out: out, clear: clear, w: w, files: n, reads: map[string]bool{}}
	for _, f := range []string{path, release.RegisterPath(path)} {
		if err := s.follow(f); err != nil {
			return err
		}
	}
	s.build()
	timer := time.NewTimer(quiet)
	timer.Stop()
	for {
		select {
		case <-ctx.Done():
			return nil
		case e, ok := <-n.Events:
			if !ok {
				return nil
			}
			if s.concerns(e) {
				timer.Reset(quiet)
			}
		case err, ok := <-n.Errors:
			if !ok {
				return nil
			}
			fmt.Fprintf(w, "  Some changes may have been missed: %v. Save once more.\n", err)
			timer.Reset(quiet)
		case <-timer.C:
			s.build()
		}
	}
}

// watcher rebuilds one description.
type watcher struct {
	path, out, clear string
	w                io.Writer
	files            *fsnotify.Watcher
	reads            map[string]bool // files that the last build read
	good             *design.Design  // nil: none yet
	where            string
	broken           bool
}

// concerns reports whether something happened to a file that the job reads. While the
// description has a mistake, that may be a file which could not be read yet.
func (s *watcher) concerns(e fsnotify.Event) bool {
	if e.Op == fsnotify.Chmod {
		return false
	}
	name := filepath.Clean(e.Name)
	return s.reads[name] || s.broken && filepath.Ext(name) == filepath.Ext(s.path)
}

// follow watches the folder of a file: one that is renamed over is another file, the
// folder stays.
func (s *watcher) follow(path string) error {
	path = filepath.Clean(path)
	if s.reads[path] {
		return nil
	}
	dir := filepath.Dir(path)
	if err := s.files.Add(dir); err != nil {
		return fmt.Errorf("cannot watch the folder %s: %w", dir, err)
	}
	s.reads[path] = true
	return nil
}

// build builds once and prints what came of it.
func (s *watcher) build() {
	d, err := NewDraft(s.path, s.out)
	if err == nil {
		err = d.Write()
	}
	fmt.Fprint(s.w, s.clear)
	if err != nil {
		s.broken = true
		fmt.Fprintf(s.w, "%v\n", err)
		if s.good != nil {
			fmt.Fprintf(s.w, "\n  The documents in %s stay as they were.\n", s.where)
		}
		return
	}
	for name := range d.Design.Site.Sources {
		if err := s.follow(filepath.Join(filepath.Dir(s.path), name)); err != nil {
			fmt.Fprintf(s.w, "  %v\n", err)
		}
	}
	switch {
	case s.good == nil:
		Summary(s.w, d.Design)
	default:
		c, err := release.Between(s.good, d.Design, stage.Schema())
		if err != nil {
			fmt.Fprintf(s.w, "  %v\n", err)
			break
		}
		if release.Unchanged(c) && s.broken {
			fmt.Fprintln(s.w, "  The mistake is gone; nothing else has changed.")
		} else {
			release.WriteShort(s.w, c)
		}
	}
	fmt.Fprintf(s.w, "\n  %s\n", d.Where())
	if t := d.Caution(); t != "" {
		fmt.Fprintf(s.w, "  %s\n", t)
	}
	if !d.Design.ForConstruction() {
		fmt.Fprintln(s.w, "  NOT FOR CONSTRUCTION: a stop finding stands.")
	}
	fmt.Fprintf(s.w, "  Watching %s. End with Ctrl-C.\n", s.path)
	s.good, s.where, s.broken = d.Design, d.Folder, false
}
