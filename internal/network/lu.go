package network

import "math"

// Pivoting. A column's own diagonal is taken unless it is smaller than pivotRatio
// times the largest candidate. For the currents that are eliminated first it may be
// as small as branchRatio: dividing by a small resistance there is how nodal analysis
// itself comes about, and is no loss. A factorisation with old pivots is given up
// when a pivot has become smaller than renewRatio times what stands below it.
const (
	pivotRatio  = 1e-2
	branchRatio = 1e-5
	renewRatio  = 1e-7
)

// lu is the factorisation P·A·Q = L·U of a sparse matrix.
//
// The first factorisation chooses the pivots by J. R. Gilbert and T. Peierls,
// "Sparse partial pivoting in time proportional to arithmetic operations", SIAM J.
// Sci. Stat. Comput. 9, 1988. Later ones reuse its pivots and its pattern, as in
// T. A. Davis and E. Palamadai Natarajan, "Algorithm 907", ACM Trans. Math. Softw.
// 37, 2010, and choose anew only when a pivot has become too small.
type lu struct {
	n     int
	order []int32 // order[k] is the column of the k-th pivot
	first []bool  // columns that are eliminated first
	step  []int32 // step[r] is the pivot that row r became, −1 while it is none
	lp    []int32 // L by columns, unit diagonal left out
	li    []int32 // pivot numbers once the factorisation is complete, rows before
	lx    []float64
	up    []int32 // U by columns, diagonal left out, in the order of elimination
	ui    []int32
	ux    []float64
	diag  []float64
	was   []float64 // entries of the matrix that was factorised
	anew  []bool    // by pivot: its column had to be eliminated again
	ready bool      // pattern and pivots are there
	fresh int       // how often the pivots were chosen

	x     []float64 // work space of one column
	seen  []int32
	stack []int32
	child []int32
	reach []int32
}

// newLU returns an empty factorisation of matrices of the pattern of m, in which the
// columns marked first are eliminated first.
func newLU(m *matrix, first []bool) *lu {
	return orderedLU(fillOrder(m.graph(), first), first)
}

func orderedLU(order []int32, first []bool) *lu {
	n := len(order)
	f := &lu{
		n: n, order: order, first: first, step: make([]int32, n), lp: make([]int32, n+1), up: make([]int32, n+1),
		diag: make([]float64, n), x: make([]float64, n), anew: make([]bool, n), seen: make([]int32, n), child: make([]int32, n),
	}
	return f
}

// factor factorises a. It returns the column that could not be eliminated, or −1.
func (f *lu) factor(a *matrix) int {
	if f.ready && f.again(a) {
		return -1
	}
	return f.choose(a)
}

// choose factorises a with new pivots.
func (f *lu) choose(a *matrix) int {
	f.ready = false
	f.fresh++
	f.li, f.lx, f.ui, f.ux = f.li[:0], f.lx[:0], f.ui[:0], f.ux[:0]
	rowOf := make([]int32, f.n) // row of each pivot
	for i := range f.step {
		f.step[i], f.seen[i], f.x[i] = -1, -1, 0
	}
	for k := range int32(f.n) {
		col := f.order[k]
		f.findReach(a, col, k)
		for p := a.ptr[col]; p < a.ptr[col+1]; p++ {
			f.x[a.row[p]] = a.val[p]
		}
		// Eliminate with the earlier columns, in topological order.
		f.lp[k] = int32(len(f.li))
		f.up[k] = int32(len(f.ui))
		best, bestRow := 0.0, int32(-1)
		for i := len(f.reach) - 1; i >= 0; i-- {
			r := f.reach[i]
			j := f.step[r]
			if j < 0 {
				continue
			}
			v := f.x[r]
			f.x[r] = 0
			f.ui = append(f.ui, j)
			f.ux = append(f.ux, v)
			for p := f.lp[j]; p < f.lp[j+1]; p++ {
				f.x[f.li[p]] -= f.lx[p] * v
			}
		}
		for i := len(f.reach) - 1; i >= 0; i-- {
			r := f.reach[i]
			if f.step[r] >= 0 {
				continue
			}
			if v := math.Abs(f.x[r]); v > best {
				best, bestRow = v, r
			}
		}
		if bestRow < 0 || math.IsNaN(best) || math.IsInf(best, 0) {
			return int(col)
		}
		ratio := pivotRatio
		if f.first[col] {
			ratio = branchRatio
		}
		if f.step[col] < 0 && f.seen[col] == k && math.Abs(f.x[col]) >= ratio*best {
			bestRow = col
		}
		pivot := f.x[bestRow]
		f.diag[k] = pivot
		f.x[bestRow] = 0
		f.step[bestRow] = k
		rowOf[k] = bestRow
		for i := len(f.reach) - 1; i >= 0; i-- {
			r := f.reach[i]
			if f.step[r] >= 0 {
				continue
			}
			f.li = append(f.li, r)
			f.lx = append(f.lx, f.x[r]/pivot)
			f.x[r] = 0
		}
		f.lp[k+1] = int32(len(f.li))
		f.up[k+1] = int32(len(f.ui))
	}
	for p, r := range f.li {
		f.li[p] = f.step[r]
	}
	f.ready = true
	f.was = append(f.was[:0], a.val...)
	return -1
}

// findReach puts into f.reach, in reverse topological order, all rows that column
// col touches once the earlier pivots have been eliminated.
func (f *lu) findReach(a *matrix, col, k int32) {
	f.reach = f.reach[:0]
	for p := a.ptr[col]; p < a.ptr[col+1]; p++ {
		r := a.row[p]
		if f.seen[r] == k {
			continue
		}
		f.stack = append(f.stack[:0], r)
		f.seen[r] = k
		f.child[r] = f.below(r)
		for len(f.stack) > 0 {
			top := f.stack[len(f.stack)-1]
			j := f.step[top]
			descended := false
			if j >= 0 {
				for f.child[top] < f.lp[j+1] {
					next := f.li[f.child[top]]
					f.child[top]++
					if f.seen[next] != k {
						f.seen[next] = k
						f.child[next] = f.below(next)
						f.stack = append(f.stack, next)
						descended = true
						break
					}
				}
			}
			if !descended {
				f.reach = append(f.reach, top)
				f.stack = f.stack[:len(f.stack)-1]
			}
		}
	}
}

func (f *lu) below(r int32) int32 {
	if j := f.step[r]; j >= 0 {
		return f.lp[j]
	}
	return 0
}

// again factorises a with the pivots and the pattern of before; it reports false
// when a pivot is too small for that. A column that has not changed, nor any that it is
// eliminated with, stays as it is.
func (f *lu) again(a *matrix) bool {
	x, step, was, anew := f.x, f.step, f.was, f.anew
	for k := range f.n {
		col := f.order[k]
		changed := false
		for p := a.ptr[col]; p < a.ptr[col+1]; p++ {
			if v := a.val[p]; v != was[p] {
				was[p], changed = v, true
			}
		}
		for p := f.up[k]; !changed && p < f.up[k+1]; p++ {
			changed = anew[f.ui[p]]
		}
		anew[k] = changed
		if !changed {
			continue
		}
		for p := a.ptr[col]; p < a.ptr[col+1]; p++ {
			x[step[a.row[p]]] = a.val[p]
		}
		for p := f.up[k]; p < f.up[k+1]; p++ {
			j := f.ui[p]
			v := x[j]
			x[j] = 0
			f.ux[p] = v
			if v == 0 {
				continue
			}
			for q := f.lp[j]; q < f.lp[j+1]; q++ {
				x[f.li[q]] -= f.lx[q] * v
			}
		}
		pivot := x[k]
		x[k] = 0
		f.diag[k] = pivot
		below := 0.0
		for q := f.lp[k]; q < f.lp[k+1]; q++ {
			r := f.li[q]
			v := x[r]
			x[r] = 0
			below = max(below, math.Abs(v))
			f.lx[q] = v / pivot
		}
		if !(math.Abs(pivot) > renewRatio*below) { // NaN too
			clear(x)
			return false
		}
	}
	return true
}

// solve replaces b, by rows, with the solution of A·x = b, by columns.
func (f *lu) solve(b []float64) {
	y := f.x
	for r, k := range f.step {
		y[k] = b[r]
	}
	for k := range f.n {
		if v := y[k]; v != 0 {
			for p := f.lp[k]; p < f.lp[k+1]; p++ {
				y[f.li[p]] -= f.lx[p] * v
			}
		}
	}
	for k := f.n - 1; k >= 0; k-- {
		v := y[k] / f.diag[k]
		y[k] = 0
		b[f.order[k]] = v
		if v != 0 {
			for p := f.up[k]; p < f.up[k+1]; p++ {
				y[f.ui[p]] -= f.ux[p] * v
			}
		}
	}
}

// solveTransposed replaces c, by columns, with the solution of Aᵀ·x = c, by rows.
func (f *lu) solveTransposed(c []float64) {
	y := f.x
	for k := range f.n {
		v := c[f.order[k]]
		for p := f.up[k]; p < f.up[k+1]; p++ {
			v -= f.ux[p] * y[f.ui[p]]
		}
		y[k] = v / f.diag[k]
	}
	for k := f.n - 1; k >= 0; k-- {
		v := y[k]
		for p := f.lp[k]; p < f.lp[k+1]; p++ {
			v -= f.lx[p] * y[f.li[p]]
		}
		y[k] = v
	}
	for r, k := range f.step {
		c[r] = y[k]
	}
	clear(y)
}
