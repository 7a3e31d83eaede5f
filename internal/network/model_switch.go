package network

// contactOhm is the resistance of a closed contact. Automotive relay data give 3 mΩ
// typical, 50 mΩ maximum at 1 A 6 V (seen); 10 mΩ stands for a contact in use.
const contactOhm = 10e-3

// switchModel is a contact that a hand sets: isolator, test switch, push button.
var switchModel = &Model{
	Name: "switch", Doc: "Isolator, test switch, push button: a contact that a hand sets.", Pins: pins("1", "2"),
	Params: []ParamSpec{
		ohms("resistance when closed", contactOhm),
		limits(param("closed", "", 1, "1 closed, 0 open"), 0, 1),
	},
	Law:      "closed: i(1→2) = (v1 − v2)/ohm; open: i = 0",
	Source:   "Ohm's law",
	branches: 1, joined: [][2]int{{0, 1}},
	straight: func(c *cell) line { return line{ohm: c.p[0], open: c.p[1] < 0.5} },
	direct:   func(p []float64, _ bool) bool { return p[1] >= 0.5 && p[0] == 0 },
}

// contactModel is a contact that another element moves.
var contactModel = &Model{
	Name: "contact", Doc: "Contact of a relay, moved by the element that Control names.", Pins: pins("1", "2"),
	Params: []ParamSpec{
		ohms("resistance when closed", contactOhm),
		limits(param("rest_closed", "", 0, "1 break contact (closed at rest), 0 make contact"), 0, 1),
	},
	Law:      "closed when the control's position differs from rest_closed: i(1→2) = (v1 − v2)/ohm; else i = 0",
	Source:   "Ohm's law",
	branches: 1, moved: true, joined: [][2]int{{0, 1}},
	straight: func(c *cell) line { return line{ohm: c.p[0], open: !contactClosed(c.p, c.on)} },
	direct:   func(p []float64, on bool) bool { return contactClosed(p, on) && p[0] == 0 },
}

func contactClosed(p []float64, on bool) bool { return on != (p[1] >= 0.5) }
