package catalogue

import "gloamwright/internal/quantity"

// cartridgeRatings is the R10 series of IEC 60127-2, 0.2 A to 6.3 A read in a
// datasheet.
var cartridgeRatings = []quantity.Ampere{0.2, 0.25, 0.315, 0.4, 0.5, 0.63, 0.8, 1, 1.25, 1.6, 2, 2.5, 3.15, 4, 5, 6.3}

// cartridgeDC is the highest DC voltage at which the breaking capacity of a 250 V AC
// link is trusted here: low-voltage circuits without much inductance. Common
// practice, no source; the standard rates these links for AC only.
const cartridgeDC quantity.Volt = 60

// FuseCartridgeT are time-lag 5 × 20 mm links of low breaking capacity, IEC 60127-2
// sheet 3, gates read in a datasheet. The breaking capacity is 35 A or ten times the
// rating, the greater.
var FuseCartridgeT = &FuseClass{
	Name: "cartridge-t", Title: "Fuse-link 5 × 20 mm, time-lag",
	Ratings: cartridgeRatings,
	Bands: []GateBand{{UpTo: 6.3, Gates: Gates{
		Fastest: []GatePoint{{1.5, 3600}, {2.75, 0.6}, {4, 0.15}, {10, 0.02}},
		Slowest: []GatePoint{{2.1, 120}, {2.75, 10}, {4, 3}, {10, 0.3}},
	}, Evidence: Evidence{Source: "IEC 60127-2 sheet 3", Seen: true}}},
	Conventional: 2.1,
	Volt:         cartridgeDC, Breaking: 35, BreakingMultiple: 10, Sheet: true,
	Capacity: Evidence{Source: "IEC 60127-2 sheet 3", Seen: true, Note: "rated for 250 V AC"},
}

// FuseCartridgeF are quick-acting 5 × 20 mm links of low breaking capacity,
// IEC 60127-2 sheet 2, gates from memory.
var FuseCartridgeF = &FuseClass{
	Name: "cartridge-f", Title: "Fuse-link 5 × 20 mm, quick-acting",
	Ratings: cartridgeRatings,
	Bands: []GateBand{{UpTo: 6.3, Gates: Gates{
		Fastest: []GatePoint{{1.5, 3600}, {2.75, 0.05}, {4, 0.01}},
		Slowest: []GatePoint{{2.1, 1800}, {2.75, 2}, {4, 0.3}, {10, 0.02}},
	}, Evidence: Evidence{Source: "IEC 60127-2 sheet 2"}}},
	Conventional: 2.1,
	Volt:         cartridgeDC, Breaking: 35, BreakingMultiple: 10, Sheet: true,
	Capacity: Evidence{Source: "IEC 60127-2 sheet 2", Note: "rated for 250 V AC"},
}

// FuseCartridgeHighT are time-lag 5 × 20 mm links of high breaking capacity,
// IEC 60127-2 sheet 5, gates read in a datasheet.
var FuseCartridgeHighT = &FuseClass{
	Name: "cartridge-t-high", Title: "Fuse-link 5 × 20 mm, time-lag, high breaking capacity",
	Ratings: []quantity.Ampere{1, 1.25, 1.6, 2, 2.5, 3.15, 4, 5, 6.3},
	Bands: []GateBand{
		{UpTo: 3.15, Gates: Gates{
			Fastest: []GatePoint{{1.5, 3600}, {2.75, 0.75}, {4, 0.095}, {10, 0.01}},
			Slowest: []GatePoint{{2.1, 1800}, {2.75, 80}, {4, 5}, {10, 0.15}},
		}, Evidence: Evidence{Source: "IEC 60127-2 sheet 5", Seen: true}},
		{UpTo: 6.3, Gates: Gates{
			Fastest: []GatePoint{{1.5, 3600}, {2.75, 0.75}, {4, 0.15}, {10, 0.02}},
			Slowest: []GatePoint{{2.1, 1800}, {2.75, 80}, {4, 5}, {10, 0.15}},
		}, Evidence: Evidence{Source: "IEC 60127-2 sheet 5", Seen: true}},
	},
	Conventional: 2.1,
	Volt:         cartridgeDC, Breaking: 1500, Sheet: true,
	Capacity: Evidence{Source: "IEC 60127-2 sheet 5", Seen: true, Note: "rated for 250 V AC"},
}
