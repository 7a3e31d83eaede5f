package finding

import (
	"fmt"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// leastTwilight is how much lighter than at lighting-up it must be before the lights go
// off again: passing clouds change daylight by that much (common practice, no source).
const leastTwilight quantity.Ratio = 1.15

// duskHysteresis looks whether the lights flicker at twilight.
var duskHysteresis = &Check{
	Name:  "dusk-hysteresis",
	Title: "lights go on and off at twilight",
	Doc: "Between the illuminance at which the lights come on and the one at which they go off again there must be a step, or clouds, passing lamps and " +
		"the relay's own heat switch them to and fro. A smaller feedback resistor widens it.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		dark, ok1 := thresholdOf(f, "dark")
		light, ok2 := thresholdOf(f, "light")
		if !ok1 || !ok2 || dark <= 0 {
			return
		}
		ratio := quantity.Ratio(light / dark)
		if !under(ratio, leastTwilight) {
			return
		}
		report(Finding{
			Severity: Caution, Subject: "photocell", At: photocellPlace(f),
			Message: fmt.Sprintf("Photocell: lights come on at %s and go off at %s, %s times as light; least %s", say(dark), say(light), number(float64(ratio)), number(float64(leastTwilight))),
			Remedy:  fmt.Sprintf("Going off at %s or more.", sayUp(dark*quantity.Lux(leastTwilight))),
			Value:   float64(ratio), Limit: float64(leastTwilight), Unit: "times", Over: true,
		})
	},
}

// photocellPlace returns where the stage that states dark_below was described.
func photocellPlace(f *facts.Facts) describe.Span {
	for _, s := range f.Site.Stages {
		if _, ok := describe.Get[quantity.Lux](s.Fields, "dark_below"); ok {
			return s.Name.Pos
		}
	}
	return describe.Span{}
}
