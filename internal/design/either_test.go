package design_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/sitegen"
)

// between is a presence supply that holds a coil but cannot pick it up: 15 V on a coil
// of 24 V, which picks up at three quarters of that and lets go at a tenth (relay class).
const between = "  presence: {kind: regulated-supply, rated: 15 V 0.5 A, mains: 230 V ± 10 %}\n" +
	"  transfer: {kind: changeover-relay, coil: presence, from: guard}\n  dusk: {kind: photocell, from: guard, holds: transfer}\n"

// The relay that daylight has picked up is held through the night by less than it needs
// to pick up: with mains on in the dark it may stand either way. The board is then dead
// or live, and the readings say so.
func TestRelayEitherWay(t *testing.T) {
	d, err := design.Make(parse(t, fmt.Sprintf(small, between, "transfer.break", "outage-night")), nil)
	if err != nil {
		t.Fatal(err)
	}
	i := slices.IndexFunc(d.Conditions, func(c *facts.Condition) bool { return c.Key == "mains-night" })
	c := d.Conditions[i]
	if len(c.Either) != 1 {
		t.Fatalf("%d other states, want 1: %v", len(c.Either), c.Either)
	}
	e := c.Either[0]
	if len(e.Parts) != 1 || e.Parts[0] != (facts.State{Element: "-K1", Position: "let go"}) || e.Tolerance || !slices.Equal(e.Lit, []string{"Stair"}) {
		t.Errorf("other state %+v, want -K1 let go by what was before, with Stair lit", e)
	}
	if want := "Or -K1 let go, with the circuit lit."; !strings.Contains(c.Expect, want) {
		t.Errorf("expect %q lacks %q", c.Expect, want)
	}
	seen := 0
	for _, r := range d.Readings {
		or := r.OrAt(i)
		switch {
		case strings.HasPrefix(r.Point.Shows, "Board bar"), strings.HasPrefix(r.Point.Shows, "Stair"):
			seen++
			// Twelve cells at their float voltage of 2.25 to 2.3 V, less the way to the lamps.
			if len(or) != 1 || or[0].With != "-K1 let go" || or[0].Typical < 26 || or[0].Typical > 28 || r.Bands[i].High > 0.1 {
				t.Errorf("%s: %v or %v, want dead or at float voltage", r.Point.Shows, r.Bands[i], or)
			}
		case len(or) > 0:
			t.Errorf("%s: %v or %v, but no meter tells them apart", r.Point.Shows, r.Bands[i], or)
		}
	}
	if seen != 2 {
		t.Errorf("%d points behind the relay, want 2", seen)
	}
}

// A coil stands either way exactly where its voltage lies between drop-out and pick-up,
// by the definition of the two: held by less than it needs to pick up, or let go with
// more than it needs to stay. Both positions of every generated control, solved anew from
// the stated position, must stand.
func TestEitherWayAgreesWithTheCoil(t *testing.T) {
	found := 0
	check := func(name string, d *design.Design) {
		if d.Relay == nil {
			return
		}
		coil := d.Relay.Part.Designation + ".coil"
		n, err := network.New(d.Netlist)
		if err != nil {
			t.Fatal(err)
		}
		for i, c := range d.Conditions {
			either := slices.ContainsFunc(c.Either, func(e facts.Either) bool { return e.Parts[0].Element == d.Relay.Part.Designation })
			here := positions(n, c)
			there := positions(n, c)
			there[coil] = !here[coil]
			sol, err := n.Solve(environment(c), there)
			if err != nil {
				t.Fatal(err)
			}
			stands := sol.State[coil] == there[coil]
			q := d.CutOff
			if stands && q != nil && sol.State[q.Part.Designation] != here[q.Part.Designation] {
				continue // another setting up
			}
			tolerance := slices.ContainsFunc(c.Either, func(e facts.Either) bool { return e.Tolerance })
			if stands != either && !tolerance {
				t.Errorf("%s, %s: other position of %s stands: %v; reported: %v", name, c.Key, coil, stands, either)
			}
			if !stands {
				continue
			}
			found++
			pick, drop := param(d, coil, "pickup_volt"), param(d, coil, "dropout_volt")
			warm := 1 + 0.00393*(param(d, coil, "celsius")-20) // IEC 60028
			v := math.Abs(sol.Across(d.Relay.Part.Pin("A1").Net, d.Relay.Part.Pin("A2").Net))
			if there[coil] && v < drop*warm || !there[coil] && v >= pick*warm {
				t.Errorf("%s, %s: %s at %.2f V, drop-out %.2f V, pick-up %.2f V", name, c.Key, coil, v, drop*warm, pick*warm)
			}
			for _, r := range d.Readings {
				v := sol.Across(r.Point.Red.Net, r.Point.Black.Net)
				if !slices.ContainsFunc(r.At(i), func(b facts.Band) bool { return v >= float64(b.Low) && v <= float64(b.High) }) {
					t.Errorf("%s, %s, %s: %.3f V in the other position, bands %v", name, c.Key, r.Point.Label, v, r.At(i))
				}
			}
		}
	}
	for _, name := range examples(t) {
		d, err := design.Make(load(t, name), nil)
		if err != nil {
			t.Fatal(err)
		}
		check(name, d)
		if found > 0 {
			t.Errorf("%s: a relay stands either way", name)
		}
	}
	// At 24 V the relay of a follower picks up early; at 36 V none is made that does.
	for _, volts := range []int{24, 36} {
		for _, c := range sitegen.Controls {
			d, err := design.Make(generated(t, 10, sitegen.Options{Volts: volts, Control: c}), nil)
			if err != nil {
				t.Fatal(err)
			}
			check(fmt.Sprintf("%d V, %s", volts, c), d)
		}
	}
	if found == 0 {
		t.Error("no generated control stands either way")
	}
}

// param is a parameter of an element.
func param(d *design.Design, element, name string) float64 {
	for _, e := range d.Elements {
		if e.Element != element {
			continue
		}
		if i := slices.IndexFunc(e.Params, func(p circuit.Param) bool { return p.Name == name }); i >= 0 {
			return e.Params[i].Value
		}
	}
	return math.NaN()
}

// Nothing in the examples can drive a point of the control cards below L−: no band
// reaches below what the meter's own error and a silicon drop on a negative line make.
func TestNoReadingBelowMinus(t *testing.T) {
	const least = -0.1 // V
	for _, name := range examples(t) {
		d, err := design.Make(load(t, name), nil)
		if err != nil {
			t.Fatal(err)
		}
		for i, c := range d.Conditions {
			for _, r := range d.Readings {
				if b := r.Bands[i]; b.Low < least || b.Low > b.Typical || b.Typical > b.High {
					t.Errorf("%s, %s, %s (%s): band %v", name, c.Key, r.Point.Label, r.Point.Shows, b)
				}
			}
		}
	}
}
