package catalogue

import (
	"math"
	"testing"

	"gloamwright/internal/quantity"
)

// TestConductorsAgainstResistivity: IEC 60228 limits lie above the resistance that
// IEC 60028 copper of the nominal area has, by at most a sixth (0.5 mm² flexible) for
// stranding and tolerance, and fall with the area.
func TestConductorsAgainstResistivity(t *testing.T) {
	for name, table := range map[string][]Conductor{"class 2": ConductorsClass2, "class 5": ConductorsClass5} {
		for i, c := range table {
			ideal := WireOhm(CopperResistivity, 1000, c.Size.Area)
			if r := float64(c.PerKM / ideal); r < 1 || r > 1.17 {
				t.Errorf("%s %v: %v is %.3f of ideal copper", name, c.Size.Area, c.PerKM, r)
			}
			if i > 0 && (c.PerKM >= table[i-1].PerKM || c.Size.Area <= table[i-1].Size.Area) {
				t.Errorf("%s %v: out of order", name, c.Size.Area)
			}
			if !c.Seen {
				t.Errorf("%s %v: these figures were read", name, c.Size.Area)
			}
		}
	}
}

// TestWorstClass: the default metric conductor is never better than either class.
func TestWorstClass(t *testing.T) {
	for i, c := range Conductors(Metric) {
		if c.PerKM < ConductorsClass2[i].PerKM || c.PerKM < ConductorsClass5[i].PerKM {
			t.Errorf("%v: %v is below a class", c.Size.Area, c.PerKM)
		}
	}
	if c, ok := ConductorOf(quantity.WireSize{Area: 50}); !ok || c.PerKM != 0.387 {
		t.Errorf("50 mm²: %v, want the class 2 limit 0.387 Ω", c.PerKM)
	}
}

// TestGaugesAgainstTable compares with NFPA 70 chapter 9 table 8, uncoated copper at
// 75 °C in Ω per 1000 ft (from memory): the stranded column is never above ours, and
// ours at most 1 % above it.
func TestGaugesAgainstTable(t *testing.T) {
	const feet = 304.8 // m in 1000 ft
	hot := (CopperZero + 75) / (CopperZero + 20)
	for gauge, want := range map[string]float64{
		"18": 7.95, "16": 4.99, "14": 3.14, "12": 1.98, "10": 1.24, "8": 0.778, "6": 0.491, "4": 0.308, "3": 0.245, "2": 0.194,
		"1": 0.154, "1/0": 0.122, "2/0": 0.0967, "3/0": 0.0766, "4/0": 0.0608,
	} {
		c, ok := ConductorOf(quantity.WireSize{Gauge: gauge})
		if !ok {
			t.Errorf("%s AWG missing", gauge)
			continue
		}
		got := float64(c.PerKM) * feet / 1000 * hot
		if got < want*0.9995 || got > want*1.01 {
			t.Errorf("%s AWG: %.4f Ω, table %.4f", gauge, got, want)
		}
	}
}

// TestGaugeCircularMils compares areas with the circular mils printed in an open
// textbook, which rounds to four digits.
func TestGaugeCircularMils(t *testing.T) {
	for gauge, want := range map[string]float64{"18": 1624, "16": 2583, "14": 4107, "12": 6530, "10": 10380, "8": 16510, "6": 26250, "4": 41740, "2": 66370, "1": 83690, "1/0": 105500, "2/0": 133100, "3/0": 167800, "4/0": 211600} {
		n, err := GaugeNumber(gauge)
		if err != nil {
			t.Fatal(err)
		}
		if got := float64(GaugeArea(n)) / CircularMil; math.Abs(got/want-1) > 0.0006 {
			t.Errorf("%s AWG: %.0f cmil, printed %.0f", gauge, got, want)
		}
	}
	for _, bad := range []string{"", "0", "5/0", "x", "41", "1/1"} {
		if _, err := GaugeNumber(bad); err == nil {
			t.Errorf("%q passes as a gauge", bad)
		}
	}
}

// TestTemperatureFactors compares the copper law with the factors that IEC 60228
// prints for bringing a measured resistance to 20 °C (read): the annex uses
// 250/(230 + t), so that the two differ by up to 0.5 % far from 20 °C.
func TestTemperatureFactors(t *testing.T) {
	for at, want := range map[float64]float64{5: 1.064, 10: 1.042, 15: 1.02, 20: 1, 25: 0.98, 30: 0.962, 40: 0.926, 50: 0.893, 60: 0.862, 70: 0.833, 80: 0.806, 90: 0.781, 100: 0.758} {
		got := (CopperZero + 20) / (CopperZero + at)
		if math.Abs(got/want-1) > 0.005 {
			t.Errorf("%g °C: %.4f, annex %.3f", at, got, want)
		}
	}
	if math.Abs(1/(CopperZero+20)-CopperAlpha) > 1e-5 {
		t.Errorf("1/(T + 20) = %v disagrees with the coefficient %v", 1/(CopperZero+20), CopperAlpha)
	}
}

// TestAmbientFactorsAgainstFormula: the printed factors follow √((T − t) ÷ (T − 30)),
// the law behind IEC 60364-5-52 table B.52.14, to one unit of their second decimal.
func TestAmbientFactorsAgainstFormula(t *testing.T) {
	for _, table := range []*AmpacityTable{AmpacityB2, AmpacityC, AmpacityXLPE, AmpacityNFPA60} {
		for _, f := range table.Ambient {
			law := math.Sqrt(float64(table.Conductor-f.UpTo) / float64(table.Conductor-table.Base))
			if math.Abs(law-float64(f.Factor)) > 0.0101 {
				t.Errorf("%s at %v: %.3f, law %.3f", table.Name, f.UpTo, float64(f.Factor), law)
			}
		}
	}
}

// TestAmpacityOrder: currents rise with size; method B2 is below method C and below
// the figures for single-core cables in conduit of BS 7671 table 4D1A (read).
func TestAmpacityOrder(t *testing.T) {
	for _, table := range []*AmpacityTable{AmpacityB2, AmpacityC, AmpacityXLPE, AmpacityB2Three, AmpacityCThree, AmpacityNFPA60, AmpacityBoat60} {
		for i := 1; i < len(table.Rows); i++ {
			if table.Rows[i].Current <= table.Rows[i-1].Current {
				t.Errorf("%s: %v carries no more than the size before it", table.Name, table.Rows[i].Size)
			}
		}
	}
	conduit := map[quantity.SquareMM]quantity.Ampere{1.5: 17.5, 2.5: 24, 4: 32, 6: 41, 10: 57, 16: 76, 25: 101, 35: 125}
	for _, r := range AmpacityB2.Rows {
		if c, ok := conduit[r.Size.Area]; ok && r.Current >= c {
			t.Errorf("%v: %v is not below %v", r.Size.Area, r.Current, c)
		}
		if c, ok := AmpacityC.Current(r.Size); ok && r.Current > c.Current {
			t.Errorf("%v: method B2 above method C", r.Size.Area)
		}
	}
	boat, nfpa := AmpacityBoat60, AmpacityNFPA60
	for _, r := range nfpa.Rows {
		if b, ok := boat.Current(r.Size); ok && r.Current > b.Current {
			t.Errorf("%v: the default table is above the boat table", r.Size.Gauge)
		}
	}
}

// TestEveryDefaultSizeHasAmpacity: no standard conductor lacks a current.
func TestEveryDefaultSizeHasAmpacity(t *testing.T) {
	for _, s := range []System{Metric, AWG} {
		for _, c := range Conductors(s) {
			if _, ok := AmpacityOf(s).Current(c.Size); !ok {
				t.Errorf("%v has no ampacity", c.Size)
			}
		}
	}
	if _, err := AmpacityB2.AmbientFactor(61); err == nil {
		t.Error("61 °C gets a factor for PVC")
	}
	if k, err := AmpacityB2.AmbientFactor(31); err != nil || k != 0.94 {
		t.Errorf("31 °C: %v %v, want the next line, 0.94", k, err)
	}
	if k, err := AmpacityNFPA60.GroupFactor(2); err != nil || k != 0.80 {
		t.Errorf("two circuits, four conductors: %v %v, want 0.80", k, err)
	}
	if _, err := AmpacityB2.GroupFactor(21); err == nil {
		t.Error("21 circuits get a factor")
	}
}
