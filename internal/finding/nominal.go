package finding

import (
	"fmt"
	"math"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// standardVoltages are the preferred DC voltages up to the extra-low limit: IEC 60038
// table 6, from memory.
var standardVoltages = []quantity.Volt{6, 12, 24, 36, 48, 60}

// nominal remarks on a nominal voltage that is not a preferred one.
var nominal = &Check{
	Name:   "nominal",
	Title:  "unusual nominal voltage",
	Doc:    "Lamps, relays and chargers are made for the preferred voltages; others have to be ordered specially.",
	Source: "IEC 60038 table 6 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		v := f.Site.Duty.Nominal
		nearest := standardVoltages[0]
		for _, s := range standardVoltages {
			if s == v.Val {
				return
			}
			if math.Abs(float64(s-v.Val)) < math.Abs(float64(nearest-v.Val)) {
				nearest = s
			}
		}
		report(Finding{
			Severity: Note, Subject: "duty.nominal", At: v.Pos,
			Message: fmt.Sprintf("Nominal voltage %s is not a preferred one", say(v.Val)),
			Remedy:  fmt.Sprintf("%s is.", say(nearest)),
			Value:   float64(v.Val), Limit: float64(nearest), Unit: "V",
		})
	},
}
