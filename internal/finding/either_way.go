package finding

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/facts"
)

// eitherWay tells of relays that may stand in two positions.
var eitherWay = &Check{
	Name:  "either-way",
	Title: "a relay may stand either way",
	Doc: "A relay that has let go stays so until its coil gets the pick-up voltage; one that is held in stays until the drop-out voltage. Between the two it stands where it was before. " +
		"So does a comparator within its hysteresis, and at the edge of the tolerances a relay of one copy of the job may stand otherwise than that of another. " +
		"The test point table then gives both readings. Where other circuits are lit, the lights depend on chance: raise the feed above the pick-up voltage of the hot coil, or lower it below drop-out.",
	Source: "solution of the network from both positions; IEC 61810-1 clause 5 (operative range)",
	Run: func(f *facts.Facts, report func(Finding)) {
		ways := otherWays(f)
		for k, o := range ways {
			if slices.ContainsFunc(ways[:k], func(p otherWay) bool { return p.State == o.State }) {
				continue
			}
			var in, differ []string
			apart, why := 0, "the tolerances"
			for _, p := range ways {
				if p.State != o.State {
					continue
				}
				in = append(in, strings.ToLower(f.Conditions[p.condition].Name))
				for _, s := range unlike(f.Conditions[p.condition].Lit, p.Lit) {
					if !slices.Contains(differ, s) {
						differ = append(differ, s)
					}
				}
				if !p.Tolerance {
					why = "what was before"
				}
				here := 0
				for _, r := range f.Readings {
					if len(r.OrAt(p.condition)) > 0 {
						here++
					}
				}
				apart = max(apart, here)
			}
			severity, lights := Note, "the same lights"
			if len(differ) > 0 {
				severity, lights = Caution, "other lights: "+names(differ)
			}
			x := Finding{
				Severity: severity, Subject: o.Element,
				Message: fmt.Sprintf("%s: may also stand %s in %s, by %s, with %s", o.Element, o.Position, inConditions(in), why, lights),
				Remedy:  fmt.Sprintf("Expect either, at %d of %d test points another reading; for one position alone feed it above pick-up or below drop-out.", apart, len(f.Readings)),
				Value:   float64(len(differ)), Limit: 0, Unit: "circuits",
			}
			for _, p := range f.Circuit.Parts {
				if p.Designation == o.Element {
					x.At = p.At
				}
			}
			report(x)
		}
	},
}

// otherWay is where a part may also stand in a condition.
type otherWay struct {
	facts.State
	facts.Either
	condition int
}

func otherWays(f *facts.Facts) []otherWay {
	var out []otherWay
	for i, c := range f.Conditions {
		for _, e := range c.Either {
			out = append(out, otherWay{e.Parts[0], e, i})
		}
	}
	return out
}

// unlike lists what stands in only one of two lists.
func unlike(a, b []string) []string {
	var out []string
	for _, x := range [2][2][]string{{a, b}, {b, a}} {
		for _, s := range x[0] {
			if !slices.Contains(x[1], s) {
				out = append(out, s)
			}
		}
	}
	return out
}
