package packet

import (
	"os"
	"strings"
	"testing"
)

// TestPartsListHasPrices: with prices the list has what each thing costs, and a total
// that says what it leaves out; without them it has neither.
func TestPartsListHasPrices(t *testing.T) {
	const path = "../../examples/bracken-reach.yaml"
	src, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	text := strings.Replace(string(src), "practice:\n", "practice:\n  currency: EUR\n  prices: {luminaire corridor: 38.125, terminal 2.5 mm²: 0.90, terminal 6 mm²: 1.60, fuse-link blade 2 A: 0.30, "+
		"distribution-board 8 ways: 12, enclosure Main cabinet: 85, 6 mm²: 2.50}\n", 1)
	d := made(t, path, []byte(text))
	p := built(t, d)
	got := textOf(p, keyParts)
	for _, want := range []string{
		"Each Cost", "38.125 610.00", // 16 lamps
		"Enclosure Main cabinet 85.00 85.00", "with L+", "Total, EUR", "to 2.5 mm²", "to 6 mm²", "as the fitted ones 0.30 0.60",
		"copper, stranded 2.50 6.25", // 2 m of cable, drawn as 2.5 m
		"The total leaves out what has no price: regulated-supply 24 V 0.5 A;",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("no %q in\n%s", want, got)
		}
	}
	if plain := textOf(built(t, example(t, "bracken-reach")), keyParts); strings.Contains(plain, "Cost") || strings.Contains(plain, "Total") {
		t.Error("costs without prices")
	}
}
