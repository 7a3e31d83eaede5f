package ink

import (
	"crypto/sha256"
	"encoding/binary"
	"fmt"
	"slices"
	"strings"
)

// pdfFace is a face of the document; object 0 says that nothing is written in it.
type pdfFace struct{ object int }

// toUnicode says that signs are numbered by their Unicode value (Adobe Technical Note
// 5411), so that text can be searched and copied.
const toUnicode = `/CIDInit /ProcSet findresource begin
12 dict begin
begincmap
/CIDSystemInfo <</Registry (Adobe) /Ordering (UCS) /Supplement 0>> def
/CMapName /Adobe-Identity-UCS def
/CMapType 2 def
1 begincodespacerange
<0000> <FFFF>
endcodespacerange
1 beginbfrange
<0000> <FFFF> <0000>
endbfrange
endcmap
CMapName currentdict /CMap defineresource pop
end
end`

// Entries of the tables head, hhea and post (ISO/IEC 14496-22), and flags of a font
// descriptor (ISO 32000-1, table 123).
const (
	headBox      = 36
	hheaAscender = 4
	postAngle    = 4

	flagFixed    = 1 << 0
	flagSymbolic = 1 << 2
	flagItalic   = 1 << 6

	stemUnknown   = 80 // nobody measures the Go faces' stems; readers that have the glyphs do not look
	pdfUnitsPerEm = 1000
)

// fonts writes the faces in which something is written.
func (d *pdfDoc) fonts() error {
	var seen [len(faceNames)]map[rune]bool
	var runes [len(faceNames)][]rune
	for i := range seen {
		seen[i] = map[rune]bool{}
	}
	for _, s := range d.sheets {
		walk(s.Calls, func(c Call) {
			w, ok := c.(Written)
			if !ok {
				return
			}
			for _, r := range w.Text {
				if f := w.Font.Face; !seen[f][r] {
					seen[f][r] = true
					runes[f] = append(runes[f], r)
				}
			}
		})
	}
	common := 0
	for i := range runes {
		if len(runes[i]) == 0 {
			continue
		}
		if common == 0 {
			common = d.add(stream([]byte(toUnicode), ""))
		}
		slices.Sort(runes[i])
		object, err := d.face(Face(i), runes[i], common)
		if err != nil {
			return fmt.Errorf("face %s: %w", Face(i), err)
		}
		d.faces[i].object = object
	}
	return nil
}

// face writes one face with the glyphs of runes, which are sorted.
func (d *pdfDoc) face(f Face, runes []rune, toUnicode int) (int, error) {
	m := metrics(f)
	file, number, err := subsetGlyphs(fontFile(f), &m.cmap, runes)
	if err != nil {
		return 0, err
	}
	tables, err := readTables(file)
	if err != nil {
		return 0, err
	}
	be := binary.BigEndian
	em := func(table string, at int) int {
		return int(int16(be.Uint16(tables[table][at:]))) * pdfUnitsPerEm / unitsPerEm
	}
	name := subsetTag(file) + "+Go-" + f.String()
	flags := flagSymbolic
	if strings.HasPrefix(f.String(), "mono") {
		flags |= flagFixed
	}
	angle := int(int32(be.Uint32(tables["post"][postAngle:])) >> 16)
	if angle != 0 {
		flags |= flagItalic
	}
	toGlyph := make([]byte, 2*(int(runes[len(runes)-1])+1))
	widths := []byte("[")
	for i, r := range runes {
		be.PutUint16(toGlyph[2*r:], number[m.cmap[r]])
		if i == 0 || runes[i-1] != r-1 {
			if i > 0 {
				widths = append(widths, ']')
			}
			widths = fmt.Appendf(widths, " %d [", r)
		}
		widths = fmt.Appendf(widths, "%.2f ", float64(m.glyphs[m.index(r)].advance)*pdfUnitsPerEm/unitsPerEm)
	}
	widths = append(widths, "]]"...)
	data := d.add(stream(file, fmt.Sprintf("/Length1 %d ", len(file))))
	glyphMap := d.add(stream(toGlyph, ""))
	descriptor := d.add(fmt.Appendf(nil, "<</Type /FontDescriptor /FontName /%s /Flags %d /FontBBox [%d %d %d %d] /ItalicAngle %d /Ascent %d /Descent %d /CapHeight %d /StemV %d /FontFile2 %d 0 R>>",
		name, flags, em("head", headBox), em("head", headBox+2), em("head", headBox+4), em("head", headBox+6), angle,
		em("hhea", hheaAscender), em("hhea", hheaAscender+2), capHeight*pdfUnitsPerEm/unitsPerEm, stemUnknown, data))
	descendant := d.add(fmt.Appendf(nil, "<</Type /Font /Subtype /CIDFontType2 /BaseFont /%s /CIDSystemInfo <</Registry (Adobe) /Ordering (UCS) /Supplement 0>> /FontDescriptor %d 0 R /W %s /CIDToGIDMap %d 0 R>>",
		name, descriptor, widths, glyphMap))
	return d.add(fmt.Appendf(nil, "<</Type /Font /Subtype /Type0 /BaseFont /%s /Encoding /Identity-H /DescendantFonts [%d 0 R] /ToUnicode %d 0 R>>",
		name, descendant, toUnicode)), nil
}

// subsetTag is six capitals from the content of a subset, as ISO 32000-1, 9.6.4 asks.
func subsetTag(file []byte) string {
	sum := sha256.Sum256(file)
	tag := make([]byte, 6)
	for i := range tag {
		tag[i] = 'A' + sum[i]%26
	}
	return string(tag)
}
