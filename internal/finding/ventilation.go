package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// ventilation states the air that the battery needs.
var ventilation = &Check{
	Name:  "ventilation",
	Title: "battery needs air",
	Doc: "Lead-acid and nickel-cadmium batteries give off hydrogen, most while boosting. The room or box needs the stated flow of air, " +
		"by two openings low and high of the stated free area each, or by a fan. Nothing that sparks within half a metre of a vent.",
	Source: "IEC 62485-2 clause 7.2 and 7.3 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		b := f.Battery
		if b.Part == nil || !b.Gas || b.Ventilation <= 0 {
			return
		}
		report(Finding{
			Severity: Caution, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: needs %.3g m³ of air an hour", title(b.Part.Designation, b.ClassName), b.Ventilation),
			Remedy:  fmt.Sprintf("Two openings of %.3g cm² each, one low, one high, on opposite walls; never a sealed box.", b.OpeningCM2),
			Value:   b.Ventilation, Limit: 0, Unit: "m³/h",
		})
	},
}
