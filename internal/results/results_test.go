package results

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"math"
	"os"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/santhosh-tekuri/jsonschema/v6"

	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
)

// schema returns the published schema, compiled.
func schema(t *testing.T) *jsonschema.Schema {
	t.Helper()
	const name = "results.schema.json"
	f, err := os.Open("../../docs/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	doc, err := jsonschema.UnmarshalJSON(f)
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	c.DefaultDraft(jsonschema.Draft2020)
	if err := c.AddResource(name, doc); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile(name)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func mustJSON(t *testing.T, d *design.Design) []byte {
	t.Helper()
	b, err := JSON(d)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

func TestJSONFollowsItsSchema(t *testing.T) {
	s := schema(t)
	bare := handmade()
	bare.Facts = &facts.Facts{Site: bare.Site, Circuit: bare.Circuit}
	for name, d := range map[string]*design.Design{"full": handmade(), "nearly empty": bare} {
		v, err := jsonschema.UnmarshalJSON(bytes.NewReader(mustJSON(t, d)))
		if err != nil {
			t.Fatal(err)
		}
		if err := s.Validate(v); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// TestSchemaRefusesOtherShapes makes sure that the schema test above can fail.
func TestSchemaRefusesOtherShapes(t *testing.T) {
	s := schema(t)
	good := string(mustJSON(t, handmade()))
	for _, change := range [][2]string{
		{`"gloamwright": 1`, `"gloamwright": 2`},
		{`"status": "construction"`, `"status": "fine"`},
		{`"severity": "caution"`, `"severity": "warning"`},
		{`"settled": true`, `"settled": "yes"`},
		{`"area_mm2"`, `"area_mm"`},
		{`"capacity_ah": 33`, `"capacity_ah": "33 Ah"`},
	} {
		bad := strings.Replace(good, change[0], change[1], 1)
		if bad == good {
			t.Errorf("%s does not stand in the output", change[0])
			continue
		}
		v, err := jsonschema.UnmarshalJSON(strings.NewReader(bad))
		if err != nil {
			t.Fatal(err)
		}
		if s.Validate(v) == nil {
			t.Errorf("the schema takes %s in place of %s", change[1], change[0])
		}
	}
}

func TestSameDesignSameBytes(t *testing.T) {
	first := mustJSON(t, handmade())
	for range 20 {
		if !bytes.Equal(first, mustJSON(t, handmade())) {
			t.Fatal("JSON differs from run to run")
		}
	}
}

// read is what a stranger needs of results.json to check the solution.
type read struct {
	Status  string
	Network []struct {
		Element, Model string
		Pins           map[string]string
		Values         map[string]float64
	}
	Conditions []struct {
		Name     string
		Volts    map[string]float64
		BatteryA float64 `json:"battery_a"`
	}
	Findings []struct{ At string }
}

// TestKirchhoffFromTheFile solves nothing: it takes voltages and resistances from the
// file as written, computes every current by Ohm's law, and adds them up at each net.
func TestKirchhoffFromTheFile(t *testing.T) {
	var r read
	if err := json.Unmarshal(mustJSON(t, handmade()), &r); err != nil {
		t.Fatal(err)
	}
	for _, c := range r.Conditions {
		sum := map[string]float64{}
		for _, e := range r.Network {
			a, b := e.Pins["1"], e.Pins["2"]
			i := (c.Volts[a] - c.Volts[b] - e.Values["volt"]) / e.Values["ohm"]
			sum[a] += i
			sum[b] -= i
			if e.Element == "-G1" && math.Abs(i-c.BatteryA) > 1e-8 {
				t.Errorf("battery takes %g A by its voltage, %g A by the file", i, c.BatteryA)
			}
		}
		if len(sum) != 4 {
			t.Errorf("%s: %d nets, want 4", c.Name, len(sum))
		}
		for net, i := range sum {
			if math.Abs(i) > 1e-9 {
				t.Errorf("%s: %g A left over at %s", c.Name, i, net)
			}
		}
	}
}

func TestStatusFollowsStopFindings(t *testing.T) {
	for s, want := range map[finding.Severity]string{finding.Stop: "not-for-construction", finding.Caution: "construction", finding.Note: "construction"} {
		d := handmade()
		d.Findings[0].Severity = s
		var r read
		if err := json.Unmarshal(mustJSON(t, d), &r); err != nil {
			t.Fatal(err)
		}
		if r.Status != want {
			t.Errorf("%v: status %q, want %q", s, r.Status, want)
		}
		if r.Findings[0].At != "site.yaml:12:5" {
			t.Errorf("at is %q", r.Findings[0].At)
		}
	}
}

// TestFigures looks at single values in the file by their path.
func TestFigures(t *testing.T) {
	var doc map[string]any
	if err := json.Unmarshal(mustJSON(t, handmade()), &doc); err != nil {
		t.Fatal(err)
	}
	for _, tc := range []struct {
		path string
		want any
		why  string
	}{
		{"job.client", "Reed & Heron <Trust>", "signs stand as themselves"},
		{"battery.required_ah", 29.1235, "six digits"},
		{"battery.cells", "vrla-agm", "the class as the description names it"},
		{"charger", nil, "there is none"},
		{"fuses.0.way", nil, "a system fuse"},
		{"fuses.1.way", 1.0, ""},
		{"fuses.1.discriminates_to_a", 120.0, ""},
		{"fuses.0.discriminates_to_a", nil, "no fuse before it"},
		{"fuses.1.slowest.0.current_a", 6.0, "2 × 3 A"},
		{"fuses.1.slowest.1.time_s", nil, "never"},
		{"fuses.0.opens_within_s", nil, "not sure to open"},
		{"network.1.part", "11+", "a conductor's number"},
		{"network.0.part", "-G1", "a part's designation"},
		{"network.1.tolerance.ohm", 0.1, ""},
		{"conditions.0.state.-K1", "released", ""},
		{"test_points.0.readings.outage-night.high_v", 24.8, ""},
		{"test_points.0.net", "-G1:+", ""},
		{"luminaires.0.amps.outage-night", 1.96, "24.5 ÷ 12.5"},
		{"function.0.wanted.outage-night", nil, "the condition asks nothing"},
		{"function.0.found.outage-night", true, ""},
		{"thresholds.0.high", nil, "not finite"},
		{"endurance.lit_h.Porch", 1.5, "5400 s"},
		{"endurance.curve.0.t_h", 0.5, "the coldest run"},
		{"endurance.week.0.t_h", 168.0, ""},
		{"endurance.days.0.lowest", 0.4, ""},
		{"endurance.cut_off_h", nil, "does not open"},
		{"faults.0.dark.0.condition", "outage-night", ""},
		{"faults.0.best", nil, "none named"},
		{"faults.0.within_s", nil, "no fuse opens"},
		{"parts.0.values.capacity.number", 33.0, ""},
		{"workings.0.value", 0.9408, ""},
	} {
		if got := at(doc, tc.path); !cmp.Equal(got, tc.want) {
			t.Errorf("%s is %v, want %v (%s)", tc.path, got, tc.want, tc.why)
		}
	}
}

func at(v any, path string) any {
	for _, step := range strings.Split(path, ".") {
		switch x := v.(type) {
		case map[string]any:
			var ok bool
			if v, ok = x[step]; !ok {
				return "no key " + step
			}
		case []any:
			i := int(step[0] - '0')
			if i >= len(x) {
				return "no entry " + step
			}
			v = x[i]
		default:
			return "nothing below " + step
		}
	}
	return v
}

func TestNamesThatMeanTwoThingsAreRefused(t *testing.T) {
	d := handmade()
	d.Netlist.Nets[3] = d.Netlist.Nets[1]
	if _, err := JSON(d); err == nil || !strings.Contains(err.Error(), `"-G1:+"`) {
		t.Errorf("two nets of one name: error %v", err)
	}
	d = handmade()
	d.Conditions = append(d.Conditions, d.Conditions[0])
	if _, err := JSON(d); err == nil || !strings.Contains(err.Error(), `"outage-night"`) {
		t.Errorf("two conditions of one name: error %v", err)
	}
}

func TestRounding(t *testing.T) {
	for _, tc := range []struct {
		v      float64
		digits int
		want   float64
	}{
		{1.0 / 3, 6, 0.333333}, {-2.0 / 3, 3, -0.667}, {1234567, 6, 1234570}, {1e-13, 6, 1e-13}, {24.123456789012, 9, 24.1234568},
	} {
		if got := to(tc.v, tc.digits); *got != tc.want {
			t.Errorf("to(%g, %d) = %g, want %g", tc.v, tc.digits, *got, tc.want)
		}
	}
	if z := to(math.Copysign(0, -1), 6); math.Signbit(*z) {
		t.Error("negative zero keeps its sign")
	}
	for _, v := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		if to(v, 6) != nil {
			t.Errorf("%g is not null", v)
		}
	}
}

// rows reads a table back as RFC 4180 has it.
func rows(t *testing.T, name string) [][]string {
	t.Helper()
	for _, tab := range Tables(handmade()) {
		if tab.Name != name {
			continue
		}
		var b bytes.Buffer
		if err := tab.Write(&b); err != nil {
			t.Fatal(err)
		}
		if n := bytes.Count(b.Bytes(), []byte("\r\n")); n != len(tab.Rows)+1 || bytes.Count(b.Bytes(), []byte("\n")) != n {
			t.Errorf("%s: %d line ends CRLF, want %d and no other", name, n, len(tab.Rows)+1)
		}
		out, err := csv.NewReader(&b).ReadAll()
		if err != nil {
			t.Fatal(err)
		}
		return out
	}
	t.Fatalf("no table %s", name)
	return nil
}

func TestTables(t *testing.T) {
	for _, tc := range []struct {
		name string
		row  int
		want []string
	}{
		{"wire-runs.csv", 1, []string{"1", "", "", "+A1 Main cabinet", "-G1:+", "+A1 Main cabinet", "-F101:2", "16 AWG", "1.308", "RD", "red", "0.3", "0", "1.96", "18", "", ""}},
		{"wire-runs.csv", 2, []string{"11+", "-W11", "Porch", "+A1 Main cabinet", "-F101:1", "", "-E11:+", "1.5 mm²", "1.5", "RD", "red", "18", "0.24", "1.96", "17.5", "-F101", "given"}},
		{"fuse-map.csv", 2, []string{"-F101", "Main board", "1", "3", "blade, medium", "violet", "Porch", "", "", "1.96", "1.5 mm²", "17.5", "300", "1000", "45", "0.1", "-F1", "120", ""}},
		{"fuse-map.csv", 3, []string{"-F102", "Main board", "2", "", "", "", "spare", "", "", "", "", "", "", "", "", "", "", "", ""}},
		{"test-points.csv", 1, []string{"TP1", "Battery terminals", "-G1:+", "-X1:2", "1", "Mains off, dark", "24.1", "24.4608", "24.8"}},
		{"parts.csv", 2, []string{"2", "1", "piece", "Blade fuse, <medium> & \"quoted\", with comma", "", "", "-F101", "+A1 Main cabinet", "", "", ""}},
		{"parts.csv", 3, []string{"3", "2", "piece", "Luminaire", "", "", "-E11 -E12", "", "", "", ""}},
		{"parts.csv", 5, []string{"5", "18", "m", "Cable", "2 × 1.5 mm², RD BK", "", "-W11", "+A1 Main cabinet", "", "", ""}},
		{"parts.csv", 6, []string{"6", "0.3", "m", "Wire", "16 AWG, RD", "", "1", "+A1 Main cabinet", "", "", ""}},
		{"labels.csv", 1, []string{"enclosure plate", "+A1", "Main cabinet", "1", "+A1 Main cabinet", ""}},
		{"labels.csv", 2, []string{"device plate", "-G1", "33 Ah", "1", "+A1 Main cabinet", ""}},
		{"labels.csv", 6, []string{"terminal tag", "2", "", "1", "+A1 Main cabinet", "-X1"}},
		{"labels.csv", 8, []string{"wire sleeve", "11+", "", "2", "+A1 Main cabinet", "-F101:1 and -E11:+"}},
		{"labels.csv", 10, []string{"cable flag", "-W11", "Porch, 1.5 mm²", "2", "+A1 Main cabinet", "-F101:1 and -E11:+"}},
		{"labels.csv", 11, []string{"test point dot", "TP1", "Battery terminals", "1", "+A1 Main cabinet", "-G1:+"}},
	} {
		got := rows(t, tc.name)
		if tc.row >= len(got) {
			t.Errorf("%s has %d rows, want row %d", tc.name, len(got), tc.row)
			continue
		}
		if d := cmp.Diff(tc.want, got[tc.row]); d != "" {
			t.Errorf("%s row %d (-want +got):\n%s", tc.name, tc.row, d)
		}
	}
}

func TestEveryTableHasHeadingsAndEvenRows(t *testing.T) {
	var names []string
	for _, tab := range Tables(handmade()) {
		names = append(names, tab.Name)
		seen := map[string]bool{}
		for _, h := range tab.Headings {
			if h == "" || seen[h] {
				t.Errorf("%s: heading %q is empty or stands twice", tab.Name, h)
			}
			seen[h] = true
		}
		for i, r := range tab.Rows {
			if len(r) != len(tab.Headings) {
				t.Errorf("%s row %d: %d fields, want %d", tab.Name, i, len(r), len(tab.Headings))
			}
		}
	}
	if want := []string{"wire-runs.csv", "fuse-map.csv", "test-points.csv", "parts.csv", "labels.csv"}; !slices.Equal(names, want) {
		t.Errorf("tables %v, want %v", names, want)
	}
}

// TestEveryDesignationIsInThePartsList holds the parts list against the circuit.
func TestEveryDesignationIsInThePartsList(t *testing.T) {
	var got, want []string
	for _, r := range rows(t, "parts.csv")[1:] {
		got = append(got, strings.Fields(r[6])...)
	}
	d := handmade()
	for _, p := range d.Circuit.Parts {
		want = append(want, p.Designation)
	}
	want = append(want, "-W11", "1")
	if d := cmp.Diff(want, got); d != "" {
		t.Errorf("designations (-want +got):\n%s", d)
	}
}
