package templates

import (
	"embed"
	"errors"
	"io/fs"
	"os"
	"path/filepath"

	"gloamwright/internal/describe"
)

//go:embed texts/*.yaml
var textFiles embed.FS

// Texts is the standing texts of a packet.
type Texts struct {
	Cautions   []Caution
	Competence []Competence
	Remark     string // below the cautions
	Checklist  []Block
	Legend     []LegendGroup
	Remedies   []Remedy
	Firm       Firm
	Files      []File // of the firm that were read, in that order
}

// File is a file of the firm's folder of texts.
type File struct {
	Name string // in the folder, with /
	Data []byte
}

// Caution is one warning and what it is printed for.
type Caution struct {
	Signal string   // danger, warning, caution, notice
	When   []string // all must hold; "not x" turns one round
	Head   string
	At     string // place of the hazard
	Text   string
	Absent string // name where the packet lists what the job has not; empty: not listed
}

// Competence is who may do what.
type Competence struct {
	Work, Who string
	When      []string
}

// Block is one part of the checklist.
type Block struct {
	Letter, Title string
	Sheet         string // a new sheet of that name begins; empty: goes on
	Purpose       string
	Before        string
	Remark        string
	Lines         []Line
	Hold          *Hold
}

// Line is one line of the checklist.
type Line struct {
	Key       string // by which texts refer to it
	Each      string // board, loop, condition, threshold; empty: once
	Do        string
	Expect    string
	Unit      string // of the blank; empty: no blank
	Write     string // a blank for a word or count, with its caption
	When      []string
	Otherwise string // reason why the line does not apply
}

// Hold is a hold point.
type Hold struct{ Text, Who string }

// LegendGroup is a part of the legend.
type LegendGroup struct {
	Title, Remark string
	Rows          []LegendRow
}

// LegendRow is a sign and its meaning.
type LegendRow struct{ Sign, Means string }

// Remedy is what to do about a kind of fault.
type Remedy struct{ Fault, Do string }

// The files of the standing texts.
const (
	cautionsFile  = "cautions.yaml"
	checklistFile = "checklist.yaml"
	faultsFile    = "faults.yaml"
	legendFile    = "legend.yaml"
)

// Load reads the standing texts. A file of the same name in the folder dir stands in for
// the one that the program brings; firm.yaml there names the firm and its logo. dir may
// be empty. Mistakes in such a file are
// reported like those of a description, with the sources to print their lines from.
func Load(dir string) (*Texts, describe.List, describe.Sources) {
	t := &Texts{}
	r := &reader{sources: describe.Sources{}}
	for _, f := range []struct {
		name string
		read func(*reader, *Texts, node)
	}{{cautionsFile, readCautions}, {checklistFile, readChecklist}, {faultsFile, readFaults}, {legendFile, readLegend}} {
		src, err := textFiles.ReadFile("texts/" + f.name)
		name := f.name
		if err != nil {
			panic("templates: " + err.Error()) // embedded: cannot be missing
		}
		if dir != "" {
			own := filepath.Join(dir, f.name)
			switch text, err := os.ReadFile(own); {
			case err == nil:
				src, name = text, own
				t.Files = append(t.Files, File{f.name, text})
			case !errors.Is(err, fs.ErrNotExist):
				r.report(describe.Span{File: own}, "unreadable text file", err.Error())
			}
		}
		r.file(name, src, func(n node) { f.read(r, t, n) })
	}
	if dir != "" {
		own := filepath.Join(dir, firmFile)
		switch text, err := os.ReadFile(own); {
		case err == nil:
			t.Files = append(t.Files, File{firmFile, text})
			r.file(own, text, func(n node) { readFirm(r, t, n) })
		case !errors.Is(err, fs.ErrNotExist):
			r.report(describe.Span{File: own}, "unreadable text file", err.Error())
		}
		if info, err := os.Stat(dir); err != nil || !info.IsDir() {
			r.report(describe.Span{File: dir}, "no folder of texts", "practice.texts names a folder with files such as "+cautionsFile+"; there is none here.")
		}
	}
	r.list.Sort()
	return t, r.list, r.sources
}
