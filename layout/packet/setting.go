package packet

import (
	"regexp"
	"strings"
	"unicode"
	"unicode/utf8"

	"gloamwright/layout/ink"
)

// Marks of bold text within a text; standing texts write them as **.
const (
	boldOn  = '\uE000'
	boldOff = '\uE001'
)

// bold marks a stretch of text.
func bold(text string) string { return string(boldOn) + text + string(boldOff) }

// span is a stretch of text in one font. ref is the designation that it names.
type span struct {
	text  string
	font  ink.Font
	color ink.Color
	ref   string
	drop  float64 // mm below the baseline, of an index
	pre   float64 // mm kept free before it
}

// line is one set line.
type line []span

func (l line) width() float64 {
	w := 0.0
	for _, s := range l {
		w += s.pre + ink.Width(s.text, s.font)
	}
	return w
}

// String is the line's text.
func (l line) String() string {
	var b strings.Builder
	for _, s := range l {
		b.WriteString(s.text)
	}
	return b.String()
}

// designation is a reference designation after IEC 81346 with or without terminal.
var designation = regexp.MustCompile(`-[A-Z]{1,2}\d+(\.\d+)?(:[\p{L}\d]*[+−]?)?`)

// monoShare is the size of Go Mono beside the other faces.
const monoShare = 0.97

// findDesignations lists the stretches of text that are designations.
func findDesignations(text string) [][2]int {
	var out [][2]int
	for _, m := range designation.FindAllStringIndex(text, -1) {
		if r, _ := utf8.DecodeLastRuneInString(text[:m[0]]); m[0] > 0 && (unicode.IsLetter(r) || unicode.IsDigit(r) || r == '_' || r == '-' || r == '/') {
			continue
		}
		for m[1] > m[0] && text[m[1]-1] == ':' {
			m[1]--
		}
		out = append(out, [2]int{m[0], m[1]})
	}
	return out
}

// spans sets a text in one style: designations in Go Mono, marked stretches bold.
func spans(text string, st style) line {
	text = glue(text)
	var out line
	strong := false
	put := func(s, ref string) {
		if s == "" {
			return
		}
		t := st
		if strong {
			t.face = ink.Bold
		}
		if ref != "" {
			t.face = ink.Mono
			if st.face == ink.Bold || st.face == ink.MonoBold || strong {
				t.face = ink.MonoBold
			}
			if st.face != ink.Mono && st.face != ink.MonoBold {
				t.pt *= monoShare
			}
		}
		out = append(out, fallBack(span{text: s, font: t.font(), color: st.color, ref: ref})...)
	}
	plain := func(s string) {
		for s != "" {
			i := strings.IndexAny(s, string(boldOn)+string(boldOff))
			if i < 0 {
				put(s, "")
				return
			}
			put(s[:i], "")
			r, n := utf8.DecodeRuneInString(s[i:])
			strong = r == boldOn
			s = s[i+n:]
		}
	}
	last := 0
	for _, m := range findDesignations(text) {
		plain(text[last:m[0]])
		put(text[m[0]:m[1]], text[m[0]:m[1]])
		last = m[1]
	}
	plain(text[last:])
	return out
}

// fallBack sets signs that the face lacks in Go Regular, which has more.
func fallBack(s span) line {
	lost := ink.Missing(s.text, s.font.Face)
	if len(lost) == 0 {
		return line{s}
	}
	var out line
	for _, r := range s.text {
		t := s
		t.text = string(r)
		if strings.ContainsRune(string(lost), r) {
			t.font.Face = ink.Regular
		}
		out = out.add(t)
	}
	return out
}

// add appends a span, joined to the last one if it looks the same.
func (l line) add(s span) line {
	if n := len(l); n > 0 {
		p := &l[n-1]
		if p.font == s.font && p.color == s.color && p.ref == s.ref && p.drop == s.drop && s.pre == 0 && s.ref == "" {
			p.text += s.text
			return l
		}
	}
	return append(l, s)
}

// words cuts a line at its breakable spaces.
func (l line) words() []line {
	var out []line
	var word line
	for _, s := range l {
		for i, piece := range strings.Split(s.text, " ") {
			if i > 0 {
				if word != nil {
					out = append(out, word)
				}
				word = nil
			}
			if piece != "" {
				t := s
				t.text = piece
				word = word.add(t)
			}
		}
	}
	if word != nil {
		out = append(out, word)
	}
	return out
}

// wrap breaks a text into lines of at most width mm. A word wider than a line is
// broken anywhere, but a designation never.
func wrap(text string, st style, width float64) []line { return wrapLine(spans(text, st), st, width) }

func wrapLine(l line, st style, width float64) []line {
	space := span{text: " ", font: st.font(), color: st.color}
	gap := ink.Width(" ", space.font)
	var out []line
	var cur line
	at := 0.0
	for _, w := range l.words() {
		ww := w.width()
		if cur != nil && at+gap+ww <= width {
			cur = cur.add(space)
			for _, s := range w {
				cur = cur.add(s)
			}
			at += gap + ww
			continue
		}
		if cur != nil {
			out = append(out, cur)
			cur, at = nil, 0
		}
		if ww > width {
			pieces := broken(w, width)
			out = append(out, pieces[:len(pieces)-1]...)
			w = pieces[len(pieces)-1]
			ww = w.width()
		}
		cur, at = w, ww
	}
	if cur != nil {
		out = append(out, cur)
	}
	return out
}

// broken cuts a word that is wider than a line: at a no-break space if it has one,
// else before the letter that does not fit.
func broken(w line, width float64) []line {
	var out []line
	var cur line
	at := 0.0
	flush := func() {
		if cur != nil {
			out = append(out, cur)
		}
		cur, at = nil, 0
	}
	for _, s := range w {
		if s.ref != "" {
			sw := ink.Width(s.text, s.font)
			if at+sw > width {
				flush()
			}
			cur, at = cur.add(s), at+sw
			continue
		}
		for _, piece := range breakable(s.text) {
			if pw := ink.Width(strings.TrimRight(piece, noBreak), s.font); pw <= width {
				if at+pw > width {
					flush()
				}
				t := s
				t.text = piece
				cur, at = cur.add(t), at+ink.Width(piece, s.font)
				continue
			}
			for _, r := range piece {
				t := s
				t.text = string(r)
				rw := ink.Width(t.text, t.font)
				if at+rw > width {
					flush()
				}
				cur, at = cur.add(t), at+rw
			}
		}
	}
	flush()
	return out
}

// breakable cuts a word where it breaks best: behind no-break spaces, and behind hyphens
// between letters.
func breakable(word string) []string {
	var out []string
	start := 0
	runes := []rune(word)
	for i, r := range runes {
		hyphen := r == '-' && i > 0 && i < len(runes)-1 && unicode.IsLetter(runes[i-1]) && unicode.IsLetter(runes[i+1])
		if hyphen || string(r) == noBreak {
			out = append(out, string(runes[start:i+1]))
			start = i + 1
		}
	}
	return append(out, string(runes[start:]))
}

// cutLine is a text on one line of at most width mm, with an ellipsis where it had to
// be cut.
func cutLine(text string, st style, width float64) (l line, cut bool) {
	l = spans(text, st)
	if l.width() <= width {
		return l, false
	}
	return clip(l, st, width), true
}

// clip takes letters away until the line ends with an ellipsis within width.
func clip(l line, st style, width float64) line {
	dots := span{text: "…", font: st.font(), color: st.color}
	left := width - ink.Width(dots.text, dots.font)
	var out line
	for _, s := range l {
		if w := ink.Width(s.text, s.font); w <= left {
			out, left = append(out, s), left-w
			continue
		}
		if s.ref == "" {
			t := s
			t.text = ""
			for _, r := range s.text {
				if ink.Width(t.text+string(r), t.font) > left {
					break
				}
				t.text += string(r)
			}
			if t.text = strings.TrimRight(t.text, " ,;"+noBreak); t.text != "" {
				out = append(out, t)
			}
		}
		break
	}
	return append(out, dots)
}

// cutLines is wrap with at most n lines; the last ends with an ellipsis if the text
// had to be cut.
func cutLines(text string, st style, width float64, n int) (lines []line, cut bool) {
	lines = wrap(text, st, width)
	if len(lines) <= n {
		return lines, false
	}
	last := lines[n-1]
	dots := span{text: "…", font: st.font(), color: st.color}
	if last.width()+ink.Width("…", dots.font) > width {
		last = clip(last, st, width)
	} else {
		last = last.add(dots)
	}
	return append(lines[:n-1:n-1], last), true
}
