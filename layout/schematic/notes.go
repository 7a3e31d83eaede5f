package schematic

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
)

// shortBy is how much lower a Tabloid sheet is, in modules.
const shortBy = 7

// short reports whether the sheets have the American height.
func (b *book) short() bool { return b.paper.H < 290 }

// down is a row of the lower part of the sheet on the present paper.
func (b *book) down(y float64) float64 {
	if b.short() {
		return y - shortBy
	}
	return y
}

func (b *book) notesTop() float64 { return b.down(103) }

// note gives a sheet its cautions and notes. Where they need more room than there
// is, notes are left out from the last on.
func (b *book) note(sh *Sheet, cautions []sheet.Caution, notes []string) error {
	for ; ; notes = notes[:len(notes)-1] {
		_, err := sh.Paper.DrawNotes(ink.NewRecorder(sh.Paper.W, sh.Paper.H, ""), cautions, notes)
		if err == nil {
			sh.cautions, sh.notes = cautions, notes
			return nil
		}
		if len(notes) == 0 {
			return err
		}
	}
}

// stageNotes prints the cautions and notes of a sheet of stages.
func (b *book) stageNotes(sh *Sheet, p *plan) error {
	var list []sheet.Caution
	mains, battery, relay, card := "", (*circuit.Part)(nil), false, false
	for _, x := range p.boxes {
		if t := b.mainsText(x.st.Name); x.mains {
			mains = "Mains"
			if len(t) > 0 {
				mains = t[0]
			}
		}
		for _, n := range x.st.Parts {
			if n.Kind == circuit.Battery {
				battery = n
			}
			relay = relay || n.Kind == circuit.Relay
			card = card || n.Kind == circuit.Comparator
		}
	}
	if mains != "" {
		list = append(list, sheet.Caution{Word: "DANGER", Text: mains + " inside the frames marked Mains. Licensed persons only: off, locked, tested dead."})
	}
	if battery != nil {
		first := "A battery cannot be switched off."
		if a := b.d.Battery.Prospective; a > 0 {
			first = "A battery cannot be switched off: prospective " + a.String() + "."
		}
		c := sheet.Caution{Word: "WARNING", Text: first}
		if f := b.d.Battery.Fuse; f != nil {
			c.Text += fmt.Sprintf(" Keep %s out while wiring; connect %s last.", f.Designation, battery.Designation)
		}
		list = append(list, c)
	}
	var notes []string
	if relay {
		notes = append(notes, "Every contact is shown with its coil dead.")
	}
	if card {
		notes = append(notes, "Wires on the photocell card have no number; those between terminals have.")
	}
	return b.note(sh, list, notes)
}

// boardNotes prints the notes of a board's sheet.
func (b *book) boardNotes(sh *Sheet, s *boardSheet) error {
	lamps, branch := map[string]bool{}, false
	var types []string
	for _, c := range s.columns {
		for _, r := range c.rungs {
			if !lamps[r.point.Type] {
				lamps[r.point.Type] = true
				types = append(types, r.point.Type)
			}
			branch = branch || len(r.point.Branches) > 0
		}
	}
	var notes []string
	if len(types) > 0 {
		notes = append(notes, "The leg that feeds luminaire -En is cable -Wn; its cores are n+ and n−. The figure between two cores is its length.")
	}
	if branch {
		notes = append(notes, "A branch is joined at the terminals of the luminaire above it.")
	}
	if len(types) > 0 {
		var words []string
		for _, t := range slices.Sorted(slices.Values(types)) {
			words = append(words, t+", "+b.typeWords(t))
		}
		notes = append(notes, "Luminaires: "+strings.Join(words, "; ")+".")
		notes = append(notes, "Far end: typical reading in an outage at night with a full battery.")
	}
	if s.more || !s.first || s.rests {
		if t := b.otherSheets(s.board, sh.Number); t != "" {
			notes = append(notes, t)
		}
	}
	return b.note(sh, nil, notes)
}

// kindWords name the luminaire kinds on paper.
var kindWords = map[string]string{
	"led-driver": "LED with driver", "led-string": "LED string", "filament": "filament lamp",
	"ballast": "lamp with ballast", "resistive": "resistive load",
}

// typeWords says what a luminaire type is: "LED with driver, 6 W, 18 V to 32 V".
func (b *book) typeWords(name string) string {
	if b.d.Site == nil {
		return ""
	}
	for _, t := range b.d.Site.Luminaires {
		if t.Name.Val != name {
			continue
		}
		s := kindWords[t.Kind.Val]
		if s == "" {
			s = t.Kind.Val
		}
		if v, ok := describe.Get[quantity.Watt](t.Fields, "power"); ok {
			s += ", " + watts(v.Val)
		} else if w := b.typeWatt(name); w > 0 {
			s += ", " + watts(w)
		}
		if v, ok := describe.Get[quantity.Range[quantity.Volt]](t.Fields, "works"); ok {
			s += fmt.Sprintf(", %v to %v", v.Val.Low, v.Val.High)
		}
		return s
	}
	return name
}

func (b *book) typeWatt(name string) quantity.Watt {
	for _, l := range b.d.Luminaires {
		if l.Type == name {
			return l.Watt
		}
	}
	return 0
}

// otherSheets lists which ways of a board are on which other sheet.
func (b *book) otherSheets(bd *circuit.Board, number int) string {
	var parts []string
	for _, s := range b.boardSheets {
		if s.board == bd && s.number != number {
			t := strings.TrimPrefix(strings.TrimPrefix(wayRange(s.columns), "ways "), "way ")
			if s.rests {
				t += " continued"
			}
			parts = append(parts, fmt.Sprintf("%s: sheet %d", t, s.number))
		}
	}
	if len(parts) == 0 {
		return ""
	}
	return "Ways " + strings.Join(parts, ", ") + "."
}
