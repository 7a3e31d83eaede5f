package schematic

import (
	"math"
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/stage"
)

// Rows of a supply sheet, in modules.
const (
	rowRail       = 11 // L+
	rowRingUpper  = 13
	rowHeading    = 16.1
	rowFrameTop   = 17
	rowFrameEnd   = 61
	rowRingLower  = 64
	rowDropNumber = 26 // wire number at a lead that comes down in a gap
	rowMinus      = 67
	rowTables     = 75
)

// rowsTwo and rowsThree are the rows of plus rails where two suffice and where three
// are needed. Rails that carry the load begin at the first, auxiliary ones at the
// second.
var (
	rowsTwo   = []int{11, 8}
	rowsThree = []int{11, 9, 7}
)

// rowsLow are the rows below L− for leads between stages that are no neighbours.
var rowsLow = []int{70, 72}

// overLine is how far a text stands over its line, overTight over one with another
// two rows above; there the text keeps clear of the arrow as well.
const (
	overLine  = 0.8
	overTight = 0.6
)

// Columns of a supply sheet.
const (
	colFirst   = 11  // left edge of the first thing
	colFrame   = 12  // left edge of a first frame with nothing before it
	colArrive  = 11  // arriving references end here
	colLeave   = 160 // leaving references begin here
	colLast    = 152 // right edge of the last frame
	colText    = 10  // left edge of tables, notes and arriving texts
	colEnd     = 162
	stripWidth = 11 // from a mains frame's left edge to its stage
	gapPlain   = 4
	gapTrack   = 4 // between leads in one gap
	gapFirst   = 3 // from the nearest lead in a gap to the frame
)

// stageBox is a stage on its way to a sheet.
type stageBox struct {
	st       *circuit.Stage
	class    stage.Class
	mains    bool
	ownLead  bool // the sketch brings a lead in the gap on its left
	links    []*link
	drops    []*drop
	readings int
	head     float64 // where the heading begins, from the frame's left edge
	headOver int     // how far it reaches beyond the frame
	headText string
	headSize style
}

// longHeading is the most room that a heading takes, in modules.
const longHeading = 24.0

// placeHeading finds where the heading stands clear of the leads that pass it: left
// of the first, else between two, else right of the last, where it may reach beyond
// the frame and pushes the next stage away.
func (x *stageBox) placeHeading() {
	x.headText, x.headSize = x.st.Heading, headStyle
	if width(x.headText, headStyle) > longHeading {
		x.headSize = nameStyle
		x.headText = fit(x.headText, nameStyle, longHeading)
	}
	w := width(x.headText, x.headSize)
	var posts []float64
	for _, l := range x.leads() {
		if !l.term.Lower && l.x >= 0 {
			posts = append(posts, float64(l.x))
		}
	}
	slices.Sort(posts)
	const clear = 0.6
	at := 0.0
	for _, p := range posts {
		if at+w+clear <= p {
			break
		}
		at = p + clear
	}
	x.head = at
	x.headOver = max(0, int(math.Ceil(at+w+0.5))-x.st.Sketch.Width-2)
}

// link joins a right port of one stage to a left port of another.
type link struct {
	from, to   *stageBox
	fromY, toY int // levels, below the L+ rail
	wire       *circuit.Conductor
	cable      *circuit.Cable
	key        string
}

// drop is a left port that is fed from a rail: the lead comes down in the gap.
type drop struct {
	y    int
	term *circuit.Part
	wire *circuit.Conductor
}

// classOf returns the sheet class of a stage kind.
func classOf(kind string) stage.Class {
	for _, k := range stage.Kinds() {
		if k.Name == kind {
			return k.Class
		}
	}
	return stage.ControlClass
}

// boxes prepares every stage that has a sketch, in the energy's order.
func (b *book) boxes() []*stageBox {
	var out []*stageBox
	byName := map[string]*stageBox{}
	for _, st := range b.c.Stages {
		if st.Sketch == nil {
			continue
		}
		x := &stageBox{st: st, class: classOf(st.Kind)}
		for _, it := range st.Sketch.Items {
			switch it.Op {
			case circuit.OpMains:
				x.mains = true
			case circuit.OpIn, circuit.OpUp:
				for _, p := range it.Pts {
					x.ownLead = x.ownLead || p[0] < 0
				}
			case circuit.OpPoint:
				x.readings++
			}
		}
		x.placeHeading()
		out = append(out, x)
		byName[st.Name] = x
	}
	b.linkBoxes(out, byName)
	return out
}

// linkBoxes pairs the ports: a left port that no rail feeds takes the right port of
// the stage at the other end of its wire.
func (b *book) linkBoxes(boxes []*stageBox, byName map[string]*stageBox) {
	taken := map[*circuit.SketchItem]bool{}
	for _, to := range boxes {
		items := to.st.Sketch.Items
		for i := range items {
			l := &items[i]
			if l.Op != circuit.OpLeft {
				continue
			}
			if l.Part != nil && l.Rail != "" {
				to.drops = append(to.drops, &drop{y: int(l.Y), term: l.Part, wire: l.Wire})
				continue
			}
			from, r := matchPort(boxes, byName, to, l, taken)
			if r == nil {
				continue
			}
			taken[r] = true
			k := &link{from: from, to: to, fromY: int(r.Y), toY: int(l.Y), wire: l.Wire, cable: l.Cable,
				key: from.st.Name + "." + r.Name + "-" + to.st.Name + "." + l.Name}
			from.links = append(from.links, k)
			to.links = append(to.links, k)
		}
	}
}

func matchPort(boxes []*stageBox, byName map[string]*stageBox, to *stageBox, l *circuit.SketchItem, taken map[*circuit.SketchItem]bool) (*stageBox, *circuit.SketchItem) {
	rights := func(x *stageBox, ok func(r *circuit.SketchItem) bool) *circuit.SketchItem {
		for i := range x.st.Sketch.Items {
			r := &x.st.Sketch.Items[i]
			if r.Op == circuit.OpRight && !taken[r] && ok(r) {
				return r
			}
		}
		return nil
	}
	for _, x := range boxes {
		if r := rights(x, func(r *circuit.SketchItem) bool { return r.Wire != nil && r.Wire == l.Wire }); r != nil && x != to {
			return x, r
		}
	}
	if l.Wire != nil {
		for _, p := range []*circuit.Pin{l.Wire.From, l.Wire.To} {
			x := byName[p.Part.Stage]
			if x == nil || x == to {
				continue
			}
			if r := rights(x, func(r *circuit.SketchItem) bool { return r.Wire == nil && r.Name == l.Name }); r != nil {
				return x, r
			}
			if r := rights(x, func(r *circuit.SketchItem) bool { return r.Wire == nil }); r != nil {
				return x, r
			}
		}
	}
	return nil, nil
}

// leads returns the terminals by which the stage hangs on rails, with their local x.
func (x *stageBox) leads() []lead {
	var out []lead
	for _, it := range x.st.Sketch.Items {
		if len(it.Pts) == 0 || it.Part == nil {
			continue
		}
		switch it.Op {
		case circuit.OpUp, circuit.OpDown:
			out = append(out, lead{it.Part, it.Pts[len(it.Pts)-1][0]})
		case circuit.OpIn:
			out = append(out, lead{it.Part, it.Pts[0][0]})
		}
	}
	return out
}

// lead is a terminal that leads to a rail, and its place along the sheet.
type lead struct {
	term *circuit.Part
	x    int
}
