package job

import (
	"os"
	"path/filepath"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/release"
	"gloamwright/internal/stage"
)

// Job is a description that was read and designed, with what was released of it
// before.
type Job struct {
	Path     string
	Design   *design.Design
	Released *release.Project
}

// Open reads the description at path, its shared files and its register, and designs
// it: labels given before stay, and what was issued keeps its ways. set holds changes of
// single values, as "duty.outage=6h", that are made to the text in memory only.
func Open(path string, set []string) (*Job, error) {
	src, err := os.ReadFile(path)
	if err != nil {
		return nil, &Unreadable{err}
	}
	for _, s := range set {
		if src, err = override(src, s); err != nil {
			return nil, err
		}
	}
	read := describe.Options{ReadFile: describe.FolderReader(filepath.Dir(path))}
	site, list := read.Parse(filepath.Base(path), src, stage.Schema())
	if list.HasErrors() {
		return nil, &Mistakes{list, site.Sources}
	}
	warnings := list
	if t := &site.Practice.Texts; t.Val != "" { // named from the description's folder
		t.Val = filepath.Join(filepath.Dir(path), t.Val)
	}
	released, err := release.Open(path)
	if err != nil {
		return nil, err
	}
	kept, list := released.Register.Keep(site)
	if list.HasErrors() {
		return nil, &Mistakes{list, site.Sources}
	}
	d, err := design.Make(site, kept)
	if err != nil {
		return nil, err
	}
	d.Warnings = warnings
	return &Job{Path: path, Design: d, Released: released}, nil
}

// Compare puts the change notice against an issued revision into the design, so that
// its documents show it. Against no revision (nil) there is none.
func (j *Job) Compare(base *release.Issued) error {
	c, err := j.Released.Notice(base, j.Design, stage.Schema())
	if err != nil {
		return err
	}
	j.Design.Changes = c
	return nil
}
