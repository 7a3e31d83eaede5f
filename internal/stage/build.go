package stage

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// Wire lengths inside a cabinet (common practice, no source): a lead from a device
// to its terminal, a bridge between neighbouring terminals, a lead inside a board.
const (
	leadLength   quantity.Metre = 0.5
	bridgeLength quantity.Metre = 0.3
	boardLead    quantity.Metre = 0.25
)

// Minus is the rail key of the common negative.
const Minus = "-"

// Build is a circuit under construction.
type Build struct {
	Site *describe.Site
	C    *circuit.Circuit

	cur    *circuit.Stage
	sk     *circuit.Sketch
	rails  map[string]*circuit.Rail
	outs   map[string]*circuit.Pin // signal outputs by "stage.port"
	places map[string]*circuit.Place
	boards map[string]*circuit.Board
}

// Expand turns a description into its circuit, without sizes, labels or ratings.
// The site must have passed the decoder.
func Expand(site *describe.Site) *circuit.Circuit {
	b := &Build{
		Site: site, C: &circuit.Circuit{},
		rails: map[string]*circuit.Rail{}, outs: map[string]*circuit.Pin{},
		places: map[string]*circuit.Place{}, boards: map[string]*circuit.Board{},
	}
	b.Place("cabinet", "A", "Main cabinet")
	list := ordered(site)
	b.nameRails(list)
	singles := false // they stand before the boards
	for _, s := range list {
		k := kindOf(s.Kind.Val)
		if k.Class == BoardClass && !singles {
			b.expandSingles()
			singles = true
		}
		b.cur = &circuit.Stage{Name: s.Name.Val, Kind: s.Kind.Val, Heading: b.heading(s, k), At: s.Name.Pos}
		b.cur.Place = b.places["cabinet"]
		b.sk = nil
		b.C.Stages = append(b.C.Stages, b.cur)
		k.Expand(b, s)
		b.cur.Sketch = b.sk
	}
	if !singles {
		b.expandSingles()
	}
	b.joinRails()
	return b.C
}

// Text returns a text field, or def if it was not given.
func Text(s *describe.Stage, name, def string) string {
	if v, ok := describe.Get[string](s.Fields, name); ok && v.Val != "" {
		return v.Val
	}
	return def
}

func (b *Build) heading(s *describe.Stage, k *Kind) string {
	if t := Text(s, "title", ""); t != "" {
		return t
	}
	n := 0
	for _, o := range b.Site.Stages {
		if o.Kind.Val == k.Name {
			n++
		}
	}
	if n == 1 && k.Heading != "" && k.Class != BoardClass && k.Name != "regulated-supply" {
		return k.Heading
	}
	name := capital(s.Name.Val)
	if k.Heading == "" || strings.Contains(strings.ToLower(name), strings.ToLower(k.Heading)) {
		return name
	}
	return name + " " + strings.ToLower(k.Heading)
}

func capital(s string) string {
	r, n := utf8.DecodeRuneInString(s)
	return string(unicode.ToUpper(r)) + s[n:]
}

// Place returns the place of that key, making it on first use with a designation
// of the given letter.
func (b *Build) Place(key, letter, name string) *circuit.Place {
	if p, ok := b.places[key]; ok {
		return p
	}
	n := 1
	for _, p := range b.C.Places {
		if strings.HasPrefix(p.Designation, "+"+letter) {
			n++
		}
	}
	p := &circuit.Place{Key: key, Designation: fmt.Sprintf("+%s%d", letter, n), Name: name}
	b.places[key] = p
	b.C.Places = append(b.C.Places, p)
	return p
}

// Part adds a part of the current stage at the stage's place. Its key is the
// stage's name and local.
func (b *Build) Part(local string, kind circuit.Kind, desc string, pins ...string) *circuit.Part {
	p := &circuit.Part{
		Key: b.key(local), Kind: kind, Stage: b.cur.Name, Place: b.cur.Place,
		Description: desc, At: b.cur.At,
	}
	addPins(p, pins)
	b.C.Parts = append(b.C.Parts, p)
	b.cur.Parts = append(b.cur.Parts, p)
	return p
}

// key is the stable identity of something of the current stage. All blocks of single
// parts share one name, so that a part keeps its label when it moves to another block.
func (b *Build) key(local string) string {
	if strings.HasPrefix(b.cur.Name, partsStage) {
		return partsStage + "/" + local
	}
	return b.cur.Name + "/" + local
}

func addPins(p *circuit.Part, pins []string) {
	for _, n := range pins {
		p.Pins = append(p.Pins, &circuit.Pin{Part: p, Name: n})
	}
}

// Element adds a device model to p. pins alternate model pin and part pin; the
// suffix tells apart several elements of one part.
func (b *Build) Element(p *circuit.Part, suffix, model string, pins ...string) *circuit.Element {
	e := &circuit.Element{ID: suffix, Part: p.Key, Model: model}
	for i := 0; i+1 < len(pins); i += 2 {
		pin := p.Pin(pins[i+1])
		if pin == nil {
			panic("stage: " + p.Key + " has no pin " + pins[i+1])
		}
		e.Pins = append(e.Pins, circuit.ElementPin{Name: pins[i], Pin: pin})
	}
	p.Elements = append(p.Elements, e)
	return e
}

// Join connects pins ideally: a track on a card, a bar, neighbouring pins.
func (b *Build) Join(pins ...*circuit.Pin) {
	for i := 1; i < len(pins); i++ {
		b.C.Joins = append(b.C.Joins, circuit.Join{A: pins[i-1], B: pins[i]})
	}
}

// Wire adds a single wire between two pins.
func (b *Build) Wire(from, to *circuit.Pin, positive bool, length quantity.Metre) *circuit.Conductor {
	c := &circuit.Conductor{
		Key:  from.Part.Key + ":" + from.Name + "~" + to.Part.Key + ":" + to.Name,
		From: from, To: to, Length: length, Positive: positive, At: b.cur.At,
	}
	b.C.Conductors = append(b.C.Conductors, c)
	return c
}

// Cable adds a cable; its cores are added by Core.
func (b *Build) Cable(local string, from, to *circuit.Place, length quantity.Metre) *circuit.Cable {
	w := &circuit.Cable{Key: b.key(local), From: from, To: to, Length: length, At: b.cur.At}
	b.C.Cables = append(b.C.Cables, w)
	return w
}

// Core adds a core of cable w between two pins.
func (b *Build) Core(w *circuit.Cable, from, to *circuit.Pin, positive bool) *circuit.Conductor {
	c := b.Wire(from, to, positive, w.Length)
	c.Cable = w
	c.Circuit = w.Circuit
	w.Cores = append(w.Cores, c)
	return c
}

// Terminal adds one terminal of the strip named by its key: "X1" is the main
// cabinet's. Pins in and out are one net.
func (b *Build) Terminal(strip, local string) *circuit.Part {
	t := b.Part("terminal/"+strip+"/"+local, circuit.Terminal, "Terminal", "in", "out")
	t.Strip = strip
	return t
}

// TestPoint adds a test point of the current stage.
func (b *Build) TestPoint(local, shows string, red *circuit.Pin) *circuit.TestPoint {
	t := &circuit.TestPoint{Key: b.key("tp/" + local), Shows: shows, Red: red, Stage: b.cur.Name}
	b.C.TestPoints = append(b.C.TestPoints, t)
	return t
}

// nameRails gives every source port of the energy's way its rail name: 1L+, 2L+ …
// for those that carry the load, P+ for auxiliary supplies and for signals that
// several things take.
func (b *Build) nameRails(list []*describe.Stage) {
	b.rails[Minus] = &circuit.Rail{Name: "L−"}
	b.C.Rails = append(b.C.Rails, b.rails[Minus])
	main, aux := 0, 0
	for _, s := range list {
		for _, p := range kindOf(s.Kind.Val).Ports {
			if p.Signal && kindOf(s.Kind.Val).Class == BoardClass { // its ways
				continue
			}
			key := s.Name.Val + "." + p.Name
			if p.Sink || p.Signal && (kindOf(s.Kind.Val).Class == BoardClass || b.takers(s, key) < 2) || !p.Signal && !b.used(key) && p.Name != "plus" {
				continue
			}
			var name string
			if p.Auxiliary || p.Signal {
				aux++
				name = "P+"
				if aux > 1 {
					name = fmt.Sprintf("P%d+", aux)
				}
			} else {
				main++
				name = fmt.Sprintf("%dL+", main)
			}
			r := &circuit.Rail{Key: key, Name: name, Positive: true}
			b.rails[key] = r
			b.C.Rails = append(b.C.Rails, r)
		}
	}
}

// used reports whether anything takes from the source port of that key.
func (b *Build) used(key string) bool { return b.takers(nil, key) > 0 }

// takers counts what takes from the source port of that key: stages that name it, and
// the stages that its own stage s feeds, if s is given. Single parts and test points
// count double, for they are drawn at rails only.
func (b *Build) takers(s *describe.Stage, key string) int {
	n := 0
	for _, o := range b.Site.Stages {
		for _, f := range kindOf(o.Kind.Val).Fields {
			if f.Type != describe.StageRef {
				continue
			}
			r, ok := describe.Get[describe.Ref](o.Fields, f.Name)
			if ok && (f.Feeds && o == s || !f.Feeds && b.sourceKey(r.Val) == key) {
				n++
			}
		}
	}
	for _, p := range b.Site.Parts {
		if slices.ContainsFunc(p.Pins, func(x describe.PinNet) bool { return x.Net.Val == key }) {
			n += 2
		}
	}
	for _, t := range b.Site.TestPoints {
		if t.At_.Val == key {
			n += 2
		}
	}
	return n
}

// sourceKey returns "stage.port" of a reference, its first source port by default.
func (b *Build) sourceKey(r describe.Ref) string {
	if r.Port != "" {
		return r.Stage + "." + r.Port
	}
	for _, s := range b.Site.Stages {
		if s.Name.Val != r.Stage {
			continue
		}
		for _, p := range kindOf(s.Kind.Val).Ports {
			if !p.Sink {
				return r.Stage + "." + p.Name
			}
		}
	}
	return r.Stage
}

// Rail returns the rail of a source port key, or nil if it is a signal.
func (b *Build) Rail(key string) *circuit.Rail { return b.rails[key] }

// onRail puts a pin on a rail, in the energy's order.
func (b *Build) onRail(r *circuit.Rail, p *circuit.Pin) { r.Pins = append(r.Pins, p) }

// joinRails makes the wire segments between neighbouring pins of each rail.
func (b *Build) joinRails() {
	for _, r := range b.C.Rails {
		for i := 1; i < len(r.Pins); i++ {
			c := &circuit.Conductor{
				Key:  "rail/" + r.Pins[i-1].Part.Key + "~" + r.Pins[i].Part.Key,
				From: r.Pins[i-1], To: r.Pins[i], Length: bridgeLength, Positive: r.Positive, Rail: r.Name,
			}
			b.C.Conductors = append(b.C.Conductors, c)
		}
	}
}

// feedersOf returns the stages whose Feeds reference names stage name at port.
func (b *Build) feedersOf(name, port string) []*describe.Stage {
	var out []*describe.Stage
	for _, s := range ordered(b.Site) {
		for _, f := range kindOf(s.Kind.Val).Fields {
			if f.Type != describe.StageRef || !f.Feeds {
				continue
			}
			r, ok := describe.Get[describe.Ref](s.Fields, f.Name)
			p := f.Port
			if ok && r.Val.Port != "" {
				p = r.Val.Port
			}
			if ok && r.Val.Stage == name && p == port {
				out = append(out, s)
			}
		}
	}
	return out
}

// ref returns a reference field of s as a source port key.
func (b *Build) ref(s *describe.Stage, field string) (string, bool) {
	r, ok := describe.Get[describe.Ref](s.Fields, field)
	if !ok {
		return "", false
	}
	return b.sourceKey(r.Val), true
}
