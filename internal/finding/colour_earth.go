package finding

import (
	"fmt"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
)

// earthColour is the colour that belongs to the protective conductor alone.
const earthColour = "GNYE"

// colourEarth finds live conductors in the protective conductor's colours.
var colourEarth = &Check{
	Name:  "colour-earth",
	Title: "protective conductor's colour on a live conductor",
	Doc: "Green-and-yellow belongs to the protective conductor alone. A live conductor in it can kill the next one who works there. " +
		"Green or yellow alone may be taken for it and is to be avoided too.",
	Source: "IEC 60445 clauses 6.2 and 6.3 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		p := f.Site.Practice
		for _, pole := range []struct {
			name string
			code describe.At[string]
		}{{"positive", p.Positive}, {"negative", p.Negative}} {
			x := Finding{
				Subject: "practice.colours." + pole.name, At: pole.code.Pos, Unit: "conductors",
				Remedy: "RD and BK, or BN and GY: 2 colours that mean no protective conductor.",
			}
			switch pole.code.Val {
			case earthColour:
				x.Severity = Stop
				x.Message = fmt.Sprintf("Colour of the %s pole: %s belongs to the protective conductor", pole.name, pole.code.Val)
			case "GN", "YE":
				x.Severity = Caution
				x.Message = fmt.Sprintf("Colour of the %s pole: %s can be taken for the protective conductor", pole.name, pole.code.Val)
			default:
				continue
			}
			n := 0
			for _, c := range f.Circuit.Conductors {
				if c.Colour == pole.code.Val {
					n++
				}
			}
			x.Value = float64(n)
			report(x)
		}
	},
}
