package schematic

import (
	"fmt"
	"slices"

	"gloamwright/internal/circuit"
)

// The kinds of a board's columns.
type columnKind uint8

const (
	lightingColumn columnKind = iota
	feederColumn
	spareColumn
	restColumn // a circuit that goes on from another sheet
)

// Widths of columns and places in them, from the L+ core, in modules.
const (
	laneWidth    = 18
	foldWidth    = 22 // a further ladder of a folded run
	feederWidth  = 16
	spareWidth   = 10
	spareLong    = 14 // of a spare way with a number of two figures
	minusCore    = 6  // the L− core of a ladder stands right of its L+ core
	spareMinus   = 3
	legText      = 7.1 // texts right of a ladder
	lampText     = 6.7
	lampRoom     = 9.9
	branchLength = 12.0 // where the length of a branch's first leg stands
	branchOval   = 8.5
	combReach    = 2 // of the cores of a comb behind its last run, to the reference
	sideApart    = 2 // between the level cores of a side run
)

// Rows of a board sheet.
const (
	rowBarPlus   = 11
	rowBarMinus  = 13
	rowFuse      = 17
	rowTerminal  = 22
	rowCable     = 26
	rowLamp      = 31
	rowPitch     = 5
	rowFoldMinus = 27 // folded cores run level up there
	rowFoldPlus  = 29
	rowCombPlus  = 27 // those of a comb: L+ is the upper one
	rowCombMinus = 29
	rowRest      = 24 // cores that come from another sheet begin here
	rowsA3       = 12
	rowsTabloid  = 10
)

func lampRow(r int) int { return rowLamp + rowPitch*r }

// column is one way of a board, or the rest of one, with everything that hangs on
// it. Places are relative to its L+ core.
type column struct {
	kind   columnKind
	way    *circuit.Way
	before *column // for a rest: where it comes from
	key    string  // for a rest: of the reference by which its cores come
	name   string  // for a rest: what its cores are called there
	width  int
	minus  int // place of the L− core

	rungs   []rung
	cores   []corePiece
	ovals   []columnOval
	lengths []columnLength
	cuts    []cut
	rests   []rest
	far     *rung // the luminaire that the far-end test point is at
}

// rung is a luminaire between its cores.
type rung struct {
	point *circuit.Point
	x, y  int
	end   bool // last of its run
}

// corePiece is one core of a leg.
type corePiece struct {
	c   *circuit.Conductor
	pts []node
}

// columnOval is a cable's mark on both cores.
type columnOval struct {
	cable   *circuit.Cable
	x       int // of the L+ core
	y       float64
	upright bool
}

// columnLength is the length of a leg, written between its cores.
type columnLength struct {
	cable *circuit.Cable
	at    point
}

// cut is a place where both cores of a leg, or those that pass a luminaire, go on to
// another sheet.
type cut struct {
	cable       *circuit.Cable
	key, name   string // of the reference
	plus, minus node
	turn        byte
	comb        bool // the cores pass a luminaire
}

// rest is what hangs behind a cut: a run, or the runs that hang on a luminaire which
// has more of them than a sheet has rows.
type rest struct {
	key, name string
	points    []*circuit.Point
	node      *circuit.Point
	runs      [][]*circuit.Point // on the node
}

// cores returns the plus and the minus core of a two-core cable.
func cores(c *circuit.Cable) (plus, minus *circuit.Conductor) {
	for _, k := range c.Cores {
		if k.Positive {
			plus = k
		} else {
			minus = k
		}
	}
	return plus, minus
}

// runner lays the runs of one circuit into rows and lanes.
type runner struct {
	c     *column
	rows  int
	lanes int   // lanes that a column may have at most
	free  []int // last used row by lane, -1 for none
	wide  int   // lanes in use
	far   *circuit.Part
}

// lightingWay lays out the points of a circuit, or of the rest of one, below a
// column's head. The cores begin at row top.
func lightingWay(c *column, what rest, l *circuit.Lighting, rows, room, top int) {
	r := &runner{c: c, rows: rows, lanes: room / laneWidth, wide: 1}
	if l.TestPoint != nil {
		r.far = l.TestPoint.Red.Part
	}
	for range r.lanes + 1 {
		r.free = append(r.free, -1)
	}
	c.minus, c.key, c.name = minusCore, what.key, what.name
	plus, minus := []node{{0, top}}, []node{{minusCore, top}}
	if what.node != nil {
		r.comb(what.node, what.runs, plus, minus)
		c.width = laneWidth * r.wide
		return
	}
	points := what.points
	c.ovals = append(c.ovals, columnOval{points[0].Leg, 0, rowCable, false})
	if !branches(points) && rungRows(points) > rows {
		r.fold(points, plus, minus, (room-laneWidth)/foldWidth+1)
		return
	}
	r.run(points, 0, 0, plus, minus, false)
	c.width = laneWidth * r.wide
}

func branches(points []*circuit.Point) bool {
	for _, p := range points {
		if len(p.Branches) > 0 {
			return true
		}
	}
	return false
}

// rungRows counts the rows of a run without branches.
func rungRows(points []*circuit.Point) int {
	n := len(points)
	for i := 1; i < len(points); i++ {
		if points[i].Leg.Size != points[i-1].Leg.Size {
			n++
		}
	}
	return n
}

// run lays a run into lane from row r on; plus and minus are the ways of the first
// leg's cores so far. For a side run the length of the first leg is already written.
// It returns the last row used.
func (r *runner) run(points []*circuit.Point, row, lane int, plus, minus []node, side bool) int {
	x := lane * laneWidth
	r.wide = max(r.wide, lane+1)
	last := r.rows - 1
	used := row - 1
	for i, p := range points {
		next := 0
		if i+1 < len(points) {
			next = 1
		}
		at := row
		newSize := i > 0 && p.Leg.Size != points[i-1].Leg.Size
		if newSize {
			at++
		}
		after := len(p.Branches) + next
		many := 1+after > r.rows // no sheet has rows for them: they hang on a comb of their own
		if many {
			after = 1
		}
		if !many && len(p.Branches) > 0 && lane+1 < r.lanes {
			if wait := max(at, r.free[lane+1]); wait+after <= last {
				at = wait
			}
		}
		if at+after > last {
			r.cutDown(points[i:], row, x, plus, minus)
			r.free[lane] = row
			return row
		}
		y := lampRow(at)
		if newSize {
			r.c.ovals = append(r.c.ovals, columnOval{p.Leg, x, float64(lampRow(at-1)) - 0.5, false})
		}
		r.rung(p, x, y, plus, minus, i == len(points)-1)
		if !side || i > 0 {
			r.length(p.Leg, float64(x)+minusCore/2, float64(y)-2)
		}
		used = at
		if r.c.far != nil && r.c.far.point == p {
			used++
		}
		row = at + 1
		if many {
			runs := slices.Clone(p.Branches)
			if next > 0 {
				runs = append(runs, points[i+1:])
			}
			end := lampRow(row) - 1
			r.cutNode(p, runs, []node{{x, y}, {x, end}}, []node{{x + minusCore, y}, {x + minusCore, end}}, 'S')
			r.free[lane] = row
			return row
		}
		for k, b := range p.Branches {
			row = r.branch(p, b, row, lane, y, len(p.Branches)-k-1+next, k == len(p.Branches)-1 && next == 0)
			used = row - 1
		}
		plus, minus = []node{{x, y}}, []node{{x + minusCore, y}}
	}
	r.free[lane] = used
	return used
}

// branch lays a side run of p, whose rung is at y, at row or below, and returns the
// next row of the parent's run. The cores of the last branch of a last luminaire
// begin at its rung, the others on the passing cores. The L+ core runs level into the
// first luminaire, the L− core sideApart above it.
func (r *runner) branch(p *circuit.Point, b []*circuit.Point, row, lane, y, after int, ends bool) int {
	x := lane * laneWidth
	side := false
	if lane+1 < r.lanes {
		at := max(row, r.free[lane+1]+1)
		if side = at <= r.rows-1 && at+after <= r.rows-1; side {
			row = at
		}
	}
	yb := lampRow(row)
	plus, minus := []node{{x, yb}}, []node{{x + minusCore, yb - sideApart}}
	if ends {
		plus, minus = []node{{x, y}, {x, yb}}, []node{{x + minusCore, y}, {x + minusCore, yb - sideApart}}
	}
	leg := b[0].Leg
	if !side {
		to := x + minusCore + 1
		plus, minus = append(plus, node{to, yb}), append(minus, node{to, yb - sideApart})
		r.cut(b, plus, minus, 'E')
		return row + 1
	}
	to := x + laneWidth
	plus, minus = append(plus, node{to, yb}), append(minus, node{to + minusCore, yb - sideApart})
	if leg.Size != p.Leg.Size {
		r.c.ovals = append(r.c.ovals, columnOval{leg, x, float64(yb) - sideApart/2, true})
	}
	r.length(leg, float64(x)+branchLength, float64(yb)-sideApart/2+textHeight/2)
	r.run(b, row, lane+1, plus, minus, true)
	return row + 1
}

// rung draws a luminaire and the leg that feeds it.
func (r *runner) rung(p *circuit.Point, x, y int, plus, minus []node, end bool) {
	cp, cm := cores(p.Leg)
	r.c.cores = append(r.c.cores,
		corePiece{cp, append(plus, node{x, y}, node{x + 1, y})},
		corePiece{cm, append(minus, node{x + minusCore, y}, node{x + minusCore - 1, y})})
	r.c.rungs = append(r.c.rungs, rung{p, x, y, end})
	if p.Luminaire == r.far {
		r.c.far = &rung{p, x, y, end && len(p.Branches) == 0}
	}
}

func (r *runner) length(c *circuit.Cable, x, y float64) {
	r.c.lengths = append(r.c.lengths, columnLength{c, point{x, y}})
}

// cutDown ends the cores at a row; what is left goes on elsewhere.
func (r *runner) cutDown(points []*circuit.Point, row, x int, plus, minus []node) {
	y := lampRow(row)
	r.cut(points, append(plus, node{x, y}), append(minus, node{x + minusCore, y}), 'S')
}

func (r *runner) cut(points []*circuit.Point, plus, minus []node, turn byte) {
	leg := points[0].Leg
	r.end(leg, plus, minus, turn, rest{key: "leg " + leg.Key, name: leg.Designation, points: points})
}

// cutNode ends the cores that pass a luminaire; the runs that hang on it go on
// elsewhere. The cores are those of the last run's leg, on which the others are joined.
func (r *runner) cutNode(p *circuit.Point, runs [][]*circuit.Point, plus, minus []node, turn byte) {
	r.end(runs[len(runs)-1][0].Leg, plus, minus, turn, rest{
		key: fmt.Sprintf("node %s, %d more", p.Luminaire.Key, len(runs)), name: "at " + p.Luminaire.Designation, node: p, runs: runs})
}

func (r *runner) end(leg *circuit.Cable, plus, minus []node, turn byte, behind rest) {
	cp, cm := cores(leg)
	r.c.cores = append(r.c.cores, corePiece{cp, plus}, corePiece{cm, minus})
	r.c.cuts = append(r.c.cuts, cut{leg, behind.key, behind.name, plus[len(plus)-1], minus[len(minus)-1], turn, behind.node != nil})
	r.c.rests = append(r.c.rests, behind)
}

// comb hangs the runs of one luminaire side by side on its cores, which run level over
// them. What finds no lane goes on elsewhere.
func (r *runner) comb(p *circuit.Point, runs [][]*circuit.Point, plus, minus []node) {
	for i, run := range runs {
		lane := r.wide
		if i == 0 {
			lane = 0
		}
		x := lane * laneWidth
		if lane >= r.lanes {
			to := x - laneWidth + minusCore + combReach
			r.cutNode(p, runs[i:], append(plus, node{0, rowCombPlus}, node{to, rowCombPlus}),
				append(minus, node{minusCore, rowCombMinus}, node{to, rowCombMinus}), 'E')
			return
		}
		from, back := []node{{x, rowCombPlus}}, []node{{x + minusCore, rowCombMinus}}
		if i == len(runs)-1 {
			from, back = plus, minus
			if lane > 0 {
				from = append(plus, node{0, rowCombPlus}, node{x, rowCombPlus})
				back = append(minus, node{minusCore, rowCombMinus}, node{x + minusCore, rowCombMinus})
			}
		}
		r.c.ovals = append(r.c.ovals, columnOval{run[0].Leg, x, float64(lampRow(0)) + 0.5, false})
		r.run(run, 1, lane, from, back, false)
	}
}

// fold lays a long run without branches into ladders side by side. The cores go
// round under the first and over the next, so that order reads downward in each.
func (r *runner) fold(points []*circuit.Point, plus, minus []node, ladders int) {
	ladder, row, x := 1, 0, 0
	last := r.rows - 1
	left := rungRows(points)
	for i, p := range points {
		need := 1
		newSize := i > 0 && p.Leg.Size != points[i-1].Leg.Size
		if newSize {
			need = 2
		}
		limit := last - 1
		if left <= r.rows-row {
			limit = last // all of the rest fits
		}
		if row+need-1 > limit {
			if ladder == ladders {
				r.cutDown(points[i:], row, x, plus, minus)
				break
			}
			y := plus[len(plus)-1].Y
			to := x + foldWidth
			minus = append(minus, node{x + minusCore, y + 3}, node{to - 4, y + 3}, node{to - 4, rowFoldMinus},
				node{to + minusCore, rowFoldMinus})
			plus = append(plus, node{x, y + 5}, node{to - 2, y + 5}, node{to - 2, rowFoldPlus}, node{to, rowFoldPlus})
			r.length(p.Leg, float64(x)+branchLength, float64(y)+4+textHeight/2)
			ladder, row, x = ladder+1, 0, to
		} else {
			r.length(p.Leg, float64(x)+minusCore/2, float64(lampRow(row+need-1))-2)
		}
		if newSize {
			r.c.ovals = append(r.c.ovals, columnOval{p.Leg, x, float64(lampRow(row)) - 0.5, false})
		}
		row += need
		left -= need
		y := lampRow(row - 1)
		r.rung(p, x, y, plus, minus, i == len(points)-1)
		plus, minus = []node{{x, y}}, []node{{x + minusCore, y}}
	}
	r.c.width = laneWidth + foldWidth*(ladder-1)
}
