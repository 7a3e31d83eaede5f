package design_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"sync"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
)

// The draws of one condition: every toleranced parameter at once, evenly over its
// tolerance, in a fixed sequence.
const (
	draws   = 10_000
	fewer   = 10    // of them, where the test point table does not print, and in a short run
	held    = 0.999 // share of the draws that a band must hold
	workers = 2     // parts of the sequence, each with its own seed
)

// drawn is what the draws of one condition gave at each test point.
type drawn struct {
	low, high []float64
	outside   []int
	failed    int // no operating point
	moved     int // draws in which a relay or switch stands elsewhere
}

// environment builds the environment of a condition from the facts.
func environment(c *facts.Condition) network.Environment {
	e := network.Environment{Name: c.Name, Mains: c.Mains, Lux: float64(c.Lux),
		Charge: map[string]network.ChargeStage{facts.Off: network.NoCharge, facts.Float: network.Float, facts.Boost: network.Boost}[c.Charge]}
	for _, v := range c.Values {
		e = e.With(network.Override{Element: v.Element, Params: v.Params})
	}
	return e
}

// positions returns the state of a condition.
func positions(n *network.Network, c *facts.Condition) network.State {
	s := network.State{}
	for _, x := range c.State {
		on, _ := n.Positions(x.Element)
		s[x.Element] = x.Position == on
	}
	return s
}

// toleranced lists the parameters with a tolerance as they stand in a condition.
func toleranced(d *design.Design, c *facts.Condition) []facts.ElementValues {
	here := map[string]map[string]circuit.Param{}
	for _, v := range c.Values {
		here[v.Element] = map[string]circuit.Param{}
		for _, p := range v.Params {
			here[v.Element][p.Name] = p
		}
	}
	var out []facts.ElementValues
	for _, e := range d.Elements {
		v := facts.ElementValues{Element: e.Element}
		for _, p := range e.Params {
			if q, ok := here[e.Element][p.Name]; ok {
				p = q
			}
			if p.Tol > 0 && p.Value != 0 {
				v.Params = append(v.Params, p)
			}
		}
		if len(v.Params) > 0 {
			out = append(out, v)
		}
	}
	return out
}

// unmetered takes the meter's own error out of a band: what is left is that of the
// circuit alone. The meter is that of the package: 0.5 % of the reading and 20 mV.
func unmetered(b facts.Band) (low, high float64) {
	low, high = float64(b.Low)+0.02, float64(b.High)-0.02
	return low / (1 - math.Copysign(0.005, low)), high / (1 + math.Copysign(0.005, high))
}

// dead reports whether a band is that of a point without voltage.
func dead(b facts.Band) bool { return b.Low == 0 && b.Typical == 0 }

// draw solves one condition n times.
func draw(t *testing.T, d *design.Design, index, n int) drawn {
	c := d.Conditions[index]
	parts := toleranced(d, c)
	points := len(d.Readings)
	results := make([]drawn, workers)
	var wait sync.WaitGroup
	for w := range workers {
		wait.Go(func() {
			net, err := network.New(d.Netlist)
			if err != nil {
				t.Error(err)
				return
			}
			rng := rand.New(rand.NewPCG(uint64(index), uint64(w)))
			r := drawn{low: make([]float64, points), high: make([]float64, points), outside: make([]int, points)}
			for i := range points {
				r.low[i], r.high[i] = math.Inf(1), math.Inf(-1)
			}
			from := positions(net, c)
			// Every draw is sought from the sound solution.
			sound, err := net.Solve(environment(c), from)
			if err != nil {
				t.Error(err)
				return
			}
			env := environment(c)
			at := len(env.Overrides)
			for _, p := range parts {
				env = env.With(network.Override{Element: p.Element, Params: slices.Clone(p.Params)})
			}
			for range n / workers {
				for i, p := range parts {
					for k, x := range p.Params {
						env.Overrides[at+i].Params[k] = circuit.Param{Name: x.Name, Value: x.Value * (1 + x.Tol*(2*rng.Float64()-1))}
					}
				}
				sol, err := net.SolveNear(env, from, sound)
				if err != nil {
					r.failed++
					continue
				}
				for id, on := range sol.State {
					if on != from[id] {
						r.moved++
						break
					}
				}
				for i, reading := range d.Readings {
					v := sol.Across(reading.Point.Red.Net, reading.Point.Black.Net)
					r.low[i], r.high[i] = math.Min(r.low[i], v), math.Max(r.high[i], v)
					b := reading.Bands[index]
					low, high := unmetered(b)
					if dead(b) {
						low, high = -float64(b.High), float64(b.High)
					}
					if v < low-1e-6 || v > high+1e-6 {
						r.outside[i]++
					}
				}
			}
			results[w] = r
		})
	}
	wait.Wait()
	sum := results[0]
	for _, r := range results[1:] {
		sum.failed += r.failed
		sum.moved += r.moved
		for i := range sum.low {
			sum.low[i], sum.high[i] = math.Min(sum.low[i], r.low[i]), math.Max(sum.high[i], r.high[i])
			sum.outside[i] += r.outside[i]
		}
	}
	return sum
}

// The worst-case band of every test point, without the meter's error, holds at least
// 99.9 % of the draws of all tolerances together. It is not wider than twice their
// extremes unless so many parts act on the reading that their errors never come
// together in the draws.
func TestBandsHoldTheDraws(t *testing.T) {
	for _, name := range examples(t) {
		t.Run(name, func(t *testing.T) {
			d, err := design.Make(load(t, name), nil)
			if err != nil {
				t.Fatal(err)
			}
			for k, c := range d.Conditions {
				n := draws
				if !c.Shown { // printed on the control sheets at most
					n /= fewer
				}
				if testing.Short() {
					n /= fewer
				}
				r := draw(t, d, k, n)
				if r.low == nil {
					return
				}
				judge(t, d, k, n, r)
			}
		})
	}
}

// judge compares the bands of one condition with its draws.
func judge(t *testing.T, d *design.Design, k, n int, r drawn) {
	t.Helper()
	c := d.Conditions[k]
	if r.failed > 0 {
		t.Errorf("%s: %d of %d draws have no operating point", c.Key, r.failed, n)
	}
	least, most, widest := 1.0, 0.0, ""
	for i, reading := range d.Readings {
		b := reading.Bands[k]
		share := 1 - float64(r.outside[i])/float64(n)
		least = math.Min(least, share)
		if share < held {
			t.Errorf("%s, %s (%s): the band holds %.2f %% of the draws; band %v, draws %.4f to %.4f V",
				c.Key, reading.Point.Label, reading.Point.Shows, 100*share, b, r.low[i], r.high[i])
		}
		if dead(b) {
			continue
		}
		low, high := unmetered(b)
		ratio := (high - low) / (r.high[i] - r.low[i])
		if ratio > most {
			most, widest = ratio, fmt.Sprintf("%s, band %.3f to %.3f V, draws %.3f to %.3f V", reading.Point.Label, low, high, r.low[i], r.high[i])
		}
		// Draws of many small even errors spread like a normal law of their
		// root-sum-square ÷ √3; beyond the extreme of n such draws lies only what all
		// errors at their worst together add.
		chance := float64(b.Root) / math.Sqrt(3) * extreme(n)
		if ratio > twice && (high-low)/2/chance < ratio/explains {
			t.Errorf("%s, %s: the band is %.1f times as wide as the draws' extremes, which chance does not explain; band %.3f to %.3f V, draws %.3f to %.3f V",
				c.Key, reading.Point.Label, ratio, low, high, r.low[i], r.high[i])
		}
	}
	t.Logf("%-12s %5d draws, relays elsewhere in %d; least share held %.3f %%; widest band %.2f times the draws' extremes (%s)", c.Key, n, r.moved, 100*least, most, widest)
}

const (
	twice    = 2.0
	explains = 1.3 // the law of many errors is met to 30 %
)

// extreme is the greatest of n draws of a normal law, in standard deviations: where the
// chance of one draw beyond it is 1 in n, both sides together.
func extreme(n int) float64 { return math.Sqrt2 * math.Erfinv(1-1/float64(n)) }
