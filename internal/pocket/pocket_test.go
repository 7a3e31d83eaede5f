package pocket_test

import (
	"math"
	"testing"

	"gloamwright/internal/pocket"
)

func TestResult(t *testing.T) {
	for _, c := range []struct {
		text string
		want float64
	}{
		{"6.9 Ah × 1.19 × (1 + 0.1) ÷ 0.8", 6.9 * 1.19 * 1.1 / 0.8},
		{"13.74 V − 3 × 2.9 V", 5.04},
		{"max(6 × 1.75 V ; 9.78 V + 0.72 V)", 10.5},
		{"min(4 ; 3 ; 5 A)", 3},
		{"35 °C + 30 K × (16 V ÷ 12 V)^2", 35 + 30*16./12*16/12},
		{"12 × (2.29 V + (−0.003 V/K) × (5 °C − 25 °C))", 12 * (2.29 + 0.003*20)},
		{"√(3 A × 3 A + 16)", 5},
		{"ln(10 ÷ 5) × 3", 3 * math.Ln2},
		{"0.5 A ÷ 0.75 = 0.666667 A → 1 A", 1},
		{"11.4 Ah needed → 12 Ah × 2 = 24 Ah", 24},
		{"rated at 16 V for 14.52 V → 30 A", 30},
		{"fault of 3 A → ∞ s", math.Inf(1)},
		{"2 × 0.25 A lamp-7 + 1 × 0.1 A step 2", 0.6},
		{"21.7 V − 0.3 V to the bar of Board 2 − 0.5 A × 0.2 Ω", 21.3},
	} {
		got, err := pocket.Result(c.text)
		if err != nil || got != c.want && !(math.Abs(got-c.want) <= 1e-12*math.Abs(c.want)) {
			t.Errorf("%q: %v, %v; want %v", c.text, got, err, c.want)
		}
	}
}

func TestMistakes(t *testing.T) {
	for _, text := range []string{"", "V", "(1 + 2", "1 +", "2 × 3 = 7 → 7", "NaN A × 2", "1 ; 2"} {
		if v, err := pocket.Result(text); err == nil {
			t.Errorf("%q: %v, want an error", text, v)
		}
	}
}
