package quantity

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

func TestString(t *testing.T) {
	for _, c := range []struct {
		got  fmt.Stringer
		want string
		why  string
	}{
		{Volt(24), "24 V", "no padding"},
		{Volt(0.85), "0.85 V", "tenths of a volt stay volts"},
		{Volt(0.0123), "12.3 mV", "milli below"},
		{Volt(-3.5), "-3.5 V", "sign"},
		{Volt(13.7512), "13.75 V", "four digits"},
		{Volt(0), "0 V", "zero"},
		{Volt(math.Copysign(0, -1)), "0 V", "no negative zero"},
		{Volt(math.Inf(1)), "∞ V", "infinite"},
		{Volt(math.NaN()), "NaN V", "not a number"},
		{Ampere(0.3), "300 mA", "milli"},
		{Ampere(2), "2 A", "whole"},
		{Ampere(0.99996), "1 A", "the prefix follows the rounding"},
		{Ampere(0.0000005), "500 nA", "nano"},
		{Ohm(4700), "4.7 kΩ", "kilo"},
		{Ohm(0.0121), "12.1 mΩ", "milli"},
		{Ohm(1e6), "1 MΩ", "mega"},
		{Watt(6), "6 W", "plain"},
		{Watt(1500), "1.5 kW", "kilo"},
		{Metre(9), "9 m", "plain"},
		{Metre(0.3), "0.3 m", "lengths stay metres"},
		{Metre(2000), "2000 m", "lengths stay metres"},
		{SquareMM(1.5), "1.5 mm²", "plain"},
		{Celsius(-5), "-5 °C", "below zero"},
		{Second(14400), "4 h", "hours"},
		{Second(5400), "1.5 h", "fraction of an hour"},
		{Second(1800), "30 min", "minutes"},
		{Second(90), "90 s", "under two minutes"},
		{Second(0.1), "100 ms", "milliseconds"},
		{AmpereHour(55), "55 Ah", "plain"},
		{AmpereHour(0.7), "700 mAh", "milli"},
		{Lux(10), "10 lx", "plain"},
		{Lumen(12346), "12350 lm", "four digits, zeros up to the point"},
		{Farad(47e-6), "47 µF", "micro"},
		{Farad(22e-12), "22 pF", "pico"},
		{Ratio(0.05), "5 %", "per cent"},
		{Ratio(0.006), "0.6 %", "below one"},
		{KelvinPerWatt(3), "3 K/W", "plain"},
		{Range[Volt]{18, 32}, "18 V..32 V", "range"},
		{Range[Celsius]{-5, 30}, "-5 °C..30 °C", "range below zero"},
		{Toleranced[Volt]{230, 0.1}, "230 V ± 10 %", "tolerance"},
		{Rating{24, 0.5}, "24 V 0.5 A", "the current of a rating stays amperes"},
		{WireSize{Area: 1.5}, "1.5 mm²", "metric"},
		{WireSize{Area: 1.31, Gauge: "16"}, "16 AWG", "gauge"},
	} {
		if got := c.got.String(); got != c.want {
			t.Errorf("%s: %q, want %q", c.why, got, c.want)
		}
	}
}

func TestFormat(t *testing.T) {
	for _, c := range []struct{ got, want, why string }{
		{Format(Volt(13.7512), 3), "13.8 V", "three digits"},
		{Format(Volt(13.7512), 1), "10 V", "one digit"},
		{Format(Volt(13.7512), 0), "13.7512 V", "all digits"},
		{Format(Ampere(1.0/3), 0), "333.3333333333333 mA", "all digits of a third"},
		{Format(Second(5000), 0), "5000 s", "hours would not read back exactly"},
		{Format(Second(5000), 4), "1.389 h", "to four digits they do"},
		{Format(Volt(1e30), 0), "1e30 V", "an exponent where zeros would fill the line"},
		{Fixed(Volt(24.3), 2), "24.30 V", "fixed decimals"},
		{Fixed(Ampere(0.25), 3), "0.250 A", "no prefix"},
		{Fixed(Ratio(0.0414), 1), "4.1 %", "per cent"},
		{Fixed(Volt(-0.001), 2), "0.00 V", "no negative zero"},
		{Fixed(Volt(math.Inf(-1)), 2), "-∞ V", "infinite"},
	} {
		if c.got != c.want {
			t.Errorf("%s: %q, want %q", c.why, c.got, c.want)
		}
	}
}

// readsBack asks that Parse reads exactly the value that Format printed in full.
func readsBack[T Quantity](t *testing.T, v T) {
	t.Helper()
	text := Format(v, 0)
	got, err := Parse[T](text)
	if err != nil || got != v {
		t.Fatalf("%v prints as %q, which reads as %v, %v", float64(v), text, float64(got), err)
	}
}

func TestReadsBack(t *testing.T) {
	rng := rand.New(rand.NewPCG(2041, 12))
	for range 20_000 {
		x := (rng.Float64() - 0.5) * math.Pow(10, float64(rng.IntN(24)-12))
		if rng.IntN(2) == 0 { // as people write: few digits
			x = math.Round(x*1000) / 1000
		}
		readsBack(t, Volt(x))
		readsBack(t, Ampere(x))
		readsBack(t, Ohm(x))
		readsBack(t, Watt(x))
		readsBack(t, Metre(x))
		readsBack(t, SquareMM(x))
		readsBack(t, Celsius(x))
		readsBack(t, Second(x))
		readsBack(t, AmpereHour(x))
		readsBack(t, Lux(x))
		readsBack(t, Lumen(x))
		readsBack(t, Farad(x))
		readsBack(t, Ratio(x))
		readsBack(t, KelvinPerWatt(x))
	}
	for _, x := range []float64{0, math.MaxFloat64, math.SmallestNonzeroFloat64, 1e15, 1e16, 123456789012345678} {
		readsBack(t, Volt(x))
		readsBack(t, Second(x))
		readsBack(t, Lumen(x))
	}
}

// TestStringIsStable asks that what String prints reads as a value that prints alike.
func TestStringIsStable(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 7))
	for range 20_000 {
		v := Ohm(rng.Float64() * math.Pow(10, float64(rng.IntN(14)-6)))
		w, err := Parse[Ohm](v.String())
		if err != nil || w.String() != v.String() || math.Abs(float64(w-v)) > 0.5001e-3*float64(v) {
			t.Fatalf("%v prints as %v, reads as %v, %v", float64(v), v, w, err)
		}
	}
}
