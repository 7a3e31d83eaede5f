package job

import (
	"fmt"

	"gloamwright/internal/release"
)

// Draft is the documents of a description as it is now.
type Draft struct {
	*Job
	Folder  string // where its documents stand
	Files   []release.File
	Changed bool // false: they stood there as they are
}

// NewDraft designs the description at path and draws its documents, in memory. Their
// change notice is against the last revision issued before the description's own.
func NewDraft(path, out string) (*Draft, error) {
	j, err := Open(path, nil)
	if err != nil {
		return nil, err
	}
	if err := j.Compare(j.Released.Before(j.Design.Site.Job.Revision.Val)); err != nil {
		return nil, err
	}
	files, err := Documents(j.Design)
	if err != nil {
		return nil, err
	}
	return &Draft{Job: j, Folder: Folder(out, j.Design), Files: files}, nil
}

// Write puts the documents in their folder, whole or not at all.
func (d *Draft) Write() error {
	changed, err := release.WriteFolder(d.Folder, d.Files)
	if err != nil {
		return err
	}
	d.Changed = changed
	return nil
}

// Where says in one line where the documents are.
func (d *Draft) Where() string {
	if d.Changed {
		return fmt.Sprintf("%d documents in %s", len(d.Files), d.Folder)
	}
	return fmt.Sprintf("Nothing changed: the %d documents in %s stand as they are.", len(d.Files), d.Folder)
}

// Caution says what is wrong with drafting this revision, "" if nothing is.
func (d *Draft) Caution() string {
	revision := d.Design.Site.Job.Revision.Val
	if !d.Released.Has(revision) {
		return ""
	}
	return fmt.Sprintf("Revision %s is issued and stays as it is; these are drafts. For a change, give the description revision: %s.",
		revision, release.NextRevision(d.Released.Register.Last()))
}
