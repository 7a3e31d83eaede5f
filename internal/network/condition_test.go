package network

import (
	"errors"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
)

// A photocell of the follower kind: cell and resistor move the base of an emitter
// follower that holds the coil.
const follower = `
G1 battery p 0 emf=12.6 ohm=0.03
B1 ldr p base rmin=200
R1 resistor base 0 ohm=22000
Q1 npn base p coil bf=200
Q2 npn coil p relay bf=100 is=1e-13
K1 coil relay 0 ohm=400 pickup_volt=9 dropout_volt=1.2
D1 diode 0 relay
K1c contact p lamp by=K1 rest_closed=1
E1 filament lamp 0 rated_volt=12 rated_watt=10
`

func TestFollowerPhotocell(t *testing.T) {
	c := compile(t, follower)
	at := func(lx float64) Environment { return Environment{Lux: lx} }
	day := c.solve(at(2000), nil)
	if !day.State["K1"] || c.volt(day, "lamp") > 0.01 {
		t.Fatalf("by day: relay %v, lamp at %g V", day.State["K1"], c.volt(day, "lamp"))
	}
	down, err := c.Threshold(Sweep{From: 2000, To: 0.01, Geometric: true, Set: at}, day.State)
	if err != nil {
		t.Fatal(err)
	}
	up, err := c.Threshold(Sweep{From: down.At, To: 2000, Geometric: true, Set: at}, down.After.State)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "coil when it lets go", c.volt(down.Before, "relay"), 1.2, 1e-3)
	near(t, "coil when it picks up", c.volt(up.Before, "relay"), 9, 1e-3)
	// A follower has all the hysteresis of its coil and none of its own: wide.
	if up.At < 5*down.At {
		t.Errorf("dark at %.3g lx, light at %.3g lx", down.At, up.At)
	}
}

func TestStuckParts(t *testing.T) {
	c := compile(t, site)
	held, dropped := true, false
	night := c.solve(Environment{}.With(Override{Element: "K1", Stuck: &held}), nil)
	if !night.State["K1"] || c.volt(night, "board") > 0.01 {
		t.Error("a relay stuck in lights its board")
	}
	day := c.solve(Environment{Lux: 1000}.With(Override{Element: "P1", Stuck: &dropped}), nil)
	if day.State["K1"] || c.volt(day, "board") < 24 {
		t.Error("a twilight switch stuck dark does not light its board by day")
	}
	dark := c.solve(Environment{Lux: 1000}.With(Override{Element: "P1", Params: []circuit.Param{{Name: "lux", Value: 0}}}), nil)
	if dark.State["P1"] {
		t.Error("a covered eye sees light")
	}
}

func TestBadJointAndOpenDiode(t *testing.T) {
	c := compile(t, site)
	s := c.solve(Environment{}.Set("W1", "ohm", 0.61), nil)
	near(t, "drop over a joint of 0.5 Ω", c.volt(s, "way")-c.volt(s, "lamp1+"), 0.61*s.Current("W1"), 1e-9)
	open := c.solve(Environment{Mains: 1, Charge: Float}.With(Override{Element: "D1", Open: true}), nil)
	if open.State["K1"] {
		t.Error("the relay is held through an open diode")
	}
}

func TestConditionMistakes(t *testing.T) {
	c := compile(t, site)
	held := true
	for _, tc := range []struct {
		name string
		o    Override
		want string
	}{
		{"unknown element", Override{Element: "K7", Open: true}, `there is no such element`},
		{"unknown parameter", Override{Element: "W1", Params: []circuit.Param{{Name: "metre", Value: 1}}}, `has no parameter "metre"`},
		{"out of range", Override{Element: "G1", Params: []circuit.Param{{Name: "emf", Value: math.NaN()}}}, `out of range`},
		{"unknown pin", Override{Element: "Q1", Short: [2]string{"in", "exit"}}, `no pin "exit"`},
		{"nothing to stick", Override{Element: "W1", Stuck: &held}, `no position`},
		{"against each other", Override{Element: "Q1", Params: []circuit.Param{{Name: "opens_volt", Value: 30}}}, `recloses_volt must be above`},
	} {
		_, err := c.Solve(Environment{Name: "trial"}.With(tc.o), nil)
		var e *ElementError
		if !errors.As(err, &e) || !strings.Contains(err.Error(), tc.want) {
			t.Errorf("%s: got %v, want an *ElementError with %q", tc.name, err, tc.want)
		}
	}
	s := c.solve(Environment{}, nil)
	if _, err := s.Bands([]Output{Into("K7")}, Linear); err == nil {
		t.Error("a band of an element that is not there was given")
	}
	if _, err := s.Bands([]Output{Between(1, 1000)}, Linear); err == nil {
		t.Error("a band of a net that is not there was given")
	}
	if !math.IsNaN(s.Current("K7")) || !math.IsNaN(s.Power("K7")) || !math.IsNaN(s.PinCurrent("K1", "A3")) {
		t.Error("a current of what is not there is a number")
	}
}

// Setting one condition leaves the one it was made from alone.
func TestOverridesDoNotLeak(t *testing.T) {
	base := Environment{}.Set("G1", "emf", 24)
	a, b := base.Set("W1", "ohm", 1), base.Set("W1", "ohm", 2)
	if a.Overrides[1].Params[0].Value != 1 || b.Overrides[1].Params[0].Value != 2 || len(base.Overrides) != 1 {
		t.Error("conditions share their overrides")
	}
	c := compile(t, site)
	before := c.solve(Environment{}, nil)
	c.solve(base, nil)
	after := c.solve(Environment{}, nil)
	for i := range before.Volts {
		if before.Volts[i] != after.Volts[i] {
			t.Fatal("an override stays for the next condition")
		}
	}
}

// A relay that its own make contact feeds keeps what it had: both positions are at
// rest, and the state that it comes from decides.
func TestHoldingRelay(t *testing.T) {
	c := compile(t, `
G1 battery a 0 emf=12 ohm=0.05
S1 switch a b closed=0
K1c contact a b by=K1
K1 coil b 0 ohm=100 pickup_volt=8 dropout_volt=1.2`)
	if c.solve(Environment{}, nil).State["K1"] {
		t.Error("picked up by itself")
	}
	pressed := c.solve(Environment{}.Set("S1", "closed", 1), nil)
	released := c.solve(Environment{}, pressed.State)
	if !pressed.State["K1"] || !released.State["K1"] {
		t.Error("does not hold itself")
	}
}

// FuzzSolve: whatever the circuit and the condition, there is an error with a name or
// a solution that fulfils Kirchhoff's law.
func FuzzSolve(f *testing.F) {
	for seed := range uint64(20) {
		f.Add(seed, 1.0, 10.0)
	}
	f.Add(uint64(7), 0.0, 0.0)
	f.Add(uint64(8), 1.2, 1e5)
	f.Fuzz(func(t *testing.T, seed uint64, mains, lux float64) {
		if !(mains >= 0 && mains <= 2 && lux >= 0 && lux <= 1e6) {
			return
		}
		n, err := New(read(t, randomCircuit(rand.New(rand.NewPCG(seed, 51)))))
		if err != nil {
			var floating *FloatingError
			var loop *LoopError
			if !errors.As(err, &floating) && !errors.As(err, &loop) {
				t.Fatal(err)
			}
			return
		}
		s, err := n.Solve(Environment{Mains: mains, Lux: lux, Charge: ChargeStage(seed % 3)}, nil)
		var chatter *ChatterError
		if err != nil && !errors.As(err, &chatter) {
			t.Fatal(err)
		}
		if err == nil && !(s.Residual <= MaxResidual) {
			t.Fatalf("residual %g", s.Residual)
		}
	})
}
