package commission

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"gloamwright/internal/design"
	"gloamwright/internal/facts"
)

// Likely is a fault that would explain the readings outside their bands.
type Likely struct {
	What   string
	Sign   string
	Points int // readings that it explains
	Misses int // readings outside that it does not explain, or inside that it would move
	score  float64
	fault  *facts.Fault
}

// Next is the reading that tells the likely faults apart best.
type Next struct {
	Condition, Point string
	Says             string
}

// Weights of the comparison: a reading where the fault puts it counts in full, one
// that only leaves its band like the fault's counts half, one that contradicts counts
// against it. nearVolt is how near a reading must be to where the fault puts it
// (common practice, no source).
const (
	explained   = 1.0
	alike       = 0.5
	contradicts = 0.7
	nearVolt    = 0.5
	nearShare   = 0.05
	mostLikely  = 5
)

// diagnose ranks the faults of the study by how well they explain the readings, and
// names the next reading to take.
func diagnose(d *design.Design, judged []Judged) ([]Likely, *Next) {
	byKey := map[[2]string]Judged{}
	outside := 0
	for _, j := range judged {
		if j.Verdict == Inside || j.Verdict == Outside {
			byKey[[2]string{j.Condition, j.Point}] = j
		}
		if j.Verdict == Outside {
			outside++
		}
	}
	if outside == 0 {
		return nil, nil
	}
	var out []Likely
	for _, f := range d.Faults {
		l := Likely{What: f.What, Sign: f.Sign, fault: f}
		moved := map[[2]string]float64{}
		tried := map[string]bool{}
		for _, m := range f.Moved {
			moved[[2]string{m.Condition, m.Point}] = float64(m.Volt)
			tried[m.Condition] = true
		}
		for _, j := range judged {
			k := [2]string{j.Condition, j.Point}
			x, taken := byKey[k]
			if !taken {
				continue
			}
			v, moves := moved[k]
			switch {
			case x.Verdict == Outside && moves && math.Abs(x.Measured-v) <= math.Max(nearVolt, nearShare*math.Abs(v)):
				l.score += explained
				l.Points++
			case x.Verdict == Outside && moves:
				l.score += alike
				l.Points++
			case x.Verdict == Outside && tried[j.Condition], x.Verdict == Inside && moves:
				l.score -= contradicts
				l.Misses++
			}
		}
		if l.Points > 0 && l.score > 0 {
			out = append(out, l)
		}
	}
	slices.SortStableFunc(out, func(a, b Likely) int {
		return cmp.Or(cmp.Compare(b.score, a.score), cmp.Compare(a.Misses, b.Misses), cmp.Compare(a.What, b.What))
	})
	out = out[:min(len(out), mostLikely)]
	return out, next(d, out, byKey)
}

// next finds the reading not yet taken at which the likely faults differ most.
func next(d *design.Design, likely []Likely, taken map[[2]string]Judged) *Next {
	if len(likely) < 2 {
		return nil
	}
	var best *Next
	spread := 0.0
	for i, c := range d.Conditions {
		if !c.Shown {
			continue
		}
		for _, r := range d.Readings {
			k := [2]string{c.Key, r.Point.Label}
			if _, done := taken[k]; done {
				continue
			}
			lo, hi := math.Inf(1), math.Inf(-1)
			for _, l := range likely {
				v := float64(r.Bands[i].Typical)
				for _, m := range l.fault.Moved {
					if m.Condition == c.Key && m.Point == r.Point.Label {
						v = float64(m.Volt)
					}
				}
				lo, hi = math.Min(lo, v), math.Max(hi, v)
			}
			if hi-lo > spread+hair {
				spread = hi - lo
				best = &Next{Condition: c.Name, Point: r.Point.Label, Says: fmt.Sprintf("%s, %s: red on %s, black on %s; the likely faults put it between %.1f V and %.1f V",
					r.Point.Label, c.Name, r.Point.Red, r.Point.Black, lo, hi)}
			}
		}
	}
	return best
}
