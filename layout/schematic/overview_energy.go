package schematic

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

func lower(s string) string {
	r, n := utf8.DecodeRuneInString(s)
	return string(unicode.ToLower(r)) + s[n:]
}

const midEnergy = rowEnergy + blockHeight/2

// drawEnergy draws the energy's row: mains, charger, battery over the bus, series
// stages, and the arrow to the boards.
func (b *book) drawEnergy(sh *Sheet, o *overview) {
	bottom := 0.0
	if o.charger != nil {
		bottom = rowEnergy + blockHeight
		lines := b.blockLines(o.charger)
		if o.raw != nil { // the supply of a linear charger stands in the same block
			if raw := b.blockLines(o.raw); len(raw) > 0 {
				lines = append([]string{raw[0]}, lines...)
			}
		}
		b.block(sh, o.charger, o.charger.st.Heading, colSource, rowEnergy, lines)
	}
	rows := b.controlRows(o)
	for i, c := range o.controls {
		if c.source != nil && c.source.mains {
			bottom = rows[i] + blockHeight
		}
	}
	if bottom > 0 {
		b.mainsBlock(sh, o, bottom, rows)
	}
	last := float64(colBus)
	if o.battery != nil {
		b.batteryBlock(sh, o)
	}
	from := float64(colSource + blockWidth)
	if o.charger == nil {
		from = colBus
	}
	for i, x := range o.chain {
		left := float64(colChain + chainPitch*i)
		b.block(sh, x, x.st.Heading, left, rowEnergy, b.blockLines(x))
		f := b.flow(sh, x.st.Name, "energy", true, false, point{from, midEnergy}, point{left, midEnergy})
		if i == 0 && o.battery != nil && o.charger != nil {
			f.add(&disc{point{colBus, midEnergy}, dotRadius})
		}
		if i > 0 {
			if t := b.railCurrent(); t != "" {
				f.add(textAt((from+left)/2, midEnergy-0.9, t, valueStyle, ink.Middle))
			}
		}
		from, last = left+blockWidth, left+blockWidth
	}
	if len(o.chain) == 0 && o.charger != nil {
		to := float64(colBoards)
		if !o.beside || len(o.pages) == 0 {
			to = colBus
		}
		f := b.flow(sh, "bus", "energy", true, false, point{from, midEnergy}, point{to, midEnergy})
		if to > colBus && o.battery != nil {
			f.add(&disc{point{colBus, midEnergy}, dotRadius})
		}
		return
	}
	if o.beside && len(o.pages) > 0 && len(o.pages[0]) > 0 && last < colBoards {
		b.flow(sh, "boards", "energy", true, false, point{last, midEnergy}, point{colBoards, midEnergy})
	}
}

// mainsBlock draws the mains side as one tall frame with its arrows.
func (b *book) mainsBlock(sh *Sheet, o *overview, bottom float64, rows []float64) {
	top := float64(rowEnergy)
	var arrows []float64
	name := ""
	if o.charger != nil {
		name = o.charger.st.Name
		if o.raw != nil {
			name = o.raw.st.Name
		}
		arrows = append(arrows, midEnergy)
	}
	for i, c := range o.controls {
		if c.source != nil && c.source.mains {
			arrows = append(arrows, rows[i]+blockHeight/2)
			if name == "" {
				name, top = c.source.st.Name, rows[i]
			}
		}
	}
	f := sh.scene.object(classBoundary, "mains", "Mains side: licensed persons only")
	boundary(f, colMains, top, colMains+mainsWidth, bottom, "")
	f.add(textAt(colMains+0.8, top+2.2, "Mains", headStyle, ink.Start))
	for i, s := range b.mainsText(name) {
		f.add(textAt(colMains+0.8, top+4.2+linePitch*float64(i), s, valueStyle, ink.Start))
	}
	for i, y := range arrows {
		b.flow(sh, fmt.Sprintf("mains-%d", i+1), "mains", i == 0 && o.charger != nil, false, point{colMains + mainsWidth, y}, point{colSource, y})
	}
}

// batteryBlock draws the battery in its place, over the bus.
func (b *book) batteryBlock(sh *Sheet, o *overview) {
	x := o.battery
	var cable *circuit.Cable
	place := x.st.Place
	for _, p := range x.st.Parts {
		if p.Kind == circuit.Battery {
			place = p.Place
		}
	}
	for _, c := range b.c.Cables {
		if c.From == place && len(c.Cores) == 2 && cable == nil && c.Circuit == "" {
			cable = c
		}
	}
	top := float64(rowBattery)
	f := sh.scene.object(classBoundary, "place-"+place.Designation, place.Designation+" "+place.Name)
	if place.Key != mainCabinet {
		boundary(f, colBus-11, rowBattery-3, colBus+11, rowBattery+blockHeight+2, "")
		f.add(textAt(colBus-10.2, rowBattery-1.2, placeName(place, 20), valueStyle, ink.Start))
	}
	b.block(sh, x, x.st.Heading, colBus-blockWidth/2, top, b.blockLines(x))
	w := b.flow(sh, "battery", "charge and discharge", true, o.charger != nil || len(o.chain) > 0,
		point{colBus, midEnergy}, point{colBus, top + blockHeight})
	if cable != nil {
		b.cableText(w, cable, colBus+1.2, rowBattery+blockHeight+4)
	}
}

// railCurrent is the load in an outage at its end.
func (b *book) railCurrent() string {
	if a := b.d.Totals.LoadA; a > 0 {
		return quantity.Fixed(a, 1)
	}
	return ""
}

// controlRows are the tops of the control blocks.
func (b *book) controlRows(o *overview) []float64 {
	switch {
	case b.short() && len(o.controls) > 2:
		return []float64{37.5, 48.5, 59.5}
	case b.short():
		return []float64{42, 56}
	case len(o.controls) > 2:
		return []float64{41, 53, 65}
	}
	return []float64{46, 64}
}

// drawControls draws what holds the relay in. Inner sources come first; each line
// enters the relay from below, the outer ones further right, so that none crosses.
func (b *book) drawControls(sh *Sheet, o *overview) {
	if o.relay == nil {
		return
	}
	at := float64(colChain)
	for i, x := range o.chain {
		if x == o.relay {
			at = float64(colChain + chainPitch*i)
		}
	}
	rows := b.controlRows(o)
	for i, c := range o.controls {
		y := rows[i]
		mid := y + blockHeight/2
		from, after := 0.0, 0.0 // where the line leaves, and what stands before its sentence
		if c.source != nil {
			b.block(sh, c.source, c.source.st.Heading, colSource, y, b.blockLines(c.source))
			from, after = colSource+blockWidth, colSource+blockWidth
		}
		if c.sensor != nil {
			b.sensorBlock(sh, c, y)
		}
		if c.middle != nil && at > colChain {
			b.block(sh, c.middle, c.middle.st.Heading, colChain, y, b.blockLines(c.middle))
			if from > 0 {
				b.flow(sh, c.source.st.Name, "supply", false, false, point{from, mid}, point{colChain, mid})
			}
			if k := b.above(o, c.middle); k && i == 0 {
				b.flow(sh, "feed-"+c.middle.st.Name, "supply", false, false, point{colChain + 9, rowEnergy + blockHeight}, point{colChain + 9, y})
			}
			from, after = colChain+blockWidth, colChain+blockWidth
		} else if c.middle != nil {
			b.block(sh, c.middle, c.middle.st.Heading, colSource, y, b.blockLines(c.middle))
			from, after = colSource+blockWidth, colSource+blockWidth
		}
		x := at + blockWidth*float64(i+1)/float64(len(o.controls)+1)
		f := b.flow(sh, fmt.Sprintf("holds-%d", i+1), c.says, false, false, point{from, mid}, point{x, mid}, point{x, rowEnergy + blockHeight})
		f.add(textAt(after+1.2, mid-1.1, c.says, valueStyle, ink.Start))
	}
}

// above reports whether the stage takes its plus from the first series stage, which
// stands right over it.
func (b *book) above(o *overview, x *stageBox) bool {
	for _, l := range x.leads() {
		r := b.railOf[l.term.Pin("out")]
		if r == nil || !r.Positive || len(r.Pins) == 0 {
			continue
		}
		return len(o.chain) > 0 && r.Pins[0].Part.Stage == o.chain[0].st.Name
	}
	return false
}

// sensorBlock draws a photocell's sensor in its place, with its cable.
func (b *book) sensorBlock(sh *Sheet, c *control, y float64) {
	if c.source != nil {
		return
	}
	var sensor *circuit.Part
	for _, p := range c.middle.st.Parts {
		if p.Place == c.sensor && sensor == nil {
			sensor = p
		}
	}
	if sensor == nil {
		return
	}
	mid := y + blockHeight/2
	f := sh.scene.object(classBoundary, "place-"+c.sensor.Designation, c.sensor.Designation+" "+c.sensor.Name)
	boundary(f, colSource-2, y-3, colSource+blockWidth+2, y+blockHeight+2, "")
	f.add(textAt(colSource-1.2, y-1.2, placeName(c.sensor, 20), valueStyle, ink.Start))
	b.plainBlock(sh, c.middle.st.Name+"-sensor", "Sensor", colSource, y,
		append([]string{sensor.Designation}, ink.Wrap(sensor.Description, valueStyle.font(), (blockWidth-1.6)*module)...), b.place("stage "+c.middle.st.Name))
	w := b.flow(sh, c.middle.st.Name+"-sensor", "light signal", false, false, point{colSource + blockWidth, mid}, point{colChain, mid})
	for _, k := range b.c.Cables {
		if k.From == c.sensor || k.To == c.sensor {
			w.add(&line{at: point{colSource + blockWidth + 3, mid - 1.1}, runs: []run{{s: k.Designation, st: nameStyle}, {s: b.lengths.Format(k.Length)}}})
			break
		}
	}
}

// mainPart is the part that a stage is there for.
func mainPart(st *circuit.Stage) *circuit.Part {
	for _, kinds := range [][]circuit.Kind{
		{circuit.Battery, circuit.ChargerUnit, circuit.Supply, circuit.Relay, circuit.CutOff, circuit.PhotoSwitch, circuit.Transformer},
		{circuit.Comparator, circuit.Regulator, circuit.Shunt, circuit.SwitchIsolator, circuit.PushButton, circuit.SignalLamp, circuit.Voltmeter},
		{circuit.NPN, circuit.PNP, circuit.Zener, circuit.Suppressor},
	} {
		for _, p := range st.Parts {
			if slices.Contains(kinds, p.Kind) {
				return p
			}
		}
	}
	for _, p := range st.Parts {
		if p.Kind != circuit.Terminal && p.Kind != circuit.MainsConnection {
			return p
		}
	}
	return nil
}

// blockLines are the three lines of a stage's block: its main part with ratings,
// then what was found for it, then what it does.
func (b *book) blockLines(x *stageBox) []string {
	var out []string
	p := mainPart(x.st)
	if p != nil {
		out = append(out, p.Designation)
		for _, v := range p.Values {
			switch n := len(out) - 1; {
			case !v.Show || v.Text == "":
			case width(out[n]+" "+v.Text, valueStyle) <= blockWidth-1.6:
				out[n] += " " + v.Text
			default:
				out = append(out, v.Text)
			}
		}
	}
	add := func(s string) { out = append(out, s) }
	switch x.st.Kind {
	case "battery":
		out = out[:min(len(out), 1)]
		for _, q := range x.st.Parts {
			if q.Kind == circuit.Fuse {
				add(strings.Join(append([]string{q.Designation}, valueLines(q, labelRoom)...), " "))
			}
		}
		if t := b.d.Endurance.Held; t > 0 && b.d.Site != nil {
			add(fmt.Sprintf("%s at %s", quantity.Format(t, 2), b.d.Site.Duty.BatteryRoom.Val.Low))
		}
	case "charger", "linear-charger":
		if t := b.d.Endurance.Recharge; t > 0 {
			out = append(out[:min(len(out), 2)], "full in "+quantity.Format(t, 2))
		}
	case "changeover-relay":
		out = out[:min(len(out), 1)]
		for _, v := range p.Values {
			if v.Name == "contact" {
				out[0] += " " + v.Text
			}
		}
		add("coil live: dark")
		add("coil dead: lit")
	case "photocell":
		out = out[:min(len(out), 1)]
		if v, ok := stageField[quantity.Lux](b, x.st.Name, "dark_below"); ok {
			add("dark below " + v.String())
		}
		if v, ok := stageField[quantity.Lux](b, x.st.Name, "light_above"); ok {
			add("light above " + v.String())
		}
	}
	purpose := ink.Wrap(strings.Join(x.st.Sketch.Purpose, " "), valueStyle.font(), (blockWidth-1.6)*module)
	if len(out)+len(purpose) <= 3 {
		out = append(out, purpose...)
	}
	return out
}

// stageField is a field of a stage of the description.
func stageField[T any](b *book, stage, field string) (v T, ok bool) {
	if b.d.Site == nil {
		return v, false
	}
	for _, s := range b.d.Site.Stages {
		if s.Name.Val == stage {
			f, ok := describe.Get[T](s.Fields, field)
			return f.Val, ok
		}
	}
	return v, false
}

// drawOthers lists the stages that have no block, under the legend.
func (b *book) drawOthers(sh *Sheet, o *overview) {
	if len(o.others) == 0 {
		return
	}
	const room, rows = colBus - 12 - colText, 3
	t := sh.scene.object(classBlock, "others", "Further stages")
	l := &line{at: point{colText, 19.2}, runs: []run{{s: "Also:"}}}
	for i, x := range o.others {
		r := run{s: fit(x.st.Heading, valueStyle, room-6) + " ", to: b.place("stage " + x.st.Name), short: true}
		if i+1 < len(o.others) {
			r.after = ","
		}
		more := run{s: fmt.Sprintf("and %d more", len(o.others)-i)}
		last := l.at.Y > 19.2+linePitch*(rows-1.5)
		need := width(r.s+"/000", valueStyle)
		if last && i+1 < len(o.others) {
			need += width(more.s, valueStyle) + wordGap
		}
		if l.width()+wordGap+need > room {
			if last {
				l.runs = append(l.runs, more)
				break
			}
			t.add(l)
			l = &line{at: point{colText, l.at.Y + linePitch}}
		}
		l.runs = append(l.runs, r)
	}
	t.add(l)
}

// legend explains the lines.
func (b *book) legend(sh *Sheet) {
	const x = float64(colText)
	t := sh.scene.object(classBlock, "lines", "Lines")
	t.add(textAt(x, 8.5, "Lines", nameStyle, ink.Start))
	for i, s := range []string{"energy", "control, its supply", "place of its own"} {
		y := 10.6 + 2.4*float64(i)
		switch i {
		case 0:
			t.add(segment(railPen, x, y, x+5.6, y), &head{tip: point{x + 7, y}, dx: 1, len: 1.4, wid: 1})
		case 1:
			t.add(segment(normalPen, x, y, x+5.8, y), &head{tip: point{x + 7, y}, dx: 1, len: 1.2, wid: 0.8})
		default:
			t.add(boundarySide(x, y, x+7, y))
		}
		t.add(textAt(x+8, y+0.4, s, valueStyle, ink.Start))
	}
}
