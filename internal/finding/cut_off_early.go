package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// cutOffEarly finds a cut-off that opens before the battery has given what it was
// sized for.
var cutOffEarly = &Check{
	Name:  "cut-off-early",
	Title: "cut-off opens above the end of discharge",
	Doc: "The battery is sized to give its charge down to the end-of-discharge voltage. A cut-off that opens above it leaves part of the charge unused " +
		"and the lights go out early. Lower the opening voltage, or raise the end voltage so that a larger battery is sized.",
	Source: "end of discharge of the sized battery",
	Run: func(f *facts.Facts, report func(Finding)) {
		c, b := f.CutOff, f.Battery
		if c == nil || b.Part == nil || b.EndVolt <= 0 {
			return
		}
		opens := max(c.Opens, c.AtBattery)
		if !over(opens, b.EndVolt) {
			return
		}
		v, bound := pair(opens, b.EndVolt)
		report(Finding{
			Severity: Caution, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: opens when the battery is at %s, it is sized down to %s", title(c.Part.Designation, "cut-off"), v, bound),
			Remedy:  fmt.Sprintf("Set it %s lower, or give the battery an end voltage of %s.", sayUp(opens-b.EndVolt), sayUp(opens)),
			Value:   float64(opens), Limit: float64(b.EndVolt), Unit: "V",
		})
	},
}
