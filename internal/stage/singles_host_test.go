package stage

import (
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// TestTestPointBesideItsRail: an extra test point on a rail stands in the frame of a stage
// in the cabinet that is on that rail, and keeps its own identity, whether single parts
// have a block of their own or not; beside a charger with a cable on its right, which
// leaves no room, it stands by another stage, and without one in that block.
func TestTestPointBesideItsRail(t *testing.T) {
	const site = `gloamwright: 1
job: {number: FH-10, title: Standby lighting}
duty: {nominal: 24 V, outage: 4 h}
stages:
  charger: {kind: charger, to: store, mains: 230 V ± 10 %, compensation: no}
  store: {kind: battery, cells: vrla-agm}
  guard: {kind: low-voltage-disconnect, from: store}
  hut: {kind: distribution-board, title: Hut, from: guard, ways: 4}
luminaires:
  bulk: {kind: led-driver, power: 5 W, works: 18 V..32 V}
circuits:
  - {name: Hut, board: hut, lit: always, points: [6 m bulk]}
test_points: [{name: Plus again, at: store.plus}]
`
	const part = "parts: [{name: bleed, kind: resistor, value: 10 kΩ, pins: {1: store.plus, 2: store.minus}}]\n"
	compensated := strings.Replace(site, ", compensation: no", "", 1)
	for _, c := range []struct{ src, host string }{
		{site, "charger"}, {site + part, "charger"}, {compensated, partsStage},
		{strings.Replace(compensated, "  guard:", "  lamp: {kind: indicator, from: store}\n  guard:", 1), "lamp"},
	} {
		s, list := describe.Options{}.Parse("x.yaml", []byte(c.src), Schema())
		if list.HasErrors() {
			t.Fatal(list)
		}
		var got []string
		for _, st := range Expand(s).Stages {
			if st.Sketch == nil {
				continue
			}
			for _, it := range st.Sketch.Items {
				if it.Op == circuit.OpPoint && it.TP.Key == partsStage+"/tp/Plus again" {
					got = append(got, st.Name)
				}
			}
		}
		if strings.Join(got, " ") != c.host {
			t.Errorf("drawn in %q, want %q", got, c.host)
		}
	}
}
