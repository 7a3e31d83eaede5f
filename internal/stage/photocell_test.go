package stage_test

import (
	"fmt"
	"strings"
	"testing"

	"gloamwright/internal/quantity"
)

// TestComparatorThresholds sweeps the solved circuit up and down: the lights come on
// and go off within 5 % of what the example asks for, 10 lx and, left out, 14 lx.
func TestComparatorThresholds(t *testing.T) {
	d := design1(t, example(t, "bracken-reach"))
	near(t, "dark threshold", threshold(t, d.Thresholds, "dark"), 10, 0.05)
	near(t, "light threshold", threshold(t, d.Thresholds, "light"), 14, 0.05)
}

// TestComparatorSettings sweeps other pairs of thresholds.
func TestComparatorSettings(t *testing.T) {
	for _, x := range []struct{ dark, light quantity.Lux }{{1, 2}, {3, 3.6}, {10, 50}, {40, 60}, {150, 240}} {
		t.Run(fmt.Sprintf("%v to %v", x.dark, x.light), func(t *testing.T) {
			site := example(t, "bracken-reach")
			for _, s := range site.Stages {
				if s.Kind.Val == "photocell" {
					setField(s, "dark_below", x.dark)
					setField(s, "light_above", x.light)
				}
			}
			d := design1(t, site)
			near(t, "dark threshold", threshold(t, d.Thresholds, "dark"), float64(x.dark), 0.05)
			near(t, "light threshold", threshold(t, d.Thresholds, "light"), float64(x.light), 0.05)
		})
	}
}

// TestComparatorPreset turns the preset from end to end with the cells of the class
// that conduct most and least: the dark threshold is reached with either.
func TestComparatorPreset(t *testing.T) {
	d := design1(t, example(t, "bracken-reach"))
	upper, lower := d.value(t, "dusk/upper", "resistance"), d.value(t, "dusk/lower", "resistance")
	track, load := d.value(t, "dusk/set", "resistance")*0.8, d.value(t, "dusk/light", "resistance")
	least, most := lower/(upper+track+lower), (lower+track)/(upper+track+lower)
	// 8 kΩ and 20 kΩ at 10 lx are the ends of the class. The + input stands a little
	// nearer to L− than the wiper: by the share of the hysteresis resistor.
	source := d.figure(t, "dusk/comparator", "source of the reference")
	share := source / (source + d.value(t, "dusk/hysteresis", "resistance"))
	for _, cell := range []float64{8e3, 20e3} {
		want := load / (load + cell) / (1 - share)
		if want < least || want > most {
			t.Errorf("a cell of %.0f Ω asks for %.3f of the supply, the preset reaches %.3f to %.3f", cell, want, least, most)
		}
	}
}

// TestComparatorRefusals refuses thresholds the wrong way round, and a cell that would
// get too hot.
func TestComparatorRefusals(t *testing.T) {
	for _, x := range []struct {
		dark, light quantity.Lux
		want        string
	}{{10, 8, "light"}, {1500, 1900, "light resistor"}} {
		site := example(t, "bracken-reach")
		for _, s := range site.Stages {
			if s.Kind.Val == "photocell" {
				setField(s, "dark_below", x.dark)
				setField(s, "light_above", x.light)
			}
		}
		d := design1(t, site)
		if !strings.Contains(strings.Join(d.stops(), "\n"), x.want) {
			t.Errorf("%v to %v: %v", x.dark, x.light, d.stops())
		}
	}
}

// TestDriver sees that the transistor saturates by day and is shut by night.
func TestDriver(t *testing.T) {
	d := design1(t, example(t, "bracken-reach"))
	for i, c := range d.Conditions {
		if c.Key != "outage-day" && c.Key != "outage-night" && c.Key != "end-day" {
			continue
		}
		q := d.part(t, "dusk/driver")
		ec := float64(d.Conditions[i].Volts[q.Pin("E").Net] - d.Conditions[i].Volts[q.Pin("C").Net])
		switch {
		case c.Dark && ec < 24:
			t.Errorf("%s: %.2f V across the transistor, it is not shut", c.Key, ec)
		case !c.Dark && ec > 0.4: // 2N2907A, JEDEC registration: 0.4 V at most at 150 mA
			t.Errorf("%s: %.2f V across the transistor, it does not saturate", c.Key, ec)
		}
	}
}

// TestFollowerThresholds sweeps the follower: dark as asked, light where the working
// says.
func TestFollowerThresholds(t *testing.T) {
	for _, dark := range []string{"2 lx", "5 lx", "10 lx"} {
		d := bench{stages: standby + "dusk: {kind: photocell, built: follower, from: guard, holds: transfer, dark_below: " + dark + "}", from: "transfer.break", lit: "outage-night"}.design(t)
		want, err := quantity.Parse[quantity.Lux](dark)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "dark threshold", threshold(t, d.Thresholds, "dark"), float64(want), 0.10)
		near(t, "light threshold", threshold(t, d.Thresholds, "light"), d.figure(t, "dusk/driver", "light again above"), 0.10)
	}
}

// TestFollowerRefusal says that a follower cannot switch as close as a comparator.
func TestFollowerRefusal(t *testing.T) {
	d := bench{stages: standby + "dusk: {kind: photocell, built: follower, from: guard, holds: transfer, dark_below: 5 lx, light_above: 7 lx}", from: "transfer.break", lit: "outage-night"}.design(t)
	if !strings.Contains(strings.Join(d.stops(), "\n"), "picks up again") {
		t.Errorf("light_above 7 lx passes: %v", d.stops())
	}
}
