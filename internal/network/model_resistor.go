package network

// resistive is the law of every plain resistance; parameter 0 is its value.
func resistive(c *cell) line { return line{ohm: c.p[0]} }

func directIfZero(p []float64, _ bool) bool { return p[0] == 0 }

// resistor is Ohm's law.
func resistorLike(name, doc string, ohm ParamSpec) *Model {
	return &Model{
		Name: name, Doc: doc, Pins: pins("1", "2"), Params: []ParamSpec{ohm},
		Law:      "i(1→2) = (v1 − v2)/ohm",
		Source:   "Ohm's law",
		branches: 1, straight: resistive, direct: directIfZero, joined: [][2]int{{0, 1}},
	}
}

var (
	resistorModel  = resistorLike("resistor", "Resistor, preset, shunt, resistive load.", needed(ohms("resistance", 0)))
	conductorModel = resistorLike("conductor", "One core or wire, at its working temperature.", needed(ohms("resistance of the whole length", 0)))
	fuseModel      = resistorLike("fuse", "Fuse link with its holder.", ohms("cold resistance of link and holder", fuseOhm))
	ntcModel       = resistorLike("ntc", "Temperature probe, at the temperature of the condition.", ohms("resistance", 10e3))
	meterModel     = resistorLike("meter", "Voltmeter.", ohms("input resistance", meterOhm))
)

// fuseOhm is the cold resistance of a small blade fuse in its holder (about 7 mΩ for
// 10 A; common practice, no source).
const fuseOhm = 7e-3

// meterOhm is the input resistance of a digital multimeter (common practice).
const meterOhm = 10e6

// capacitorModel carries no direct current.
var capacitorModel = &Model{
	Name: "capacitor", Doc: "Capacitor: carries no direct current.", Pins: pins("1", "2"),
	Law: "i = 0", Source: "definition, at rest",
	eval: func(*cell) {},
}
