package schematic

import (
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// relaysOf lists the relays whose coils the plan draws.
func relaysOf(p *plan) []*circuit.Part {
	var out []*circuit.Part
	for _, x := range p.boxes {
		for _, it := range x.st.Sketch.Items {
			if it.Op == circuit.OpSymbol && it.Symbol == "coil" {
				out = append(out, it.Part)
			}
		}
	}
	return out
}

// contactRow is one line of a relay's contact table.
type contactRow struct {
	figure, marks, use string
	at                 *place
}

// contactRows lists all contacts of a relay: those drawn with their place and what
// they feed, the others with a dash.
func (b *book) contactRows(p *plan, k *circuit.Part) []contactRow {
	drawn := map[string]circuit.SketchItem{} // by both marks, "11-12"
	for _, st := range b.c.Stages {
		if st.Sketch == nil {
			continue
		}
		for _, it := range st.Sketch.Items {
			if it.Op == circuit.OpSymbol && it.Part == k && (it.Symbol == "make" || it.Symbol == "break") {
				drawn[it.Pins["1"]+"-"+it.Pins["2"]] = it
			}
		}
	}
	var poles []string
	for _, n := range k.Pins {
		if t := n.Name[:len(n.Name)-1]; strings.HasSuffix(n.Name, "1") && t != "" && t[0] >= '1' && t[0] <= '9' {
			poles = append(poles, t)
		}
	}
	slices.Sort(poles)
	var rows []contactRow
	for _, t := range poles {
		common, brk, mk := t+"1", t+"2", t+"4"
		_, okB := drawn[common+"-"+brk]
		_, okM := drawn[common+"-"+mk]
		if !okB && !okM {
			rows = append(rows, contactRow{figure: "make", marks: common + "–" + brk + "–" + mk, use: "spare"})
			continue
		}
		for _, c := range []struct {
			figure, end string
			ok          bool
		}{{"break", brk, okB}, {"make", mk, okM}} {
			r := contactRow{figure: c.figure, marks: common + "–" + c.end, use: "not used"}
			if c.ok {
				r.at = b.place("contact " + k.Designation + " " + common + "-" + c.end)
				r.use = b.contactUse(k.Pin(c.end))
			}
			rows = append(rows, r)
		}
	}
	return rows
}

// contactUse says what a contact feeds: the rail behind it.
func (b *book) contactUse(n *circuit.Pin) string {
	for _, c := range b.c.Conductors {
		other := c.To
		if c.To == n {
			other = c.From
		} else if c.From != n {
			continue
		}
		for _, q := range other.Part.Pins {
			if r := b.railOf[q]; r != nil {
				return "feeds " + r.Name
			}
		}
	}
	return "in use"
}

// contactTables prints the contacts of every relay on the sheet, in a column right
// of the readings.
func (b *book) contactTables(sh *Sheet, p *plan) {
	y := float64(rowTables)
	for _, k := range relaysOf(p) {
		o := sh.scene.object(classTable, "contacts-"+k.Designation, "Contacts of "+k.Designation, ink.Attr{Name: "relay", Value: k.Designation})
		o.add(textAt(contactLeft, y, k.Designation+" contacts", nameStyle, ink.Start))
		o.add(segment(middlePen, contactLeft, y+1, contactRight, y+1))
		y += 2.6
		for i, r := range b.contactRows(p, k) {
			if i > 0 {
				o.add(segment(thinPen, contactLeft, y-1.55, contactRight, y-1.55))
			}
			o.add(&contactFigure{r.figure, point{contactLeft + 1.6, y - 0.6}})
			o.add(textAt(contactLeft+5, y, r.marks, valueStyle, ink.Start))
			at := &line{at: point{contactLeft + 14, y}, runs: []run{{s: "–"}}}
			if r.at != nil {
				at.runs = []run{{to: r.at}}
			}
			o.add(at)
			o.add(textAt(contactLeft+21, y, r.use, valueStyle, ink.Start))
			y += 2.3
		}
		o.add(segment(middlePen, contactLeft, y-1.55, contactRight, y-1.55))
		y += 2
	}
}

// contactFigure is a contact at 0.6 of its size, level, without pins.
type contactFigure struct {
	name string
	at   point
}
