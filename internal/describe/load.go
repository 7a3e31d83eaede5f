package describe

import (
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"
)

// Limits of a description, so that no file can exhaust the machine. They leave room
// for ten boards with a thousand luminaires many times over.
const (
	MaxSize    = 1 << 20 // bytes of one file
	maxDepth   = 100     // values inside values
	maxNodes   = 300_000 // values, each counted again for every alias that repeats it
	maxAliases = 1000
	maxLegs    = 20_000 // luminaires
	maxStages  = 500
	maxTypes   = 1000 // luminaire types
	maxWays    = 5000 // circuits
	maxSingles = 2000 // single parts, test points
	maxList    = 200  // entries of a list of sizes or ratings
	maxPrices  = 1000 // prices of a firm
	maxReports = 500  // diagnostics

	maxCompared = 50_000 // names that misspelt ones are held against
)

// document parses src to its one top node, nil if there is none or src is broken;
// then the reason is reported.
func (d *decoder) document(src []byte) *yaml.Node {
	if len(src) > MaxSize {
		d.report(codeSize, "file too large", d.src.span(1, 1, 1),
			fmt.Sprintf("A description has at most %d KiB; this one has %d KiB.", MaxSize>>10, len(src)>>10))
		return nil
	}
	if line, col, what := badCharacter(src); line > 0 {
		d.report(codeEncoding, "bad character", d.src.span(line, col, 1),
			"A description is plain UTF-8 text: "+what+". Remove it, or save the file as UTF-8.")
		return nil
	}
	if strings.TrimSpace(strings.TrimPrefix(string(src), byteOrderMark)) == "" {
		d.report(codeEmpty, "empty file", d.src.span(1, 1, 1), "Nothing is written here. Start from a starter: gloamwright new NAME.")
		return nil
	}
	dec := yaml.NewDecoder(strings.NewReader(string(src)))
	var doc, more yaml.Node
	if err := decode(dec, &doc); err != nil && !errors.Is(err, io.EOF) {
		d.syntax(err)
		return nil
	}
	switch err := decode(dec, &more); {
	case err == nil:
		d.report(codeDocuments, "second document", d.src.of(&more),
			`A file holds one description. Remove what follows the line "---", or move it to a file of its own.`)
	case !errors.Is(err, io.EOF):
		d.syntax(err)
		return nil
	}
	top := &doc
	if doc.Kind == yaml.DocumentNode && len(doc.Content) == 1 {
		top = doc.Content[0]
	}
	if top.Kind == 0 || top.Kind == yaml.ScalarNode && top.Tag == "!!null" {
		d.report(codeEmpty, "empty file", d.src.span(1, 1, 1), "Only remarks are written here. Start from a starter: gloamwright new NAME.")
		return nil
	}
	if !d.guard(top) {
		return nil
	}
	return top
}

// decode is dec.Decode, with a panic of the library turned into an error.
func decode(dec *yaml.Decoder, n *yaml.Node) (err error) {
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("yaml: %v", r)
		}
	}()
	return dec.Decode(n)
}

var yamlLine = regexp.MustCompile(`line (\d+): `)

// syntax reports an error of the YAML library. Its line can be one too small, and it
// never has a column; the mark stands under the whole line.
func (d *decoder) syntax(err error) {
	text := strings.TrimPrefix(err.Error(), "yaml: ")
	at, where := d.src.start(), ""
	if m := yamlLine.FindStringSubmatchIndex(text); m != nil {
		line, _ := strconv.Atoi(text[m[2]:m[3]])
		text = text[:m[0]] + text[m[1]:]
		at, where = d.src.wholeLine(line), " in this line or the next"
		if open, ok := d.src.unclosed(line + 1); ok && bracketTrouble(text) {
			at, where = open, " after this bracket"
		}
	}
	d.report(codeSyntax, "not valid YAML", at, "The text cannot be read"+where+": "+explainYAML(text)+".")
}

// wholeLine returns the span of a line without its indent, or of the nearest line
// before it that is not blank.
func (s *source) wholeLine(line int) Span {
	for line = min(max(line, 1), len(s.lines)); line > 1 && strings.TrimSpace(string(s.lines[line-1])) == ""; {
		line--
	}
	l := string(s.lines[line-1])
	t := strings.TrimSpace(l)
	indent := len([]rune(l)) - len([]rune(strings.TrimLeft(l, " \t")))
	return s.span(line, indent+1, len([]rune(t)))
}

// bracketTrouble reports whether a message of the YAML library is about something
// inside brackets or braces.
func bracketTrouble(text string) bool {
	return strings.Contains(text, "did not find expected ','") || strings.Contains(text, "did not find expected node content")
}

// unclosed returns the innermost bracket that is still open at the end of a line.
func (s *source) unclosed(line int) (Span, bool) {
	var open []Span
	for i, text := range s.lines[:min(line, len(s.lines))] {
		for j := 0; j < len(text); j++ {
			starts := j == 0 || strings.ContainsRune(" ,[{:", text[j-1])
			switch c := text[j]; {
			case c == '[' || c == '{':
				open = append(open, s.span(i+1, j+1, 1))
			case (c == ']' || c == '}') && len(open) > 0:
				open = open[:len(open)-1]
			case (c == '"' || c == '\'') && starts:
				j += quoted(text[j:], c) - 1
			case c == '#' && starts:
				j = len(text)
			}
		}
	}
	if len(open) == 0 {
		return Span{}, false
	}
	return open[len(open)-1], true
}

// explainYAML adds what usually lies behind a message of the YAML library.
func explainYAML(text string) string {
	for _, e := range []struct{ has, hint string }{
		{"cannot start any token", `indent with spaces, not with tabs, and put a text that starts with @, %, or a backquote in quotes`},
		{"mapping values are not allowed", `a colon stands where none belongs; put a text that contains ": " in quotes`},
		{"could not find expected ':'", `a key needs a colon and a space after it`},
		{"did not find expected key", `lines that belong together start in the same column`},
		{"did not find expected ',' or ']'", `a list in brackets needs a comma between entries and a closing ]`},
		{"did not find expected ',' or '}'", `a mapping in braces needs a comma between entries and a closing }`},
		{"did not find expected node content", `a bracket or brace is not closed, or a value is missing`},
		{"did not find expected '-' indicator", `entries of one list start in the same column`},
		{"unexpected end of stream", `a quotation mark is not closed`},
		{"unknown anchor", `a name after * must be given with & before`},
	} {
		if strings.Contains(text, e.has) {
			return e.hint + " (" + text + ")"
		}
	}
	return text
}

// guard checks the depth and the size of the document, aliases counted in full. A
// loop of aliases ends at the depth limit.
func (d *decoder) guard(top *yaml.Node) bool {
	nodes, aliases := 0, 0
	var walk func(n *yaml.Node, at *yaml.Node, depth int) bool
	walk = func(n, at *yaml.Node, depth int) bool {
		nodes++
		why := ""
		switch {
		case nodes > maxNodes:
			why = fmt.Sprintf("It holds more than %d values.", maxNodes)
		case depth > maxDepth:
			why = fmt.Sprintf("Values are nested more than %d deep here.", maxDepth)
		case n.Kind == yaml.AliasNode:
			if aliases++; aliases > maxAliases {
				why = fmt.Sprintf("It repeats values with * more than %d times.", maxAliases)
			} else {
				return walk(n.Alias, n, depth+1)
			}
		}
		if why != "" {
			d.report(codeComplex, "too large a description", d.src.of(at), why+" Write it out more simply.")
			return false
		}
		for _, c := range n.Content {
			here := c
			if at != n {
				here = at
			}
			if !walk(c, here, depth+1) {
				return false
			}
		}
		return true
	}
	return walk(top, top, 0)
}
