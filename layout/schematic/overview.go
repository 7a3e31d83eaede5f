package schematic

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/stage"
	"gloamwright/layout/ink"
)

// Places of the overview, in modules.
const (
	blockWidth   = 18
	blockHeight  = 10
	colMains     = 11
	mainsWidth   = 8
	colSource    = 27
	colBus       = 52
	colChain     = 59
	chainPitch   = 28
	colBoards    = 112
	boardWidth   = 49
	rowBattery   = 9
	rowEnergy    = 26
	rowTablesTop = 79.5
	boardsTop    = 22
	boardsGap    = 11
	chainBeside  = 2 // series stages beside the boards
	chainAlone   = 4 // series stages with the boards on a sheet of their own
	boardPages   = 3 // columns of boards on a sheet of their own
)

// overview is what the overview shows, found before anything is drawn.
type overview struct {
	charger, raw, battery *stageBox
	chain                 []*stageBox // series stages from the battery on, the changeover last
	relay                 *stageBox   // nil unless there is exactly one
	controls              []*control
	others                []*stageBox // neither energy nor control: meters, lamps
	pages                 [][]boardBlock
	beside                bool // the boards stand on the first sheet
}

// control is one source that holds the relay in, from its source on.
type control struct {
	sensor *circuit.Place // of a photocell with a cable to its sensor
	source *stageBox      // what feeds it: fed by mains, or the stage before; or nil
	middle *stageBox      // in column of the chain: photocell, shunt regulator, test switch
	says   string
}

// planOverview sorts the stages into the overview and returns the supplementary
// titles of its sheets.
func (b *book) planOverview() []string {
	o := &overview{}
	b.over = o
	boxes := b.boxes()
	byName := map[string]*stageBox{}
	for _, x := range boxes {
		byName[x.st.Name] = x
	}
	var relays []*stageBox
	used := map[*stageBox]bool{}
	for _, x := range boxes {
		switch {
		case x.st.Kind == "battery" && o.battery == nil:
			o.battery, used[x] = x, true
		case (x.st.Kind == "charger" || x.st.Kind == "linear-charger") && o.charger == nil:
			o.charger, used[x] = x, true
		case x.st.Kind == "transformer-supply" && o.raw == nil:
			o.raw, used[x] = x, true
		case x.st.Kind == "changeover-relay":
			relays = append(relays, x)
		case x.series():
			o.chain, used[x] = append(o.chain, x), true
		}
	}
	for _, x := range relays {
		o.chain, used[x] = append(o.chain, x), true
	}
	if len(relays) == 1 {
		o.relay = relays[0]
		b.controls(o, boxes, used)
	}
	for len(o.chain) > chainAlone { // the lesser ones go to the line below
		drop := 0
		for i, x := range o.chain {
			if x.st.Kind == "isolator" || x.st.Kind == "meter" {
				drop = i
				break
			}
		}
		used[o.chain[drop]] = false
		o.chain = append(o.chain[:drop:drop], o.chain[drop+1:]...)
	}
	for _, x := range boxes {
		if !used[x] {
			o.others = append(o.others, x)
		}
	}
	return b.pageBoards(o)
}

// series reports whether the stage stands in the plus line.
func (x *stageBox) series() bool {
	for _, it := range x.st.Sketch.Items {
		if it.Op == circuit.OpIn {
			return true
		}
	}
	return false
}

// controls finds what holds the relay in: each of its feeds, back to a source.
func (b *book) controls(o *overview, boxes []*stageBox, used map[*stageBox]bool) {
	add := func(c *control) {
		for _, x := range []*stageBox{c.source, c.middle} {
			if x != nil {
				used[x] = true
			}
		}
		o.controls = append(o.controls, c)
	}
	supplyOf := func(r *circuit.Rail) *stageBox {
		if r == nil {
			return nil
		}
		for _, x := range boxes {
			if x.class == stage.SupplyClass && x.mains && len(r.Pins) > 0 && r.Pins[0].Part.Stage == x.st.Name && x != o.charger {
				return x
			}
		}
		return nil
	}
	// above is the stage that feeds x in a coil feed: over a level lead, or over an
	// auxiliary rail.
	above := func(x *stageBox) *stageBox {
		for _, k := range x.links {
			if k.to == x {
				return k.from
			}
		}
		for _, l := range append(x.leads(), dropLeads(x)...) {
			if r := b.railOf[l.term.Pin("out")]; r != nil && r.Positive && !mainRail(r) {
				if s := supplyOf(r); s != x {
					return s
				}
			}
		}
		return nil
	}
	for _, k := range o.relay.links {
		if k.to != o.relay || used[k.from] {
			continue
		}
		c := &control{middle: k.from, says: says(k.from)}
		for _, it := range k.from.st.Sketch.Items {
			if it.Op == circuit.OpPlace {
				c.sensor = it.Place
			}
		}
		for up, n := above(k.from), 0; up != nil && n < len(boxes); up, n = above(up), n+1 {
			if up.mains {
				c.says = says(up)
			}
			if !used[up] && (c.source == nil || up.mains) {
				c.source = up
			}
		}
		add(c)
	}
	for _, d := range o.relay.drops {
		if s := supplyOf(b.railOf[d.term.Pin("out")]); s != nil && !used[s] {
			add(&control{source: s, says: says(s)})
		}
	}
	if len(o.controls) > 3 {
		for _, c := range o.controls[3:] {
			for _, x := range []*stageBox{c.source, c.middle} {
				if x != nil {
					used[x] = false
				}
			}
		}
		o.controls = o.controls[:3]
	}
}

// dropLeads are the leads that come down to a stage from rails.
func dropLeads(x *stageBox) []lead {
	var out []lead
	for _, d := range x.drops {
		out = append(out, lead{term: d.term})
	}
	return out
}

// says is the plain sentence on a control's arrow.
func says(x *stageBox) string {
	switch x.st.Kind {
	case "photocell":
		return "it is light"
	case "regulated-supply", "transformer-supply":
		return "mains is on"
	}
	return "holds the relay"
}

// drawOverview draws overview sheet i.
func (b *book) drawOverview(sh *Sheet, i int) error {
	o := b.over
	if i == 0 {
		b.drawEnergy(sh, o)
		b.drawControls(sh, o)
		b.drawOthers(sh, o)
		b.legend(sh)
		b.litTable(sh)
		b.figures(sh)
		if o.beside {
			b.drawBoardBlocks(sh, o.pages[0])
		}
		notes := []string{"/n: the sheet that draws the block.", "Far end: lowest volts at a luminaire while it must be lit."}
		for _, p := range b.c.Places {
			if p.Key == mainCabinet {
				notes = append(notes, fmt.Sprintf("A block without a place of its own is in the %s, %s.", lower(p.Name), p.Designation))
			}
		}
		return b.note(sh, nil, notes)
	}
	page := i - 1
	if o.beside {
		page = i
	}
	b.drawBoardBlocks(sh, o.pages[page])
	return b.note(sh, nil, []string{"/n: the sheet that draws the board.", "Far end: lowest volts at a luminaire while it must be lit."})
}

// block draws a stage as a box: its name, its sheet, three lines.
func (b *book) block(sh *Sheet, x *stageBox, name string, left, top float64, lines []string) {
	b.plainBlock(sh, x.st.Name, name, left, top, lines, b.place("stage "+x.st.Name))
}

func (b *book) plainBlock(sh *Sheet, key, name string, left, top float64, lines []string, at *place) {
	o := sh.scene.object(classBlock, key, name, ink.Attr{Name: "stage", Value: key})
	o.add(box(normalPen, left, top, left+blockWidth, top+blockHeight))
	st := headStyle
	if width(name, st) > blockWidth-4.2 {
		st = nameStyle
	}
	o.add(textAt(left+1, top+2.2, fit(name, st, blockWidth-4.2), st, ink.Start))
	o.add(&line{at: point{left + blockWidth - 0.8, top + 2}, anchor: ink.End, runs: []run{{to: at, short: true}}})
	if len(lines) > 3 {
		lines = lines[:3]
	}
	for i, s := range lines {
		o.add(textAt(left+1, top+4.6+1.65*float64(i), fit(s, valueStyle, blockWidth-1.6), valueStyle, ink.Start))
	}
}

// arrow draws a way of energy or control as a polyline with a filled head.
func (b *book) flow(sh *Sheet, key, says string, energy, both bool, pts ...point) *object {
	o := sh.scene.object(classBlock, "flow-"+key, says)
	pen, length, wid := normalPen, 1.2, 0.8
	if energy {
		pen, length, wid = railPen, 1.4, 1.0
	}
	cut := func(tip, from point) (point, *head) {
		h := &head{tip: tip, len: length, wid: wid}
		switch {
		case tip.X > from.X:
			h.dx = 1
		case tip.X < from.X:
			h.dx = -1
		case tip.Y > from.Y:
			h.dy = 1
		default:
			h.dy = -1
		}
		return point{tip.X - h.dx*length, tip.Y - h.dy*length}, h
	}
	line := append([]point{}, pts...)
	n := len(line) - 1
	end, h := cut(line[n], line[n-1])
	line[n] = end
	heads := []*head{h}
	if both {
		start, h := cut(pts[0], pts[1])
		line[0] = start
		heads = append(heads, h)
	}
	o.add(&stroke{pts: line, pen: pen})
	for _, h := range heads {
		o.add(h)
	}
	return o
}
