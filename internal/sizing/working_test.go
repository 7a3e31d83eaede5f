package sizing

import (
	"errors"
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/pocket"
	"gloamwright/internal/quantity"
)

// everyWorking runs each method once with figures of a plain 24 V site and returns
// all workings.
func everyWorking(t *testing.T) []Working {
	t.Helper()
	var all []Working
	keep := func(w ...Working) { all = append(all, w...) }
	ok := func(err error) {
		t.Helper()
		if err != nil {
			t.Error(err)
		}
	}
	tree := plainTree()
	chosen, err := tree.Choose()
	ok(err)
	keep(tree.CopperWorking(chosen.Sizes), BoundWorking(chosen.Cost, chosen.Bound, "cm³", chosen.Proven), BoundWorking(40317, 40178, "cm³", false))
	tree.Lengths = quantity.InFeet
	keep(tree.CopperWorking(chosen.Sizes))
	c15, _ := catalogue.ConductorOf(quantity.WireSize{Area: 1.5})
	_, w := ResistanceAt(2.5, 20, 55, catalogue.CopperZero)
	keep(w)
	_, w = Loop(RunInput{Conductor: c15, Length: 23, At: 70})
	keep(w)
	_, w = LeastArea(LeastAreaInput{Resistivity: 0.0205, Moment: 37.5, Drop: 1.2})
	keep(w)
	_, w, err = Ampacity(AmpacityInput{Table: catalogue.AmpacityB2, Size: c15.Size, Ambient: 35, Grouped: 3})
	ok(err)
	keep(w)
	_, w, err = ChooseFuse(FuseInput{Class: catalogue.FuseBlade, Load: 1.7, LoadFactor: 0.8, Cable: 11})
	ok(err)
	keep(w)
	w, err = Coordinate(CoordinateInput{Class: catalogue.FuseCartridgeT, Load: 1, Rating: 2, Cable: 11})
	ok(err)
	keep(w)
	_, w = Prospective(FaultInput{Source: 25.6, Internal: 0.012, Loop: []Series{{"cable", 0.004}, {"fuse", 0.001}}})
	keep(w)
	_, w = LeastFault(FaultInput{Source: 24, Internal: 0.02, Loop: []Series{{"cable", 0.8}}})
	keep(w)
	w, err = Breaking(BreakingInput{Class: catalogue.FuseBlade, Rating: 10, System: 29, Prospective: 700})
	ok(err)
	keep(w)
	_, w, err = Adiabatic(AdiabaticInput{Fault: 300, For: 0.1, K: catalogue.AdiabaticPVC})
	ok(err)
	keep(w)
	_, w, err = OpeningTime(OpeningInput{Class: catalogue.FuseBlade, Rating: 5, Current: 21})
	ok(err)
	keep(w)
	_, w, err = CurrentToOpen(catalogue.FuseBlade, 5, 1)
	ok(err)
	keep(w)
	_, w, err = Discriminate(DiscriminationInput{Upper: Link{catalogue.FuseBladeHigh, 50}, Lower: Link{catalogue.FuseBlade, 5}, Fault: 200})
	ok(err)
	keep(w)
	_, ws, err := Sectional(SectionalInput{
		Class: catalogue.VRLAAGM, Coldest: 5, Ageing: 0.8, Margin: 0.1, EndVolt: 1.8,
		Periods: []Period{{"start", 5, quantity.Hours(0.5)}, {"lights", 3, quantity.Hours(3)}, {"late", 4, quantity.Hours(0.5)}},
		Random:  Period{"test", 1, quantity.Hours(0.5)},
	})
	ok(err)
	keep(ws...)
	_, ws, err = Sectional(SectionalInput{Class: catalogue.NiCd, Coldest: -5, Ageing: 0.8, Margin: 0.1, Periods: []Period{{"lights", 3, quantity.Hours(4)}}})
	ok(err)
	keep(ws...)
	_, w, err = NextCapacity(BankInput{Class: catalogue.VRLAAGM, Required: 41, Cells: 12})
	ok(err)
	keep(w)
	_, w = Internal(0.07, 12, 55)
	keep(w)
	_, w = EndOfDischarge(EndInput{Class: catalogue.VRLAAGM, Cells: 12, Lamp: 18, Drop: 1.2})
	keep(w)
	_, _, ws, err = CutOff(CutOffInput{Class: catalogue.VRLAAGM, Cells: 12, End: 21, Drop: 0.1, Accuracy: 0.01})
	ok(err)
	keep(ws...)
	_, ws, err = ChargerCurrent(ChargerInput{Class: catalogue.VRLAAGM, Capacity: 55, Removed: 20, In: quantity.Hours(24), Standing: 0.2})
	ok(err)
	keep(ws...)
	_, w = ChargeVoltage(ChargeInput{Class: catalogue.VRLAAGM, Cells: 12, At: 5})
	keep(w)
	_, w, err = SupplyCurrent(SupplyInput{Load: 0.11})
	ok(err)
	keep(w)
	_, ws = Ventilation(VentilationInput{Class: catalogue.Flooded, Cells: 12, Capacity: 100, Boost: true, Charger: 5})
	keep(ws...)
	_, ws, err = CoilPickUp(CoilInput{Class: catalogue.RelayGeneral, Rated: 24, Low: 23.7, High: 24.3, Ambient: 30})
	ok(err)
	keep(ws...)
	_, w, err = ContactLoad(ContactInput{Class: catalogue.RelayGeneral, Volt: 28.8, Current: 6})
	ok(err)
	keep(w)
	_, w = Derate(DerateInput{Current: 10, Volt: 28, To: 55})
	keep(w)
	_, _, w = Suppression(SuppressionInput{Supply: 28, Coil: 640, Forward: 0.8}, 0.1)
	keep(w)
	_, _, ws = SeriesResistor(SeriesResistorInput{Supply: 27.5, Forward: 3.1, Diodes: 6, Current: 0.02})
	keep(ws...)
	_, ws, err = StringResistor(StringInput{High: 27.5, Low: 21, Forward: 3.1, Series: 5, Current: 0.02})
	ok(err)
	keep(ws...)
	_, w, err = HeatSink(HeatInput{Power: 5, Junction: 125, Ambient: 40, JunctionCase: 5, CaseSink: 0.5, Free: 65})
	ok(err)
	keep(w)
	_, w = RegulatorSet(1.25, 13.75, 240, 50e-6)
	keep(w)
	_, ws, err = SetResistors(SetInput{Device: catalogue.Regulator1A5, Lowest: 13.4, Highest: 14.1})
	ok(err)
	keep(ws...)
	_, w = OutputImpedance(0.33, 120, 1200)
	keep(w)
	_, ws, err = LinearCharger(LinearInput{
		Device: catalogue.Regulator1A5, SupplyLow: 17, SupplyTop: 21, SupplyOff: 24, Set: 13.95, Battery: 10.5, Diode: 0.25, Impedance: 3.6, Ambient: 40, CaseSink: 0.5,
	})
	ok(err)
	keep(ws...)
	_, w = Peak(FullBridge, 15, 0.9)
	keep(w)
	_, w = Ripple(RippleInput{Rectifier: FullBridge, Frequency: 50, Capacitor: 4700e-6, Current: 0.5})
	keep(w)
	_, w, err = TransformerRating(TransformerInput{DC: 18, Load: 0.6})
	ok(err)
	keep(w)
	z12, _ := catalogue.ZenerOf(12)
	_, ws, err = CoilDropper(CoilFeedInput{Low: 16, High: 20, Zener: z12, Coil: 720, CoilTol: 0.15, Ambient: 40})
	ok(err)
	keep(ws...)
	_, ws, err = TwilightCard(TwilightInput{Cell: catalogue.CadmiumSulphide5, Dark: 10, Bright: 25, Low: 0.03, PullUp: 10e3, Most: 29})
	ok(err)
	keep(ws...)
	_, ws, err = CoilDriverResistors(CoilDriverInput{
		Transistor: catalogue.PNPSmall, Comparator: catalogue.ComparatorDual, Low: 21, High: 28, Coil: 1000, CoilTol: 0.1, Feedback: 220e3,
	})
	ok(err)
	keep(ws...)
	_, ws, err = FollowerPhotocell(EmitterFollowerInput{
		Cell: catalogue.CadmiumSulphide5, Transistor: catalogue.NPNSmall, Dark: 20, Supply: 13.7, High: 14.4, Coil: 360, PickUp: 8.4, DropOut: 3, Feed: catalogue.Diode1N4004, Ambient: 30,
	})
	ok(err)
	keep(ws...)
	_, w = StandingTime(StandingInput{Class: catalogue.VRLAAGM, Capacity: 55, Drains: []Drain{{"cut-off", 0.008}, {"photocell", 0.012}}})
	keep(w)
	return all
}

// TestWorkingsReproduce puts every working into a calculator.
func TestWorkingsReproduce(t *testing.T) {
	all := everyWorking(t)
	if len(all) < 55 {
		t.Errorf("only %d workings", len(all))
	}
	for _, w := range all {
		got, err := pocket.Result(w.Substituted)
		if err != nil {
			t.Errorf("%s: %v", w.Name, err)
			continue
		}
		if math.Abs(got-w.Value) > 1e-3*math.Abs(w.Value) {
			t.Errorf("%s: %q gives %v, the value is %v", w.Name, w.Substituted, got, w.Value)
		}
		if w.Name == "" || w.Formula == "" || w.Source == "" {
			t.Errorf("%+v lacks a name, a formula or a source", w)
		}
	}
}

// TestPlainNumbers holds the printing of numbers in workings.
func TestPlainNumbers(t *testing.T) {
	for v, want := range map[float64]string{0: "0", 1: "1", 0.05: "0.05", 13.3: "13.3", 1234567: "1234567", 0.0000123456789: "0.0000123457", -0.003: "−0.003", 2.0 / 3: "0.666667", 22000: "22000"} {
		if got := plain(v); got != want {
			t.Errorf("plain(%v) = %q, want %q", v, got, want)
		}
	}
}

// blocked fails unless err is a *BlockedError of that limit with a remedy.
func blocked(t *testing.T, err error, limit Limit) {
	t.Helper()
	var be *BlockedError
	if !errors.As(err, &be) {
		t.Errorf("got %v, want a limit of %s", err, limit)
		return
	}
	if be.Limit != limit || be.Frees == "" {
		t.Errorf("got %v (%s, frees %q), want a limit of %s with a remedy", be, be.Limit, be.Frees, limit)
	}
}

// unknown fails unless err is an *UnknownError that says whom to ask.
func unknown(t *testing.T, err error) {
	t.Helper()
	var ue *UnknownError
	if !errors.As(err, &ue) || ue.Ask == "" {
		t.Errorf("got %v, want an *UnknownError with advice", err)
	}
}
