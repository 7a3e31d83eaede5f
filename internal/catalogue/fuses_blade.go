package catalogue

import "gloamwright/internal/quantity"

// Voltages and breaking capacity of blade fuses: ISO 8820-3 scope, read in a
// catalogue entry of the standard (32 V or 58 V DC, up to 100 A, 1000 A).
const (
	bladeVolt     quantity.Volt   = 32
	bladeVolt58   quantity.Volt   = 58
	bladeBreaking quantity.Ampere = 1000
)

var bladeScope = Evidence{Source: "ISO 8820-3 scope", Seen: true}

// bladeRatings and their body colours: ISO 8820-3 and SAE J1284, read up to 30 A,
// from memory above.
var (
	bladeRatings = []quantity.Ampere{1, 2, 3, 4, 5, 7.5, 10, 15, 20, 25, 30, 35, 40}
	bladeColours = []string{
		"black", "grey", "violet", "pink", "light brown", "brown", "red", "light blue",
		"yellow", "clear", "light green", "blue-green", "amber",
	}
)

// bladeGates are the operating times of ISO 8820-3 for types C and F, from memory.
// At 135 % editions differ (600 s or 1800 s): the longer is held. At 350 % and 600 %
// makers of some types print narrower limits: the wider are held.
var bladeGates = Gates{
	Fastest: []GatePoint{{1.10, 360000}, {1.35, 0.75}, {1.60, 0.25}, {2.00, 0.15}, {3.50, 0.04}, {6.00, 0.02}},
	Slowest: []GatePoint{{1.35, 1800}, {1.60, 50}, {2.00, 5}, {3.50, 0.5}, {6.00, 0.1}},
}

// FuseBlade are blade fuses of type C (medium), 1 A to 40 A, 32 V DC.
var FuseBlade = &FuseClass{
	Name: "blade", Title: "Blade fuse, type C",
	Ratings: bladeRatings, Colours: bladeColours,
	Bands:        []GateBand{{UpTo: 40, Gates: bladeGates, Evidence: Evidence{Source: "ISO 8820-3 operating times"}}},
	Conventional: 1.35,
	Volt:         bladeVolt, Breaking: bladeBreaking, DC: true, Capacity: bladeScope,
}

// FuseBlade58 are the same fuses in the 58 V DC execution, for 48 V systems.
var FuseBlade58 = &FuseClass{
	Name: "blade-58", Title: "Blade fuse, type C, 58 V",
	Ratings: bladeRatings, Colours: bladeColours,
	Bands:        []GateBand{{UpTo: 40, Gates: bladeGates, Evidence: Evidence{Source: "ISO 8820-3 operating times"}}},
	Conventional: 1.35,
	Volt:         bladeVolt58, Breaking: bladeBreaking, DC: true, Capacity: bladeScope,
}

// FuseBladeHigh are blade fuses of type E (high current), 20 A to 80 A. Operating
// times of ISO 8820-3 from memory with little confidence: check them against the
// fuse's own sheet. Colours by SAE practice, from memory.
var FuseBladeHigh = &FuseClass{
	Name: "blade-high", Title: "Blade fuse, type E",
	Ratings: []quantity.Ampere{20, 30, 40, 50, 60, 70, 80},
	Colours: []string{"yellow", "light green", "amber", "red", "blue", "brown", "clear"},
	Bands: []GateBand{{UpTo: 80, Gates: Gates{
		Fastest: []GatePoint{{1.10, 360000}, {1.35, 60}, {2.00, 2}, {3.50, 0.2}, {6.00, 0.04}},
		Slowest: []GatePoint{{1.35, 1800}, {2.00, 60}, {3.50, 7}, {6.00, 1}},
	}, Evidence: Evidence{Source: "ISO 8820-3 operating times, type E", Note: "little confidence"}}},
	Conventional: 1.35,
	Volt:         bladeVolt58, Breaking: bladeBreaking, DC: true, Capacity: bladeScope,
}
