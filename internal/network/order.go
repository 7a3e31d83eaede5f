package network

// fillOrder returns an elimination order of n unknowns with little fill: those
// marked first come first, as they stand; the others by minimum degree on the
// quotient graph (A. George, J. W. H. Liu, "The evolution of the minimum degree
// ordering algorithm", SIAM Review 31, 1989). adj is the graph of the matrix and
// its transpose together, without the diagonal and without repeats; it is used up.
//
// Equal degrees are resolved by position, so that the order is always the same.
func fillOrder(adj [][]int32, first []bool) []int32 {
	n := len(adj)
	q := &quotient{
		vars: adj, elems: make([][]int32, n), members: make([][]int32, n),
		gone: make([]bool, n), mark: make([]int32, n),
	}
	order := make([]int32, 0, n)
	for v := range n {
		if first[v] {
			q.eliminate(int32(v))
			order = append(order, int32(v))
		}
	}
	b := newBuckets(n)
	for v := n - 1; v >= 0; v-- {
		if !q.gone[v] {
			b.put(int32(v), q.degree(int32(v)))
		}
	}
	for {
		v, ok := b.lowest()
		if !ok {
			return order
		}
		b.take(v)
		for _, u := range q.eliminate(v) {
			b.take(u)
			b.put(u, q.degree(u))
		}
		order = append(order, v)
	}
}

// quotient is the graph during elimination: an unknown is next to other unknowns
// and to elements, an element being the clique that an eliminated unknown left.
type quotient struct {
	vars    [][]int32 // unknown: neighbouring unknowns not covered by an element
	elems   [][]int32 // unknown: elements it belongs to
	members [][]int32 // element: its unknowns; nil once absorbed
	gone    []bool
	mark    []int32
	stamp   int32
}

// eliminate removes p and returns the unknowns of the element it leaves.
func (q *quotient) eliminate(p int32) []int32 {
	q.gone[p] = true
	q.stamp++
	inside := q.stamp
	var clique []int32
	take := func(list []int32) {
		for _, u := range list {
			if !q.gone[u] && q.mark[u] != inside {
				q.mark[u] = inside
				clique = append(clique, u)
			}
		}
	}
	take(q.vars[p])
	for _, e := range q.elems[p] {
		take(q.members[e])
		q.members[e] = nil
	}
	q.members[p] = clique
	q.vars[p], q.elems[p] = nil, nil
	for _, u := range clique {
		keep := q.vars[u][:0]
		for _, w := range q.vars[u] {
			if !q.gone[w] && q.mark[w] != inside {
				keep = append(keep, w)
			}
		}
		q.vars[u] = keep
		live := q.elems[u][:0]
		for _, e := range q.elems[u] {
			if q.members[e] != nil {
				live = append(live, e)
			}
		}
		q.elems[u] = append(live, p)
	}
	return clique
}

// degree returns the number of unknowns next to u.
func (q *quotient) degree(u int32) int {
	q.stamp++
	q.mark[u] = q.stamp
	d := 0
	count := func(list []int32) {
		for _, w := range list {
			if !q.gone[w] && q.mark[w] != q.stamp {
				q.mark[w] = q.stamp
				d++
			}
		}
	}
	count(q.vars[u])
	for _, e := range q.elems[u] {
		count(q.members[e])
	}
	return d
}

// buckets keeps unknowns by degree in doubly linked lists.
type buckets struct {
	head, next, prev []int32
	at               []int // degree of each unknown, −1 if not kept
	low              int
}

func newBuckets(n int) *buckets {
	b := &buckets{head: make([]int32, n+1), next: make([]int32, n), prev: make([]int32, n), at: make([]int, n)}
	for i := range b.head {
		b.head[i] = -1
	}
	for i := range b.at {
		b.at[i] = -1
	}
	return b
}

func (b *buckets) put(v int32, degree int) {
	h := b.head[degree]
	b.next[v], b.prev[v] = h, -1
	if h >= 0 {
		b.prev[h] = v
	}
	b.head[degree] = v
	b.at[v] = degree
	b.low = min(b.low, degree)
}

func (b *buckets) take(v int32) {
	if b.at[v] < 0 {
		return
	}
	if b.prev[v] >= 0 {
		b.next[b.prev[v]] = b.next[v]
	} else {
		b.head[b.at[v]] = b.next[v]
	}
	if b.next[v] >= 0 {
		b.prev[b.next[v]] = b.prev[v]
	}
	b.at[v] = -1
}

func (b *buckets) lowest() (int32, bool) {
	for ; b.low < len(b.head); b.low++ {
		if v := b.head[b.low]; v >= 0 {
			return v, true
		}
	}
	return 0, false
}
