package quantity

import (
	"errors"
	"math"
	"strings"
	"testing"
	"unicode/utf8"
)

// fuzzOne asks of any text: a finite value that reads back, or a complete error.
func fuzzOne[T Quantity](t *testing.T, s string) {
	v, err := Parse[T](s)
	if err != nil {
		var pe *ParseError
		if !errors.As(err, &pe) || pe.Problem == 0 || err.Error() == "" || !utf8.ValidString(strings.ToValidUTF8(err.Error(), "")) {
			t.Fatalf("%q: incomplete error %#v", s, err)
		}
		return
	}
	if math.IsNaN(float64(v)) || math.IsInf(float64(v), 0) {
		t.Fatalf("%q = %v", s, float64(v))
	}
	readsBack(t, v)
	if _, rest, err := Cut[T](s + " x"); err != nil || strings.TrimSpace(rest) != "x" {
		t.Fatalf("%q before other text leaves %q, %v", s, rest, err)
	}
}

func FuzzParse(f *testing.F) {
	for _, s := range []string{"24 V", "1.5 mm2", "5 degC", "10 ohm", "22 ft 6 in", "47 uF", "4 h", "90 s", "5 %", "3 K/W", "4k7", "1,500.5 A", "\u2212.5e-3\u00a0mΩ", "7′", "1e400 m", "\xff 3 V"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		fuzzOne[Volt](t, s)
		fuzzOne[Ampere](t, s)
		fuzzOne[Ohm](t, s)
		fuzzOne[Watt](t, s)
		fuzzOne[Metre](t, s)
		fuzzOne[SquareMM](t, s)
		fuzzOne[Celsius](t, s)
		fuzzOne[Second](t, s)
		fuzzOne[AmpereHour](t, s)
		fuzzOne[Lux](t, s)
		fuzzOne[Lumen](t, s)
		fuzzOne[Farad](t, s)
		fuzzOne[Ratio](t, s)
		fuzzOne[KelvinPerWatt](t, s)
	})
}

func FuzzParseComposed(f *testing.F) {
	for _, s := range []string{"18 V..32 V", "5 °C…30 °C", "230 V ± 10 %", "230 V +- 10 %", "24 V 0.5 A", "0.5 A 24 V", "16 AWG", "4/0 AWG", "1.5 mm²", "18 V - 32 V"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		if r, err := ParseRange[Volt](s); err == nil && !(r.Low <= r.High) {
			t.Fatalf("%q = %v", s, r)
		}
		if v, err := ParseToleranced[Volt](s); err == nil && !(0 <= v.Plus && v.Plus < 1) {
			t.Fatalf("%q = %v", s, v)
		}
		if r, err := ParseRating(s); err == nil && (math.IsInf(float64(r.Volt), 0) || math.IsNaN(float64(r.Ampere))) {
			t.Fatalf("%q = %v", s, r)
		}
		if w, err := ParseWireSize(s); err == nil {
			if !(w.Area > 0) || math.IsInf(float64(w.Area), 0) {
				t.Fatalf("%q = %v", s, w)
			}
			if w.Gauge != "" {
				if again, err := ParseWireSize(w.String()); err != nil || again != w {
					t.Fatalf("%q = %v reads back as %v, %v", s, w, again, err)
				}
			}
		}
	})
}
