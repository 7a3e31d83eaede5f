package network

import "testing"

// site is a small complete site: packaged charger, battery, cut-off, changeover
// relay held by a supply or by a twilight switch, two lamps on one circuit.
const site = `
T1 charger chg 0 float_volt=27.2 boost_volt=28.8 limit_ampere=3 standby_ampere=0.005
F2 fuse chg bat
G1 battery cell 0 emf=25.6 ohm=0.02
F1 fuse cell bat
Q1 cut-off bat load 0 opens_volt=21 recloses_volt=25 own_ampere=0.008
T2 supply aux 0 volt=24 limit_ampere=0.5
D1 diode aux coil
P1 photoswitch load 0 load eye dark_below_lx=10 light_above_lx=14 own_ampere=0.01
D2 diode eye coil
K1 coil coil 0 ohm=660 pickup_volt=18 dropout_volt=2.4
K1c contact load board by=K1 rest_closed=1
F3 fuse board way
W1 conductor way lamp1+ ohm=0.11
W1m conductor 0 lamp1- ohm=0.11
E1 constant-power lamp1+ lamp1- watt=6 low_volt=18 high_volt=32
W2 conductor lamp1+ lamp2+ ohm=0.05
W2m conductor lamp1- lamp2- ohm=0.05
E2 constant-power lamp2+ lamp2- watt=6 low_volt=18 high_volt=32
`

func TestSiteInItsConditions(t *testing.T) {
	c := compile(t, site)
	night := c.solve(Environment{Name: "outage night"}, nil)
	if night.State["K1"] {
		t.Error("outage at night: relay is held")
	}
	if v := c.volt(night, "lamp2+") - c.volt(night, "lamp2-"); v < 24.9 || v > 25.6 {
		t.Errorf("outage at night: lamp has %.3f V", v)
	}
	near(t, "lamp power", night.Power("E2"), 6, 0.001)
	if i := night.Current("G1"); i > -0.48 || i < -0.55 {
		t.Errorf("battery current %.3f A", i)
	}

	day := c.solve(Environment{Name: "outage day", Lux: 1000}, night.State)
	if !day.State["K1"] || !day.State["P1"] {
		t.Errorf("outage by day: %v", day.State)
	}
	near(t, "board by day", c.volt(day, "board"), 0, 1e-6)

	mains := c.solve(Environment{Name: "mains night", Mains: 1, Charge: Float}, night.State)
	if !mains.State["K1"] {
		t.Error("mains: relay is not held")
	}
	// 27.2 V behind 10 mΩ, battery 25.6 V behind 20 mΩ: the limit of 3 A acts.
	near(t, "charging current", mains.Current("T1"), -3, 0.03)
	if mains.Residual > MaxResidual {
		t.Errorf("residual %g", mains.Residual)
	}

	// Dusk is darker going down than coming up.
	dim := Environment{Name: "dusk", Lux: 12}
	if s := c.solve(dim, day.State); !s.State["P1"] {
		t.Error("12 lx coming from day: already dark")
	}
	if s := c.solve(dim, night.State); s.State["P1"] {
		t.Error("12 lx coming from night: already light")
	}

	// The cut-off opens on an empty battery and stays open when its voltage recovers.
	empty := c.solve(Environment{Name: "empty"}.Set("G1", "emf", 20.9), night.State)
	if empty.State["Q1"] {
		t.Error("empty: cut-off is closed")
	}
	rest := c.solve(Environment{Name: "recovered"}.Set("G1", "emf", 23), empty.State)
	if rest.State["Q1"] {
		t.Error("recovered to 23 V: cut-off has closed")
	}
	full := c.solve(Environment{Name: "recharged"}.Set("G1", "emf", 25.6), rest.State)
	if !full.State["Q1"] {
		t.Error("25.6 V: cut-off is open")
	}
}
