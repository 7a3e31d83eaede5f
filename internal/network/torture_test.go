package network

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"
)

// Circuits that break careless solvers. Each must be solved from a cold start.
func TestTorture(t *testing.T) {
	cases := []struct {
		name, text string
		at         Environment
		check      func(t *testing.T, c circuitUnderTest, s *Solution)
	}{
		{"diodes back to back", `
V1 source a 0 volt=24 ohm=0
D1 diode a m
D2 diode b m
R1 resistor b 0 ohm=100`, Environment{}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			// Only the saturation current of the reversed one flows, 18.8 nA.
			near(t, "current", s.Current("R1"), 1.88e-8, 1e-10)
		}},
		{"diodes antiparallel without series resistance on an ideal source", `
V1 source a 0 volt=0.9 ohm=0
D1 diode a 0 rs=0 is=1e-14 n=1
D2 diode 0 a rs=0 is=1e-14 n=1`, Environment{}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			near(t, "current over Shockley's", s.Current("D1")/(1e-14*math.Expm1(0.9/VT25)), 1, 1e-9)
		}},
		{"hundred diodes in series", chain(100), Environment{}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			near(t, "first and last diode", c.volt(s, "n99"), c.volt(s, "n0")/100, 1e-7) // insulation carries 0.1 nA off
		}},
		{"Zener chain on a stiff source", `
V1 source a 0 volt=60 ohm=0.001
Z1 zener b a vz=12 iz=0.02 rz=0.5
Z2 zener c b vz=24 iz=0.01 rz=0
Z3 zener 0 c vz=15 iz=0.02 rz=9`, Environment{}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			if i := s.Current("V1"); i > -0.5 || i < -2 {
				t.Errorf("current %g A", i)
			}
		}},
		{"flip-flop of two transistors", `
V1 source v 0 volt=12 ohm=0.1
R1 resistor v c1 ohm=1000
R2 resistor v c2 ohm=1000
R3 resistor c1 b2 ohm=10000
R4 resistor c2 b1 ohm=10000
Q1 npn b1 c1 0
Q2 npn b2 c2 0`, Environment{}, nil},
		{"saturated Darlington", `
V1 source v 0 volt=24 ohm=0.01
R1 resistor v b ohm=1000
RL resistor v c ohm=10
Q1 npn b c e
Q2 npn e c 0 is=1e-12`, Environment{}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			if v := c.volt(s, "c"); v < 0.6 || v > 1.2 {
				t.Errorf("a saturated Darlington stands at one junction and a bit, got %g V", v)
			}
		}},
		{"supply into far too small a load", `
T1 supply p 0 volt=24 limit_ampere=0.5
R1 resistor p 0 ohm=0.05`, Environment{Mains: 1}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			near(t, "limit", s.Current("R1"), 0.5, 0.006)
		}},
		{"charger without its battery", `
T1 charger p 0 float_volt=13.7 limit_ampere=30 ohm=0.001
R1 resistor p 0 ohm=1000000`, Environment{Mains: 1, Charge: Float}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			near(t, "output", c.volt(s, "p"), 13.7, 0.01)
		}},
		{"charger against a stiffer one", `
T1 charger p 0 float_volt=13.7 limit_ampere=3 ohm=0.001
T2 charger p 0 float_volt=13.9 limit_ampere=1 ohm=0.001
G1 battery p 0 emf=12.6 ohm=0.01`, Environment{Mains: 1, Charge: Float}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			near(t, "both at their limits", s.Current("G1"), 4, 0.05)
		}},
		{"fuse open under everything", site, Environment{Overrides: []Override{{Element: "F1", Open: true}}}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			near(t, "dead rail", c.volt(s, "bat"), 0, 1e-3)
		}},
		{"short at the far end", site, Environment{Overrides: []Override{{Element: "E2", Short: [2]string{"+", "-"}}}}, func(t *testing.T, c circuitUnderTest, s *Solution) {
			// 25.6 V over battery, four cores, three fuses, contact, cut-off and the short.
			want := 25.6 / (0.02 + 2*0.11 + 2*0.05 + 2*fuseOhm + 2*contactOhm + ShortOhm)
			near(t, "short-circuit current", s.Current("F3"), want, 0.1)
		}},
		{"input bias into reversed LEDs", `
G0 battery n1 0 emf=25.6 ohm=0.0351
R7 resistor n7 0 ohm=180
X4 led-string n1 n2 forward_volt=3.1 series=3 strings=2 ohm=68 ampere=0.02
X7 comparator n2 n1 n5 n1 n7
R5 resistor n5 0 ohm=1800`, Environment{Mains: 1}, nil},
		{"loop of current that only a regulator ties to minus", `
G0 battery n1 0 emf=18.8 ohm=0.977
R2 resistor n2 n3 ohm=0.753
R3 resistor n3 n4 ohm=9340
R4 resistor n4 n2 ohm=38.5
R5 resistor n5 n2 ohm=67.3
X0 coil n5 n2 ohm=300 pickup_volt=9 dropout_volt=1.2
X1 suppressor n4 n3 vz=33
X2 charger n5 n4 - - float_volt=13.7 limit_ampere=2
X3 regulator 0 n3 n5`, Environment{Mains: 1, Charge: Float}, nil},
		{"lamp loads above their range on a stiff source", benchTree(2000), Environment{LoadFactor: 40}.Set("G1", "emf", 33), nil},
		{"battery the wrong way round", site, Environment{Mains: 1, Charge: Float}.Set("G1", "emf", -25.6), nil},
		{"mains far too low", site, Environment{Mains: 0.3, Charge: Boost}, nil},
		{"no mains, no light, no battery", site, Environment{}.With(Override{Element: "G1", Open: true}), nil},
	}
	for _, tc := range cases {
		t.Run(tc.name, func(t *testing.T) {
			c := compile(t, tc.text)
			s, err := c.Solve(tc.at, nil)
			if err != nil {
				t.Fatal(err)
			}
			if s.Residual > MaxResidual {
				t.Errorf("residual %g", s.Residual)
			}
			if tc.check != nil {
				tc.check(t, c, s)
			}
		})
	}
}

func chain(n int) string {
	var b strings.Builder
	b.WriteString("V1 source top 0 volt=60 ohm=0\nR0 resistor top n0 ohm=1000\n")
	for i := range n {
		next := fmt.Sprintf("n%d", i+1)
		if i == n-1 {
			next = "0"
		}
		fmt.Fprintf(&b, "D%d diode n%d %s rs=0\n", i, i, next)
	}
	return b.String()
}

// The regulator goes through its dropout without a gap or a jump.
func TestRegulatorThroughDropout(t *testing.T) {
	c := compile(t, `
V1 source in 0 volt=0 ohm=0.05
U1 regulator in out adj
R1 resistor out adj ohm=240
R2 resistor adj 0 ohm=2400
RL resistor out 0 ohm=27`)
	last := 0.0
	for v := 0.0; v <= 25; v += 0.02 {
		s, err := c.Solve(Environment{}.Set("V1", "volt", v), nil)
		if err != nil {
			t.Fatalf("%g V: %v", v, err)
		}
		out := c.volt(s, "out")
		if out < last-1e-9 || out > last+0.03 {
			t.Fatalf("at %g V in the output jumps from %g V to %g V", v, last, out)
		}
		last = out
	}
	near(t, "regulated", last, 13.75+50e-6*2400, 0.02)
}

// E²/4R is the most that a source gives (maximum power theorem); with all of it
// taken, half the voltage is left.
func TestConstantPowerNearCollapse(t *testing.T) {
	const emf, ohm = 24.0, 0.5
	most := emf * emf / (4 * ohm)
	c := compile(t, `
G1 battery a 0 emf=24 ohm=0.5
E1 constant-power a 0 watt=100 low_volt=2 high_volt=40`)
	for _, part := range []float64{0.5, 0.9, 0.99, 0.999, 0.9999, 0.99999} {
		s := c.solve(Environment{}.Set("E1", "watt", part*most), nil)
		// Upper root of v² − E·v + P·R = 0, and the load's leak of 1 MΩ beside it.
		want := emf/2 + math.Sqrt(emf*emf/4-part*most*ohm)
		near(t, fmt.Sprintf("%g of the most", part), c.volt(s, "a"), want, 1e-5+1e-5/math.Sqrt(1-part))
		if len(s.Starved) > 0 {
			t.Errorf("%g of the most: load is said to be starved", part)
		}
	}
	for _, part := range []float64{1.001, 1.5, 10} {
		at := Environment{Name: "overload"}.Set("E1", "watt", part*most)
		s := c.solve(at, nil)
		if len(s.Starved) != 1 || s.Starved[0] != "E1" {
			t.Errorf("%g of the most: starved %v at %g V", part, s.Starved, c.volt(s, "a"))
		}
		m, err := c.LoadMargin(at, nil)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "load factor", m.Factor*part, 1, 2e-4)
		if len(m.Parts) != 1 || m.Parts[0] != "part E1" {
			t.Errorf("parts that collapse: %v", m.Parts)
		}
	}
	m, err := c.LoadMargin(Environment{}, nil)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "load factor of 100 W", m.Factor, most/100, 1e-3)
}

// A driver that works from 18 V loses its power at 18 V, before the nose of the curve.
func TestLoadMarginAtWorkingRange(t *testing.T) {
	c := compile(t, `
G1 battery a 0 emf=24 ohm=0.5
E1 constant-power a 0 watt=100 low_volt=18 high_volt=40 leak_ohm=1e9`)
	m, err := c.LoadMargin(Environment{}, nil)
	if err != nil {
		t.Fatal(err)
	}
	// (24 V − 18 V)/0.5 Ω · 18 V = 216 W.
	near(t, "load factor", m.Factor, 2.16, 1e-4)
}

func TestRefusals(t *testing.T) {
	cases := []struct{ name, text, want string }{
		{"loop of ideal sources", `
G1 battery a 0 emf=12
G2 battery a 0 emf=12.1
R1 resistor a 0 ohm=10`, "G2, G1 form a loop without any resistance: the current round it cannot be told; give one of them a resistance (parts part G2, part G1)"},
		{"loop of three through a contact", `
G1 battery a 0 emf=12
S1 switch a b ohm=0
G2 battery b 0 emf=12
R1 resistor a 0 ohm=10`, "G2, G1, S1 form a loop without any resistance: the current round it cannot be told; give one of them a resistance (parts part G2, part G1, part S1)"},
		{"floating load", `
G1 battery a 0 emf=12 ohm=0.01
R1 resistor a 0 ohm=10
E1 filament x y rated_volt=12 rated_watt=5`, "nothing connects x, y to L−: its voltages cannot be told; connect it or leave it out (parts part E1)"},
		{"floating behind a capacitor", `
G1 battery a 0 emf=12 ohm=0.01
C1 capacitor a x
Q1 npn x a y
R1 resistor y x ohm=10`, ""},
		{"floating battery", `
R1 resistor a 0 ohm=10
G1 battery x y emf=12 ohm=0.01
R2 resistor x y ohm=10`, "nothing connects x, y to L−: its voltages cannot be told; connect it or leave it out (parts part G1, part R2)"},
		{"parameter missing", `R1 resistor a 0`, `R1 (part R1): parameter "ohm" of model resistor is missing`},
		{"parameter unknown", `R1 resistor a 0 ohm=1 ampere=3`, `R1 (part R1): model resistor has no parameter "ampere"`},
		{"parameter out of range", `R1 resistor a 0 ohm=-1`, `R1 (part R1): ohm of -1 Ω is out of range`},
		{"contact without a coil", `K1c contact a 0 by=K9`, `K1c (part K1c): no coil "K9" moves this contact`},
		{"thresholds the wrong way", `Q1 cut-off a b 0 opens_volt=12 recloses_volt=11`, `Q1 (part Q1): recloses_volt must be above opens_volt`},
	}
	for _, tc := range cases {
		t.Run(tc.name, func(t *testing.T) {
			_, err := New(read(t, tc.text))
			switch {
			case tc.want == "":
				if err != nil {
					t.Errorf("refused: %v", err)
				}
			case err == nil:
				t.Error("accepted")
			case err.Error() != tc.want:
				t.Errorf("got  %s\nwant %s", err, tc.want)
			}
		})
	}
}

// A probe that ends inside a device has no voltage against L−, and no current: it is
// listed, not refused.
func TestPassiveIslandIsListed(t *testing.T) {
	c := compile(t, `
G1 battery a 0 emf=12 ohm=0.01
R1 resistor a 0 ohm=10
W1 conductor p q ohm=0.1
B1 ntc q r`)
	if len(c.Unreferenced) != 1 || strings.Join(c.Unreferenced[0].Parts, ",") != "part W1,part B1" {
		t.Errorf("unreferenced: %v", c.Unreferenced)
	}
	c.solve(Environment{}, nil)
}

// A loop can also come about in one condition only.
func TestLoopInOneCondition(t *testing.T) {
	c := compile(t, `
G1 battery a 0 emf=12
S1 switch a b ohm=0 closed=0
G2 battery b 0 emf=12.5
R1 resistor a b ohm=1`)
	c.solve(Environment{}, nil)
	var loop *LoopError
	if _, err := c.Solve(Environment{}.Set("S1", "closed", 1), nil); !errors.As(err, &loop) {
		t.Errorf("got %v, want a *LoopError", err)
	}
}

// A relay that its own break contact feeds is a buzzer.
func TestChatter(t *testing.T) {
	c := compile(t, `
G1 battery a 0 emf=12 ohm=0.05
K1c contact a b by=K1 rest_closed=1
K1 coil b 0 ohm=100 pickup_volt=8 dropout_volt=1.2
K2 coil a 0 ohm=100 pickup_volt=8 dropout_volt=1.2`)
	_, err := c.Solve(Environment{Name: "outage"}, nil)
	var chatter *ChatterError
	if !errors.As(err, &chatter) {
		t.Fatalf("got %v, want a *ChatterError", err)
	}
	if got := strings.Join(chatter.Elements, ","); got != "K1" {
		t.Errorf("elements in the loop: %s, want K1 alone", got)
	}
	want := `condition "outage": K1 never come to rest: each move makes the next (parts part K1)`
	if err.Error() != want {
		t.Errorf("got  %s\nwant %s", err, want)
	}
}

// A cut-off that recovers past its reclosing voltage when the load is gone hunts too.
func TestCutOffHunts(t *testing.T) {
	c := compile(t, `
G1 battery a 0 emf=12 ohm=0.2
Q1 cut-off a b 0 opens_volt=11 recloses_volt=11.5
R1 resistor b 0 ohm=1`)
	_, err := c.Solve(Environment{}, nil)
	var chatter *ChatterError
	if !errors.As(err, &chatter) {
		t.Fatalf("got %v, want a *ChatterError", err)
	}
}

// Random circuits of all models: each is solved, or refused by a named error, and
// never without Kirchhoff's law holding.
func TestRandomCircuits(t *testing.T) {
	rng := rand.New(rand.NewPCG(11, 12))
	failed, chattered, refused, trials := 0, 0, 0, 6000
	if testing.Short() {
		trials = 2000
	}
	for trial := range trials {
		text := randomCircuit(rng)
		n, err := New(read(t, text))
		if err != nil {
			var f *FloatingError
			var l *LoopError
			if !errors.As(err, &f) && !errors.As(err, &l) {
				t.Fatalf("trial %d: %v\n%s", trial, err, text)
			}
			refused++
			continue
		}
		at := Environment{Mains: float64(rng.IntN(2)) * (0.8 + 0.3*rng.Float64()), Lux: 100 * rng.Float64(), Charge: ChargeStage(rng.IntN(3))}
		s, err := n.Solve(at, nil)
		var chatter *ChatterError
		var conv *ConvergenceError
		switch {
		case errors.As(err, &chatter):
			chattered++
		case errors.As(err, &conv):
			failed++
			t.Logf("trial %d: %v\n%s", trial, err, text)
		case err != nil:
			t.Fatalf("trial %d: %v\n%s", trial, err, text)
		case s.Residual > MaxResidual:
			t.Errorf("trial %d: residual %g", trial, s.Residual)
		}
	}
	t.Logf("%d circuits: %d refused, %d chatter, %d not solved", trials, refused, chattered, failed)
	if failed > 0 {
		t.Errorf("%d of %d circuits were not solved", failed, trials)
	}
}

func randomCircuit(rng *rand.Rand) string {
	nets := 2 + rng.IntN(12)
	net := func() string {
		if k := rng.IntN(nets); k > 0 {
			return fmt.Sprintf("n%d", k)
		}
		return "0"
	}
	var b strings.Builder
	fmt.Fprintf(&b, "G0 battery n1 0 emf=%.3g ohm=%.3g\n", 10+20*rng.Float64(), math.Pow(10, -2+2*rng.Float64()))
	for k := 1; k < nets; k++ { // keep it together
		fmt.Fprintf(&b, "R%d resistor n%d n%d ohm=%.3g\n", k, k, 1+rng.IntN(nets-1), math.Pow(10, 5*rng.Float64()-1))
	}
	kinds := []string{
		"diode %s %s", "schottky %s %s", "led %s %s", "zener %s %s vz=12 iz=0.01 rz=5", "zener %s %s vz=5.1 iz=0.049",
		"suppressor %s %s vz=33", "npn %s %s %s", "pnp %s %s %s", "regulator %s %s %s", "filament %s %s rated_volt=12 rated_watt=10",
		"led-string %s %s forward_volt=3.1 series=3 strings=2 ohm=68 ampere=0.02", "constant-current %s %s ampere=0.1",
		"constant-power %s %s watt=6 low_volt=9 high_volt=16", "constant-power %s %s watt=3 low_volt=18 high_volt=32",
		"supply %s %s volt=12 limit_ampere=0.5", "charger %s %s - - float_volt=13.7 limit_ampere=2", "ldr %s %s",
		"transformer-supply %s %s rated_volt=12 rated_ampere=0.5 open_volt=19", "coil %s %s ohm=300 pickup_volt=9 dropout_volt=1.2",
		"cut-off %s %s %s opens_volt=10.5 recloses_volt=12.5 own_ampere=0.005", "comparator %s %s %s %s %s",
		"photoswitch %s %s %s %s dark_below_lx=10 light_above_lx=14 own_ampere=0.01", "bridge %s %s %s %s", "switch %s %s", "capacitor %s %s",
	}
	for k := range 1 + rng.IntN(10) {
		kind := kinds[rng.IntN(len(kinds))]
		args := make([]any, strings.Count(kind, "%s"))
		for i := range args {
			args[i] = net()
		}
		model, rest, _ := strings.Cut(kind, " ")
		fmt.Fprintf(&b, "X%d %s %s\n", k, model, fmt.Sprintf(rest, args...))
	}
	return b.String()
}
