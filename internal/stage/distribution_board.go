package stage

import (
	"fmt"
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// distributionBoard holds the fused ways. It feeds lighting circuits and further
// boards.
func distributionBoard() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "distribution-board",
			Doc:  "Board of fused ways: feeds lighting circuits, or another board through a fused feeder.",
			Ports: []describe.Port{
				{Name: "ways", Doc: "the fused ways; another board can hang on one", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage or board that feeds it."},
				describe.Field{Name: "ways", Type: describe.Count, Default: "8", Min: "1", Max: "60", Doc: "Number of fused ways."},
				describe.Field{Name: "along", Type: describe.Length, Min: "0.1 m", Max: "2000 m", Doc: "Length of the feeder cable, for a board fed by another board."},
				describe.Field{Name: "cable", Type: describe.Size, Doc: "Size of the feeder cable; without it sized."},
				describe.Field{Name: "fuse", Type: describe.Current, Min: "0.1 A", Max: "100 A", Doc: "Feeder fuse; without it sized."},
				describe.Field{Name: "way", Type: describe.Count, Min: "1", Max: "60", Doc: "Way of the feeding board that it hangs on; without it the first free one after the circuits."},
			),
		},
		Class: BoardClass, Rank: 9, Heading: "Board",
		Expand: expandBoard,
		Steps:  []Step{{Cables, sizeBoard}},
	}
}

// boardOf returns the board of a stage name, making it on first use.
func (b *Build) boardOf(name string) *circuit.Board {
	if bd := b.boards[name]; bd != nil {
		return bd
	}
	bd := &circuit.Board{Name: name}
	b.boards[name] = bd
	return bd
}

// childBoards returns the boards fed by board name, in canonical order.
func (b *Build) childBoards(name string) []*describe.Stage {
	var out []*describe.Stage
	for _, s := range ordered(b.Site) {
		if s.Kind.Val != "distribution-board" {
			continue
		}
		if r, ok := describe.Get[describe.Ref](s.Fields, "from"); ok && r.Val.Stage == name {
			out = append(out, s)
		}
	}
	return out
}

func expandBoard(b *Build, s *describe.Stage) {
	bd := b.boardOf(s.Name.Val)
	bd.Title, bd.At, bd.Number = b.cur.Heading, s.Name.Pos, len(b.C.Boards)+1
	b.C.Boards = append(b.C.Boards, bd)
	if bd.Parent != nil {
		b.cur.Place = b.Place(s.Name.Val, "A", Text(s, "place", b.cur.Heading))
	} else if t := Text(s, "place", ""); t != "" {
		b.cur.Place = b.Place(s.Name.Val, "A", t)
	}
	bd.Place = b.cur.Place
	n := must[int](s, "ways")
	pins := []string{"in"}
	for i := 1; i <= n; i++ {
		pins = append(pins, strconv.Itoa(i))
	}
	bd.Plus = b.Part("bar+", circuit.BusBar, "Bar L+", pins...)
	bd.Minus = b.Part("bar-", circuit.BusBar, "Bar L−", pins...)
	b.Join(bd.Plus.Pins...)
	b.Join(bd.Minus.Pins...)

	if bd.Parent == nil {
		from, _ := b.ref(s, "from")
		r := b.rails[from]
		b.onRail(r, bd.Plus.Pin("in"))
		b.onRail(b.rails[Minus], bd.Minus.Pin("in"))
		bd.Rail = r.Name
	} else {
		b.feeder(bd, s)
	}
	bd.TestPoint = b.TestPoint("bar", bd.Title+" bar", bd.Plus.Pin("in"))
	bd.TestPoint.Black = bd.Minus.Pin("in")
	bd.TestPoint.Stage = ""
	b.ways(bd, s, n)
}

// feeder joins a board to the way of the board that feeds it.
func (b *Build) feeder(bd *circuit.Board, s *describe.Stage) {
	bd.InPlus = b.Terminal(s.Name.Val, "in+")
	bd.InMinus = b.Terminal(s.Name.Val, "in-")
	n := must[int](s, "ways")
	bd.InPlus.Order, bd.InMinus.Order = 2*n+1, 2*n+2
	along := boardLead
	if v, ok := describe.Get[quantity.Metre](s.Fields, "along"); ok {
		along = v.Val
	}
	w := b.Cable("feeder", bd.Parent.Board.Place, bd.Place, along)
	pin, _ := describe.Get[quantity.WireSize](s.Fields, "cable")
	w.Pinned = pin.Given
	b.Core(w, bd.Parent.TermPlus.Pin("out"), bd.InPlus.Pin("out"), true)
	b.Core(w, bd.Parent.TermMinus.Pin("out"), bd.InMinus.Pin("out"), false)
	bd.Feeder = w
	name := 0
	for _, r := range b.C.Rails {
		if r.Positive && len(r.Name) > 2 && r.Name[len(r.Name)-2:] == "L+" {
			name++
		}
	}
	r := &circuit.Rail{Key: s.Name.Val + ".feeder", Name: fmt.Sprintf("%dL+", name+1), Positive: true}
	b.C.Rails = append(b.C.Rails, r)
	b.onRail(r, bd.InPlus.Pin("in"))
	b.onRail(r, bd.Plus.Pin("in"))
	bd.Rail = r.Name
	m := &circuit.Rail{Name: "L−"}
	b.C.Rails = append(b.C.Rails, m)
	b.onRail(m, bd.InMinus.Pin("in"))
	b.onRail(m, bd.Minus.Pin("in"))
}

// ways makes the fused ways of a board: pinned ways first, then circuits in the
// order of the description, then feeders, then spares.
func (b *Build) ways(bd *circuit.Board, s *describe.Stage, n int) {
	byNumber := make([]*circuit.Way, n+1)
	take := func(pin int) *circuit.Way {
		if pin == 0 {
			for pin = 1; pin <= n && byNumber[pin] != nil; pin++ {
			}
		}
		if pin > n {
			panic("stage: board " + bd.Name + " has too few ways; the decoder must refuse it")
		}
		w := &circuit.Way{Board: bd, Number: pin}
		byNumber[pin] = w
		return w
	}
	lights := map[*circuit.Way]*describe.Circuit{}
	children := b.childBoards(bd.Name)
	for _, pass := range []bool{true, false} { // pinned ways first
		for _, c := range b.Site.Circuits {
			if c.Board.Val == bd.Name && (c.Way.Val > 0) == pass {
				lights[take(c.Way.Val)] = c
			}
		}
		for _, c := range children {
			v, _ := describe.Get[int](c.Fields, "way")
			if (v.Val > 0) != pass {
				continue
			}
			w := take(v.Val)
			w.Feeds = b.boardOf(c.Name.Val)
			w.Feeds.Parent = w
		}
	}
	for i := 1; i <= n; i++ {
		w := byNumber[i]
		if w == nil {
			w = take(i)
		}
		key := strconv.Itoa(i)
		w.Fuse = b.Part("way/"+key+"/fuse", circuit.Fuse, "Way fuse", "1", "2")
		b.Element(w.Fuse, "", "fuse", "1", "1", "2", "2")
		b.Join(bd.Plus.Pin(key), w.Fuse.Pin("1"))
		w.TermPlus = b.Terminal(s.Name.Val, key+"+")
		w.TermMinus = b.Terminal(s.Name.Val, key+"-")
		w.TermPlus.Order, w.TermMinus.Order = 2*i-1, 2*i
		w.WirePlus = b.Wire(w.Fuse.Pin("2"), w.TermPlus.Pin("in"), true, boardLead)
		w.WireMinus = b.Wire(bd.Minus.Pin(key), w.TermMinus.Pin("in"), false, boardLead)
		bd.Ways = append(bd.Ways, w)
		if c := lights[w]; c != nil {
			b.lighting(w, c)
		}
	}
}

// lighting expands one circuit: its legs and luminaires.
func (b *Build) lighting(w *circuit.Way, c *describe.Circuit) {
	l := &circuit.Lighting{Name: c.Name.Val, Lit: c.Lit.Val, Way: w, At: c.Name.Pos}
	w.Lighting = l
	w.Fuse.Circuit, w.WirePlus.Circuit, w.WireMinus.Circuit = l.Name, l.Name, l.Name
	w.Fuse.At = c.Name.Pos
	names := map[*describe.Leg]string{}
	for _, n := range c.NamedLegs() {
		names[n.Leg] = n.Name
	}
	var last *circuit.Part
	var run func(legs []*describe.Leg, plus, minus *circuit.Pin) []*circuit.Point
	run = func(legs []*describe.Leg, plus, minus *circuit.Pin) []*circuit.Point {
		var out []*circuit.Point
		for _, leg := range legs {
			name := names[leg]
			p := b.luminaire(l, leg, "circuit/"+l.Name+"/"+name)
			cable := &circuit.Cable{Key: "circuit/" + l.Name + "/leg/" + name, Length: leg.Length.Val,
				Circuit: l.Name, Pinned: leg.Cable.Given || c.Cable.Given, At: leg.Pos}
			if plus.Part.Kind == circuit.Terminal {
				cable.From = w.Board.Place
			}
			b.C.Cables = append(b.C.Cables, cable)
			b.Core(cable, plus, p.Pin("+"), true)
			b.Core(cable, minus, p.Pin("-"), false)
			pt := &circuit.Point{Luminaire: p, Type: leg.Luminaire.Val, Place: leg.Place.Val, Leg: cable}
			out = append(out, pt)
			last = p
			for _, br := range leg.Branches {
				pt.Branches = append(pt.Branches, run(br, p.Pin("+"), p.Pin("-")))
			}
			plus, minus = p.Pin("+"), p.Pin("-")
		}
		return out
	}
	l.Points = run(c.Points, w.TermPlus.Pin("out"), w.TermMinus.Pin("out"))
	tp := &circuit.TestPoint{Key: "circuit/" + l.Name + "/end", Shows: l.Name + ", end", Red: last.Pin("+"), Black: last.Pin("-")}
	b.C.TestPoints = append(b.C.TestPoints, tp)
	l.TestPoint = tp
}

func (b *Build) luminaire(l *circuit.Lighting, leg *describe.Leg, key string) *circuit.Part {
	p := &circuit.Part{Key: key, Kind: circuit.LuminaireLamp, Circuit: l.Name, At: leg.Pos}
	addPins(p, []string{"+", "-"})
	for _, t := range b.Site.Luminaires {
		if t.Name.Val == leg.Luminaire.Val {
			p.Description = "Luminaire " + t.Name.Val
			luminaireKindOf(t.Kind.Val).Build(b, p)
		}
	}
	b.C.Parts = append(b.C.Parts, p)
	return p
}
