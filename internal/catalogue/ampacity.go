package catalogue

import (
	"fmt"

	"gloamwright/internal/quantity"
)

// Ampacity is the current that one size of a table carries.
type Ampacity struct {
	Size    quantity.WireSize
	Current quantity.Ampere
	Evidence
}

// AmbientFactor is a correction for one ambient temperature; it holds up to UpTo.
type AmbientFactor struct {
	UpTo   quantity.Celsius
	Factor quantity.Ratio
}

// GroupFactor is a correction for loaded circuits (or conductors) run together; it
// holds up to UpTo of them.
type GroupFactor struct {
	UpTo   int
	Factor quantity.Ratio
}

// AmpacityTable is a table of continuous currents with its correction factors.
type AmpacityTable struct {
	Name       string // how it is printed
	Rows       []Ampacity
	Conductor  quantity.Celsius // highest continuous temperature of the conductor
	Base       quantity.Celsius // ambient temperature that the rows hold for
	Ambient    []AmbientFactor  // ascending
	Group      []GroupFactor    // ascending
	GroupOf    int              // 1: Group counts circuits; 2: it counts conductors
	AmbientEvi Evidence
	GroupEvi   Evidence
}

// AmpacityOf returns the default table of a conductor system.
func AmpacityOf(s System) *AmpacityTable {
	if s == AWG {
		return AmpacityNFPA60
	}
	return AmpacityB2
}

// Current returns the row of that size.
func (t *AmpacityTable) Current(size quantity.WireSize) (Ampacity, bool) {
	for _, r := range t.Rows {
		d := float64(r.Size.Area - size.Area)
		if r.Size.Gauge == size.Gauge && (size.Gauge != "" || d < areaMatch && d > -areaMatch) {
			return r, true
		}
	}
	return Ampacity{}, false
}

// AmbientFactor returns the factor of the next listed temperature at or above t.
func (t *AmpacityTable) AmbientFactor(temp quantity.Celsius) (quantity.Ratio, error) {
	for _, f := range t.Ambient {
		if temp <= f.UpTo {
			return f.Factor, nil
		}
	}
	last := t.Ambient[len(t.Ambient)-1].UpTo
	return 0, fmt.Errorf("%s gives no factor above %v °C, and the cable would run at %v °C",
		t.AmbientEvi.Source, float64(last), float64(temp))
}

// GroupFactor returns the factor for that many loaded two-core circuits together.
func (t *AmpacityTable) GroupFactor(circuits int) (quantity.Ratio, error) {
	for _, f := range t.Group {
		if circuits*t.GroupOf <= f.UpTo {
			return f.Factor, nil
		}
	}
	return 0, fmt.Errorf("%s gives no factor for %d circuits run together", t.GroupEvi.Source, circuits)
}
