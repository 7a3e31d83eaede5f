package finding

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
)

// mostLamps is how many luminaires one circuit of emergency lighting may feed:
// IEC 60364-5-56 clause 560.9, from memory.
const mostLamps = 20

// lampCount counts the lamps that one fuse takes with it.
var lampCount = &Check{
	Name:   "lamp-count",
	Title:  "many lamps behind one fuse",
	Doc:    "One fuse or one broken wire puts all lamps of its circuit out. No more than 20 should hang on one circuit; spread them over two.",
	Source: "IEC 60364-5-56 clause 560.9 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, b := range f.Circuit.Boards {
			for _, w := range b.Ways {
				if w.Lighting == nil {
					continue
				}
				n := 0
				w.Lighting.Walk(func(_, _ *circuit.Point) { n++ })
				if n <= mostLamps {
					continue
				}
				parts := (n + mostLamps - 1) / mostLamps
				report(Finding{
					Severity: Caution, Subject: w.Lighting.Name, At: w.Lighting.At,
					Message: fmt.Sprintf("%s: %d lamps on one circuit, limit %d", title(w.Lighting.Name, ""), n, mostLamps),
					Remedy:  fmt.Sprintf("%d circuits with %d lamps at most each.", parts, (n+parts-1)/parts),
					Value:   float64(n), Limit: mostLamps, Unit: "lamps",
				})
			}
		}
	},
}
