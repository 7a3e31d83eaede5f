package packet

import (
	"fmt"
	"slices"

	"gloamwright/layout/schematic"
)

// block is a piece of a sheet that is never split.
type block struct {
	h     float64
	gap   float64 // clear above, but not at the top of a sheet
	next  bool    // stays on one sheet with the block after it
	head  bool    // column heads that a sheet repeats
	group bool    // begins a group that may move to the next sheet
	fill  bool    // takes what is left of the sheet, up to most
	most  float64
	// above is drawn over the block where a sheet goes on with it: the column heads of
	// its table.
	above *block
	// opens starts a new sheet with a head of its own.
	opens *opening
	topic string   // what the block is about, for the sheet's title
	marks []string // names by which references find the block
	draw  func(p *pad, y, h float64)
}

// opening is the head of a sheet that differs from its section's.
type opening struct{ sub, purpose, note string }

// section is a kind of sheet and its content.
type section struct {
	key      string // "wire-runs"
	title    string
	document string // document type, in the foot
	letter   string // ends the identification
	side     bool   // on its side
	purpose  string
	label    string // "Before", "How", "See also"
	note     string
	heads    *block // column heads, repeated on each sheet
	blocks   []block
	// sub makes the second part of the title from the topics of a sheet.
	sub func(topics []string) string
	// crosses draws the printer crosses of label sheets.
	crosses bool
	// drawing is the schematic sheet that stands in its own frame; a section with it
	// has no blocks.
	drawing *schematic.Sheet
	ownHead func(p *pad) // draws another head
	book    string       // bookmark, if it is not the title
}

// sheetPlan is one sheet after pagination.
type sheetPlan struct {
	s      *section
	k, of  int // place among the sheets of the section
	opens  *opening
	blocks []block
	topics []string
	n      int
}

// title is the sheet's title.
func (s *sheetPlan) title() string {
	t := s.s.title
	if s.of > 1 {
		t = fmt.Sprintf("%s %d of %d", t, s.k, s.of)
	}
	switch {
	case s.opens != nil && s.opens.sub != "":
		t += ": " + s.opens.sub
	case s.s.sub != nil && len(s.topics) > 0:
		if sub := s.s.sub(s.topics); sub != "" {
			t += ": " + sub
		}
	}
	return t
}

// short is the title where another sheet names it.
func (s *sheetPlan) short() string {
	if s.of > 1 {
		return fmt.Sprintf("%s %d of %d", s.s.title, s.k, s.of)
	}
	return s.s.title
}

// paginate breaks the blocks of a section into sheets and evens out the last two. Gaps
// are drawn together where that saves a sheet.
func (s *section) paginate(pg page) []*sheetPlan {
	out := s.packed(pg)
	if len(out) > 1 {
		s.balance(out, pg)
	}
	return out
}

// Shares of the body of a sheet: below leastFull the last sheet of a section takes a
// group more, if the sheet before it keeps leastLeft.
const (
	leastFull = 0.6
	leastLeft = 0.35
)

// balance moves the last group of the sheet before the last one onto a last sheet that is
// little filled.
func (s *section) balance(list []*sheetPlan, pg page) {
	last, before := list[len(list)-1], list[len(list)-2]
	room := pg.end() - pg.top()
	if s.heads != nil {
		room -= s.heads.h
	}
	if stacked(last.blocks) >= leastFull*room || last.blocks[0].opens != nil {
		return
	}
	rest := last.blocks
	if rest[0].head {
		rest = rest[1:] // the sheet goes on with rows: their heads move along
	}
	for k := len(before.blocks) - 1; k > 0; k-- {
		if !before.blocks[k].group {
			continue
		}
		moved := slices.Concat(before.blocks[k:], rest)
		if stacked(moved) > room+slack || stacked(before.blocks[:k]) < leastLeft*room {
			return
		}
		before.setBlocks(before.blocks[:k])
		last.setBlocks(moved)
		return
	}
}

// setBlocks puts blocks on a sheet and collects what they are about.
func (s *sheetPlan) setBlocks(list []block) {
	s.blocks, s.topics = list, nil
	for _, b := range list {
		if b.topic != "" && !slices.Contains(s.topics, b.topic) {
			s.topics = append(s.topics, b.topic)
		}
	}
}

// packed breaks the blocks of a section into as few sheets as it can.
func (s *section) packed(pg page) []*sheetPlan {
	out := s.broken(pg)
	if len(out) < 2 {
		return out
	}
	wide := make([]float64, len(s.blocks))
	for i, b := range s.blocks {
		wide[i] = b.gap
	}
	for _, share := range []float64{0.7, 0.45} {
		for i := range s.blocks {
			s.blocks[i].gap = wide[i] * share
		}
		if tight := s.broken(pg); len(tight) < len(out) {
			return tight
		}
	}
	for i := range s.blocks {
		s.blocks[i].gap = wide[i]
	}
	return s.broken(pg)
}

// broken breaks the blocks of a section into sheets with the gaps as they are.
func (s *section) broken(pg page) []*sheetPlan {
	if s.drawing != nil {
		return []*sheetPlan{{s: s, k: 1, of: 1}}
	}
	room := pg.end() - pg.top()
	if s.heads != nil {
		room -= s.heads.h
	}
	var out []*sheetPlan
	var cur *sheetPlan
	at := 0.0
	open := func(o *opening) {
		cur = &sheetPlan{s: s, opens: o}
		if o == nil && len(out) > 0 {
			cur.opens = out[len(out)-1].opens
		}
		out = append(out, cur)
		at = 0
	}
	put := func(b block) {
		if len(cur.blocks) == 0 && b.above != nil && len(out) > 1 {
			head := *b.above
			head.marks, head.head = nil, true
			cur.blocks, at = append(cur.blocks, head), head.h
			b.gap = 0
		}
		if len(cur.blocks) > 0 {
			at += b.gap
		}
		at += b.h
		cur.blocks = append(cur.blocks, b)
		if b.topic != "" && !slices.Contains(cur.topics, b.topic) {
			cur.topics = append(cur.topics, b.topic)
		}
	}
	for i := 0; i < len(s.blocks); {
		j := i
		for j < len(s.blocks)-1 && s.blocks[j].next && s.blocks[j+1].opens == nil {
			j++
		}
		unit := s.blocks[i : j+1]
		if unit[0].opens != nil || cur == nil {
			open(unit[0].opens)
		}
		whole := stacked(unit)
		if len(cur.blocks) > 0 && at+unit[0].gap+whole > room+slack {
			open(nil)
		}
		if len(cur.blocks) == 0 && unit[0].above != nil && len(out) > 1 {
			whole += unit[0].above.h
		}
		if whole <= room+slack {
			for _, b := range unit {
				put(b)
			}
			i = j + 1
			continue
		}
		for _, b := range unit { // longer than a sheet: broken where it must
			if len(cur.blocks) > 0 && at+b.gap+b.h > room+slack {
				open(nil)
			}
			put(b)
		}
		i = j + 1
	}
	for k, p := range out {
		p.k, p.of = k+1, len(out)
	}
	return out
}

// slack forgives the rounding of sums of heights, mm.
const slack = 0.01

// stacked is the height of blocks below each other; the gap above the first does not
// count.
func stacked(list []block) float64 {
	h := 0.0
	for i, b := range list {
		if i > 0 {
			h += b.gap
		}
		h += b.h
	}
	return h
}

// drawBlocks draws the column heads and the blocks of a sheet.
func (s *sheetPlan) drawBlocks(p *pad) {
	y := p.pg.top()
	if s.s.heads != nil {
		s.s.heads.draw(p, y, s.s.heads.h)
		y += s.s.heads.h
	}
	const apart = 1.5 // of what fills a sheet from the line under it
	left := p.pg.end() - y - stacked(s.blocks) - apart
	for i, b := range s.blocks {
		if i > 0 {
			y += b.gap
		}
		h := b.h
		if b.fill && left > 0 {
			h = min(b.h+left, max(b.h, b.most))
		}
		p.mark(b.marks, y)
		b.draw(p, y, h)
		y += h
	}
}

// under gives rows the head that they repeat where a sheet goes on with them.
func under(head block, rows []block) []block {
	for i := range rows {
		rows[i].above = &head
	}
	return rows
}

// together makes a run of rows follow the rules of a group: up to six stay together,
// and longer ones leave no row alone at either end.
func together(rows []block) []block {
	const whole = 6
	n := len(rows)
	for i := range rows {
		if i < n-1 && (n <= whole || i == 0 || i == n-2) {
			rows[i].next = true
		}
	}
	return rows
}

// space is a block of nothing.
func space(h float64) block { return block{h: h, draw: func(*pad, float64, float64) {}} }
