package stage_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/stage"
	"pgregory.net/rapid"
)

const linear = "raw: {kind: transformer-supply, rated: 18 V 2 A, open: 22 V, mains: 230 V ± 10 %}\nfloat: {kind: linear-charger, from: raw, to: store"

// relayed keeps the lamps off the charger while mains is on.
const relayed = `
presence: {kind: regulated-supply, mains: 230 V ± 10 %}
transfer: {kind: changeover-relay, coil: presence, from: guard}
`

// linearBench is a site with a linear charger; fields are further fields of it.
func linearBench(t testing.TB, fields string) sized {
	t.Helper()
	return bench{stages: linear + fields + "}" + relayed, from: "transfer.break", lit: "outage", battery: ", capacity: 7 Ah"}.design(t)
}

// TestTrimmerReaches puts the worst parts of their tolerances into the solved circuit:
// reference 1.20 V to 1.30 V (datasheet), set resistors 1 %, trimmer 20 %. Turned to its
// ends, the trimmer passes the float voltage at the coldest and at the hottest battery.
func TestTrimmerReaches(t *testing.T) {
	d := linearBench(t, "")
	u, r1 := d.part(t, "float/regulator").Designation, d.part(t, "float/set-upper").Designation
	r2, trim := d.part(t, "float/set-lower").Designation, d.part(t, "float/trimmer").Designation
	upper, fixed, track := d.value(t, "float/set-upper", "resistance"), d.value(t, "float/set-lower", "resistance"), d.value(t, "float/trimmer", "resistance")
	set := func(vref, iadj, up, low, pot float64) float64 {
		env := network.Environment{Mains: 1, Charge: network.Float}.
			Set(u, "vref", vref).Set(u, "iadj", iadj).Set(r1, "ohm", upper*up).Set(r2, "ohm", fixed*low).Set(trim, "ohm", pot)
		env = env.With(network.Override{Element: d.Battery.Part.Designation, Open: true})
		s, err := d.net.Solve(env, nil)
		if err != nil {
			t.Fatal(err)
		}
		return d.volts(t, s, "float/fuse", "1")
	}
	cold := float64(d.Charger.Float) + 6*0.003*10 // 15 °C against 25 °C at 3 mV a cell and kelvin
	if v := set(1.30, 100e-6, 0.99, 1.01, 0); v > float64(d.Charger.Float) {
		t.Errorf("with the parts that give most the trimmer comes down to %.2f V only", v)
	}
	if v := set(1.20, 0, 1.01, 0.99, track*0.8); v < cold {
		t.Errorf("with the parts that give least the trimmer reaches %.2f V, the coldest battery asks for %.2f V", v, cold)
	}
}

// TestLinearChargerLimits finds the current into an empty battery in the solved circuit
// and holds it against regulator, supply and battery.
func TestLinearChargerLimits(t *testing.T) {
	d := linearBench(t, "")
	empty := 6 * 1.95
	s := d.solve(t, network.Environment{Mains: 1.1, Charge: network.Float}, empty, nil)
	i := s.Current(d.part(t, "float/impedance").Designation)
	near(t, "current into an empty battery", i, float64(d.Charger.Current), 0.1) // battery, fuse and wires take their part
	within(t, "the same", i, 0.1, min(1.5, 0.25*7, 2))
	u := d.part(t, "float/regulator")
	heat := (d.volts(t, s, u.Key, "IN") - d.volts(t, s, u.Key, "OUT")) * i
	if limit := d.figure(t, "float/regulator", "heat at highest mains, empty battery"); heat > limit*1.001 {
		t.Errorf("regulator gives off %.2f W, the working says %.2f W", heat, limit)
	}
	// Junction at 30 °C with the heat sink as bought, 5 K/W to the case and 1.5 K/W to the
	// sink (datasheet and common practice): within 125 °C.
	if tj := 30 + heat*(5+1.5+d.value(t, "float/regulator", "sink")); tj > 125 {
		t.Errorf("junction at %.0f °C", tj)
	}
	low := d.solve(t, network.Environment{Mains: 0.9, Charge: network.Float}, float64(d.Charger.Float), nil)
	if h := d.volts(t, low, u.Key, "IN") - d.volts(t, low, u.Key, "OUT"); h < 2.5 {
		t.Errorf("headroom %.2f V at lowest mains", h)
	}
}

// TestLinearChargerRefusals: too weak a supply, too small a resistor.
func TestLinearChargerRefusals(t *testing.T) {
	for what, stages := range map[string]string{
		"headroom": strings.Replace(linear, "18 V 2 A, open: 22 V", "12 V 0.5 A, open: 18 V", 1) + "}",
		"empty":    linear + ", impedance: 0.05 Ω}",
	} {
		d := bench{stages: stages}.design(t)
		if !strings.Contains(strings.Join(d.stops(), "\n"), what) {
			t.Errorf("%s: %v", what, d.stops())
		}
	}
}

// TestChargerTradeFacts holds a 12 V charger of this kind, set to 13.75 V before the
// diode, to figures of the trade (a quarter to a third of an ampere, about 0.4 A): common
// practice, no source.
func TestChargerTradeFacts(t *testing.T) {
	into := func(rs string) float64 {
		d := linearBench(t, ", float: 13.5 V, impedance: "+rs)
		near(t, "setting before the diode", d.figure(t, "float/regulator", "setting before the diode"), 13.75, 0.01)
		ratio := (d.value(t, "float/set-lower", "resistance") + d.value(t, "float/trimmer", "setting")) / d.value(t, "float/set-upper", "resistance")
		near(t, "set ratio", ratio, 10, 0.05)
		s := d.solve(t, network.Environment{Mains: 1, Charge: network.Float}, 12.5, nil)
		return s.Current(d.Battery.Part.Designation)
	}
	within(t, "current into a battery at 12.5 V with 0.33 Ω", into("0.33 Ω"), 0.24, 0.34)
	near(t, "current into a battery at 12.5 V with 0.2 Ω", into("0.2 Ω"), 0.4, 0.15)
}

// TestBlocking sees that nothing flows back into a dead charger.
func TestBlocking(t *testing.T) {
	d := linearBench(t, "")
	s := d.solve(t, network.Environment{}, 12.8, nil)
	if i := s.Current(d.part(t, "float/blocking").Designation); i > 0 || i < -1e-3 {
		t.Errorf("%.3g mA flow back", i*1e3)
	}
}

// TestOddSupplies sizes supplies, chargers and feeds of any values that the fields take:
// sizing comes to an end, and every working that it keeps is a number.
func TestOddSupplies(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		pick := func(name string, list ...string) string { return rapid.SampledFrom(list).Draw(rt, name) }
		stages := fmt.Sprintf(`
raw:      {kind: transformer-supply, rated: %s %s, open: %s, mains: 230 V ± %s}
float:    {kind: linear-charger, from: raw, to: store%s}
steady:   {kind: shunt-regulator, from: %s%s}
dusk:     {kind: photocell, built: %s, from: guard, holds: transfer, dark_below: %s%s}
transfer: {kind: changeover-relay, coil: steady, from: guard%s}
`,
			pick("volt", "1 V", "12 V", "18 V", "40 V"), pick("ampere", "1 mA", "0.5 A", "2 A", "50 A"), pick("open", "1 V", "17 V", "22 V", "60 V"), pick("mains", "0 %", "10 %", "20 %"),
			pick("charger", "", ", impedance: 0.05 Ω", ", impedance: 10 Ω", ", float: 12 V", ", float: 16 V"),
			pick("from", "raw", "guard"), pick("volts", "", ", volts: 10 V", ", volts: 11 V", ", dropper: 1 Ω", ", dropper: 100 kΩ"),
			pick("built", "follower", "comparator", "module"), pick("dark", "0.1 lx", "10 lx", "2000 lx"), pick("light", "", ", light_above: 20 lx", ", light_above: 5000 lx"),
			pick("coil", "", ", coil_resistance: 1 Ω", ", coil_resistance: 100 kΩ"))
		nominal := pick("nominal", "12 V", "24 V", "48 V")
		site := bench{stages: stages, nominal: nominal, lamp: "{kind: resistive, rated: " + nominal + ", power: 5 W}", from: "transfer.break", lit: "outage-night"}.site(t)
		c := stage.Expand(site)
		c.Label(nil)
		f := &facts.Facts{Site: site, Circuit: c}
		stage.Size(site, c, f, stage.Reserve{})
		for _, w := range f.Workings {
			if math.IsNaN(w.Value) || math.IsInf(w.Value, 0) && w.Name != "opens within" { // a fuse may never open
				rt.Fatalf("%s, %s is no number: %s", w.For, w.Name, w.Substituted)
			}
		}
		if _, err := network.New(c.Resolve()); err != nil {
			rt.Fatal(err)
		}
	})
}
