package network

// Packaged supplies. Their output resistance is that of regulation and terminals.
const (
	supplyOhm     = 10e-3 // from memory, typical of packaged supplies
	minSupplyOhm  = 1e-3
	mainsHolds    = 0.85 // fraction of nominal mains down to which the output holds (common practice, no source)
	bleedOhm      = 10e3 // bleed across the output (common practice, no source)
	cornerPortion = 0.01 // rounding of the corners, as a part of the limit
)

// Parameter positions of the charger and the supply.
const (
	chargerFloat = iota
	chargerBoost
	chargerLimit
	chargerOhm
	chargerStandby
	chargerHolds
)

const (
	supplyVolt = iota
	supplyLimit
	supplyR
	supplyBleed
	supplyHolds
)

// rectified puts out a current from pin 0 that falls from limit to zero as the
// voltage across pins 0 and 1 rises to volt; it never takes current back.
func rectified(c *cell, volt, limit, ohm float64) {
	u := (volt - c.across(0, 1)) / ohm
	i, slope := clamped(u, 0, limit, cornerPortion*limit)
	c.flow(0, 1, -i, slope/ohm)
}

func limitRectified(c *cell, old []float64, volt, limit, ohm float64) bool {
	v, cut := betweenKnees(old[0]-old[1], c.across(0, 1), volt-limit*ohm, volt)
	c.v[0] = c.v[1] + v
	return cut
}

// onMains returns the output setting at the mains voltage of the condition: full
// down to the holding limit, then in proportion.
func onMains(volt float64, at *Environment, holds float64) float64 {
	if holds > 0 && at.Mains < holds {
		return volt * at.Mains / holds
	}
	return volt
}

func chargerSetting(c *cell) (float64, bool) {
	if c.at.Mains <= 0 {
		return 0, false
	}
	switch c.at.Charge {
	case Float:
		return onMains(c.p[chargerFloat], c.at, c.p[chargerHolds]), true
	case Boost:
		return onMains(c.p[chargerBoost], c.at, c.p[chargerHolds]), true
	}
	return 0, false
}

// chargerModel is a packaged constant-current, constant-voltage charger.
var chargerModel = &Model{
	Name: "charger",
	Doc:  "Packaged charger: constant current, then constant voltage; float or boost by condition. It takes no current back but its standby current.",
	Pins: []ModelPin{{Name: "+"}, {Name: "-"}, {Name: "θ+", Optional: true}, {Name: "θ-", Optional: true}},
	Params: []ParamSpec{
		needed(positive(param("float_volt", "V", 0, "float setting at the battery's temperature"))),
		positive(param("boost_volt", "V", 0, "boost setting at the battery's temperature; without it the float setting")),
		needed(positive(param("limit_ampere", "A", 0, "current limit"))),
		limits(param("ohm", "Ω", supplyOhm, "output resistance"), minSupplyOhm, maxOhm),
		param("standby_ampere", "A", 0, "current taken from the battery while it is off"),
		limits(param("mains_holds", "", mainsHolds, "fraction of nominal mains down to which it holds its setting"), 0, 1),
	},
	Law: "mains on and charging: i(out of +) = clamp((set − v)/ohm, 0, limit_ampere, limit_ampere/100), set = float_volt or boost_volt, " +
		"times mains/mains_holds when that is below 1; else i(into +) = standby_ampere·fade(v, 1 V); probe pins θ+ and θ− are 1 MΩ from −",
	Source: "characteristic of a current-limited voltage source (charging characteristic IU, DIN 41773-1)",
	joined: [][2]int{{0, 1}, {1, 2}, {1, 3}}, drives: []int{chargerFloat, chargerBoost},
	derive: func(p []float64, given []bool) {
		if !given[chargerBoost] {
			p[chargerBoost] = p[chargerFloat]
		}
	},
	eval: func(c *cell) {
		c.flow(2, 1, c.across(2, 1)/probeOhm, 1/probeOhm)
		c.flow(3, 1, c.across(3, 1)/probeOhm, 1/probeOhm)
		if set, on := chargerSetting(c); on {
			rectified(c, set, c.p[chargerLimit], c.p[chargerOhm])
			return
		}
		drain(c, 0, 1, c.p[chargerStandby], 1)
	},
	limit: func(c *cell, old []float64) bool {
		set, on := chargerSetting(c)
		return on && limitRectified(c, old, set, c.p[chargerLimit], c.p[chargerOhm])
	},
}

// probeOhm ties a charger's probe input to its minus (assumed, no source).
const probeOhm = 1e6

// supplyModel is a packaged regulated mains supply.
var supplyModel = &Model{
	Name: "supply", Doc: "Packaged mains supply, regulated, with a current limit. It takes no current back but that of its bleed.",
	Pins: pins("+", "-"),
	Params: []ParamSpec{
		needed(positive(param("volt", "V", 0, "output voltage"))),
		needed(positive(param("limit_ampere", "A", 0, "current limit"))),
		limits(param("ohm", "Ω", supplyOhm, "output resistance"), minSupplyOhm, maxOhm),
		limits(param("leak_ohm", "Ω", bleedOhm, "bleed across the output"), 1, maxOhm),
		limits(param("mains_holds", "", mainsHolds, "fraction of nominal mains down to which it holds its output"), 0, 1),
	},
	Law: "mains on: i(out of +) = clamp((set − v)/ohm, 0, limit_ampere, limit_ampere/100) − v/leak_ohm, set = volt, " +
		"times mains/mains_holds when that is below 1; mains off: −v/leak_ohm",
	Source: "characteristic of a current-limited voltage source",
	joined: [][2]int{{0, 1}}, drives: []int{supplyVolt},
	eval: func(c *cell) {
		g := 1 / c.p[supplyBleed]
		c.flow(0, 1, c.across(0, 1)*g, g)
		if c.at.Mains > 0 {
			rectified(c, onMains(c.p[supplyVolt], c.at, c.p[supplyHolds]), c.p[supplyLimit], c.p[supplyR])
		}
	},
	limit: func(c *cell, old []float64) bool {
		if c.at.Mains <= 0 {
			return false
		}
		return limitRectified(c, old, onMains(c.p[supplyVolt], c.at, c.p[supplyHolds]), c.p[supplyLimit], c.p[supplyR])
	},
}

// Parameter positions of the transformer supply.
const (
	transformerRated = iota
	transformerAmpere
	transformerOpen
	transformerBleed
)

// transformerModel is the DC side of transformer, bridge and reservoir.
var transformerModel = &Model{
	Name: "transformer-supply",
	Doc:  "Unregulated mains supply: transformer, bridge and reservoir capacitor, as measured at its DC side.",
	Pins: pins("+", "-"),
	Params: []ParamSpec{
		needed(positive(param("rated_volt", "V", 0, "DC voltage at rated current and nominal mains"))),
		needed(positive(param("rated_ampere", "A", 0, "rated DC current"))),
		needed(positive(param("open_volt", "V", 0, "DC voltage without load at nominal mains"))),
		limits(param("leak_ohm", "Ω", bleedOhm, "bleed across the reservoir"), 1, maxOhm),
	},
	Law: "mains on: i(out of +) = round((mains·open_volt − v)/R, rated_ampere/100) − v/leak_ohm, R = (open_volt − rated_volt)/rated_ampere, " +
		"mains as a fraction of nominal; mains off: −v/leak_ohm",
	Source: "Thévenin's theorem on the straight line between the open-circuit and the rated point",
	joined: [][2]int{{0, 1}}, drives: []int{transformerOpen, transformerRated},
	check: func(p []float64) string {
		if p[transformerOpen] <= p[transformerRated] {
			return "open_volt must be above rated_volt"
		}
		return ""
	},
	eval: func(c *cell) {
		g := 1 / c.p[transformerBleed]
		c.flow(0, 1, c.across(0, 1)*g, g)
		if c.at.Mains <= 0 {
			return
		}
		r := (c.p[transformerOpen] - c.p[transformerRated]) / c.p[transformerAmpere]
		u := (c.at.Mains*c.p[transformerOpen] - c.across(0, 1)) / r
		i, slope := rounded(u, cornerPortion*c.p[transformerAmpere])
		c.flow(0, 1, -i, slope/r)
	},
}
