package describe

import (
	"fmt"
	"path"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// defaults fills in everything that a description may leave out.
func (d *decoder) defaults() {
	s := d.site
	s.Job.Revision.Val = "A"
	s.Practice = Practice{
		Conductors:  At[string]{Val: "metric"},
		Paper:       At[string]{Val: "iso"},
		LampDrop:    At[quantity.Ratio]{Val: 0.05}, // common practice for extra-low voltage, no source; IEC 60364-5-52, annex G, asks 3 % for lighting on a public network
		ClearWithin: At[quantity.Second]{Val: 5},   // IEC 60364-4-41, clause 411.3.2.3: 5 s for distribution circuits (from memory)
		LoadFactor:  At[quantity.Ratio]{Val: 0.75}, // common practice, no source
		Grouping:    At[int]{Val: 1},               // no other loaded circuit beside it
		Margin:      At[quantity.Ratio]{Val: 0.10}, // IEEE 485: design margin of 10 to 15 %
		Ageing:      At[quantity.Ratio]{Val: 0.80}, // IEEE 450 and IEEE 485: replace at 80 % of rated capacity
		Positive:    At[string]{Val: "RD"},         // common practice, no source; IEC 60757 gives the code
		Negative:    At[string]{Val: "BK"},
	}
	s.Duty = Duty{
		Recharge:     At[quantity.Second]{Val: quantity.Hours(24)}, // common practice, no source
		BatteryRoom:  At[quantity.Range[quantity.Celsius]]{Val: quantity.Range[quantity.Celsius]{Low: 5, High: 30}},
		CableAmbient: At[quantity.Celsius]{Val: 30}, // IEC 60364-5-52: reference ambient of the ampacity tables in air
	}
}

// readPractice reads the firm's limits, or the file that holds them.
func (d *decoder) readPractice(e entry) {
	if e.val.Kind == yaml.ScalarNode {
		d.sharedPractice(e)
		return
	}
	d.practice(e.val, e.at, "practice")
}

// sharedPractice reads the firm's limits from a file beside the description.
func (d *decoder) sharedPractice(e entry) {
	at, name := d.src.of(e.val), path.Clean(e.val.Value)
	fail := func(detail string) { d.report(codeShared, "shared file not read", at, detail) }
	if err := checkPath(e.val.Value); err != nil {
		d.fail(at, err)
		return
	}
	if d.opts.ReadFile == nil {
		fail("No shared file can be read here. Write the limits into the description.")
		return
	}
	src, err := d.opts.ReadFile(name)
	if err != nil {
		fail(fmt.Sprintf("The shared file %s cannot be read: %v.", name, plainError(err)))
		return
	}
	shown := path.Join(path.Dir(strings.ReplaceAll(d.site.File, `\`, "/")), name)
	if _, taken := d.site.Sources[shown]; taken {
		fail("A description cannot be its own shared file.")
		return
	}
	d.site.Sources[shown] = src
	sub := &decoder{src: newSource(shown, src), schema: d.schema, site: d.site, list: d.list}
	if top := sub.document(src); top != nil {
		sub.practice(top, sub.src.start(), "A shared practice file")
	}
}

func (d *decoder) practice(n *yaml.Node, owner Span, what string) {
	d.mapping(n, owner, what, d.practiceFields())
	d.checkSizes()
}

func (d *decoder) practiceFields() []field {
	p := &d.site.Practice
	return []field{
		{"conductors", false, d.choice(&p.Conductors, "metric", "awg")},
		{"paper", false, d.choice(&p.Paper, "iso", "ansi")},
		{"lengths", false, d.choice(&p.Lengths, "m", "ft")},
		{"lamp_drop", false, value(d, &p.LampDrop, Percent, "0.5 %", "20 %")},
		{"clear_within", false, value(d, &p.ClearWithin, Duration, "100 ms", "60 s")},
		{"load_factor", false, value(d, &p.LoadFactor, Percent, "30 %", "100 %")},
		{"grouping", false, value(d, &p.Grouping, Count, "1", "20")}, // table B.52.17 of IEC 60364-5-52 ends at 20
		{"taper", false, value(d, &p.Taper, Bool, "", "")},
		{"margin", false, value(d, &p.Margin, Percent, "0 %", "100 %")},
		{"ageing", false, value(d, &p.Ageing, Percent, "50 %", "100 %")},
		{"colours", false, d.readColours},
		{"sizes", false, func(e entry) { values(d, &p.Sizes, e, Size, leastSize, mostSize) }},
		{"fuses", false, func(e entry) { values(d, &p.Fuses, e, Current, "30 mA", "1000 A") }},
		{"fuse_class", false, d.choice(&p.FuseClass, fuseClasses()...)},
		{"blocks", false, func(e entry) { values(d, &p.Blocks, e, Capacity, "0.5 Ah", "5000 Ah") }},
		{"prices", false, d.readPrices},
		{"currency", false, d.text(&p.Currency, checkCurrency)},
		{"texts", false, d.text(&p.Texts, checkPath)},
	}
}

// leastSize and mostSize bound the conductor sizes that a firm can state.
const leastSize, mostSize = "0.05 mm²", "400 mm²"

// fuseClasses are the names of the fuse classes.
func fuseClasses() []string {
	var out []string
	for _, c := range catalogue.FuseClasses() {
		out = append(out, c.Name)
	}
	return out
}

// checkSizes refuses stocked sizes of the other system.
func (d *decoder) checkSizes() {
	p := &d.site.Practice
	gauges := p.Conductors.Val == "awg"
	for _, w := range p.Sizes.Val {
		if (w.Gauge != "") != gauges {
			d.report(codeText, "size of the other system", p.Sizes.Pos,
				fmt.Sprintf("%v is not a size of conductors: %s. Write all sizes in one system.", w, p.Conductors.Val))
			return
		}
	}
}

// choice reads one of the given words.
func (d *decoder) choice(dst *At[string], words ...string) func(entry) {
	return func(e entry) {
		if s, ok := d.scalar(e.val, e.key); ok {
			d.put(dst, e, s, func(s string) error { _, err := parseChoice(s, words); return err })
		}
	}
}

// value reads a value of field type t, whose Go type is T, between bounds.
func value[T any](d *decoder, dst *At[T], t Type, low, high string) func(entry) {
	return func(e entry) {
		if v, ok := d.one(e.val, e.key, t, low, high); ok {
			*dst = At[T]{Val: v.(T), Pos: d.src.of(e.val), Given: true}
		}
	}
}

// one reads a single value of type t between bounds.
func (d *decoder) one(n *yaml.Node, what string, t Type, low, high string) (any, bool) {
	s, ok := d.scalar(n, what)
	if !ok {
		return nil, false
	}
	v, err := types[t].parse(s)
	if err == nil {
		err = checkELV(t, v)
	}
	if err == nil {
		err = checkBounds(t, v, s, low, high)
	}
	if err != nil {
		d.fail(d.src.of(n), err)
		return nil, false
	}
	return v, true
}

// values reads a list of values of type t.
func values[T any](d *decoder, dst *At[[]T], e entry, t Type, low, high string) {
	items := d.items(e.val, e.key)
	var out []T
	for _, n := range items[:d.few(len(items), maxList, e.at, "entries")] {
		if v, ok := d.one(n, e.key, t, low, high); ok {
			out = append(out, v.(T))
		}
	}
	*dst = At[[]T]{Val: out, Pos: d.src.of(e.val), Given: true}
}

// colourCodes are the codes of IEC 60757 with the word for each. Green-and-yellow is
// kept for protective conductors (IEC 60445) and handled apart.
var colourCodes = []struct{ code, word string }{
	{"BK", "black"}, {"BN", "brown"}, {"RD", "red"}, {"OG", "orange"}, {"YE", "yellow"}, {"GN", "green"}, {"BU", "blue"},
	{"VT", "violet"}, {"GY", "grey"}, {"WH", "white"}, {"PK", "pink"}, {"GD", "gold"}, {"TQ", "turquoise"}, {"SR", "silver"},
}

func (d *decoder) readColours(e entry) {
	d.mapping(e.val, e.at, "colours", d.colourFields())
	p := &d.site.Practice
	if p.Positive.Val == p.Negative.Val {
		d.report(codeColours, "one colour for both poles", e.at,
			fmt.Sprintf("Both poles would be %s. Give plus and minus different colours.", p.Positive.Val))
	}
}

func (d *decoder) colourFields() []field {
	p := &d.site.Practice
	return []field{
		{"positive", false, d.text(&p.Positive, checkColour)},
		{"negative", false, d.text(&p.Negative, checkColour)},
	}
}

// checkColour accepts a colour code of IEC 60757.
func checkColour(s string) error {
	codes := make([]string, len(colourCodes))
	for i, c := range colourCodes {
		if s == c.code {
			return nil
		}
		codes[i] = c.code
	}
	if s == "GNYE" {
		return &valueError{codeColours, "protective colour", "Green-and-yellow is kept for protective conductors (IEC 60445). Choose another colour."}
	}
	detail := fmt.Sprintf("%q is no colour code of IEC 60757. ", clip(s))
	if i := slices.IndexFunc(colourCodes, func(c struct{ code, word string }) bool {
		return strings.EqualFold(s, c.word) || strings.EqualFold(s, c.code) || c.word == "grey" && strings.EqualFold(s, "gray")
	}); i >= 0 {
		detail += fmt.Sprintf("Did you mean %s (%s)? ", colourCodes[i].code, colourCodes[i].word)
	}
	return &valueError{codeColours, "unknown colour", detail + "Codes: " + strings.Join(codes, ", ") + "."}
}

func (d *decoder) readDuty(e entry) { d.mapping(e.val, e.at, "duty", d.dutyFields()) }

func (d *decoder) dutyFields() []field {
	u := &d.site.Duty
	return []field{
		{"nominal", true, d.readNominal},
		{"outage", true, value(d, &u.Outage, Duration, "1 min", "30 d")},
		{"recharge", false, value(d, &u.Recharge, Duration, "1 h", "30 d")},
		{"battery_room", false, value(d, &u.BatteryRoom, TemperatureRange, "-40 °C", "60 °C")},
		{"cable_ambient", false, value(d, &u.CableAmbient, Temperature, "-40 °C", "75 °C")},
	}
}

// nominals are the nominal voltages that the program knows cells, relays and supplies for.
var nominals = []quantity.Volt{12, 24, 36, 48}

func (d *decoder) readNominal(e entry) {
	var v At[quantity.Volt]
	value(d, &v, Voltage, "", "")(e)
	if !v.Given {
		return
	}
	if !slices.Contains(nominals, v.Val) {
		d.report(codeRange, "not a nominal voltage", v.Pos, fmt.Sprintf("%v is not a nominal voltage here: write 12 V, 24 V, 36 V or 48 V.", v.Val))
		return
	}
	d.site.Duty.Nominal = v
}
