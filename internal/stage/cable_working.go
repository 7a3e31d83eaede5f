package stage

import "gloamwright/internal/sizing"

// workings records what the cables need and how near that is to the least possible,
// if any sizes keep all limits.
func (t *tree) workings(r *sizing.TreeResult) {
	if r.Bound <= 0 || r.Cost <= 0 {
		return
	}
	copper := t.CopperWorking(r.Sizes)
	unit, uses := copper.Unit, []string{copper.Name}
	if t.Priced() {
		unit, uses = "", nil
	}
	at := t.p.C.Boards[0].Name
	t.p.work(at, "", copper)
	t.p.work(at, "", sizing.BoundWorking(r.Cost+t.paid, r.Bound+t.paid, unit, r.Proven), uses...)
}
