package job

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"runtime"
	"sort"
	"strings"
	"text/tabwriter"
	"unicode/utf8"

	"gloamwright/internal/describe"
	"gloamwright/internal/finding"
)

// Find returns the descriptions that args name: files, and every description that
// stands in a folder itself. Registers are passed over where several files are named,
// as a pattern of the shell does. The order is that of args, within a folder by name.
func Find(args []string) ([]string, error) {
	var out []string
	seen := map[string]bool{}
	add := func(path string) {
		if p := filepath.Clean(path); !seen[p] {
			seen[p] = true
			out = append(out, path)
		}
	}
	for _, arg := range args {
		info, err := os.Stat(arg)
		switch {
		case err != nil:
			return nil, &Unreadable{err}
		case !info.IsDir():
			if len(args) == 1 || !isRegister(arg) {
				add(arg)
			}
			continue
		}
		files, err := descriptionsIn(arg)
		if err != nil {
			return nil, err
		}
		if len(files) == 0 {
			return nil, &Unreadable{fmt.Errorf("there is no description in the folder %s", arg)}
		}
		for _, f := range files {
			add(f)
		}
	}
	return out, nil
}

func isRegister(path string) bool { return strings.HasSuffix(path, ".register.yaml") }

func descriptionsIn(dir string) ([]string, error) {
	entries, err := os.ReadDir(dir)
	if err != nil {
		return nil, &Unreadable{err}
	}
	var out []string
	for _, e := range entries {
		path := filepath.Join(dir, e.Name())
		if ext := filepath.Ext(path); e.IsDir() || ext != ".yaml" && ext != ".yml" || isRegister(path) || !isDescription(path) {
			continue
		}
		out = append(out, path)
	}
	sort.Strings(out)
	return out, nil
}

// isDescription reports whether a file has the key by which a description is known. One
// that cannot be read counts, so that the reason is told when it is built.
func isDescription(path string) bool {
	src, err := os.ReadFile(path)
	if err != nil || len(src) > describe.MaxSize {
		return true
	}
	lines := bufio.NewScanner(bytes.NewReader(src))
	lines.Buffer(nil, describe.MaxSize+1)
	for lines.Scan() {
		if strings.HasPrefix(lines.Text(), "gloamwright:") {
			return true
		}
	}
	return false
}

// Outcome is what became of one description.
type Outcome struct {
	Path  string
	Draft *Draft // nil if Err is not
	Err   error
}

// Several builds descriptions side by side, one on each processor, and calls done with
// each outcome in the order of paths. One that fails does not hold up the others; of
// two that would write to one folder the second fails.
func Several(paths []string, out string, done func(i int, o Outcome)) {
	results := make([]chan Outcome, len(paths))
	for i := range results {
		results[i] = make(chan Outcome, 1)
	}
	// A worker does not run ahead further than there are processors, so that finished
	// documents do not pile up in memory.
	room := make(chan bool, 2*runtime.GOMAXPROCS(0))
	work := make(chan int)
	for range runtime.GOMAXPROCS(0) {
		go func() {
			for i := range work {
				d, err := draftSafely(paths[i], out)
				results[i] <- Outcome{Path: paths[i], Draft: d, Err: err}
			}
		}()
	}
	go func() {
		for i := range paths {
			room <- true
			work <- i
		}
		close(work)
	}()
	owner := map[string]string{}
	for i := range paths {
		o := <-results[i]
		if o.Err == nil {
			if first, taken := owner[o.Draft.Folder]; taken {
				o.Err = fmt.Errorf("%s would write to %s, where the documents of %s are: give it its own job number", o.Path, o.Draft.Folder, first)
			} else {
				owner[o.Draft.Folder] = o.Path
				o.Err = o.Draft.Write()
			}
		}
		if o.Err != nil {
			o.Draft = nil
		} else {
			o.Draft.Files = nil // written; their number is no longer needed
		}
		done(i, o)
		<-room
	}
}

// draftSafely is NewDraft; a failure of the program itself in one description does not
// end the others.
func draftSafely(path, out string) (d *Draft, err error) {
	defer func() {
		if r := recover(); r != nil {
			d, err = nil, fmt.Errorf("the program failed at %s, which is a mistake in it: %v", path, r)
		}
	}()
	return NewDraft(path, out)
}

// Table prints one line for each outcome.
func Table(w io.Writer, outcomes []Outcome) error {
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(t, "  Description\tJob\tRevision\tLights\tBattery\tStop\tCaution\tDocuments")
	for _, o := range outcomes {
		if o.Err != nil {
			fmt.Fprintf(t, "  %s\t\t\t\t\t\t\tnone: %s\n", o.Path, firstLine(o.Err.Error()))
			continue
		}
		d := o.Draft.Design
		state := "as they stood"
		if o.Draft.Changed {
			state = "written"
		}
		fmt.Fprintf(t, "  %s\t%s\t%s\t%d\t%s\t%d\t%d\t%s\n", o.Path, d.Site.Job.Number.Val, d.Site.Job.Revision.Val, d.Totals.Luminaires,
			d.Battery.Capacity, d.Count(finding.Stop), d.Count(finding.Caution), state)
	}
	return t.Flush()
}

// firstLine returns the beginning of a message, for a column.
func firstLine(s string) string {
	s, _, _ = strings.Cut(s, "\n")
	const most = 60
	if utf8.RuneCountInString(s) > most {
		s = string([]rune(s)[:most-1]) + "…"
	}
	return s
}
