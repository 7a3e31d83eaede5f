package describe

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"

	"gopkg.in/yaml.v3"
)

// source is one file with its lines, for placing spans.
type source struct {
	file  string
	lines [][]rune
}

// byteOrderMark may start a file; columns do not count it.
const byteOrderMark = "\ufeff"

func newSource(file string, src []byte) *source {
	s := &source{file: file}
	for _, l := range splitLines(src) {
		s.lines = append(s.lines, []rune(l))
	}
	return s
}

// splitLines returns the lines of src without their ends: LF, CR LF or CR.
func splitLines(src []byte) []string {
	text := strings.TrimPrefix(string(src), byteOrderMark)
	text = strings.ReplaceAll(text, "\r\n", "\n")
	return strings.Split(strings.ReplaceAll(text, "\r", "\n"), "\n")
}

// span returns a stretch that lies inside the file, as near as can be to what is
// asked. On an empty line it is column 1 with length 0.
func (s *source) span(line, col, length int) Span {
	line = min(max(line, 1), len(s.lines))
	n := len(s.lines[line-1])
	if n == 0 {
		return Span{File: s.file, Line: line, Col: 1}
	}
	col = min(max(col, 1), n)
	return Span{File: s.file, Line: line, Col: col, Len: min(max(length, 1), n-col+1)}
}

// start returns the first character of the file that is not blank.
func (s *source) start() Span {
	for i, l := range s.lines {
		if t := strings.TrimLeft(string(l), " \t"); t != "" {
			return s.span(i+1, len(l)-len([]rune(t))+1, 1)
		}
	}
	return s.span(1, 1, 1)
}

// of returns the span of a node: the whole of a scalar on one line, the first key of
// a block mapping, a flow collection up to its end or the end of the line.
func (s *source) of(n *yaml.Node) Span {
	line, col := n.Line, n.Column
	if n.Kind == yaml.MappingNode && n.Style&yaml.FlowStyle == 0 && len(n.Content) > 0 {
		return s.of(n.Content[0])
	}
	if line < 1 || line > len(s.lines) || col < 1 || col > len(s.lines[line-1]) {
		return s.span(line, col, 1)
	}
	text := s.lines[line-1][col-1:]
	skip := properties(text)
	text = text[skip:]
	return s.span(line, col+skip, extent(n, text))
}

// properties returns the length of the anchor and tag in front of a value.
func properties(text []rune) int {
	i := 0
	for i < len(text) && (text[i] == '&' || text[i] == '!') {
		j := i
		for j < len(text) && text[j] != ' ' {
			j++
		}
		for j < len(text) && text[j] == ' ' {
			j++
		}
		if j == len(text) {
			return i
		}
		i = j
	}
	return i
}

// extent returns how many characters of text, which starts at n, belong to n.
func extent(n *yaml.Node, text []rune) int {
	switch {
	case n.Kind == yaml.DocumentNode:
		return until(text, func(r rune) bool { return r != '-' })
	case n.Kind == yaml.AliasNode:
		return until(text, func(r rune) bool { return strings.ContainsRune(" ,]}", r) })
	case n.Kind != yaml.ScalarNode:
		return closing(text)
	case n.Style&yaml.DoubleQuotedStyle != 0:
		return quoted(text, '"')
	case n.Style&yaml.SingleQuotedStyle != 0:
		return quoted(text, '\'')
	case n.Style&(yaml.LiteralStyle|yaml.FoldedStyle) != 0:
		return 1
	}
	if v := []rune(n.Value); len(v) <= len(text) && string(text[:len(v)]) == n.Value {
		return len(v)
	}
	plain := string(text)
	if i := strings.Index(plain, " #"); i >= 0 {
		plain = plain[:i]
	}
	return utf8.RuneCountInString(strings.TrimRight(plain, " "))
}

func until(text []rune, stop func(rune) bool) int {
	for i, r := range text {
		if stop(r) {
			return i
		}
	}
	return len(text)
}

// quoted returns the length of the quoted text that starts text, both marks included.
func quoted(text []rune, mark rune) int {
	for i := 1; i < len(text); i++ {
		switch {
		case text[i] == '\\' && mark == '"':
			i++
		case text[i] == mark && mark == '\'' && i+1 < len(text) && text[i+1] == mark:
			i++
		case text[i] == mark:
			return i + 1
		}
	}
	return len(text)
}

// closing returns the length of the flow collection that starts text, or 1 for a
// block one.
func closing(text []rune) int {
	if len(text) == 0 || text[0] != '[' && text[0] != '{' {
		return 1
	}
	depth := 0
	for i := 0; i < len(text); i++ {
		switch text[i] {
		case '[', '{':
			depth++
		case ']', '}':
			depth--
			if depth == 0 {
				return i + 1
			}
		case '"', '\'':
			if before := text[i-1]; strings.ContainsRune(" ,[{:", before) {
				i += quoted(text[i:], text[i]) - 1
			}
		}
	}
	return len(text)
}

// within returns the span of the characters from start (counted from 0) of n's
// value, when the value stands in the file as it is; else the span of n.
func (s *source) within(n *yaml.Node, start, length int) Span {
	whole := s.of(n)
	skip := 0
	if n.Style&(yaml.DoubleQuotedStyle|yaml.SingleQuotedStyle) != 0 {
		skip = 1
	}
	text := s.lines[whole.Line-1][whole.Col-1:]
	value := []rune(n.Value)
	if skip+len(value) > len(text) || string(text[skip:skip+len(value)]) != n.Value {
		return whole
	}
	return s.span(whole.Line, whole.Col+skip+start, length)
}

// badCharacter finds the first character that cannot stand in a description: broken
// UTF-8, a control character, a line end other than LF, CR LF and CR, or one that
// changes the direction of writing.
func badCharacter(src []byte) (line, col int, what string) {
	line, col = 1, 1
	src = []byte(strings.TrimPrefix(string(src), byteOrderMark))
	for i := 0; i < len(src); {
		r, size := utf8.DecodeRune(src[i:])
		switch {
		case r == utf8.RuneError && size == 1:
			return line, col, fmt.Sprintf("the byte %02X is not UTF-8", src[i])
		case r == '\n', r == '\r' && (i+1 == len(src) || src[i+1] != '\n'):
			line, col = line+1, 0
		case r != '\t' && r != '\r' && unprintable(r):
			return line, col, fmt.Sprintf("the character %U cannot stand here", r)
		}
		i += size
		col++
	}
	return 0, 0, ""
}

// unprintable reports whether r has no shape of its own or turns the text around it.
func unprintable(r rune) bool {
	return unicode.IsControl(r) || r == '\u2028' || r == '\u2029' || r == '\ufeff' ||
		unicode.Is(unicode.Bidi_Control, r) || r == unicode.ReplacementChar || r >= '\ufff0' && r <= '\uffff' || unicode.Is(unicode.Co, r)
}
