package schematic

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// drawBlocks draws a sheet of blocks with the lines between them.
func (b *book) drawBlocks(sh *Sheet, o *overview, s *blockSheet) {
	if fed := s.fedHere(); len(fed) > 0 {
		b.mainsBlock(sh, s, fed)
	}
	for _, v := range s.list {
		if v == s.battery {
			b.batteryBlock(sh, s, o)
			continue
		}
		if v.board != nil {
			b.block(sh, v.name, v.heading(), s.rect(v), b.boardLines(v.board), b.place("board "+v.name))
			continue
		}
		lines := b.blockLines(v.box)
		if v.sensor != nil {
			b.sensorBlock(sh, s, v)
		}
		b.block(sh, v.name, v.heading(), s.rect(v), lines, b.place("stage "+v.name))
	}
	rail, foot := s.trunk(o)
	lines := [][]node{rail, foot}
	for _, a := range s.arcs {
		if len(a.pts) > 0 {
			lines = append(lines, a.pts)
		}
	}
	b.drawTrunk(sh, s, o)
	for _, a := range s.arcs {
		if len(a.pts) > 0 {
			b.drawArc(sh, s, a, lines)
		}
	}
	for _, v := range s.list {
		in, out := s.stubs(v)
		at := s.rect(v)
		b.stub(sh, v, "to", out, point{float64(at.x0 + stubOut), float64(at.y1)}, point{float64(at.x0 + stubOut), float64(at.y1) + stubLong})
		b.stub(sh, v, "from", in, point{float64(at.x0 + stubIn), float64(at.y0) - stubLong}, point{float64(at.x0 + stubIn), float64(at.y0)})
	}
}

// polyline turns the corners of a line into points.
func polyline(list []node) []point {
	var out []point
	for _, n := range list {
		out = append(out, n.point())
	}
	return out
}

// drawArc draws one connection with what is said at it.
func (b *book) drawArc(sh *Sheet, s *blockSheet, a *arc, lines [][]node) {
	f := b.flow(sh, a.from.name+"-"+a.to.name, a.from.heading()+" to "+a.to.heading(), a.energy, false, polyline(a.pts)...)
	if a.joint {
		f.add(&disc{a.pts[0].point(), dotRadius})
	}
	if a.to == s.battery {
		f.add(&disc{a.pts[len(a.pts)-1].point(), dotRadius})
	}
	text := ""
	switch {
	case a.coil:
		text = b.saysOf(a)
	case a.energy && !a.joint && a.from.row == a.to.row && a.to.board == nil:
		text = b.railCurrent(s, a)
	}
	if text == "" {
		return
	}
	if at, anchor, ok := s.roomFor(a.pts, text, lines, a.coil); ok {
		f.add(textAt(at.X, at.Y, text, valueStyle, anchor))
	}
}

// saysOf is the plain sentence on the arrow that holds a relay in: what its source
// stands for.
func (b *book) saysOf(a *arc) string {
	for v := a.from; v != nil; v = feeder(v) {
		if v.box == nil {
			break
		}
		if t := says(v.box); t != "" {
			return t
		}
	}
	return "holds the relay"
}

// railCurrent is the load in an outage at its end, on the way that all of it takes.
func (b *book) railCurrent(s *blockSheet, a *arc) string {
	whole := false
	for i, v := range s.spine {
		if i > 0 && a.to == v {
			whole = true
		}
		if v == a.to {
			break
		}
		if len(v.below()) > 1 {
			return ""
		}
	}
	if s.battery != nil && len(s.battery.below()) > 1 {
		return ""
	}
	if v := b.d.Totals.LoadA; v > 0 && whole {
		return quantity.Fixed(v, 1)
	}
	return ""
}

// roomFor finds a place for a text at a line: over a level piece, right of an upright
// one, clear of all lines and blocks.
func (s *blockSheet) roomFor(pts []node, text string, lines [][]node, atStart bool) (point, ink.Anchor, bool) {
	w := width(text, valueStyle)
	clear := func(x, y float64) bool { // of a text that begins at x on baseline y
		const gap = 0.3
		x0, x1, y0, y1 := x-gap, x+w+gap, y-textHeight-gap, y+0.3+gap
		for _, l := range lines {
			for i := 1; i < len(l); i++ {
				a, z := l[i-1], l[i]
				if float64(min(a.X, z.X)) < x1 && float64(max(a.X, z.X)) > x0 && float64(min(a.Y, z.Y)) < y1 && float64(max(a.Y, z.Y)) > y0 {
					return false
				}
			}
		}
		for _, v := range s.list {
			list := []rect{s.rect(v)}
			if v == s.battery {
				list[0] = list[0].around()
			}
			if v.sensor != nil {
				k := s.sensorRect(v)
				list = append(list, k.around(), rect{k.x1, k.middle() - 2, s.left(v), k.middle()})
			}
			for _, r := range list {
				if float64(r.x0) < x1 && float64(r.x1) > x0 && float64(r.y0) < y1 && float64(r.y1) > y0 {
					return false
				}
			}
		}
		return true
	}
	const over, after, beside = 1.1, 1.2, 0.9
	for i := 1; i < len(pts); i++ {
		a, z := pts[i-1], pts[i]
		if a.Y == z.Y {
			long := float64(absInt(z.X - a.X))
			x0 := float64(min(a.X, z.X))
			if long < w+after+0.6 {
				continue
			}
			x := x0 + after
			y := float64(a.Y) - over
			if !atStart {
				x, y = x0+long/2-w/2, float64(a.Y)-0.9
			}
			if clear(x, y) {
				return point{x, y}, ink.Start, true
			}
			continue
		}
		if !atStart {
			continue
		}
		middle := (a.Y + z.Y) / 2
		for k := 0; 2*k < absInt(a.Y-z.Y)-4; k++ {
			for _, y := range []int{middle - k, middle + k} {
				if x := float64(a.X) + beside; clear(x, float64(y)) {
					return point{x, float64(y)}, ink.Start, true
				}
			}
		}
	}
	return point{}, ink.Start, false
}

// drawTrunk draws the battery's rail.
func (b *book) drawTrunk(sh *Sheet, s *blockSheet, o *overview) {
	rail, foot := s.trunk(o)
	if rail != nil {
		f := b.flow(sh, "rail", "energy", true, false, polyline(rail)...)
		if s.way.bus > rail[0].X {
			f.add(&disc{foot[0].point(), dotRadius})
		}
	}
	if foot == nil {
		return
	}
	w := b.flow(sh, "battery", "charge and discharge", true, true, polyline(foot)...)
	if c := b.batteryCable(s.battery); c != nil {
		b.cableText(w, c, float64(s.way.bus)+1.2, float64(foot[1].Y)+4)
	}
}

// mainsRect is the frame of the mains side.
func (s *blockSheet) mainsRect(fed []*vertex) rect {
	at := rect{colMains, 1 << 30, colMains + mainsWidth, 0}
	for _, v := range fed {
		r := s.rect(v)
		at.y0, at.y1 = min(at.y0, r.y0), max(at.y1, r.y1)
	}
	return at
}

// mainsBlock draws the mains side as one tall frame with its arrows.
func (b *book) mainsBlock(sh *Sheet, s *blockSheet, fed []*vertex) {
	at := s.mainsRect(fed)
	f := sh.scene.object(classBoundary, "mains", "Mains side: licensed persons only")
	boundary(f, float64(at.x0), float64(at.y0), float64(at.x1), float64(at.y1), "")
	f.add(textAt(float64(at.x0)+0.8, float64(at.y0)+2.2, "Mains", headStyle, ink.Start))
	first := fed[0]
	for _, v := range fed {
		if s.rect(v).y0 == at.y0 {
			first = v
		}
	}
	for i, t := range b.mainsText(first.name) {
		f.add(textAt(float64(at.x0)+0.8, float64(at.y0)+4.2+linePitch*float64(i), t, valueStyle, ink.Start))
	}
	for _, v := range fed {
		y := float64(s.rect(v).middle())
		energy := false
		for _, a := range v.out {
			energy = energy || a.energy
		}
		b.flow(sh, "mains-"+v.name, "Mains to "+v.heading(), energy, false, point{float64(at.x1), y}, point{float64(s.left(v)), y})
	}
}

// batteryPlace is where the battery itself stands.
func (b *book) batteryPlace(v *vertex) *circuit.Place {
	for _, p := range v.box.st.Parts {
		if p.Kind == circuit.Battery {
			return p.Place
		}
	}
	return v.box.st.Place
}

// batteryCable is the cable from the battery's place, nil for none.
func (b *book) batteryCable(v *vertex) *circuit.Cable {
	place := b.batteryPlace(v)
	for _, c := range b.c.Cables {
		if c.From == place && len(c.Cores) == 2 && c.Circuit == "" {
			return c
		}
	}
	return nil
}

// batteryBlock draws the battery in its place, over its rail.
func (b *book) batteryBlock(sh *Sheet, s *blockSheet, o *overview) {
	v := s.battery
	at := s.rect(v)
	if place := b.batteryPlace(v); place.Key != mainCabinet {
		b.placeFrame(sh, place, at)
	}
	b.block(sh, v.name, v.heading(), at, b.blockLines(v.box), b.place("stage "+v.name))
}

// placeFrame draws the frame of a place around a block.
func (b *book) placeFrame(sh *Sheet, place *circuit.Place, at rect) {
	f := sh.scene.object(classBoundary, "place-"+place.Designation, place.Designation+" "+place.Name)
	k := at.around()
	boundary(f, float64(k.x0), float64(k.y0), float64(k.x1), float64(k.y1), "")
	f.add(textAt(float64(k.x0)+0.8, float64(k.y0)+1.8, placeName(place, 20), valueStyle, ink.Start))
}

// sensorBlock draws a photocell's sensor in its place, with its cable.
func (b *book) sensorBlock(sh *Sheet, s *blockSheet, v *vertex) {
	var sensor *circuit.Part
	for _, p := range v.box.st.Parts {
		if p.Place == v.sensor && sensor == nil {
			sensor = p
		}
	}
	if sensor == nil {
		return
	}
	at := s.sensorRect(v)
	b.placeFrame(sh, v.sensor, at)
	lines := append([]string{sensor.Designation}, ink.Wrap(sensor.Description, valueStyle.font(), (blockWidth-1.6)*module)...)
	y, to := float64(at.middle()), float64(s.left(v))
	w := b.flow(sh, v.name+"-sensor", "light signal", false, false, point{float64(at.x1), y}, point{to, y})
	for _, k := range b.c.Cables {
		if k.From != v.sensor && k.To != v.sensor {
			continue
		}
		l := &line{at: point{float64(at.x1) + 3, y - 1.1}, runs: []run{{s: k.Designation, st: nameStyle}, {s: b.lengths.Format(k.Length)}}}
		if l.at.X+l.width()+0.4 <= to {
			w.add(l)
		} else {
			lines = append(lines[:min(len(lines), 2)], k.Designation+" "+b.lengths.Format(k.Length))
		}
		break
	}
	b.block(sh, v.name+"-sensor", "Sensor", at, lines, b.place("stage "+v.name))
}

// stub draws the reference for what goes on to other sheets, or comes from there.
func (b *book) stub(sh *Sheet, v *vertex, way string, list []*arc, from, to point) {
	if len(list) == 0 {
		return
	}
	energy := false
	var names []string
	l := &line{at: point{from.X + 0.8, from.Y + 1.9}}
	for i, a := range list {
		other := a.to
		if way == "from" {
			other = a.from
		}
		energy = energy || a.energy
		names = append(names, other.heading())
		if i == 0 {
			l.runs = append(l.runs, run{to: b.place("block " + other.name)})
		}
	}
	if n := len(list) - 1; n > 0 {
		l.runs = append(l.runs, run{s: fmt.Sprintf("+%d", n)})
	}
	f := b.flow(sh, v.name+"-"+way, v.heading()+" "+way+" "+strings.Join(names, ", "), energy, false, from, to)
	f.add(l)
}

// boardLines are the lines of a board's block: its fuses, its ways, its load.
func (b *book) boardLines(bd *circuit.Board) []string {
	out := []string{fuseRange(bd), fmt.Sprintf("%d ways", len(bd.Ways))}
	if len(bd.Ways) == 1 {
		out[1] = "1 way"
	}
	if w := b.boardWatt(bd); w > 0 {
		out[1] += ", " + watts(w)
	}
	fed := 0
	for _, w := range bd.Ways {
		if w.Feeds != nil {
			fed++
		}
	}
	switch {
	case fed == 1:
		out = append(out, "feeds another board")
	case fed > 1:
		out = append(out, fmt.Sprintf("feeds %d boards", fed))
	}
	return out
}

// fuseRange names a board's fuses: "-F101 to -F108".
func fuseRange(bd *circuit.Board) string {
	first, last := bd.Ways[0].Fuse, bd.Ways[len(bd.Ways)-1].Fuse
	if first == last {
		return first.Designation
	}
	return first.Designation + " to " + last.Designation
}
