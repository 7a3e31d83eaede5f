package stage_test

import (
	"math"
	"strings"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/pocket"
)

const packaged = "charger: {kind: charger, to: store, mains: 230 V ± 10 %, compensation: no}\n"

// standby lights the board when mains fails in the dark.
const standby = packaged + `
presence: {kind: regulated-supply, mains: 230 V ± 10 %}
transfer: {kind: changeover-relay, coil: presence, from: guard}
`

// sites has a minimal site for each kind.
var sites = map[string]bench{
	"charger":           {stages: packaged},
	"regulated-supply":  {stages: standby, from: "transfer.break", lit: "outage"},
	"isolator":          {stages: packaged + "main: {kind: isolator, from: guard}", from: "main"},
	"voltmeter":         {stages: packaged + "volts: {kind: meter, from: store}"},
	"ammeter":           {stages: packaged + "amps: {kind: meter, reads: amps, from: guard}", from: "amps"},
	"suppressor":        {stages: packaged + "surge: {kind: suppressor, from: guard}"},
	"indicator":         {stages: packaged + "live: {kind: indicator, from: guard}"},
	"test-switch":       {stages: strings.Replace(standby, "coil: presence", "coil: try", 1) + "try: {kind: test-switch, from: presence}", from: "transfer.break", lit: "outage"},
	"photocell module":  {stages: standby + "dusk: {kind: photocell, built: module, from: guard, holds: transfer}", from: "transfer.break", lit: "outage-night"},
	"comparator":        {stages: standby + "dusk: {kind: photocell, built: comparator, from: guard, holds: transfer}", from: "transfer.break", lit: "outage-night"},
	"comparator, 24 V":  {nominal: "24 V", lamp: "{kind: led-driver, power: 6 W, works: 18 V..32 V}", stages: standby + "dusk: {kind: photocell, built: comparator, from: guard, holds: transfer}", from: "transfer.break", lit: "outage-night"},
	"follower":          {stages: standby + "dusk: {kind: photocell, built: follower, from: guard, holds: transfer, dark_below: 5 lx}", from: "transfer.break", lit: "outage-night"},
	"shunt, regulated":  {stages: strings.Replace(standby, "coil: presence", "coil: steady", 1) + "steady: {kind: shunt-regulator, from: presence, volts: 10 V}", from: "transfer.break", lit: "outage"},
	"linear-charger":    {stages: "raw: {kind: transformer-supply, rated: 18 V 2 A, open: 22 V, mains: 230 V ± 10 %}\nfloat: {kind: linear-charger, from: raw, to: store}"},
	"filament":          {lamp: "{kind: filament, rated: 12 V, power: 5 W}", stages: packaged},
	"led-string":        {lamp: "{kind: led-string, forward: 3 V, series: 3, strings: 12, current: 20 mA}", stages: packaged, battery: ", capacity: 7 Ah"},
	"ballast":           {lamp: "{kind: ballast, power: 8 W, works: 9 V..16 V}", stages: packaged},
	"resistive":         {lamp: "{kind: resistive, rated: 12 V, power: 5 W}", stages: packaged},
	"everything on raw": {stages: rawPlant, from: "transfer.break", lit: "outage-night"},
}

// TestEveryKind designs a minimal site with each stage kind in both systems of sizes;
// nothing stands in its way and the sketches draw what the circuit connects.
func TestEveryKind(t *testing.T) {
	for name, b := range sites {
		t.Run(name, func(t *testing.T) {
			d := b.design(t)
			for _, s := range d.stops() {
				t.Error(s)
			}
			for _, w := range d.Workings {
				if v, err := pocket.Result(w.Substituted); err != nil || math.Abs(v-w.Value) > 1e-3*math.Abs(w.Value) {
					t.Errorf("%s, %s: %q gives %.6g, the value is %.6g (%v)", w.For, w.Name, w.Substituted, v, w.Value, err)
				}
			}
			for _, c := range d.Conditions {
				if c.Residual > 1e-9 {
					t.Errorf("%s: residual %g A", c.Key, c.Residual)
				}
			}
		})
	}
}

const rawPlant = `
raw:      {kind: transformer-supply, rated: 18 V 2 A, open: 22 V, mains: 230 V ± 10 %}
float:    {kind: linear-charger, from: raw, to: store}
steady:   {kind: shunt-regulator, from: raw, volts: 10 V}
try:      {kind: test-switch, from: steady}
dusk:     {kind: photocell, built: comparator, from: guard, holds: transfer, dark_below: 8 lx}
transfer: {kind: changeover-relay, coil: try, from: guard}
surge:    {kind: suppressor, from: raw}
`

// TestEveryKindListed sees to it that TestEveryKind leaves none out.
func TestEveryKindListed(t *testing.T) {
	listed := packaged + standby + rawPlant + "battery low-voltage-disconnect distribution-board isolator meter indicator"
	for _, k := range []string{"regulated-supply", "transformer-supply", "charger", "linear-charger", "battery", "isolator", "meter", "low-voltage-disconnect",
		"shunt-regulator", "test-switch", "photocell", "changeover-relay", "indicator", "suppressor", "distribution-board"} {
		if !strings.Contains(listed, k) {
			t.Errorf("no site with a %s", k)
		}
	}
}

// TestTestSwitch presses the button: the relay lets go though mains is on.
func TestTestSwitch(t *testing.T) {
	d := bench{stages: strings.Replace(standby, "coil: presence", "coil: try", 1) + "try: {kind: test-switch, from: presence}", from: "transfer.break", lit: "outage"}.design(t)
	on := network.Environment{Mains: 1, Charge: network.Float}
	before := d.solve(t, on, 13, nil)
	button := d.part(t, "try/button").Designation
	after := d.solve(t, on.Set(button, "closed", 0), 13, before.State)
	if v := d.volts(t, before, "transfer/relay", "12"); v > 0.1 {
		t.Errorf("board has %.2f V with mains on", v)
	}
	if v := d.volts(t, after, "transfer/relay", "12"); v < 11 {
		t.Errorf("board has %.2f V with the button pressed", v)
	}
}

// TestAmmeter holds the shunt: 60 mV at its range, and what the meter sees.
func TestAmmeter(t *testing.T) {
	d := bench{stages: packaged + "amps: {kind: meter, reads: amps, range: 10 A, from: guard}", from: "amps"}.design(t)
	s := d.solve(t, network.Environment{}, 12.8, nil)
	i := s.Current(d.part(t, "amps/shunt").Designation)
	near(t, "current by the sense pair", (d.volts(t, s, "amps/meter", "1")-d.volts(t, s, "amps/meter", "2"))/0.060*10, i, 0.01)
	within(t, "lamp current", i, 0.5, 1)
	near(t, "shunt", d.figure(t, "amps/shunt", "shunt"), 0.006, 1e-9)
}

// TestVoltmeterPassesNothing refuses a board behind a voltmeter.
func TestVoltmeterPassesNothing(t *testing.T) {
	d := bench{stages: packaged + "volts: {kind: meter, from: guard}", from: "volts"}.design(t)
	if len(d.stops()) == 0 {
		t.Error("nothing stops a board that is fed from a voltmeter")
	}
}

// TestSuppressor stands off the highest voltage and clips what is above its breakdown.
func TestSuppressor(t *testing.T) {
	d := bench{stages: packaged + "surge: {kind: suppressor, from: guard}"}.design(t)
	f := d.part(t, "surge/suppressor").Designation
	if v := d.value(t, "surge/suppressor", "standoff"); v < 14.5 || v > 18 {
		t.Errorf("stand-off %g V on a rail of 14.5 V", v)
	}
	s := d.solve(t, network.Environment{}, 14.5, nil)
	if i := s.Current(f); i > 1e-5 || i < 0 {
		t.Errorf("takes %g A at 14.5 V", i)
	}
	s = d.solve(t, network.Environment{}, 19, nil)
	if i := s.Current(f); i < 0.1 {
		t.Errorf("takes only %g A at 19 V", i)
	}
	low := bench{stages: packaged + "surge: {kind: suppressor, standoff: 12 V, from: guard}"}.design(t)
	if len(low.stops()) == 0 {
		t.Error("a stand-off voltage below the charge voltage passes")
	}
}

// TestTransformerSupply holds the source to its two stated points, by the model and by
// the workings: 18 V at 2 A and 22 V open make 2 Ω.
func TestTransformerSupply(t *testing.T) {
	d := bench{stages: "raw: {kind: transformer-supply, rated: 18 V 2 A, open: 22 V, mains: 230 V ± 10 %}\nfloat: {kind: linear-charger, from: raw, to: store}"}.design(t)
	near(t, "source resistance", d.figure(t, "raw/transformer", "source resistance"), 2, 1e-9)
	// Reservoir: 10 % ripple of 22 V at 2 A and 100 half-waves a second asks for
	// 2/(100 × 2.2) = 9.1 mF, next E6 value 10 mF.
	near(t, "reservoir", d.value(t, "raw/reservoir", "capacitance"), 10e-3, 1e-9)
	// Rated for the open voltage at highest mains, 24.2 V.
	near(t, "rated voltage of the reservoir", d.value(t, "raw/reservoir", "voltage"), 25, 1e-9)
	// 18 V × 2 A × 1.8 = 64.8 VA, next standard rating.
	near(t, "transformer", d.value(t, "raw/transformer", "rating"), 80, 1e-9)
	s := d.solve(t, network.Environment{Mains: 1}, 12, nil)
	i := -s.Current(d.part(t, "raw/bridge").Designation)
	if i < 0 {
		i = -i
	}
	near(t, "voltage under load", d.volts(t, s, "raw/bridge", "+"), 22-2*i, 0.002)
	for _, f := range d.Fuses {
		if f.Part.Key != "raw/fuse" {
			continue
		}
		if f.Before != nil || !f.Opens {
			t.Errorf("raw fuse: before %v, opens %v", f.Before, f.Opens)
		}
		near(t, "prospective current", float64(f.Prospective), 22*1.1/2, 1e-6)
	}
}

// TestShuntRegulator holds the dropper to its bounds in the solved circuit: the Zener
// keeps its current with the coil in at lowest mains, and its power with the coil
// unplugged at highest.
func TestShuntRegulator(t *testing.T) {
	d := bench{stages: rawPlant, from: "transfer.break", lit: "outage-night"}.design(t)
	z := d.part(t, "steady/zener").Designation
	low := d.solve(t, network.Environment{Mains: 0.9, Charge: network.Float}, 11.8, nil)
	if i := -low.Current(z); i < 2e-3 {
		t.Errorf("Zener has %.2g A at lowest mains with the coil in", i)
	}
	if v := d.volts(t, low, "steady/zener", "K"); v < 9.5 || v > 10.5 {
		t.Errorf("coil feed stands at %.2f V", v)
	}
	coil := d.part(t, "transfer/relay").Designation + ".coil"
	unplugged := network.Environment{Mains: 1.1, Charge: network.Float}.With(network.Override{Element: coil, Open: true})
	high := d.solve(t, unplugged, 14, nil)
	if p := high.Power(z); p > d.value(t, "steady/zener", "power") || p < 0.1 {
		t.Errorf("Zener gives off %.2f W with the coil unplugged", p)
	}
	if p := high.Power(d.part(t, "steady/dropper").Designation); p*2 > d.value(t, "steady/dropper", "power") {
		t.Errorf("dropper gives off %.2f W, rated %g W", p, d.value(t, "steady/dropper", "power"))
	}
	bad := bench{stages: strings.Replace(rawPlant, "volts: 10 V", "volts: 11 V", 1), from: "transfer.break", lit: "outage-night"}.design(t)
	if !strings.Contains(strings.Join(bad.stops(), "\n"), "Zener diode of 11 V") {
		t.Errorf("an unlisted Zener passes: %v", bad.stops())
	}
}

// threshold finds a swept threshold.
func threshold(t testing.TB, list []*facts.Threshold, key string) float64 {
	t.Helper()
	for _, x := range list {
		if x.Key == key {
			return x.Value
		}
	}
	t.Fatalf("no threshold %s", key)
	return 0
}

// setField gives a field of a stage another value.
func setField[T any](s *describe.Stage, name string, v T) {
	s.Fields.Set(name, describe.At[any]{Val: v, Given: true})
}
