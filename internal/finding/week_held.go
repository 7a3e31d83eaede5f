package finding

import (
	"fmt"
	"strconv"

	"gloamwright/internal/facts"
)

// weekHeld looks whether the battery keeps up with an outage every day.
var weekHeld = &Check{
	Name:  "week-held",
	Title: "battery does not keep up with daily outages",
	Doc: "With one outage of the asked length a day for a week the battery must come back each day, at the coldest battery room and the end of its life. " +
		"Where it sinks from day to day a stronger charger helps, as far as the battery allows it.",
	Source: "duty.outage; simulated week",
	Run: func(f *facts.Facts, report func(Finding)) {
		var failed []string
		for i, d := range f.Endurance.Days {
			if !d.Held {
				failed = append(failed, strconv.Itoa(i+1))
			}
		}
		if len(failed) == 0 || f.Charger.Part == nil {
			return
		}
		last := f.Endurance.Days[len(f.Endurance.Days)-1]
		report(Finding{
			Severity: Caution, Subject: f.Charger.Part.Designation, At: f.Charger.Part.At,
			Message: fmt.Sprintf("%s: with an outage a day the lights fail on %s of %d; the last starts at %s of the charge",
				title(f.Charger.Part.Designation, "charger"), count(len(failed), "day"), len(f.Endurance.Days), say(last.Started)),
			Remedy: fmt.Sprintf("A charger of more than %s; the battery stands %s. First day without: %s.", say(f.Charger.Current), sayDown(f.Charger.Limit), failed[0]),
			Value:  float64(len(failed)), Limit: 0, Unit: "days",
		})
	},
}
