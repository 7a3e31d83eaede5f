package packet

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
)

// faultBlock is one block of the fault-finding table: what a person sees, and what it
// can be.
type faultBlock struct {
	sign   string
	groups []int
	list   []*facts.Fault
}

// faultBlocks gathers the faults by what a person sees. Circuits that go dark alone
// share one block.
func (b *book) faultBlocks() (blocks []faultBlock, silent []*facts.Fault) {
	at := map[int]int{}
	lone := -1
	for _, f := range b.d.Faults {
		if len(f.Dark)+len(f.Lit)+len(f.Moved) == 0 {
			silent = append(silent, f)
			continue
		}
		i, ok := at[f.Group]
		if !ok && oneCircuit(f) != "" {
			if lone < 0 {
				lone = len(blocks)
				blocks = append(blocks, faultBlock{sign: "One circuit dark"})
			}
			i, ok = lone, true
			at[f.Group] = lone
			blocks[lone].groups = append(blocks[lone].groups, f.Group)
		}
		if !ok {
			i = len(blocks)
			at[f.Group] = i
			blocks = append(blocks, faultBlock{sign: f.Sign, groups: []int{f.Group}})
		}
		blocks[i].list = append(blocks[i].list, f)
	}
	return blocks, silent
}

// oneCircuit is the circuit that alone goes dark, if that is all that is seen.
func oneCircuit(f *facts.Fault) string {
	if len(f.Lit) > 0 || len(f.Dark) == 0 {
		return ""
	}
	for _, s := range f.Dark {
		if s.Circuit != f.Dark[0].Circuit {
			return ""
		}
	}
	return f.Dark[0].Circuit
}

// numberBlocks notes which block holds which group, before any page refers to one.
func (b *book) numberBlocks() {
	b.blockOf = map[int]int{}
	blocks, _ := b.faultBlocks()
	for i, x := range blocks {
		for _, g := range x.groups {
			b.blockOf[g] = i + 1
		}
	}
}

// step is one row of a block: faults that one reading does not part.
type step struct {
	measure, shows string
	likely         []string
	do             []string
}

// faultFinding is the table made from the fault study.
func (b *book) faultFinding() *section {
	blocks, silent := b.faultBlocks()
	if len(blocks) == 0 {
		return nil
	}
	s := &section{key: keyFaults, title: "Fault finding", document: "Fault-finding table", letter: "H", label: "How",
		purpose: "Use this sheet to go from what you see, by one reading at a time, to the part.",
		note:    "Find the block that fits. Set the condition. Measure from its top; stop where the reading fits."}
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "Step", w: 9, a: midAnchor}, {head: "Measure", w: 46, indent: 2},
		{head: "If it shows", w: 39}, {head: "Most likely", w: 44}, {head: "Do", w: 42}}}
	head := t.head(0)
	s.heads = &head
	for i, x := range blocks {
		list, common := b.steps(x)
		h := b.numbered(i+1, x.sign, common, groupGap(i == 0))
		for _, g := range x.groups {
			h.marks = append(h.marks, faultMark(g))
		}
		s.blocks = append(s.blocks, h)
		var rows []block
		for k, st := range list {
			rows = append(rows, t.line(b, 0, row{cells: []cell{txt(fmt.Sprint(k + 1)), txt(st.measure), txt(st.shows), txt(strings.Join(st.likely, "; ")), txt(strings.Join(st.do, "; "))}}))
		}
		s.blocks = append(s.blocks, together(rows)...)
	}
	note := fmt.Sprintf("From the fault study: %d single faults solved in every condition, grouped by what a person sees. Two faults at once are not covered.", len(b.d.Faults))
	if len(silent) > 0 {
		var names []string
		for _, f := range silent {
			names = append(names, f.What)
		}
		note += " Nothing is seen and no reading leaves its band at: " + strings.Join(names, "; ") + ". These are found by the commissioning checklist alone."
	}
	s.blocks = append(s.blocks, b.paragraph(note, remarkText, 1))
	return s
}

// numbered is a group's band with its number white on black.
func (b *book) numbered(n int, name, remark string, gap float64) block {
	room := b.pg.width - 13
	lines := wrap(name, groupHead, room)
	h := max(7, float64(len(lines))*groupHead.lead+3)
	return block{h: h, gap: gap, next: true, group: true, draw: func(p *pad, y, h float64) {
		p.fill(p.pg.l, y, p.pg.width, h, ink.Tint)
		p.fill(p.pg.l, y, 9, h, ink.Black)
		p.write(p.pg.l+4.5, y+h/2+1.4, fmt.Sprint(n), style{ink.Bold, 11, 4, ink.White}, ink.Middle)
		p.lines(p.pg.l+11, y+(h-float64(len(lines))*groupHead.lead)/2+rise*groupHead.lead, lines, groupHead.lead)
		if remark != "" {
			p.write(p.pg.right()-1.5, y+4.6, remark, groupRemark, ink.End)
		}
	}}
}

// steps are the rows of a block; faults with the same reading share one.
// The condition that all of them ask for stands at the head of the block.
func (b *book) steps(x faultBlock) (out []step, common string) {
	for i, f := range x.list {
		c := b.conditionName(b.telling(f, x.list))
		if i > 0 && c != common {
			common = ""
			break
		}
		common = c
	}
	at := map[string]int{}
	for _, f := range x.list {
		m := b.telling(f, x.list)
		st := step{measure: "look; no reading tells", shows: ""}
		if m.Point != "" {
			st.measure, st.shows = b.measureText(m)
			if common == "" {
				if c := b.conditionName(m); c != "" {
					st.measure += ", " + c
				}
			}
		}
		key := st.measure + "|" + st.shows
		i, ok := at[key]
		if !ok {
			i = len(out)
			at[key] = i
			out = append(out, st)
		}
		what := f.What
		if f.Opens != "" {
			what += ", opens " + f.Opens
		}
		out[i].likely = append(out[i].likely, what)
		if do := b.remedy(f); do != "" && !slices.Contains(out[i].do, do) {
			out[i].do = append(out[i].do, do)
		}
	}
	return out, common
}

// conditionName is "condition 3", the one of a reading that moves.
func (b *book) conditionName(m facts.Moved) string {
	if c := b.condition(m.Condition); c != nil && c.Number > 0 {
		return fmt.Sprintf("condition %d", c.Number)
	}
	return ""
}

// telling is the reading that parts a fault from the others of its block: in the
// condition in which the sign is seen if one does, else the best one of the Design.
func (b *book) telling(f *facts.Fault, list []*facts.Fault) facts.Moved {
	seen := ""
	switch {
	case len(f.Dark) > 0:
		seen = f.Dark[0].Condition
		for _, s := range f.Dark {
			if s.Condition == "outage-night" {
				seen = s.Condition
			}
		}
	case len(f.Lit) > 0:
		seen = f.Lit[0].Condition
	default:
		return f.Best
	}
	best, most := f.Best, 0
	for _, m := range f.Moved {
		if m.Condition != seen {
			continue
		}
		apart := 1
		for _, o := range list {
			if o != f && !alike(o, m) {
				apart++
			}
		}
		if apart > most {
			best, most = m, apart
		}
	}
	return best
}

// surely is the difference that a meter shows surely, V; common practice, no source.
const surely = 0.3

func alike(o *facts.Fault, m facts.Moved) bool {
	for _, x := range o.Moved {
		if x.Point == m.Point && x.Condition == m.Condition {
			return math.Abs(float64(x.Volt-m.Volt)) < surely
		}
	}
	return false
}

// measureText is what to measure in which condition, and what it then shows.
func (b *book) measureText(m facts.Moved) (measure, shows string) {
	for _, r := range b.d.Readings {
		if r.Point.Label != m.Point {
			continue
		}
		c := b.condition(m.Condition)
		measure = bold(r.Point.Label) + " " + r.Point.Shows
		shows = typicalVolt(m.Volt) + " V"
		if c != nil {
			i := b.conditionIndex(c)
			shows += ", not " + pairText(r.Bands[i])
			for _, o := range r.OrAt(i) {
				shows += " nor " + pairText(o.Band)
			}
		}
	}
	return measure, shows
}
