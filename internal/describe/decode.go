package describe

import (
	"fmt"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"
)

// Options are what Parse may use besides the text. The zero Options read no other
// file.
type Options struct {
	// ReadFile returns a file that the description names, such as a shared practice
	// file. The name is relative to the description's folder, with slashes, and never
	// leads out of it. Nil: naming a file is a mistake. See FolderReader.
	ReadFile func(name string) ([]byte, error)
}

// Parse reads a description without any other file. See Options.Parse.
func Parse(file string, src []byte, schema *Schema) (*Site, List) {
	return Options{}.Parse(file, src, schema)
}

// Parse reads the description src, which messages call file. It reports all mistakes
// in one pass, sorted. The site is never nil; when the list has errors it is
// incomplete and good for messages only. Parse keeps no reference to schema.
func (o Options) Parse(file string, src []byte, schema *Schema) (*Site, List) {
	d := &decoder{
		src: newSource(file, src), schema: schema, opts: o, list: new(List),
		site: &Site{File: file, Source: src, Sources: Sources{file: src}},
	}
	d.defaults()
	if top := d.document(src); top != nil {
		d.description(top)
		d.resolve()
	}
	return d.site, d.list.sorted()
}

// decoder reads one file into a site. It never stops at a mistake: it reports it and
// goes on with what can be used.
type decoder struct {
	src    *source
	schema *Schema
	opts   Options
	site   *Site
	list   *List // shared with the decoders of further files
	refs   []refUse
	legs   int
	// compared counts the candidates that unknown words were held against.
	compared int
}

// report adds an error at a place.
func (d *decoder) report(code, summary string, at Span, detail string, related ...Related) {
	d.add(Diagnostic{Severity: Error, Code: code, Summary: summary, Detail: detail, At: at, Related: related})
}

// warn adds a warning at a place.
func (d *decoder) warn(code, summary string, at Span, detail string) {
	d.add(Diagnostic{Severity: Warning, Code: code, Summary: summary, Detail: detail, At: at})
}

func (d *decoder) add(g Diagnostic) {
	switch n := len(*d.list); {
	case n < maxReports:
		*d.list = append(*d.list, g)
	case n == maxReports:
		*d.list = append(*d.list, Diagnostic{Severity: Error, Code: codeTooMany, Summary: "too many mistakes", At: g.At,
			Detail: "Further mistakes are not listed. Correct these first."})
	}
}

// unknown reports a word that is none of candidates. said is a sentence about it; the
// nearest candidate follows, or all of them as what. A file with very many unknown
// words among very many candidates gets no proposals for the last of them.
func (d *decoder) unknown(code, summary string, at Span, said, word, what string, candidates []string) {
	if len(*d.list) > maxReports {
		return
	}
	if d.compared += len(candidates); d.compared <= maxCompared {
		said += " " + didYouMean(word, what, candidates)
	}
	d.report(code, summary, at, strings.TrimSpace(said))
}

// entry is one key of a mapping with its value.
type entry struct {
	key  string
	node *yaml.Node // of the key
	val  *yaml.Node // aliases followed
	at   Span       // of the key
}

// field is one key that a mapping may hold.
type field struct {
	name     string
	required bool
	read     func(e entry)
}

// follow returns the node that an alias stands for. The guard has bounded the chain.
func follow(n *yaml.Node) *yaml.Node {
	for n.Kind == yaml.AliasNode {
		n = n.Alias
	}
	return n
}

func isNull(n *yaml.Node) bool {
	return n.Kind == yaml.ScalarNode && n.Tag == "!!null" && n.Style&(yaml.DoubleQuotedStyle|yaml.SingleQuotedStyle) == 0
}

// shapeOf names what a node is, for messages.
func shapeOf(n *yaml.Node) string {
	switch n.Kind {
	case yaml.MappingNode:
		return "a mapping (key: value)"
	case yaml.SequenceNode:
		return "a list"
	}
	return "a single value"
}

// entries returns the keys of the mapping n in file order. A key that comes twice is
// reported, naming the first place, and left out.
func (d *decoder) entries(n *yaml.Node, what string) []entry {
	if n.Kind != yaml.MappingNode {
		d.report(codeShape, "wrong form", d.src.of(n), fmt.Sprintf("%s is a mapping (key: value), not %s.", what, shapeOf(n)))
		return nil
	}
	var out []entry
	first := map[string]Span{}
	for i := 0; i+1 < len(n.Content); i += 2 {
		k, v := follow(n.Content[i]), follow(n.Content[i+1])
		at := d.src.of(n.Content[i])
		switch {
		case k.Kind != yaml.ScalarNode:
			d.report(codeShape, "wrong form", at, "A key is a single word.")
			continue
		case k.Tag == "!!merge":
			d.report(codeMerge, "merge key", at, "The merge key << is not read here. Write the keys out.")
			continue
		}
		if was, twice := first[k.Value]; twice {
			d.report(codeRepeated, "key given twice", at, fmt.Sprintf("%s stands twice in %s. Remove one of them.", clip(k.Value), what),
				Related{was, "first given here"})
			continue
		}
		first[k.Value] = at
		out = append(out, entry{k.Value, k, v, at})
	}
	return out
}

// mapping hands each value of n to its field's reader in file order and reports
// keys that are unknown or missing. owner is where a missing key is reported.
func (d *decoder) mapping(n *yaml.Node, owner Span, what string, fields []field) {
	d.mappingOf(n, owner, what, fields, ownRemedy)
}

// mappingOf is mapping with what is said of a missing key.
func (d *decoder) mappingOf(n *yaml.Node, owner Span, what string, fields []field, remedy func(key string) string) {
	if n.Kind != yaml.MappingNode {
		d.entries(n, what)
		return
	}
	given := map[string]bool{}
	for _, e := range d.entries(n, what) {
		i := slices.IndexFunc(fields, func(f field) bool { return f.name == e.key })
		if i < 0 {
			d.unknownKey(e, what, fields)
			continue
		}
		given[e.key] = true
		if isNull(e.val) {
			d.report(codeNoValue, "missing value", e.at, fmt.Sprintf("Write a value after %s:, or remove the key.", e.key))
			continue
		}
		fields[i].read(e)
	}
	for _, f := range fields {
		if f.required && !given[f.name] {
			d.report(codeMissingKey, "missing key", owner, fmt.Sprintf("%s needs the key %s.%s", what, f.name, remedy(f.name)))
		}
	}
}

func (d *decoder) unknownKey(e entry, what string, fields []field) {
	d.unknown(codeUnknownKey, "unknown key", e.at, fmt.Sprintf("%s has no key %q.", what, clip(e.key)), e.key, "Keys here", keyNames(fields))
}

func keyNames(fields []field) []string {
	names := make([]string, len(fields))
	for i, f := range fields {
		names[i] = f.name
	}
	return names
}

// items returns the entries of the list n.
func (d *decoder) items(n *yaml.Node, what string) []*yaml.Node {
	if isNull(n) {
		return nil
	}
	if n.Kind != yaml.SequenceNode {
		d.report(codeShape, "wrong form", d.src.of(n), fmt.Sprintf("%s is a list, not %s. Write it in brackets [ ], or one entry a line after \"- \".", what, shapeOf(n)))
		return nil
	}
	out := make([]*yaml.Node, len(n.Content))
	for i, c := range n.Content {
		out[i] = follow(c)
	}
	return out
}

// few reports a list or mapping with more than limit entries and returns how many of
// its n entries to read.
func (d *decoder) few(n, limit int, at Span, what string) int {
	if n > limit {
		d.report(codeTooMany, "too many entries", at, fmt.Sprintf("At most %d %s can stand here; these are %d.", limit, what, n))
	}
	return min(n, limit)
}

// scalar returns the text of a single value as written.
func (d *decoder) scalar(n *yaml.Node, what string) (string, bool) {
	if n.Kind != yaml.ScalarNode {
		d.report(codeShape, "wrong form", d.src.of(n), fmt.Sprintf("%s is a single value, not %s.", what, shapeOf(n)))
		return "", false
	}
	return n.Value, true
}

// clip shortens a text for a message.
func clip(s string) string {
	const most = 60
	r := []rune(s)
	if len(r) <= most {
		return s
	}
	return string(r[:most-1]) + "…"
}
