package stage_test

import (
	"fmt"
	"os"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/finding"
	"gloamwright/internal/network"
	"gloamwright/internal/stage"
)

// bench is a small site to which a test adds what it looks at.
type bench struct {
	nominal string // "12 V"
	lamp    string // a luminaire
	stages  string // lines of stages; battery, cut-off and board stand already
	from    string // what feeds the board
	parts   string // lines of parts and test_points
	lit     string
	battery string // further fields of the battery
}

// text writes the bench's description.
func (b bench) text() string {
	or := func(s, def string) string {
		if s == "" {
			return def
		}
		return s
	}
	return fmt.Sprintf(`gloamwright: 1
job: {number: T-1, title: Trial, client: Nobody, site: Bench, prepared: N. N., revision: A, date: 2026-12-01}
practice: {lamp_drop: 6 %%}
duty: {nominal: %s, outage: 3 h, recharge: 24 h, battery_room: 15 °C..25 °C, cable_ambient: 30 °C}
stages:
  store: {kind: battery, cells: vrla-agm, fuse: 7.5 A%s}
  guard: {kind: low-voltage-disconnect, from: store}
  board: {kind: distribution-board, from: %s, ways: 2}
%s
luminaires:
  lamp: %s
circuits:
  - {name: Hall, board: board, lit: %s, points: [5 m lamp, 3 m lamp]}
%s
`, or(b.nominal, "12 V"), b.battery, or(b.from, "guard"), indent(b.stages), or(b.lamp, "{kind: led-driver, power: 4 W, works: 9 V..16 V}"), or(b.lit, "always"), b.parts)
}

func indent(s string) string {
	var out []string
	for _, l := range strings.Split(strings.TrimSpace(s), "\n") {
		out = append(out, "  "+strings.TrimSpace(l))
	}
	return strings.Join(out, "\n")
}

func (b bench) site(t testing.TB) *describe.Site {
	t.Helper()
	return parse(t, "bench.yaml", []byte(b.text()))
}

func parse(t testing.TB, file string, src []byte) *describe.Site {
	t.Helper()
	site, list := describe.Parse(file, src, stage.Schema())
	for _, d := range list {
		if d.Severity == describe.Error {
			t.Error(d)
		}
	}
	if t.Failed() {
		t.Fatalf("description:\n%s", src)
	}
	return site
}

// example decodes one of the examples.
func example(t testing.TB, name string) *describe.Site {
	t.Helper()
	src, err := os.ReadFile("../../examples/" + name + ".yaml")
	if err != nil {
		t.Fatal(err)
	}
	return parse(t, name+".yaml", src)
}

// sized is a site, designed, with a network to try it further.
type sized struct {
	*design.Design
	net *network.Network
}

func design1(t testing.TB, site *describe.Site) sized {
	t.Helper()
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	n, err := network.New(d.Netlist)
	if err != nil {
		t.Fatal(err)
	}
	return sized{d, n}
}

func (b bench) design(t testing.TB) sized {
	t.Helper()
	d := design1(t, b.site(t))
	holdsSketch(t, d.Circuit)
	return d
}

// stops lists the stop findings.
func (d sized) stops() []string {
	var out []string
	for _, f := range d.Findings {
		if f.Severity == finding.Stop {
			out = append(out, f.Check+": "+f.Message)
		}
	}
	return out
}

func (d sized) noStops(t testing.TB) {
	t.Helper()
	for _, s := range d.stops() {
		t.Error(s)
	}
}

// part finds a part by its key.
func (d sized) part(t testing.TB, key string) *circuit.Part {
	t.Helper()
	for _, p := range d.Circuit.Parts {
		if p.Key == key {
			return p
		}
	}
	t.Fatalf("no part %s", key)
	return nil
}

// value is a number that a part bears.
func (d sized) value(t testing.TB, key, name string) float64 {
	t.Helper()
	for _, v := range d.part(t, key).Values {
		if v.Name == name {
			return v.Num
		}
	}
	t.Fatalf("%s has no value %s", key, name)
	return 0
}

// figure is the value of a working.
func (d sized) figure(t testing.TB, key, name string) float64 {
	t.Helper()
	for _, w := range d.Workings {
		if w.For == d.part(t, key).Designation && w.Name == name {
			return w.Value
		}
	}
	t.Fatalf("%s has no working %s", key, name)
	return 0
}

// solve solves the circuit; battery is the electromotive force of the battery.
func (d sized) solve(t testing.TB, env network.Environment, battery float64, from network.State) *network.Solution {
	t.Helper()
	env = env.With(network.Override{Element: d.Battery.Part.Designation, Params: []circuit.Param{{Name: "emf", Value: battery}, {Name: "ohm", Value: float64(d.Battery.Resistance)}}})
	s, err := d.net.Solve(env, from)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// volts is the voltage of a part's pin against L−.
func (d sized) volts(t testing.TB, s *network.Solution, key, pin string) float64 {
	t.Helper()
	return s.Volts[d.part(t, key).Pin(pin).Net]
}

// near reports values that differ by more than a share.
func near(t testing.TB, what string, got, want, share float64) {
	t.Helper()
	if got < want*(1-share) || got > want*(1+share) {
		t.Errorf("%s is %.4g, want %.4g ± %.3g %%", what, got, want, 100*share)
	}
}

// within reports a value outside its bounds.
func within(t testing.TB, what string, got, low, high float64) {
	t.Helper()
	if got < low || got > high {
		t.Errorf("%s is %.4g, want %.4g to %.4g", what, got, low, high)
	}
}
