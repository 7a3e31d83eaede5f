package catalogue

import "gloamwright/internal/quantity"

// gateLine is one line of the gates of gG fuse-links: the currents between which a link of
// one rating melts.
type gateLine struct {
	rating                       quantity.Ampere
	min10s, max5s, min100, max01 float64 // A
	conventional                 quantity.Second
}

// Gates of gG links of 16 A and more: IEC 60269-1 table 3, from memory.
var gateLines = []gateLine{
	{16, 33, 65, 85, 150, 3600}, {20, 42, 85, 110, 200, 3600}, {25, 52, 110, 150, 260, 3600},
	{32, 75, 150, 200, 350, 3600}, {40, 95, 190, 260, 450, 3600}, {50, 125, 250, 350, 610, 3600},
	{63, 160, 320, 450, 820, 3600}, {80, 215, 425, 610, 1100, 7200}, {100, 290, 580, 820, 1450, 7200},
	{125, 355, 715, 1100, 1910, 7200}, {160, 460, 950, 1450, 2590, 7200}, {200, 610, 1250, 1910, 3420, 10800},
	{250, 750, 1650, 2590, 4500, 10800}, {315, 1050, 2200, 3420, 6000, 10800}, {400, 1420, 2840, 4500, 8060, 10800},
}

// Gates of gG links below 16 A: IEC 60269-2, gates for the smaller ratings, from memory.
var smallGateLines = []gateLine{
	{2, 3.7, 9.2, 6, 23, 3600}, {4, 7.8, 18.5, 14, 47, 3600}, {6, 11, 28, 26, 72, 3600},
	{8, 16, 35.2, 41.6, 92, 3600}, {10, 22, 46.5, 58, 110, 3600}, {12, 24, 55.2, 69.6, 140.4, 3600},
}

// Conventional currents of gG links: IEC 60269-1 table 2 from 16 A; below that the parts
// for each system say 1.5 and 2.1 times the rating up to 4 A, 1.9 above: the greater is
// held. All from memory.
const (
	powerHolds      = 1.25
	powerOpens      = 1.6
	smallPowerHolds = 1.5
	smallPowerOpens = 2.1
)

// gG fills in ratings and gates of a class from its lines.
func gG(c FuseClass, holds float64, lines []gateLine, source string) *FuseClass {
	for _, l := range lines {
		n := float64(l.rating)
		c.Ratings = append(c.Ratings, l.rating)
		c.Bands = append(c.Bands, GateBand{UpTo: l.rating, Gates: Gates{
			Fastest: []GatePoint{{holds, l.conventional}, {l.min10s / n, 10}, {l.min100 / n, 0.1}},
			Slowest: []GatePoint{{float64(c.Conventional), l.conventional}, {l.max5s / n, 5}, {l.max01 / n, 0.1}},
		}, Evidence: Evidence{Source: source}})
	}
	return &c
}

// powerSource is where the gates of gG links from 16 A on stand.
const powerSource = "IEC 60269-1 tables 2 and 3"

// FuseKnife are general-purpose (gG) fuse-links with knife contacts for a battery's
// terminal: IEC 60269-2 demands a DC breaking capacity of at least 25 kA at 250 V
// DC (from memory). Use links whose own sheet states the DC rating.
var FuseKnife = gG(FuseClass{
	Name: "knife", Title: "Fuse-link with knife contacts, gG, DC rated",
	Conventional: powerOpens,
	Volt:         250, Breaking: 25000, DC: true, Sheet: true,
	Capacity: Evidence{Source: "IEC 60269-2"},
}, powerHolds, gateLines, powerSource)

// Cylindrical fuse-links of IEC 60269-2: links of the class that are marked for DC bear
// 110 V and break 25 kA and more; the lower voltage of the standard's list and less than
// half the current are held (from memory).
const (
	cylinderVolt     quantity.Volt   = 110
	cylinderBreaking quantity.Ampere = 10000
)

var cylinderCapacity = Evidence{Source: "IEC 60269-2, cylindrical links marked for DC", Note: "the lower of the voltages, a part of the breaking capacity"}

// FuseCylinder10 are general-purpose (gG) cylindrical fuse-links of 10 × 38 mm in the
// ratings below 16 A, DC rated by their own sheet. The same body is made up to 32 A, but
// from 16 A on other conventional currents hold: see FuseCylinder14.
var FuseCylinder10 = gG(FuseClass{
	Name: "cylinder-10x38", Title: "Cylindrical fuse-link 10 × 38 mm, gG, DC rated",
	Conventional: smallPowerOpens,
	Volt:         cylinderVolt, Breaking: cylinderBreaking, DC: true, Sheet: true,
	Capacity: cylinderCapacity,
}, smallPowerHolds, smallGateLines, "IEC 60269-2 gates below 16 A")

// FuseCylinder14 are general-purpose (gG) cylindrical fuse-links of 14 × 51 mm, 16 A to
// 50 A, DC rated by their own sheet.
var FuseCylinder14 = gG(FuseClass{
	Name: "cylinder-14x51", Title: "Cylindrical fuse-link 14 × 51 mm, gG, DC rated",
	Conventional: powerOpens,
	Volt:         cylinderVolt, Breaking: cylinderBreaking, DC: true, Sheet: true,
	Capacity: cylinderCapacity,
}, powerHolds, gateLines[:6], powerSource)

// FuseStrip are bolted strip fuse-links for road vehicles (ISO 8820-5). Their
// operating times are not held here: opening times and discrimination cannot be
// stated, and no function of this program states them. Ratings and breaking
// capacity from memory.
var FuseStrip = &FuseClass{
	Name: "strip", Title: "Strip fuse-link, bolted",
	Ratings:      []quantity.Ampere{30, 40, 50, 60, 70, 80, 100, 125, 150, 175, 200, 250, 300, 400, 500},
	Conventional: 1.35,
	Volt:         bladeVolt, Breaking: 2000, DC: true,
	Capacity: Evidence{Source: "ISO 8820-5", Note: "check the fuse's own sheet"},
}
