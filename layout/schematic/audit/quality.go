package audit

import (
	"math"
	"slices"
	"strings"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// Quality is how well a circuit sheet reads, in numbers, as read from the finished
// strokes. The numbers and their targets follow a list of common practice; where it
// leaves room, the field says how it is taken.
type Quality struct {
	Sheet int
	Board bool // a distribution sheet: lanes of ways under a board's bars

	// Crossings of lines without a joint. Left out are those that the form of a sheet
	// brings: leads over rails and bars, which run the width of the sheet between what
	// hangs on them (OverRails), and on a board's sheet the L+ core of a side run over the
	// L− core of the pair that it leaves (Leaving): three pairs of cores that meet at the
	// two terminals of a luminaire, of which two go down side by side, cannot be drawn
	// without one core passing over its neighbour.
	Crossings int
	OverRails int
	Leaving   int

	// Bends are corners without a joint, over the lines between neighbouring ends: pins,
	// dots, test points, references, and the end of a rail, which its last lead takes.
	// InBranches counts those between pins that face one another, down and up: parts in
	// series in a branch between the rails.
	Lines      int
	Bends      float64
	InBranches int

	// Length of the lines of all nets over the least that joins their pins, test points
	// and references: half the perimeter of their box, which is the least for up to three
	// of them; for more, where no lines are that short, the shortest tree from one to the
	// other (a spanning tree is at most half as long again as the shortest with joints
	// between, Hwang 1976, from memory). Rails and bars are left out: they run the width
	// of what hangs on them, and would hide the rest by their length.
	Length float64

	// Aligned is the share of symbols in line: on the level of another that stands the
	// same way, or in series with another of its stage on one upright. An upright symbol
	// that misses the row of another of its class, in its stage, by less than a symbol's
	// height is not. Counted are those that have a peer on the sheet: one of the same class
	// letter that stands the same way.
	Symbols int
	Aligned float64

	// Flow is the share of the description's references from stage to stage that run
	// from left to right, and to later sheets: those to the stages of this sheet. Without
	// one it is 1.
	Edges int
	Flow  float64

	// Used is the part of the field that the box of the circuit and its tables takes,
	// and Aspect the width of that box over its height, over the same of the field. Rails
	// and leads that go on on another sheet reach the edge wherever the rest stands: their
	// width does not count, nor do notes and title block.
	Used   float64
	Aspect float64

	References int // without those of rails; the two cores of a cable are one

	// Moved is the share of labels, the texts outside tables and notes, that found their
	// first place taken and stand in another. Designations, ratings and most wire numbers
	// have places kept for them.
	Labels int
	Moved  float64

	Texts  int
	Turned float64 // share of turned texts

	// Equal is the share of stages and circuits that are drawn as the first of the same
	// form in the set, of those that have one; without one it is 1.
	Twins int
	Equal float64
}

// Known is what the strokes do not tell: which stage feeds which, and what has the
// same form.
type Known struct {
	Flow  [][2]string       // stage that gives, stage that takes
	Forms map[string]string // of stages and circuits, by the name in their data
}

// Measure returns the numbers of every circuit sheet of a set.
func Measure(sheets []Sheet, k *Known) []Quality {
	var readers []*reader
	for _, s := range sheets {
		if s.Circuit {
			r := newReader(s)
			r.circuit()
			readers = append(readers, r)
		}
	}
	flow := flowOf(readers, k)
	twins := twinsOf(readers, k)
	var out []Quality
	for i, r := range readers {
		q := Quality{Sheet: r.sheet.Number}
		r.count(&q)
		r.lengths(&q)
		r.rows(&q)
		r.field(&q)
		q.Edges, q.Flow = flow[i].all, flow[i].share()
		q.Twins, q.Equal = twins[i].all, twins[i].share()
		out = append(out, q)
	}
	return out
}

// tally counts how many of all are as they should be.
type tally struct{ good, all int }

func (t tally) share() float64 {
	if t.all == 0 {
		return 1
	}
	return float64(t.good) / float64(t.all)
}

// minusApart is how far the L− core of a pair stands right of its L+ core, mm.
const minusApart = 6 * module

// count counts crossings, bends, references and texts.
func (r *reader) count(q *Quality) {
	for _, g := range r.page.Groups {
		q.Board = q.Board || g.Class == "guide"
	}
	for _, p := range r.crossed {
		switch {
		case r.rail(p):
			q.OverRails++
		case q.Board && r.leaves(p):
			q.Leaving++
		default:
			q.Crossings++
		}
	}
	g := r.graph()
	q.Lines = g.lines
	if g.lines > 0 {
		q.Bends = float64(g.bends) / float64(g.lines)
	}
	q.InBranches = g.inBranches
	seen := map[*Group]bool{}
	for _, x := range r.refs {
		if !r.rail(x.x.at) && !seen[x.x.group] {
			q.References++
		}
		seen[x.x.group] = true
	}
	turned := 0
	for _, t := range r.page.Texts {
		if !t.Group.In("frame") && !t.Group.In("title-block") {
			q.Texts++
			if !t.Group.In("table") && !t.Group.In("notes") && !t.Group.In("scale") {
				q.Labels++
			}
			if t.Turn {
				turned++
			}
		}
	}
	if q.Labels > 0 {
		q.Moved = float64(r.sheet.Moved) / float64(q.Labels)
	}
	if q.Texts > 0 {
		q.Turned = float64(turned) / float64(q.Texts)
	}
}

// rail reports whether a rail or bar runs through p.
func (r *reader) rail(p ink.Point) bool {
	return slices.ContainsFunc(r.lines, func(l segment) bool { return l.on(p) && r.ofRail(l) })
}

func (r *reader) ofRail(l segment) bool {
	return !l.lead && r.page.Strokes[l.stroke].Group.In("rail")
}

// leaves reports whether at p a level line that begins with a joint on the left core
// of a pair passes over the pair's right core.
func (r *reader) leaves(p ink.Point) bool {
	for _, d := range r.dots {
		if same(d.at.X, p.X-minusApart) && same(d.at.Y, p.Y) {
			return slices.ContainsFunc(r.lines, func(l segment) bool { return l.on(p) && l.ends(d.at) })
		}
	}
	return false
}

// lengths compares the length of every net's lines with the least that joins its ends.
func (r *reader) lengths(q *Quality) {
	ends := map[int][]ink.Point{}
	add := func(p ink.Point) {
		root := r.root(r.node(p))
		ends[root] = append(ends[root], p)
	}
	for _, x := range r.symbols {
		for _, p := range x.pins {
			add(p.at)
		}
	}
	for _, p := range r.probes {
		add(p.at)
	}
	rails := map[int]bool{}
	for _, l := range r.lines {
		if r.ofRail(l) {
			rails[r.root(r.node(l.a))] = true
		}
	}
	length, drawn := 0.0, map[int]bool{}
	for _, l := range r.lines {
		if root := r.root(r.node(l.a)); (!l.lead || r.inner[l.stroke]) && !rails[root] {
			length += math.Abs(l.a.X-l.z.X) + math.Abs(l.a.Y-l.z.Y)
			drawn[root] = true
		}
	}
	least := 0.0
	for root := range drawn {
		least += math.Round(shortest(ends[root]) / module) // whole, so that their order does not matter
	}
	q.Length = 1
	if least > 0 {
		q.Length = length / module / least
	}
}

// shortest is the least length, or nearly so, of level and upright lines that join the
// ends.
func shortest(ends []ink.Point) float64 {
	if len(ends) == 0 {
		return 0
	}
	if len(ends) <= 3 {
		b := ink.Rect{X: ends[0].X, Y: ends[0].Y}
		for _, p := range ends {
			b = join(b, p)
		}
		return b.W + b.H
	}
	far := func(a, b ink.Point) float64 { return math.Abs(a.X-b.X) + math.Abs(a.Y-b.Y) }
	sum := 0.0
	away := make([]float64, len(ends)) // from the tree so far
	for i := range ends {
		away[i] = far(ends[0], ends[i])
	}
	for range ends[1:] { // Prim 1957
		next := -1
		for i, d := range away {
			if d >= 0 && i > 0 && (next < 0 || d < away[next]) {
				next = i
			}
		}
		sum += away[next]
		for i := range ends {
			if away[i] >= 0 {
				away[i] = min(away[i], far(ends[next], ends[i]))
			}
		}
		away[next] = -1
	}
	return sum
}

// symbolHeight is the height of a resistor with its leads, mm: rows are no nearer.
const symbolHeight = 4 * module

// rows finds the symbols that stand in line.
func (r *reader) rows(q *Quality) {
	type stood struct {
		at           spot
		up           bool
		class, block string
	}
	var list []stood
	for _, x := range r.symbols {
		if x.group == nil || x.sym == &symbols.ReferenceLeaving || x.sym == &symbols.ReferenceArriving ||
			!x.group.In("part") && !x.group.In("terminal") || x.sym != nil && x.onlyInside(r) {
			continue
		}
		list = append(list, stood{spotOf(x.at), x.upright(), letters(x.group.Get("part")), r.blockAt(x.at)})
	}
	aligned := 0
	for i, a := range list {
		in, miss, peer := false, false, false
		for j, b := range list {
			if i == j {
				continue
			}
			dx, dy := math.Abs(float64(a.at.x-b.at.x))/50, math.Abs(float64(a.at.y-b.at.y))/50
			peer = peer || a.up == b.up && a.class == b.class
			in = in || dy == 0 && a.up == b.up || dx == 0
			miss = miss || a.up && b.up && a.class == b.class && a.block == b.block && dx > 0 && dy > 0 && dy < symbolHeight-near
		}
		if !peer {
			continue
		}
		q.Symbols++
		if in && !miss {
			aligned++
		}
	}
	q.Aligned = 1
	if q.Symbols > 0 {
		q.Aligned = float64(aligned) / float64(q.Symbols)
	}
}

// upright reports whether the symbol's pins are over and under it.
func (x *instance) upright() bool {
	for _, p := range x.pins {
		if p.dir.X != 0 {
			return false
		}
	}
	return true
}

// letters are the class letters of a designation: "R" of "-R10".
func letters(s string) string {
	i, j := 0, 0
	for i < len(s) && (s[i] < 'A' || s[i] > 'Z') {
		i++
	}
	for j = i; j < len(s) && s[j] >= 'A' && s[j] <= 'Z'; j++ {
	}
	return s[i:j]
}

// blockAt names the stage whose frame is around p, "" outside of all.
func (r *reader) blockAt(p ink.Point) string {
	for _, name := range r.frameNames() {
		if inside(p, r.frames()[name]) {
			return name
		}
	}
	return ""
}

func (r *reader) frameNames() []string {
	var out []string
	for n := range r.frames() {
		out = append(out, n)
	}
	slices.Sort(out)
	return out
}

// frames are the stages' frames and the boards', by name.
func (r *reader) frames() map[string]ink.Rect {
	if r.framed != nil {
		return r.framed
	}
	r.framed = map[string]ink.Rect{}
	for _, s := range r.page.Strokes {
		if s.Group == nil || s.Group.Class != "boundary" || len(s.Path.Points) == 0 {
			continue
		}
		name := s.Group.Get("stage")
		if name == "" {
			name = s.Group.Get("board")
		}
		if name == "" || strings.HasPrefix(s.Group.ID, "mains-") {
			continue
		}
		for _, p := range s.Path.Points {
			if b, ok := r.framed[name]; ok {
				r.framed[name] = join(b, p)
			} else {
				r.framed[name] = ink.Rect{X: p.X, Y: p.Y}
			}
		}
	}
	return r.framed
}

// edge keeps circuit ink clear of frame and title block, mm (common practice).
const edge = 5

// field measures how much of the sheet the circuit takes.
func (r *reader) field(q *Quality) {
	f := r.sheet.Format.Frame()
	field := ink.Rect{X: f.X + edge, Y: f.Y + edge, W: f.W - 2*edge, H: f.H - 2*edge - r.sheet.Format.TitleBlock().H}
	var b ink.Rect
	first := true
	add := func(p ink.Point) {
		if first {
			b, first = ink.Rect{X: p.X, Y: p.Y}, false
		}
		b = join(b, p)
	}
	addBox := func(x ink.Rect) {
		add(ink.Point{X: x.X, Y: x.Y})
		add(ink.Point{X: x.X + x.W, Y: x.Y + x.H})
	}
	for i := range r.page.Strokes {
		s := &r.page.Strokes[i]
		g := s.Group
		switch {
		case len(s.Path.Points) == 0 || g.In("frame") || g.In("title-block") || g.In("notes") || g.In("scale") || g.In("reference"):
		case g.In("rail") || g.In("wire") || g.In("junction"):
		default:
			addBox(s.Path.Bounds())
		}
	}
	for _, t := range r.page.Texts {
		g := t.Group
		if !g.In("frame") && !g.In("title-block") && !g.In("notes") && !g.In("scale") && !g.In("reference") && !g.In("rail") && !g.In("wire") {
			addBox(t.Box)
		}
	}
	top, bottom := b.Y, b.Y+b.H
	for _, l := range r.lines { // rails count with their height
		top, bottom = math.Min(top, math.Min(l.a.Y, l.z.Y)), math.Max(bottom, math.Max(l.a.Y, l.z.Y))
	}
	b.Y, b.H = top, bottom-top
	q.Used = b.W * b.H / (field.W * field.H)
	if b.H > 0 {
		q.Aspect = b.W / b.H / (field.W / field.H)
	}
}

func join(b ink.Rect, p ink.Point) ink.Rect {
	x0, y0 := math.Min(b.X, p.X), math.Min(b.Y, p.Y)
	x1, y1 := math.Max(b.X+b.W, p.X), math.Max(b.Y+b.H, p.Y)
	return ink.Rect{X: x0, Y: y0, W: x1 - x0, H: y1 - y0}
}
