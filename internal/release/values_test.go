package release

import (
	"fmt"
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

func parseText(t *testing.T, text string) *describe.Site {
	t.Helper()
	site, list := describe.Parse("t.yaml", []byte(text), stage.Schema())
	if list.HasErrors() {
		t.Fatal(list)
	}
	return site
}

// The values that a contractor would name, and no others, are said to have changed.
func TestChangedValues(t *testing.T) {
	base := fmt.Sprintf(station, `
  - {name: Hall, board: main, points: [9 m big at door, 4 m big, 4 m small at stairs]}
  - {name: Yard, board: annex, fuse: 2 A, points: [5 m small, {branch: [3 m small]}, 6 m small]} # path lights
`)
	if parsed := parseText(t, base); len(parsed.Circuits) != 2 {
		t.Fatal("the base has not two circuits")
	}
	for _, c := range []struct {
		name string
		edit []string
		want []string // path | what | was | is | why
	}{
		{"nothing", nil, nil},
		{"another spelling, a default written out, a remark, other order", []string{
			"along: 20 m", "along: 2000 cm", "outage: 4 h", "recharge: 24 h, outage: 240 min", "# path lights", "# lights of the path"}, nil},
		{"revision and date", []string{"revision: A, date: 2026-12-01", "revision: B, date: 2027-03-01"}, nil},
		{"one value with a new remark", []string{"from: main, along: 20 m, ways: 4}", "from: main, along: 42 m, ways: 4}  # moved to the wall"},
			[]string{"stages.annex.along | Annex, cable length | 20 m | 42 m | moved to the wall"}},
		{"one value beside an old remark", []string{"fuse: 2 A", "fuse: 3 A"},
			[]string{"circuits.Yard.fuse | Yard, fuse | 2 A | 3 A | "}},
		{"a value that was chosen", []string{"{name: Hall, board: main,", "{name: Hall, board: main, cable: 2.5 mm2,"},
			[]string{"circuits.Hall.cable | Hall, cable size | chosen | 2.5 mm2 | "}},
		{"a value left to the program", []string{" fuse: 2 A,", ""},
			[]string{"circuits.Yard.fuse | Yard, fuse | 2 A | chosen | "}},
		{"a lamp put in", []string{"4 m big,", "2 m small, 4 m big,"},
			[]string{"circuits.Hall.points.2 | Hall, light 2 |  | 2 m small | "}},
		{"a lamp taken away", []string{"4 m big, ", ""},
			[]string{"circuits.Hall.points.2 | Hall, light 2 | 4 m big |  | "}},
		{"a length", []string{"4 m big, ", "4.5 m big, "},
			[]string{"circuits.Hall.points.2.leg | Hall, cable to light 2 | 4 m | 4.5 m | "}},
		{"a lamp type", []string{"4 m small at stairs", "4 m big at stairs"},
			[]string{"circuits.Hall.points.3.luminaire | Hall, light at stairs | small | big | "}},
		{"a branch light", []string{"[3 m small]", "[3 m big]"},
			[]string{"circuits.Yard.points.1a1.luminaire | Yard, light at light 1a1 | small | big | "}},
		{"a circuit renamed", []string{"name: Hall", "name: Great hall, was: Hall"},
			[]string{"circuits.Great hall.name | Name of a circuit | Hall | Great hall | "}},
		{"a circuit added", []string{"circuits:\n", "circuits:\n  - {name: Attic, board: main, points: [3 m small, 3 m big]}\n"},
			[]string{"circuits.Attic | Circuit Attic |  | 2 lights on main | "}},
		{"a luminaire type", []string{"power: 6 W", "power: 9 W"},
			[]string{"luminaires.big.power | Light type big, power | 6 W | 9 W | "}},
		{"practice and duty", []string{"outage: 4 h}", "outage: 5 h, cable_ambient: 40 degC}\npractice: {lamp_drop: 6 %}"},
			[]string{"practice.lamp_drop | Practice, drop to the farthest light, at most | 5 % | 6 % | ", "duty.outage | Outage that the lights last | 4 h | 5 h | ",
				"duty.cable_ambient | Ambient of the cables | 30 °C | 40 degC | "}},
		{"a stage added", []string{"  main:  ", "  watch: {kind: indicator, from: guard}\n  main:  "},
			[]string{"stages.watch | Watch |  | indicator | "}},
	} {
		text := base
		for i := 0; i < len(c.edit); i += 2 {
			if !strings.Contains(text, c.edit[i]) {
				t.Fatalf("%s: no %q in the text", c.name, c.edit[i])
			}
			text = strings.Replace(text, c.edit[i], c.edit[i+1], 1)
		}
		values, scopes := changedValues(parseText(t, base), parseText(t, text), stage.Schema())
		var got []string
		for i, v := range values {
			got = append(got, strings.Join([]string{v.Path, v.What, v.Was, v.Is, v.Why}, " | "))
			if v.Number != i+1 {
				t.Errorf("%s: value %d has the number %d", c.name, i+1, v.Number)
			}
		}
		if diff := cmp.Diff(c.want, got); diff != "" {
			t.Errorf("%s: %s", c.name, diff)
		}
		if len(scopes) != len(values) {
			t.Errorf("%s: %d values, %d scopes", c.name, len(values), len(scopes))
		}
	}
}

// Every value of the examples that is written in them is found by its path.
func TestLeavesOfExamples(t *testing.T) {
	for name, want := range map[string]map[string]string{
		"bracken-reach": {
			"job.client": "Bracken Reach Trust", "practice.lamp_drop": "5 %", "practice.colours.positive": "RD", "duty.battery_room": "5 °C..30 °C",
			"stages.dusk.dark_below": "10 lx", "stages.main.from": "transfer.break", "luminaires.porch.current": "20 mA",
			"circuits.Stair.fuse": "2 A", "circuits.Boathouse.points.1a1.leg": "3 m", "circuits.Boathouse.points.1a1.place": "water gate",
		},
		"juniper-flat": {"practice.paper": "ansi", "stages.charger.compensation": "no", "luminaires.step.forward": "2.9 V"},
	} {
		src, err := os.ReadFile("../../examples/" + name + ".yaml")
		if err != nil {
			t.Fatal(err)
		}
		got := map[string]string{}
		for _, l := range leaves(parseText(t, string(src)), stage.Schema()) {
			if _, twice := got[l.path]; twice {
				t.Errorf("%s: two values at %s", name, l.path)
			}
			got[l.path] = l.text
		}
		for path, text := range want {
			if got[path] != text {
				t.Errorf("%s: %s is %q, want %q", name, path, got[path], text)
			}
		}
	}
}
