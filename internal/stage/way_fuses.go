package stage

import (
	"errors"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// wayFuse is the fuse of a way as a tree proposes it; a spare way has no rating.
type wayFuse struct {
	way    *circuit.Way
	class  *catalogue.FuseClass
	rating quantity.Ampere
	feeds  string
	load   quantity.Ampere
	pinned bool
	found  sizing.Working // how the rating was found
	err    error          // that there is none
	errs   []error        // what is not known of it
}

// fuse proposes the fuse of a way, or takes the rating given. Behind stands the largest
// fuse behind it, 0 if there is none.
func (t *tree) fuse(w *circuit.Way, feeds string, load quantity.Ampere, given describe.At[quantity.Ampere], behind quantity.Ampere) *wayFuse {
	first := t.lights
	if w.Feeds != nil {
		first = t.feeders
	}
	f := &wayFuse{way: w, class: first, rating: given.Val, feeds: feeds, load: load, pinned: given.Given}
	if given.Given {
		f.class = t.p.classOf(given.Val, first)
	} else {
		f.rating, f.found, f.err = t.p.rate(first, load, behind)
		if f.err != nil {
			t.larger(f, behind)
		}
	}
	t.fuses = append(t.fuses, f)
	return f
}

// larger takes a class that has a rating for the way, where the tree's has none.
func (t *tree) larger(f *wayFuse, behind quantity.Ampere) {
	for _, c := range t.p.fuseClasses() {
		if r, w, err := t.p.rate(c, f.load, behind); err == nil {
			f.class, f.rating, f.found, f.err = c, r, w, nil
			return
		}
	}
}

// commit records the proposed fuses.
func (t *tree) commit() {
	p := t.p
	p.wayClass = t.lights
	for _, x := range t.fuses {
		if x.rating == 0 {
			x.way.Fuse.Description = x.class.Title + " holder, spare"
			params(x.way.Fuse, "", circuit.Param{Name: "ohm", Value: fuseOhm(x.class.Ratings[0])})
			continue
		}
		if x.way.Lighting != nil {
			p.loadWorking(x.way.Lighting, x.load)
		}
		if !x.pinned {
			p.rated(x.way.Fuse, x.feeds, x.found, x.err)
		}
		f := p.fit(x.way.Fuse, x.class, x.rating, x.feeds, x.load, x.pinned)
		f.Board, f.Way = x.way.Board, x.way
		for i := range t.fused {
			if t.fused[i].proposed == x {
				t.fused[i].fuse = f
			}
		}
		for _, err := range x.errs {
			p.block(x.way.Fuse.Designation, x.way.Fuse.At, "", err)
		}
	}
}

// faults counts what does not fit in a tree.
func (t *tree) faults() int {
	n := 0
	if t.err != nil {
		n++
	}
	flows, _ := sizing.Prospective(sizing.FaultInput{
		Source: t.p.Full, Internal: t.p.Internal, Loop: []sizing.Series{{Name: "way to the boards", Ohm: t.p.TrunkOhm}},
	})
	for _, f := range t.fuses {
		if f.rating == 0 {
			continue
		}
		n += len(f.errs)
		if f.err != nil {
			n++
		}
		if f.class.BreakingCapacity(f.rating) < flows {
			n++
		}
	}
	return n
}

// mostTrees bounds how many pairs of classes are tried: a large tree takes some tenths of
// a second where nothing fits.
const mostTrees = 12

// bestTree tries the classes of fuse for circuits and for feeders, the same for both
// first, until everything fits; feeder fuses stand above those behind them if that fits
// at all. Where nothing does, the first of those with the fewest faults stands.
func (p *Plan) bestTree() *tree {
	var best *tree
	classes := p.fuseClasses()
	tried := 0
	for _, above := range []bool{true, false} {
		for i, lights := range classes {
			for _, feeders := range classes[i:] {
				t := p.grow(lights, feeders, above)
				if best == nil || t.faults() < best.faults() {
					best = t
				}
				tried++
				if best.faults() == 0 || best.faults() == 1 && !protection(best.err) || tried == mostTrees {
					return best
				}
				if !p.fedBoards() {
					break // no feeder, nothing to tell apart
				}
			}
		}
		if !p.fedBoards() {
			break
		}
	}
	return best
}

// protection reports whether a limit hangs on the fuses, so that others may free it.
func protection(err error) bool {
	var b *sizing.BlockedError
	if !errors.As(err, &b) {
		return err == nil // the only fault is a fuse's own
	}
	switch b.Limit {
	case sizing.LimitClearing, sizing.LimitAmpacity, sizing.LimitOverload, sizing.LimitLoad:
		return true
	}
	return false
}

// fedBoards reports whether any board hangs on another.
func (p *Plan) fedBoards() bool {
	for _, b := range p.C.Boards {
		if b.Parent != nil {
			return true
		}
	}
	return false
}
