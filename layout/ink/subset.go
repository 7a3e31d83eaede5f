package ink

import (
	"encoding/binary"
	"fmt"
	"slices"
)

// The parts of the OpenType font format (ISO/IEC 14496-22) that subsetting
// touches.
const (
	sfntTrueType     = 0x00010000
	tableRecord      = 16 // bytes of one entry of the table directory
	checksumTarget   = 0xB1B0AFBA
	headAdjustment   = 8 // offset of checkSumAdjustment in head
	headLocaFormat   = 50
	maxpGlyphs       = 4
	maxpInstructions = 26
	hheaMetrics      = 34
	postHeader       = 32
	postNoNames      = 0x00030000

	componentWords        = 0x0001 // flags of a composite glyph's component
	componentScale        = 0x0008
	componentMore         = 0x0020
	componentScaleXY      = 0x0040
	componentMatrix       = 0x0080
	componentInstructions = 0x0100
)

// subsetFont returns a TrueType font with the glyphs that cmap gives for runes,
// renumbered, without hinting. Line metrics and the licence notice stay.
// The file is only read.
func subsetFont(file []byte, cmap *[0x10000]uint16, runes []rune) ([]byte, error) {
	in, err := readTables(file)
	if err != nil {
		return nil, err
	}
	g, err := newGlyphTable(in)
	if err != nil {
		return nil, err
	}
	runes = slices.Clone(runes)
	slices.Sort(runes)
	runes = slices.Compact(runes)
	old := []uint16{0} // glyph 0 is the one for missing signs
	for _, r := range runes {
		if r < 0 || r > 0xFFFE || cmap[r] == 0 {
			return nil, fmt.Errorf("the font has no glyph for %U", r)
		}
		old = append(old, cmap[r])
	}
	if old, err = g.closure(old); err != nil {
		return nil, err
	}
	number := map[uint16]uint16{}
	for i, o := range old {
		number[o] = uint16(i)
	}

	var glyf, loca, hmtx []byte
	be := binary.BigEndian
	for _, o := range old {
		loca = be.AppendUint32(loca, uint32(len(glyf)))
		data, err := g.rewritten(o, number)
		if err != nil {
			return nil, err
		}
		glyf = append(glyf, data...)
		for len(glyf)%4 != 0 {
			glyf = append(glyf, 0)
		}
		hmtx = append(hmtx, g.metric(o)...)
	}
	loca = be.AppendUint32(loca, uint32(len(glyf)))

	head, hhea, maxp, post := slices.Clone(in["head"]), slices.Clone(in["hhea"]), slices.Clone(in["maxp"]), slices.Clone(in["post"][:postHeader])
	be.PutUint32(head[headAdjustment:], 0)
	be.PutUint16(head[headLocaFormat:], 1)
	be.PutUint16(hhea[hheaMetrics:], uint16(len(old)))
	be.PutUint16(maxp[maxpGlyphs:], uint16(len(old)))
	be.PutUint16(maxp[maxpInstructions:], 0)
	be.PutUint32(post, postNoNames)
	names, err := keptNames(in["name"])
	if err != nil {
		return nil, err
	}
	return writeTables(map[string][]byte{
		"OS/2": in["OS/2"], "cmap": characterMap(runes, cmap, number), "glyf": glyf, "head": head, "hhea": hhea,
		"hmtx": hmtx, "loca": loca, "maxp": maxp, "name": names, "post": post,
	}), nil
}

// readTables cuts a font file into its tables and sees that those needed here are
// there and long enough.
func readTables(file []byte) (map[string][]byte, error) {
	be := binary.BigEndian
	if len(file) < 12 || be.Uint32(file) != sfntTrueType {
		return nil, fmt.Errorf("not a TrueType font")
	}
	tables := map[string][]byte{}
	for i := range int(be.Uint16(file[4:])) {
		at := 12 + i*tableRecord
		if at+tableRecord > len(file) {
			return nil, fmt.Errorf("font directory cut short")
		}
		offset, length := int(be.Uint32(file[at+8:])), int(be.Uint32(file[at+12:]))
		if offset+length > len(file) {
			return nil, fmt.Errorf("font table %q cut short", file[at:at+4])
		}
		tables[string(file[at:at+4])] = file[offset : offset+length : offset+length]
	}
	for _, need := range []struct {
		name string
		size int
	}{{"head", 54}, {"hhea", 36}, {"maxp", 32}, {"post", postHeader}, {"OS/2", 1}, {"name", 6}, {"glyf", 1}, {"hmtx", 4}, {"loca", 4}} {
		if len(tables[need.name]) < need.size {
			return nil, fmt.Errorf("font table %q missing or cut short", need.name)
		}
	}
	return tables, nil
}

// glyphTable finds outlines and metrics of single glyphs.
type glyphTable struct {
	glyf, loca, hmtx []byte
	long             bool // loca holds offsets, not half offsets
	count            int
	metrics          int // entries of hmtx with an advance of their own
}

func newGlyphTable(in map[string][]byte) (*glyphTable, error) {
	be := binary.BigEndian
	g := &glyphTable{glyf: in["glyf"], loca: in["loca"], hmtx: in["hmtx"],
		long: be.Uint16(in["head"][headLocaFormat:]) == 1, count: int(be.Uint16(in["maxp"][maxpGlyphs:])),
		metrics: int(be.Uint16(in["hhea"][hheaMetrics:]))}
	width := 2
	if g.long {
		width = 4
	}
	if len(g.loca) < (g.count+1)*width || g.metrics < 1 || len(g.hmtx) < 2*g.metrics+2*g.count {
		return nil, fmt.Errorf("font tables do not fit together")
	}
	return g, nil
}

// outline is the data of one glyph; empty for one without ink.
func (g *glyphTable) outline(i uint16) ([]byte, error) {
	if int(i) >= g.count {
		return nil, fmt.Errorf("font has no glyph %d", i)
	}
	be := binary.BigEndian
	from, to := 2*int(be.Uint16(g.loca[2*i:])), 2*int(be.Uint16(g.loca[2*i+2:]))
	if g.long {
		from, to = int(be.Uint32(g.loca[4*int(i):])), int(be.Uint32(g.loca[4*int(i)+4:]))
	}
	if from > to || to > len(g.glyf) || to-from > 0 && to-from < 12 {
		return nil, fmt.Errorf("outline of glyph %d cut short", i)
	}
	return g.glyf[from:to], nil
}

// metric is the advance and left side bearing of one glyph, four bytes.
func (g *glyphTable) metric(i uint16) []byte {
	k := int(i)
	if k < g.metrics {
		return g.hmtx[4*k : 4*k+4]
	}
	advance := g.hmtx[4*(g.metrics-1) : 4*g.metrics-2]
	bearing := 4*g.metrics + 2*(k-g.metrics)
	return slices.Concat(advance, g.hmtx[bearing:bearing+2])
}

// component is one part of a composite glyph: where its flags and glyph number
// stand, and where it ends.
type component struct{ at, end int }

// components lists the parts of an outline; none for a simple glyph.
func components(outline []byte) ([]component, error) {
	be := binary.BigEndian
	if len(outline) == 0 || int16(be.Uint16(outline)) >= 0 {
		return nil, nil
	}
	var list []component
	for at := 10; ; {
		if at+4 > len(outline) {
			return nil, fmt.Errorf("composite outline cut short")
		}
		flags := be.Uint16(outline[at:])
		size := 6
		if flags&componentWords != 0 {
			size += 2
		}
		switch {
		case flags&componentScale != 0:
			size += 2
		case flags&componentScaleXY != 0:
			size += 4
		case flags&componentMatrix != 0:
			size += 8
		}
		if at+size > len(outline) {
			return nil, fmt.Errorf("composite outline cut short")
		}
		list = append(list, component{at, at + size})
		at += size
		if flags&componentMore == 0 {
			return list, nil
		}
	}
}

// closure adds the glyphs that composites are made of and sorts.
func (g *glyphTable) closure(glyphs []uint16) ([]uint16, error) {
	for i := 0; i < len(glyphs); i++ { // grows while it runs
		outline, err := g.outline(glyphs[i])
		if err != nil {
			return nil, err
		}
		parts, err := components(outline)
		if err != nil {
			return nil, err
		}
		for _, c := range parts {
			if n := binary.BigEndian.Uint16(outline[c.at+2:]); !slices.Contains(glyphs, n) {
				glyphs = append(glyphs, n)
			}
		}
	}
	slices.Sort(glyphs)
	return slices.Compact(glyphs), nil
}

// rewritten is the outline of a glyph without instructions and with the parts of
// a composite renumbered.
func (g *glyphTable) rewritten(i uint16, number map[uint16]uint16) ([]byte, error) {
	outline, err := g.outline(i)
	if err != nil || len(outline) == 0 {
		return nil, err
	}
	be := binary.BigEndian
	parts, err := components(outline)
	if err != nil {
		return nil, err
	}
	if parts == nil {
		length := 10 + 2*int(be.Uint16(outline)) // header and contour ends
		if length+2 > len(outline) {
			return nil, fmt.Errorf("outline of glyph %d cut short", i)
		}
		rest := length + 2 + int(be.Uint16(outline[length:]))
		if rest > len(outline) {
			return nil, fmt.Errorf("outline of glyph %d cut short", i)
		}
		return slices.Concat(outline[:length], []byte{0, 0}, outline[rest:]), nil
	}
	out := slices.Clone(outline[:parts[len(parts)-1].end])
	for _, c := range parts {
		be.PutUint16(out[c.at:], be.Uint16(out[c.at:])&^componentInstructions)
		be.PutUint16(out[c.at+2:], number[be.Uint16(out[c.at+2:])])
	}
	return out, nil
}

// characterMap is a cmap table of format 4 for sorted runes below U+FFFF, one
// segment for each stretch in which runes and glyphs count up together.
func characterMap(runes []rune, cmap *[0x10000]uint16, number map[uint16]uint16) []byte {
	type segment struct{ from, to, glyph uint16 }
	var list []segment
	for _, r := range runes {
		n := number[cmap[r]]
		if k := len(list) - 1; k >= 0 && list[k].to+1 == uint16(r) && list[k].glyph+(list[k].to-list[k].from)+1 == n {
			list[k].to++
			continue
		}
		list = append(list, segment{uint16(r), uint16(r), n})
	}
	list = append(list, segment{0xFFFF, 0xFFFF, 0}) // the end mark that the format asks for
	be := binary.BigEndian
	search, selector, shift := searchRange(len(list), 2)
	out := []byte{0, 0, 0, 1, 0, 3, 0, 1, 0, 0, 0, 12} // one table: Windows, Unicode
	for _, v := range []uint16{4, uint16(16 + 8*len(list)), 0, uint16(2 * len(list)), search, selector, shift} {
		out = be.AppendUint16(out, v)
	}
	for _, s := range list {
		out = be.AppendUint16(out, s.to)
	}
	out = be.AppendUint16(out, 0)
	for _, s := range list {
		out = be.AppendUint16(out, s.from)
	}
	for _, s := range list {
		out = be.AppendUint16(out, s.glyph-s.from)
	}
	return append(out, make([]byte, 2*len(list))...) // no range offsets
}

// keptNames is a name table with the copyright and licence notices, once, in the
// one-byte form, and what readers ask for: family, style, full and PostScript
// name in UTF-16.
func keptNames(table []byte) ([]byte, error) {
	const header, record = 6, 12
	be := binary.BigEndian
	strings := int(be.Uint16(table[4:]))
	var records, storage []byte
	for i := range int(be.Uint16(table[2:])) {
		at := header + i*record
		if at+record > len(table) {
			return nil, fmt.Errorf("font table %q cut short", "name")
		}
		platform, id := be.Uint16(table[at:]), be.Uint16(table[at+6:])
		length, offset := int(be.Uint16(table[at+8:])), strings+int(be.Uint16(table[at+10:]))
		notice := platform == 1 && (id == 0 || id == 13)
		name := platform == 3 && (id == 1 || id == 2 || id == 4 || id == 6)
		if !notice && !name {
			continue
		}
		if offset+length > len(table) {
			return nil, fmt.Errorf("font table %q cut short", "name")
		}
		records = append(records, table[at:at+record-2]...)
		records = be.AppendUint16(records, uint16(len(storage)))
		storage = append(storage, table[offset:offset+length]...)
	}
	out := be.AppendUint16([]byte{0, 0}, uint16(len(records)/record))
	out = be.AppendUint16(out, uint16(header+len(records)))
	return slices.Concat(out, records, storage), nil
}

// searchRange gives the three numbers that let a reader halve its way through n
// entries of the given size.
func searchRange(n int, size uint16) (search, selector, shift uint16) {
	power := uint16(1)
	for int(power)*2 <= n {
		power *= 2
		selector++
	}
	return power * size, selector, uint16(n)*size - power*size
}

// writeTables joins tables to a font file, in the order of their names.
func writeTables(tables map[string][]byte) []byte {
	names := make([]string, 0, len(tables))
	for name := range tables {
		names = append(names, name)
	}
	slices.Sort(names)
	be := binary.BigEndian
	search, selector, shift := searchRange(len(names), tableRecord)
	out := be.AppendUint32(nil, sfntTrueType)
	for _, v := range []uint16{uint16(len(names)), search, selector, shift} {
		out = be.AppendUint16(out, v)
	}
	offset := 12 + tableRecord*len(names)
	headAt := 0
	for _, name := range names {
		if name == "head" {
			headAt = offset
		}
		out = append(out, name...)
		out = be.AppendUint32(out, checksum(tables[name]))
		out = be.AppendUint32(out, uint32(offset))
		out = be.AppendUint32(out, uint32(len(tables[name])))
		offset += (len(tables[name]) + 3) / 4 * 4
	}
	for _, name := range names {
		out = append(out, tables[name]...)
		for len(out)%4 != 0 {
			out = append(out, 0)
		}
	}
	be.PutUint32(out[headAt+headAdjustment:], checksumTarget-checksum(out))
	return out
}

// checksum is the sum of the data as big-endian words, padded with zeros.
func checksum(data []byte) uint32 {
	var sum uint32
	for i := 0; i < len(data); i += 4 {
		var word [4]byte
		copy(word[:], data[i:])
		sum += binary.BigEndian.Uint32(word[:])
	}
	return sum
}
