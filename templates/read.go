package templates

import (
	"fmt"
	"regexp"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"gloamwright/internal/describe"
)

// node is a piece of a text file.
type node struct {
	file string
	*yaml.Node
}

func (n node) at() describe.Span {
	if n.Node == nil {
		return describe.Span{File: n.file}
	}
	return describe.Span{File: n.file, Line: n.Line, Col: n.Column, Len: max(1, len([]rune(n.Value)))}
}

// reader reads text files and collects their mistakes.
type reader struct {
	list    describe.List
	sources describe.Sources
}

// textCode is the code of every diagnostic of a text file.
const textCode = "bad-text"

func (r *reader) report(at describe.Span, summary, detail string) {
	r.list = append(r.list, describe.Diagnostic{Severity: describe.Error, Code: textCode, Summary: summary, Detail: detail, At: at})
}

// file parses a file and hands on its top.
func (r *reader) file(name string, src []byte, read func(node)) {
	r.sources[name] = src
	var doc yaml.Node
	if err := yaml.Unmarshal(src, &doc); err != nil {
		r.report(describe.Span{File: name, Line: yamlLine(err)}, "text file is not YAML", err.Error())
		return
	}
	if len(doc.Content) == 0 {
		r.report(describe.Span{File: name, Line: 1, Col: 1, Len: 1}, "empty text file", "")
		return
	}
	read(node{name, doc.Content[0]})
}

var lineOfError = regexp.MustCompile(`line (\d+)`)

func yamlLine(err error) int {
	n := 0
	if m := lineOfError.FindStringSubmatch(err.Error()); m != nil {
		fmt.Sscan(m[1], &n)
	}
	return n
}

// fields calls f for each key of a mapping; keys that are not known are reported.
func (r *reader) fields(n node, known []string, f func(key string, v node)) {
	if n.Kind != yaml.MappingNode {
		r.report(n.at(), "expected keys with values", "Keys here: "+strings.Join(known, ", ")+".")
		return
	}
	seen := map[string]bool{}
	for i := 0; i+1 < len(n.Content); i += 2 {
		k, v := node{n.file, n.Content[i]}, node{n.file, n.Content[i+1]}
		switch {
		case !slices.Contains(known, k.Value):
			r.report(k.at(), fmt.Sprintf("unknown key %q", k.Value), "Keys here: "+strings.Join(known, ", ")+".")
		case seen[k.Value]:
			r.report(k.at(), fmt.Sprintf("key %q given twice", k.Value), "")
		default:
			seen[k.Value] = true
			f(k.Value, v)
		}
	}
}

// items calls f for each entry of a list.
func (r *reader) items(n node, f func(node)) {
	if n.Kind != yaml.SequenceNode {
		r.report(n.at(), "expected a list", "Begin each entry with a dash.")
		return
	}
	for _, c := range n.Content {
		f(node{n.file, c})
	}
}

// word reads a plain value.
func (r *reader) word(n node) string {
	if n.Kind != yaml.ScalarNode {
		r.report(n.at(), "expected text", "")
		return ""
	}
	return n.Value
}

// inBraces finds {value} and {function key}.
var inBraces = regexp.MustCompile(`\{([^{}]*)\}`)

// text reads a text with values in braces; each names further values that it may use.
func (r *reader) text(n node, each string, more ...string) string {
	s := r.word(n)
	for _, m := range inBraces.FindAllStringSubmatch(s, -1) {
		if name, key, ok := strings.Cut(m[1], " "); ok && slices.Contains(Functions, name) && key != "" {
			continue
		}
		if !known(Values, m[1]) && !slices.Contains(more, m[1]) && !repeated(each, m[1]) {
			r.report(n.at(), fmt.Sprintf("unknown value {%s}", m[1]), "Values: "+names(Values)+strings.Join(append([]string{""}, more...), ", ")+".")
		}
	}
	if strings.Count(s, "{") != strings.Count(s, "}") {
		r.report(n.at(), "a brace is not closed", "")
	}
	if strings.Count(s, "**")%2 != 0 {
		r.report(n.at(), "bold text is not closed", "Write ** before and after the words.")
	}
	return s
}

func known(list []Word, name string) bool {
	return slices.ContainsFunc(list, func(w Word) bool { return w.Name == name })
}

func repeated(each, name string) bool {
	for _, x := range Repeats {
		if x.Name == each && known(x.Values, name) {
			return true
		}
	}
	return false
}

func names(list []Word) string {
	var out []string
	for _, w := range list {
		out = append(out, w.Name)
	}
	return strings.Join(out, ", ")
}

// when reads the conditions of a text.
func (r *reader) when(n node) []string {
	var out []string
	r.items(n, func(c node) {
		s := r.word(c)
		if !known(Conditions, strings.TrimPrefix(s, "not ")) {
			r.report(c.at(), fmt.Sprintf("unknown condition %q", s), "Conditions: "+names(Conditions)+"; each may stand behind \"not\".")
		}
		out = append(out, s)
	})
	return out
}

// oneOf reads one of some words.
func (r *reader) oneOf(n node, list []string) string {
	s := r.word(n)
	if !slices.Contains(list, s) {
		r.report(n.at(), fmt.Sprintf("unknown word %q", s), "Words here: "+strings.Join(list, ", ")+".")
	}
	return s
}
