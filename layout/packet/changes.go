package packet

import (
	"fmt"
	"strings"

	"gloamwright/internal/design"
	"gloamwright/layout/ink"
)

// changes is the change notice: what a revision makes a technician do again, and what
// stays. It is nil on a first revision.
func (b *book) changes() *section {
	c := b.d.Changes
	if c == nil {
		return nil
	}
	s := &section{key: keyChange, title: fmt.Sprintf("Change notice: revision %s to %s", c.From, c.To), document: "Change notice", letter: "N", label: "Before",
		purpose: fmt.Sprintf("Use this sheet to bring a plant built to revision %s up to revision %s, and to leave the rest alone.", c.From, c.To),
		note:    b.changeBefore()}
	s.blocks = append(s.blocks, b.changedValues(c)...)
	s.blocks = append(s.blocks, b.changeWork(c)...)
	s.blocks = append(s.blocks, b.changedFindings(c)...)
	s.blocks = append(s.blocks, b.changeStays(c)...)
	s.blocks = append(s.blocks, signHere("Changes made by, name in print", true))
	return s
}

// changeBefore is the state in which the work begins.
func (b *book) changeBefore() string {
	out := ""
	if q := b.isolatorName(); q != "" {
		out = "Isolator " + q + " open, battery not connected. "
	} else if f := b.mainFuse(); f != nil {
		out = "Main fuse " + f.Part.Designation + " out. "
	}
	return out + fmt.Sprintf("Mark your packet of revision %s void.", b.d.Changes.From)
}

// isolatorName is the isolator at the battery, empty if there is none.
func (b *book) isolatorName() string {
	for _, p := range b.d.Circuit.Parts {
		if g := b.d.Battery.Part; p.Kind == "isolator" && g != nil && p.Stage == g.Stage {
			return p.Designation
		}
	}
	return ""
}

func (b *book) changedValues(c *design.Changes) []block {
	moved := "no label changes"
	if n := len(c.New.All()) + len(c.Gone.All()); n > 0 {
		moved = counted(len(c.New.All()), "label") + " to print, " + fmt.Sprint(len(c.Gone.All())) + " to take off"
	}
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "", w: 8}, {head: "Value", w: 74}, {head: "Was", w: 18, a: ink.End}, {head: "Is", w: 20, a: ink.End}, {head: "Why", w: 60, indent: 4}}}
	out := []block{b.head(0, b.pg.width, "What changed", counted(len(c.Values), "value")+" in the description; "+moved), t.head(0)}
	var rows []block
	for _, v := range c.Values {
		is := v.Is
		if is == "" {
			is = "gone"
		}
		rows = append(rows, t.line(b, 0, row{marks: []string{changeMark(v.Number)}, cells: []cell{fat(fmt.Sprint(v.Number)), txt(v.What), txt(v.Was), fat(is), txt(v.Why)}}))
	}
	return append(out, together(rows)...)
}

// changeMark names the line of a changed value.
func changeMark(n int) string { return fmt.Sprintf("change %d", n) }

// changeWork is what to do, by the tool in hand.
func (b *book) changeWork(c *design.Changes) []block {
	if len(c.Work) == 0 {
		return nil
	}
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "Done", w: 10, a: ink.Middle}, {head: "What", w: 23, indent: 2, pad: 0.6}, {head: "Do this", w: 47},
		{head: "Was", w: 30, a: ink.End}, {head: "Is", w: 32, a: ink.End}, {head: "From", w: 14, a: ink.End}, {head: "Sheet", w: 11, a: ink.End}, {head: "Initials", w: 13, a: ink.Middle}}}
	head := t.head(0)
	out := []block{b.head(0, b.pg.width, "What to do", `in this order; "from" names the change that forces it`), head}
	first := true
	for _, tool := range design.Tools {
		var rows []block
		things := 0
		for _, w := range c.Work {
			if w.Tool != tool {
				continue
			}
			things += max(1, len(w.Labels))
			rows = append(rows, t.line(b, 0, row{cells: []cell{tickBox(), txt(w.What), txt(w.Do), txt(w.Was), fat(w.Is), txt(causes(w)), txt(b.workSheet(w)), writeIn()}}))
		}
		if len(rows) == 0 {
			continue
		}
		group := append([]block{b.band(upper(tool), counted(things, toolThing(tool)), groupGap(first))}, together(rows)...)
		out = append(out, under(head, group)...)
		first = false
	}
	return out
}

// causes names the changes that force an item.
func causes(w design.WorkItem) string {
	if w.From > 0 {
		return fmt.Sprint(w.From)
	}
	var out []string
	for _, n := range w.Causes {
		out = append(out, fmt.Sprint(n))
	}
	if len(out) > 3 {
		return "several"
	}
	return strings.Join(out, ", ")
}

// toolThing is what a group of work counts.
func toolThing(tool string) string {
	switch tool {
	case design.ReCut, design.ReTerminate:
		return "run"
	case design.Replace:
		return "part"
	case design.ReFuse:
		return "place"
	case design.Adjust:
		return "setting"
	case design.Relabel:
		return "label"
	}
	return "test"
}

// workSheet is the sheet that an item is done from.
func (b *book) workSheet(w design.WorkItem) string {
	key := keyChecklist
	switch w.Tool {
	case design.ReCut:
		key = keyWires
	case design.Replace:
		key = keyParts
	case design.ReTerminate:
		key = keyTerminals
	case design.ReFuse:
		key = keyFuses
	case design.Relabel:
		key = keyLabels
		for _, h := range b.holders() {
			if w.What == h.strip { // its door copy
				key = keyFuses
			}
		}
	case design.TestAgain:
		if w.Test == design.TestReadings {
			key = keyTestPoints
		}
	}
	for _, l := range w.Labels { // the row itself, where it is one of few
		mark := runMark(l)
		if w.Tool == design.ReFuse {
			mark = "fuse " + l
		}
		if n := b.refs.at[mark]; n > 0 && (w.Tool == design.ReCut || w.Tool == design.ReFuse) {
			return fmt.Sprint(n)
		}
	}
	if n := b.first(key); n > 0 {
		return fmt.Sprint(n)
	}
	return ""
}

// changedFindings is what is judged otherwise than before.
func (b *book) changedFindings(c *design.Changes) []block {
	if len(c.Raised)+len(c.Cleared) == 0 {
		return nil
	}
	t := &table{st: tableText, min: plainRow, cols: []column{{w: 22}, {w: 20}, {w: 138}}}
	out := []block{b.head(0, b.pg.width, "What is judged otherwise", "all findings on "+b.sheets(keyBasis))}
	var rows []block
	for _, f := range c.Raised {
		rows = append(rows, t.line(b, 0, row{cells: []cell{fat("new"), txt(f.Severity), txt(f.Message)}}))
	}
	for _, f := range c.Cleared {
		rows = append(rows, t.line(b, 0, row{cells: []cell{fat("settled"), txt(f.Severity), txt(f.Message)}}))
	}
	return append(out, together(rows)...)
}

// changeStays is what is left as built. It is never left out.
func (b *book) changeStays(c *design.Changes) []block {
	t := &table{st: tableText, min: plainRow, cols: []column{{w: 50}, {w: 130}}}
	out := []block{b.head(0, b.pg.width, "What stays", "leave it as built")}
	var rows []block
	for _, x := range c.Stays {
		what := x.Things
		switch {
		case x.Of > 0 && x.Count == x.Of:
			what = fmt.Sprintf("All %d %s", x.Of, x.Things)
		case x.Of > 0:
			what = fmt.Sprintf("%d of %d %s", x.Count, x.Of, x.Things)
		}
		rows = append(rows, t.line(b, 0, row{cells: []cell{fat(upper(what)), txt(x.Text)}}))
	}
	return append(out, together(rows)...)
}
