package network

import (
	"fmt"
	"testing"
)

// What a fitter finds with a meter (common practice, no source).

// linearCharger is an adjustable regulator with a resistor in its output-impedance
// position, a set ratio of 9.9 that gives 13.75 V, and a blocking Schottky diode, on
// a 12 V battery.
func linearCharger(impedance, battery float64) string {
	return fmt.Sprintf(`
T1 transformer-supply raw 0 rated_volt=16 rated_ampere=1 open_volt=22
U1 regulator raw out adj
R1 resistor out x ohm=%g
R2 resistor x adj ohm=240
R3 resistor adj 0 ohm=2377
D1 schottky x bat
G1 battery bat 0 emf=%g ohm=0.03`, impedance, battery)
}

func TestLinearChargerIntoBattery(t *testing.T) {
	for _, tc := range []struct{ impedance, low, high float64 }{{0.33, 0.25, 0.34}, {0.2, 0.35, 0.45}} {
		c := compile(t, linearCharger(tc.impedance, 12.49))
		s := c.solve(Environment{Mains: 1}, nil)
		near(t, "battery", c.volt(s, "bat"), 12.5, 0.02)
		if i := s.Current("G1"); i < tc.low || i > tc.high {
			t.Errorf("%g Ω: %.3f A into the battery, want %g A to %g A", tc.impedance, i, tc.low, tc.high)
		}
	}
}

// A Schottky diode drops 0.15 V to 0.2 V near the end of charge.
func TestBlockingDiodeNearEndOfCharge(t *testing.T) {
	for _, i := range []float64{0.01, 0.02, 0.03} {
		c := compile(t, fmt.Sprintf("V1 source a 0 volt=100 ohm=%g\nD1 schottky a 0", 100/i))
		if v := c.volt(c.solve(Environment{}, nil), "a"); v < 0.15 || v > 0.2 {
			t.Errorf("%g A: %.3f V", i, v)
		}
	}
}

// Without mains the charger does not let the battery go back through its regulator:
// only the set divider before the diode and the leak of the diode are left.
func TestLinearChargerBlocksBackFeed(t *testing.T) {
	c := compile(t, linearCharger(0.33, 12.6))
	if i := c.solve(Environment{}, nil).Current("G1"); i > 0 || i < -1e-3 {
		t.Errorf("battery gives %g A", -i)
	}
}

// An unregulated 12 V 0.5 A supply stands at 18 V to 20 V unloaded and at 12 V
// loaded; high and low mains move it in proportion.
func TestUnregulatedSupply(t *testing.T) {
	text := "T1 transformer-supply a 0 rated_volt=12 rated_ampere=0.5 open_volt=19\n"
	c := compile(t, text)
	near(t, "unloaded", c.volt(c.solve(Environment{Mains: 1}, nil), "a"), 19, 0.1)
	near(t, "unloaded, mains 10 % high", c.volt(c.solve(Environment{Mains: 1.1}, nil), "a"), 20.9, 0.1)
	near(t, "mains off", c.volt(c.solve(Environment{}, nil), "a"), 0, 1e-9)
	c = compile(t, text+"R1 resistor a 0 ohm=24")
	near(t, "loaded", c.volt(c.solve(Environment{Mains: 1}, nil), "a"), 12, 0.05)
}

// A cadmium-sulphide cell runs from a few hundred ohms in bright light to 2 or 3
// megohms in the dark.
func TestPhotoresistor(t *testing.T) {
	p := lawful(t, ldrModel)
	if r := ldrOhm(p, 10000); r < 100 || r > 999 {
		t.Errorf("bright: %g Ω", r)
	}
	if r := ldrOhm(p, 0); r < 2e6 || r > 3e6 {
		t.Errorf("dark: %g Ω", r)
	}
	// 8 kΩ to 20 kΩ at 10 lx (5 mm class, published summary, seen).
	if r := ldrOhm(p, 10); r < 8e3 || r > 20e3 {
		t.Errorf("10 lx: %g Ω", r)
	}
}

// comparatorCell is a photocell of discrete parts: divider of cell and resistor,
// reference with preset, comparator with hysteresis, PNP driver, relay coil.
const comparatorCell = `
G1 battery p 0 emf=12.8 ohm=0.03
B1 ldr p light
R1 resistor light 0 ohm=10000~0.01
R2 resistor p ref ohm=47000~0.01
R3 resistor ref 0 ohm=33000~0.01
R4 resistor ref in ohm=10000~0.01
R5 resistor in out ohm=220000~0.05
A1 comparator in light out p 0
R6 resistor out base ohm=4700~0.05
R7 resistor p base ohm=10000~0.05
Q1 pnp base coil p bf=150
K1 coil coil 0 ohm=400 pickup_volt=9 dropout_volt=1.2
D1 diode 0 coil
`

// The photocell comes on and goes off at two illuminances that a hand calculation
// of its dividers gives as well.
func TestComparatorThresholds(t *testing.T) {
	c := compile(t, comparatorCell)
	at := func(lx float64) Environment { return Environment{Lux: lx} }
	down, err := c.Threshold(Sweep{From: 1000, To: 0.01, Geometric: true, Set: at, Watch: []string{"K1"}}, nil)
	if err != nil {
		t.Fatal(err)
	}
	if !down.Found || down.Before.State["K1"] != true || down.After.State["K1"] != false {
		t.Fatalf("going dark: %+v", down)
	}
	up, err := c.Threshold(Sweep{From: down.At, To: 1000, Geometric: true, Set: at, Watch: []string{"K1"}}, down.After.State)
	if err != nil {
		t.Fatal(err)
	}
	if !up.Found || up.At < 1.05*down.At || up.At > 3*down.At {
		t.Fatalf("dark below %.3g lx, light above %.3g lx", down.At, up.At)
	}
	// By hand, in the light: the output conducts and pulls the input down through R5,
	// so that the reference of R2 ∥ R3 behind R4 is compared with the light divider.
	v := c.volt(down.Before, "p")
	outLow := c.volt(down.Before, "out")
	thevenin, rt := v*33/80, 47e3*33e3/80e3
	low := thevenin + (outLow-thevenin)*(rt+10e3)/(rt+10e3+220e3)
	cell := 10e3 * (v/low - 1) // resistance of the cell at which light and reference agree
	lx := 10 * pow(14e3/cell, 1/0.7)
	near(t, "dark below, against the hand calculation", down.At/lx, 1, 0.01)
	outHigh := c.volt(up.Before, "out")
	high := thevenin + (outHigh-thevenin)*(rt+10e3)/(rt+10e3+220e3)
	cell = 10e3 * (v/high - 1)
	lx = 10 * pow(14e3/cell, 1/0.7)
	near(t, "light above, against the hand calculation", up.At/lx, 1, 0.01)
}

// The cut-off opens at its own sense point; at the battery the voltage is higher by
// the drop between.
func TestCutOffReadAtBatteryAndSense(t *testing.T) {
	c := compile(t, `
G1 battery bat 0 emf=12.6 ohm=0.05
W1 conductor bat sense ohm=0.06
Q1 cut-off sense out 0 opens_volt=10.5 recloses_volt=12.5
R1 resistor out 0 ohm=5`)
	emf := func(v float64) Environment { return Environment{}.Set("G1", "emf", v) }
	opens, err := c.Threshold(Sweep{From: 12.6, To: 9, Set: emf}, nil)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "sense when it opens", c.volt(opens.Before, "sense"), 10.5, 1e-4)
	// 10.5 V over 5.01 Ω behind the cut-off, 0.06 Ω before it.
	near(t, "battery when it opens", c.volt(opens.Before, "bat"), 10.5+10.5/5.01*0.06, 1e-3)
	closes, err := c.Threshold(Sweep{From: opens.At, To: 14, Set: emf}, opens.After.State)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "sense when it recloses, without load", c.volt(closes.Before, "sense"), 12.5, 1e-4)
}

// A hot coil needs more voltage: copper at 70 °C has 1.1965 times its resistance at
// 20 °C (IEC 60028 coefficient), and the lowest mains that holds it rises with it.
func TestHotCoilPickUp(t *testing.T) {
	c := compile(t, `
T1 transformer-supply a 0 rated_volt=12 rated_ampere=0.5 open_volt=19
K1 coil a 0 ohm=300 pickup_volt=9 dropout_volt=1.2`)
	low := func(celsius float64) float64 {
		th, err := c.Threshold(Sweep{From: 0.05, To: 1, Set: func(x float64) Environment {
			return Environment{Mains: x}.Set("K1", "celsius", celsius)
		}}, nil)
		if err != nil || !th.Found {
			t.Fatal(th, err)
		}
		near(t, fmt.Sprintf("coil voltage at pick-up, %g °C", celsius), c.volt(th.After, "a"), 9*(1+0.00393*(celsius-20)), 1e-3)
		return th.At
	}
	if cold, hot := low(20), low(70); hot < cold*1.15 {
		t.Errorf("mains for pick-up: cold %.3f, hot %.3f of nominal", cold, hot)
	}
}
