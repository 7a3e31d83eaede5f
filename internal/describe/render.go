package describe

import (
	"bufio"
	"fmt"
	"io"
	"strconv"
	"strings"
	"unicode"

	"golang.org/x/text/width"
)

// Write prints l as text: for each diagnostic the place, the line with a mark under
// the place, what was expected, and the related places. Lines come from sources,
// usually Site.Sources; a place without a source prints without its line.
func (l List) Write(w io.Writer, sources Sources) error {
	p := &printer{w: bufio.NewWriter(w), sources: sources, lines: map[string][]string{}}
	for i, d := range l {
		if i > 0 {
			p.w.WriteByte('\n')
		}
		p.diagnostic(d)
	}
	return p.w.Flush()
}

// Render returns what Write prints.
func (l List) Render(sources Sources) string {
	var b strings.Builder
	l.Write(&b, sources) // a strings.Builder takes everything
	return b.String()
}

// printer writes diagnostics; bufio keeps its first error for Flush.
type printer struct {
	w       *bufio.Writer
	sources Sources
	lines   map[string][]string // by file, split once
}

func (p *printer) diagnostic(d Diagnostic) {
	fmt.Fprintf(p.w, "%s%v: %s [%s]\n", prefix(d.At), d.Severity, d.Summary, d.Code)
	p.excerpt(d.At)
	if d.Detail != "" {
		fmt.Fprintf(p.w, "  %s\n", d.Detail)
	}
	for _, r := range d.Related {
		fmt.Fprintf(p.w, "  %s%s:\n", prefix(r.At), r.Message)
		p.excerpt(r.At)
	}
}

// String returns "file:line:column".
func (s Span) String() string {
	if s.Line == 0 {
		return s.File
	}
	return fmt.Sprintf("%s:%d:%d", s.File, s.Line, s.Col)
}

func prefix(s Span) string {
	if t := s.String(); t != "" {
		return t + ": "
	}
	return ""
}

// excerptWidth bounds the columns of a line that are shown.
const excerptWidth = 110

// excerpt prints the line of s and a mark under its stretch. The blanks before the
// mark repeat the line's tabs and allow for wide characters.
func (p *printer) excerpt(s Span) {
	line, ok := p.line(s)
	if !ok {
		return
	}
	from, to, text := window(line, s)
	number := strconv.Itoa(s.Line)
	gutter := strings.Repeat(" ", len(number))
	fmt.Fprintf(p.w, "  %s | %s\n  %s | %s%s\n", number, text, gutter, blanks(from), strings.Repeat("^", max(columns(to), 1)))
}

func (p *printer) line(s Span) ([]rune, bool) {
	lines, split := p.lines[s.File]
	if !split {
		if src, ok := p.sources[s.File]; ok {
			lines = splitLines(src)
		}
		p.lines[s.File] = lines
	}
	if s.Line < 1 || s.Line > len(lines) {
		return nil, false
	}
	shown := func(r rune) rune {
		if r == '\t' {
			return r
		}
		return visible(r)
	}
	return []rune(strings.Map(shown, strings.ToValidUTF8(lines[s.Line-1], "?"))), true
}

// window cuts a long line to a stretch around s. It returns the text before the
// mark, the text that is marked, and all that is shown.
func window(line []rune, s Span) (before, marked []rune, text string) {
	start := min(max(s.Col-1, 0), len(line))
	end := min(start+s.Len, len(line))
	low, high := 0, len(line)
	if len(line) > excerptWidth {
		low = max(0, min(start-excerptWidth/2, len(line)-excerptWidth))
		high = low + excerptWidth
		end = min(end, high)
	}
	left, right := "", ""
	if low > 0 {
		left = "…"
	}
	if high < len(line) {
		right = "…"
	}
	return append([]rune(left), line[low:start]...), line[start:end], left + string(line[low:high]) + right
}

// blanks returns white space as wide as text, tabs kept.
func blanks(text []rune) string {
	var b strings.Builder
	for _, r := range text {
		if r == '\t' {
			b.WriteByte('\t')
			continue
		}
		b.WriteString(strings.Repeat(" ", columnsOf(r)))
	}
	return b.String()
}

func columns(text []rune) int {
	n := 0
	for _, r := range text {
		n += columnsOf(r)
	}
	return n
}

// columnsOf returns how many terminal columns r takes: none for a combining mark,
// two for a wide character (Unicode annex 11), else one.
func columnsOf(r rune) int {
	if unicode.In(r, unicode.Mn, unicode.Me, unicode.Cf) {
		return 0
	}
	switch width.LookupRune(r).Kind() {
	case width.EastAsianWide, width.EastAsianFullwidth:
		return 2
	}
	return 1
}
