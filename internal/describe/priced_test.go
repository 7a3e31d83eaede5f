package describe

import (
	"strings"
	"testing"
)

// TestPricedThings: every sort of thing reads its own example, and writes it back as it
// stands.
func TestPricedThings(t *testing.T) {
	for _, x := range PricedThings() {
		p, err := readPriceName(x.Example)
		if err != nil || p.Of.Val != x.Example || p.Word != x.Word || p.Thing().Doc != x.Doc {
			t.Errorf("%s: %+v, %v", x.Example, p, err)
		}
		if !strings.HasSuffix(x.Doc, ".") || (x.Follows == "") != (x.Example == x.Word) {
			t.Errorf("%s: bad entry", x.Example)
		}
	}
}

// TestPriceSpellings: one thing has one name, however it is written.
func TestPriceSpellings(t *testing.T) {
	for spelt, name := range map[string]string{
		"1.5 mm2": "1.5 mm²", "AWG 16": "16 AWG", "16 awg": "16 AWG", "wire  2.5mm²": "wire 2.5 mm²",
		"fuse blade 2000 mA": "fuse blade 2 A", "charger 24V 1500 mA": "charger 24 V 1.5 A", "block nicd 1.2 V 10 Ah": "block nicd 1.2 V 10 Ah",
		"distribution-board 8": "distribution-board 8 ways", "enclosure Main cabinet": "enclosure Main cabinet",
	} {
		if p, err := readPriceName(spelt); err != nil || p.Of.Val != name {
			t.Errorf("%q is read as %q, %v; want %q", spelt, p.Of.Val, err, name)
		}
	}
}

// TestSetPrice: one price can be set from outside, new or there already.
func TestSetPrice(t *testing.T) {
	src := "practice:\n  prices: {1.5 mm²: 0.6}\n"
	for path, want := range map[string]string{
		`practice.prices."1.5 mm²"`: "practice:\n  prices: {1.5 mm²: 0.7}\n",
		`practice.prices.photocell`: "practice:\n  prices: {photocell: 0.7, 1.5 mm²: 0.6}\n",
	} {
		if out, err := Override([]byte(src), path, "0.7"); err != nil || string(out) != want {
			t.Errorf("%s: %v\n%s", path, err, out)
		}
	}
}
