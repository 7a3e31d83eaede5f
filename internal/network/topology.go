package network

import "slices"

// forest joins nets into groups.
type forest []int32

func newForest(n int) forest {
	f := make(forest, n)
	for i := range f {
		f[i] = int32(i)
	}
	return f
}

func (f forest) root(i int32) int32 {
	for f[i] != i {
		f[i] = f[f[i]]
		i = f[i]
	}
	return i
}

// join reports whether the two were apart.
func (f forest) join(a, b int32) bool {
	a, b = f.root(a), f.root(b)
	if a == b {
		return false
	}
	f[max(a, b)] = min(a, b)
	return true
}

// passive are the models that bring no energy in and have no use without a return.
var passive = []*Model{resistorModel, conductorModel, fuseModel, switchModel, contactModel, ntcModel, meterModel, capacitorModel, ldrModel}

// checkFloating refuses nets that no current path joins to net 0, and lists those
// of passive parts alone.
func (n *Network) checkFloating() error {
	f := newForest(len(n.nets))
	used := make([]bool, len(n.nets))
	for _, d := range n.devices {
		for k := range d.m.Pins {
			used[d.at[k]+1] = true
		}
		for _, j := range d.m.joined {
			f.join(d.at[j[0]]+1, d.at[j[1]]+1)
		}
	}
	groups := map[int32]*FloatingError{}
	refused := map[int32]bool{}
	var order []int32
	for i, name := range n.nets {
		root := f.root(int32(i))
		if root == 0 || !used[i] {
			continue
		}
		if groups[root] == nil {
			groups[root] = &FloatingError{}
			order = append(order, root)
		}
		groups[root].Nets = append(groups[root].Nets, name)
	}
	for _, d := range n.devices {
		for k := range d.m.Pins {
			root := f.root(d.at[k] + 1)
			g := groups[root]
			if g == nil || slices.Contains(g.Elements, d.el.ID) {
				continue
			}
			g.Elements = append(g.Elements, d.el.ID)
			if !slices.Contains(g.Parts, d.el.Part) {
				g.Parts = append(g.Parts, d.el.Part)
			}
			if !slices.Contains(passive, d.m) {
				refused[root] = true
			}
		}
	}
	for _, root := range order {
		if refused[root] {
			return groups[root]
		}
		n.Unreferenced = append(n.Unreferenced, groups[root])
	}
	return nil
}

// checkLoops refuses a loop of elements that have no resistance in this condition.
func (r *run) checkLoops() error {
	var f forest
	var direct []*device
	for i, d := range r.n.devices {
		if d.m.direct == nil || r.faults[i] != nil || !d.m.direct(r.p[i], r.position(d)) {
			continue
		}
		if f == nil {
			f = newForest(len(r.n.nets))
		}
		if !f.join(d.at[0]+1, d.at[1]+1) {
			return loopOf(direct, d)
		}
		direct = append(direct, d)
	}
	return nil
}

// loopOf names the elements of the loop that last closes among direct ones.
func loopOf(direct []*device, last *device) error {
	// Breadth first from one end of last to the other.
	from := map[int32]*device{last.at[0]: last}
	queue := []int32{last.at[0]}
	for len(queue) > 0 && (from[last.at[1]] == nil || last.at[0] == last.at[1]) {
		at := queue[0]
		queue = queue[1:]
		if at == last.at[1] {
			break
		}
		for _, d := range direct {
			for k := range 2 {
				if to := d.at[1-k]; d.at[k] == at && from[to] == nil {
					from[to] = d
					queue = append(queue, to)
				}
			}
		}
	}
	e := &LoopError{}
	add := func(d *device) {
		e.Elements = append(e.Elements, d.el.ID)
		if !slices.Contains(e.Parts, d.el.Part) {
			e.Parts = append(e.Parts, d.el.Part)
		}
	}
	add(last)
	for at := last.at[1]; at != last.at[0]; {
		d := from[at]
		add(d)
		if d.at[0] == at {
			at = d.at[1]
		} else {
			at = d.at[0]
		}
	}
	return e
}
