package catalogue

import "gloamwright/internal/quantity"

// knifeGate is one line of IEC 60269-1 table 3: the currents between which a gG link
// of one rating melts, from memory.
type knifeGate struct {
	rating                       quantity.Ampere
	min10s, max5s, min100, max01 float64 // A
	conventional                 quantity.Second
}

var knifeLines = []knifeGate{
	{16, 33, 65, 85, 150, 3600}, {20, 42, 85, 110, 200, 3600}, {25, 52, 110, 150, 260, 3600},
	{32, 75, 150, 200, 350, 3600}, {40, 95, 190, 260, 450, 3600}, {50, 125, 250, 350, 610, 3600},
	{63, 160, 320, 450, 820, 3600}, {80, 215, 425, 610, 1100, 7200}, {100, 290, 580, 820, 1450, 7200},
	{125, 355, 715, 1100, 1910, 7200}, {160, 460, 950, 1450, 2590, 7200}, {200, 610, 1250, 1910, 3420, 10800},
	{250, 750, 1650, 2590, 4500, 10800}, {315, 1050, 2200, 3420, 6000, 10800}, {400, 1420, 2840, 4500, 8060, 10800},
}

// Conventional currents of gG links of 16 A and more: IEC 60269-1 table 2, from memory.
const (
	knifeHolds = 1.25
	knifeOpens = 1.6
)

// FuseKnife are general-purpose (gG) fuse-links with knife contacts for a battery's
// terminal: IEC 60269-2 demands a DC breaking capacity of at least 25 kA at 250 V
// DC (from memory). Use links whose own sheet states the DC rating.
var FuseKnife = func() *FuseClass {
	c := &FuseClass{
		Name: "knife", Title: "Fuse-link with knife contacts, gG, DC rated",
		Conventional: knifeOpens,
		Volt:         250, Breaking: 25000, DC: true,
		Capacity: Evidence{Source: "IEC 60269-2"},
	}
	for _, l := range knifeLines {
		n := float64(l.rating)
		c.Ratings = append(c.Ratings, l.rating)
		c.Bands = append(c.Bands, GateBand{UpTo: l.rating, Gates: Gates{
			Fastest: []GatePoint{{knifeHolds, l.conventional}, {l.min10s / n, 10}, {l.min100 / n, 0.1}},
			Slowest: []GatePoint{{knifeOpens, l.conventional}, {l.max5s / n, 5}, {l.max01 / n, 0.1}},
		}, Evidence: Evidence{Source: "IEC 60269-1 tables 2 and 3"}})
	}
	return c
}()

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
