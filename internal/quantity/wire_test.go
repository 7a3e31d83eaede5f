package quantity

import (
	"math"
	"testing"
)

// squareMMPerCmil is the area of a circle of one thousandth of an inch.
const squareMMPerCmil = math.Pi / 4 * 0.0254 * 0.0254

// TestGauges compares the law of ASTM B258 with its table: areas in circular mils as
// wire tables print them, rounded to three or four digits (seen in an open handbook's
// gauge table).
func TestGauges(t *testing.T) {
	for _, c := range []struct {
		text  string
		cmil  float64
		gauge string
	}{
		{"4/0 AWG", 211600, "4/0"},
		{"1/0 AWG", 105500, "1/0"},
		{"4 AWG", 41740, "4"},
		{"8 AWG", 16510, "8"},
		{"10 AWG", 10380, "10"},
		{"12 AWG", 6530, "12"},
		{"14 AWG", 4107, "14"},
		{"16 AWG", 2583, "16"},
		{"18 AWG", 1624, "18"},
		{"20 AWG", 1022, "20"},
	} {
		got, err := ParseWireSize(c.text)
		if err != nil || got.Gauge != c.gauge {
			t.Errorf("%s: %v, %v", c.text, got, err)
		}
		cmil := float64(got.Area) / squareMMPerCmil
		if math.Abs(cmil-c.cmil) > 0.0006*c.cmil {
			t.Errorf("%s: %.0f circular mils, the table has %.0f", c.text, cmil, c.cmil)
		}
	}
}

func TestWireSizes(t *testing.T) {
	for _, c := range []struct {
		text, want, why string
	}{
		{"1.5 mm²", "1.5 mm²", "metric"},
		{"1.5mm2", "1.5 mm²", "ASCII"},
		{"16 AWG", "16 AWG", "gauge"},
		{"16awg", "16 AWG", "small letters"},
		{"AWG 16", "16 AWG", "letters first"},
		{"0 AWG", "1/0 AWG", "one name for one gauge"},
		{"4/0 AWG", "4/0 AWG", "thickest"},
		{"40 AWG", "40 AWG", "thinnest"},
	} {
		got, err := ParseWireSize(c.text)
		if err != nil || got.String() != c.want {
			t.Errorf("%q (%s) = %v, %v", c.text, c.why, got, err)
		}
		if again, err := ParseWireSize(got.String()); err != nil || again != got {
			t.Errorf("%q (%s) reads back as %v, %v", c.text, c.why, again, err)
		}
	}
	refuses(t, ParseWireSize, []bad{
		{"1.5", `"1.5" needs a unit: write "1.5 mm²"`, "no unit, and no gauge has a fraction"},
		{"16", `"16" needs a unit: write "16 mm²" or "16 AWG"`, "could be either"},
		{"4/0", `"4/0" needs a unit: write "4/0 AWG"`, "only a gauge is written so"},
		{"1.5 mm", `"1.5 mm" is a length; a conductor size belongs here, such as 1.5 mm² or 16 AWG`, "millimetres"},
		{"1.5 sq", `"sq" is no unit of conductor size: write 1.5 mm² or 16 AWG`, "no such unit"},
		{"41 AWG", `"41 AWG" is no gauge of ASTM B258: they run from 40 AWG (thin) to 1 AWG, then 1/0 to 4/0 AWG (thick)`, "too thin"},
		{"5/0 AWG", `"5/0 AWG" is no gauge of ASTM B258: they run from 40 AWG (thin) to 1 AWG, then 1/0 to 4/0 AWG (thick)`, "too thick"},
		{"-2 AWG", `"-2 AWG" is no gauge of ASTM B258: they run from 40 AWG (thin) to 1 AWG, then 1/0 to 4/0 AWG (thick)`, "negative"},
		{"AWG", `"AWG" is no gauge of ASTM B258: they run from 40 AWG (thin) to 1 AWG, then 1/0 to 4/0 AWG (thick)`, "no number"},
		{"0 mm²", `"0 mm²" is no conductor: the size is above zero`, "nothing"},
		{"-1 mm²", `"-1 mm²" is no conductor: the size is above zero`, "less than nothing"},
	})
}
