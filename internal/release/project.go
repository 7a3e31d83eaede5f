package release

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"

	"gloamwright/internal/describe"
)

// Project is what was released of one description: its register and its issued
// revisions.
type Project struct {
	Description string // path of the description's file
	// Register holds the labels given; nil as long as no revision was issued.
	Register *Register
	Issued   []*Issued // in order
	// Pending says that the last revision was issued, but the run was interrupted before
	// the register stood in its place. Register is then that of the revision.
	Pending bool
	pending []byte
}

// Damaged is returned when the register or an issued revision is not as it was written.
type Damaged struct {
	List    describe.List
	Sources describe.Sources
	Text    string // when no file can be shown
}

// Error says what is damaged and what to do.
func (e *Damaged) Error() string {
	if e.Text != "" {
		return e.Text
	}
	var b strings.Builder
	if err := e.List.Write(&b, e.Sources); err != nil {
		return err.Error()
	}
	return strings.TrimRight(b.String(), "\n")
}

func damaged(format string, a ...any) error { return &Damaged{Text: fmt.Sprintf(format, a...)} }

// RegisterPath returns where the register of a description stands.
func RegisterPath(description string) string { return stem(description) + ".register.yaml" }

// IssuedPath returns the folder of a description's issued revisions. Descriptions that
// stand in one folder, to share a practice file, have one each.
func IssuedPath(description string) string {
	return filepath.Join(filepath.Dir(description), "issued", filepath.Base(stem(description)))
}

func stem(description string) string {
	return strings.TrimSuffix(description, filepath.Ext(description))
}

// Open reads the register and lists the issued revisions of a description. It writes
// nothing. What is damaged is returned as *Damaged.
func Open(description string) (*Project, error) {
	p := &Project{Description: description}
	if err := p.list(); err != nil {
		return nil, err
	}
	path := RegisterPath(description)
	src, err := os.ReadFile(path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return p, p.withoutRegister(path)
	case err != nil:
		return nil, fmt.Errorf("cannot read the register %s: %w", path, err)
	}
	reg, list := DecodeRegister(filepath.Base(path), src)
	if list.HasErrors() {
		return nil, &Damaged{List: list, Sources: describe.Sources{filepath.Base(path): src}}
	}
	p.Register = reg
	return p, p.agree(path)
}

var revisionName = regexp.MustCompile(`^[A-Z]{1,2}$`)

// list finds the issued revisions.
func (p *Project) list() error {
	dir := IssuedPath(p.Description)
	entries, err := os.ReadDir(dir)
	if errors.Is(err, fs.ErrNotExist) {
		return nil
	}
	if err != nil {
		return fmt.Errorf("cannot read the issued revisions: %w", err)
	}
	for _, e := range entries {
		if e.IsDir() && revisionName.MatchString(e.Name()) {
			p.Issued = append(p.Issued, &Issued{Revision: e.Name(), Dir: filepath.Join(dir, e.Name())})
		}
	}
	slices.SortFunc(p.Issued, func(a, b *Issued) int { return compareRevisions(a.Revision, b.Revision) })
	return nil
}

// compareRevisions orders revisions as they follow each other: Z before AA.
func compareRevisions(a, b string) int {
	if len(a) != len(b) {
		return len(a) - len(b)
	}
	return strings.Compare(a, b)
}

// withoutRegister handles a description that has no register: nothing was issued, or
// the run that issued the first revision was interrupted, or the register was lost.
func (p *Project) withoutRegister(path string) error {
	switch len(p.Issued) {
	case 0:
		return nil
	case 1:
		if p.Issued[0].Revision == NextRevision("") {
			return p.takeFrom(p.Issued[0])
		}
	}
	last := p.Issued[len(p.Issued)-1]
	return damaged("The register %s is missing, but revision %s is issued. The labels on site depend on it: bring it back from version control, or copy %s to it.",
		path, last.Revision, filepath.Join(last.Dir, registerFile))
}

// agree checks that register and issued revisions tell the same, and takes up a
// revision whose register did not get to its place.
func (p *Project) agree(path string) error {
	last := p.Register.Last()
	if len(p.Issued) == 0 {
		return nil // the folder is not kept here; who needs a revision says so
	}
	i := slices.IndexFunc(p.Issued, func(r *Issued) bool { return compareRevisions(r.Revision, last) > 0 })
	if i < 0 {
		return nil
	}
	if i == len(p.Issued)-1 && p.Issued[i].Revision == NextRevision(last) {
		return p.takeFrom(p.Issued[i])
	}
	newest := p.Issued[len(p.Issued)-1]
	return damaged("The register %s ends with revision %s, but revision %s is issued: it is an old version. Bring the newest back from version control, or copy %s over it.",
		path, last, newest.Revision, filepath.Join(newest.Dir, registerFile))
}

// takeFrom uses the register that was issued with a revision.
func (p *Project) takeFrom(r *Issued) error {
	name := filepath.Join(r.Dir, registerFile)
	src, err := os.ReadFile(name)
	if err != nil {
		return damaged("Revision %s is issued, but its register cannot be read: %v.", r.Revision, err)
	}
	reg, list := DecodeRegister(name, src)
	if list.HasErrors() {
		return &Damaged{List: list, Sources: describe.Sources{name: src}}
	}
	if reg.Last() != r.Revision {
		return damaged("%s is the register of revision %s, not of %s.", name, reg.Last(), r.Revision)
	}
	p.Register, p.Pending, p.pending = reg, true, src
	return nil
}

// Complete puts the register of an interrupted issue in its place. It reports whether
// there was anything to complete.
func (p *Project) Complete() (bool, error) {
	if !p.Pending {
		return false, nil
	}
	if err := WriteFile(RegisterPath(p.Description), p.pending); err != nil {
		return false, err
	}
	p.Pending, p.pending = false, nil
	return true, nil
}

// Verify checks every file of an issued revision against its checksum, and the firm's
// texts against the register.
func (p *Project) Verify(r *Issued, schema *describe.Schema) error {
	if err := r.Verify(); err != nil {
		return err
	}
	want := p.Register.Texts[r.Revision]
	if want == "" {
		return nil
	}
	site, err := r.site(schema)
	if err != nil {
		return err
	}
	texts, err := r.texts(site.Practice.Texts.Val)
	if err != nil {
		return err
	}
	if sumOfTexts(texts) != want {
		return damaged("The firm's texts of revision %s are not those that the register names. Bring %s back from version control or a backup.", r.Revision, r.Dir)
	}
	return nil
}

// Last returns the last issued revision, nil if there is none.
func (p *Project) Last() *Issued {
	if len(p.Issued) == 0 {
		return nil
	}
	return p.Issued[len(p.Issued)-1]
}

// Before returns the last issued revision before the given one, nil if there is none.
func (p *Project) Before(revision string) *Issued {
	var last *Issued
	for _, r := range p.Issued {
		if compareRevisions(r.Revision, revision) < 0 {
			last = r
		}
	}
	return last
}

// Find returns an issued revision; nil if it was not issued, or is not kept here.
func (p *Project) Find(revision string) *Issued {
	for _, r := range p.Issued {
		if r.Revision == revision {
			return r
		}
	}
	return nil
}

// Has reports whether a revision was issued, be its folder here or not.
func (p *Project) Has(revision string) bool {
	return p.Find(revision) != nil || p.Register != nil && slices.Contains(p.Register.Revisions, revision)
}
