package finding

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// pinned says which given values were checked and hold.
var pinned = &Check{
	Name:  "pinned",
	Title: "given values hold",
	Doc: "A cable size or fuse rating that the description gives is never changed, only checked: drop at the worst lamp, IB ≤ In ≤ Iz, load factor, " +
		"and a short at the far end. This note says for each circuit that they hold; where they do not, the check concerned says so instead.",
	Source: "the checks named in the text",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			if x.Way == nil || x.Way.Lighting == nil {
				continue
			}
			l := x.Way.Lighting
			cable := false
			l.Walk(func(p, _ *circuit.Point) { cable = cable || p.Leg != nil && p.Leg.Pinned })
			given := ""
			switch {
			case cable && x.Pinned:
				given = fmt.Sprintf("%s and %s", x.CableSize, say(x.Rating))
			case cable:
				given = x.CableSize.String()
			case x.Pinned:
				given = say(x.Rating)
			default:
				continue
			}
			drop, ok := worstDrop(f, l.Name)
			holds := ok && !over(drop, f.Site.Practice.LampDrop.Val) &&
				!over(float64(x.Design), loadFactor(f)*float64(x.Rating)) && !over(x.Rating, x.CableAmpacity) &&
				x.Opens && !over(x.OpensWithin, f.Site.Practice.ClearWithin.Val)
			if !holds {
				continue
			}
			verb := "it holds"
			if cable && x.Pinned {
				verb = "they hold"
			}
			report(Finding{
				Severity: Note, Subject: l.Name, At: l.At,
				Message: fmt.Sprintf("%s, given: %s checked: %s. Drop %s, limit %s", l.Name, given, verb, say(drop), say(f.Site.Practice.LampDrop.Val)),
				Value:   percent(drop), Limit: percent(f.Site.Practice.LampDrop.Val), Unit: "%",
			})
		}
	},
}

// worstDrop returns the greatest drop at a lamp of a circuit.
func worstDrop(f *facts.Facts, circuit string) (drop quantity.Ratio, ok bool) {
	for _, w := range worstLamps(f) {
		if w.lamp.Circuit == circuit {
			return w.lamp.Drop, true
		}
	}
	return 0, false
}
