package network

// Parameter positions of the twilight switch.
const (
	photoDark = iota
	photoLight
	photoOwn
	photoOhm
	photoMin
	photoLux
)

// photoswitchModel is a twilight switch module with a make contact for light.
var photoswitchModel = &Model{
	Name: "photoswitch", Doc: "Twilight switch module: its contact 13-14 is closed while it is light.",
	Pins: pins("+", "-", "13", "14"),
	Params: []ParamSpec{
		needed(positive(param("dark_below_lx", "lx", 0, "illuminance below which it is dark"))),
		needed(positive(param("light_above_lx", "lx", 0, "illuminance from which it is light"))),
		param("own_ampere", "A", 0, "current it takes itself"),
		ohms("resistance of the closed contact", contactOhm),
		param("min_volt", "V", 0, "supply below which its contact falls open"),
		{Name: "lux", Unit: "lx", Doc: "illuminance on its eye; below zero that of the condition", Default: -1},
	},
	Law: "light: i(13→14) = (v13 − v14)/ohm; dark: i = 0; i(+→−) = own_ampere·fade(v(+) − v(−), 3 V); " +
		"light from light_above_lx on, dark below dark_below_lx, and dark without min_volt of supply, at least 0.5 V",
	Source: "definition",
	Memory: "light/dark",
	joined: [][2]int{{0, 1}, {2, 3}}, branches: 1,
	check: func(p []float64) string {
		if p[photoLight] < p[photoDark] {
			return "light_above_lx must not be below dark_below_lx"
		}
		return ""
	},
	eval: func(c *cell) {
		const own = 4 // the current 13 → 14
		i := c.v[own]
		c.f[2], c.f[3] = i, -i
		c.j[2][own], c.j[3][own] = 1, -1
		if c.on {
			c.f[own] = c.across(2, 3) - c.p[photoOhm]*i
			c.j[own][2], c.j[own][3], c.j[own][own] = 1, -1, -c.p[photoOhm]
		} else {
			c.f[own] = -i
			c.j[own][own] = -1
		}
		drain(c, 0, 1, c.p[photoOwn], ownVolt)
	},
	next: func(c *cell) bool {
		lux := c.p[photoLux]
		if lux < 0 {
			lux = c.at.Lux
		}
		// Where its supply is cut the sign of what rounding leaves there decides nothing.
		if c.across(0, 1) < max(c.p[photoMin], liveVolt) {
			return false
		}
		if c.on {
			return lux >= c.p[photoDark]
		}
		return lux >= c.p[photoLight]
	},
}
