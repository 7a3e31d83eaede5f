package design_test

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/internal/stage"
)

// small is a site of one lamp on one board; %s stand for the control stages, where the
// board hangs, and what is asked of the circuit.
const small = `gloamwright: 1
job: {number: T-1, title: Test}
duty: {nominal: 24 V, outage: 3 h}
stages:
  charger: {kind: charger, to: store, mains: 230 V ± 10 %%, current: 5 A}
  store: {kind: battery, cells: vrla-agm}
  guard: {kind: low-voltage-disconnect, from: store}
%s
  board: {kind: distribution-board, from: %s, ways: 2}
luminaires:
  lamp: {kind: led-driver, power: 6 W, works: 18 V..32 V}
circuits:
  - {name: Stair, board: board, lit: %s, points: [9 m lamp, 4 m lamp]}
`

// The controls that light a board: a supply holds the relay while mains is on, a
// twilight module while it is light.
const (
	presence = "  presence: {kind: regulated-supply, mains: 230 V ± 10 %}\n"
	both     = presence + "  transfer: {kind: changeover-relay, coil: presence, from: guard}\n  dusk: {kind: photocell, from: guard, holds: transfer}\n"
	mains    = presence + "  transfer: {kind: changeover-relay, coil: presence, from: guard}\n"
	dusk     = "  transfer: {kind: changeover-relay, from: guard}\n  dusk: {kind: photocell, from: guard, holds: transfer}\n"
)

// topologies lists for each way of hanging a board on the control which requirement its
// circuits meet; "" is none.
var topologies = []struct{ name, stages, from, meets string }{
	{"behind the break contact, mains and daylight hold", both, "transfer.break", "outage-night"},
	{"behind the break contact, mains holds", mains, "transfer.break", "outage"},
	{"behind the break contact, daylight holds", dusk, "transfer.break", "night"},
	{"on the cut-off", "", "guard", "always"},
	{"behind the make contact, mains and daylight hold", both, "transfer.make", ""},
	{"behind the make contact, mains holds", mains, "transfer.make", ""},
	{"behind the make contact, daylight holds", dusk, "transfer.make", ""},
}

func parse(t *testing.T, text string) *describe.Site {
	t.Helper()
	site, list := describe.Parse("site.yaml", []byte(text), stage.Schema())
	if list.HasErrors() {
		t.Fatalf("%s\n%s", list.Render(describe.Sources{"site.yaml": []byte(text)}), text)
	}
	return site
}

// must says by the words of the description whether a circuit is to be lit.
func must(lit string, c *facts.Condition) bool {
	switch lit {
	case "outage-night":
		return c.MainsV == 0 && c.Lux < 1
	case "outage":
		return c.MainsV == 0
	case "night":
		return c.Lux < 1
	}
	return true
}

// For every topology and every requirement: the function table says what was asked and
// what was found, and a stop finding stands exactly where they differ.
func TestFunctionTable(t *testing.T) {
	for _, top := range topologies {
		for _, lit := range []string{"outage-night", "outage", "night", "always"} {
			t.Run(top.name+", asked "+lit, func(t *testing.T) {
				d, err := design.Make(parse(t, fmt.Sprintf(small, strings.TrimSuffix(top.stages, "\n"), top.from, lit)), nil)
				if err != nil {
					t.Fatal(err)
				}
				if len(d.Function) != 1 {
					t.Fatalf("%d rows of the function table, want 1", len(d.Function))
				}
				row, differ := d.Function[0], []string(nil)
				for k, c := range d.Conditions {
					// Until the cut-off has reclosed nothing behind it can be asked for.
					opened := slices.ContainsFunc(c.State, func(s facts.State) bool { return s.Position == "open" })
					if after := c.Battery == "cut off" || c.Battery == "recharging" && opened; row.Known[k] == after {
						t.Errorf("%s: asked something: %v", c.Key, row.Known[k])
					}
					if !row.Known[k] {
						continue
					}
					if row.Wanted[k] != must(lit, c) {
						t.Errorf("%s: wanted %v", c.Key, row.Wanted[k])
					}
					if row.Found[k] != slices.Contains(c.Lit, "Stair") {
						t.Errorf("%s: found %v, lit are %v", c.Key, row.Found[k], c.Lit)
					}
					if row.Found[k] != row.Wanted[k] {
						differ = append(differ, c.Key)
					}
				}
				stop := slices.IndexFunc(d.Findings, func(f finding.Finding) bool { return f.Check == "function" && f.Severity == finding.Stop })
				if (stop >= 0) != (len(differ) > 0) {
					t.Errorf("table and requirement differ in %v; stop finding: %v", differ, stop >= 0)
				}
				if stop >= 0 && d.ForConstruction() {
					t.Error("documents are for construction all the same")
				}
				if meets := len(differ) == 0; meets != (top.meets == lit) {
					t.Errorf("met: %v; differs in %v", meets, differ)
				}
			})
		}
	}
}
