package release

import (
	"bytes"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/finding"
	"gloamwright/internal/results"
	"gloamwright/internal/stage"
)

// desk is a folder with one description, on which the tests work as a user would.
type desk struct {
	t    *testing.T
	path string
}

// newDesk copies an example to a folder of its own.
func newDesk(t *testing.T, example string) *desk {
	t.Helper()
	src, err := os.ReadFile(filepath.Join("..", "..", "examples", example+".yaml"))
	if err != nil {
		t.Fatal(err)
	}
	d := &desk{t, filepath.Join(t.TempDir(), example+".yaml")}
	if err := os.WriteFile(d.path, src, 0o644); err != nil {
		t.Fatal(err)
	}
	return d
}

// edit replaces texts in the description: old, new, old, new …
func (d *desk) edit(pairs ...string) {
	d.t.Helper()
	src, err := os.ReadFile(d.path)
	if err != nil {
		d.t.Fatal(err)
	}
	text := string(src)
	for i := 0; i < len(pairs); i += 2 {
		if !strings.Contains(text, pairs[i]) {
			d.t.Fatalf("the description has no %q", pairs[i])
		}
		text = strings.Replace(text, pairs[i], pairs[i+1], 1)
	}
	if err := os.WriteFile(d.path, []byte(text), 0o644); err != nil {
		d.t.Fatal(err)
	}
}

// open designs the description as a command does.
func (d *desk) open() (*Project, *design.Design) {
	d.t.Helper()
	src, err := os.ReadFile(d.path)
	if err != nil {
		d.t.Fatal(err)
	}
	read := describe.Options{ReadFile: describe.FolderReader(filepath.Dir(d.path))}
	site, list := read.Parse(filepath.Base(d.path), src, stage.Schema())
	if list.HasErrors() {
		d.t.Fatal(list)
	}
	p, err := Open(d.path)
	if err != nil {
		d.t.Fatal(err)
	}
	kept, list := p.Register.Keep(site)
	if list.HasErrors() {
		d.t.Fatal(list)
	}
	made, err := design.Make(site, kept)
	if err != nil {
		d.t.Fatal(err)
	}
	if made.Changes, err = p.Notice(p.Last(), made, stage.Schema()); err != nil {
		d.t.Fatal(err)
	}
	return p, made
}

// documents returns the one document that comparing needs.
func documents(t *testing.T, d *design.Design) []File {
	t.Helper()
	js, err := results.JSON(d)
	if err != nil {
		t.Fatal(err)
	}
	return []File{{resultsFile, js}}
}

func (d *desk) issue() error {
	d.t.Helper()
	p, made := d.open()
	if _, err := p.Complete(); err != nil {
		d.t.Fatal(err)
	}
	_, err := p.Freeze(made, documents(d.t, made), nil)
	return err
}

func (d *desk) mustIssue() {
	d.t.Helper()
	if err := d.issue(); err != nil {
		d.t.Fatal(err)
	}
}

func TestIssue(t *testing.T) {
	d := newDesk(t, "juniper-flat")
	if err := os.WriteFile(filepath.Join(filepath.Dir(d.path), "house.yaml"), []byte("conductors: awg\npaper: ansi\nlamp_drop: 6 %\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	d.edit("practice:\n  conductors: awg\n  paper: ansi\n  lamp_drop: 6 %\n  clear_within: 5 s\n  colours: {positive: RD, negative: BK}\n", "practice: house.yaml\n")
	before, err := os.ReadFile(d.path)
	if err != nil {
		t.Fatal(err)
	}
	d.mustIssue()
	p, _ := d.open()
	if p.Pending || p.Register.Last() != "A" || p.Last().Revision != "A" {
		t.Fatalf("after the first issue: %+v", p)
	}
	if err := p.Last().Verify(); err != nil {
		t.Error(err)
	}
	for name, want := range map[string][]byte{"juniper-flat.yaml": before, "house.yaml": nil} {
		got, err := os.ReadFile(filepath.Join(p.Last().Dir, descriptionFolder, name))
		if err != nil || want != nil && !bytes.Equal(got, want) {
			t.Errorf("%s is not kept as it was: %v", name, err)
		}
	}
	onDesk, err := os.ReadFile(RegisterPath(d.path))
	if err != nil {
		t.Fatal(err)
	}
	frozen, err := os.ReadFile(filepath.Join(p.Last().Dir, registerFile))
	if err != nil || !bytes.Equal(onDesk, frozen) {
		t.Errorf("the register and its copy in the revision differ: %v", err)
	}
	// What was issued can be built again from its own folder.
	site, err := p.Last().site(stage.Schema())
	if err != nil || site.Practice.LampDrop.Val != 0.06 {
		t.Errorf("the frozen description: %v", err)
	}
}

func TestIssueRefusals(t *testing.T) {
	refused := func(d *desk, want string) {
		t.Helper()
		err := d.issue()
		var r *Refused
		if !errors.As(err, &r) || !strings.Contains(r.Text, want) {
			t.Errorf("want a refusal with %q, got %v", want, err)
		}
	}
	d := newDesk(t, "juniper-flat")
	d.edit("revision: A", "revision: B")
	refused(d, "The first revision is A")
	d.edit("revision: B", "revision: A")
	d.mustIssue()
	refused(d, "Revision A is issued already")
	d.edit("outage: 3 h", "outage: 4 h")
	refused(d, "Give the description revision: B")
	d.edit("revision: A", "revision: C")
	refused(d, "After revision A comes B, not C")
	d.edit("revision: C", "revision: B", "outage: 4 h", "outage: 180 min # the same", "date: 2026-12-01", "date: 2027-01-15")
	refused(d, "Nothing has changed since revision A")
	d.edit("outage: 180 min", "outage: 4 h")
	d.mustIssue()
	if _, err := os.Stat(filepath.Join(IssuedPath(d.path), "B", noticeFile)); err != nil {
		t.Error(err)
	}

	p, made := d.open()
	made.Site.Job.Revision.Val = "C"
	made.Findings = append(made.Findings, finding.Finding{Severity: finding.Stop, Message: "-E1: too bright", Remedy: "dim it"})
	var r *Refused
	if err := p.MayIssue(made); !errors.As(err, &r) || !r.Stop || !strings.Contains(r.Text, "-E1: too bright\n           dim it") {
		t.Errorf("with a stop finding: %v", err)
	}
}

// A run that was killed after the revision's folder was put in its place, and before
// the register, is completed by the next.
func TestIssueCompleted(t *testing.T) {
	d := newDesk(t, "juniper-flat")
	d.mustIssue()
	first, err := os.ReadFile(RegisterPath(d.path))
	if err != nil {
		t.Fatal(err)
	}
	d.edit("revision: A", "revision: B", "12 ft bulkhead at door", "12 ft bulkhead at door, 9 ft bulkhead at shelf")
	d.mustIssue()
	second, err := os.ReadFile(RegisterPath(d.path))
	if err != nil {
		t.Fatal(err)
	}
	steps := []struct {
		name string
		undo func() error
		want []byte
		last string
	}{
		{"the register of before", func() error { return os.WriteFile(RegisterPath(d.path), first, 0o644) }, second, "B"},
		{"no register yet", func() error {
			return errors.Join(os.RemoveAll(filepath.Join(IssuedPath(d.path), "B")), os.Remove(RegisterPath(d.path)))
		}, first, "A"},
	}
	for _, s := range steps {
		if err := s.undo(); err != nil {
			t.Fatal(err)
		}
		p, err := Open(d.path)
		if err != nil {
			t.Fatalf("%s: %v", s.name, err)
		}
		if !p.Pending || p.Register.Last() != s.last {
			t.Errorf("%s: pending %v, register of %s", s.name, p.Pending, p.Register.Last())
		}
		if done, err := p.Complete(); !done || err != nil {
			t.Errorf("%s: %v, %v", s.name, done, err)
		}
		if got, err := os.ReadFile(RegisterPath(d.path)); err != nil || !bytes.Equal(got, s.want) {
			t.Errorf("%s: the register is not that of revision %s: %v", s.name, s.last, err)
		}
		if p, err = Open(d.path); err != nil || p.Pending {
			t.Errorf("%s: still pending, %v", s.name, err)
		}
	}
}

// Damage is told, with what to do, and nothing is made anew.
func TestDamage(t *testing.T) {
	d := newDesk(t, "juniper-flat")
	d.mustIssue()
	d.edit("revision: A", "revision: B", "outage: 3 h", "outage: 5 h")
	d.mustIssue()
	reg, err := os.ReadFile(RegisterPath(d.path))
	if err != nil {
		t.Fatal(err)
	}
	dirA := filepath.Join(IssuedPath(d.path), "A")
	frozenA, err := os.ReadFile(filepath.Join(dirA, registerFile))
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		name string
		hurt func() error
		want []string
	}{
		{"edited", func() error {
			return os.WriteFile(RegisterPath(d.path), bytes.Replace(reg, []byte("-G1"), []byte("-G9"), 1), 0o644)
		}, []string{"juniper-flat.register.yaml:", ":1: error: register changed by hand", "checksum: "}},
		{"removed", func() error { return os.Remove(RegisterPath(d.path)) }, []string{"is missing, but revision B is issued", "version control"}},
		{"of another branch", func() error {
			old := bytes.ReplaceAll(frozenA, []byte("revisions: [A]"), []byte("revisions: []"))
			old = old[:bytes.LastIndex(old, []byte(checksumKey))]
			return os.WriteFile(RegisterPath(d.path), sealed(string(old)), 0o644)
		}, []string{"ends with revision", "B is issued"}},
	} {
		if err := c.hurt(); err != nil {
			t.Fatal(err)
		}
		_, err := Open(d.path)
		var dam *Damaged
		if !errors.As(err, &dam) {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		for _, w := range c.want {
			if !strings.Contains(err.Error(), w) {
				t.Errorf("%s: %q is not in\n%v", c.name, w, err)
			}
		}
		if err := os.WriteFile(RegisterPath(d.path), reg, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	// A changed document of an issued revision is found before it is compared with.
	name := filepath.Join(IssuedPath(d.path), "B", resultsFile)
	data, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(name, append(data, ' '), 0o644); err != nil {
		t.Fatal(err)
	}
	p, err := Open(d.path)
	if err != nil {
		t.Fatal(err)
	}
	var dam *Damaged
	if _, err := p.Last().record(); !errors.As(err, &dam) || !strings.Contains(err.Error(), "not as it was issued") {
		t.Errorf("changed results: %v", err)
	}
}

// The texts of a revision are checked against the register, so that exchanging a text
// together with its line in the list of checksums is found.
func TestTextsAreChecked(t *testing.T) {
	d := newDesk(t, "juniper-flat")
	d.edit("  paper: ansi", "  paper: ansi\n  texts: words")
	p, made := d.open()
	if _, err := p.Freeze(made, documents(t, made), []File{{"words/firm.yaml", []byte("name: Hollow\n")}}); err != nil {
		t.Fatal(err)
	}
	p, _ = d.open()
	last := p.Last()
	if err := p.Verify(last, stage.Schema()); err != nil {
		t.Fatal(err)
	}
	file := filepath.Join(last.Dir, descriptionFolder, "words", "firm.yaml")
	other := []byte("name: Hill\n")
	if err := os.WriteFile(file, other, 0o644); err != nil {
		t.Fatal(err)
	}
	if err := p.Verify(last, stage.Schema()); err == nil || !strings.Contains(err.Error(), "checksum differs") {
		t.Errorf("a changed text: %v", err)
	}
	list := filepath.Join(last.Dir, checksumsFile)
	sums, err := os.ReadFile(list)
	if err != nil {
		t.Fatal(err)
	}
	was, is := sumsOf([]File{{"x", []byte("name: Hollow\n")}}).Data[:64], sumsOf([]File{{"x", other}}).Data[:64]
	if err := os.WriteFile(list, bytes.ReplaceAll(sums, was, is), 0o644); err != nil {
		t.Fatal(err)
	}
	if err := p.Verify(last, stage.Schema()); err == nil || !strings.Contains(err.Error(), "register names") {
		t.Errorf("a text exchanged with its checksum: %v", err)
	}
}
