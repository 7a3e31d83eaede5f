package sizing

import (
	"cmp"
	"slices"
)

// lightenTries bounds how many choices lighten solves.
const lightenTries = 200

// lighten makes groups of the best choice one size thinner where the voltages leave room,
// those first that save most.
func (s *search) lighten() {
	if s.best == nil {
		return
	}
	picks := s.picksOf(s.best)
	type step struct {
		group, to int
		saves     float64
	}
	var steps []step
	for g, m := range s.members {
		k := slices.Index(s.allowed[g], picks[g])
		if k <= 0 {
			continue
		}
		st := step{group: g, to: s.allowed[g][k-1]}
		for _, i := range m {
			st.saves += s.cost(i, &s.t.Options[picks[g]]) - s.cost(i, &s.t.Options[st.to])
		}
		if st.saves > 0 {
			steps = append(steps, st)
		}
	}
	slices.SortStableFunc(steps, func(a, b step) int { return cmp.Compare(b.saves, a.saves) })
	spare, tries := s.spare(), 0
	for _, st := range steps {
		if tries >= lightenTries {
			return
		}
		if !s.mayThin(st.group, st.to, picks, spare) {
			continue
		}
		tries++
		was := picks[st.group]
		picks[st.group] = st.to
		if _, ok := s.offer(picks); ok {
			spare = s.spare()
		} else {
			picks[st.group] = was
		}
	}
}

// spare returns by leg the least voltage to spare at its end and behind it in the best choice.
func (s *search) spare() []float64 {
	out := make([]float64, len(s.t.Legs))
	for i := range out {
		out[i] = float64(s.t.Volts)
		if m := s.t.Legs[i].MinVolt; m > 0 {
			out[i] = float64(s.best.Volts[i] - m)
		}
	}
	for i := len(out) - 1; i >= 0; i-- {
		if q := s.t.Legs[i].Parent; q >= 0 {
			out[q] = min(out[q], out[i])
		}
	}
	return out
}

// mayThin reports whether a group may take option to: no leg behind it in its circuit
// is thicker, and by the currents as they are the voltages suffice. The true drop is
// judged afterwards; a resistor draws less behind a thinner cable, hence the share.
func (s *search) mayThin(g, to int, picks []int, spare []float64) bool {
	const share = 0.9
	added := map[int]float64{}
	for _, i := range s.members[g] {
		o, p := s.best.Sizes[i], &s.t.Options[to]
		added[i] = float64(s.best.Amps[i]) * (s.t.ohms(i, p) - s.t.ohms(i, o))
		if q := s.t.Legs[i].Parent; q >= 0 {
			added[i] += added[q]
		}
		if share*added[i] > spare[i]+voltSlack {
			return false
		}
		if s.t.Legs[i].Circuit == "" || !s.t.Taper {
			continue
		}
		for _, k := range s.kids[i] {
			if h := s.group[k]; h != free && picks[h] > to {
				return false
			}
		}
	}
	return true
}

// picksOf reads the picks back from a result.
func (s *search) picksOf(r *TreeResult) []int {
	picks := make([]int, len(s.allowed))
	for g, m := range s.members {
		for k := range s.t.Options {
			if &s.t.Options[k] == r.Sizes[m[0]] {
				picks[g] = k
			}
		}
	}
	return picks
}
