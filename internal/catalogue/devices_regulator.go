package catalogue

import "gloamwright/internal/quantity"

// AdjustableRegulator is the class of three-terminal positive regulators with a
// 1.25 V reference between output and adjust pin.
type AdjustableRegulator struct {
	Reference                       quantity.Volt
	ReferenceLow, ReferenceHigh     quantity.Volt
	Adjust, AdjustHigh              quantity.Ampere // out of the adjust pin
	LeastLoad                       quantity.Ampere // that keeps it in regulation
	Current                         quantity.Ampere
	Headroom                        quantity.Volt // input over output, at least
	Difference                      quantity.Volt // input over output, at most
	JunctionCase                    quantity.KelvinPerWatt
	JunctionAmbient                 quantity.KelvinPerWatt // without heat sink
	Junction                        quantity.Celsius       // at most
	ProgrammingLow, ProgrammingHigh quantity.Ohm           // usual range of R1
	Evidence
}

// Regulator1A5 is the 1.5 A type in TO-220: reference, adjust current, least load and
// difference read in a datasheet; headroom in an article; thermal resistances from
// memory (the higher of each range).
var Regulator1A5 = AdjustableRegulator{
	Reference: 1.25, ReferenceLow: 1.20, ReferenceHigh: 1.30, Adjust: 50e-6, AdjustHigh: 100e-6,
	LeastLoad: 0.010, Current: 1.5, Headroom: 2.5, Difference: 40,
	JunctionCase: 5, JunctionAmbient: 65, Junction: 125, ProgrammingLow: 120, ProgrammingHigh: 240,
	Evidence: Evidence{Source: "adjustable three-terminal regulator datasheet", Seen: true, Note: "thermal resistances from memory"},
}

// Thermal resistances of mounting, K/W. Common practice, from memory: a TO-220 case
// with compound, with a mica washer, and the span of small heat sinks.
const (
	CaseToSinkBare quantity.KelvinPerWatt = 0.5
	CaseToSinkMica quantity.KelvinPerWatt = 1.5
)
