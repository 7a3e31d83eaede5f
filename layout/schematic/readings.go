package schematic

import (
	"fmt"
	"math"
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// Columns and rows of the readings table.
const (
	readingPitch  = 2.2
	readingProbe  = 16.0
	readingFirst  = 34.0
	readingColumn = 18.0
	contactLeft   = 112.0
	contactRight  = 152.0
)

// readingRows is how many test points the table of one sheet takes.
func (b *book) readingRows() int {
	room := b.notesTop() - 2 - (rowTables + 4.8)
	return int(room / readingPitch)
}

// shown are the conditions that tables print.
func (b *book) shown() []int {
	var out []int
	for i, c := range b.d.Conditions {
		if c.Shown {
			out = append(out, i)
		}
	}
	return out
}

// volts is a voltage as tables print it: one decimal.
func volts(v quantity.Volt) string { return quantity.Fixed(v, 1) }

// readingsTable prints what every test point of the sheet shows.
func (b *book) readingsTable(sh *Sheet, p *plan) {
	var points []*circuit.TestPoint
	for _, x := range p.boxes {
		for _, it := range x.st.Sketch.Items {
			if it.Op == circuit.OpPoint {
				points = append(points, it.TP)
			}
		}
	}
	if len(points) == 0 {
		return
	}
	slices.SortStableFunc(points, func(a, z *circuit.TestPoint) int { return compareLabels(a.Label, z.Label) })
	columns := b.shown()
	if most := int(math.Floor((colEnd - readingFirst) / readingColumn)); len(columns) > most {
		columns = columns[:most]
	}
	if most := int(math.Floor((contactLeft - readingFirst) / readingColumn)); len(columns) > most && len(relaysOf(p)) > 0 {
		columns = b.conditions(plainConditions[:most])
		columns = columns[:min(len(columns), most)]
	}
	o := sh.scene.object(classTable, "readings", "Readings to expect")
	o.add(textAt(colText, rowTables, "Readings against "+BlackLabel, nameStyle, ink.Start))
	right := readingFirst + readingColumn*float64(max(len(columns), 2)) - 1
	top := rowTables + 1.0
	o.add(segment(middlePen, colText, top, right, top))
	o.add(textAt(readingProbe, rowTables+2.6, "Red probe on", nameStyle, ink.Start))
	for i, c := range columns {
		o.add(textAt(readingFirst+readingColumn*float64(i), rowTables+2.6,
			fit(b.d.Conditions[c].Name, nameStyle, readingColumn-1), nameStyle, ink.Start))
	}
	y := rowTables + 2.6
	for _, tp := range points {
		o.add(segment(thinPen, colText, y+0.75, right, y+0.75))
		y += readingPitch
		o.add(&tag{point{colText, y - 0.5}, tp.Label})
		o.add(textAt(readingProbe, y, fit(probePlace(tp.Red), valueStyle, readingFirst-readingProbe-1), valueStyle, ink.Start))
		r := b.reading[tp]
		if r == nil {
			continue
		}
		for i, c := range columns {
			if c < len(r.Bands) {
				bandText(o, readingFirst+readingColumn*float64(i), y, r.Bands[c], r.OrAt(c))
			}
		}
	}
	o.add(segment(middlePen, colText, y+0.75, right, y+0.75))
}

// nothing is a voltage that a meter's own error may show on a dead conductor, V.
const nothing = 0.12

// bandText prints the typical value and the band of one reading, or the typical values
// of both ways in which it may stand.
func bandText(o *object, x, y float64, v facts.Band, or []facts.Or) {
	typical := volts(v.Typical)
	if len(or) > 0 {
		o.add(textAt(x+4.4, y, typical, nameStyle, ink.End))
		o.add(textAt(x+5.4, y, "or "+volts(or[0].Typical), valueStyle, ink.Start))
		return
	}
	if v.High < nothing && v.Low > -nothing {
		o.add(textAt(x+4.4, y, "0 V", nameStyle, ink.End))
		return
	}
	o.add(textAt(x+4.4, y, typical, nameStyle, ink.End))
	o.add(textAt(x+5.4, y, fmt.Sprintf("%.1f to %.1f", float64(v.Low), float64(v.High)), valueStyle, ink.Start))
}

// pinWords says in words what a pin is, where its mark alone does not.
var pinWords = map[circuit.Kind]map[string]string{
	circuit.Battery:       {"+": "plus", "-": "minus"},
	circuit.Supply:        {"+": "plus", "-": "minus"},
	circuit.ChargerUnit:   {"+": "plus", "-": "minus"},
	circuit.Bridge:        {"+": "plus", "-": "minus"},
	circuit.Comparator:    {"+": "plus input", "-": "minus input", "OUT": "output"},
	circuit.NPN:           {"B": "base", "C": "collector", "E": "emitter"},
	circuit.PNP:           {"B": "base", "C": "collector", "E": "emitter"},
	circuit.Diode:         {"A": "anode", "K": "cathode"},
	circuit.Schottky:      {"A": "anode", "K": "cathode"},
	circuit.Zener:         {"A": "anode", "K": "cathode"},
	circuit.CutOff:        {"in": "input", "out": "output"},
	circuit.Potentiometer: {"3": "wiper"},
}

// probePlace says where the red probe goes: "-G1 plus", "-K1:A1".
func probePlace(n *circuit.Pin) string {
	if w := pinWords[n.Part.Kind][n.Name]; w != "" {
		return n.Part.Designation + " " + w
	}
	return n.String()
}

// compareLabels orders labels of one letter group by number: TP9 before TP11.
func compareLabels(a, z string) int {
	if len(a) != len(z) {
		return len(a) - len(z)
	}
	switch {
	case a < z:
		return -1
	case a > z:
		return 1
	}
	return 0
}

// mainsText is volts and tolerance of the mains that a stage takes.
func (b *book) mainsText(stage string) []string {
	if b.d.Site == nil {
		return nil
	}
	for _, s := range b.d.Site.Stages {
		if s.Name.Val != stage {
			continue
		}
		if v, ok := describe.Get[quantity.Toleranced[quantity.Volt]](s.Fields, "mains"); ok {
			out := []string{v.Val.Nominal.String()}
			if v.Val.Plus > 0 {
				out = append(out, "± "+v.Val.Plus.String())
			}
			return out
		}
	}
	return nil
}
