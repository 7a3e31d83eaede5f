package circuit

import (
	"fmt"
	"strconv"
	"strings"
)

// Letter returns the class letter of a part kind after LetterEdition.
func (k Kind) Letter() string {
	switch k {
	case Fuse, Suppressor:
		return "F"
	case Battery:
		return "G"
	case Supply, ChargerUnit, Transformer, Bridge, Regulator:
		return "T"
	case Resistor, Preset, Potentiometer, Diode, Schottky, Zener:
		return "R"
	case Capacitor, Electrolytic:
		return "C"
	case LED, SignalLamp, Voltmeter, Ammeter:
		return "P"
	case NPN, PNP, CutOff, SwitchIsolator:
		return "Q"
	case Comparator, Relay:
		return "K"
	case LDR, NTC, PhotoSwitch, Shunt:
		return "B"
	case PushButton:
		return "S"
	case Terminal, BusBar, MainsConnection:
		return "X"
	case LuminaireLamp:
		return "E"
	}
	panic("circuit: no class letter for " + string(k))
}

// Labels is what has been given so far: label by stable key. Keys begin with the
// sort of thing, such as "part/store/battery".
type Labels map[string]string

// namer gives labels: a kept one if there is one, else the next free number.
type namer struct {
	kept  Labels
	taken map[string]bool // "sort label"
	out   Labels
}

func (n *namer) give(sort, key string, from int, form func(int) string) string {
	id := sort + "/" + key
	if l, ok := n.kept[id]; ok {
		n.out[id] = l
		return l
	}
	for i := from; ; i++ {
		l := form(i)
		if !n.taken[sort+" "+l] {
			n.taken[sort+" "+l] = true
			n.out[id] = l
			return l
		}
	}
}

// lamp gives a luminaire and the leg that feeds it one number: -E12 and -W12.
func (n *namer) lamp(key, leg string, from int) (lamp, cable string) {
	lamp, kept := n.kept["part/"+key]
	for i := from; !kept; i++ {
		lamp = "-E" + strconv.Itoa(i)
		if !n.taken["part "+lamp] && !n.taken["cable -W"+lamp[2:]] {
			break
		}
	}
	cable = "-W" + lamp[2:]
	n.taken["part "+lamp], n.taken["cable "+cable] = true, true
	n.out["part/"+key], n.out["cable/"+leg] = lamp, cable
	return lamp, cable
}

// Label gives every part, cable, conductor, terminal and test point its label and
// returns all of them by key. Labels in kept stay with their keys; labels that kept
// holds for things that are gone are never given again.
//
// Way fuses are numbered 100 x board + way, luminaires and their legs together from
// the first ten above the system's cables, board wires from the next ten.
func (c *Circuit) Label(kept Labels) Labels {
	n := &namer{kept: kept, taken: map[string]bool{}, out: Labels{}}
	for _, k := range SortedKeys(kept) {
		sort := k[:strings.IndexByte(k+"/", '/')]
		n.taken[sort+" "+kept[k]] = true
	}
	c.labelPlaces(n)
	c.labelRails(n)
	c.labelParts(n)
	c.labelTerminals(n)
	c.labelCables(n)
	c.labelConductors(n)
	for _, t := range c.TestPoints {
		t.Label = n.give("tp", t.Key, 1, func(i int) string { return "TP" + strconv.Itoa(i) })
	}
	for _, p := range c.Parts {
		for _, e := range p.Elements {
			suffix := e.ID
			e.ID = p.Designation
			if suffix != "" {
				e.ID += "." + suffix
			}
			if e.Control != "" {
				e.Control = p.Designation + "." + e.Control
			}
		}
	}
	return n.out
}

func (c *Circuit) labelParts(n *namer) {
	wayFuse := map[*Part]int{}
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			wayFuse[w.Fuse] = 100*b.Number + w.Number
		}
	}
	for _, p := range c.Parts {
		switch {
		case p.Kind == Terminal || p.Kind == LuminaireLamp || p.Kind == BusBar || p.Kind == MainsConnection:
		case wayFuse[p] > 0:
			p.Designation = n.give("part", p.Key, wayFuse[p], func(i int) string { return "-F" + strconv.Itoa(i) })
		default:
			l := p.Kind.Letter()
			p.Designation = n.give("part", p.Key, 1, func(i int) string { return "-" + l + strconv.Itoa(i) })
		}
	}
}

func (c *Circuit) labelTerminals(n *namer) {
	strips := map[string]string{}
	upper, lower := map[string]int{}, map[string]int{}
	for _, p := range c.Parts {
		if p.Kind != Terminal {
			continue
		}
		s, ok := strips[p.Strip]
		if !ok {
			s = n.give("strip", p.Strip, 1, func(i int) string { return "-X" + strconv.Itoa(i) })
			strips[p.Strip] = s
		}
		step, from := 1, 1
		switch {
		case p.Order > 0:
			from = p.Order
		case p.Lower:
			lower[s]++
			step, from = 2, 2
		case p.Strip == "cabinet":
			upper[s]++
			step, from = 2, 1
		}
		p.Designation = n.give("terminal"+s, p.Key, 0, func(i int) string { return fmt.Sprintf("%s:%d", s, from+step*i) })
	}
	for _, b := range c.Boards {
		for _, p := range c.Parts {
			if p.Kind == Terminal && p.Strip == b.Name {
				b.Strip = strips[b.Name]
				break
			}
		}
		for i, bar := range []*Part{b.Plus, b.Minus} {
			bar.Designation = b.Strip + []string{":L+", ":L−"}[i]
		}
	}
	for _, p := range c.Parts {
		if p.Kind == MainsConnection {
			p.Designation = "mains"
		}
	}
}

// firstTen returns the first number of the next block of ten after n, at least min.
func firstTen(n, min int) int { return max(min, (n/10+1)*10+1) }

func (c *Circuit) labelCables(n *namer) {
	system := 0
	for _, w := range c.Cables {
		if w.Circuit == "" {
			w.Designation = n.give("cable", w.Key, 1, func(i int) string { return "-W" + strconv.Itoa(i) })
			system++
		}
	}
	from := firstTen(system, 11)
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			if w.Lighting == nil {
				continue
			}
			w.Lighting.Walk(func(p, _ *Point) {
				p.Luminaire.Designation, p.Leg.Designation = n.lamp(p.Luminaire.Key, p.Leg.Key, from)
			})
		}
	}
}

func (c *Circuit) labelConductors(n *namer) {
	number := func(i int) string { return strconv.Itoa(i) }
	onBoard := map[*Conductor]bool{}
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			onBoard[w.WirePlus], onBoard[w.WireMinus] = true, true
		}
	}
	count := 0
	rail := map[string]int{}
	for _, w := range c.Conductors {
		switch {
		case w.Cable != nil:
			sign := "−"
			if w.Positive {
				sign = "+"
			}
			w.Number = strings.TrimPrefix(w.Cable.Designation, "-") + sign
			if w.Circuit != "" {
				w.Number = w.Number[1:]
			}
			n.out["wire/"+w.Key] = w.Number
		case w.Rail != "":
			rail[w.Rail]++
			name := w.Rail
			w.Number = n.give("wire", w.Key, rail[name], func(i int) string { return fmt.Sprintf("%s.%d", name, i) })
		case !onBoard[w]:
			w.Number = n.give("wire", w.Key, 1, number)
			count++
		}
	}
	next := firstTen(count, 31)
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			w.WirePlus.Number = n.give("wire", w.WirePlus.Key, next, number)
			w.WireMinus.Number = n.give("wire", w.WireMinus.Key, next, number)
		}
		next = firstTen(next+2*len(b.Ways)-1, 31)
	}
}
