package schematic

import (
	"fmt"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// The block of notes left of the title block, in modules.
const (
	notePitch  = 1.7
	noteIndent = 2.2
	signalText = 8.6 // text after a signal word
	noteRoom   = 78.0
	noteLines  = 6
	shortBy    = 7 // a Tabloid sheet is lower by this much
)

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
func (b *book) footTop() float64  { return b.down(91) }

// caution is a note with a signal word.
type caution struct {
	word  string
	lines []string
}

// cautions prints warnings in the place of the notes and returns the next baseline.
func (b *book) cautions(sh *Sheet, list []caution, y float64) float64 {
	if len(list) == 0 {
		return y
	}
	o := sh.scene.object(classNote, "cautions", "Cautions")
	for _, c := range list {
		o.add(textAt(colText, y, c.word, signalStyle, ink.Start))
		for _, l := range c.lines {
			o.add(textAt(colText+signalText, y, l, valueStyle, ink.Start))
			y += notePitch
		}
		y += 0.4
	}
	return y
}

// notes prints numbered notes from a baseline on.
func (b *book) notes(sh *Sheet, list []string, y float64) {
	if len(list) == 0 {
		return
	}
	o := sh.scene.object(classNote, "notes", "Notes")
	o.add(textAt(colText, y, "Notes", nameStyle, ink.Start))
	for i, s := range list {
		for j, l := range wrapText(s, noteRoom) {
			y += notePitch
			if j == 0 {
				o.add(textAt(colText, y, strconv.Itoa(i+1), valueStyle, ink.Start))
			}
			o.add(textAt(colText+noteIndent, y, l, valueStyle, ink.Start))
		}
	}
}

// wrapText breaks a text at its spaces into lines of at most room modules.
func wrapText(s string, room float64) []string {
	var out []string
	for _, w := range strings.Fields(s) {
		if n := len(out); n > 0 && width(out[n-1]+" "+w, valueStyle) <= room {
			out[n-1] += " " + w
			continue
		}
		out = append(out, w)
	}
	return out
}

// stageNotes prints the cautions and notes of a sheet of stages.
func (b *book) stageNotes(sh *Sheet, p *plan) {
	var list []caution
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
		list = append(list, caution{"DANGER", []string{mains + " inside the frames marked Mains.", "Licensed persons only: off, locked, tested dead."}})
	}
	if battery != nil {
		first := "A battery cannot be switched off."
		if a := b.d.Battery.Prospective; a > 0 {
			first = "A battery cannot be switched off: prospective " + a.String() + "."
		}
		c := caution{"WARNING", []string{first}}
		if f := b.d.Battery.Fuse; f != nil {
			c.lines = append(c.lines, fmt.Sprintf("Keep %s out while wiring; connect %s last.", f.Designation, battery.Designation))
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
	y := b.cautions(sh, list, b.notesTop())
	if len(list) > 0 && len(notes) > 0 {
		y += 0.4
	}
	b.notes(sh, notes, y)
}

// boardNotes prints the notes of a board's sheet.
func (b *book) boardNotes(sh *Sheet, s *boardSheet) {
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
		for _, t := range b.typeOrder(types) {
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
	b.notes(sh, fitNotes(notes), b.notesTop())
}

// fitNotes keeps the notes that there is room for; the last line says where the
// rest stands.
func fitNotes(notes []string) []string {
	var out []string
	lines := 0
	for _, n := range notes {
		k := len(wrapText(n, noteRoom))
		if lines+k > noteLines-1 {
			n = wrapText(n, noteRoom)[0]
			if i := strings.LastIndex(n, ";"); i > 0 {
				n = n[:i+1] + " others in the parts list."
			}
			k = 1
		}
		if lines+k <= noteLines-1 {
			out, lines = append(out, n), lines+k
		}
	}
	return out
}

// typeOrder puts luminaire types in the order of the alphabet.
func (b *book) typeOrder(types []string) []string {
	out := append([]string{}, types...)
	for i := range out {
		for j := i + 1; j < len(out); j++ {
			if out[j] < out[i] {
				out[i], out[j] = out[j], out[i]
			}
		}
	}
	return out
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
			s += ", " + v.Val.String()
		} else if w := b.typeWatt(name); w > 0 {
			s += ", " + quantity.Format(w, 2)
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
