package catalogue

import "gloamwright/internal/quantity"

// OpenCollector is a class of comparators whose output only pulls low.
type OpenCollector struct {
	Name       string
	Volt       quantity.Volt   // supply, at most
	Sink       quantity.Ampere // that every output takes, at least
	Saturation quantity.Volt   // of the conducting output without current
	Series     quantity.Ohm    // rise of it with current
	Own        quantity.Ampere // supply current
	Bias       quantity.Ampere // out of each input
	Offset     quantity.Volt   // both ways, at most
	Evidence
}

// ComparatorDual is the dual comparator of the open-collector kind for single
// supplies: typical datasheet values from memory.
var ComparatorDual = OpenCollector{
	Name: "dual, open collector", Volt: 36, Sink: 0.006, Saturation: 0.1, Series: 40, Own: 0.8e-3, Bias: 25e-9, Offset: 0.005,
	Evidence: Evidence{Source: "dual comparator of the open-collector kind, typical datasheet"},
}

// PresetValues are resistances in which presets and trimmers are sold, and PresetTol
// the tolerance of the whole track. Common practice, no source.
var PresetValues = []quantity.Ohm{100, 200, 500, 1e3, 2e3, 5e3, 10e3, 20e3, 50e3, 100e3}

// PresetTol is the tolerance of a preset's track.
const PresetTol quantity.Ratio = 0.2

// CapacitorVolts are rated voltages of electrolytic capacitors. Common practice, no
// source.
var CapacitorVolts = []quantity.Volt{6.3, 10, 16, 25, 35, 50, 63, 80, 100}

// BridgeCurrents are rated currents of bridge rectifiers, BridgeVolts their repetitive
// peak reverse voltages. Common practice, no source.
var (
	BridgeCurrents = []quantity.Ampere{1, 1.5, 2, 4, 6, 8, 10, 15, 25, 35, 50}
	BridgeVolts    = []quantity.Volt{50, 100, 200, 400}
)

// ShuntVolt is the voltage of a measuring shunt at its rated current, and MeterRanges
// the full scales of direct-current panel meters: IEC 60051-2, from memory.
const ShuntVolt quantity.Volt = 0.060

// MeterRanges are full scales of ammeters.
var MeterRanges = []quantity.Ampere{1, 1.5, 2.5, 4, 6, 10, 15, 20, 25, 30, 40, 60, 100, 150, 200, 250, 300, 400, 500}

// StandOffs are stand-off voltages of transient suppressor diodes. Their breakdown
// begins at 1.11 times the stand-off or above at BreakdownTest, and they clamp at about
// 1.6 times. Typical of the 600 W and 1500 W families, from memory.
var StandOffs = []quantity.Volt{5, 6, 6.5, 7, 7.5, 8, 8.5, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18, 20, 22, 24, 26, 28, 30, 33, 36, 40, 43, 45, 48, 51, 54, 58, 60}

// Figures of transient suppressor diodes.
const (
	Breakdown     quantity.Ratio  = 1.11
	Clamp         quantity.Ratio  = 1.6
	BreakdownTest quantity.Ampere = 1e-3
	SuppressorTol quantity.Ratio  = 0.05
	PulsePower    quantity.Watt   = 600
)
