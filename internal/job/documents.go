package job

import (
	"bytes"
	"fmt"
	"path/filepath"

	"gloamwright/internal/design"
	"gloamwright/internal/release"
	"gloamwright/internal/results"
	"gloamwright/layout/packet"
	"gloamwright/layout/schematic"
)

// Documents draws and writes every document of a design, in memory.
func Documents(d *design.Design) ([]release.File, error) {
	var files []release.File
	sheets, err := schematic.Sheets(d)
	if err != nil {
		return nil, fmt.Errorf("the schematic cannot be drawn: %w", err)
	}
	firm, err := packet.Firm(d)
	if err != nil {
		return nil, fmt.Errorf("the packet: %w", err)
	}
	for i, s := range sheets {
		s.Firm = firm
		data, err := s.SVG()
		if err != nil {
			return nil, fmt.Errorf("schematic sheet %d: %w", i+1, err)
		}
		files = append(files, release.File{Name: fmt.Sprintf("schematic-%d.svg", i+1), Data: data})
	}
	curves, err := packet.TimeCurrent(d)
	if err != nil {
		return nil, fmt.Errorf("the time-current pictures: %w", err)
	}
	if curves != nil {
		files = append(files, release.File{Name: "time-current.svg", Data: curves})
	}
	pdf, err := packet.Make(d, sheets)
	if err != nil {
		return nil, fmt.Errorf("the packet: %w", err)
	}
	files = append(files, release.File{Name: "packet.pdf", Data: pdf})
	for _, t := range results.Tables(d) {
		var b bytes.Buffer
		if err := t.Write(&b); err != nil {
			return nil, fmt.Errorf("%s: %w", t.Name, err)
		}
		files = append(files, release.File{Name: t.Name, Data: b.Bytes()})
	}
	js, err := results.JSON(d)
	if err != nil {
		return nil, fmt.Errorf("results.json: %w", err)
	}
	return append(files, release.File{Name: "results.json", Data: js}), nil
}

// Folder returns where the documents of a design go, below out.
func Folder(out string, d *design.Design) string {
	return filepath.Join(out, d.Site.Job.Number.Val, d.Site.Job.Revision.Val)
}
