package packet

import (
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/layout/ink"
)

// TestFirm: the firm's name stands on the cover in full and in the foot of every list
// sheet, its mark on the cover; the owner stays the client.
func TestFirm(t *testing.T) {
	dir := t.TempDir()
	for name, text := range map[string]string{
		"firm.yaml": "name: Hollow & Hill\nlogo: mark.svg\n",
		"mark.svg":  `<svg viewBox="0 0 40 10"><path fill="#123456" d="M0 0h40v10H0z"/></svg>`,
	} {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	d := example(t, "juniper-flat")
	d.Facts = copyFacts(d.Facts)
	site := *d.Site
	site.Practice.Texts.Val = dir
	d.Facts.Site = &site
	p := built(t, d)
	checkSheets(t, p, letter, letterSide)
	for i, s := range p.plans {
		if s.s.drawing != nil {
			continue
		}
		var all []string
		marks := 0
		eachCall(p.recorders[i].Calls, func(c ink.Call) {
			switch c := c.(type) {
			case ink.Written:
				all = append(all, c.Text)
			case ink.Filled:
				if c.Color == 0x123456 {
					marks++
					if b := c.Path.Bounds(); math.Abs(b.W-4*b.H) > 1e-9 || b.Y < letter.t || b.Y+b.H > letter.t+10 {
						t.Errorf("the mark stands at %+v", b)
					}
				}
			}
		})
		text := strings.Join(all, "\n")
		if !strings.Contains(text, "Prepared, Hollow & Hill") || !strings.Contains(text, site.Job.Client.Val) {
			t.Errorf("sheet %d: firm or owner is missing in the foot", i+1)
		}
		if cover := s.s.key == keyCover; cover != (marks == 1) || cover && !strings.Contains(text, "\nHollow & Hill\n") {
			t.Errorf("sheet %d: %d marks", i+1, marks)
		}
	}
	firm, err := Firm(d)
	if err != nil || firm.Name != "Hollow & Hill" || firm.Logo == nil {
		t.Errorf("firm %+v, %v", firm, err)
	}
}
