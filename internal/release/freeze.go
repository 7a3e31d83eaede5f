package release

import (
	"errors"
	"fmt"
	"io/fs"
	"path"
	"path/filepath"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/finding"
)

// Refused is returned when a design cannot be issued as it is.
type Refused struct {
	Text string
	Stop bool // because a stop finding stands
}

// Error says why, and what to do.
func (r *Refused) Error() string { return r.Text }

func refuse(format string, a ...any) error { return &Refused{Text: fmt.Sprintf(format, a...)} }

// MayIssue returns why a design cannot be issued, nil if it can. d.Changes must hold the
// notice against the last issued revision, if there is one.
func (p *Project) MayIssue(d *design.Design) error {
	revision := d.Site.Job.Revision.Val
	last := p.Register.Last()
	next := NextRevision(last)
	switch {
	case p.Has(revision):
		return refuse("Revision %s is issued already and stays as it is. Give the description revision: %s.", revision, next)
	case next == "":
		return refuse("Revision %s is the last one that there can be.", last)
	case revision != next && last == "":
		return refuse("The first revision is %s, not %s. Give the description revision: %s.", next, revision, next)
	case revision != next:
		return refuse("After revision %s comes %s, not %s. Give the description revision: %s.", last, next, revision, next)
	case last != "" && p.Find(last) == nil:
		return refuse("Revision %s is issued, but its folder is not at %s. What changed since then cannot be told without it: bring it back first.", last, filepath.Join(IssuedPath(p.Description), last))
	case !d.ForConstruction():
		return &Refused{Text: stops(d), Stop: true}
	case last != "" && d.Changes != nil && Unchanged(d.Changes):
		return refuse("Nothing has changed since revision %s: there is nothing to issue.", last)
	}
	return nil
}

// stops lists the stop findings.
func stops(d *design.Design) string {
	var b strings.Builder
	b.WriteString("Not issued: this must not be built.")
	for _, f := range d.Findings {
		if f.Severity != finding.Stop {
			continue
		}
		b.WriteString("\n  stop     " + f.Message)
		if f.Remedy != "" {
			b.WriteString("\n           " + f.Remedy)
		}
		if f.At.Line > 0 {
			b.WriteString("\n           at " + f.At.String())
		}
	}
	return b.String()
}

// Freeze issues the revision of a design: documents, the description as it is, the
// firm's texts, the register and checksums appear together in the revision's folder, in
// one step; then the register takes its place. A run that is interrupted in between is
// completed by the next. texts are named from the description's folder, so that the
// revision can be built again from its own. It returns the folder.
func (p *Project) Freeze(d *design.Design, documents, texts []File) (string, error) {
	if err := p.MayIssue(d); err != nil {
		return "", err
	}
	revision := d.Site.Job.Revision.Val
	reg := p.Register.Next(revision, d.Labels, d.Site, d.Circuit)
	if len(texts) > 0 {
		if reg.Texts == nil {
			reg.Texts = map[string]string{}
		}
		reg.Texts[revision] = sumOfTexts(texts)
	}
	encoded, err := reg.Encode(filepath.Base(p.Description))
	if err != nil {
		return "", err
	}
	files := append([]File(nil), documents...)
	for _, name := range circuit.SortedKeys(d.Site.Sources) {
		files = append(files, File{path.Join(descriptionFolder, filepath.ToSlash(name)), d.Site.Sources[name]})
	}
	for _, f := range texts {
		files = append(files, File{path.Join(descriptionFolder, f.Name), f.Data})
	}
	files = append(files, File{registerFile, encoded})
	if d.Changes != nil {
		n, err := NoticeJSON(d.Changes)
		if err != nil {
			return "", err
		}
		files = append(files, File{noticeFile, n})
	}
	files = append(files, sumsOf(files))

	dir := filepath.Join(IssuedPath(p.Description), revision)
	if err := NewFolder(dir, files); err != nil {
		if errors.Is(err, fs.ErrExist) {
			return "", refuse("Revision %s is issued already and stays as it is.", revision)
		}
		return "", err
	}
	p.Issued = append(p.Issued, &Issued{Revision: revision, Dir: dir})
	p.Register, p.Pending, p.pending = reg, true, encoded
	if _, err := p.Complete(); err != nil {
		return dir, fmt.Errorf("revision %s is issued in %s, but its register is not in place yet: %w; run issue again to complete it", revision, dir, err)
	}
	return dir, nil
}
