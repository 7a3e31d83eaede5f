package stage_test

import (
	"fmt"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/network"
	"gloamwright/internal/stage"
	"pgregory.net/rapid"
)

// everyPart has each kind of single part: a pilot lamp, a relay that holds itself in, a
// fused lamp behind its break contact, two supplies behind diodes.
const everyPart = `
parts:
  - {name: sieve, kind: resistor, value: 1 kΩ, pins: {1: guard.out, 2: a}}
  - {name: pilot, kind: led, current: 10 mA, pins: {A: a, K: minus}}
  - {name: hold, kind: relay, rated: 12 V, pins: {A1: b, A2: minus}}
  - {name: kick, kind: diode, pins: {A: minus, K: b}}
  - {name: press, kind: switch, closed: no, pins: {1: store.plus, 2: b}}
  - {name: seal, kind: contact, of: hold, pins: {1: store.plus, 2: b}}
  - {name: away, kind: contact, of: hold, is: break, pins: {1: guard.out, 2: c}}
  - {name: link, kind: fuse, rating: 1 A, pins: {1: c, 2: d}}
  - {name: glow, kind: lamp, rated: 12 V, power: 1 W, pins: {1: d, 2: minus}}
  - {name: clamp, kind: zener, volts: 15 V, pins: {A: minus, K: d}}
  - {name: spare, kind: terminal, for: a second lamp, pins: {1: d}}
  - {name: one, kind: schottky, pins: {A: presence.out, K: e}}
  - {name: two, kind: schottky, pins: {A: guard.out, K: e}}
  - {name: bulk, kind: capacitor, value: 100 µF, polarised: yes, stands: 35 V, pins: {1: e, 2: minus}}
  - {name: drain, kind: resistor, value: 10 kΩ, pins: {1: e, 2: minus}}
  - {name: main, kind: fuse, rating: 2 A, pins: {1: guard.out, 2: f}}
  - {name: load, kind: resistor, value: 1 kΩ, pins: {1: f, 2: minus}}
  - {name: tap, kind: terminal, pins: {1: guard.out}}
  - {name: ground, kind: terminal, pins: {1: minus}}
test_points:
  - {name: joined supplies, at: e}
  - {name: battery rail, at: store.plus}
  - {name: pilot anode, at: a}
  - {name: black, at: minus}
`

func withParts(t testing.TB, parts string) sized {
	t.Helper()
	return bench{stages: standby, from: "transfer.break", lit: "outage", parts: parts}.design(t)
}

// TestParts solves every kind of single part and reads them as a technician would.
func TestParts(t *testing.T) {
	d := withParts(t, everyPart)
	d.noStops(t)
	s := d.solve(t, network.Environment{}, 12.8, nil)
	led := d.part(t, "parts/pilot").Designation
	within(t, "LED current through 1 kΩ from 12.7 V", s.Current(led), 10e-3, 11e-3)
	if v := d.volts(t, s, "parts/glow", "1"); v < 12 {
		t.Errorf("lamp has %.2f V behind the break contact", v)
	}
	near(t, "lamp", s.Power(d.part(t, "parts/glow").Designation), 1, 0.15)
	// With mains off only the battery feeds the joint of the diodes; with mains on both do.
	near(t, "behind the diodes", d.volts(t, s, "parts/drain", "1"), 12.6, 0.01)

	// The switch pulls the relay in, its own contact keeps it in, the lamp goes out.
	press := d.part(t, "parts/press").Designation
	held := d.solve(t, network.Environment{}.Set(press, "closed", 1), 12.8, s.State)
	after := d.solve(t, network.Environment{}, 12.8, held.State)
	if v := d.volts(t, after, "parts/hold", "A1"); v < 12 {
		t.Errorf("relay has %.2f V after the switch is open again", v)
	}
	if v := d.volts(t, after, "parts/glow", "1"); v > 0.1 {
		t.Errorf("lamp has %.2f V with the relay in", v)
	}
	// A fuse on a rail of the battery is in the fuse map, one behind a contact is not.
	found := map[string]bool{}
	for _, f := range d.Fuses {
		found[f.Part.Key] = true
	}
	if !found["parts/main"] || found["parts/link"] {
		t.Errorf("fuse map: on the rail %v, behind a contact %v", found["parts/main"], found["parts/link"])
	}
	names := map[string]bool{}
	for _, r := range d.Readings {
		names[r.Point.Shows] = true
	}
	for _, want := range []string{"Joined supplies", "Battery rail", "Pilot anode", "Black"} {
		if !names[want] {
			t.Errorf("no reading of %s", want)
		}
	}
}

// TestPartsKeepLabels adds a part before the others: they keep their designations.
func TestPartsKeepLabels(t *testing.T) {
	before := bench{stages: standby, from: "transfer.break", lit: "outage", parts: everyPart}
	c := stage.Expand(before.site(t))
	kept := c.Label(nil)
	more := before
	more.parts = strings.Replace(everyPart, "parts:\n", "parts:\n  - {name: first, kind: resistor, value: 2 kΩ, pins: {1: guard.out, 2: minus}}\n", 1)
	again := stage.Expand(more.site(t)).Label(kept)
	for key, label := range kept {
		if again[key] != label && !strings.HasPrefix(key, "wire/rail/") {
			t.Errorf("%s was %s and is %s", key, label, again[key])
		}
	}
}

// TestPartsRefused: what cannot be built as described says so and names the part.
func TestPartsRefused(t *testing.T) {
	for what, parts := range map[string]string{
		"relay nobody":         "parts:\n  - {name: x, kind: contact, of: nobody, pins: {1: guard.out, 2: q}}\n  - {name: y, kind: resistor, value: 1 kΩ, pins: {1: q, 2: minus}}",
		"both pins on one net": "parts:\n  - {name: x, kind: resistor, value: 1 kΩ, pins: {1: guard.out, 2: guard.out}}",
		"net transfer.coil":    "parts:\n  - {name: x, kind: resistor, value: 1 kΩ, pins: {1: transfer.coil, 2: minus}}",
		"on the net loose":     "parts:\n  - {name: x, kind: resistor, value: 1 kΩ, pins: {1: guard.out, 2: loose}}",
		"so many parts": func() string {
			s := "parts:\n"
			for i := range 12 {
				s += fmt.Sprintf("  - {name: p%d, kind: resistor, value: 1 kΩ, pins: {1: n%d, 2: n%d}}\n", i, i, i+1)
			}
			return strings.NewReplacer("1: n0,", "1: guard.out,", "2: n12}", "2: minus}").Replace(s)
		}(),
		"the net nowhere":      "test_points:\n  - {name: x, at: nowhere}",
		"the capacitor stands": "parts:\n  - {name: x, kind: capacitor, value: 1 µF, stands: 10 V, pins: {1: guard.out, 2: minus}}",
	} {
		d := design1(t, bench{stages: standby, from: "transfer.break", lit: "outage", parts: parts}.site(t))
		if !strings.Contains(strings.Join(d.stops(), "\n"), what) {
			t.Errorf("%s: stops are %v", what, d.stops())
		}
	}
}

// TestPartsSketch draws random networks of parts between the rails: series, parallel,
// bridges, contacts. The sketch connects exactly what the circuit connects and stays
// within its frame.
func TestPartsSketch(t *testing.T) {
	base := bench{stages: standby, from: "transfer.break", lit: "outage"}
	rapid.Check(t, func(rt *rapid.T) {
		nets := []string{"guard.out", "store.plus", "presence.out", "minus", "a", "b", "c", "d"}[:rapid.IntRange(4, 8).Draw(rt, "nets")]
		var b strings.Builder
		b.WriteString("parts:\n  - {name: k, kind: relay, rated: 12 V, pins: {A1: guard.out, A2: minus}}\n")
		n := rapid.IntRange(1, 10).Draw(rt, "parts")
		for i := range n {
			p := rapid.SampledFrom(nets).Draw(rt, "from")
			q := rapid.SampledFrom(nets).Draw(rt, "to")
			kind := rapid.SampledFrom([]string{"resistor, value: 1 kΩ", "diode", "contact, of: k", "contact, of: k, is: break", "fuse, rating: 1 A", "capacitor, value: 1 µF, polarised: yes", "terminal"}).Draw(rt, "kind")
			switch {
			case kind == "terminal":
				fmt.Fprintf(&b, "  - {name: p%d, kind: terminal, pins: {1: %s}}\n", i, p)
			case kind == "diode":
				fmt.Fprintf(&b, "  - {name: p%d, kind: diode, pins: {A: %s, K: %s}}\n", i, p, q)
			default:
				fmt.Fprintf(&b, "  - {name: p%d, kind: %s, pins: {1: %s, 2: %s}}\n", i, kind, p, q)
			}
		}
		if rapid.Bool().Draw(rt, "probe") {
			fmt.Fprintf(&b, "test_points:\n  - {name: probe, at: %s}\n", rapid.SampledFrom(nets[:4]).Draw(rt, "at"))
		}
		site := base
		site.parts = b.String()
		c := stage.Expand(site.site(t))
		c.Label(nil)
		holdsSketch(t, c)
		if t.Failed() {
			rt.Fatalf("drawn wrongly:\n%s", b.String())
		}
		drawn := map[string]bool{}
		for _, st := range c.Stages {
			if st.Sketch == nil {
				continue
			}
			for _, it := range st.Sketch.Items {
				if it.Part != nil {
					drawn[it.Part.Key] = true
				}
			}
		}
		for _, p := range c.Parts {
			if strings.HasPrefix(p.Key, "parts/") && p.Kind != circuit.Terminal && !drawn[p.Key] {
				rt.Fatalf("%s is not drawn:\n%s", p.Key, b.String())
			}
		}
	})
}
