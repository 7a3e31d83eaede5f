package packet

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// item is one row of the parts list.
type item struct {
	qty, unit string
	names     []string // designations, "" in spares
	label     string   // instead of designations
	what      string
	must      string
	spare     bool
	count     int
	each      string // price of one; empty: it has none
	cost      string
}

// partGroup is a heading of the parts list with the kinds that stand below it.
type partGroup struct {
	title string
	takes func(p *circuit.Part) bool
}

// partGroups are tried in order; the last takes all.
var partGroups = []partGroup{
	{"Supply and battery", func(p *circuit.Part) bool {
		switch p.Kind {
		case circuit.Supply, circuit.Battery, circuit.ChargerUnit, circuit.Transformer, circuit.Bridge, circuit.Regulator, circuit.NTC, circuit.SwitchIsolator:
			return true
		}
		return false
	}},
	{"Lights", func(p *circuit.Part) bool { return p.Kind == circuit.LuminaireLamp }},
	{"Boards and fuses", func(p *circuit.Part) bool {
		return p.Kind == circuit.Fuse || p.Kind == circuit.BusBar || p.Kind == circuit.Terminal
	}},
	{"Control", func(p *circuit.Part) bool { return true }},
}

// boardGroup is the place of boards and fuses among the groups.
const boardGroup = 2

// partOrder is how the groups are printed.
var partOrder = []int{0, 3, 2, 1}

// bought reports whether a part is a thing on the list: the mains connection belongs
// to the building.
func bought(p *circuit.Part) bool { return p.Kind != circuit.MainsConnection }

// parts is the list of what to order and to fit.
func (b *book) parts() *section {
	s := &section{key: keyParts, title: "Parts list", document: "Parts list", letter: "P", label: "Before",
		purpose: "Use this sheet to order, to check what arrived, and to judge a substitute.",
		note:    fmt.Sprintf("%s read.", b.upperSheets(keyCautions))}
	if b.d.Changes != nil {
		s.note = fmt.Sprintf("If you hold parts for revision %s, read %s first.", b.d.Changes.From, b.sheets(keyChange))
	}
	t := &table{st: tableText, min: plainRow, cols: partColumns}
	if b.d.Bill != nil {
		t.cols = pricedColumns
	}
	head := t.head(0)
	s.heads = &head
	pos := 0
	first := true
	group := func(title, remark string, items []item) {
		if len(items) == 0 {
			return
		}
		s.blocks = append(s.blocks, b.band(title, remark, groupGap(first)))
		first = false
		var rows []block
		for _, it := range items {
			pos++
			name := it.label
			if name == "" {
				name = compressed(it.names)
			}
			fitted := tickBox()
			if it.spare {
				fitted = none()
			}
			r := row{cells: []cell{txt(fmt.Sprint(pos)), fat(it.qty), txt(it.unit), txt(name), txt(it.what), txt(it.must), tickBox(), fitted}}
			if b.d.Bill != nil {
				r.cells = slices.Insert(r.cells, 6, txt(it.each), txt(it.cost))
			}
			for _, n := range it.names {
				if !strings.Contains(n, ":") { // terminals stand on their plans
					r.marks = append(r.marks, rowMark(n))
				}
				r.changed = r.changed || b.touched(n)
			}
			rows = append(rows, t.line(b, 0, r))
		}
		s.blocks = append(s.blocks, together(rows)...)
	}
	items := b.partItems()
	items[boardGroup] = append(items[boardGroup], b.enclosures()...)
	for _, g := range partOrder {
		group(partGroups[g].title, "", items[g])
	}
	group("Wire", b.conductorStandard()+"; cut lengths on "+b.on("cutting list"), b.wireItems())
	group("Spares", "keep in the cabinet", b.spareItems())
	s.blocks = append(s.blocks, b.costBlocks(t)...)
	s.blocks = append(s.blocks, b.paragraph("Ratings include the margin. “A substitute must” lists what the calculation needs; anything that meets it may be fitted: write it on "+b.sheets(keyRedLine)+".", remarkText, 1))
	return s
}

// partItems groups equal parts of each group.
func (b *book) partItems() map[int][]item {
	out := map[int][]item{}
	at := map[string]int{}
	strips := map[string]bool{}
	for _, p := range b.d.Circuit.Parts {
		if !bought(p) {
			continue
		}
		g := 0
		for !partGroups[g].takes(p) {
			g++
		}
		what, must := b.describe(p)
		name := p.Designation
		key := fmt.Sprintf("%d|%s|%s", g, what, must)
		if p.Kind == circuit.Terminal {
			strip, _, _ := strings.Cut(p.Designation, ":")
			key, strips[strip] = "terminals "+strip, true
		}
		line := b.billed(p)
		if line != nil {
			key += "|" + line.Name
			if p.Kind == circuit.Terminal {
				what += ", to " + strings.TrimPrefix(line.Name, "terminal ")
			}
		}
		i, ok := at[key]
		if !ok {
			i = len(out[g])
			at[key] = i
			out[g] = append(out[g], item{unit: "pc", what: what, must: must})
		}
		it := &out[g][i]
		it.names = append(it.names, name)
		it.count++
		buy := it.count
		if p == b.d.Battery.Part {
			buy = max(1, b.d.Battery.Blocks*b.d.Battery.Parallel)
		}
		it.qty = fmt.Sprint(buy)
		it.price(line, float64(buy))
		if line == nil && p.Kind == circuit.BusBar && b.d.Bill != nil {
			it.cost = "with L+" // a board has one price
		}
	}
	return out
}

// describe puts a part in words: what it is, and what a substitute must meet.
func (b *book) describe(p *circuit.Part) (what, must string) {
	d := b.d
	name := strings.TrimSuffix(p.Description, " and holder")
	holder := name != p.Description
	var values []string
	for _, v := range p.Values {
		values = append(values, strings.Replace(v.Text, "..", " to ", 1))
	}
	what = bold(name)
	if len(values) > 0 {
		what += " " + strings.Join(values, ", ")
	}
	if holder {
		what += ", with holder"
	}
	supply, relay := b.supplyOf(p), b.relayOf(p)
	switch {
	case p == d.Battery.Part:
		bt := d.Battery
		what = fmt.Sprintf("%s %v %v, %s", bold("Battery block"), bt.BlockVolt, bt.BlockAh, bt.ClassName)
		must = "≥ " + figure(bt.BlockNeed)
		if bt.Blocks*bt.Parallel > 1 {
			must += "; all of one batch"
		}
	case p == d.Charger.Part:
		must = fmt.Sprintf("≥ %s, ≤ %s; float %s", figure(d.Charger.Required), figure(d.Charger.Limit), quantity.Fixed(d.Charger.Float, 1))
		if d.Charger.Compensated {
			must += "; probe"
		}
	case supply != nil && p.Kind != circuit.Transformer:
		must = fmt.Sprintf("%v regulated; ≥ %s", supply.Volt, figure(supply.Current))
	case relay != nil:
		must = fmt.Sprintf("coil picks up ≤ %s hot; contact ≥ %s at %v DC", figure(relay.LowestFeed), figure(relay.Contact), d.Totals.HighestV)
	case d.CutOff != nil && p == d.CutOff.Part:
		must = fmt.Sprintf("opens %v; closes %v; ≥ %s", d.CutOff.Opens, d.CutOff.Recloses, figure(d.CutOff.Current))
	case p.Kind == circuit.Fuse:
		if f := b.fuseOf(p); f != nil {
			if f.Colour != "" {
				what += ", " + f.Colour
			}
			must = fmt.Sprintf("DC ≥ %v; breaks ≥ %s", d.Totals.HighestV, figure(b.worstShort(f)))
		}
	case p.Kind == circuit.LuminaireLamp:
		if l := b.lamp(p); l != nil {
			if l.Works.High > 0 {
				must = fmt.Sprintf("%v to %v", l.Works.Low, l.Works.High)
			}
			if l.Watt > 0 {
				must = strings.TrimPrefix(must+"; ≤ "+figure(l.Watt), "; ")
			}
		}
	case p.Kind == circuit.SwitchIsolator:
		must = "DC rated"
		if f := b.mainFuse(); f != nil {
			must = "DC rated ≥ " + figure(f.Design)
		}
	case p.Kind == circuit.Terminal:
		what, must = bold("Terminals")+" of strip "+stripOf(p), b.sheets(keyTerminals)
	case p.Kind == circuit.BusBar:
		what = bold(p.Description) + " of " + stripOf(p)
	}
	if must == "" {
		must = p.Note
	} else if p.Note != "" {
		must += "; " + p.Note
	}
	if must == "" && len(p.Values) > 0 {
		must = "the same values"
	}
	return what, must
}

// worstShort is the greatest current that a fuse of the same kind and rating may have to
// break, so that all of them are one item.
func (b *book) worstShort(f *facts.Fuse) quantity.Ampere {
	var most quantity.Ampere
	for _, x := range b.d.Fuses {
		if x.Style == f.Style && x.Rating == f.Rating {
			most = max(most, x.Prospective)
		}
	}
	return most
}

func stripOf(p *circuit.Part) string {
	s, _, _ := strings.Cut(p.Designation, ":")
	return s
}

// wireItems are cables and single wires by size, colour apart for wires.
func (b *book) wireItems() []item {
	var out []item
	for _, c := range b.cuttingList() {
		what := bold("Wire") + " " + c.size.String() + ", " + c.colour
		it := item{qty: b.inStore(c.total), unit: b.lengths.Symbol(), names: c.names, what: what, must: "copper, stranded"}
		if c.cores > 0 {
			it.what = fmt.Sprintf("%s %d × %v", bold("Cable"), c.cores, c.size)
		} else {
			it.names, it.label = nil, counted(c.pieces, "wire")
		}
		if b.d.Bill != nil {
			it.price(b.d.Bill.Conductor(c.cores, c.size, c.colour), b.lengths.Of(c.total))
		}
		out = append(out, it)
	}
	return out
}

func (b *book) conductorStandard() string {
	if b.d.Site.Practice.Conductors.Val == "awg" {
		return "ASTM B258"
	}
	return "IEC 60228"
}

// spareItems are two fuse-links of each rating and class.
func (b *book) spareItems() []item {
	var out []item
	at := map[string]int{}
	for _, f := range b.d.Fuses {
		what := fmt.Sprintf("%s %v", bold(f.Style), f.Rating)
		if f.Colour != "" {
			what += ", " + f.Colour
		}
		if _, ok := at[what]; ok {
			continue
		}
		at[what] = len(out)
		it := item{qty: fmt.Sprint(sizing.SpareLinks), unit: "pc", label: "spares", what: what, must: "as the fitted ones", spare: true}
		it.price(b.spare(f), sizing.SpareLinks)
		out = append(out, it)
	}
	return out
}

// touched reports whether a thing differs from the revision before.
func (b *book) touched(name string) bool {
	return b.d.Changes != nil && (b.d.Changes.Touched[name] || b.d.Changes.Rows[name])
}

// compressed writes designations with runs shortened: "-E1…-E5, -E9".
func compressed(names []string) string {
	type one struct {
		stem string
		n    int
	}
	var list []one
	for _, n := range names {
		i := len(n)
		for i > 0 && n[i-1] >= '0' && n[i-1] <= '9' {
			i--
		}
		v, err := strconv.Atoi(n[i:])
		if err != nil {
			v = -1
		}
		list = append(list, one{n[:i], v})
	}
	order := make([]int, len(list))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, z int) int {
		if list[a].stem != list[z].stem {
			return 0
		}
		return list[a].n - list[z].n
	})
	var out []string
	for i := 0; i < len(order); {
		j := i
		for j+1 < len(order) && list[order[j+1]].stem == list[order[j]].stem && list[order[j]].n >= 0 && list[order[j+1]].n == list[order[j]].n+1 {
			j++
		}
		switch j - i {
		case 0:
			out = append(out, names[order[i]])
		case 1:
			out = append(out, names[order[i]], names[order[j]])
		default:
			out = append(out, names[order[i]]+"…"+names[order[j]])
		}
		i = j + 1
	}
	return strings.Join(out, ", ")
}
