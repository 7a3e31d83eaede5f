package describe

import (
	"strings"
	"testing"
)

func TestValidate(t *testing.T) {
	if err := testSchema().Validate(); err != nil {
		t.Fatal(err)
	}
	kind := func(f Field) *Schema {
		if f.Name == "" {
			f.Name = "x"
		}
		if f.Doc == "" {
			f.Doc = "A field."
		}
		return &Schema{Stages: []Kind{{Name: "k", Doc: "A kind.", Fields: []Field{f}}}}
	}
	for _, c := range []struct {
		why    string
		schema *Schema
		want   string
	}{
		{"a default that does not parse", kind(Field{Type: Voltage, Default: "24"}), `"24" needs a unit`},
		{"a default out of its own bounds", kind(Field{Type: Count, Default: "9", Max: "8"}), "out of range: at most 8"},
		{"a default that is no choice", kind(Field{Type: Choice, Default: "c", Choices: []string{"aa", "bb"}}), "not a choice"},
		{"a default above extra-low voltage", kind(Field{Type: Voltage, Default: "100 V"}), "extra-low voltage"},
		{"a bound that does not parse", kind(Field{Type: Power, Min: "1 V"}), "is a voltage"},
		{"bounds the wrong way round", kind(Field{Type: Power, Min: "2 W", Max: "1 W"}), "wrong way round"},
		{"bounds of a text", kind(Field{Type: Text, Min: "a"}), "has no bounds"},
		{"no type", kind(Field{}), "type 0 is none"},
		{"a type that is none", kind(Field{Type: Curve + 1}), "is none"},
		{"required with a default", kind(Field{Type: Count, Required: true, Default: "1"}), "required, and yet"},
		{"a choice without choices", kind(Field{Type: Choice}), "choices belong"},
		{"choices of a voltage", kind(Field{Type: Voltage, Choices: []string{"24 V"}}), "choices belong"},
		{"a port of a voltage", kind(Field{Type: Voltage, Port: "out"}), "a port belongs"},
		{"a current that a part stands", kind(Field{Type: Current, Stands: true}), "only a voltage"},
		{"a key that the decoder takes", kind(Field{Name: "kind", Type: Text}), "in use"},
		{"a field twice", &Schema{Parts: []Kind{{Name: "k", Doc: "K.", Fields: []Field{{Name: "a", Doc: "A.", Type: Text}, {Name: "a", Doc: "A.", Type: Text}}}}}, "comes twice"},
		{"a kind twice", &Schema{Luminaires: []Kind{{Name: "k", Doc: "K."}, {Name: "k", Doc: "K."}}}, "registered twice"},
		{"a kind without a doc", &Schema{Stages: []Kind{{Name: "k"}}}, "no doc"},
		{"a kind whose name is none", &Schema{Stages: []Kind{{Name: "a kind", Doc: "K."}}}, "has a space in it"},
		{"a port twice", &Schema{Stages: []Kind{{Name: "k", Doc: "K.", Ports: []Port{{Name: "a"}, {Name: "a"}}}}}, "comes twice"},
	} {
		if err := c.schema.Validate(); err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: %v, want %q in it", c.why, err, c.want)
		}
	}
	if err := kind(Field{Type: Voltage, Default: "100 V", Stands: true}).Validate(); err != nil {
		t.Errorf("a voltage that a part stands may be above extra-low voltage: %v", err)
	}
}

// TestTypes asks that the example of every type is read by it.
func TestTypes(t *testing.T) {
	for typ := Voltage; typ <= Curve; typ++ {
		info := types[typ]
		if info.name == "" || info.example == "" && typ != Choice || typ.String() != info.name || typ.Example() != info.example {
			t.Errorf("type %d: %+v", typ, info)
		}
		if info.parse == nil {
			continue
		}
		v, err := info.parse(info.example)
		if err != nil {
			t.Errorf("%s: example: %v", info.name, err)
		} else if (info.ends != nil) != (info.bound != 0) || info.ends != nil && len(info.ends(v)) == 0 {
			t.Errorf("%s: bounds and ends do not agree", info.name)
		}
	}
}

func TestNearest(t *testing.T) {
	kinds := []string{"charger", "battery", "changeover-relay", "photocell", "board", "isolator"}
	for _, c := range []struct{ word, want, why string }{
		{"chager", "charger", "a letter left out"},
		{"batttery", "battery", "a letter too many"},
		{"bettery", "battery", "a wrong letter"},
		{"bord", "board", "a short word with one slip"},
		{"boadr", "board", "two letters swapped count as one slip"},
		{"guard", "", "two slips in five letters are too many"},
		{"Photocell", "photocell", "capitals cost nothing"},
		{"changeover_relay", "changeover-relay", "the joint costs nothing"},
		{"changover rellay", "changeover-relay", "a long word may have more slips"},
		{"fuse", "", "nothing like it"},
		{"", "", "no word"},
		{"x", "", "one letter says too little"},
	} {
		if got := nearest(c.word, kinds); got != c.want {
			t.Errorf("%s: %q is taken for %q, want %q", c.why, c.word, got, c.want)
		}
	}
}

// TestDistance compares with hand-counted slips, both ways round.
func TestDistance(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{
		{"", "", 0}, {"abc", "abc", 0}, {"abc", "acb", 1}, {"abc", "ab", 1}, {"abc", "xabc", 1}, {"kitten", "sitting", 3}, {"ca", "abc", 3}, {"straße", "strasse", 2},
	} {
		for _, pair := range [][2]string{{c.a, c.b}, {c.b, c.a}} {
			if got := distance([]rune(pair[0]), []rune(pair[1]), 5); got != c.want {
				t.Errorf("distance(%q, %q) = %d, want %d", pair[0], pair[1], got, c.want)
			}
			if c.want > 1 {
				if got := distance([]rune(pair[0]), []rune(pair[1]), 1); got != 2 {
					t.Errorf("distance(%q, %q) above the limit = %d, want 2", pair[0], pair[1], got)
				}
			}
		}
	}
}

// TestCodes asks that every code is listed once, in order, with its meaning, and that
// the tests of this room meet only listed ones.
func TestCodes(t *testing.T) {
	known := map[string]bool{}
	last := ""
	for _, c := range Codes {
		if c.ID <= last || c.Meaning == "" {
			t.Errorf("%s after %s: %q", c.ID, last, c.Meaning)
		}
		last = c.ID
		known[c.ID] = true
	}
	for _, m := range mistakes {
		if code, _, _ := strings.Cut(m.want, " "); !known[code] {
			t.Errorf("%s: the code %s is not listed", m.why, code)
		}
	}
}

func TestNames(t *testing.T) {
	for _, c := range []struct {
		name string
		good bool
		why  string
	}{
		{"BR-2041", true, "usual"},
		{"2041_b.2", true, "digits first, point and underline inside"},
		{"Hütte 7", true, "umlaut and space"},
		{"Σταθμός 3", true, "Greek"},
		{"Станция", true, "Cyrillic"},
		{"कक्षा", true, "letters with marks"},
		{strings.Repeat("Ω", MaxName), true, "as long as may be"},
		{strings.Repeat("Ω", MaxName+1), false, "one character more"},
		{"", false, "empty"}, {" a", false, "space first"}, {"a ", false, "space last"}, {"a.", false, "point last"}, {"-a", false, "dash first, taken for an option"},
		{"..", false, "the folder above"}, {"a..b", false, "two points"}, {"a/b", false, "slash"}, {`a\b`, false, "backslash"}, {"a:b", false, "drive"}, {"a\x00b", false, "zero"},
		{"a\nb", false, "line end"}, {"a\u202eb", false, "turned writing"}, {"a\u2215b", false, "division slash"}, {"a*b", false, "pattern"}, {"~a", false, "home folder"},
		{"CON", false, "device"}, {"nul.txt", false, "device with an ending"}, {"console", true, "only begins like a device"},
	} {
		if err := checkJobNumber(c.name); (err == nil) != c.good {
			t.Errorf("%s: %q: %v", c.why, c.name, err)
		}
	}
}
