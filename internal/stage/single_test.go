package stage

import (
	"strings"
	"testing"

	"gloamwright/internal/describe"
)

// TestOneOfAKind: a second battery or cut-off is refused, for only one of each is sized;
// a second relay is not.
func TestOneOfAKind(t *testing.T) {
	const site = `gloamwright: 1
job: {number: FH-10, title: Standby lighting}
duty: {nominal: 24 V, outage: 4 h}
stages:
  sense: {kind: regulated-supply, mains: 230 V ± 10 %}
  charger: {kind: charger, to: store, mains: 230 V ± 10 %}
  store: {kind: battery, cells: vrla-agm}
  guard: {kind: low-voltage-disconnect, from: store}
  k: {kind: changeover-relay, coil: sense, from: guard}
  hut: {kind: distribution-board, title: Hut, from: k.break, ways: 4}
  # more
luminaires:
  bulk: {kind: led-driver, power: 5 W, works: 18 V..32 V}
circuits:
  - {name: Hut, board: hut, lit: outage, points: [6 m bulk]}
`
	for _, c := range []struct{ more, want string }{
		{"", ""},
		{"spare: {kind: battery, cells: flooded}\n  other: {kind: isolator, from: spare}", "second battery"},
		{"other: {kind: low-voltage-disconnect, from: store}", "second low-voltage-disconnect"},
		{"other: {kind: changeover-relay, coil: sense, from: guard}", ""},
	} {
		_, list := describe.Options{}.Parse("x.yaml", []byte(strings.Replace(site, "# more", c.more, 1)), Schema())
		var got []string
		for _, d := range list {
			if d.Severity == describe.Error {
				got = append(got, d.Summary)
			}
		}
		if strings.Join(got, ", ") != c.want {
			t.Errorf("%q: %q, want %q", c.more, got, c.want)
		}
	}
}
