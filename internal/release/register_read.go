package release

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// The codes of a register's diagnostics.
const (
	codeRegisterText  = "R001" // cannot be read at all
	codeRegisterForm  = "R002" // a key or value that does not belong
	codeRegisterLabel = "R003" // malformed label
	codeRegisterTwice = "R004" // one label on two things
	codeRegisterHand  = "R005" // changed by hand
	codeNoSuchCircuit = "R006" // renaming of a circuit that was never issued
)

// DecodeRegister reads a register; messages call it file. A register with any mistake
// is not used, and never made anew: the labels on site depend on it.
func DecodeRegister(file string, src []byte) (*Register, describe.List) {
	d := &registerReader{file: file, reg: &Register{
		Labels: circuit.Labels{}, Ways: map[string]Way{}, Feeders: map[string]Way{}, Points: map[string][]Point{},
	}}
	d.checkSum(src)
	if top := d.top(src); top != nil {
		d.read(top)
	}
	d.list.Sort()
	if d.list.HasErrors() {
		return nil, d.list
	}
	return d.reg, nil
}

type registerReader struct {
	file string
	reg  *Register
	list describe.List
}

func (d *registerReader) report(code, summary string, n *yaml.Node, format string, a ...any) {
	at := describe.Span{File: d.file, Line: max(n.Line, 1), Col: max(n.Column, 1), Len: max(utf8.RuneCountInString(n.Value), 1)}
	d.list = append(d.list, describe.Diagnostic{
		Severity: describe.Error, Code: code, Summary: summary, At: at, Detail: fmt.Sprintf(format, a...),
	})
}

// restore ends every message about damage.
const restore = "Bring the register back from version control, or copy register.yaml from the folder of the last issued revision over it."

var checksumLine = regexp.MustCompile(`(?m)^checksum: ?([0-9a-f]*)\r?$`)

func (d *registerReader) checkSum(src []byte) {
	all := checksumLine.FindAllSubmatchIndex(src, -1)
	lines := bytes.Count(src, []byte("\n")) + 1
	if len(all) == 0 {
		d.report(codeRegisterHand, "checksum missing", &yaml.Node{Line: lines, Column: 1},
			"The last line, checksum: …, is missing: the file was cut short or changed by hand. %s", restore)
		return
	}
	m := all[len(all)-1]
	at := &yaml.Node{Line: bytes.Count(src[:m[0]], []byte("\n")) + 1, Column: 1, Value: string(bytes.TrimRight(src[m[0]:m[1]], "\r"))}
	if len(bytes.TrimSpace(src[m[1]:])) > 0 {
		d.report(codeRegisterHand, "text after the checksum", at, "Nothing may stand after the checksum. The file was changed by hand. %s", restore)
		return
	}
	if checksum(src[:m[0]]) != string(src[m[2]:m[3]]) {
		d.report(codeRegisterHand, "register changed by hand", at,
			"The checksum does not fit what stands above it: the file was changed by hand, or a merge joined two versions of it. %s", restore)
	}
}

var yamlLine = regexp.MustCompile(`line (\d+): `)

func (d *registerReader) top(src []byte) *yaml.Node {
	var doc, more yaml.Node
	dec := yaml.NewDecoder(bytes.NewReader(src))
	err := decodeNode(dec, &doc)
	if err == nil {
		if e := decodeNode(dec, &more); e == nil {
			err = errors.New("a second document follows")
		} else if !errors.Is(e, io.EOF) {
			err = e
		}
	}
	if err != nil {
		at := &yaml.Node{Line: 1, Column: 1}
		text := strings.TrimPrefix(err.Error(), "yaml: ")
		if m := yamlLine.FindStringSubmatch(text); m != nil {
			at.Line, _ = strconv.Atoi(m[1])
			text = strings.Replace(text, m[0], "", 1)
		}
		d.report(codeRegisterText, "register damaged", at, "It cannot be read here or in the next line: %s. %s", text, restore)
		return nil
	}
	if doc.Kind != yaml.DocumentNode || len(doc.Content) != 1 {
		d.report(codeRegisterText, "register damaged", &doc, "The file is empty. %s", restore)
		return nil
	}
	return doc.Content[0]
}

// decodeNode is dec.Decode, with a panic of the library turned into an error.
func decodeNode(dec *yaml.Decoder, n *yaml.Node) (err error) {
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("%v", r)
		}
	}()
	return dec.Decode(n)
}

// each calls f for every key of the mapping n with its value.
func (d *registerReader) each(n *yaml.Node, what string, f func(key, value *yaml.Node)) {
	if n.Kind != yaml.MappingNode {
		d.report(codeRegisterForm, "wrong form", n, "%s must be a mapping. %s", what, restore)
		return
	}
	seen := map[string]bool{}
	for i := 0; i+1 < len(n.Content); i += 2 {
		k, v := n.Content[i], n.Content[i+1]
		switch {
		case k.Kind != yaml.ScalarNode:
			d.report(codeRegisterForm, "wrong form", k, "A key is a single word. %s", restore)
		case seen[k.Value]:
			d.report(codeRegisterTwice, "key given twice", k, "%s stands twice in %s. %s", k.Value, what, restore)
		default:
			seen[k.Value] = true
			f(k, v)
		}
	}
}

// optional ends a key that need not be there.
const optional = "?"

// fields reads the keys of one mapping; every one must be there that does not end in
// optional.
func (d *registerReader) fields(n *yaml.Node, what string, read map[string]func(*yaml.Node)) {
	missing := map[string]bool{}
	for k := range read {
		if !strings.HasSuffix(k, optional) {
			missing[k] = true
		}
	}
	d.each(n, what, func(k, v *yaml.Node) {
		f, ok := read[k.Value]
		if !ok {
			f, ok = read[k.Value+optional]
		}
		if !ok {
			d.report(codeRegisterForm, "unknown key", k, "%s has no key %s. %s", what, k.Value, restore)
			return
		}
		delete(missing, k.Value)
		f(v)
	})
	if n.Kind != yaml.MappingNode {
		return
	}
	for _, k := range circuit.SortedKeys(missing) {
		d.report(codeRegisterForm, "missing key", n, "%s needs the key %s. %s", what, k, restore)
	}
}

func (d *registerReader) items(n *yaml.Node, what string, f func(*yaml.Node)) {
	if n.Kind != yaml.SequenceNode {
		d.report(codeRegisterForm, "wrong form", n, "%s must be a list. %s", what, restore)
		return
	}
	for _, c := range n.Content {
		f(c)
	}
}

func (d *registerReader) text(n *yaml.Node, what string) (string, bool) {
	if n.Kind != yaml.ScalarNode || n.Value == "" {
		d.report(codeRegisterForm, "wrong form", n, "%s must be a single value. %s", what, restore)
		return "", false
	}
	return n.Value, true
}

func (d *registerReader) number(n *yaml.Node, what string) int {
	s, ok := d.text(n, what)
	if !ok {
		return 0
	}
	i, err := strconv.Atoi(s)
	if err != nil || i < 1 {
		d.report(codeRegisterForm, "bad number", n, "%s is no number from 1 on: %s. %s", what, s, restore)
		return 0
	}
	return i
}

func (d *registerReader) read(top *yaml.Node) {
	holders := map[string]*yaml.Node{} // who has a label, by sort and label
	d.fields(top, "A register", map[string]func(*yaml.Node){
		"register": func(n *yaml.Node) {
			if n.Value != registerVersion {
				d.report(codeRegisterForm, "unknown version", n, "This program reads registers of version %s, not %s. Use the program that wrote it, or a newer one.", registerVersion, n.Value)
			}
		},
		"revisions": func(n *yaml.Node) {
			d.items(n, "revisions", func(c *yaml.Node) {
				s, ok := d.text(c, "A revision")
				want := NextRevision(d.reg.Last())
				if ok && s != want {
					d.report(codeRegisterForm, "revision out of order", c, "Here %s must stand, not %s. %s", want, s, restore)
				}
				d.reg.Revisions = append(d.reg.Revisions, s)
			})
		},
		"texts" + optional: func(n *yaml.Node) {
			d.each(n, "texts", func(revision, sum *yaml.Node) {
				if s, ok := d.text(sum, "A checksum"); ok {
					if d.reg.Texts == nil {
						d.reg.Texts = map[string]string{}
					}
					d.reg.Texts[revision.Value] = s
				}
			})
		},
		"labels": func(n *yaml.Node) {
			d.each(n, "labels", func(sort, group *yaml.Node) {
				d.each(group, sort.Value, func(key, label *yaml.Node) {
					if d.label(holders, sort, sort.Value, label) {
						d.reg.Labels[sort.Value+"/"+key.Value] = label.Value
					}
				})
			})
		},
		"circuits": func(n *yaml.Node) { d.each(n, "circuits", d.circuit) },
		"feeders": func(n *yaml.Node) {
			d.each(n, "feeders", func(k, v *yaml.Node) {
				var w Way
				d.fields(v, "The feeder of "+k.Value, d.way(&w))
				d.reg.Feeders[k.Value] = w
			})
		},
		"retired": func(n *yaml.Node) {
			d.items(n, "retired", func(c *yaml.Node) {
				var g Retired
				var label *yaml.Node
				d.fields(c, "A retired label", map[string]func(*yaml.Node){
					"sort":  func(v *yaml.Node) { g.Sort, _ = d.text(v, "sort") },
					"label": func(v *yaml.Node) { label = v },
					"last":  func(v *yaml.Node) { g.Last, _ = d.text(v, "last") },
				})
				if label != nil && d.label(holders, c, g.Sort, label) {
					g.Label = label.Value
					d.reg.Retired = append(d.reg.Retired, g)
				}
			})
		},
		"checksum": func(*yaml.Node) {},
	})
}

// label checks one label and that nothing else of its sort has it.
func (d *registerReader) label(holders map[string]*yaml.Node, place *yaml.Node, sort string, n *yaml.Node) bool {
	s, ok := d.text(n, "A label")
	if !ok {
		return false
	}
	like, known := badLabel(sort, s)
	if !known {
		d.report(codeRegisterForm, "unknown sort of label", place, "There is no sort of label called %q. %s", sort, restore)
		return false
	}
	if like != "" {
		d.report(codeRegisterLabel, "malformed label", n, "%q is no label of a %s; one looks like %s. %s", s, sort, like, restore)
		return false
	}
	if first, twice := holders[sort+" "+s]; twice {
		d.report(codeRegisterTwice, "one label on two things", n, "%s is given in line %d already. A label belongs to one thing for ever. %s", s, first.Line, restore)
		return false
	}
	holders[sort+" "+s] = n
	return true
}

func (d *registerReader) way(w *Way) map[string]func(*yaml.Node) {
	return map[string]func(*yaml.Node){
		"board": func(v *yaml.Node) { w.Board, _ = d.text(v, "board") },
		"way":   func(v *yaml.Node) { w.Number = d.number(v, "way") },
	}
}

func (d *registerReader) circuit(name, n *yaml.Node) {
	var w Way
	points := newLinker()
	fields := d.way(&w)
	fields["points"] = func(v *yaml.Node) {
		d.each(v, "points", func(path, words *yaml.Node) {
			p := Point{Path: path.Value}
			var list []string
			d.items(words, "A point", func(c *yaml.Node) {
				s, _ := d.text(c, "A word of a point")
				list = append(list, s)
			})
			if len(list) != 2 && len(list) != 3 {
				d.report(codeRegisterForm, "wrong form", path, "A point is a length, a luminaire and perhaps a place. %s", restore)
				return
			}
			p.Leg, p.Lamp = list[0], list[1]
			if len(list) == 3 {
				p.Place = list[2]
			}
			if err := points.add(p); err != nil {
				d.report(codeRegisterForm, "wrong point", path, "In %s: %v. %s", name.Value, err, restore)
			}
		})
	}
	d.fields(n, "The circuit "+name.Value, fields)
	d.reg.Ways[name.Value], d.reg.Points[name.Value] = w, points.points
}
