package describe

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/google/go-cmp/cmp"
)

func write(t *testing.T, name, text string) {
	t.Helper()
	if err := os.MkdirAll(filepath.Dir(name), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(name, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

func link(t *testing.T, to, name string) {
	t.Helper()
	if err := os.Symlink(to, name); err != nil {
		t.Skip(err)
	}
}

// TestFiles has mistakes that are not in one value: the whole printed text is wanted.
func TestFiles(t *testing.T) {
	for _, c := range []struct{ why, src, want string }{
		{"an empty file", "", `x.yaml:1:1: error: empty file [D005]
  1 | 
    | ^
  Nothing is written here. Start from a starter: gloamwright new NAME.
`},
		{"only remarks", "# later\n", `x.yaml:1:1: error: empty file [D005]
  1 | # later
    | ^
  Only remarks are written here. Start from a starter: gloamwright new NAME.
`},
		{"a list at the top", "- a\n- b\n", `x.yaml:1:1: error: wrong form [D010]
  1 | - a
    | ^
  A description is a mapping (key: value), not a list.
`},
		{"a second document", least + "---\njob: again\n", `x.yaml:11:1: error: second document [D004]
  11 | ---
     | ^^^
  A file holds one description. Remove what follows the line "---", or move it to a file of its own.
`},
		{"a tab for an indent", "job:\n\tnumber: 7\n", `x.yaml:2:2: error: not valid YAML [D003]
  2 | 	number: 7
    | 	^^^^^^^^^
  The text cannot be read in this line or the next: indent with spaces, not with tabs, and put a text that starts with @, %, or a backquote in quotes (found character that cannot start any token).
`},
		{"an open bracket", "job:\n  number: [7\nduty: {}\n", `x.yaml:2:11: error: not valid YAML [D003]
  2 |   number: [7
    |           ^
  The text cannot be read after this bracket: a list in brackets needs a comma between entries and a closing ] (did not find expected ',' or ']').
`},
		{"a colon too many", "job: a: b\n", `x.yaml:1:1: error: not valid YAML [D003]
  1 | job: a: b
    | ^
  The text cannot be read: a colon stands where none belongs; put a text that contains ": " in quotes (mapping values are not allowed in this context).
`},
		{"an anchor that is not there", "job: *site\n", `x.yaml:1:1: error: not valid YAML [D003]
  1 | job: *site
    | ^
  The text cannot be read: a name after * must be given with & before (unknown anchor 'site' referenced).
`},
		{"not UTF-8", "job:\n  title: Caf\xe9\n", `x.yaml:2:13: error: bad character [D002]
  2 |   title: Caf?
    |             ^
  A description is plain UTF-8 text: the byte E9 is not UTF-8. Remove it, or save the file as UTF-8.
`},
		{"text that turns the writing direction", "job:\n  title: a\u202eb\n", `x.yaml:2:11: error: bad character [D002]
  2 |   title: a b
    |           ^
  A description is plain UTF-8 text: the character U+202E cannot stand here. Remove it, or save the file as UTF-8.
`},
		{"a value missing everywhere", "gloamwright: 1\njob: {number: 7, title: Shed}\n", `x.yaml:1:1: error: missing key [D013]
  1 | gloamwright: 1
    | ^
  A description needs the key circuits. Such as circuits: [{name: Stair, board: board, lit: outage-night, points: [9 m lamp]}]

x.yaml:1:1: error: missing key [D013]
  1 | gloamwright: 1
    | ^
  A description needs the key duty. Such as duty: {nominal: 24 V, outage: 3 h}

x.yaml:1:1: error: missing key [D013]
  1 | gloamwright: 1
    | ^
  A description needs the key luminaires. Such as luminaires: {lamp: {kind: led-driver, power: 6 W, works: 18 V..32 V}}

x.yaml:1:1: error: missing key [D013]
  1 | gloamwright: 1
    | ^
  A description needs the key stages. Start from a ready one: gloamwright new.
`},
		{"a board that nothing hangs on", strings.Replace(least, "luminaires:\n", "  annex: {kind: distribution-board, from: board}\n  spare: {kind: distribution-board, from: annex}\nluminaires:\n", 1), `x.yaml:8:3: warning: board that nothing hangs on [D048]
  8 |   spare: {kind: distribution-board, from: annex}
    |   ^^^^^
  No circuit and no board hangs on spare.
`},
		{"no circuits", strings.Replace(least, "circuits:\n  - {name: Shed, board: board, points: [12 ft lamp]}\n", "circuits: []\n", 1), `x.yaml:9:1: error: no circuits [D040]
  9 | circuits: []
    | ^^^^^^^^
  Nothing is to be lit. Add at least one circuit, such as {name: Stair, board: board, lit: outage-night, points: [9 m lamp]}.
`},
		{"a luminaire that no point uses", strings.Replace(least, "luminaires:\n", "luminaires:\n  spare: {kind: led-driver, power: 3 W, works: 10 V..15 V}\n", 1), `x.yaml:8:3: warning: unused luminaire [D047]
  8 |   spare: {kind: led-driver, power: 3 W, works: 10 V..15 V}
    |   ^^^^^
  No point uses the luminaire spare.
`},
		{"a tab and wide characters before the mark", strings.Replace(least, "title: Shed", "site:\t小屋, title: Shed, sitte: x", 1), `x.yaml:2:43: error: unknown key [D011]
  2 | job: {number: "7", site:	小屋, title: Shed, sitte: x}
    |                         	                   ^^^^^
  job has no key "sitte". Did you mean site?
`},
	} {
		t.Run(c.why, func(t *testing.T) {
			s, list := Parse("x.yaml", []byte(c.src), testSchema())
			if diff := cmp.Diff(c.want, list.Render(s.Sources)); diff != "" {
				t.Errorf("(-want +got):\n%s", diff)
			}
		})
	}
}

// TestOnePass puts many mistakes in one file: all are reported, in the order of the
// file, and the same each time.
func TestOnePass(t *testing.T) {
	src := sample(t)
	for _, change := range [][2]string{
		{"outage: 4 h", "outage: 4"}, {"lamp_drop: 5 %", "lamp_drip: 5 %"}, {"from: guard, holds", "from: gaurd, holds"},
		{"power: 6 W", "power: 6 A"}, {"name: Stair,", "name: Boathouse,"}, {"[6 m corridor,", "[6 corridor,"},
		{"number: BR-2041", "number: a/b"}, {"ways: 4", "ways: four"},
	} {
		src = strings.Replace(src, change[0], change[1], 1)
	}
	s, list := Parse("site.yaml", []byte(src), testSchema())
	var got []string
	for _, d := range list {
		got = append(got, fmt.Sprintf("%s %s", marked(t, src, d.At), d.Code))
	}
	want := []string{"a/b D028", "lamp_drip D011", "4 D020", "gaurd D030", "four D027", "6 A D021", "6 corridor D020", "Boathouse D031"}
	// The branch of the point that could not be read hangs on nothing.
	want = append(want[:7], append([]string{"branch D045"}, want[7:]...)...)
	if diff := cmp.Diff(want, got); diff != "" {
		t.Errorf("(-want +got):\n%s", diff)
	}
	first := list.Render(s.Sources)
	for range 20 {
		s, list := Parse("site.yaml", []byte(src), testSchema())
		if list.Render(s.Sources) != first {
			t.Fatal("the same file gives different text")
		}
	}
}

// TestAliases repeats values with anchors, which is allowed; a mistake behind an
// anchor is reported once.
func TestAliases(t *testing.T) {
	src := strings.Replace(least, "lamp: {kind: led-driver, power: 3 W, works: 10 V..15 V}",
		"lamp: &lamp {kind: led-driver, power: &p 3 W, works: 10 V..15 V}\n  other: *lamp\n  third: {kind: led-driver, power: *p, works: 10 V..15 V}", 1)
	src = strings.Replace(src, "[12 ft lamp]", "[12 ft lamp, 3 ft other, 3 ft third]", 1)
	s, list := Parse("x.yaml", []byte(src), testSchema())
	if len(list) > 0 {
		t.Errorf("diagnostics:\n%s", list.Render(s.Sources))
	}
	if got := fmt.Sprint(s.Luminaires[1].Fields.vals["power"].Val, s.Luminaires[2].Fields.vals["power"].Val); got != "3 W 3 W" {
		t.Errorf("powers %s", got)
	}
	src = strings.Replace(src, "&p 3 W", "&p 3 A", 1)
	s, list = Parse("x.yaml", []byte(src), testSchema())
	want := `x.yaml:8:41: error: wrong unit [D021]
  8 |   lamp: &lamp {kind: led-driver, power: &p 3 A, works: 10 V..15 V}
    |                                            ^^^
  "3 A" is a current; a power belongs here, such as 6 W.
`
	want = strings.Replace(want, "8:41", "8:44", 1)
	if diff := cmp.Diff(want, list.Render(s.Sources)); diff != "" {
		t.Errorf("(-want +got):\n%s", diff)
	}
}

// TestHostile has files made to exhaust the machine. Each is refused with a message,
// within a time that only a blow-up would exceed.
func TestHostile(t *testing.T) {
	bomb := "a0: &a0 [x, x, x, x, x, x, x, x, x, x]\n"
	for i := 1; i < 10; i++ {
		bomb += fmt.Sprintf("a%d: &a%d [%s]\n", i, i, strings.TrimSuffix(strings.Repeat(fmt.Sprintf("*a%d, ", i-1), 10), ", "))
	}
	points := "12 ft lamp"
	many := strings.Repeat(points+", ", maxLegs) + points
	for _, c := range []struct{ why, src, code string }{
		{"too large", strings.Repeat("# x\n", MaxSize/4+1), codeSize},
		{"aliases of aliases", bomb, codeComplex},
		{"many aliases", "a: &a x\nb: [" + strings.Repeat("*a, ", maxAliases+1) + "x]\n", codeComplex},
		{"an alias of itself", "job: &j [*j]\n", codeComplex},
		{"a mapping in itself", "job: &j {number: *j}\n", codeComplex},
		{"deep brackets", "job: " + strings.Repeat("[", 5000) + strings.Repeat("]", 5000), codeComplex},
		{"brackets without end", strings.Repeat("[", MaxSize), codeSyntax},
		{"deep blocks", deepBlocks(400), codeComplex},
		{"deep lists in one line", strings.Repeat("- ", 9000) + "x", codeComplex},
		{"many values", "job: [" + strings.Repeat("x,", maxNodes) + "x]", codeComplex},
		{"many luminaires", strings.Replace(least, points, many, 1), codeTooMany},
		{"many stages", strings.Replace(least, "stages:\n", "stages:\n"+numbered(maxStages, "  s%d: {kind: battery, cells: flooded}\n"), 1), codeTooMany},
		{"many mistakes", "gloamwright: 1\njob:\n" + numbered(50_000, "  k%d: 1\n"), codeTooMany},
		{"many misspelt names", manyMisspelt(), codeTooMany},
		{"a long key", strings.Repeat("k", 500_000) + ": 1\n", codeSyntax},
		{"a long value", strings.Replace(least, "90 min", strings.Repeat("9", 900_000)+" min", 1), codeQuantity},
		{"a long name", strings.Replace(least, `"7"`, strings.Repeat("7", 900_000), 1), codeName},
		{"questions", strings.Repeat("? ", 9000), codeComplex},
		{"quotes", "job: " + strings.Repeat(`"a": `, 100_000), codeSyntax},
		{"anchors", numbered(50_000, "&a%d "), codeSyntax},
	} {
		t.Run(c.why, func(t *testing.T) {
			start := time.Now()
			_, list := Parse("x.yaml", []byte(c.src), testSchema())
			if took := time.Since(start); took > 8*time.Second {
				t.Errorf("took %v", took)
			}
			for _, d := range list {
				if d.Code == c.code {
					return
				}
			}
			t.Errorf("no diagnostic %s; %d others, first: %+v", c.code, len(list), append(list, Diagnostic{})[0])
		})
	}
}

func deepBlocks(n int) string {
	var b strings.Builder
	for i := range n {
		b.WriteString(strings.Repeat(" ", i) + "k:\n")
	}
	return b.String()
}

func numbered(n int, format string) string {
	var b strings.Builder
	for i := range n + 1 {
		fmt.Fprintf(&b, format, i)
	}
	return b.String()
}

// manyMisspelt has as many luminaire types as there may be and a thousand points that
// name others, each near all of them.
func manyMisspelt() string {
	stem := strings.Repeat("x", 50)
	src := strings.Replace(least, "luminaires:\n", "luminaires:\n"+numbered(maxTypes-2, "  "+stem+"%d: {kind: led-driver, power: 3 W, works: 10 V..15 V}\n"), 1)
	return strings.Replace(src, "[12 ft lamp]", "["+numbered(1000, "1 m "+stem[1:]+"%dy, ")+"12 ft lamp]", 1)
}
