package design

import (
	"gloamwright/internal/facts"
)

// Illuminances in which the conditions are solved, far on either side of any
// twilight setting.
const (
	nightLux = 0.1   // a moonless night under trees, and more cautious than starlight needs
	dayLux   = 1000. // overcast day in the open
)

// The battery states of the operating conditions.
const (
	floating   = "floating"
	restedFull = "rested full"
	endOfDis   = "end of discharge"
	cutOff     = "cut off"
	recharging = "recharging"
)

// operating is one operating condition to solve: what stands around the circuit and
// which condition it is reached from.
type operating struct {
	key, name, set, from string
	mains                float64 // 0 off, 1 nominal, 2 high, 3 low
	dark                 bool
	battery              string
	shown                bool
}

// conditionsOfAnyJob lists the operating conditions. Those shown come in the order
// of energising: the battery comes late, the slow ones last. A condition stands
// behind the one that it is reached from in the order of solving, not of printing.
var conditionsOfAnyJob = []operating{
	{key: "end", name: "End of discharge", from: "outage-night", dark: true, battery: endOfDis, shown: true,
		set: "Battery link out, adjustable source in its place: first %s, then down to %s. Mains off. Sensor covered."},
	{key: "cut-off", name: "Cut off", from: "end", dark: true, battery: cutOff, shown: true,
		set: "As before; turn the source down until the cut-off opens, then to %s."},
	{key: "outage-night", name: "Mains off, dark", from: "mains-night", dark: true, battery: restedFull, shown: true,
		set: "Battery link in, charged and rested 2 h. Mains off. Sensor covered. Wait 10 min."},
	{key: "outage-day", name: "Mains off, daylight", from: "mains-day", battery: restedFull, shown: true,
		set: "Battery charged and rested 2 h. Mains off. Sensor uncovered, in daylight. Wait 1 min."},
	{key: "recharging", name: "Recharging", from: "cut-off", mains: 1, battery: recharging, shown: true,
		set: "Battery discharged to the cut-off. Mains on. Sensor uncovered, in daylight. Wait 5 min."},
	{key: "mains-day", name: "Mains on, daylight", mains: 1, battery: floating, shown: true,
		set: "Mains on for 24 h or more. Sensor uncovered, in daylight."},
	{key: "mains-night", name: "Mains on, dark", from: "mains-day", mains: 1, dark: true, battery: floating,
		set: "Mains on for 24 h or more. Sensor covered. Wait 1 min."},
	{key: "mains-high", name: "Mains high, dark", from: "mains-night", mains: 2, dark: true, battery: floating},
	{key: "mains-low", name: "Mains low, dark", from: "mains-night", mains: 3, dark: true, battery: floating},
	{key: "recharging-night", name: "Recharging, dark", from: "recharging", mains: 1, dark: true, battery: recharging},
	{key: "end-day", name: "End of discharge, daylight", from: "outage-day", battery: endOfDis},
}

// wanted says whether a circuit must be lit in a condition, and whether the
// condition asks anything of it: with the battery cut off nothing is asked, nor before
// the cut-off has reclosed behind it.
func (m *maker) wanted(lit string, c *facts.Condition) (lights, known bool) {
	if c.Battery == cutOff || c.Battery == recharging && m.opened(c) {
		return false, false
	}
	mains := c.MainsV > 0
	switch lit {
	case "always":
		return true, true
	case "night":
		return c.Dark, true
	case "outage":
		return !mains, true
	default: // outage-night
		return !mains && c.Dark, true
	}
}

// opened reports whether the cut-off is open in a condition.
func (m *maker) opened(c *facts.Condition) bool {
	return m.f.CutOff != nil && !m.solved[c.Key].State[m.f.CutOff.Part.Designation]
}
