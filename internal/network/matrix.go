package network

import "slices"

// matrix is a square sparse matrix by columns; its pattern never changes.
type matrix struct {
	n   int
	ptr []int32 // column c has entries ptr[c] to ptr[c+1]
	row []int32 // row of each entry, ascending inside a column
	val []float64
}

// newMatrix returns a zero matrix with room for the given entries (row and column
// alternating, repeats allowed) and for the whole diagonal.
func newMatrix(n int, entries []int32) *matrix {
	cols := make([][]int32, n)
	for c := range n {
		cols[c] = append(cols[c], int32(c))
	}
	for k := 0; k < len(entries); k += 2 {
		c := entries[k+1]
		cols[c] = append(cols[c], entries[k])
	}
	m := &matrix{n: n, ptr: make([]int32, n+1)}
	for c, rows := range cols {
		slices.Sort(rows)
		m.row = append(m.row, slices.Compact(rows)...)
		m.ptr[c+1] = int32(len(m.row))
	}
	m.val = make([]float64, len(m.row))
	return m
}

// place returns the position in val of an entry that newMatrix was told of.
func (m *matrix) place(row, col int32) int32 {
	lo, hi := m.ptr[col], m.ptr[col+1]
	k, ok := slices.BinarySearch(m.row[lo:hi], row)
	if !ok {
		panic("network: matrix has no such entry")
	}
	return lo + int32(k)
}

// graph returns the neighbours of every unknown in the matrix and its transpose.
func (m *matrix) graph() [][]int32 {
	adj := make([][]int32, m.n)
	for c := range m.n {
		for k := m.ptr[c]; k < m.ptr[c+1]; k++ {
			if r := m.row[k]; int(r) != c {
				adj[c] = append(adj[c], r)
				adj[r] = append(adj[r], int32(c))
			}
		}
	}
	for i := range adj {
		slices.Sort(adj[i])
		adj[i] = slices.Compact(adj[i])
	}
	return adj
}

// times returns m·x.
func (m *matrix) times(x []float64) []float64 {
	y := make([]float64, m.n)
	for c := range m.n {
		for k := m.ptr[c]; k < m.ptr[c+1]; k++ {
			y[m.row[k]] += m.val[k] * x[c]
		}
	}
	return y
}
