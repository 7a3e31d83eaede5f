package finding

import (
	"fmt"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// duskSlack is the ratio by which the illuminance at which the lights come on may miss
// what was asked: about what a person notices, and within a preset's range (common
// practice, no source).
const duskSlack quantity.Ratio = 1.25

// dusk compares the illuminance at which the lights come on with what was asked.
var dusk = &Check{
	Name:  "dusk",
	Title: "lights do not come on at the asked twilight",
	Doc: "The solved circuit is swept from daylight to darkness; with the preset as it is set the lights must come on within a quarter of dark_below. " +
		"Turn the preset or take other divider resistors.",
	Source: "dark_below of the photocell; a quarter: common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		at, ok := thresholdOf(f, "dark")
		if !ok {
			return
		}
		for _, s := range f.Site.Stages {
			asked, ok := describe.Get[quantity.Lux](s.Fields, "dark_below")
			if !ok || asked.Val <= 0 || at <= 0 {
				continue
			}
			low, high := asked.Val/quantity.Lux(duskSlack), asked.Val*quantity.Lux(duskSlack)
			limit := high
			below := under(at, low)
			if below {
				limit = low
			} else if !over(at, high) {
				continue
			}
			v, _ := pair(at, limit)
			place := asked.Pos
			if !asked.Given {
				place = s.Name.Pos
			}
			report(Finding{
				Severity: Caution, Subject: s.Name.Val, At: place,
				Message: fmt.Sprintf("%s: lights come on at %s, asked %s", s.Name.Val, v, say(asked.Val)),
				Remedy:  fmt.Sprintf("Set it between %s and %s on site, or take a sensor or divider for %s.", say(low), say(high), say(asked.Val)),
				Value:   float64(at), Limit: float64(limit), Unit: "lx", Over: below,
			})
		}
	},
}

// thresholdOf returns the value of a threshold in lux.
func thresholdOf(f *facts.Facts, key string) (quantity.Lux, bool) {
	for _, t := range f.Thresholds {
		if t.Key == key {
			return quantity.Lux(t.Value), true
		}
	}
	return 0, false
}
