package job

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"reflect"
	"regexp"
	"slices"
	"sort"
	"strconv"
	"strings"
	"testing"

	"gloamwright/internal/design"
	"gloamwright/internal/results"
	"gloamwright/layout/schematic"
)

// editCount is how many single-value edits are tried on each example.
const editCount = 20

// edit is one changed value of a description.
type edit struct {
	line     int
	old, new string
	text     string // the whole description after it
}

// quantities that an edit may change, and by how much.
var editable = regexp.MustCompile(`\b([0-9]+(?:\.[0-9]+)?) (m|ft|h|W|lx|mA|%|°C|°F|lm)\b?`)

// edits returns single-value edits spread evenly over a description. Each takes one
// figure with its unit and makes it somewhat larger, as a planner would.
func edits(src string) []edit {
	factor := map[string]float64{"m": 1.5, "ft": 1.5, "h": 1.25, "W": 1.5, "lx": 2, "mA": 1.2, "%": 1.25, "°C": 1.1, "°F": 1.05, "lm": 1.1}
	var all []edit
	lines := strings.SplitAfter(src, "\n")
	for i, line := range lines {
		body, _, _ := strings.Cut(line, "#")
		for _, m := range editable.FindAllStringSubmatchIndex(body, -1) {
			v, err := strconv.ParseFloat(body[m[2]:m[3]], 64)
			if err != nil {
				continue
			}
			unit := body[m[4]:m[5]]
			e := edit{line: i + 1, old: body[m[0]:m[1]], new: strconv.FormatFloat(math.Round(v*factor[unit]*10)/10, 'f', -1, 64) + " " + unit}
			changed := slices.Clone(lines)
			changed[i] = line[:m[0]] + e.new + line[m[1]:]
			e.text = strings.Join(changed, "")
			all = append(all, e)
		}
	}
	return all
}

// thing is everything that results.json says of one labelled thing, by sort: what is
// fitted, and what is only printed.
type thing struct{ make, figures string }

// things reads a results.json without any of the types that the notice is made with.
func things(t *testing.T, js []byte) map[string]map[string]thing {
	t.Helper()
	var doc map[string]any
	if err := json.Unmarshal(js, &doc); err != nil {
		t.Fatal(err)
	}
	out := map[string]map[string]thing{"cable": {}, "wire": {}, "part": {}, "fuse": {}, "point": {}}
	list := func(key string) []map[string]any {
		var l []map[string]any
		for _, e := range doc[key].([]any) {
			l = append(l, e.(map[string]any))
		}
		return l
	}
	join := func(e map[string]any, keys ...string) string {
		var s []string
		for _, k := range keys {
			s = append(s, fmt.Sprint(e[k]))
		}
		return strings.Join(s, "|")
	}
	for _, c := range list("conductors") {
		text := join(c, "from", "to", "size", "colour") + fmt.Sprintf("|%.2f", c["length_m"])
		if run := c["run"].(string); run != "" {
			was := out["cable"][run]
			out["cable"][run] = thing{make: was.make + text + ";"}
		} else {
			out["wire"][c["number"].(string)] = thing{make: text}
		}
	}
	for _, p := range list("parts") {
		if p["kind"] == "mains" || p["kind"] == "busbar" || p["kind"] == "fuse" {
			continue
		}
		values := p["values"].(map[string]any)
		var texts []string
		for name, v := range values {
			texts = append(texts, name+"="+v.(map[string]any)["text"].(string))
		}
		sort.Strings(texts)
		text := join(p, "kind", "requirement") + strings.Join(texts, ",")
		if p["kind"] != "luminaire" {
			text += p["description"].(string)
		}
		out["part"][p["designation"].(string)] = thing{make: text}
	}
	for _, f := range list("fuses") {
		out["fuse"][f["designation"].(string)] = thing{make: join(f, "rating_a", "style", "colour", "feeds")}
	}
	numbered := map[string]bool{}
	for _, c := range list("conditions") {
		numbered[c["name"].(string)] = c["number"].(float64) > 0
	}
	for _, p := range list("test_points") {
		var bands []string
		for k, b := range p["readings"].(map[string]any) {
			if numbered[k] {
				bands = append(bands, k+"="+printedBand(b.(map[string]any)))
			}
		}
		sort.Strings(bands)
		out["point"][p["label"].(string)] = thing{make: join(p, "terminal", "black"), figures: strings.Join(bands, "\n")}
	}
	return out
}

// printedBand is a band in whole tenths of a volt, reckoned in microvolts: the low end
// down, the high end up.
func printedBand(b map[string]any) string {
	micro := func(key string) int64 { return int64(math.Round(b[key].(float64) * 1e6)) }
	const step = 100_000
	low, high := micro("low_v"), micro("high_v")
	down := low / step
	if low%step < 0 {
		down--
	}
	up := high / step
	if high%step > 0 {
		up++
	}
	return fmt.Sprintf("%d..%.1f..%d", down, b["typical_v"].(float64)+0, up)
}

// differing returns the labels of one sort whose things differ, and those that only one
// side has.
func differing(was, is map[string]thing) (changed, fresh, gone []string) {
	for l, n := range is {
		if o, ok := was[l]; !ok {
			fresh = append(fresh, l)
		} else if o != n {
			changed = append(changed, l)
		}
	}
	for l := range was {
		if _, ok := is[l]; !ok {
			gone = append(gone, l)
		}
	}
	for _, s := range [][]string{changed, fresh, gone} {
		sort.Strings(s)
	}
	return changed, fresh, gone
}

// noticed returns the labels that a notice names for any of the tools, cores given as
// their cables.
func noticed(c *design.Changes, runs map[string]string, tools ...string) map[string]bool {
	out := map[string]bool{}
	for _, w := range c.Work {
		if !slices.Contains(tools, w.Tool) {
			continue
		}
		for _, l := range w.Labels {
			if run := runs[l]; run != "" {
				l = run
			}
			out[l] = true
		}
	}
	return out
}

// After each of twenty single-value edits of each example: the notice names that value
// and no other; what it tells a technician to do is the difference that an independent
// comparison of the two results.json finds, thing by thing; no label has moved; and the
// drawings differ at nothing that the notice does not name.
func TestNoticeIsTheDifference(t *testing.T) {
	examples, err := filepath.Glob("../../examples/*.yaml")
	if err != nil || len(examples) == 0 {
		t.Fatalf("no examples: %v", err)
	}
	for _, name := range examples {
		t.Run(strings.TrimSuffix(filepath.Base(name), ".yaml"), func(t *testing.T) {
			t.Parallel()
			src, err := os.ReadFile(name)
			if err != nil {
				t.Fatal(err)
			}
			path := filepath.Join(t.TempDir(), filepath.Base(name))
			if err := os.WriteFile(path, src, 0o644); err != nil {
				t.Fatal(err)
			}
			issued, err := Issue(path)
			if err != nil {
				t.Fatal(err)
			}
			old, err := os.ReadFile(filepath.Join(issued.Folder, "results.json"))
			if err != nil {
				t.Fatal(err)
			}
			first, err := Open(path, nil)
			if err != nil {
				t.Fatal(err)
			}
			sheets := drawn(t, first.Design)
			all := edits(string(src))
			done, work := 0, 0
			for k := 0; k < len(all) && done < editCount; k++ {
				e := all[(k*7)%len(all)] // spread over the file; a multiple of seven places would repeat
				if len(all)%7 == 0 {
					e = all[k]
				}
				if err := os.WriteFile(path, []byte(e.text), 0o644); err != nil {
					t.Fatal(err)
				}
				j, err := Open(path, nil)
				if err != nil { // out of the range that the description allows
					continue
				}
				done++
				checkEdit(t, e, j, old, sheets)
				if len(j.Design.Changes.Work) > 0 {
					work++
				}
			}
			if work < editCount/2 {
				t.Errorf("only %d of %d edits make any work: they try too little", work, done)
			}
			if done < editCount {
				t.Errorf("only %d of %d edits could be tried", done, editCount)
			}
		})
	}
}

func checkEdit(t *testing.T, e edit, j *Job, old []byte, sheets map[string]group) {
	t.Helper()
	at := fmt.Sprintf("line %d, %s to %s", e.line, e.old, e.new)
	now, err := results.JSON(j.Design)
	if err != nil {
		t.Fatal(err)
	}
	if err := j.Compare(j.Released.Last()); err != nil {
		t.Fatalf("%s: %v", at, err)
	}
	c := j.Design.Changes
	if len(c.Values) != 1 || !strings.HasPrefix(e.old, c.Values[0].Was) && !strings.Contains(c.Values[0].Was, e.old) ||
		!strings.HasPrefix(e.new, c.Values[0].Is) && !strings.Contains(c.Values[0].Is, e.new) {
		t.Errorf("%s: the values said to have changed are %+v", at, c.Values)
	}
	was, is := things(t, old), things(t, now)
	runs := map[string]string{}
	for _, w := range j.Design.Circuit.Conductors {
		if w.Cable != nil {
			runs[w.Number] = w.Cable.Designation
		}
	}
	physical := noticed(c, runs, design.ReCut, design.ReTerminate)
	fitted := noticed(c, nil, design.Replace, design.Adjust)
	fuses := noticed(c, nil, design.ReFuse)
	compare := func(sort string, got map[string]bool, except func(label string) bool) {
		changed, fresh, gone := differing(was[sort], is[sort])
		want := map[string]bool{}
		for _, l := range slices.Concat(changed, fresh, gone) {
			want[l] = true
		}
		for l := range want {
			if !got[l] {
				t.Errorf("%s: %s %s differs, but the notice does not say so: was %v, is %v", at, sort, l, was[sort][l], is[sort][l])
			}
		}
		for l := range got {
			_, a := was[sort][l]
			_, b := is[sort][l]
			if (a || b) && !want[l] && !except(l) {
				t.Errorf("%s: the notice names %s %s, which is as it was", at, sort, l)
			}
		}
		if len(fresh)+len(gone) == 0 {
			return
		}
		for _, l := range fresh {
			if sort != "fuse" && !slices.Contains(c.New.All(), l) {
				t.Errorf("%s: the new label %s is not printed", at, l)
			}
		}
		for _, l := range gone {
			if sort != "fuse" && !slices.Contains(c.Gone.All(), l) {
				t.Errorf("%s: the label %s is not taken off", at, l)
			}
		}
	}
	never := func(string) bool { return false }
	compare("cable", physical, never)
	compare("wire", physical, never)
	trimmer := map[string]bool{} // is turned when its threshold moved, without being another part
	for _, p := range j.Design.Circuit.Parts {
		trimmer[p.Designation] = p.Kind == "potentiometer" || p.Kind == "preset"
	}
	compare("part", fitted, func(l string) bool { return trimmer[l] })
	changedFuses, _, _ := differing(was["fuse"], is["fuse"])
	for _, l := range changedFuses {
		if !fuses[l] && !c.Rows[l] {
			t.Errorf("%s: fuse %s differs, but the notice does not say so", at, l)
		}
	}
	moved, fresh, _ := differing(was["point"], is["point"])
	var readings []string
	for _, r := range c.Readings {
		readings = append(readings, r.Point)
	}
	sort.Strings(readings)
	if got, want := slices.Compact(readings), slices.Concat(moved, fresh); len(got)+len(want) > 0 && !reflect.DeepEqual(got, sorted(want)) {
		t.Errorf("%s: readings of %v moved, the notice names %v", at, want, got)
	}
	checkLabels(t, at, old, now)
	checkDrawings(t, at, c, sheets, drawn(t, j.Design))
}

func sorted(s []string) []string {
	sort.Strings(s)
	return s
}

// checkLabels fails if a label stands at another place in the order of parts, wires or
// test points while their number is the same: no edit of a value moves any.
func checkLabels(t *testing.T, at string, old, now []byte) {
	t.Helper()
	for key, label := range map[string]string{"parts": "designation", "conductors": "number", "test_points": "label", "fuses": "designation"} {
		a, b := labelsIn(t, old, key, label), labelsIn(t, now, key, label)
		if len(a) == len(b) && !reflect.DeepEqual(a, b) {
			t.Errorf("%s: labels of %s moved", at, key)
		}
	}
}

func labelsIn(t *testing.T, js []byte, key, label string) []string {
	t.Helper()
	var doc map[string]json.RawMessage
	var list []map[string]any
	if err := json.Unmarshal(js, &doc); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(doc[key], &list); err != nil {
		t.Fatal(err)
	}
	var out []string
	for _, e := range list {
		out = append(out, fmt.Sprint(e[label]))
	}
	return out
}

// group is one element of a drawing that stands for a thing.
type group struct{ label, content string }

var (
	groupStart = regexp.MustCompile(`<g id="([^"]*)" class="(?:wire|rail|cable|part|testpoint)"([^>]*)>`)
	labelled   = regexp.MustCompile(`data-(?:conductor|cable|part|testpoint)="([^"]*)"`)
	pointedAt  = regexp.MustCompile(`, [0-9.]+ [nµm]?A at most|, -?[0-9.]+ V with [^<]*|(<title>TP[0-9]+ [^;<]*);[^<]*`)
	fontName   = regexp.MustCompile(`font-family="[^"]*"`) // holds a checksum of the glyphs in use
)

// drawn draws the sheets of a design, without marks of change, and returns what stands
// for things by its id. Loads and readings that show only on pointing at a thing, with
// more digits than are printed anywhere, are left out.
func drawn(t *testing.T, d *design.Design) map[string]group {
	t.Helper()
	marks := d.Changes
	d.Changes = nil
	defer func() { d.Changes = marks }()
	list, err := schematic.Sheets(d)
	if err != nil {
		t.Fatal(err)
	}
	out := map[string]group{}
	for i, s := range list {
		svg, err := s.SVG()
		if err != nil {
			t.Fatal(err)
		}
		text := fontName.ReplaceAllString(pointedAt.ReplaceAllString(string(svg), "$1"), "")
		for _, m := range groupStart.FindAllStringSubmatchIndex(text, -1) {
			attributes := labelled.FindStringSubmatch(text[m[4]:m[5]])
			if attributes == nil { // the name of a rail, which no thing bears
				continue
			}
			out[fmt.Sprintf("%d %s", i+1, text[m[2]:m[3]])] = group{attributes[1], element(text[m[0]:])}
		}
	}
	return out
}

// element returns the group that text begins with.
func element(text string) string {
	depth := 0
	for i := 0; i < len(text); i++ {
		switch {
		case strings.HasPrefix(text[i:], "<g ") || strings.HasPrefix(text[i:], "<g>"):
			depth++
		case strings.HasPrefix(text[i:], "</g>"):
			if depth--; depth == 0 {
				return text[:i+len("</g>")]
			}
		}
	}
	return text
}

func checkDrawings(t *testing.T, at string, c *design.Changes, was, is map[string]group) {
	t.Helper()
	named := map[string]bool{}
	for l := range c.Touched {
		named[l] = true
	}
	for l := range c.Rows {
		named[l] = true
	}
	for _, r := range c.Readings {
		named[r.Point] = true
	}
	for id, n := range is {
		if o, ok := was[id]; (!ok || o.content != n.content) && !named[n.label] {
			t.Errorf("%s: the drawing differs at %s (%s), which the notice does not name", at, n.label, id)
		}
	}
	for id, o := range was {
		if _, ok := is[id]; !ok && !named[o.label] {
			t.Errorf("%s: %s (%s) is not drawn any more, which the notice does not say", at, o.label, id)
		}
	}
}
