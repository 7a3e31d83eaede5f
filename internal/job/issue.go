package job

import (
	"fmt"
	"path"
	"path/filepath"
	"strings"

	"gloamwright/internal/release"
	"gloamwright/internal/stage"
	"gloamwright/layout/packet"
)

// Issuance is what became of issuing a revision.
type Issuance struct {
	Revision  string
	Folder    string // "" if nothing was left to issue
	Documents int
	Register  string
	// Completed is a revision whose issue had been interrupted, and that this run
	// completed; "" if there was none.
	Completed string
}

// Issue freezes the revision of the description at path. If an earlier run was
// interrupted it is completed first.
func Issue(path string) (*Issuance, error) {
	j, err := Open(path, nil)
	if err != nil {
		return nil, err
	}
	revision := j.Design.Site.Job.Revision.Val
	out := &Issuance{Revision: revision, Register: release.RegisterPath(path)}
	completed, err := j.Released.Complete()
	if err != nil {
		return nil, err
	}
	if completed {
		out.Completed = j.Released.Register.Last()
		if out.Completed == revision {
			return out, nil
		}
	}
	if last := j.Released.Last(); last != nil {
		if err := j.Released.Verify(last, stage.Schema()); err != nil {
			return nil, err
		}
	}
	if err := j.Compare(j.Released.Last()); err != nil {
		return nil, err
	}
	if err := j.Released.MayIssue(j.Design); err != nil {
		return nil, err
	}
	j.Design.Issued = true
	files, err := Documents(j.Design)
	if err != nil {
		return nil, err
	}
	texts, err := j.texts()
	if err != nil {
		return nil, err
	}
	out.Documents = len(files)
	out.Folder, err = j.Released.Freeze(j.Design, files, texts)
	return out, err
}

// texts are the firm's texts that the documents were made with, named from the
// description's folder.
func (j *Job) texts() ([]release.File, error) {
	list, err := packet.TextFiles(j.Design)
	if err != nil || len(list) == 0 {
		return nil, err
	}
	dir, err := filepath.Rel(filepath.Dir(j.Path), j.Design.Site.Practice.Texts.Val)
	if err != nil {
		return nil, err
	}
	var out []release.File
	for _, f := range list {
		out = append(out, release.File{Name: path.Join(filepath.ToSlash(dir), f.Name), Data: f.Data})
	}
	return out, nil
}

// String says what was done.
func (o *Issuance) String() string {
	var b strings.Builder
	if o.Completed != "" {
		fmt.Fprintf(&b, "The issue of revision %s had been interrupted; its register is in place now.\n", o.Completed)
	}
	if o.Folder != "" {
		fmt.Fprintf(&b, "Revision %s is issued: %d documents in %s\nLabels are in %s. Keep both in version control.\n", o.Revision, o.Documents, o.Folder, o.Register)
	}
	return strings.TrimRight(b.String(), "\n")
}
