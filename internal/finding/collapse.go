package finding

import (
	"fmt"
	"math"

	"gloamwright/internal/facts"
)

// collapse finds constant-power lamps that their line cannot carry at all.
var collapse = &Check{
	Name:  "collapse",
	Title: "line cannot carry the power of its lamps",
	Doc: "A driver that gets less voltage takes more current, until the line can carry no more and the voltage collapses. Beyond that point thicker cable, a " +
		"shorter run or a higher system voltage is the only cure.",
	Source: "voltage stability: at most U² ÷ 4R can be taken through a resistance R (T. Van Cutsem, C. Vournas, Voltage Stability of Electric Power Systems, chapter 2, from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := f.Collapse
		if c == nil || c.Share >= 1 {
			return
		}
		remedy := fmt.Sprintf("Take %.0f %% of the watts off, or lay cable of at least %.1f times the section.", math.Ceil(100*(1-c.Share)-roundSlack), math.Ceil(10/c.Share-roundSlack)/10)
		if c.Share < leastShare {
			remedy = "No cable helps here: a higher system voltage, or lamps that work from less."
		}
		report(Finding{
			Severity: Stop, Subject: c.Circuit, At: c.At,
			Message: fmt.Sprintf("%s: the voltage collapses in “%s”; the line carries %.0f %% of the power at most", c.Circuit, c.Condition, 100*c.Share),
			Remedy:  remedy,
			Value:   100 * c.Share, Limit: 100, Unit: "%", Over: true,
		})
	},
}

// leastShare is the share of the power below which the thickest cable of the catalogue
// (a hundred times the section of the thinnest) does not help either.
const leastShare = 0.01

// roundSlack keeps a figure that is whole already from being rounded up.
const roundSlack = 1e-9
