package ink

import (
	"bytes"
	"compress/zlib"
	"crypto/sha256"
	"fmt"
	"io"
	"sync"
	"time"
	"unicode/utf16"
)

// pdfDoc is a document while it is put together.
type pdfDoc struct {
	sheets  []*Recorder
	marks   map[markKey]place
	objects [][]byte // by number, what stands between "obj" and "endobj"; 0 is none
	faces   [len(faceNames)]pdfFace
	images  map[string]pdfImage // by sum of the file
	shown   []string            // their sums, in order of appearance
}

// reserve makes room up to object n.
func (d *pdfDoc) reserve(n int) { d.objects = make([][]byte, n+1) }

// add appends an object and returns its number.
func (d *pdfDoc) add(object []byte) int {
	d.objects = append(d.objects, object)
	return len(d.objects) - 1
}

// deflaters are compressors at rest: making one costs more than using it for a page.
var deflaters = sync.Pool{New: func() any {
	w, _ := zlib.NewWriterLevel(io.Discard, zlib.BestSpeed) // fails on no level but a wrong one
	return w
}}

// pageShrinks is how much smaller a page is compressed, at least as a rule.
const pageShrinks = 3

// stream is a stream object of data, compressed; entries are put in its dictionary.
func stream(data []byte, entries string) []byte {
	var packed bytes.Buffer
	packed.Grow(len(data) / pageShrinks)
	w := deflaters.Get().(*zlib.Writer)
	defer deflaters.Put(w)
	w.Reset(&packed)
	_, _ = w.Write(data) // a Buffer takes everything
	_ = w.Close()
	out := make([]byte, 0, packed.Len()+len(entries)+64)
	out = fmt.Appendf(out, "<<%s/Filter /FlateDecode /Length %d>>\nstream\n", entries, packed.Len())
	out = append(out, packed.Bytes()...)
	return append(out, "\nendstream"...)
}

// textString is a text of the document's own dictionaries, in UTF-16.
func textString(s string) []byte {
	units := utf16.Encode([]rune(Clean(s)))
	raw := make([]byte, 0, 2+2*len(units))
	raw = append(raw, 0xFE, 0xFF)
	for _, u := range units {
		raw = append(raw, byte(u>>8), byte(u))
	}
	return escaped(nil, raw)
}

// escaped appends raw as a literal string.
func escaped(b, raw []byte) []byte {
	b = append(b, '(')
	for _, c := range raw {
		switch c {
		case '(', ')', '\\':
			b = append(b, '\\', c)
		case '\r': // a reader would make it a line feed
			b = append(b, '\\', 'r')
		default:
			b = append(b, c)
		}
	}
	return append(b, ')')
}

// tree writes the list of pages and what they draw with.
func (d *pdfDoc) tree() {
	b := []byte("<</Type /Pages /Kids [")
	for i := range d.sheets {
		b = fmt.Appendf(b, "%d 0 R ", pageObject(i+1))
	}
	d.objects[pagesObject] = fmt.Appendf(b, "] /Count %d>>", len(d.sheets))
	b = []byte("<</Font <<")
	for i, f := range d.faces {
		if f.object > 0 {
			b = fmt.Appendf(b, "/F%d %d 0 R ", i, f.object)
		}
	}
	b = append(b, ">> /XObject <<"...)
	for _, sum := range d.shown {
		b = fmt.Appendf(b, "/I%d %d 0 R ", d.images[sum].object, d.images[sum].object)
	}
	d.objects[resourcesObject] = append(b, ">>>>"...)
}

// bookmarks writes one bookmark a titled sheet and returns the number of their list,
// or 0 for none.
func (d *pdfDoc) bookmarks() int {
	var titled []int
	for i, s := range d.sheets {
		if s.Title != "" {
			titled = append(titled, i)
		}
	}
	if len(titled) == 0 {
		return 0
	}
	first := len(d.objects)
	list, last := first+len(titled), first+len(titled)-1
	for k, i := range titled {
		s := d.sheets[i]
		b := append([]byte("<</Title "), textString(s.Title)...)
		b = fmt.Appendf(b, " /Parent %d 0 R", list)
		if k > 0 {
			b = fmt.Appendf(b, " /Prev %d 0 R", first+k-1)
		}
		if first+k < last {
			b = fmt.Appendf(b, " /Next %d 0 R", first+k+1)
		}
		d.add(append(destination(b, i+1, s.H), ">>"...))
	}
	return d.add(fmt.Appendf(nil, "<</Type /Outlines /First %d 0 R /Last %d 0 R /Count %d>>", first, last, len(titled)))
}

// destination appends the place y mm above the foot of a page.
func destination(b []byte, page int, y float64) []byte {
	return fmt.Appendf(b, " /Dest [%d 0 R /XYZ 0 %.2f null]", pageObject(page), y*pointsPerMM)
}

func (d *pdfDoc) catalog(bookmarks int) int {
	b := fmt.Appendf(nil, "<</Type /Catalog /Pages %d 0 R /PageLayout /SinglePage /OpenAction [%d 0 R /Fit]", pagesObject, pageObject(1))
	if bookmarks > 0 {
		b = fmt.Appendf(b, " /Outlines %d 0 R /PageMode /UseOutlines", bookmarks)
	}
	return d.add(append(b, ">>"...))
}

// about writes what the document tells about itself. Without a date the Unix epoch
// stands in: the clock would make every copy another document.
func (d *pdfDoc) about(info Info) int {
	date := info.Date.UTC()
	if date.IsZero() {
		date = time.Unix(0, 0).UTC()
	}
	b := []byte("<</Producer (Gloamwright)")
	for _, e := range []struct{ key, text string }{
		{"Title", info.Title}, {"Author", info.Author}, {"Subject", info.Subject}, {"Keywords", info.Keywords},
	} {
		if e.text != "" {
			b = append(fmt.Appendf(b, "\n/%s ", e.key), textString(e.text)...)
		}
	}
	stamp := date.Format("20060102150405")
	return d.add(fmt.Appendf(b, "\n/CreationDate (D:%sZ) /ModDate (D:%sZ)>>", stamp, stamp))
}

// file writes the objects, where each stands, and the trailer (ISO 32000-1, 7.5). The
// identifier is the sum of the content.
func (d *pdfDoc) file(catalog, about int) []byte {
	size := 0
	for _, o := range d.objects {
		size += len(o) + 64 // and its head and its entry
	}
	out := make([]byte, 0, size+256)
	out = append(out, "%PDF-1.4\n%\xE2\xE3\xCF\xD3\n"...) // four bytes above 127: the file is no text
	at := make([]int, len(d.objects))
	for i, o := range d.objects[1:] {
		at[i+1] = len(out)
		out = fmt.Appendf(out, "%d 0 obj\n", i+1)
		out = append(out, o...)
		out = append(out, "\nendobj\n"...)
	}
	sum := sha256.Sum256(out)
	start := len(out)
	out = fmt.Appendf(out, "xref\n0 %d\n0000000000 65535 f \n", len(at))
	for _, a := range at[1:] {
		out = fmt.Appendf(out, "%010d 00000 n \n", a)
	}
	return fmt.Appendf(out, "trailer\n<</Size %d /Root %d 0 R /Info %d 0 R /ID [<%x> <%[4]x>]>>\nstartxref\n%d\n%%%%EOF\n",
		len(at), catalog, about, sum[:16], start)
}
