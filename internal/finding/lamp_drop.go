package finding

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// lampDrop compares the drop at the worst lamp of each circuit with the firm's limit.
var lampDrop = &Check{
	Name:  "lamp-drop",
	Title: "voltage drop at a lamp over the limit",
	Doc: "The drop from the battery's terminals to the worst lamp of each circuit, in the worst condition in which it must be lit, " +
		"as a share of the nominal voltage, must not exceed practice.lamp_drop. Take the next size, shorten the run or move the board.",
	Source: "practice.lamp_drop; IEC 60364-5-52 clause 525 asks for a limit and leaves its figure to the installation (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		limit := f.Site.Practice.LampDrop.Val
		for _, w := range worstLamps(f) {
			if !over(w.lamp.Drop, limit) {
				continue
			}
			v, bound := pair(w.lamp.Drop, limit)
			more := ""
			if n := w.countOver(limit) - 1; n > 0 {
				more = "; " + count(n, "lamp") + " more over it"
			}
			report(Finding{
				Severity: Stop, Subject: w.lamp.Part.Designation, At: w.lamp.Part.At,
				Message: fmt.Sprintf("%s: drop %s, limit %s%s", title(w.lamp.Part.Designation, w.lamp.Circuit), v, bound, more),
				Remedy:  dropRemedy(f, w.lamp, limit),
				Value:   percent(w.lamp.Drop), Limit: percent(limit), Unit: "%",
			})
		}
	},
}

// worstLamp is the lamp of a circuit with the greatest drop, and its fellows.
type worstLamp struct {
	lamp *facts.Luminaire
	all  []*facts.Luminaire
}

func (w worstLamp) countOver(limit quantity.Ratio) int {
	n := 0
	for _, l := range w.all {
		if over(l.Drop, limit) {
			n++
		}
	}
	return n
}

// worstLamps returns one entry a circuit, in the order of the luminaires.
func worstLamps(f *facts.Facts) []worstLamp {
	var out []worstLamp
	at := map[string]int{}
	for _, l := range f.Luminaires {
		i, ok := at[l.Circuit]
		if !ok {
			i = len(out)
			at[l.Circuit] = i
			out = append(out, worstLamp{lamp: l})
		}
		out[i].all = append(out[i].all, l)
		if l.Drop > out[i].lamp.Drop {
			out[i].lamp = l
		}
	}
	return out
}

// dropRemedy names the least size of the lamp's own legs that meets the limit, at the
// present currents; where none does, what the way before them loses.
func dropRemedy(f *facts.Facts, l *facts.Luminaire, limit quantity.Ratio) string {
	legs := legsTo(lightingOf(f, l.Circuit), l.Part)
	own := lost(f, legs, quantity.WireSize{})
	before := l.Drop - own
	for _, s := range thicker(f, thinnest(legs)) {
		if d := before + lost(f, legs, s); !over(d, limit) {
			return fmt.Sprintf("%s drops %s.", s, say(d))
		}
	}
	return fmt.Sprintf("Its own cable loses %s, the way before it %s: a thicker feeder or battery cable, or a board nearer to the lamps.",
		say(own), say(before))
}

// thinnest returns the least size among the cores of legs.
func thinnest(legs []*circuit.Cable) quantity.WireSize {
	out := thickest(legs)
	for _, leg := range legs {
		for _, core := range leg.Cores {
			if core.Size.Area < out.Area {
				out = core.Size
			}
		}
	}
	return out
}
