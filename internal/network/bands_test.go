package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// banded is a site with tolerances on everything.
const banded = `
T1 charger chg 0 float_volt=13.65~0.01 limit_ampere=2~0.1 standby_ampere=0.005~0.3
F2 fuse chg bat ohm=0.02~0.3
G1 battery cell 0 emf=12.7~0.02 ohm=0.03~0.3
F1 fuse cell bat ohm=0.005~0.3
Q1 cut-off bat load 0 opens_volt=10.5~0.01 recloses_volt=12.5~0.01 own_ampere=0.008~0.5 ohm=0.01~0.5
K1 coil aux 0 ohm=270~0.1 pickup_volt=9 dropout_volt=1.2
T2 supply aux 0 volt=12~0.02 limit_ampere=0.5
K1c contact load board by=K1 rest_closed=1 ohm=0.01~0.5
F3 fuse board way ohm=0.02~0.3
W1 conductor way a ohm=0.3~0.1
E1 constant-power a 0 watt=6~0.1 low_volt=9 high_volt=16
W2 conductor a b ohm=0.4~0.1
E2 led-string b 0 forward_volt=3.1~0.06 series=3 strings=4 ohm=100~0.05 ampere=0.02
W3 conductor b c ohm=0.4~0.1
E3 filament c 0 rated_volt=12 rated_watt=5~0.1
`

// Slopes by the adjoint network against differences of whole solutions.
func TestAdjointSlopes(t *testing.T) {
	for _, name := range []string{"lamps", "photocell"} {
		text := banded
		if name == "photocell" {
			text = comparatorCell
		}
		c := compile(t, text)
		at := Environment{Lux: 3}
		s := c.solve(at, nil)
		var outputs []Output
		if name == "lamps" {
			outputs = append(outputs, Between(c.net("c"), c.net("board")), Into("G1"), Into("E2"), Into("W3"))
		} else {
			outputs = append(outputs, Between(c.net("in"), 0), Between(c.net("light"), c.net("ref")), Into("K1"), Into("Q1"))
		}
		bands, err := s.Bands(outputs, Linear)
		if err != nil {
			t.Fatal(err)
		}
		for k, b := range bands {
			if len(b.Effects) == 0 {
				t.Errorf("%s, output %d: no parameter acts on it", name, k)
			}
			for _, e := range b.Effects {
				var value float64
				d := c.devices[c.byID[e.Element]]
				for i, spec := range d.m.Params {
					if spec.Name == e.Param {
						value = d.p[i]
					}
				}
				h := 1e-4 * value
				up := c.solve(at.Set(e.Element, e.Param, value+h), s.State)
				down := c.solve(at.Set(e.Element, e.Param, value-h), s.State)
				want := (up.run.value(b.Output) - down.run.value(b.Output)) / (2 * h)
				near(t, fmt.Sprintf("%s, output %d to %s of %s, in effect", name, k, e.Param, e.Element),
					e.Slope*e.Half, want*e.Half, 1e-4*math.Abs(want*e.Half)+1e-9)
			}
		}
	}
}

// A divider by hand: V = E·R2/(R1+R2), slopes −E·R2/(R1+R2)² and E·R1/(R1+R2)².
func TestBandOfDivider(t *testing.T) {
	c := compile(t, `
V1 source a 0 volt=10
R1 resistor a b ohm=100~0.05
R2 resistor b 0 ohm=100~0.05`)
	s := c.solve(Environment{}, nil)
	bands, err := s.Bands([]Output{Between(c.net("b"), 0)}, Linear)
	if err != nil {
		t.Fatal(err)
	}
	b := bands[0]
	near(t, "typical", b.Typical, 5, 1e-6)
	near(t, "worst case", b.Linear, 2*10*100./(200*200)*5, 1e-6)
	near(t, "root sum of squares", b.RSS, math.Sqrt2*0.125, 1e-6)
	bands, err = s.Bands([]Output{Between(c.net("b"), 0)}, Corners)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "low corner", bands[0].Low, 10*95./(95+105), 1e-6)
	near(t, "high corner", bands[0].High, 10*105./(95+105), 1e-6)
}

// Ten thousand draws: the worst-case band holds at least 99.9 % of them, and it is
// not wider than twice their extremes unless that is put down to the number of
// parameters that would all have to stand at their ends.
func TestBandsAgainstMonteCarlo(t *testing.T) {
	draws := 10000
	if testing.Short() {
		draws = 500
	}
	for _, tc := range []struct {
		name, text string
		at         Environment
		outputs    func(c circuitUnderTest) []Output
	}{
		{"lamps, outage", banded, Environment{Name: "outage"}, func(c circuitUnderTest) []Output {
			return []Output{Between(c.net("c"), 0), Between(c.net("a"), 0), Into("E2"), Into("G1")}
		}},
		{"lamps, mains", banded, Environment{Name: "mains", Mains: 1, Charge: Float}, func(c circuitUnderTest) []Output {
			return []Output{Between(c.net("bat"), 0), Into("G1")}
		}},
		{"photocell, dark", comparatorCell, Environment{Lux: 0.5}, func(c circuitUnderTest) []Output {
			return []Output{Between(c.net("in"), 0), Between(c.net("light"), 0)}
		}},
	} {
		t.Run(tc.name, func(t *testing.T) {
			c := compile(t, tc.text)
			s := c.solve(tc.at, nil)
			outputs := tc.outputs(c)
			bands, err := s.Bands(outputs, Corners)
			if err != nil {
				t.Fatal(err)
			}
			rng := rand.New(rand.NewPCG(31, 32))
			inside := make([]int, len(outputs))
			low, high := make([]float64, len(outputs)), make([]float64, len(outputs))
			for k := range outputs {
				low[k], high[k] = math.Inf(1), math.Inf(-1)
			}
			for range draws {
				q := *s.run
				q.p = make([][]float64, len(s.run.p))
				for i, d := range c.devices {
					q.p[i] = append([]float64(nil), s.run.p[i]...)
					for k, tol := range s.run.tol[i] {
						q.p[i][k] *= 1 + tol*(2*rng.Float64()-1)
					}
					if d.m.derive != nil {
						d.m.derive(q.p[i], s.run.given[i])
					}
				}
				q.x = append([]float64(nil), s.run.x...)
				q.f, q.old = make([]float64, len(q.f)), make([]float64, len(q.old))
				if err := q.converge(true); err != nil {
					t.Fatal(err)
				}
				for k, o := range outputs {
					v := q.value(o)
					low[k], high[k] = min(low[k], v), max(high[k], v)
					if v >= bands[k].Low && v <= bands[k].High {
						inside[k]++
					}
				}
			}
			for k, b := range bands {
				width := (b.High - b.Low) / (high[k] - low[k])
				t.Logf("output %d: band %.4g to %.4g, %d parameters, extremes %.4g to %.4g, band %.2f times as wide, %.2f %% inside",
					k, b.Low, b.High, len(b.Effects), low[k], high[k], width, 100*float64(inside[k])/float64(draws))
				if float64(inside[k]) < 0.999*float64(draws) {
					t.Errorf("output %d: %d of %d draws inside", k, inside[k], draws)
				}
				if width > 2 {
					t.Errorf("output %d: band is %.2f times as wide as the extremes", k, width)
				}
			}
		})
	}
}
