package sizing

import (
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// TestSectionalByHand works IEEE 485 on three periods of a glass-mat battery with its
// datasheet lines: 10 A for 1 h, 6 A for 4 h, 8 A for 5 h; sections end after 1, 5, 10 h.
// K is t ÷ fraction: 1/0.60, 5/0.85, 10/0.93 and, between lines, 4 h and 9 h.
func TestSectionalByHand(t *testing.T) {
	in := SectionalInput{
		Class: catalogue.VRLAAGM, EndVolt: 1.60, Coldest: 25,
		Periods: []Period{{"a", 10, quantity.Hours(1)}, {"b", 6, quantity.Hours(4)}, {"c", 8, quantity.Hours(5)}},
	}
	k := func(h float64) float64 {
		f, _ := catalogue.VRLAAGM.Fraction(quantity.Hours(h))
		return h / float64(f)
	}
	s1 := 10 * k(1)
	s2 := 10*k(5) + (6-10)*k(4)
	s3 := 10*k(10) + (6-10)*k(9) + (8-6)*k(5)
	near(t, "K at 5 h", k(5), 5/0.85, 1e-12)
	if !(s3 > s2 && s2 > s1) {
		t.Fatalf("sections %v %v %v", s1, s2, s3)
	}
	c, ws, err := Sectional(in)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "required", float64(c), s3, 1e-12)
	if len(ws) != 2 || ws[0].Name != "worst section, to the end of period 3" {
		t.Errorf("workings %+v", ws)
	}
	in.Coldest, in.Margin, in.Ageing = 10, 0.1, 0.8
	c, _, err = Sectional(in)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "with factors", float64(c), s3*1.19*1.1/0.8, 1e-12)
}

// TestSectionalEarlyPeak: a heavy first period can be the worst section.
func TestSectionalEarlyPeak(t *testing.T) {
	_, ws, err := Sectional(SectionalInput{
		Class: catalogue.VRLAAGM, EndVolt: 1.60, Coldest: 25,
		Periods: []Period{{"start", 40, quantity.Hours(0.25)}, {"rest", 0.2, quantity.Hours(5)}},
	})
	if err != nil || ws[0].Name != "worst section, to the end of period 1" {
		t.Errorf("%v %v", ws, err)
	}
}

// TestSectionalRefuses: what is outside the tables.
func TestSectionalRefuses(t *testing.T) {
	one := []Period{{"a", 1, quantity.Hours(4)}}
	_, _, err := Sectional(SectionalInput{Class: catalogue.VRLAAGM, Periods: one, Coldest: -30})
	unknown(t, err)
	_, _, err = Sectional(SectionalInput{Class: catalogue.VRLAAGM, Periods: one, Coldest: 20, EndVolt: 1.95})
	unknown(t, err)
	_, _, err = Sectional(SectionalInput{Class: catalogue.VRLAAGM, Periods: one, Coldest: 20, EndVolt: 1.5})
	blocked(t, err, LimitCapacity)
	if _, _, err = Sectional(SectionalInput{Class: catalogue.VRLAAGM}); err == nil {
		t.Error("an empty load cycle passes")
	}
	// a table in which the capacity falls with time cannot be a battery's
	bad := []catalogue.RatePoint{{Time: quantity.Hours(5), Fraction: 1.2}, {Time: quantity.Hours(20), Fraction: 1}}
	_, _, err = Sectional(SectionalInput{Class: catalogue.VRLAAGM, Periods: one, Coldest: 20, Rates: bad})
	blocked(t, err, LimitCapacity)
}

// TestClassTablesArePlausible: every class's own table passes the check on users'.
func TestClassTablesArePlausible(t *testing.T) {
	for _, c := range catalogue.BatteryClasses() {
		if err := PlausibleRates(c.Rates); err != nil {
			t.Errorf("%s: %v", c.Name, err)
		}
	}
}

// TestNextCapacity: one string if it suffices, few strings else, stock and pins.
func TestNextCapacity(t *testing.T) {
	bank := func(in BankInput) Bank {
		t.Helper()
		b, _, err := NextCapacity(in)
		if err != nil {
			t.Error(err)
		}
		return b
	}
	if b := bank(BankInput{Class: catalogue.VRLAAGM, Required: 40.1, Cells: 12}); b.Capacity != 55 || b.Series != 2 || b.Parallel != 1 {
		t.Errorf("40.1 Ah at 24 V: %+v", b)
	}
	if b := bank(BankInput{Class: catalogue.VRLAAGM, Required: 40, Cells: 12}); b.Capacity != 40 {
		t.Errorf("exactly 40 Ah: %+v", b)
	}
	if b := bank(BankInput{Class: catalogue.VRLAAGM, Required: 260, Cells: 12}); b.Parallel != 2 || b.Capacity != 300 {
		t.Errorf("260 Ah: %+v", b)
	}
	if b := bank(BankInput{Class: catalogue.VRLAAGM, Required: 30, Cells: 6, Stock: []quantity.AmpereHour{17}}); b.Parallel != 2 || b.Capacity != 34 {
		t.Errorf("from a stock of 17 Ah: %+v", b)
	}
	if b := bank(BankInput{Class: catalogue.VRLAAGM, Required: 30, Cells: 6, Parallel: 3}); b.Parallel != 3 || b.Capacity != 36 {
		t.Errorf("three strings asked for: %+v", b)
	}
	_, _, err := NextCapacity(BankInput{Class: catalogue.VRLAAGM, Required: 1001, Cells: 12})
	blocked(t, err, LimitCapacity)
}

// TestCutOffNeverEarly: with its worst accuracy the cut-off opens below the end of
// discharge and above the class's lowest.
func TestCutOffNeverEarly(t *testing.T) {
	for _, c := range catalogue.BatteryClasses() {
		n := c.CellsFor(24)
		end, _ := EndOfDischarge(EndInput{Class: c, Cells: n})
		open, reclose, _, err := CutOff(CutOffInput{Class: c, Cells: n, End: end, Accuracy: 0.01})
		if err != nil {
			t.Errorf("%s: %v", c.Name, err)
		}
		if open*1.01 > end+1e-9 || open*0.99 < c.LowestEnd*quantity.Volt(n) || reclose <= open {
			t.Errorf("%s: opens at %v, recloses at %v, end %v", c.Name, open, reclose, end)
		}
	}
	// common practice: 10.3 V to 10.5 V for 12 V lead-acid
	if open, _, _, _ := CutOff(CutOffInput{Class: catalogue.VRLAAGM, Cells: 6, End: 10.5, Accuracy: 0.01}); open < 10.3 || open > 10.5 {
		t.Errorf("12 V lead-acid opens at %v", open)
	}
	_, _, _, err := CutOff(CutOffInput{Class: catalogue.VRLAAGM, Cells: 6, End: 10.5, Drop: 0.5, Accuracy: 0.10})
	blocked(t, err, LimitVoltage)
}

// TestCharger: the formula, the next standard current, and the battery's limit.
func TestCharger(t *testing.T) {
	in := ChargerInput{Class: catalogue.VRLAAGM, Capacity: 55, Removed: 30, In: quantity.Hours(24), Standing: 0.1}
	c, _, err := ChargerCurrent(in)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "needed", float64(c.Needed), 1.18*30/24+0.1, 1e-12)
	if c.Rated != 2 {
		t.Errorf("rated %v, want 2 A", c.Rated)
	}
	in.In = quantity.Hours(2)
	_, _, err = ChargerCurrent(in)
	blocked(t, err, LimitCharge)
	in.In, in.Removed, in.Capacity = quantity.Hours(10), 2000, 5000
	_, _, err = ChargerCurrent(in)
	blocked(t, err, LimitCharge)
}

// TestFloat: a 12 V lead-acid float setting near 13.75 V (common practice).
func TestFloat(t *testing.T) {
	u, _ := ChargeVoltage(ChargeInput{Class: catalogue.VRLAAGM, Cells: 6, At: 25})
	near(t, "float", float64(u), 13.75, 0.002)
	cold, _ := ChargeVoltage(ChargeInput{Class: catalogue.VRLAAGM, Cells: 6, At: 5})
	near(t, "rise in the cold", float64(cold-u), 6*0.003*20, 1e-9)
}

// TestVentilation: IEC 62485-2 by hand, 12 vented cells of 100 Ah on boost.
func TestVentilation(t *testing.T) {
	a, _ := Ventilation(VentilationInput{Class: catalogue.Flooded, Cells: 12, Capacity: 100, Boost: true})
	near(t, "air", a.Flow, 0.05*12*20*100/1000, 1e-12)
	near(t, "opening", a.Opening, 28*1.2, 1e-12)
	if a, _ := Ventilation(VentilationInput{Class: catalogue.LiFePO4, Cells: 8, Capacity: 100}); a.Flow != 0 {
		t.Errorf("lithium: %v", a)
	}
}

// TestSupply: the next standard current over the load factor.
func TestSupply(t *testing.T) {
	if i, _, err := SupplyCurrent(SupplyInput{Load: 0.39}); err != nil || i != 0.5 {
		t.Errorf("0.39 A: %v %v", i, err)
	}
	if i, _, err := SupplyCurrent(SupplyInput{Load: 0.41}); err != nil || i != 0.8 {
		t.Errorf("0.41 A: %v %v", i, err)
	}
	_, _, err := SupplyCurrent(SupplyInput{Load: 40})
	blocked(t, err, LimitLoad)
	if va, _, err := TransformerRating(TransformerInput{DC: 18, Load: 0.5}); err != nil || va != 20 {
		t.Errorf("18 V 0.5 A: %v %v, want 20 VA for 16.2", va, err)
	}
	_, _, err = TransformerRating(TransformerInput{DC: 40, Load: 20})
	blocked(t, err, LimitLoad)
}
