package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"
)

// random returns a random sparse matrix with a few entries a column, some zero on
// the diagonal, and its dense twin.
func random(rng *rand.Rand, n int) (*matrix, *mat.Dense) {
	var entries []int32
	for c := range n {
		for range 1 + rng.IntN(4) {
			entries = append(entries, int32(rng.IntN(n)), int32(c))
		}
	}
	// A random cycle keeps it regular in structure.
	perm := rng.Perm(n)
	for c, r := range perm {
		entries = append(entries, int32(r), int32(c))
	}
	m := newMatrix(n, entries)
	fill(rng, m, perm)
	d := mat.NewDense(n, n, nil)
	for c := range n {
		for k := m.ptr[c]; k < m.ptr[c+1]; k++ {
			d.Set(int(m.row[k]), c, m.val[k])
		}
	}
	return m, d
}

func fill(rng *rand.Rand, m *matrix, perm []int) {
	for c := range m.n {
		for k := m.ptr[c]; k < m.ptr[c+1]; k++ {
			m.val[k] = rng.NormFloat64()
			if int(m.row[k]) == c && rng.IntN(3) == 0 {
				m.val[k] = 0
			}
		}
		m.val[m.place(int32(perm[c]), int32(c))] += 5
	}
}

func residual(y, b []float64) float64 {
	w := 0.0
	for i := range y {
		w = max(w, math.Abs(y[i]-b[i]))
	}
	return w
}

// The dense LU of gonum is the independent second route.
func TestLUAgainstDense(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	compared := 0
	for trial := range 300 {
		n := 1 + rng.IntN(60)
		m, d := random(rng, n)
		var dense mat.LU
		dense.Factorize(d)
		if dense.Cond() > 1e8 {
			continue
		}
		compared++
		f := newLU(m, make([]bool, n))
		b := make([]float64, n)
		for i := range b {
			b[i] = rng.NormFloat64()
		}
		if col := f.factor(m); col >= 0 {
			t.Fatalf("trial %d: column %d of %d cannot be eliminated, condition %g", trial, col, n, dense.Cond())
		}
		for _, transposed := range []bool{false, true} {
			x := append([]float64(nil), b...)
			var want mat.VecDense
			if transposed {
				f.solveTransposed(x)
			} else {
				f.solve(x)
			}
			if err := dense.SolveVecTo(&want, transposed, mat.NewVecDense(n, b)); err != nil {
				t.Fatal(err)
			}
			for i := range x {
				// Growth of up to 1/pivotRatio is allowed for, over rounding times condition.
				if math.Abs(x[i]-want.AtVec(i)) > 1e-16/pivotRatio*100*dense.Cond()*(1+mat.Norm(&want, math.Inf(1))) {
					t.Fatalf("trial %d, transposed %v: x[%d] = %g, dense %g", trial, transposed, i, x[i], want.AtVec(i))
				}
			}
		}
	}
	if compared < 200 {
		t.Errorf("only %d of 300 matrices were fit for a comparison", compared)
	}
}

// Pivots are kept while the numbers change, and chosen anew when they must be.
func TestLUReusesPivots(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	const n = 200
	var entries []int32
	perm := make([]int, n)
	for c := range n {
		perm[c] = c
		for range 3 {
			entries = append(entries, int32(rng.IntN(n)), int32(c))
		}
	}
	m := newMatrix(n, entries)
	f := newLU(m, make([]bool, n))
	for range 20 {
		fill(rng, m, perm)
		if f.factor(m) >= 0 {
			t.Fatal("singular")
		}
		b := make([]float64, n)
		for i := range b {
			b[i] = rng.NormFloat64()
		}
		x := append([]float64(nil), b...)
		f.solve(x)
		if r := residual(m.times(x), b); r > 1e-9 {
			t.Fatalf("residual %g", r)
		}
	}
	if f.fresh > 5 {
		t.Errorf("pivots were chosen %d times for 20 matrices of one pattern", f.fresh)
	}
	// Old pivots of zero must not be used.
	fresh := f.fresh
	for c := range n {
		m.val[m.place(int32(c), int32(c))] = 0
	}
	f.factor(m)
	if f.fresh == fresh {
		t.Error("pivots of zero were reused")
	}
}

func TestLUNamesSingularColumn(t *testing.T) {
	m := newMatrix(3, []int32{0, 1, 1, 0})
	m.val[m.place(0, 1)], m.val[m.place(1, 0)] = 1, 1 // column 2 is empty
	f := orderedLU([]int32{0, 1, 2}, make([]bool, 3))
	if col := f.factor(m); col != 2 {
		t.Errorf("factor returned %d, want column 2", col)
	}
}

// On a tree a leaf can always be eliminated before its parent: no fill at all.
func TestFillOrderOnTrees(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 8))
	for _, n := range []int{1, 2, 10, 1000} {
		var entries []int32
		for i := 1; i < n; i++ {
			p := int32(rng.IntN(i))
			entries = append(entries, p, int32(i), int32(i), p)
		}
		m := newMatrix(n, entries)
		for c := range n {
			for k := m.ptr[c]; k < m.ptr[c+1]; k++ {
				m.val[k] = -1
			}
			m.val[m.place(int32(c), int32(c))] = float64(n)
		}
		f := newLU(m, make([]bool, n))
		if f.factor(m) >= 0 {
			t.Fatal("singular")
		}
		if got, want := len(f.li)+len(f.ui)+n, len(m.row); got != want {
			t.Errorf("tree of %d: %d entries in L and U, %d in the matrix", n, got, want)
		}
	}
}

// On a square grid minimum degree leaves far less fill than the natural order.
func TestFillOrderOnGrid(t *testing.T) {
	const side = 40
	n := side * side
	var entries []int32
	for i := range n {
		if i%side > 0 {
			entries = append(entries, int32(i), int32(i-1), int32(i-1), int32(i))
		}
		if i >= side {
			entries = append(entries, int32(i), int32(i-side), int32(i-side), int32(i))
		}
	}
	count := func(order []int32) int {
		m := newMatrix(n, entries)
		for c := range n {
			for k := m.ptr[c]; k < m.ptr[c+1]; k++ {
				m.val[k] = -1
			}
			m.val[m.place(int32(c), int32(c))] = 5
		}
		f := orderedLU(order, make([]bool, n))
		if f.factor(m) >= 0 {
			t.Fatal("singular")
		}
		return len(f.li) + len(f.ui)
	}
	natural := make([]int32, n)
	for i := range natural {
		natural[i] = int32(i)
	}
	m := newMatrix(n, entries)
	order := fillOrder(m.graph(), make([]bool, n))
	seen := make([]bool, n)
	for _, v := range order {
		if seen[v] {
			t.Fatalf("unknown %d is eliminated twice", v)
		}
		seen[v] = true
	}
	if a, b := count(order), count(natural); a*2 > b {
		t.Errorf("minimum degree leaves %d entries, the natural order %d", a, b)
	}
}

// benchTree is a board that feeds lamps along branching runs, n nets or so.
func benchTree(n int) string {
	var s strings.Builder
	s.WriteString("G1 battery p0 0 emf=25.6 ohm=0.005\n")
	rng := rand.New(rand.NewPCG(9, 10))
	for i := 1; 2*i < n; i++ {
		up := i - 1
		if i%20 == 0 {
			up = rng.IntN(i)
		}
		minus := fmt.Sprintf("m%d", up)
		if up == 0 {
			minus = "0"
		}
		fmt.Fprintf(&s, "W%da conductor p%d p%d ohm=%g\nW%db conductor %s m%d ohm=%g\n", i, up, i, 0.4/float64(n), i, minus, i, 0.4/float64(n))
		fmt.Fprintf(&s, "E%d constant-power p%d m%d watt=%g low_volt=18 high_volt=32\n", i, i, i, 100/float64(n))
	}
	return s.String()
}

func BenchmarkSolveTree(b *testing.B) {
	for _, n := range []int{10, 100, 1000, 10000} {
		b.Run(fmt.Sprintf("nets=%d", n), func(b *testing.B) {
			c := compile(b, benchTree(n))
			for b.Loop() {
				s, err := c.Solve(Environment{}, nil)
				if err != nil {
					b.Fatal(err)
				}
				b.ReportMetric(float64(s.Steps), "steps")
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(n), "ns/net")
		})
	}
}

// The work on a site grows with its size and no faster: entries of L and U for each
// net stay the same from ten nets to ten thousand.
func TestWorkGrowsLinearly(t *testing.T) {
	perNet := func(n int) float64 {
		c := compile(t, benchTree(n))
		c.solve(Environment{}, nil)
		return float64(len(c.lu.li)+len(c.lu.ui)) / float64(len(c.nets))
	}
	small := perNet(10)
	for _, n := range []int{100, 1000, 10000} {
		if p := perNet(n); p > 1.5*small {
			t.Errorf("%d nets: %.2f entries a net, %.2f with ten", n, p, small)
		}
	}
}
