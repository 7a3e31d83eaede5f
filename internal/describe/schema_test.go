package describe

// testSchema holds kinds like those that the rooms above register, so that this
// room can be tested alone.
func testSchema() *Schema {
	from := Field{Name: "from", Type: StageRef, Required: true, Doc: "The stage that it takes the plus from."}
	return &Schema{
		Stages: []Kind{
			{Name: "regulated-supply", Doc: "Mains supply.",
				Ports: []Port{{Name: "out"}},
				Fields: []Field{
					{Name: "rated", Type: VoltAmp, Doc: "Output.", Min: "1 V 1 mA", Max: "60 V 100 A"},
					{Name: "mains", Type: Mains, Required: true, Doc: "Mains.", Min: "90 V", Max: "264 V"},
				}},
			{Name: "charger", Doc: "Battery charger.",
				Fields: []Field{
					{Name: "to", Type: StageRef, Required: true, Feeds: true, Port: "charge", Doc: "The battery."},
					{Name: "mains", Type: Mains, Required: true, Doc: "Mains."},
					{Name: "float", Type: Voltage, Min: "1 V", Max: "60 V", Doc: "Float setting."},
					{Name: "current", Type: Current, Min: "10 mA", Max: "200 A", Doc: "Rated current."},
					{Name: "own", Type: Current, Default: "5 mA", Min: "0 mA", Max: "1 A", Doc: "Own drain."},
				}},
			{Name: "battery", Doc: "The store.", MustFeed: true, Nets: []string{"minus"},
				Ports: []Port{{Name: "plus"}, {Name: "charge", Sink: true, Max: 1}},
				Fields: []Field{
					{Name: "cells", Type: Choice, Required: true, Choices: []string{"vrla-agm", "flooded", "lifepo4"}, Doc: "Class."},
					{Name: "capacity", Type: Capacity, Min: "0.5 Ah", Max: "5000 Ah", Doc: "Capacity."},
					{Name: "series", Type: Count, Min: "1", Max: "40", Doc: "Cells in series."},
					{Name: "cable", Type: Size, Doc: "Battery cable."},
					{Name: "isolator", Type: Bool, Default: "yes", Doc: "Isolator."},
					{Name: "table", Type: Curve, Doc: "Capacity table."},
				}},
			{Name: "low-voltage-disconnect", Doc: "Cut-off.",
				Ports:  []Port{{Name: "out"}},
				Fields: []Field{from, {Name: "opens", Type: Voltage, Doc: "Opens at."}}},
			{Name: "changeover-relay", Doc: "Relay.",
				Ports: []Port{{Name: "break"}, {Name: "make"}, {Name: "coil", Sink: true, Max: 2, Signal: true}},
				Fields: []Field{
					{Name: "coil", Type: StageRef, Doc: "What holds the coil."},
					from,
					{Name: "coil_resistance", Type: Resistance, Min: "1 Ω", Max: "100 kΩ", Doc: "Coil."},
				}},
			{Name: "photocell", Doc: "Holds a relay while it is light.",
				Ports: []Port{{Name: "out", Signal: true}},
				Fields: []Field{
					from,
					{Name: "built", Type: Choice, Default: "module", Choices: []string{"comparator", "module"}, Doc: "How it is built."},
					{Name: "holds", Type: StageRef, Required: true, Feeds: true, Port: "coil", Doc: "The relay."},
					{Name: "dark_below", Type: Illuminance, Default: "10 lx", Min: "0.1 lx", Max: "2000 lx", Doc: "Dark."},
				}},
			{Name: "distribution-board", Doc: "Fused ways.",
				Ports: []Port{{Name: "ways"}},
				Fields: []Field{
					from,
					{Name: "ways", Type: Count, Default: "8", Min: "1", Max: "60", Doc: "Number of ways."},
					{Name: "along", Type: Length, Min: "0.1 m", Max: "2000 m", Doc: "Feeder length."},
					{Name: "way", Type: Count, Min: "1", Max: "60", Doc: "Way of the feeding board."},
				}},
		},
		Luminaires: []Kind{
			{Name: "led-driver", Doc: "Constant power.", Fields: []Field{
				{Name: "power", Type: Power, Required: true, Min: "0.1 W", Max: "200 W", Doc: "Power."},
				{Name: "works", Type: VoltageRange, Required: true, Doc: "Working range."},
				{Name: "flux", Type: Flux, Doc: "Flux."},
			}},
			{Name: "led-string", Doc: "LEDs in series.", Fields: []Field{
				{Name: "forward", Type: Voltage, Required: true, Doc: "Forward voltage."},
				{Name: "series", Type: Count, Required: true, Min: "1", Max: "20", Doc: "LEDs in series."},
				{Name: "strings", Type: Count, Default: "1", Doc: "Strings."},
				{Name: "current", Type: Current, Required: true, Doc: "String current."},
			}},
		},
		Parts: []Kind{
			{Name: "resistor", Doc: "A resistor.", Ports: []Port{{Name: "1"}, {Name: "2"}},
				Fields: []Field{{Name: "value", Type: Resistance, Required: true, Doc: "Resistance."}}},
		},
	}
}
