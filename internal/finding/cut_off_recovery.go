package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// recoveredCharge is the state of charge whose rest voltage an emptied battery climbs
// to when its load is taken off (common practice, no source).
const recoveredCharge quantity.Ratio = 0.2

// cutOffRecovery finds a cut-off that closes again on a battery that is merely resting.
var cutOffRecovery = &Check{
	Name:  "cut-off-recovery",
	Title: "cut-off recloses on the recovered voltage",
	Doc: "When the cut-off opens, the battery's voltage climbs back to its rest voltage without any charge. A reclosing voltage below that " +
		"closes at once, opens again, and flashes the lights until the battery is ruined. It must lie above the rest voltage at a fifth of the charge.",
	Source: "rest voltages of the battery class; a fifth: common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		class, c := classOf(f), f.CutOff
		if class == nil || c == nil {
			return
		}
		limit := whole(f, class.RestVolt(recoveredCharge))
		if !under(c.Recloses, limit) {
			return
		}
		v, bound := pair(c.Recloses, limit)
		report(Finding{
			Severity: Caution, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: opens at %s and recloses at %s, the resting battery climbs to %s", title(c.Part.Designation, "cut-off"), say(c.Opens), v, bound),
			Remedy:  fmt.Sprintf("Set the reclosing voltage to %s.", sayUp(max(limit, whole(f, class.Recloses)))),
			Value:   float64(c.Recloses), Limit: float64(limit), Unit: "V", Over: true,
			Source: class.RestEvi.String(),
		})
	},
}
