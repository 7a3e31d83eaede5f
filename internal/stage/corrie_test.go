package stage_test

import (
	"slices"
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/network"
)

// TestCorrieBothy designs the example of discrete electronics: no stop finding, and
// every circuit lit in an outage in the dark and only then.
func TestCorrieBothy(t *testing.T) {
	d := design1(t, example(t, "corrie-bothy"))
	d.noStops(t)
	holdsSketch(t, d.Circuit)
	for _, c := range d.Conditions {
		all := len(c.Lit) == len(d.Site.Circuits)
		want := c.MainsV == 0 && c.Dark && c.Battery != "cut off"
		if want && !all || !want && len(c.Lit) > 0 {
			t.Errorf("%s: lit are %v", c.Key, c.Lit)
		}
		if c.Residual > 1e-9 {
			t.Errorf("%s: residual %g A", c.Key, c.Residual)
		}
	}
	near(t, "dark threshold", threshold(t, d.Thresholds, "dark"), 8, 0.05)
	near(t, "light threshold", threshold(t, d.Thresholds, "light"), 8*1.4, 0.05)
}

// TestCorrieTradeFacts holds the example to figures of the trade: common practice, no
// source.
func TestCorrieTradeFacts(t *testing.T) {
	d := design1(t, example(t, "corrie-bothy"))
	i := slices.IndexFunc(d.Conditions, func(c *facts.Condition) bool { return c.Key == "mains-night" })
	night := d.Conditions[i]
	at := func(key, pin string) float64 { return float64(night.Volts[d.part(t, key).Pin(pin).Net]) }
	within(t, "float voltage at the battery", float64(night.BatteryV), 13.65, 13.85)
	within(t, "drop of the blocking diode near the end of charge", at("float/blocking", "A")-at("float/blocking", "K"), 0.15, 0.2)
	within(t, "cut-off", d.value(t, "guard/cut-off", "opens"), 10.3, 10.7)
	// A cadmium-sulphide cell: a few hundred ohms in bright light, 2 or 3 MΩ in the dark.
	cell := d.part(t, "dusk/sensor")
	ohm := func(lux float64) float64 {
		s := d.solve(t, network.Environment{Lux: lux}, 12.8, nil)
		return (s.Volts[cell.Pin("1").Net] - s.Volts[cell.Pin("2").Net]) / s.Current(cell.Designation)
	}
	within(t, "cell in bright light", ohm(10000), 100, 500)
	within(t, "cell in the dark", ohm(0), 1.9e6, 3.1e6)
}
