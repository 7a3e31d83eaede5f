package stage

import (
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// PartKind is one kind of single part, for where no stage kind serves. Every one has two
// pins but the terminal, which has one.
type PartKind struct {
	describe.Kind
	Symbol string
	Polar  bool // its symbol tells which way round it stands
	Part   circuit.Kind
	Text   string // its description in the parts list
	Model  string
	Ends   [2]string // names of the model's pins
	// Size gives its values and the model's parameters.
	Size func(p *Plan, d *describe.SinglePart, part *circuit.Part)
}

func partKindOf(name string) *PartKind {
	for _, k := range partTable {
		if k.Name == name {
			return k
		}
	}
	panic("stage: no part kind " + name + "; the decoder must refuse it")
}

// pinPorts are the pins of a part kind, as the decoder knows them.
func pinPorts(names ...string) []describe.Port {
	var out []describe.Port
	for _, n := range names {
		out = append(out, describe.Port{Name: n, Doc: "pin " + n})
	}
	return out
}

// partField returns a field of a single part that has a default or is required.
func partField[T any](d *describe.SinglePart, name string) T {
	v, ok := describe.Get[T](d.Fields, name)
	if !ok {
		panic("stage: " + d.Kind.Val + " has no " + name + "; the decoder must supply it")
	}
	return v.Val
}

func partResistor() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "resistor", Doc: "Fixed resistor.", Ports: pinPorts("1", "2"),
			Fields: []describe.Field{
				{Name: "value", Type: describe.Resistance, Required: true, Min: "0.001 Ω", Max: "100 MΩ", Doc: "Resistance."},
				{Name: "power", Type: describe.Power, Default: "0.25 W", Min: "0.05 W", Max: "500 W", Doc: "Power that it is rated for."},
				{Name: "tolerance", Type: describe.Percent, Default: "1 %", Min: "0 %", Max: "50 %", Doc: "Tolerance of the resistance, both ways."},
			},
		},
		Symbol: "resistor", Part: circuit.Resistor, Text: "Resistor", Model: "resistor", Ends: [2]string{"1", "2"},
		Size: func(p *Plan, d *describe.SinglePart, r *circuit.Part) {
			v, w := partField[quantity.Ohm](d, "value"), partField[quantity.Watt](d, "power")
			set(r, "resistance", v.String(), float64(v), "Ω", true, true)
			set(r, "power", w.String(), float64(w), "W", w > smallResistor, true)
			params(r, "", circuit.Param{Name: "ohm", Value: float64(v), Tol: float64(partField[quantity.Ratio](d, "tolerance"))})
		},
	}
}

func partCapacitor() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "capacitor", Doc: "Capacitor. Polarised ones stand with pin 1 at plus.", Ports: pinPorts("1", "2"),
			Fields: []describe.Field{
				{Name: "value", Type: describe.Capacitance, Required: true, Min: "1 pF", Max: "10 F", Doc: "Capacitance."},
				{Name: "stands", Type: describe.Voltage, Default: "63 V", Min: "1 V", Max: "1000 V", Stands: true, Doc: "Voltage that it stands."},
				{Name: "polarised", Type: describe.Bool, Default: "no", Doc: "Electrolytic, pin 1 at plus."},
			},
		},
		Symbol: "capacitor", Part: circuit.Capacitor, Text: "Capacitor", Model: "capacitor", Ends: [2]string{"1", "2"},
		Size: func(p *Plan, d *describe.SinglePart, c *circuit.Part) {
			v, u := partField[quantity.Farad](d, "value"), partField[quantity.Volt](d, "stands")
			set(c, "capacitance", v.String(), float64(v), "F", true, true)
			set(c, "voltage", u.String(), float64(u), "V", true, true)
			if u < p.Highest {
				p.block(c.Designation, d.Pos, "", &sizing.BlockedError{
					Limit: sizing.LimitVoltage, Subject: "the voltage that the capacitor stands", Value: float64(u), Bound: float64(p.Highest), Unit: "V",
					Frees: "take one that stands " + quantity.Format(p.Highest, 3) + " or more",
				})
			}
		},
	}
}

func partDiode() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "diode", Doc: "Silicon rectifier diode, 1N4001 to 1N4007 family or like it.", Ports: pinPorts("A", "K"),
			Fields: []describe.Field{
				{Name: "current", Type: describe.Current, Default: "1 A", Min: "1 mA", Max: "200 A", Doc: "Current that it is rated for."},
			},
		},
		Symbol: "diode", Polar: true, Part: circuit.Diode, Text: "Diode", Model: "diode", Ends: [2]string{"A", "K"},
		Size: func(p *Plan, d *describe.SinglePart, r *circuit.Part) {
			i := partField[quantity.Ampere](d, "current")
			set(r, "current", i.String(), float64(i), "A", true, true)
			r.Note = "silicon, at least 100 V"
			// A larger junction carries the same current density at its rating.
			params(r, "", circuit.Param{Name: "is", Value: diodeIS * float64(i)}, circuit.Param{Name: "n", Value: diodeN})
		},
	}
}

func partSchottky() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "schottky", Doc: "Schottky diode, 1N5817 to 1N5822 families or like it.", Ports: pinPorts("A", "K"),
			Fields: []describe.Field{
				{Name: "current", Type: describe.Current, Default: "1 A", Min: "1 mA", Max: "3 A", Doc: "Current that it is rated for."},
			},
		},
		Symbol: "schottky", Polar: true, Part: circuit.Schottky, Text: "Schottky diode", Model: "schottky", Ends: [2]string{"A", "K"},
		Size: func(p *Plan, d *describe.SinglePart, r *circuit.Part) {
			x := catalogue.Diode1N5819
			if partField[quantity.Ampere](d, "current") > x.Current {
				x = catalogue.Diode1N5822
			}
			set(r, "type", x.Type, 0, "", true, false)
			r.Note = x.Type + " or like it: " + x.Reverse.String() + ", " + x.Current.String()
			params(r, "", circuit.Param{Name: "is", Value: float64(x.Saturation)}, circuit.Param{Name: "n", Value: x.Ideality}, circuit.Param{Name: "rs", Value: float64(x.Series)})
		},
	}
}

func partZener() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "zener", Doc: "Zener diode.", Ports: pinPorts("A", "K"),
			Fields: []describe.Field{
				{Name: "volts", Type: describe.Voltage, Required: true, Min: "2 V", Max: "60 V", Doc: "Zener voltage."},
				{Name: "power", Type: describe.Power, Default: "1 W", Min: "0.2 W", Max: "50 W", Doc: "Power that it is rated for."},
				{Name: "tolerance", Type: describe.Percent, Default: "5 %", Min: "0 %", Max: "20 %", Doc: "Tolerance of the Zener voltage, both ways."},
			},
		},
		Symbol: "zener", Polar: true, Part: circuit.Zener, Text: "Zener diode", Model: "zener", Ends: [2]string{"A", "K"},
		Size: func(p *Plan, d *describe.SinglePart, z *circuit.Part) {
			v, w := partField[quantity.Volt](d, "volts"), partField[quantity.Watt](d, "power")
			set(z, "voltage", v.String(), float64(v), "V", true, true)
			set(z, "power", w.String(), float64(w), "W", true, true)
			list := []circuit.Param{
				{Name: "vz", Value: float64(v), Tol: float64(partField[quantity.Ratio](d, "tolerance"))},
				{Name: "iz", Value: testShare * float64(w) / float64(v)},
			}
			if x, ok := catalogue.ZenerOf(v); ok && w == x.Power {
				list = append(list, circuit.Param{Name: "rz", Value: float64(x.Impedance)})
			}
			params(z, "", list...)
		},
	}
}

// testShare is the part of its rated power at which a Zener diode is tested: the rule
// of the JEDEC 1 W and 5 W series.
const testShare = 0.25

func partLED() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "led", Doc: "Light-emitting diode, without its series resistor.", Ports: pinPorts("A", "K"),
			Fields: []describe.Field{
				{Name: "forward", Type: describe.Voltage, Default: "2 V", Min: "1 V", Max: "5 V", Doc: "Forward voltage at its current."},
				{Name: "current", Type: describe.Current, Default: "10 mA", Min: "0.1 mA", Max: "1 A", Doc: "Current at which the forward voltage holds."},
				{Name: "colour", Type: describe.Choice, Default: "GN", Choices: []string{"GN", "YE", "RD", "WH", "BU"}, Doc: "Colour, an IEC 60757 code."},
			},
		},
		Symbol: "led", Polar: true, Part: circuit.LED, Text: "Light-emitting diode", Model: "led", Ends: [2]string{"A", "K"},
		Size: func(p *Plan, d *describe.SinglePart, l *circuit.Part) {
			v, i := partField[quantity.Volt](d, "forward"), partField[quantity.Ampere](d, "current")
			set(l, "forward", v.String(), float64(v), "V", false, true)
			set(l, "current", i.String(), float64(i), "A", true, true)
			set(l, "colour", partField[string](d, "colour"), 0, "", true, true)
			params(l, "", circuit.Param{Name: "forward_volt", Value: float64(v), Tol: forwardTol}, circuit.Param{Name: "ampere", Value: float64(i)})
		},
	}
}

func partFuse() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "fuse", Doc: "Fuse-link in its holder. One on a rail of the battery is checked like the others.", Ports: pinPorts("1", "2"),
			Fields: []describe.Field{
				{Name: "rating", Type: describe.Current, Required: true, Min: "0.1 A", Max: "80 A", Doc: "Rated current."},
			},
		},
		Symbol: "fuse", Part: circuit.Fuse, Text: "Fuse and holder", Model: "fuse", Ends: [2]string{"1", "2"},
		Size: func(p *Plan, d *describe.SinglePart, f *circuit.Part) {
			rating := partField[quantity.Ampere](d, "rating")
			if p.onBattery(f) {
				x := p.fit(f, p.classOf(rating, p.fuseClasses()[0]), rating, "part "+d.Name.Val, 0, true)
				x.CableSize = p.controlSize()
				x.CableAmpacity = p.ampacity(x.CableSize, 1)
				return
			}
			set(f, "rating", rating.String(), float64(rating), "A", true, true)
			params(f, "", circuit.Param{Name: "ohm", Value: fuseOhm(rating), Tol: fuseTol})
		},
	}
}

// onBattery reports whether a part hangs on a rail that carries the load.
func (p *Plan) onBattery(part *circuit.Part) bool {
	for _, r := range p.C.Rails {
		if !r.Positive || !strings.HasSuffix(r.Name, "L+") {
			continue
		}
		for _, n := range r.Pins {
			for _, w := range p.C.Conductors {
				if w.Rail == "" && (w.From.Part == part && w.To.Part == n.Part || w.To.Part == part && w.From.Part == n.Part) {
					return true
				}
			}
		}
	}
	return false
}

func partSwitch() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "switch", Doc: "Switch that a hand sets, one pole.", Ports: pinPorts("1", "2"),
			Fields: []describe.Field{
				{Name: "closed", Type: describe.Bool, Default: "yes", Doc: "Closed in normal service."},
				{Name: "rating", Type: describe.Current, Default: "1 A", Min: "1 mA", Max: "200 A", Doc: "Direct current that its contact breaks."},
			},
		},
		Symbol: "switch_latch", Part: circuit.PushButton, Text: "Switch, DC rated", Model: "switch", Ends: [2]string{"1", "2"},
		Size: func(p *Plan, d *describe.SinglePart, s *circuit.Part) {
			i := partField[quantity.Ampere](d, "rating")
			set(s, "rating", i.String()+" DC", float64(i), "A", true, true)
			closed := 0.0
			if partField[bool](d, "closed") {
				closed = 1
				s.Note = "closed in normal service"
			} else {
				s.Note = "open in normal service"
			}
			params(s, "", circuit.Param{Name: "ohm", Value: buttonOhm, Tol: contactTol}, circuit.Param{Name: "closed", Value: closed})
		},
	}
}

func partLamp() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "lamp", Doc: "Small filament lamp: a pilot lamp, or one that limits a current.", Ports: pinPorts("1", "2"),
			Fields: []describe.Field{
				{Name: "rated", Type: describe.Voltage, Required: true, Min: "1 V", Max: "60 V", Doc: "Rated voltage."},
				{Name: "power", Type: describe.Power, Required: true, Min: "0.01 W", Max: "200 W", Doc: "Power at rated voltage."},
			},
		},
		Symbol: "signal_lamp", Part: circuit.SignalLamp, Text: "Filament lamp", Model: "filament", Ends: [2]string{"+", "-"},
		Size: func(p *Plan, d *describe.SinglePart, l *circuit.Part) {
			v, w := partField[quantity.Volt](d, "rated"), partField[quantity.Watt](d, "power")
			set(l, "voltage", v.String(), float64(v), "V", true, true)
			set(l, "power", w.String(), float64(w), "W", true, true)
			params(l, "", circuit.Param{Name: "rated_volt", Value: float64(v)}, circuit.Param{Name: "rated_watt", Value: float64(w), Tol: powerTol},
				circuit.Param{Name: "exponent", Value: filamentLaw})
		},
	}
}

func partRelay() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "relay", Doc: "Relay: its coil. Its contacts are parts of their own that name it.", Ports: pinPorts("A1", "A2"),
			Fields: []describe.Field{
				{Name: "rated", Type: describe.Voltage, Required: true, Min: "3 V", Max: "60 V", Doc: "Rated coil voltage."},
				{Name: "coil_resistance", Type: describe.Resistance, Min: "1 Ω", Max: "100 kΩ", Doc: "Coil resistance at 20 °C; without it from the relay class."},
			},
		},
		Symbol: "coil", Polar: true, Part: circuit.Relay, Text: "Relay", Model: "coil", Ends: [2]string{"A1", "A2"},
		Size: func(p *Plan, d *describe.SinglePart, k *circuit.Part) {
			v := partField[quantity.Volt](d, "rated")
			class := p.coilClasses(v)[0]
			ohm, given := describe.Get[quantity.Ohm](d.Fields, "coil_resistance")
			if !given {
				ohm.Val = class.CoilResistance(v)
			}
			set(k, "coil", v.String()+" "+quantity.Format(ohm.Val, 3), float64(ohm.Val), "Ω", true, given)
			params(k, "coil",
				circuit.Param{Name: "ohm", Value: float64(ohm.Val), Tol: float64(class.CoilTol)},
				circuit.Param{Name: "pickup_volt", Value: float64(v) * float64(class.PickUp)},
				circuit.Param{Name: "dropout_volt", Value: float64(v) * float64(class.DropOut)},
			)
			for _, e := range k.Elements {
				if e.Model == "contact" {
					e.Params = append(e.Params, circuit.Param{Name: "ohm", Value: float64(class.ContactTyp), Tol: contactTol})
				}
			}
		},
	}
}

func partContact() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "contact", Doc: "Contact of a relay that is a single part too.", Ports: pinPorts("1", "2"),
			Fields: []describe.Field{
				{Name: "of", Type: describe.Text, Required: true, Doc: "Name of the relay."},
				{Name: "is", Type: describe.Choice, Default: "make", Choices: []string{"make", "break"}, Doc: "What it does when the relay picks up."},
			},
		},
		Symbol: "make", Part: circuit.Relay, Model: "contact", Ends: [2]string{"1", "2"},
		Size: func(p *Plan, d *describe.SinglePart, part *circuit.Part) {
			if part != nil {
				return
			}
			p.block("part "+d.Name.Val, d.Pos, "", &sizing.UnknownError{
				What: "the relay " + partField[string](d, "of") + " of this contact", Ask: "name a part of kind relay under of",
			})
		},
	}
}

func partTerminal() *PartKind {
	return &PartKind{
		Kind: describe.Kind{
			Name: "terminal", Doc: "A terminal of the main cabinet's strip on a net, for what is wired later.", Ports: pinPorts("1"),
			Fields: []describe.Field{
				{Name: "for", Type: describe.Text, Doc: "What it is for; printed in the parts list."},
			},
		},
		Symbol: "terminal", Part: circuit.Terminal, Text: "Terminal",
		Size: func(p *Plan, d *describe.SinglePart, t *circuit.Part) {
			if v, ok := describe.Get[string](d.Fields, "for"); ok {
				t.Note = "for " + v.Val
			}
		},
	}
}
