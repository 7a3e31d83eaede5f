package schematic

import (
	"fmt"
	"strings"
	"testing"

	"gloamwright/layout/schematic/audit"
)

// sideRuns is a site with one luminaire that n side runs hang on; each third of them has
// branches inside branches. after luminaires follow on the main run.
func sideRuns(n, deep, after int, paper string) []byte {
	var run func(d int) string
	run = func(d int) string {
		if d == 0 {
			return "[1 m a, 1 m a]"
		}
		return fmt.Sprintf("[1 m a at spot, {branch: %s}, 1 m b]", run(d-1))
	}
	var points []string
	for i := range n {
		d := 0
		if i%3 == 0 {
			d = deep
		}
		points = append(points, fmt.Sprintf("{branch: %s}", run(d)))
	}
	for range after {
		points = append(points, "2 m a")
	}
	return fmt.Appendf(nil, `gloamwright: 1
job: {number: SR-%d, title: Side runs}
practice: {paper: %s}
duty: {nominal: 24 V, outage: 1 h}
stages:
  charger: {kind: charger, to: store, mains: 230 V ± 10 %%}
  store: {kind: battery, cells: vrla-agm}
  board: {kind: distribution-board, from: store, ways: 3}
luminaires:
  a: {kind: led-driver, power: 0.2 W, works: 18 V..32 V}
  b: {kind: led-driver, power: 0.1 W, works: 18 V..32 V}
circuits:
  - {name: Before, board: board, lit: always, points: [3 m a]}
  - {name: Comb, board: board, lit: always, points: [3 m a, 2 m b, %s]}
`, n, paper, strings.Join(points, ", "))
}

// A luminaire may have more side runs than a sheet has rows: they are drawn all the
// same, and connected to it.
func TestManySideRuns(t *testing.T) {
	for _, paper := range []string{"iso", "ansi"} {
		for _, k := range []struct{ n, deep, after int }{{9, 0, 0}, {10, 1, 1}, {11, 2, 0}, {12, 0, 2}, {20, 0, 2}, {20, 9, 1}, {60, 1, 0}} {
			d := dressed(t, parsed(t, sideRuns(k.n, k.deep, k.after, paper)))
			for _, f := range audit.Judge(drawn(t, d, false), audit.FromCircuit(d.Circuit)) {
				t.Errorf("%d side runs, %d deep, %d after, %s: %v", k.n, k.deep, k.after, paper, f)
			}
		}
	}
}
