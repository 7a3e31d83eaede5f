package release

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

// lamps returns the designations of a circuit's luminaires by path.
func lamps(c *circuit.Circuit, name string) map[string]string {
	out := map[string]string{}
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			if w.Lighting == nil || w.Lighting.Name != name {
				continue
			}
			var run func(points []*circuit.Point, before string)
			run = func(points []*circuit.Point, before string) {
				for i, p := range points {
					path := fmt.Sprintf("%s%d", before, i+1)
					out[path] = p.Luminaire.Designation
					for j, br := range p.Branches {
						run(br, path+string(rune('a'+j)))
					}
				}
			}
			run(w.Lighting.Points, "")
		}
	}
	return out
}

// What an electrician would call the same lamp keeps its label, whatever is done
// around it.
func TestLampsKeepTheirLabels(t *testing.T) {
	const before = `
  - {name: Hall, board: main, points: [9 m big, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs, 4 m big]}
`
	hall := func(points string) string { return "\n  - {name: Hall, board: main, points: [" + points + "]}\n" }
	for _, c := range []struct {
		name, after string
		same        map[string]string // path after: path before
		fresh       []string          // paths of new lamps
	}{
		{"one put in at the second place", hall("9 m big, 3 m small, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs, 4 m big"),
			map[string]string{"1": "1", "3": "2", "3a1": "2a1", "3a2": "2a2", "4": "3", "5": "4"}, []string{"2"}},
		{"the first taken away", hall("4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs, 4 m big"),
			map[string]string{"1": "2", "1a1": "2a1", "1a2": "2a2", "2": "3", "3": "4"}, nil},
		{"a length changed", hall("9 m big, 6 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs, 4 m big"),
			map[string]string{"1": "1", "2": "2", "2a1": "2a1", "2a2": "2a2", "3": "3", "4": "4"}, nil},
		{"a lamp changed", hall("9 m big, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m small at stairs, 4 m big"),
			map[string]string{"2": "2", "3": "3", "4": "4"}, nil},
		{"a place named", hall("9 m big at door, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs, 4 m big"),
			map[string]string{"1": "1", "2": "2", "4": "4"}, nil},
		{"a place renamed", hall("9 m big, 4 m big, {branch: [2 m small at alcove, 2 m small]}, 4 m big at stairs, 4 m big"),
			map[string]string{"2a1": "2a1", "2a2": "2a2"}, nil},
		{"another lamp at another place", hall("9 m big, 4 m big, {branch: [2 m small at niche, 2 m small]}, 7 m big at landing, 4 m big"),
			map[string]string{"1": "1", "2": "2", "4": "4"}, []string{"3"}},
		{"a named one moved to the end", hall("9 m big, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big, 4 m big at stairs"),
			map[string]string{"1": "1", "2": "2", "4": "3"}, []string{"3"}},
		{"a branch added", hall("9 m big, {branch: [1 m small]}, 4 m big, {branch: [2 m small at niche, 2 m small]}, 4 m big at stairs, 4 m big"),
			map[string]string{"1": "1", "2": "2", "2a1": "2a1", "2a2": "2a2", "3": "3", "4": "4"}, []string{"1a1"}},
		{"the circuit renamed", strings.Replace(before, "name: Hall", "name: Great hall, was: Hall", 1),
			map[string]string{"1": "1", "2": "2", "2a1": "2a1", "2a2": "2a2", "3": "3", "4": "4"}, nil},
	} {
		r, old := label(t, nil, before)
		_, now := label(t, r, c.after)
		was := lamps(old, "Hall")
		name := "Hall"
		if strings.Contains(c.after, "Great hall") {
			name = "Great hall"
		}
		is := lamps(now, name)
		for path, from := range c.same {
			if is[path] == "" || is[path] != was[from] {
				t.Errorf("%s: the lamp at %s is %q; it was %q at %s", c.name, path, is[path], was[from], from)
			}
		}
		for _, path := range c.fresh {
			for from, l := range was {
				if is[path] == "" || l == is[path] {
					t.Errorf("%s: the new lamp at %s is %q, which the lamp at %s was", c.name, path, is[path], from)
				}
			}
		}
	}
}

func wayOf(c *circuit.Circuit, name string) string {
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			if w.Lighting != nil && w.Lighting.Name == name || w.Feeds != nil && w.Feeds.Name == name {
				return fmt.Sprintf("%s %d %s %s", b.Name, w.Number, w.Fuse.Designation, w.TermPlus.Designation)
			}
		}
	}
	return ""
}

// A circuit put in before others takes a free way; those others stay where they are
// wired. A way that is pinned goes to the circuit that pins it.
func TestWaysStay(t *testing.T) {
	r, old := label(t, nil, twoCircuits)
	_, now := label(t, r, "\n  - {name: Attic, board: main, points: [3 m small]}"+twoCircuits)
	for _, name := range []string{"Hall", "Yard", "annex"} {
		if was, is := wayOf(old, name), wayOf(now, name); was == "" || was != is {
			t.Errorf("%s: way %q, was %q", name, is, was)
		}
	}
	if got := wayOf(now, "Attic"); !strings.HasPrefix(got, "main 3 ") {
		t.Errorf("Attic: way %q, the third is free", got)
	}
	_, now = label(t, r, "\n  - {name: Attic, board: main, way: 1, points: [3 m small]}"+twoCircuits)
	if got := wayOf(now, "Attic"); !strings.HasPrefix(got, "main 1 ") {
		t.Errorf("Attic: way %q, pinned to 1", got)
	}
	if got := wayOf(now, "annex"); got != wayOf(old, "annex") {
		t.Errorf("annex: way %q, was %q", got, wayOf(old, "annex"))
	}
}

// A stage put in between, or a board before another, renames nothing that was there.
func TestRailsAndPlacesStay(t *testing.T) {
	r, old := label(t, nil, twoCircuits)
	src := strings.Replace(fmt.Sprintf(station, twoCircuits), "  guard:    {kind: low-voltage-disconnect, from: store}",
		"  cut:      {kind: isolator, from: store}\n  guard:    {kind: low-voltage-disconnect, from: cut}", 1)
	src = strings.Replace(src, "  annex: ", "  aloft:    {kind: distribution-board, from: main, along: 9 m, ways: 2}\n  annex: ", 1)
	site, list := describe.Parse("t.yaml", []byte(src), stage.Schema())
	if list.HasErrors() {
		t.Fatal(list)
	}
	kept, _ := r.Keep(site)
	now := stage.Expand(site)
	now.Label(kept)
	names := func(c *circuit.Circuit) map[string]string {
		out := map[string]string{}
		for _, rail := range c.Rails {
			if rail.Key != "" {
				out["rail "+rail.Key] = rail.Name
			}
		}
		for _, p := range c.Places {
			out["place "+p.Key] = p.Designation
		}
		return out
	}
	was, is := names(old), names(now)
	if len(is) != len(was)+3 { // the isolator's rail, the new board's rail and place
		t.Errorf("was %v, is %v", was, is)
	}
	taken := map[string]string{}
	for _, id := range circuit.SortedKeys(is) {
		if o, ok := was[id]; ok && o != is[id] {
			t.Errorf("%s was %s, is %s", id, o, is[id])
		}
		if other, twice := taken[is[id]]; twice {
			t.Errorf("%s and %s are both %s", id, other, is[id])
		}
		taken[is[id]] = id
	}
	for _, w := range now.Conductors {
		if name, _, ok := strings.Cut(w.Number, "."); ok && name != w.Rail {
			t.Errorf("%s stands on the rail %s", w.Number, w.Rail)
		}
	}
}

func TestRenamingOfAnUnknownCircuit(t *testing.T) {
	r, _ := label(t, nil, twoCircuits)
	site := parse(t, strings.Replace(twoCircuits, "name: Hall", "name: Great hall, was: Halle", 1))
	_, list := r.Keep(site)
	if len(list) != 1 || list[0].Code != codeNoSuchCircuit || list[0].At.Line == 0 || !strings.Contains(list[0].Detail, "Hall, Yard") {
		t.Errorf("got %v", list)
	}
	// Once the new name is issued, was: may stay where it is.
	renamed := strings.Replace(twoCircuits, "name: Hall", "name: Great hall, was: Hall", 1)
	r, _ = label(t, r, renamed)
	if _, list := r.Keep(parse(t, renamed)); len(list) > 0 {
		t.Errorf("second time: %v", list)
	}
}

// Over any sequence of edits, a label that was ever given to one thing is never given
// to another: every label in use or retired is unique, and a retired one stays so.
func TestLabelsAreNeverUsedAgain(t *testing.T) {
	lengths := []string{"3 m", "4 m", "9 m"}
	types := []string{"big", "small"}
	point := rapid.Custom(func(t *rapid.T) string {
		p := rapid.SampledFrom(lengths).Draw(t, "length") + " " + rapid.SampledFrom(types).Draw(t, "lamp")
		if n := rapid.IntRange(0, 5).Draw(t, "place"); n < 3 {
			p += fmt.Sprintf(" at post %d", n)
		}
		return p
	})
	site := rapid.Custom(func(t *rapid.T) string {
		var b strings.Builder
		names := rapid.SliceOfNDistinct(rapid.SampledFrom([]string{"Hall", "Yard", "Loft", "Shed"}), 1, 4, rapid.ID).Draw(t, "circuits")
		for _, n := range names {
			board := rapid.SampledFrom([]string{"main", "annex"}).Draw(t, "board")
			points := rapid.SliceOfN(point, 1, 5).Draw(t, "points")
			fmt.Fprintf(&b, "  - {name: %s, board: %s, points: [%s]}\n", n, board, strings.Join(points, ", "))
		}
		return b.String()
	})
	rapid.Check(t, func(rt *rapid.T) {
		var r *Register
		everRetired := map[string]bool{}
		for range 4 {
			var c *circuit.Circuit
			r, c = label(t, r, "\n"+site.Draw(rt, "site"))
			seen := map[string]string{}
			for _, id := range circuit.SortedKeys(r.Labels) {
				sort, _ := sortOf(id)
				l := sort + " " + r.Labels[id]
				if other, twice := seen[l]; twice {
					rt.Fatalf("%s is on %s and %s", l, id, other)
				}
				if everRetired[l] {
					rt.Fatalf("%s was retired and is given to %s", l, id)
				}
				seen[l] = id
			}
			for _, g := range r.Retired {
				everRetired[g.Sort+" "+g.Label] = true
			}
			unique(rt, c)
		}
		data, err := r.Encode("t.yaml")
		if err != nil {
			rt.Fatal(err)
		}
		if _, list := DecodeRegister("r", data); len(list) > 0 {
			rt.Fatal(list)
		}
	})
}

// unique fails if two parts, cables or conductors bear one label.
func unique(t *rapid.T, c *circuit.Circuit) {
	var all []string
	for _, p := range c.Parts {
		if p.Kind != circuit.MainsConnection {
			all = append(all, p.Designation)
		}
	}
	for _, w := range c.Cables {
		all = append(all, w.Designation)
	}
	for _, w := range c.Conductors {
		all = append(all, "wire "+w.Number)
	}
	slices.Sort(all)
	for i := 1; i < len(all); i++ {
		if all[i] == all[i-1] {
			t.Fatalf("%s is given twice", all[i])
		}
	}
}

func TestNextRevision(t *testing.T) {
	for _, c := range [][2]string{{"", "A"}, {"A", "B"}, {"H", "J"}, {"N", "P"}, {"Z", "AA"}, {"AH", "AJ"}, {"AZ", "BA"}, {"ZZ", ""}, {"I", ""}, {"a", ""}} {
		if got := NextRevision(c[0]); got != c[1] {
			t.Errorf("after %q: %q, want %q", c[0], got, c[1])
		}
	}
}
