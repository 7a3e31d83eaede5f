package quantity

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"
)

// good is a text, the value it stands for in the type's own unit, and why it is there.
type good struct {
	text string
	want float64
	why  string
}

func accepts[T Quantity](t *testing.T, cases []good) {
	t.Helper()
	for _, c := range cases {
		got, err := Parse[T](c.text)
		if err != nil {
			t.Errorf("%q (%s): %v", c.text, c.why, err)
		} else if float64(got) != c.want {
			t.Errorf("%q (%s) = %v, want %v", c.text, c.why, float64(got), c.want)
		}
	}
}

// The wanted values are the SI Brochure's prefixes and the definitions of ISO 80000
// applied by hand.
func TestParse(t *testing.T) {
	accepts[Volt](t, []good{
		{"24 V", 24, "the plain form"},
		{"24V", 24, "no space"},
		{"  24  V ", 24, "more spaces"},
		{"24\u00a0V", 24, "no-break space"},
		{"24\u202fV", 24, "narrow no-break space"},
		{"850 mV", 0.85, "milli"},
		{"1.2 kV", 1200, "kilo; whether it may be is for others to say"},
		{"-5 V", -5, "negative"},
		{"\u22125 V", -5, "minus sign U+2212"},
		{"+5 V", 5, "plus sign"},
		{".5 V", 0.5, "no digit before the point"},
		{"1e1 V", 10, "exponent"},
		{"24 volts", 24, "in words"},
		{"-0 V", 0, "no negative zero"},
		{"0.1 V", 0.1, "rounded once, as the literal is"},
		{"0.000000000000000000000001 kV", 1e-21, "small"},
	})
	accepts[Ampere](t, []good{
		{"300 mA", 0.3, "exactly the literal 0.3, not 300 times a rounded thousandth"},
		{"20 µA", 20e-6, "micro sign U+00B5"},
		{"20 \u03bcA", 20e-6, "Greek mu U+03BC"},
		{"20 uA", 20e-6, "u for micro"},
		{"10 amps", 10, "in words"},
	})
	accepts[Ohm](t, []good{
		{"10 ohm", 10, "ASCII"},
		{"10 Ω", 10, "omega U+03A9"},
		{"10 \u2126", 10, "ohm sign U+2126"},
		{"4.7 kΩ", 4700, "kilo"},
		{"4.7 kohm", 4700, "kilo, ASCII"},
		{"1 Mohm", 1e6, "mega"},
		{"1 mohm", 1e-3, "milli is not mega"},
	})
	accepts[Watt](t, []good{{"6 W", 6, "plain"}, {"0.5 kW", 500, "kilo"}, {"250 mW", 0.25, "milli"}})
	accepts[Metre](t, []good{
		{"9 m", 9, "plain"},
		{"250 mm", 0.25, "millimetres"},
		{"1.2 km", 1200, "kilometres"},
		{"22 ft", 6.7056, "feet: 0.3048 m each"},
		{"22'", 6.7056, "foot mark"},
		{"6 in", 0.1524, "inches: 0.0254 m each"},
		{"22 ft 6 in", 6.7056 + 0.1524, "feet and inches"},
		{"22' 6\"", 6.7056 + 0.1524, "foot and inch marks"},
		{"22′6″", 6.7056 + 0.1524, "prime and double prime"},
		{"22 feet", 6.7056, "in words"},
	})
	accepts[SquareMM](t, []good{
		{"1.5 mm²", 1.5, "plain"}, {"1.5 mm2", 1.5, "ASCII"}, {"1.5 mm^2", 1.5, "caret"}, {"1.5mm2", 1.5, "no space"}, {"2.5 sqmm", 2.5, "sqmm"},
	})
	accepts[Celsius](t, []good{
		{"-5 °C", -5, "plain"}, {"5 degC", 5, "ASCII"}, {"5 deg C", 5, "ASCII in two words"}, {"5 ºC", 5, "ordinal sign for a degree sign"},
		{"5 ℃", 5, "one character U+2103"}, {"5 C", 5, "letter alone"},
		{"41 °F", 5, "(41 - 32)·5/9"}, {"-40 °F", -40, "where the two scales meet"}, {"212 degF", 100, "boiling water"},
	})
	accepts[Second](t, []good{
		{"5 s", 5, "seconds"}, {"90 s", 90, "more than a minute"}, {"30 min", 1800, "minutes"}, {"4 h", 14400, "hours"}, {"6h", 21600, "no space"},
		{"1.5 h", 5400, "fraction"}, {"1 h 30 min", 5400, "hours and minutes"}, {"1h30min", 5400, "without spaces"}, {"2 d", 172800, "days"}, {"100 ms", 0.1, "milliseconds"},
	})
	accepts[AmpereHour](t, []good{{"55 Ah", 55, "plain"}, {"55 A h", 55, "with a space"}, {"55 A·h", 55, "with a dot"}, {"700 mAh", 0.7, "milli"}})
	accepts[Lux](t, []good{{"10 lx", 10, "plain"}, {"10 lux", 10, "in words"}, {"1 klx", 1000, "kilo"}})
	accepts[Lumen](t, []good{{"600 lm", 600, "plain"}})
	accepts[Farad](t, []good{
		{"47 µF", 47e-6, "micro sign"}, {"47 uF", 47e-6, "ASCII"}, {"47 \u03bcF", 47e-6, "Greek mu"}, {"100 nF", 100e-9, "nano"}, {"22 pF", 22e-12, "pico"},
	})
	accepts[Ratio](t, []good{{"5 %", 0.05, "per cent"}, {"5%", 0.05, "no space"}, {"12.5 percent", 0.125, "in words"}})
	accepts[KelvinPerWatt](t, []good{{"3 K/W", 3, "plain"}, {"3 °C/W", 3, "the older spelling"}})
}

// bad is a text that is refused, with the whole message.
type bad struct{ text, want, why string }

func refuses[T any](t *testing.T, parse func(string) (T, error), cases []bad) {
	t.Helper()
	for _, c := range cases {
		got, err := parse(c.text)
		if err == nil {
			t.Errorf("%q (%s) was read as %v", c.text, c.why, got)
			continue
		}
		var pe *ParseError
		if !errors.As(err, &pe) || pe.Problem == 0 || pe.Want == "" || pe.Examples == "" {
			t.Errorf("%q (%s): incomplete error %#v", c.text, c.why, err)
		}
		if err.Error() != c.want {
			t.Errorf("%q (%s)\n got %s\nwant %s", c.text, c.why, err, c.want)
		}
	}
}

func TestRefused(t *testing.T) {
	refuses(t, Parse[Metre], []bad{
		{"9", `"9" needs a unit: write "9 m" or "9 ft"`, "no unit"},
		{"9.", `"." is no unit of length: write "9 m" or "9 ft"`, "a point without a digit"},
		{"9 A", `"9 A" is a current; a length belongs here, such as 9 m or 30 ft`, "another quantity"},
		{"9 mm²", `"9 mm²" is a cross-section; a length belongs here, such as 9 m or 30 ft`, "mm is not enough of mm²"},
		{"9 M", `"M" is no unit of length: write "9 m"`, "capital"},
		{"9 mtr", `"mtr" is no unit of length: write "9 m" or "9 ft"`, "no such unit"},
		{"9 m 4", `"9 m 4" has "4" after the quantity: write "9 m" alone`, "a second number without a unit"},
		{"9 m 4 m", `"9 m 4 m" has "4 m" after the quantity: write "9 m" alone`, "the same unit twice"},
		{"6 in 22 ft", `"6 in 22 ft" has "22 ft" after the quantity: write "6 in" alone`, "the small unit first"},
		{"9 m corridor", `"9 m corridor" has "corridor" after the quantity: write "9 m" alone`, "more text"},
		{"nine metres", `"nine metres" is not a length: write a number and a unit, such as 9 m or 30 ft`, "no number"},
		{"", `nothing is written here; a length belongs here, such as 9 m or 30 ft`, "empty"},
		{"  ", `nothing is written here; a length belongs here, such as 9 m or 30 ft`, "blank"},
		{"m", `"m" is not a length: write a number and a unit, such as 9 m or 30 ft`, "a unit alone"},
		{"NaN m", `"NaN m" is not a length: write a number and a unit, such as 9 m or 30 ft`, "not a number"},
		{"Inf m", `"Inf m" is not a length: write a number and a unit, such as 9 m or 30 ft`, "infinite"},
		{"0x10 m", `"x10" is no unit of length: write "0 m" or "0 ft"`, "hexadecimal"},
		{"1_000 m", `"_000" is no unit of length: write "1 m" or "1 ft"`, "underscore"},
		{"1 000 m", `"1 000 m" needs a unit: write "1 m" or "1 ft"`, "a space between thousands"},
		{"--9 m", `"--9 m" is not a length: write a number and a unit, such as 9 m or 30 ft`, "two signs"},
		{"1e400 m", `"1e400 m" is too large a number`, "above the largest number"},
		{"1e306 km", `"1e306 km" is too large a number`, "above it after scaling"},
		{"1e99999999999999999999 m", `"1e99999999999999999999 m" is too large a number`, "an exponent above every integer"},
		{strings.Repeat("9", 61) + " m", `"` + strings.Repeat("9", 59) + `…" is not a length: write a number and a unit, such as 9 m or 30 ft`, "more digits than any value needs"},
	})
	refuses(t, Parse[SquareMM], []bad{
		{"1,5 mm²", `"1,5 mm²" has a comma in a number; use a decimal point and no separator for thousands: write "1.5 mm²"`, "decimal comma"},
		{"1,500 mm2", `"1,500 mm2" has a comma in a number; use a decimal point and no separator for thousands: write "1.500 mm²" or "1500 mm²"`, "could be either"},
		{"1,500.5 mm2", `"1,500.5 mm2" has a comma in a number; use a decimal point and no separator for thousands: write "1500.5 mm²"`, "thousands"},
		{"1.500,5 mm2", `"1.500,5 mm2" has a comma in a number; use a decimal point and no separator for thousands: write "1500.5 mm²"`, "thousands the other way"},
		{"16 AWG", `"AWG" is no unit of cross-section: write "16 mm²"`, "a gauge is a size, not an area"},
	})
	refuses(t, Parse[Ohm], []bad{
		{"4k7", `"k7" is no unit of resistance: write "4.7 kΩ"`, "workshop notation"},
		{"4R7", `"R7" is no unit of resistance: write "4.7 Ω"`, "workshop notation"},
		{"10", `"10" needs a unit: write "10 ohm" or "10 kohm"`, "no unit"},
		{"10 KOhm", `"KOhm" is no unit of resistance: write "10 kΩ"`, "capital"},
	})
	refuses(t, Parse[Second], []bad{
		{"4", `"4" needs a unit: write "4 h", "4 min" or "4 s"`, "no unit"},
		{"4:30", `":30" is no unit of duration: write "4 h", "4 min" or "4 s"`, "clock time"},
	})
	refuses(t, Parse[Ampere], []bad{
		{"300 MA", `"MA" is no unit of current: write "300 mA"`, "mega for milli"},
		{"55 Ah", `"55 Ah" is a battery capacity; a current belongs here, such as 2 A or 300 mA`, "capacity"},
	})
	refuses(t, Parse[Ratio], []bad{{"0.05", `"0.05" needs a unit: write "0.05 %"`, "a pure number could be either"}})
}

func TestRanges(t *testing.T) {
	for _, c := range []struct {
		text      string
		low, high Volt
	}{
		{"18 V..32 V", 18, 32}, {"18V..32V", 18, 32}, {"18 V .. 32 V", 18, 32}, {"18 V...32 V", 18, 32}, {"18 V…32 V", 18, 32}, {"24 V..24 V", 24, 24}, {"-5 V..500 mV", -5, 0.5},
	} {
		got, err := ParseRange[Volt](c.text)
		if err != nil || got != (Range[Volt]{c.low, c.high}) {
			t.Errorf("%q = %v, %v", c.text, got, err)
		}
	}
	refuses(t, ParseRange[Volt], []bad{
		{"18..32 V", `"18..32 V" needs a unit: write "18 V..32 V"`, "the unit once"},
		{"18 V..32", `"18 V..32" needs a unit: write "32 V"`, "the unit once, at the low end"},
		{"32 V..18 V", `"32 V..18 V" runs downwards: write "18 V..32 V"`, "high end first"},
		{"18 V - 32 V", `"18 V - 32 V" is no range: join the two ends with two dots, as in "18 V..32 V"`, "a dash"},
		{"18 V – 32 V", `"18 V – 32 V" is no range: join the two ends with two dots, as in "18 V..32 V"`, "a long dash"},
		{"18 V to 32 V", `"18 V to 32 V" is no range: join the two ends with two dots, as in "18 V..32 V"`, "a word"},
		{"24 V", `"24 V" is a single value; a range belongs here, such as 18 V..32 V`, "one value"},
		{"18 A..20 A", `"20 A" is a current; a range from a voltage to another belongs here, such as 18 V..32 V`, "another quantity"},
		{"wide", `"wide" is not a range from a voltage to another: write a number and a unit, such as 18 V..32 V`, "no number"},
	})
}

func TestTolerances(t *testing.T) {
	for _, text := range []string{"230 V ± 10 %", "230 V +- 10 %", "230 V +/- 10 %", "230V±10%", "230 V ±10 %"} {
		got, err := ParseToleranced[Volt](text)
		if err != nil || got != (Toleranced[Volt]{230, 0.1}) {
			t.Errorf("%q = %v, %v", text, got, err)
		}
	}
	if v, _ := ParseToleranced[Volt]("230 V ± 10 %"); v.Low() != 207 || math.Abs(float64(v.High())-253) > 1e-12 {
		t.Errorf("230 V ± 10 %% is 207 V to 253 V (IEC 60038), not %v to %v", v.Low(), v.High())
	}
	refuses(t, ParseToleranced[Volt], []bad{
		{"230 V", `"230 V" says no tolerance: write "230 V ± 10 %", with the supply's own figure`, "no tolerance"},
		{"230", `"230" needs a unit: write 230 V ± 10 %`, "no unit"},
		{"230 V ± 10", `"10" needs a unit: write "10 %"`, "no unit at the tolerance"},
		{"230 V ± 23 V", `"23 V" is a voltage; a percentage belongs here, such as 5 %`, "an absolute tolerance"},
		{"230 V ± -10 %", `"230 V ± -10 %" has a tolerance outside 0 % to 100 %`, "a negative tolerance"},
		{"230 V ± 100 %", `"230 V ± 100 %" has a tolerance outside 0 % to 100 %`, "down to nothing"},
		{"230 V 10 %", `"230 V 10 %" has "10 %" after the quantity: write "230 V ± 10 %"`, "no sign between"},
	})
}

func TestRatings(t *testing.T) {
	for _, text := range []string{"24 V 0.5 A", "24 V 500 mA", "24V 0.5A", "24 V  0.5 A"} {
		got, err := ParseRating(text)
		if err != nil || got != (Rating{24, 0.5}) {
			t.Errorf("%q = %v, %v", text, got, err)
		}
	}
	refuses(t, ParseRating, []bad{
		{"24 V", `"24 V" says no current: write both, such as 24 V 0.5 A`, "no current"},
		{"0.5 A 24 V", `"0.5 A 24 V" has the current first: write "24 V 0.5 A"`, "the wrong way round"},
		{"24 V 0.5", `"24 V 0.5" needs a unit: write 24 V 0.5 A`, "no unit"},
		{"24 V 12 W", `"24 V 12 W" is a power; a voltage and a current belongs here, such as 24 V 0.5 A`, "a power"},
	})
}

// TestSpellings asks that no spelling stands for two units, so that a text has one
// meaning, and that every spelling is read.
func TestSpellings(t *testing.T) {
	seen := map[string]string{}
	for _, sp := range spellings {
		if was, twice := seen[sp.text]; twice {
			t.Errorf("%q is %s and %s", sp.text, was, sp.dim.noun)
		}
		seen[sp.text] = sp.dim.noun
		if fold(sp.text) != sp.text {
			t.Errorf("%q is never met: texts are folded to %q", sp.text, fold(sp.text))
		}
		for _, text := range []string{"7" + sp.text, "7 " + sp.text, "7 " + sp.text + " x", "7 " + sp.text + "..8"} {
			if _, n, err := sp.dim.cut(text); err != nil || !strings.HasSuffix(text[:len(text)-len(dropRunes(text, n))], sp.text) {
				t.Errorf("%q: read %d characters, %v", text, n, err)
			}
		}
	}
}

func TestCut(t *testing.T) {
	for _, c := range []struct {
		text string
		want Metre
		rest string
	}{
		{"9 m corridor at west door", 9, " corridor at west door"},
		{"22 ft 6 in porch", 6.858, " porch"},
		{"9m", 9, ""},
		{"9 m 2nd lamp", 9, " 2nd lamp"},
		{"9\u00a0m Café – “Süd”", 9, " Café – “Süd”"}, // what follows stays as written
		{"9 m \xff", 9, " \xff"},
	} {
		got, rest, err := Cut[Metre](c.text)
		if err != nil || math.Abs(float64(got-c.want)) > 1e-12 || rest != c.rest {
			t.Errorf("%q = %v, %q, %v", c.text, got, rest, err)
		}
	}
}

func ExampleParse() {
	v, err := Parse[Metre]("22 ft 6 in")
	fmt.Println(v, err)
	_, err = Parse[Metre]("9")
	fmt.Println(err)
	// Output:
	// 6.858 m <nil>
	// "9" needs a unit: write "9 m" or "9 ft"
}
