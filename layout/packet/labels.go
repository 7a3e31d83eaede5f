package packet

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// labelStrip is one kind of label: cells of one size to cut out.
type labelStrip struct {
	title, remark string
	w, h          float64 // of one label
	apart         float64 // clear between labels, for large ones
	count         int
	draw          func(p *pad, i int, x, y float64)
	changed       func(i int) bool // nil: never
}

// Dashes of cut lines, mm on and off.
var cutDashes = []float64{1.2, 0.8}

// strip sets a kind of label: a head and a block for each row of cells.
func (b *book) labelBlocks(l labelStrip) []block {
	if l.count == 0 {
		return nil
	}
	per := max(1, int((b.pg.width+l.apart+slack)/(l.w+l.apart)))
	head := block{h: 4.8, gap: 4, next: true, topic: l.title, draw: func(p *pad, y, _ float64) {
		w := p.write(p.pg.l, y+3.3, l.title, tableText.as(ink.Bold), ink.Start)
		p.fit(p.pg.right(), y+3.3, l.remark, remarkText, p.pg.width-w-5, ink.End)
	}}
	out := []block{head}
	for from := 0; from < l.count; from += per {
		n := min(per, l.count-from)
		r := block{h: l.h, topic: l.title, above: &head, draw: func(p *pad, y, _ float64) { p.labelRow(l, from, n, y) }}
		if from > 0 {
			r.gap = l.apart
		}
		out = append(out, r)
	}
	if n := len(out); n > 3 {
		out[n-2].next = true
	}
	return out
}

func (p *pad) labelRow(l labelStrip, from, n int, y float64) {
	cut := func(x1, y1, x2, y2 float64) {
		q := (&ink.Path{}).Move(x1, y1).Line(x2, y2)
		p.c.Stroke(q, ink.Pen{Width: hairline, Color: ink.Black, Dash: q.FitDash(cutDashes...)})
	}
	for i := range n {
		x := p.pg.l + float64(i)*(l.w+l.apart)
		right, foot := x+l.w, y+l.h
		cut(x, y, right, y) // over the cut below the row above, which is the same
		cut(x, foot, right, foot)
		cut(x, y, x, foot)
		if i == n-1 || l.apart > 0 {
			cut(right, y, right, foot)
		}
		l.draw(p, from+i, x, y)
	}
	for i := range n {
		if l.changed != nil && l.changed(from+i) {
			p.changed(y, l.h)
			return
		}
	}
}

// labels is the sheets of stickers, sleeves and plates, in the order of mounting.
func (b *book) labels() *section {
	s := &section{key: keyLabels, title: "Labels", document: "Label strips", letter: "L", label: "Before", crosses: true,
		purpose: "Use this sheet to label enclosures, devices, terminals, wires, cables and test points: cut on the dashed lines.",
		note:    "Print at 100 %: the bar at the foot must measure 100 mm. Stick a label when its part is fitted.",
		sub:     fromTo}
	lists := [][]labelStrip{{b.enclosurePlates(), b.devicePlates(), b.lampPlates(), b.cableFlags()}, b.sleeves(), b.tags(), {b.dots()}}
	spare := 0
	for _, list := range lists {
		for _, l := range list {
			s.blocks = append(s.blocks, b.labelBlocks(l)...)
			spare += l.count
		}
	}
	if len(s.blocks) == 0 {
		return nil
	}
	s.blocks = append(s.blocks, b.labelBlocks(b.spareLabels(spare))...)
	return s
}

// fromTo names the first and the last topic of a sheet.
func fromTo(topics []string) string {
	short := func(t string) string { t, _, _ = strings.Cut(t, ","); return strings.ToLower(t) }
	first, last := short(topics[0]), short(topics[len(topics)-1])
	if first == last {
		return first
	}
	return first + " to " + last
}

// In the widths below a whole number of labels fills 180 mm.
const (
	plateW, plateH   = 59, 23
	deviceW, deviceH = 180.0 / 7, 11.5
	lampW, lampH     = 180.0 / 11, 8
	flagW, flagH     = 30, 9
	sleeveW, sleeveH = 18, 6
	tagW, tagH       = 8, 6
	dotSize          = 9
	dotCell          = 15
	safe             = 2 // from the cut to the text
)

// Styles on labels.
var (
	plateName   = style{ink.Bold, 15, 6, ink.Black}
	deviceName  = style{ink.MonoBold, 13, 5, ink.Black}
	deviceWords = style{ink.Regular, 8, 3.3, ink.Black}
	flagName    = style{ink.MonoBold, 9, 4, ink.Black}
	lampName    = style{ink.MonoBold, 11, 4, ink.Black}
)

func (b *book) enclosurePlates() labelStrip {
	list := b.d.Circuit.Places
	job := b.d.Site.Job.Number.Val
	return labelStrip{title: "Enclosure plates", remark: fmt.Sprintf("%s %d × %d mm", counted(len(list), "plate"), plateW, plateH), w: plateW, h: plateH, apart: 1.5, count: len(list),
		draw: func(p *pad, i int, x, y float64) {
			pl := list[i]
			p.fit(x+safe+1, y+6.6, pl.Name, plateName, plateW-2*safe-2, ink.Start)
			w := p.write(x+plateW-safe-1, y+11.2, job, style{ink.Mono, 9, 4, ink.Black}, ink.End)
			p.fit(x+safe+1, y+11.2, strings.Join(b.mainDevices(pl), " "), tableText.as(ink.Medium), plateW-2*safe-5-w, ink.Start)
			feed, warning := b.placeFeed(pl)
			p.fit(x+safe+1, y+15.8, feed, lineText.as(ink.Medium), plateW-2*safe-14, ink.Start)
			p.fit(x+safe+1, y+20.4, warning, noteText, plateW-2*safe-12, ink.Start)
			p.triangle(x+plateW-safe-5, y+17.4, 5.6, ink.Black)
		}}
}

// mainDevices are the designations that an enclosure plate names: supplies, battery,
// cut-off, relays and boards, as many as there is room for.
func (b *book) mainDevices(pl *circuit.Place) []string {
	var out []string
	for _, p := range b.d.Circuit.Parts {
		if p.Place != pl {
			continue
		}
		switch p.Kind {
		case circuit.Battery, circuit.Supply, circuit.ChargerUnit, circuit.CutOff, circuit.Relay:
			out = append(out, p.Designation)
		}
	}
	for _, bd := range b.d.Circuit.Boards {
		if bd.Place == pl {
			out = append(out, bd.Strip)
		}
	}
	return out
}

// placeFeed says what feeds an enclosure and what to beware of in it.
func (b *book) placeFeed(pl *circuit.Place) (feed, warning string) {
	volts := "DC " + b.d.Site.Duty.Nominal.Val.String()
	feed, warning = volts, "live with the mains off"
	if m := b.mainFuse(); m != nil {
		if g := b.d.Battery; g.Part.Place == pl {
			feed = volts + ", short " + figure(g.Prospective)
			if g.Gas {
				warning = "no flame; keep openings clear"
			}
			return feed, warning
		}
		for _, p := range b.d.Circuit.Parts {
			if p.Place == pl && p.Kind == circuit.Terminal {
				feed = volts + ", " + figure(m.Rating)
			}
		}
	}
	for _, bd := range b.d.Circuit.Boards {
		if bd.Place != pl || bd.Parent == nil {
			continue
		}
		for _, f := range b.d.Fuses {
			if f.Way == bd.Parent && bd.Parent.Board.Place != pl {
				feed = volts + ", " + figure(f.Rating)
			}
		}
	}
	return feed, warning
}

// hasPlate reports whether a part gets a device plate; lamps have their own, terminals
// their tags, and the mains connection is the building's.
func hasPlate(p *circuit.Part) bool {
	switch p.Kind {
	case circuit.Terminal, circuit.BusBar, circuit.MainsConnection, circuit.LuminaireLamp:
		return false
	}
	return true
}

func (b *book) devicePlates() labelStrip {
	var list []*circuit.Part
	for _, p := range b.d.Circuit.Parts {
		if hasPlate(p) {
			list = append(list, p)
		}
	}
	return labelStrip{title: "Device plates", remark: fmt.Sprintf("%s %.1f × %.1f mm", counted(len(list), "plate"), deviceW, deviceH), w: deviceW, h: deviceH, count: len(list),
		changed: func(i int) bool { return b.relabelled(list[i].Designation) },
		draw: func(p *pad, i int, x, y float64) {
			p.write(x+deviceW/2, y+5.6, list[i].Designation, deviceName, ink.Middle)
			p.fit(x+deviceW/2, y+9.6, plateWords(list[i]), deviceWords, deviceW-1.6, ink.Middle)
		}}
}

// plateWords are the second line of a device plate: the values that the symbol shows,
// or what the part is.
func plateWords(p *circuit.Part) string {
	for _, v := range p.Values {
		if v.Show {
			return v.Text
		}
	}
	if p.Kind == circuit.LDR {
		return "light sensor"
	}
	words, _, _ := strings.Cut(p.Description, ",")
	return strings.ToLower(words)
}

// relabelled reports whether a label is new in this revision.
func (b *book) relabelled(name string) bool {
	if b.d.Changes == nil {
		return false
	}
	for _, n := range b.d.Changes.New.All() {
		if n == name {
			return true
		}
	}
	return false
}

func (b *book) lampPlates() labelStrip {
	var list []string
	for _, p := range b.d.Circuit.Parts {
		if p.Kind == circuit.LuminaireLamp {
			list = append(list, p.Designation)
		}
	}
	return labelStrip{title: "Lamp plates", remark: fmt.Sprintf("%s %.1f × %d mm; on the body, seen from the floor", counted(len(list), "plate"), lampW, lampH), w: lampW, h: lampH, count: len(list),
		changed: func(i int) bool { return b.relabelled(list[i]) },
		draw:    func(p *pad, i int, x, y float64) { p.write(x+lampW/2, y+5.4, list[i], lampName, ink.Middle) }}
}

// ends is how many ends a wire or cable has: one label each.
const ends = 2

func (b *book) cableFlags() labelStrip {
	list := b.d.Circuit.Cables
	return labelStrip{title: "Cable flags", remark: fmt.Sprintf("%s %d × %d mm, 2 for each cable; fold at the grey line round the cable", counted(ends*len(list), "flag"), flagW, flagH),
		w: flagW, h: flagH, count: ends * len(list), changed: func(i int) bool { return b.relabelled(list[i/ends].Designation) },
		draw: func(p *pad, i int, x, y float64) {
			c := list[i/ends]
			fold(p, x+flagW/2, y, flagH)
			for _, at := range []float64{x + flagW/4, x + flagW*3/4} {
				p.write(at, y+4, c.Designation, flagName, ink.Middle)
				p.fit(at, y+7.4, flagWords(c), deviceWords, flagW/2-1, ink.Middle)
			}
		}}
}

// flagWords is the second line of a cable flag: cores and square millimetres, or the
// gauge.
func flagWords(c *circuit.Cable) string {
	if c.Size.Gauge != "" {
		return c.Size.String()
	}
	return fmt.Sprintf("%d × %s", len(c.Cores), strings.TrimSuffix(c.Size.String(), " mm²"))
}

// fold is the pale line at which a flag or sleeve is folded.
func fold(p *pad, x, y, h float64) { p.stroke(x, y+0.8, x, y+h-0.8, hairline, ink.Rule) }

// sleeves are two for each wire and core, by enclosure; cores that run between lamps
// come last.
func (b *book) sleeves() []labelStrip {
	var order []string
	lists := map[string][]string{}
	add := func(title, number string) {
		if lists[title] == nil {
			order = append(order, title)
		}
		lists[title] = append(lists[title], number)
	}
	for _, w := range b.d.Circuit.Conductors {
		if w.Cable == nil {
			add("Wire sleeves, "+w.From.Part.Place.Name, w.Number)
		}
	}
	for _, w := range b.d.Circuit.Conductors {
		if w.Cable != nil {
			add("Core sleeves, cables", w.Number)
		}
	}
	var out []labelStrip
	for _, title := range order {
		list := lists[title]
		w := sleeveWidth(list)
		name := sleeveName(list, w)
		out = append(out, labelStrip{title: title, remark: fmt.Sprintf("%s %g × %d mm, 2 for each, text twice", counted(ends*len(list), "sleeve"), w, sleeveH),
			w: w, h: sleeveH, count: ends * len(list), changed: func(i int) bool { return b.relabelled(list[i/ends]) },
			draw: func(p *pad, i int, x, y float64) {
				fold(p, x+w/2, y, sleeveH)
				for _, at := range []float64{x + w/4, x + w*3/4} {
					p.fit(at, y+4.1, list[i/ends], name, w/2-0.8, ink.Middle)
				}
			}})
	}
	return out
}

// sleeveWidths are widths of sleeves that fill 180 mm; the least that takes all texts
// of a strip is chosen.
var sleeveWidths = []float64{sleeveW, 20, 22.5, 30, 36, 45, 60}

func sleeveWidth(texts []string) float64 {
	widest := 0.0
	for _, t := range texts {
		widest = max(widest, spans(t, flagName).width())
	}
	for _, w := range sleeveWidths {
		if widest <= w/2-0.8 {
			return w
		}
	}
	return sleeveWidths[len(sleeveWidths)-1]
}

// sleeveName is the lettering of a strip of sleeves: smaller where the longest text would
// touch the fold.
func sleeveName(texts []string, w float64) style {
	const clear = 2.0
	st := flagName
	for _, t := range texts {
		if spans(t, flagName).width() > w/2-clear {
			st.pt = 8
		}
	}
	return st
}

// tags are the numbers of the terminals, strip by strip.
func (b *book) tags() []labelStrip {
	var out []labelStrip
	for _, s := range b.strips() {
		list := s.list
		out = append(out, labelStrip{title: "Terminal tags, " + stripTitle(s), remark: fmt.Sprintf("%s, pitch %d mm, left to right as on the rail", counted(len(list), "tag"), tagW),
			w: tagW, h: tagH, count: len(list),
			draw: func(p *pad, i int, x, y float64) {
				_, n, _ := strings.Cut(list[i].Designation, ":")
				p.write(x+tagW/2, y+4.1, n, flagName, ink.Middle)
			}})
	}
	return out
}

func (b *book) dots() labelStrip {
	list := b.d.Circuit.TestPoints
	return labelStrip{title: "Test point dots", remark: fmt.Sprintf("%s %d mm", counted(len(list), "dot"), dotSize), w: dotCell, h: dotSize + 2, count: len(list),
		changed: func(i int) bool { return b.relabelled(list[i].Label) },
		draw: func(p *pad, i int, x, y float64) {
			p.circle(x+dotCell/2, y+(dotSize+2)/2.0, dotSize/2.0, 0.35, ink.Black)
			p.write(x+dotCell/2, y+(dotSize+2)/2.0+1.1, list[i].Label, noteText.as(ink.Bold), ink.Middle)
		}}
}

// Spare labels: one for ten, at least a row of them.
const (
	spareShare = 10
	spareRow   = 10
)

func (b *book) spareLabels(printed int) labelStrip {
	n := max(spareRow, (printed/spareShare+spareRow-1)/spareRow*spareRow)
	return labelStrip{title: "Spares", remark: fmt.Sprintf("%d blank, one for ten, to write by hand", n), w: sleeveW, h: sleeveH, count: n, draw: func(*pad, int, float64, float64) {}}
}
