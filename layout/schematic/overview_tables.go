package schematic

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// Columns of the overview's two tables.
const (
	litFirst    = 27.0
	litPitch    = 12.0
	litRight    = 88.0
	litRow      = 2.38
	figureLeft  = 94.0
	figureAsked = 110.0
	figureFound = 124.0
	figureRight = 161.0
	figureRow   = 2.3
	litMark     = 0.6 // radius
)

// plainConditions are the five conditions that tell a reader what the system does.
var plainConditions = []string{"mains-day", "mains-night", "outage-day", "outage-night", "cut-off"}

// conditions returns the indices of the wanted conditions, in their order, or those
// that tables print where one is missing.
func (b *book) conditions(keys []string) []int {
	var out []int
	for _, k := range keys {
		for i, c := range b.d.Conditions {
			if c.Key == k {
				out = append(out, i)
			}
		}
	}
	if len(out) < len(keys) {
		out = b.shown()
	}
	return out[:min(len(out), len(plainConditions))]
}

// litTable prints what decides and what is lit in five conditions.
func (b *book) litTable(sh *Sheet) {
	cols := b.conditions(plainConditions)
	o := sh.scene.object(classTable, "lit", "What is lit when")
	y := b.down(rowTablesTop)
	o.add(textAt(colText, y, "What is lit when", headStyle, ink.Start))
	o.add(segment(middlePen, colText, y+1.2, litRight, y+1.2))
	for i, c := range cols {
		name := b.d.Conditions[c].Name
		first, second, _ := strings.Cut(name, ", ")
		o.add(textAt(litFirst+litPitch*float64(i), y+2.9, fit(first, nameStyle, litPitch-0.8), nameStyle, ink.Start))
		if second != "" {
			o.add(textAt(litFirst+litPitch*float64(i), y+4.5, fit(second, nameStyle, litPitch-0.8), nameStyle, ink.Start))
		}
	}
	y += 5.2
	rows := b.litRows(cols)
	for _, r := range rows {
		o.add(segment(thinPen, colText, y, litRight, y))
		y += litRow
		st := valueStyle
		if r.circuits {
			st = nameStyle
		}
		o.add(textAt(colText, y-0.75, fit(r.name, st, litFirst-colText-1), st, ink.Start))
		for i, s := range r.cells {
			x := litFirst + litPitch*float64(i)
			if !r.circuits {
				o.add(textAt(x, y-0.75, s, valueStyle, ink.Start))
				continue
			}
			at := point{x + litMark, y - 0.75 - textHeight/2}
			if s == "lit" {
				o.add(&disc{at, litMark})
			} else {
				o.add(&ring{at, litMark})
			}
			cell := valueStyle
			if s == "lit" {
				cell = nameStyle
			}
			o.add(textAt(x+2*litMark+wordGap, y-0.75, s, cell, ink.Start))
		}
	}
	o.add(segment(middlePen, colText, y, litRight, y))
}

// litLine is one row of the table.
type litLine struct {
	name     string
	cells    []string
	circuits bool
}

// litRows are the things that decide, then the circuits that behave alike.
func (b *book) litRows(cols []int) []litLine {
	var rows []litLine
	row := func(name string, cell func(i int) string) {
		r := litLine{name: name}
		for _, i := range cols {
			r.cells = append(r.cells, cell(i))
		}
		rows = append(rows, r)
	}
	row("Mains", func(i int) string { return word(b.d.Conditions[i].MainsV > 0, "on", "off") })
	row("Daylight", func(i int) string { return word(b.d.Conditions[i].Dark, "dark", "light") })
	relays := 0
	for _, p := range b.c.Parts {
		if p.Kind != circuit.Relay || relays == 2 {
			continue
		}
		relays++
		row("Relay "+p.Designation, func(i int) string {
			for _, s := range b.d.Conditions[i].State {
				if strings.HasPrefix(s.Element, p.Designation+".coil") {
					return word(s.Position == "picked up", "held in", "let go")
				}
			}
			return ""
		})
	}
	return append(rows, b.litGroups(cols, relays)...)
}

func word(is bool, yes, no string) string {
	if is {
		return yes
	}
	return no
}

// litGroups are the rows of circuits; the last row takes what has no room.
func (b *book) litGroups(cols []int, relays int) []litLine {
	var keys []string
	groups := map[string][]string{}
	total := 0
	for _, bd := range b.c.Boards {
		for _, w := range bd.Ways {
			if w.Lighting == nil {
				continue
			}
			total++
			key := ""
			for _, i := range cols {
				key += word(slices.Contains(b.d.Conditions[i].Lit, w.Lighting.Name), "1", "0")
			}
			if groups[key] == nil {
				keys = append(keys, key)
			}
			groups[key] = append(groups[key], w.Lighting.Name)
		}
	}
	var rows []litLine
	most := 5 - relays
	for n, k := range keys {
		if n == most {
			rows[n-1].name += " …"
			break
		}
		r := litLine{circuits: true}
		list := groups[k]
		switch {
		case len(list) == total && total > 1:
			r.name = fmt.Sprintf("All %d circuits", total)
		case len(list) == 1:
			r.name = list[0]
		default:
			r.name = fmt.Sprintf("%s and %d more", list[0], len(list)-1)
		}
		for i := range cols {
			r.cells = append(r.cells, word(k[i] == '1', "lit", "dark"))
		}
		rows = append(rows, r)
	}
	return rows
}

// figures prints what was asked and what was found.
func (b *book) figures(sh *Sheet) {
	d := b.d
	o := sh.scene.object(classTable, "figures", "Figures")
	y := b.down(rowTablesTop)
	o.add(textAt(figureLeft, y, "Figures", headStyle, ink.Start))
	o.add(segment(middlePen, figureLeft, y+1.2, figureRight, y+1.2))
	y += 1.2
	var rows [][3]string
	add := func(name, asked, found string) { rows = append(rows, [3]string{name, asked, found}) }
	if d.Site != nil {
		u := d.Site.Duty
		if d.Endurance.Held > 0 {
			add("Outage", "asked "+u.Outage.Val.String(), "lasts "+quantity.Format(d.Endurance.Held, 2)+" at "+u.BatteryRoom.Val.Low.String()+", aged")
		}
		if d.Battery.Capacity > 0 {
			asked := ""
			if d.Battery.Required > 0 { // nothing when no battery would do
				asked = "needs " + quantity.Format(d.Battery.Required, 2)
			}
			add("Battery", asked, "has "+d.Battery.Capacity.String())
		}
		if d.Endurance.Recharge > 0 {
			add("Recharge", "asked "+u.Recharge.Val.String(), "takes "+quantity.Format(d.Endurance.Recharge, 2))
		}
		if d.Totals.WorstLamp != "" {
			add("Drop, worst", "limit "+d.Site.Practice.LampDrop.Val.String(), quantity.Format(d.Totals.WorstDrop, 2)+" at "+d.Totals.WorstLamp)
		}
	}
	if d.Totals.LowestV > 0 {
		add("Lowest volts", "", volts(d.Totals.LowestV))
	}
	if d.Totals.LoadWatt > 0 {
		add("Load", "", watts(d.Totals.LoadWatt)+", "+quantity.Fixed(d.Totals.LoadA, 1)+" at the end")
	}
	for i, r := range rows {
		pen := thinPen
		if i == len(rows)-1 {
			pen = middlePen
		}
		y += figureRow
		o.add(textAt(figureLeft, y-0.75, r[0], valueStyle, ink.Start))
		if r[1] != "" {
			o.add(textAt(figureAsked, y-0.75, r[1], valueStyle, ink.Start))
		}
		o.add(textAt(figureFound, y-0.75, r[2], nameStyle, ink.Start))
		o.add(segment(pen, figureLeft, y, figureRight, y))
	}
}
