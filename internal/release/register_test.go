package release

import (
	"bytes"
	"fmt"
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

// station is a small description whose circuits the tests fill in.
const station = `gloamwright: 1
job: {number: T-1, title: Test, revision: A, date: 2026-12-01}
duty: {nominal: 24 V, outage: 4 h}
stages:
  presence: {kind: regulated-supply, mains: 230 V ± 10 %%}
  charger:  {kind: charger, to: store, mains: 230 V ± 10 %%}
  store:    {kind: battery, cells: vrla-agm}
  guard:    {kind: low-voltage-disconnect, from: store}
  dusk:     {kind: photocell, from: guard, holds: transfer}
  transfer: {kind: changeover-relay, coil: presence, from: guard}
  main:     {kind: distribution-board, from: transfer.break, ways: 6}
  annex:    {kind: distribution-board, from: main, along: 20 m, ways: 4}
luminaires:
  big:   {kind: led-driver, power: 6 W, works: 18 V..32 V}
  small: {kind: led-driver, power: 3 W, works: 18 V..32 V}
circuits:
%s`

func parse(t *testing.T, circuits string) *describe.Site {
	t.Helper()
	src := []byte(fmt.Sprintf(station, circuits))
	site, list := describe.Parse("t.yaml", src, stage.Schema())
	if list.HasErrors() {
		var b strings.Builder
		list.Write(&b, site.Sources)
		t.Fatal(b.String())
	}
	return site
}

// label expands and labels a description as an issued revision of it would be, and
// returns the register after it.
func label(t *testing.T, r *Register, circuits string) (*Register, *circuit.Circuit) {
	t.Helper()
	site := parse(t, circuits)
	kept, list := r.Keep(site)
	if list.HasErrors() {
		t.Fatal(list)
	}
	c := stage.Expand(site)
	labels := c.Label(kept)
	return r.Next(NextRevision(r.Last()), labels, site, c), c
}

const twoCircuits = `
  - {name: Hall, board: main, points: [9 m big, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs]}
  - {name: Yard, board: annex, points: [5 m small, 6 m small]}
`

func TestRegisterRoundTrip(t *testing.T) {
	r, _ := label(t, nil, twoCircuits)
	r, _ = label(t, r, strings.Replace(twoCircuits, ", 6 m small", "", 1))
	if len(r.Retired) == 0 {
		t.Fatal("nothing is retired")
	}
	data, err := r.Encode("t.yaml")
	if err != nil {
		t.Fatal(err)
	}
	for name, src := range map[string][]byte{"as written": data, "with CR LF": bytes.ReplaceAll(data, []byte("\n"), []byte("\r\n"))} {
		got, list := DecodeRegister("t.register.yaml", src)
		if len(list) > 0 {
			t.Fatalf("%s: %v", name, list)
		}
		if diff := cmp.Diff(r, got, cmp.AllowUnexported(Point{})); diff != "" {
			t.Errorf("%s: %s", name, diff)
		}
	}
	again, err := r.Encode("t.yaml")
	if err != nil || !bytes.Equal(data, again) {
		t.Error("a second writing differs")
	}
}

// Every label of the examples has one of the forms that the register knows.
func TestLabelFormsOfExamples(t *testing.T) {
	for _, name := range []string{"bracken-reach", "juniper-flat"} {
		src, err := os.ReadFile("../../examples/" + name + ".yaml")
		if err != nil {
			t.Fatal(err)
		}
		site, list := describe.Parse(name+".yaml", src, stage.Schema())
		if list.HasErrors() {
			t.Fatal(list)
		}
		c := stage.Expand(site)
		r := (*Register)(nil).Next("A", c.Label(nil), site, c)
		data, err := r.Encode(name + ".yaml")
		if err != nil {
			t.Fatal(err)
		}
		if _, list := DecodeRegister(name+".register.yaml", data); len(list) > 0 {
			t.Errorf("%s: %v", name, list)
		}
	}
}

// sealed puts a true checksum under a register's text.
func sealed(text string) []byte { return []byte(text + checksumKey + checksum([]byte(text)) + "\n") }

const smallRegister = `register: 1
revisions: [A]
labels:
  cable:
    store/main: -W1
  part:
    store/battery: -G1
    store/main-fuse: -F1
circuits:
  Hall:
    board: main
    way: 1
    points:
      "1": [9 m, big]
      1a1: [2 m, small, niche]
feeders:
  annex: {board: main, way: 2}
retired:
  - {sort: part, label: -F7, last: A}
`

func TestRegisterMistakes(t *testing.T) {
	if _, list := DecodeRegister("r", sealed(smallRegister)); len(list) > 0 {
		t.Fatal(list)
	}
	for _, c := range []struct{ name, old, new, want string }{
		{"unknown key", "revisions:", "issues:", "R002 2:1"},
		{"unknown key inside", "    way: 1\n", "    way: 1\n    size: 2\n", "R002 13:5"},
		{"key twice", "    store/battery: -G1", "    store/main-fuse: -G1", "R004 8:5"},
		{"label twice", "store/main-fuse: -F1", "store/main-fuse: -G1", "R004 8:22"},
		{"retired label in use", "label: -F7", "label: -F1", "R004 19:25"},
		{"malformed label", "-W1", "W1", "R003 5:17"},
		{"label of another sort", "store/main: -W1", "store/main: TP1", "R003 5:17"},
		{"unknown sort", "  cable:", "  rope:", "R002 4:3"},
		{"revision out of order", "[A]", "[A, C]", "R002 2:16"},
		{"bad way", "way: 1", "way: none", "R002 12:10"},
		{"point out of order", `"1": [9 m, big]`, `"2": [9 m, big]`, "R002 14:7"},
		{"point without lamp", "[9 m, big]", "[9 m]", "R002 14:7"},
		{"list for a mapping", "feeders:\n  annex: {board: main, way: 2}", "feeders: []", "R002 16:10"},
		{"unknown version", "register: 1", "register: 7", "R002 1:11"},
		{"not YAML", "labels:", "labels: [", "R001 "},
	} {
		text := strings.Replace(smallRegister, c.old, c.new, 1)
		if text == smallRegister {
			t.Fatalf("%s: the text has not changed", c.name)
		}
		reg, list := DecodeRegister("r", sealed(text))
		if reg != nil || !has(list, c.want) {
			t.Errorf("%s: want %s, got %s", c.name, c.want, places(list))
		}
	}
}

// A changed byte anywhere is found, and where the text can still be read it is the
// checksum that tells.
func TestRegisterChangedByHand(t *testing.T) {
	whole := sealed(smallRegister)
	changed := bytes.Replace(whole, []byte("-G1"), []byte("-G2"), 1)
	if _, list := DecodeRegister("r", changed); !has(list, "R005 20:1") || !strings.Contains(list[0].Detail, "changed by hand") {
		t.Errorf("changed label: %s", places(list))
	}
	cut := whole[:bytes.Index(whole, []byte("retired"))]
	if _, list := DecodeRegister("r", cut); !has(list, "R005 18:1") {
		t.Errorf("cut short: %s", places(list))
	}
	if _, list := DecodeRegister("r", append(bytes.Clone(whole), "more: 1\n"...)); !has(list, "R005 20:1") {
		t.Errorf("text after the checksum: %s", places(list))
	}
	for i := range whole {
		changed := bytes.Clone(whole)
		changed[i] ^= 1
		if reg, list := DecodeRegister("r", changed); reg != nil || !list.HasErrors() {
			t.Errorf("byte %d (%q) can be changed unseen", i, whole[i])
		}
	}
}

func places(list describe.List) string {
	var s []string
	for _, d := range list {
		s = append(s, fmt.Sprintf("%s %d:%d", d.Code, d.At.Line, d.At.Col))
	}
	return strings.Join(s, ", ")
}

func has(list describe.List, place string) bool { return strings.Contains(places(list), place) }
