package describe

import (
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
)

// changed returns the lines of b that are not in a at the same place, and whether
// the two have the same number of lines.
func changed(a, b string) (lines []string, sameCount bool) {
	x, y := strings.Split(a, "\n"), strings.Split(b, "\n")
	if len(x) != len(y) {
		return nil, false
	}
	for i := range x {
		if x[i] != y[i] {
			lines = append(lines, y[i])
		}
	}
	return lines, true
}

func TestOverride(t *testing.T) {
	right := sample(t)
	for _, c := range []struct{ why, path, value, line string }{
		{"a value of a block mapping", "duty.outage", "6h", "  outage: 6h"},
		{"the remark after it stays", "gloamwright", "1", ""},
		{"a value of a flow mapping", "luminaires.corridor.power", "9 W", "  corridor: {kind: led-driver, power: 9 W, works: 18 V..32 V, flux: 600 lm}"},
		{"a circuit by its name", "circuits.Stair.fuse", "3 A", "  - {name: Stair, board: board, lit: outage-night, fuse: 3 A, cable: 1.5 mm², points: [11 m corridor, 3 m corridor]}   # pinned"},
		{"a name with a space", "circuits.Bunkroom corridor.lit", "outage", "  - {name: Bunkroom corridor, board: board, lit: outage, points: [9 m corridor at west door, 4 m corridor at bunk 2, 4 m corridor at bunk 4]}"},
		{"a name in quotation marks", `circuits."Stair".cable`, "2.5 mm2", "  - {name: Stair, board: board, lit: outage-night, fuse: 2 A, cable: 2.5 mm2, points: [11 m corridor, 3 m corridor]}   # pinned"},
		{"a circuit by its number", "circuits.3.fuse", "5 A", "  - {name: Stair, board: board, lit: outage-night, fuse: 5 A, cable: 1.5 mm², points: [11 m corridor, 3 m corridor]}   # pinned"},
		{"a point", "circuits.Stair.points.2", "7 m porch at door", "  - {name: Stair, board: board, lit: outage-night, fuse: 2 A, cable: 1.5 mm², points: [11 m corridor, 7 m porch at door]}   # pinned"},
		{"a point in a branch", "circuits.Boathouse.points.2.branch.1", "4 m porch", "  - {name: Boathouse, board: annex, lit: outage-night, points: [6 m corridor, {branch: [4 m porch]}, 6 m corridor]}"},
		{"a value that needs quotation marks in braces", "circuits.Stair.points.1", "7 m porch at door, left", `  - {name: Stair, board: board, lit: outage-night, fuse: 2 A, cable: 1.5 mm², points: ["7 m porch at door, left", 3 m corridor]}   # pinned`},
		{"a value that looks like a remark", "job.client", "No. #7 Trust", `  client: "No. #7 Trust"`},
		{"a key that is not there yet, in braces", "circuits.Boathouse.fuse", "3 A", "  - {fuse: 3 A, name: Boathouse, board: annex, lit: outage-night, points: [6 m corridor, {branch: [3 m porch]}, 6 m corridor]}"},
		{"a field of a stage that is not there yet", "stages.annex.way", "2", "  annex:    {way: 2, kind: distribution-board, from: board, along: 28 m, ways: 4}"},
	} {
		out, err := Override([]byte(right), c.path, c.value)
		if err != nil {
			t.Errorf("%s: %v", c.why, err)
			continue
		}
		lines, same := changed(right, string(out))
		if !same || strings.Join(lines, "\n") != c.line {
			t.Errorf("%s: changed lines\n%s\nwant\n%s", c.why, strings.Join(lines, "\n"), c.line)
		}
	}
}

// TestOverrideAdds adds keys where the file gets a line more.
func TestOverrideAdds(t *testing.T) {
	for _, c := range []struct{ why, src, path, value, want string }{
		{"in a block mapping", "duty:\n  # long\n  nominal: 24 V\n", "duty.recharge", "12 h", "duty:\n  # long\n  recharge: 12 h\n  nominal: 24 V\n"},
		{"in an entry of a block list", "circuits:\n  - name: Stair\n    points: [x]\n", "circuits.Stair.fuse", "2 A", "circuits:\n  - fuse: 2 A\n    name: Stair\n    points: [x]\n"},
		{"with other line ends", "duty:\r\n  nominal: 24 V\r\n", "duty.recharge", "12 h", "duty:\r\n  recharge: 12 h\r\n  nominal: 24 V\r\n"},
		{"after a byte order mark", "\ufeffduty:\n  nominal: 24 V\n", "duty.nominal", "12 V", "\ufeffduty:\n  nominal: 12 V\n"},
		{"a section that is not there", "job: {number: 7}\n", "practice.colours.positive", "BN", "practice: {colours: {positive: BN}}\njob: {number: 7}\n"},
		{"a section without a value", "practice:\njob: {number: 7}\n", "practice.lamp_drop", "3 %", "practice: {lamp_drop: 3 %}\njob: {number: 7}\n"},
		{"a key without a value", "duty:\n  outage: # how long?\n  nominal: 24 V\n", "duty.outage", "6 h", "duty:\n  outage: 6 h # how long?\n  nominal: 24 V\n"},
		{"an empty mapping", "duty: {}\n", "duty.outage", "6 h", "duty: {outage: 6 h}\n"},
		{"an anchored mapping", "stages:\n  a: &x {kind: k}\n  b: *x\n", "stages.a.own", "5 mA", "stages:\n  a: &x {own: 5 mA, kind: k}\n  b: *x\n"},
		{"quotation marks", "job: {title: 'it''s'}\n", "job.title", "it is", "job: {title: it is}\n"},
	} {
		out, err := Override([]byte(c.src), c.path, c.value)
		if err != nil || string(out) != c.want {
			t.Errorf("%s: %v\n%s\nwant\n%s", c.why, err, out, c.want)
		}
	}
}

func TestOverrideRefused(t *testing.T) {
	right := sample(t)
	for _, c := range []struct{ why, src, path, value, want string }{
		{"a misspelt key", right, "duty.outag", "6 h", `duty.outag: duty has no key "outag". Did you mean outage?`},
		{"a key that is near none", right, "duty.colour", "6 h", `duty.colour: duty has no key "colour". Keys: nominal, outage, recharge, battery_room, cable_ambient.`},
		{"a misspelt section", right, "dutty.outage", "6 h", `dutty.outage: the description has no key "dutty". Did you mean duty?`},
		{"a misspelt circuit", right, "circuits.Stiar.fuse", "2 A", `circuits.Stiar.fuse: circuits has no entry called "Stiar". Did you mean Stair?`},
		{"a misspelt key of a circuit", right, "circuits.Stair.fues", "2 A", `circuits.Stair.fues: circuits.Stair has no key "fues". Did you mean fuse?`},
		{"a misspelt stage", right, "stages.stroe.cells", "flooded", `stages.stroe.cells: stages has no key "stroe". Did you mean store?`},
		{"a point that is not there", right, "circuits.Stair.points.3", "1 m porch", `circuits.Stair.points.3: circuits.Stair.points has no entry "3"; it has 2, counted from 1`},
		{"a mapping", right, "stages.store", "x", `stages.store: it holds a mapping (key: value); only a single value can be set`},
		{"a list", right, "circuits.Stair.points", "x", `circuits.Stair.points: it holds a list; only a single value can be set`},
		{"below a value", right, "duty.outage.hours", "4", `duty.outage.hours: duty.outage is a single value; nothing stands below it`},
		{"no path", right, "", "4", `"" is not a path: write keys joined by points, such as duty.outage or circuits.Stair.fuse`},
		{"an open quotation mark", right, `circuits."Stair.fuse`, "4", `"circuits.\"Stair.fuse" is not a path: write keys joined by points, such as duty.outage or circuits.Stair.fuse`},
		{"no value", right, "duty.outage", " ", `duty.outage needs a value on one line, such as duty.outage=6h`},
		{"two lines", right, "duty.outage", "4 h\njob: x", `duty.outage needs a value on one line, such as duty.outage=6h`},
		{"a shared practice", "practice: house.yaml\n", "practice.lamp_drop", "3 %", `practice.lamp_drop: the practice stands in house.yaml; change it there`},
		{"a repeated value", "stages:\n  a: &x {kind: k}\n  b: *x\n", "stages.b.kind", "y", `stages.b.kind: stages.b is shared by * with other places; change it in the file`},
		{"a text on several lines", "job:\n  title: |\n    two\n    lines\n", "job.title", "one", `job.title cannot be set from outside the way it is written; change it in the file`},
		{"broken YAML", "job: [\n", "job.title", "x", `the description cannot be read at line 1: not valid YAML: The text cannot be read after this bracket: a bracket or brace is not closed, or a value is missing (did not find expected node content).`},
	} {
		_, err := Override([]byte(c.src), c.path, c.value)
		if err == nil || err.Error() != c.want {
			t.Errorf("%s:\n got %v\nwant %s", c.why, err, c.want)
		}
	}
}

// TestOverrideItself sets every single value of the sample to what it is: nothing
// may change; and to something else: only that value may change.
func TestOverrideItself(t *testing.T) {
	right := sample(t)
	top, _, err := readNodes([]byte(right))
	if err != nil {
		t.Fatal(err)
	}
	count := 0
	var visit func(n *yaml.Node, path []string)
	visit = func(n *yaml.Node, path []string) {
		switch n.Kind {
		case yaml.MappingNode:
			for i := 0; i < len(n.Content); i += 2 {
				visit(n.Content[i+1], append(path[:len(path):len(path)], n.Content[i].Value))
			}
		case yaml.SequenceNode:
			for i, c := range n.Content {
				visit(c, append(path[:len(path):len(path)], string(rune('1'+i))))
			}
		case yaml.ScalarNode:
			count++
			p := strings.Join(path, ".")
			if out, err := Override([]byte(right), p, n.Value); err != nil || string(out) != right {
				t.Errorf("%s set to itself: %v", p, err)
			}
			out, err := Override([]byte(right), p, `x: [y], "z" # {`)
			if err != nil {
				t.Errorf("%s: %v", p, err)
				return
			}
			if lines, same := changed(right, string(out)); !same || len(lines) != 1 {
				t.Errorf("%s: %d lines changed", p, len(lines))
			}
		}
	}
	visit(top, nil)
	if count < 60 {
		t.Errorf("only %d values visited", count)
	}
}

func FuzzOverride(f *testing.F) {
	f.Add(sample(f), "duty.outage", "6h")
	f.Add("a: &x {b: 'c'}\n", "a.b", "d # e")
	f.Add("? a\n: b\n", "a", "c")
	f.Add("circuits:\n- name: x\n  points: [\"1 m\n  y\", z]\n", "circuits.x.points.1", "}")
	f.Fuzz(func(t *testing.T, src, path, value string) {
		out, err := Override([]byte(src), path, value)
		if err != nil {
			return
		}
		again, err := Override(out, path, value)
		if err != nil {
			t.Fatalf("%q: cannot be set a second time: %v", out, err)
		}
		top, _, err := readNodes(again)
		if err != nil {
			t.Fatal(err)
		}
		keys, _ := splitPath(path)
		got, err := find(top, keys)
		if err != nil || got.node.Value != strings.TrimSpace(value) {
			t.Fatalf("%q does not hold %q at %q: %v", again, value, path, err)
		}
	})
}
