package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
)

// function compares which circuits are lit with what they ask for.
var function = &Check{
	Name:  "function",
	Title: "a circuit is not lit when asked, or lit when not",
	Doc: "What a circuit asks for under lit is compared with the solved circuit in every condition. " +
		"A disagreement means that the stages are joined wrongly or that the circuit hangs on the wrong board.",
	Source: "lit of the circuit; solution of the network",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, r := range f.Function {
			var dark, lit []string
			for i := range r.Wanted {
				if !r.Known[i] || r.Wanted[i] == r.Found[i] {
					continue
				}
				n := strings.ToLower(f.Conditions[i].Name)
				if r.Wanted[i] {
					dark = append(dark, n)
				} else {
					lit = append(lit, n)
				}
			}
			wrong := len(dark) + len(lit)
			if wrong == 0 {
				continue
			}
			text := ""
			if len(dark) > 0 {
				text = ", dark in " + inConditions(dark)
			}
			if len(lit) > 0 {
				text += ", lit in " + inConditions(lit)
			}
			x := Finding{
				Severity: Stop, Subject: r.Circuit,
				Message: fmt.Sprintf("%s: asks for %s%s", r.Circuit, r.Asked, text),
				Remedy:  fmt.Sprintf("Feed its board from a port that agrees in all %d conditions, or change lit.", len(r.Wanted)),
				Value:   float64(wrong), Limit: 0, Unit: "conditions",
			}
			if l := lightingOf(f, r.Circuit); l != nil {
				x.At = l.At
			}
			report(x)
		}
	},
}

// inConditions names conditions: the first two, and how many more.
func inConditions(list []string) string {
	quoted := func(s string) string { return "“" + s + "”" }
	switch len(list) {
	case 1:
		return quoted(list[0])
	case 2:
		return quoted(list[0]) + " and " + quoted(list[1])
	}
	return fmt.Sprintf("%s, %s and %d more conditions", quoted(list[0]), quoted(list[1]), len(list)-2)
}
