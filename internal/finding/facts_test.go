package finding

import (
	"fmt"
	"slices"
	"testing"

	"github.com/google/go-cmp/cmp"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// given is a value as a description would state it.
func given[T any](v T, line int) describe.At[T] {
	return describe.At[T]{Val: v, Pos: describe.Span{File: "site.yaml", Line: line, Col: 3}, Given: true}
}

// Names of the base site's conditions by index.
const (
	floating = iota
	outageNight
	outageDay
	recharging
)

// sound returns the facts of a small site on which no check finds more than it always
// says: 24 V, twelve glass-mat cells, one main board with the circuits Workshop (-E11,
// -E12) and Stair (-E13) and a spare way, an annex board with Shed (-E14).
func sound() *facts.Facts {
	f := &facts.Facts{Site: &describe.Site{
		Job: describe.Job{Number: given("T-1", 3), Title: given("Standby lighting", 4), Revision: given("A", 5), Date: given("2026-12-01", 6)},
		Practice: describe.Practice{
			Conductors: given("metric", 10), LampDrop: given[quantity.Ratio](0.05, 11), ClearWithin: given[quantity.Second](5, 12),
			LoadFactor: given[quantity.Ratio](0.75, 13), Positive: given("RD", 14), Negative: given("BK", 15),
		},
		Duty: describe.Duty{
			Nominal: given[quantity.Volt](24, 20), Outage: given(quantity.Hours(4), 21), Recharge: given(quantity.Hours(24), 22),
			BatteryRoom: given(quantity.Range[quantity.Celsius]{Low: 5, High: 30}, 23), CableAmbient: given[quantity.Celsius](35, 24),
		},
	}}
	c := &circuit.Circuit{}
	f.Circuit = c
	part := func(designation string, kind circuit.Kind, line int, pins ...string) *circuit.Part {
		p := &circuit.Part{Key: designation, Designation: designation, Kind: kind, At: describe.Span{File: "site.yaml", Line: line, Col: 5}}
		for _, n := range pins {
			p.Pins = append(p.Pins, &circuit.Pin{Part: p, Name: n})
		}
		c.Parts = append(c.Parts, p)
		return p
	}
	core := func(number string, from, to *circuit.Pin, length quantity.Metre, mm2 quantity.SquareMM, amps quantity.Ampere, fuse string) *circuit.Conductor {
		size := quantity.WireSize{Area: mm2}
		row, _ := catalogue.ConductorOf(size)
		w := &circuit.Conductor{
			Key: number, Number: number, From: from, To: to, Size: size, Length: length, At: to.Part.At,
			Ohm: row.PerKM * quantity.Ohm(length/1000), Positive: number[len(number)-1] == '+', Colour: "BK",
		}
		if w.Positive {
			w.Colour = "RD"
		}
		c.Conductors = append(c.Conductors, w)
		iz, _ := catalogue.AmpacityOf(catalogue.Metric).Current(size)
		f.Conductors = append(f.Conductors, &facts.Conductor{Conductor: w, Current: amps, Ampacity: iz.Current, Fuse: fuse})
		return w
	}
	cable := func(designation, circ string, from, to *circuit.Part, length quantity.Metre, mm2 quantity.SquareMM, amps quantity.Ampere, fuse string) *circuit.Cable {
		w := &circuit.Cable{Key: designation, Designation: designation, Size: quantity.WireSize{Area: mm2}, Length: length, Circuit: circ, At: to.At}
		w.Cores = []*circuit.Conductor{
			core(designation[2:]+"+", from.Pins[0], to.Pins[0], length, mm2, amps, fuse),
			core(designation[2:]+"-", from.Pins[1], to.Pins[1], length, mm2, amps, fuse),
		}
		for _, x := range w.Cores {
			x.Cable, x.Circuit = w, circ
		}
		c.Cables = append(c.Cables, w)
		return w
	}

	for i, name := range []string{"Mains on, floating", "Mains off, dark", "Mains off, daylight", "Mains back, recharging"} {
		f.Conditions = append(f.Conditions, &facts.Condition{
			Key: fmt.Sprintf("c%d", i+1), Number: i + 1, Name: name, Settled: true, Residual: 1e-12,
			BatteryV: []quantity.Volt{27.3, 23, 25.6, 27}[i],
		})
	}

	g := part("-G1", circuit.Battery, 31, "+", "-")
	f1 := part("-F1", circuit.Fuse, 31, "1", "2")
	core("1+", g.Pin("+"), f1.Pin("2"), 0.3, 10, 3, "")
	f.Battery = facts.Battery{
		Part: g, Class: "vrla-agm", ClassName: "VRLA-AGM", Series: 12, Blocks: 2, Parallel: 1, BlockVolt: 12,
		Capacity: 33, Required: 29.6, EndVolt: 21, FullVolt: 25.6, FloatVolt: 27.48, Prospective: 1200, Resistance: 0.02,
		Ventilation: 0, Gas: false, Fuse: f1,
	}
	f.Charger = facts.Charger{
		Part: part("-T1", circuit.ChargerUnit, 32, "+", "-"), Current: 3, Required: 2.4, Limit: 8.25,
		Float: 27.48, Boost: 29.04, PerKelvin: -0.036, Compensated: true,
	}
	f.Supplies = []*facts.Supply{{Part: part("-T2", circuit.Supply, 33, "+", "-"), Volt: 24, Rated: 0.5, Current: 0.04}}
	f.CutOff = &facts.CutOff{Part: part("-Q1", circuit.CutOff, 34, "in", "out", "-"), Opens: 21, Recloses: 25.2, Current: 1.5, Rated: 5}
	f.Relays = []*facts.Relay{{Part: part("-K1", circuit.Relay, 35, "A1", "A2"), PickUp: 19.6, LowestFeed: 23.5, Contact: 1.5, Rated: 8}}

	board := func(name, title string, line int) *circuit.Board {
		b := &circuit.Board{Name: name, Title: title, Number: len(c.Boards) + 1, At: describe.Span{File: "site.yaml", Line: line, Col: 3}}
		b.Plus, b.Minus = part(name+":L+", circuit.BusBar, line, "1", "2"), part(name+":L-", circuit.BusBar, line, "1", "2")
		c.Boards = append(c.Boards, b)
		return b
	}
	way := func(b *circuit.Board) *circuit.Way {
		w := &circuit.Way{Board: b, Number: len(b.Ways) + 1}
		w.Fuse = part(fmt.Sprintf("-F%d", 100*b.Number+w.Number), circuit.Fuse, 40+10*b.Number+w.Number, "1", "2")
		b.Ways = append(b.Ways, w)
		return w
	}
	fuse := func(p *circuit.Part, w *circuit.Way, feeds string, rating, design quantity.Ampere, before *facts.Fuse) *facts.Fuse {
		x := &facts.Fuse{
			Part: p, Way: w, Rating: rating, Style: "blade, medium", Feeds: feeds, Design: design, CableAmpacity: 17.5,
			CableSize: quantity.WireSize{Area: 1.5}, Prospective: 300, Breaking: 1000, BreakingVolt: 32, FarEnd: 60, Opens: true,
			OpensWithin: 0.1, DiscriminatesTo: 300, Before: before, Class: catalogue.FuseBlade, Withstand: 5,
		}
		if w != nil {
			x.Board = w.Board
		}
		f.Fuses = append(f.Fuses, x)
		return x
	}
	main := fuse(f1, nil, "battery", 20, 1.5, nil)
	main.CableAmpacity, main.CableSize, main.Prospective = 46, quantity.WireSize{Area: 10}, 900

	lit := func(w *circuit.Way, name string, lamps ...string) *circuit.Lighting {
		l := &circuit.Lighting{Name: name, Lit: "outage-night", Way: w, At: w.Fuse.At}
		w.Lighting = l
		from := w.Fuse
		for i, d := range lamps {
			lamp := part(d, circuit.LuminaireLamp, w.Fuse.At.Line, "+", "-")
			lamp.At.Col = 10 + 10*i
			p := &circuit.Point{Luminaire: lamp, Type: "corridor"}
			p.Leg = cable("-W"+d[2:], name, from, lamp, 10, 1.5, 0.5, w.Fuse.Designation)
			l.Points = append(l.Points, p)
			from = lamp
			f.Luminaires = append(f.Luminaires, &facts.Luminaire{
				Part: lamp, Point: p, Circuit: name, Type: "corridor", Kind: "led-driver", Watt: 6,
				Volts: []quantity.Volt{0, 22.6, 0, 0}, Amps: []quantity.Ampere{0, 0.26, 0, 0},
				Drop: 0.02, WorstV: 20.6, Works: quantity.Range[quantity.Volt]{Low: 18, High: 32},
			})
		}
		f.Function = append(f.Function, &facts.FunctionRow{
			Circuit: name, Asked: "outage-night", Wanted: []bool{false, true, false, false},
			Known: []bool{true, true, true, true}, Found: []bool{false, true, false, false},
		})
		return l
	}
	b1 := board("main", "Main board", 40)
	w1, w2, w3 := way(b1), way(b1), way(b1)
	fuse(w1.Fuse, w1, "Workshop", 2, 0.5, main)
	lit(w1, "Workshop", "-E11", "-E12")
	fuse(w2.Fuse, w2, "Stair", 2, 0.25, main)
	lit(w2, "Stair", "-E13")
	up := fuse(w3.Fuse, w3, "Annex board", 5, 0.25, main)
	way(b1)
	b2 := board("annex", "Annex board", 50)
	w3.Feeds, b2.Parent = b2, w3
	b2.Feeder = cable("-W3", "", w3.Fuse, b2.Plus, 20, 2.5, 0.25, "-F103")
	w4 := way(b2)
	fuse(w4.Fuse, w4, "Shed", 2, 0.25, up)
	lit(w4, "Shed", "-E14")
	way(b2)

	f.Endurance = facts.Endurance{
		Runs: []*facts.Run{{Name: "Recharge", Recharge: true}},
		Held: quantity.Hours(4.4), Lit: []facts.LitFor{{Circuit: "Workshop", For: quantity.Hours(4.4)}, {Circuit: "Stair", For: quantity.Hours(4.5)}},
		Recharge: quantity.Hours(20), Standing: 20 * secondsPerDay, DrainA: 0.04,
	}
	f.Totals = facts.Totals{Luminaires: 4, LoadA: 1.2}
	return f
}

// limitCase is a change to the sound site and what one check says about it: each
// line of want is "severity subject: message | remedy", the part from " | " on left
// out where the case does not look at it. A nil want asks for silence.
type limitCase struct {
	name string
	set  func(*facts.Facts)
	want []string
}

// run holds one check against its cases.
func run(t *testing.T, c *Check, cases []limitCase) {
	t.Helper()
	for _, tc := range cases {
		t.Run(tc.name, func(t *testing.T) {
			f := sound()
			if tc.set != nil {
				tc.set(f)
			}
			var got []string
			c.Run(f, func(x Finding) {
				line := fmt.Sprintf("%v %s: %s", x.Severity, x.Subject, x.Message)
				if n := len(got); n < len(tc.want) && slices.Contains([]byte(tc.want[n]), '|') {
					line += " | " + x.Remedy
				}
				got = append(got, line)
			})
			if d := cmp.Diff(tc.want, got); d != "" {
				t.Errorf("findings (-want +got):\n%s", d)
			}
		})
	}
}
