package describe

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"
)

// Override returns the description src with the value at path set, everything else
// as written. A path is keys joined by points, with the name of a circuit, part or
// test point or a number counted from 1 for an entry of a list:
//
//	duty.outage
//	luminaires.corridor.power
//	circuits.Boathouse.fuse
//	circuits."Bunkroom corridor".points.2
//
// A name with a point or quotation mark in it stands in double quotes. A key that is
// not there yet is added. Override does not judge the value; Parse does. Its errors
// are sentences for the person who gave the path.
func Override(src []byte, path, value string) ([]byte, error) {
	keys, err := splitPath(path)
	if err != nil {
		return nil, err
	}
	value = strings.TrimSpace(value)
	if value == "" || strings.ContainsFunc(value, unprintable) {
		return nil, fmt.Errorf("%s needs a value on one line, such as %s=6h", path, path)
	}
	top, s, err := readNodes(src)
	if err != nil {
		return nil, err
	}
	t, err := find(top, keys)
	if err != nil {
		return nil, fmt.Errorf("%s: %w", path, err)
	}
	for _, text := range []string{value, quoteYAML(value)} {
		out, err := t.splice(src, s, text)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", path, err)
		}
		if t.verify(top, out, keys, value) {
			return out, nil
		}
	}
	return nil, fmt.Errorf("%s cannot be set from outside the way it is written; change it in the file", path)
}

// splitPath splits a path at its points.
func splitPath(path string) ([]string, error) {
	bad := fmt.Errorf("%q is not a path: write keys joined by points, such as duty.outage or circuits.Stair.fuse", clip(path))
	var keys []string
	rest := path
	for {
		var key string
		if strings.HasPrefix(rest, `"`) {
			end := strings.Index(rest[1:], `"`)
			if end < 0 {
				return nil, bad
			}
			key, rest = rest[1:end+1], rest[end+2:]
		} else {
			end := strings.IndexByte(rest, '.')
			if end < 0 {
				end = len(rest)
			}
			key, rest = strings.TrimSpace(rest[:end]), rest[end:]
		}
		if key == "" {
			return nil, bad
		}
		keys = append(keys, key)
		if rest == "" {
			return keys, nil
		}
		if rest[0] != '.' {
			return nil, bad
		}
		rest = rest[1:]
	}
}

// readNodes parses src without judging what it says.
func readNodes(src []byte) (*yaml.Node, *source, error) {
	d := &decoder{src: newSource("", src), list: new(List)}
	top := d.document(src)
	if top == nil || d.list.HasErrors() {
		first := (*d.list)[0]
		return nil, nil, fmt.Errorf("the description cannot be read at line %d: %s: %s", first.At.Line, first.Summary, first.Detail)
	}
	return top, d.src, nil
}

// target is where an override goes.
type target struct {
	parent *yaml.Node // the mapping or list that holds, or will hold, the value
	key    *yaml.Node // its key, in a mapping
	node   *yaml.Node // the value; nil: to be added to parent
	added  []string   // keys to add below parent, when node is nil
}

// find walks keys from top to a single value, or to the mapping that it can be added to.
func find(top *yaml.Node, keys []string) (target, error) {
	t, err := walk(top, keys)
	switch {
	case err != nil || t.added != nil:
		return t, err
	case t.node.Kind == yaml.AliasNode:
		return t, errors.New("it is shared by * with other places; change it in the file")
	case t.node.Kind != yaml.ScalarNode:
		return t, fmt.Errorf("it holds %s; only a single value can be set", shapeOf(t.node))
	}
	return t, nil
}

// walk follows keys from top.
func walk(top *yaml.Node, keys []string) (target, error) {
	t := target{node: top}
	for i, key := range keys {
		at := strings.Join(keys[:i], ".")
		if i == 0 {
			at = "the description"
		}
		cur := t.node
		if cur.Kind == yaml.AliasNode {
			return t, fmt.Errorf("%s is shared by * with other places; change it in the file", at)
		}
		switch {
		case cur.Kind == yaml.MappingNode:
			k, v := pair(cur, key)
			if v == nil {
				t = target{parent: cur, added: keys[i:]}
				return t, mayAdd(cur, at, keys, i)
			}
			t = target{parent: cur, key: k, node: v}
		case cur.Kind == yaml.SequenceNode:
			v, err := listEntry(cur, at, key)
			if err != nil {
				return t, err
			}
			t = target{parent: cur, node: v}
		case isNull(cur) && t.key != nil && cur.Value == "":
			t.added = keys[i:]
			return t, mayAdd(&yaml.Node{Kind: yaml.MappingNode}, at, keys, i)
		case at == "practice":
			return t, fmt.Errorf("the practice stands in %s; change it there", clip(cur.Value))
		default:
			return t, fmt.Errorf("%s is a single value; nothing stands below it", at)
		}
	}
	return t, nil
}

// pair returns the key and value of a mapping's entry.
func pair(n *yaml.Node, key string) (k, v *yaml.Node) {
	for i := 0; i+1 < len(n.Content); i += 2 {
		if n.Content[i].Kind == yaml.ScalarNode && n.Content[i].Value == key {
			return n.Content[i], n.Content[i+1]
		}
	}
	return nil, nil
}

// listEntry returns the entry of a list that bears a name or has a number.
func listEntry(n *yaml.Node, at, key string) (*yaml.Node, error) {
	var names []string
	for _, c := range n.Content {
		if name := textOf(follow(c), "name"); name != "" {
			if name == key {
				return c, nil
			}
			names = append(names, name)
		}
	}
	if i, err := strconv.Atoi(key); err == nil && 1 <= i && i <= len(n.Content) {
		return n.Content[i-1], nil
	}
	if len(names) == 0 {
		return nil, fmt.Errorf("%s has no entry %q; it has %d, counted from 1", at, clip(key), len(n.Content))
	}
	return nil, errors.New(strings.TrimSpace(fmt.Sprintf("%s has no entry called %q. %s", at, clip(key), didYouMean(key, "Entries", names))))
}

// mayAdd reports whether keys[i:] can be added to the mapping n, which at names.
func mayAdd(n *yaml.Node, at string, keys []string, i int) error {
	for j := i; j < len(keys); j++ {
		known, open := keysBelow(keys[:j])
		if slices.Contains(known, keys[j]) && (j == len(keys)-1 || keys[0] == "practice") || open && j == len(keys)-1 {
			continue
		}
		for k := 0; k+1 < len(n.Content); k += 2 {
			if name := n.Content[k].Value; !slices.Contains(known, name) {
				known = append(known, name)
			}
		}
		return errors.New(strings.TrimSpace(fmt.Sprintf("%s has no key %q. %s", at, clip(keys[j]), didYouMean(keys[j], "Keys", known))))
	}
	return nil
}

// keysBelow returns the keys that the mapping at path may hold. It is open where the
// kinds say which; then Parse judges the key.
func keysBelow(path []string) (known []string, open bool) {
	d := &decoder{site: &Site{}}
	switch {
	case len(path) == 0:
		return keyNames(d.topFields()), false
	case len(path) == 1 && path[0] == "job":
		return keyNames(d.jobFields()), false
	case len(path) == 1 && path[0] == "practice":
		return keyNames(d.practiceFields()), false
	case len(path) == 2 && path[0] == "practice" && path[1] == "colours":
		return keyNames(d.colourFields()), false
	case len(path) == 1 && path[0] == "duty":
		return keyNames(d.dutyFields()), false
	case len(path) == 2 && path[0] == "circuits":
		return keyNames(d.circuitFields(&Circuit{}, nil)), false
	case len(path) >= 4 && path[0] == "circuits":
		return keyNames(d.legFields(&Leg{})), false
	case len(path) >= 2:
		return nil, true
	}
	return nil, false
}

// splice puts text in place of the target's value, or adds it.
func (t target) splice(src []byte, s *source, text string) ([]byte, error) {
	if t.added != nil {
		last := len(t.added) - 1
		entry := quoteKey(t.added[last]) + ": " + text
		for i := last - 1; i >= 0; i-- {
			entry = quoteKey(t.added[i]) + ": {" + entry + "}"
		}
		if t.node != nil { // a key without a value
			return t.afterKey(src, s, "{"+entry+"}")
		}
		return insert(src, s, t.parent, entry), nil
	}
	if t.node.Value == "" && isNull(t.node) {
		return t.afterKey(src, s, text)
	}
	at := s.of(t.node)
	start := offset(src, at.Line, at.Col)
	end := offset(src, at.Line, at.Col+at.Len)
	return slices.Concat(src[:start], []byte(text), src[end:]), nil
}

// afterKey writes the value of a key that has none.
func (t target) afterKey(src []byte, s *source, text string) ([]byte, error) {
	if t.key == nil {
		return nil, errors.New("the entry is empty; change it in the file")
	}
	at := s.of(t.key)
	i := offset(src, at.Line, at.Col+at.Len)
	if colon := bytes.IndexByte(src[i:], ':'); colon >= 0 && len(bytes.TrimSpace(src[i:i+colon])) == 0 {
		i += colon + 1
	}
	return slices.Concat(src[:i], []byte(" "+text), src[i:]), nil
}

// insert adds an entry as the first of the mapping n.
func insert(src []byte, s *source, n *yaml.Node, entry string) []byte {
	at := s.of(n)
	i := offset(src, at.Line, at.Col)
	if n.Style&yaml.FlowStyle != 0 {
		if len(n.Content) > 0 {
			entry += ", "
		}
		return slices.Concat(src[:i+1], []byte(entry), src[i+1:])
	}
	end := "\n"
	if bytes.Contains(src, []byte("\r\n")) {
		end = "\r\n"
	}
	return slices.Concat(src[:i], []byte(entry+end+strings.Repeat(" ", at.Col-1)), src[i:])
}

// offset returns the byte offset in src of a line and column, both from 1.
func offset(src []byte, line, col int) int {
	i := 0
	if bytes.HasPrefix(src, []byte(byteOrderMark)) {
		i = len(byteOrderMark)
	}
	for ; line > 1 && i < len(src); i++ {
		if src[i] == '\n' || src[i] == '\r' && (i+1 == len(src) || src[i+1] != '\n') {
			line--
		}
	}
	for n := range string(src[i:]) {
		if col == 1 {
			return i + n
		}
		col--
	}
	return len(src)
}

func quoteYAML(s string) string {
	var b bytes.Buffer
	e := json.NewEncoder(&b) // every JSON string is a YAML string
	e.SetEscapeHTML(false)
	if err := e.Encode(s); err != nil {
		return ""
	}
	return strings.TrimSpace(b.String())
}

// quoteKey quotes a key unless it is a plain word.
func quoteKey(s string) string {
	if checkIdentifier(s) == nil {
		return s
	}
	return quoteYAML(s)
}

// verify reports whether out says value at keys and all else as top does.
func (t target) verify(top *yaml.Node, out []byte, keys []string, value string) bool {
	now, _, err := readNodes(out)
	if err != nil {
		return false
	}
	u, err := find(now, keys)
	if err != nil || u.node == nil || u.added != nil || u.node.Value != value || u.node.Kind != yaml.ScalarNode {
		return false
	}
	if t.added == nil {
		return sameNodes(top, now, t.node, u.node)
	}
	depth := len(keys) - len(t.added)
	if t.node != nil { // the key had no value
		v, err := walk(now, keys[:depth])
		return err == nil && sameNodes(top, now, t.node, v.node)
	}
	v, err := walk(now, keys[:depth+1])
	if err != nil || v.key == nil {
		return false
	}
	// Take the added entry out again before comparing.
	i := slices.Index(v.parent.Content, v.key)
	v.parent.Content = slices.Delete(v.parent.Content, i, i+2)
	return sameNodes(top, now, nil, nil)
}

// sameNodes reports whether a and b say the same, leaving aside what exceptA and
// exceptB hold.
func sameNodes(a, b, exceptA, exceptB *yaml.Node) bool {
	if a == exceptA || b == exceptB {
		return a == exceptA && b == exceptB
	}
	if a.Kind != b.Kind || a.Value != b.Value || a.Tag != b.Tag || a.Anchor != b.Anchor || len(a.Content) != len(b.Content) {
		return false
	}
	for i := range a.Content {
		if !sameNodes(a.Content[i], b.Content[i], exceptA, exceptB) {
			return false
		}
	}
	return true
}
