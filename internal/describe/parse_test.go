package describe

import (
	"errors"
	"io/fs"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"gloamwright/internal/quantity"
)

func TestSample(t *testing.T) {
	src := sample(t)
	s, list := Parse("site.yaml", []byte(src), testSchema())
	if len(list) > 0 {
		t.Fatalf("the sample has mistakes:\n%s", list.Render(s.Sources))
	}
	if got := s.Job.Number.Val + "|" + s.Job.Title.Val + "|" + s.Job.Revision.Val + "|" + s.Job.Date.Val; got != "BR-2041|Standby lighting|A|2026-12-01" {
		t.Errorf("job: %s", got)
	}
	if s.Duty.Nominal.Val != 24 || s.Duty.Outage.Val != 4*3600 || s.Duty.CableAmbient.Val != 35 || s.Duty.BatteryRoom.Val.Low != 5 {
		t.Errorf("duty: %+v", s.Duty)
	}
	var names []string
	for _, st := range s.Stages {
		names = append(names, st.Name.Val+"="+st.Kind.Val)
	}
	want := "charger=charger presence=regulated-supply store=battery guard=low-voltage-disconnect " +
		"transfer=changeover-relay dusk=photocell board=distribution-board annex=distribution-board"
	if got := strings.Join(names, " "); got != want {
		t.Errorf("stages in file order:\n%s\nwant\n%s", got, want)
	}
	field := func(stage int, name string) any { return s.Stages[stage].Fields.vals[name].Val }
	for _, c := range []struct {
		why       string
		got, want any
	}{
		{"mains with tolerance", field(0, "mains"), quantity.Toleranced[quantity.Volt]{Nominal: 230, Plus: 0.1}},
		{"the port that the field means", field(0, "to"), Ref{"store", "charge"}},
		{"a default", field(0, "own"), quantity.Ampere(0.005)},
		{"a rating", field(1, "rated"), quantity.Rating{Volt: 24, Ampere: 0.5}},
		{"the only port of the stage", field(3, "from"), Ref{"store", "plus"}},
		{"a port that is named", field(6, "from"), Ref{"transfer", "break"}},
		{"a board fed by a board", field(7, "from"), Ref{"board", "ways"}},
		{"a choice", field(5, "built"), "comparator"},
		{"a length", field(7, "along"), quantity.Metre(28)},
		{"a count", field(7, "ways"), 4},
		{"a range", s.Luminaires[0].Fields.vals["works"].Val, quantity.Range[quantity.Volt]{Low: 18, High: 32}},
	} {
		if diff := cmp.Diff(c.want, c.got); diff != "" {
			t.Errorf("%s (-want +got):\n%s", c.why, diff)
		}
	}
	if got, ok := Get[quantity.Metre](s.Stages[6].Fields, "along"); ok {
		t.Errorf("a field that was not given and has no default: %v", got)
	}
	if own, _ := Get[quantity.Ampere](s.Stages[0].Fields, "own"); own.Given || own.Pos.Line != 0 {
		t.Errorf("a default has no place: %+v", own)
	}
}

func TestPoints(t *testing.T) {
	src := sample(t)
	s, _ := Parse("site.yaml", []byte(src), testSchema())
	corridor := s.Circuits[0].Points
	if len(corridor) != 3 || corridor[1].Length.Val != 4 || corridor[1].Luminaire.Val != "corridor" || corridor[1].Place.Val != "bunk 2" {
		t.Errorf("points of the corridor: %+v", corridor)
	}
	for _, c := range []struct{ got, want string }{
		{marked(t, src, corridor[0].Length.Pos), "9 m"},
		{marked(t, src, corridor[0].Luminaire.Pos), "corridor"},
		{marked(t, src, corridor[0].Place.Pos), "west door"},
		{marked(t, src, corridor[0].Pos), "9 m corridor at west door"},
	} {
		if c.got != c.want {
			t.Errorf("marked %q, want %q", c.got, c.want)
		}
	}
	boat := s.Circuits[1].Points
	if len(boat) != 2 || len(boat[0].Branches) != 1 || boat[0].Branches[0][0].Luminaire.Val != "porch" || len(boat[1].Branches) != 0 {
		t.Errorf("the branch hangs on the point before it: %+v", boat)
	}
	stair := s.Circuits[2]
	if stair.Fuse.Val != 2 || !stair.Fuse.Given || stair.Cable.Val.Area != 1.5 || s.Circuits[0].Fuse.Given {
		t.Errorf("pinned values: %+v", stair)
	}
	if s.Circuits[0].Lit.Val != "outage-night" {
		t.Errorf("lit: %v", s.Circuits[0].Lit)
	}
}

// TestPointForms writes one circuit in ways that mean the same.
func TestPointForms(t *testing.T) {
	right := sample(t)
	old := "points: [11 m corridor, 3 m corridor]"
	for _, c := range []struct{ why, points string }{
		{"texts", "points: [11 m corridor at top, {branch: [2 m porch]}, 3 m corridor]"},
		{"no space before the unit", "points: [11m corridor at top, {branch: [2m porch]}, 3m corridor]"},
		{"mappings", "points: [{leg: 11 m, luminaire: corridor, place: top}, {branch: [{leg: 2 m, luminaire: porch}]}, {leg: 3 m, luminaire: corridor}]"},
		{"quotation marks", `points: ["11 m corridor at top", {"branch": ['2 m porch']}, '3 m corridor']`},
		{"escapes", `points: ["11 m c\u006frridor at top", {branch: [2 m porch]}, 3 m corridor]`},
		{"more spaces", "points: [11  m   corridor   at   top, {branch: [2 m porch]}, 3 m  corridor]"},
		{"centimetres", "points: [1100 cm corridor at top, {branch: [2000 mm porch]}, 300 cm corridor]"},
	} {
		s, list := Parse("site.yaml", []byte(strings.Replace(right, old, c.points, 1)), testSchema())
		if len(list) > 0 {
			t.Errorf("%s:\n%s", c.why, list.Render(s.Sources))
			continue
		}
		p := s.Circuits[2].Points
		if len(p) != 2 || p[0].Length.Val != 11 || p[0].Luminaire.Val != "corridor" || p[0].Place.Val != "top" ||
			len(p[0].Branches) != 1 || p[0].Branches[0][0].Length.Val != 2 || p[1].Length.Val != 3 || p[1].Place.Given {
			t.Errorf("%s: %+v", c.why, p)
		}
	}
}

// least is the shortest description that is complete.
const least = `gloamwright: 1
job: {number: "7", title: Shed}
duty: {nominal: 12 V, outage: 90 min}
stages:
  store: {kind: battery, cells: flooded}
  board: {kind: distribution-board, from: store}
luminaires:
  lamp: {kind: led-driver, power: 3 W, works: 10 V..15 V}
circuits:
  - {name: Shed, board: board, points: [12 ft lamp]}
`

func TestDefaults(t *testing.T) {
	s, list := Parse("shed.yaml", []byte(least), testSchema())
	if len(list) > 0 {
		t.Fatalf("diagnostics:\n%s", list.Render(s.Sources))
	}
	p := s.Practice
	p.Prices, p.Sizes, p.Fuses, p.Blocks = nil, At[[]quantity.WireSize]{}, At[[]quantity.Ampere]{}, At[[]quantity.AmpereHour]{}
	want := Practice{
		Conductors: At[string]{Val: "metric"}, Paper: At[string]{Val: "iso"},
		LampDrop: At[quantity.Ratio]{Val: 0.05}, ClearWithin: At[quantity.Second]{Val: 5},
		LoadFactor: At[quantity.Ratio]{Val: 0.75}, Grouping: At[int]{Val: 1},
		Margin: At[quantity.Ratio]{Val: 0.10}, Ageing: At[quantity.Ratio]{Val: 0.80},
		Positive: At[string]{Val: "RD"}, Negative: At[string]{Val: "BK"},
	}
	if diff := cmp.Diff(want, p); diff != "" {
		t.Errorf("practice (-want +got):\n%s", diff)
	}
	if s.Job.Revision.Val != "A" || s.Job.Revision.Given || s.Duty.Recharge.Val != 24*3600 || s.Duty.CableAmbient.Val != 30 ||
		s.Duty.BatteryRoom.Val != (quantity.Range[quantity.Celsius]{Low: 5, High: 30}) || s.Circuits[0].Lit.Val != "outage-night" {
		t.Errorf("defaults of job, duty, circuit: %+v %+v %+v", s.Job, s.Duty, s.Circuits[0])
	}
	if got := s.Circuits[0].Points[0].Length.Val; got != 3.6576 {
		t.Errorf("12 ft = %v m", float64(got))
	}
}

func TestPracticeLists(t *testing.T) {
	src := strings.Replace(least, "duty:", `practice:
  conductors: awg
  paper: ansi
  taper: yes
  grouping: 3
  sizes: [16 AWG, 14 AWG, 4/0 AWG]
  fuses: [1 A, 2 A, 500 mA]
  blocks: [7 Ah, 12 Ah]
  prices: {16 AWG: 0.40, "wire AWG 14": 0.2, "fuse  cartridge-t 500 mA": 0}
  currency: EUR
  texts: firm/texts
duty:`, 1)
	s, list := Parse("shed.yaml", []byte(src), testSchema())
	if len(list) > 0 {
		t.Fatalf("diagnostics:\n%s", list.Render(s.Sources))
	}
	p := s.Practice
	if p.LengthUnit() != quantity.InFeet {
		t.Error("lengths of a job in gauges are printed in metres")
	}
	if len(p.Sizes.Val) != 3 || p.Sizes.Val[2].Gauge != "4/0" || p.Fuses.Val[2] != 0.5 || p.Blocks.Val[1] != 12 ||
		p.Prices[0].Of.Val != "16 AWG" || p.Prices[0].Cost.Val != 0.40 || p.Prices[1].Of.Val != "wire 14 AWG" || p.Prices[2].Of.Val != "fuse cartridge-t 500 mA" || p.Currency.Val != "EUR" || !p.Taper.Val || p.Grouping.Val != 3 || p.Texts.Val != "firm/texts" {
		t.Errorf("practice: %+v", p)
	}
}

func TestLengths(t *testing.T) {
	for _, c := range []struct {
		practice string
		want     quantity.LengthUnit
	}{
		{"{conductors: metric}", quantity.InMetres},
		{"{conductors: awg}", quantity.InFeet},
		{"{conductors: awg, lengths: m}", quantity.InMetres},
		{"{lengths: ft}", quantity.InFeet},
	} {
		s, list := Parse("shed.yaml", []byte(strings.Replace(least, "duty:", "practice: "+c.practice+"\nduty:", 1)), testSchema())
		if len(list) > 0 {
			t.Fatalf("diagnostics:\n%s", list.Render(s.Sources))
		}
		if got := s.Practice.LengthUnit(); got != c.want {
			t.Errorf("%s: lengths in %s", c.practice, got.Symbol())
		}
	}
}

func TestSharedPractice(t *testing.T) {
	src := strings.Replace(least, "duty:", "practice: firm/house.yaml\nduty:", 1)
	read := func(text string, err error) Options {
		return Options{ReadFile: func(name string) ([]byte, error) {
			if name != "firm/house.yaml" {
				t.Errorf("asked for %q", name)
			}
			return []byte(text), err
		}}
	}
	s, list := read("# the firm\nlamp_drop: 3 %\ncolours: {positive: BN, negative: BU}\n", nil).Parse("jobs/shed.yaml", []byte(src), testSchema())
	if len(list) > 0 {
		t.Fatalf("diagnostics:\n%s", list.Render(s.Sources))
	}
	if s.Practice.LampDrop.Val != 0.03 || s.Practice.Positive.Val != "BN" || s.Practice.LampDrop.Pos.File != "jobs/firm/house.yaml" || s.Practice.LampDrop.Pos.Line != 2 {
		t.Errorf("practice: %+v", s.Practice)
	}

	s, list = read("lamp_drop: 3\nlamp_drip: 3 %\n", nil).Parse("jobs/shed.yaml", []byte(src), testSchema())
	want := `jobs/firm/house.yaml:1:12: error: missing unit [D020]
  1 | lamp_drop: 3
    |            ^
  "3" needs a unit: write "3 %".

jobs/firm/house.yaml:2:1: error: unknown key [D011]
  2 | lamp_drip: 3 %
    | ^^^^^^^^^
  A shared practice file has no key "lamp_drip". Did you mean lamp_drop?
`
	if diff := cmp.Diff(want, list.Render(s.Sources)); diff != "" {
		t.Errorf("mistakes in the shared file (-want +got):\n%s", diff)
	}

	for _, c := range []struct {
		why  string
		opts Options
		want string
	}{
		{"no reader", Options{}, "No shared file can be read here. Write the limits into the description."},
		{"no such file", read("", &fs.PathError{Op: "open", Path: "/secret/firm/house.yaml", Err: fs.ErrNotExist}), "The shared file firm/house.yaml cannot be read: file does not exist."},
		{"another error", read("", errors.New("disk on fire")), "The shared file firm/house.yaml cannot be read: disk on fire."},
	} {
		_, list := c.opts.Parse("shed.yaml", []byte(src), testSchema())
		if len(list) != 1 || list[0].Detail != c.want || list[0].Code != codeShared {
			t.Errorf("%s: %+v, want %q", c.why, list, c.want)
		}
	}
}

func TestFolderReader(t *testing.T) {
	dir := t.TempDir()
	write(t, dir+"/outside.yaml", "secret")
	write(t, dir+"/site/house.yaml", "lamp_drop: 3 %")
	link(t, dir+"/outside.yaml", dir+"/site/link.yaml")
	read := FolderReader(dir + "/site")
	if got, err := read("house.yaml"); err != nil || string(got) != "lamp_drop: 3 %" {
		t.Errorf("a file inside: %q, %v", got, err)
	}
	for _, name := range []string{"../outside.yaml", "link.yaml", ".", "none.yaml"} {
		if got, err := read(name); err == nil {
			t.Errorf("%s was read: %q", name, got)
		}
	}
}
