package symbols

import (
	"fmt"

	"gloamwright/layout/ink"
)

// Blocks of six by six modules: their lettering is 2.5 mm high, so they stay
// legible on a sheet copied from A3 to A4. Pins are four modules from the middle.
var (
	// RegulatorLarge keeps the voltage between OUT and COM.
	RegulatorLarge = Symbol{
		ID: "regulator_large", Name: "voltage regulator", Letter: "T", Turns: Fixed,
		Pins: []Pin{{"IN", -4, -1, Left}, {"OUT", 4, -1, Right}, {"COM", 0, 4, Down}},
		shapes: []shape{
			box(-3, -3, 6, 6),
			line(-4, -1, -3, -1),
			line(3, -1, 4, -1),
			line(0, 3, 0, 4),
			text(0, 0.1, "U", normal, ink.Middle),
			text(0, 1.7, "const", normal, ink.Middle),
		},
	}

	// ComparatorLarge has an open-circuit output that pulls low.
	ComparatorLarge = Symbol{
		ID: "comparator_large", Name: "comparator", Letter: "K", Turns: Fixed,
		Pins: []Pin{{"+", -4, -1, Left}, {"-", -4, 1, Left}, {"OUT", 4, 0, Right}, {"V+", 0, -4, Up}, {"V-", 0, 4, Down}},
		shapes: []shape{
			box(-3, -3, 6, 6),
			line(-4, -1, -3, -1),
			line(-4, 1, -3, 1),
			line(3, 0, 4, 0),
			line(0, -4, 0, -3),
			line(0, 3, 0, 4),
			text(0.3, -1.6, "COMP", normal, ink.Middle),
			text(-2.3, -0.5, "+", normal, ink.Middle),
			text(-2.3, 1.5, "−", normal, ink.Middle),
			polygon(1.7, 0, 2.15, -0.45, 2.6, 0, 2.15, 0.45),
			line(1.7, 0.65, 2.6, 0.65),
		},
	}

	// PhotoswitchLarge closes 13-14 when it gets dark.
	PhotoswitchLarge = Symbol{
		ID: "photoswitch_large", Name: "photo-switch", Letter: "B", Turns: Fixed,
		Pins: []Pin{{"+", -4, -1, Left}, {"-", -4, 1, Left}, {"13", 4, -1, Right}, {"14", 4, 1, Right}},
		shapes: []shape{
			box(-3, -3, 6, 6),
			line(-4, -1, -3, -1),
			line(-4, 1, -3, 1),
			line(4, -1, 3, -1),
			line(4, 1, 3, 1),
			line(-2.4, -2.6, -1.6, -1.8),
			polygon(-1.6, -1.8, -1.989, -1.977, -1.777, -2.189).filled(),
			line(-1.7, -2.6, -0.9, -1.8),
			polygon(-0.9, -1.8, -1.289, -1.977, -1.077, -2.189).filled(),
			text(-2.5, 2.4, "lx<", normal, ink.Start),
			line(3, -1, 1.8, -1, 1.8, -0.8),
			line(3, 1, 1.8, 1, 1.8, 0.8),
			line(1.8, 0.8, 0.9, -0.7),
		},
	}

	// UndervoltageRelease is the field of a low-voltage disconnect that measures.
	// Its dashed link reaches a level make contact four modules above; the pin is
	// its minus lead.
	UndervoltageRelease = Symbol{
		ID: "undervoltage", Name: "undervoltage release", Turns: Fixed,
		Pins: []Pin{{"-", 0, 3, Down}},
		shapes: []shape{
			box(-1.5, -1, 3, 2.2),
			line(0, 1.2, 0, 3),
			line(0, -1, 0, -3.42).dashed(),
			text(0, 0.6, "U<", normal, ink.Middle),
		},
	}
)

// Pole is a pin on the side of a converter block: its name and its row in modules
// from the middle, down counted positive.
type Pole struct {
	Name string
	Row  int
}

// Converter is an AC/DC converter block six modules wide and twice half modules
// high, AC poles at the left, DC poles at the right, all four modules from the
// middle. Sensor adds the θ of an input for a temperature sensor. Half is at
// least 3 and every row lies inside the block; Converter panics otherwise, its
// callers being drawing recipes and not users' data.
func Converter(half int, sensor bool, left, right []Pole) *Symbol {
	h := float64(half)
	s := &Symbol{ID: fmt.Sprintf("converter_%d", 2*half), Name: "AC/DC converter", Letter: "T", Turns: Fixed}
	s.shapes = []shape{
		box(-3, -h, 6, 2*h),
		line(-3, h, 3, -h),
		cw(-2.4, 1.5-h, -1.6, 1.5-h, 0.4),
		ccw(-1.6, 1.5-h, -0.8, 1.5-h, 0.4),
		line(0.8, h-1.7, 2.4, h-1.7),
		line(0.8, h-1.25, 1.2, h-1.25),
		line(1.4, h-1.25, 1.8, h-1.25),
		line(2, h-1.25, 2.4, h-1.25),
	}
	if sensor {
		s.ID += "_sensor"
		s.shapes = append(s.shapes, text(2.5, 0.5, "θ", normal, ink.End))
	}
	side := func(poles []Pole, x int, d Dir) {
		for _, p := range poles {
			if half < 3 || p.Row <= -half || p.Row >= half {
				panic(fmt.Sprintf("symbols: converter %d high with a pole %q in row %d", 2*half, p.Name, p.Row))
			}
			s.Pins = append(s.Pins, Pin{p.Name, x, p.Row, d})
			y := float64(p.Row)
			s.shapes = append(s.shapes, line(float64(x), y, float64(x)*3/4, y))
		}
	}
	side(left, -4, Left)
	side(right, 4, Right)
	return s
}
