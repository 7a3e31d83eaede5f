package packet

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// box is one part of the glance at the energy's way.
type box struct {
	head, name string
	lines      []string
	signal     bool // thin frame
}

// powerBoxes follow the energy from the charger to the changeover.
func (b *book) powerBoxes() []box {
	d := b.d
	var out []box
	if c := d.Charger; c.Part != nil {
		out = append(out, box{"Charger", c.Part.Designation, []string{fmt.Sprintf("%v %v", d.Site.Duty.Nominal.Val, c.Current), "float " + quantity.Fixed(c.Float, 1), "at 20 °C"}, false})
	}
	if t := d.Battery; t.Part != nil {
		x := box{head: "Battery", name: t.Part.Designation, lines: []string{fmt.Sprintf("%d × %v %v", max(1, t.Blocks*t.Parallel), t.BlockVolt, t.BlockAh)}}
		if f := b.mainFuse(); f != nil {
			x.lines = append(x.lines, fmt.Sprintf("main fuse %v", f.Rating), f.Part.Designation)
		}
		out = append(out, x)
	}
	if c := d.CutOff; c != nil {
		out = append(out, box{"Cut-off", c.Part.Designation, []string{"opens " + quantity.Fixed(c.Opens, 1), "recloses " + quantity.Fixed(c.Recloses, 1)}, false})
	}
	if r := d.Relay; r != nil {
		out = append(out, box{"Changeover", r.Part.Designation, []string{"lets the lights on", "when nothing", "holds it"}, false})
	}
	return out
}

// signalBoxes are what holds the changeover.
func (b *book) signalBoxes() []box {
	d := b.d
	hold := ""
	if d.Relay != nil {
		hold = d.Relay.Part.Designation
	}
	var out []box
	if s := d.Supply; s != nil && s.Part != nil {
		x := box{"Presence", s.Part.Designation, []string{"mains is there:", "holds " + hold}, true}
		out = append(out, x)
	}
	for _, p := range d.Circuit.Parts {
		if p.Kind == circuit.LDR || p.Kind == circuit.PhotoSwitch {
			x := box{"Daylight", p.Designation, []string{"light enough:", "holds " + hold}, true}
			if hold == "" {
				x.lines = []string{"sees the daylight"}
			}
			out = append(out, x)
			break
		}
	}
	if hold == "" {
		for i := range out {
			out[i].lines = out[i].lines[:1]
		}
	}
	return out
}

// boardBoxes are the boards, the nearest first.
func (b *book) boardBoxes() []box {
	var out []box
	for _, bd := range b.d.Circuit.Boards {
		circuits, lights := 0, 0
		for _, w := range bd.Ways {
			if w.Lighting != nil {
				circuits++
				w.Lighting.Walk(func(p, _ *circuit.Point) { lights++ })
			}
		}
		x := box{head: bd.Title, name: bd.Strip, lines: []string{fmt.Sprintf("%s, %s", counted(circuits, "circuit"), counted(lights, "light"))}}
		if bd.Feeder != nil {
			x.lines = append(x.lines, fmt.Sprintf("%s of %v", b.lengths.Format(bd.Feeder.Length), bd.Feeder.Size))
		} else {
			for _, w := range bd.Ways {
				if w.Feeds != nil {
					x.lines = append(x.lines, fmt.Sprintf("place %d feeds %s", w.Number, w.Feeds.Strip))
					break
				}
			}
		}
		out = append(out, x)
	}
	return out
}

// energyWay is the glance: the power from the mains to the changeover above, what holds
// it and the boards below. It shows at most two boards.
func (b *book) energyWay() block {
	power, signals, boards := b.powerBoxes(), b.signalBoxes(), b.boardBoxes()
	if len(power) == 0 || len(boards) == 0 {
		return block{}
	}
	more := 0
	if len(boards) > 2 {
		more = len(boards) - 2
		boards = boards[:2]
	}
	const (
		upper, lower = 19.5, 16.0
		between      = 8.5
		gap          = 7.0
	)
	h := 2.5 + upper + between + lower
	return block{h: h, draw: func(p *pad, y, h float64) {
		l, w := p.pg.l, p.pg.width
		y += 2.5
		n := float64(len(power) + 1)
		each := (w - gap*(n-1)) / n
		mains := "mains"
		if m := b.mainsText(); m != "" {
			mains = m
		}
		p.glance(l, y, each, upper, box{"Mains", "", []string{mains, "licensed persons", "only"}, false}, 0.35, 2, 1.2)
		for i, x := range power {
			at := l + float64(i+1)*(each+gap)
			p.glance(at, y, each, upper, x, 0.5)
			p.arrow(at-gap, y+upper/2, at, y+upper/2, barLine)
		}
		last := l + float64(len(power))*(each+gap)
		y2 := y + upper + between
		// signals at the left
		bw := 38.0
		sw := 29.0
		if len(signals) > 0 && b.d.Relay != nil {
			bus := y + upper + between/2
			tip := last + each*0.2
			p.stroke(l+sw+gap/2, bus, tip, bus, 0.35, ink.Black, 1.2, 0.8)
			words := spans("hold: keeps the lights off", remarkText)
			cx := (l + sw + gap/2 + tip) / 2
			p.fill(cx-words.width()/2-1.5, bus-2, words.width()+3, 4, ink.White)
			p.text(cx, bus+1.1, words, ink.Middle)
			p.stroke(tip, bus, tip, y+upper+2.6, 0.35, ink.Black, 1.2, 0.8)
			p.polygon(ink.Black, ink.Point{X: tip, Y: y + upper}, ink.Point{X: tip - 1.2, Y: y + upper + 2.6}, ink.Point{X: tip + 1.2, Y: y + upper + 2.6})
			for i := range signals {
				sx := l + float64(i)*(sw+gap)
				if i == 0 {
					p.stroke(sx+sw, y2+lower/2, sx+sw+gap/2, y2+lower/2, 0.35, ink.Black, 1.2, 0.8)
					p.stroke(sx+sw+gap/2, y2+lower/2, sx+sw+gap/2, bus, 0.35, ink.Black, 1.2, 0.8)
				} else {
					p.stroke(sx+sw/2, y2, sx+sw/2, bus, 0.35, ink.Black, 1.2, 0.8)
				}
			}
		}
		for i, x := range signals {
			p.glance(l+float64(i)*(sw+gap), y2, sw, lower, x, 0.35)
			if i == 0 && x.head == "Presence" {
				p.stroke(l+sw/2, y+upper, l+sw/2, y2, 0.35, ink.Black, 2, 1.2)
			}
		}
		// boards at the right, the nearest first
		turn := last + each*0.72
		x := last + each*0.45 - bw
		if b.d.Relay == nil {
			x = w + l - bw - 8
		}
		for i, bd := range boards {
			p.glance(x, y2, bw, lower, bd, 0.5)
			if i == 0 {
				p.stroke(turn, y+upper, turn, y2+lower/2+barLine/2, barLine, ink.Black)
				p.arrow(turn, y2+lower/2, x+bw, y2+lower/2, barLine)
			} else {
				p.arrow(x+bw+gap, y2+lower/2, x+bw, y2+lower/2, barLine)
			}
			x -= bw + gap
		}
		if more > 0 {
			p.write(x+bw+gap-2, y2+lower-1, fmt.Sprintf("and %s more", counted(more, "board")), remarkText, ink.End)
		}
	}}
}

// mainsText is the mains of the charger: "230 V ± 10 %".
func (b *book) mainsText() string {
	if b.d.Charger.Part != nil && b.d.Charger.Mains.Nominal > 0 {
		return b.d.Charger.Mains.String()
	}
	if b.d.Supply != nil && b.d.Supply.Mains.Nominal > 0 {
		return b.d.Supply.Mains.String()
	}
	return ""
}

// glance draws one box with its name and lines.
func (p *pad) glance(x, y, w, h float64, b box, lw float64, dash ...float64) {
	p.frame(x, y, w, h, lw, ink.Black, dash...)
	name := spans(b.name, style{ink.Mono, 8.5, 3.7, ink.Black})
	p.text(x+w-1.8, y+4.4, name, ink.End)
	p.fit(x+2.2, y+4.4, b.head, boxHead, w-4.6-name.width(), ink.Start)
	for i, l := range b.lines {
		p.fit(x+2.2, y+8.6+float64(i)*3.9, l, noteText, w-3.4, ink.Start)
	}
}
