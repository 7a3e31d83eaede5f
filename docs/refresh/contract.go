package main

import (
	"bytes"
	_ "embed"
	"encoding/json"
	"fmt"
	"os"
	"strings"
)

//go:embed results-head.md
var resultsHead string

// schemaFile is the contract that results.json keeps; the tests hold the program to it.
const schemaFile = "docs/results.schema.json"

// node is one value of the schema; its keys keep their order.
type node struct {
	Description string          `json:"description"`
	Type        any             `json:"type"`
	Enum        []any           `json:"enum"`
	Const       any             `json:"const"`
	Properties  json.RawMessage `json:"properties"`
	Items       *node           `json:"items"`
	AnyOf       []*node         `json:"anyOf"`
	Additional  json.RawMessage `json:"additionalProperties"`
}

// contract writes results.json key by key, from its schema.
func contract() ([]byte, error) {
	text, err := os.ReadFile(schemaFile)
	if err != nil {
		return nil, err
	}
	var top node
	if err := json.Unmarshal(text, &top); err != nil {
		return nil, fmt.Errorf("%s: %w", schemaFile, err)
	}
	var b bytes.Buffer
	b.WriteString(resultsHead)
	names, nodes, err := top.keys()
	if err != nil {
		return nil, err
	}
	b.WriteString("\n## Keys\n\n| key | holds | what it is |\n|---|---|---|\n")
	for i, name := range names {
		link := "`" + name + "`"
		if nodes[i].inner() != nil {
			link = fmt.Sprintf("[`%s`](#%s)", name, name)
		}
		fmt.Fprintf(&b, "| %s | %s | %s |\n", link, nodes[i].holds(), inCell(nodes[i].Description))
	}
	for i, name := range names {
		in := nodes[i].inner()
		if in == nil {
			continue
		}
		fmt.Fprintf(&b, "\n## %s\n\n%s.\n\n| key | holds | what it is |\n|---|---|---|\n", name, sentence(nodes[i].Description))
		if err := in.rows(&b, ""); err != nil {
			return nil, err
		}
	}
	return b.Bytes(), nil
}

// rows writes the keys of an object, and those of the objects in it below their path.
func (n *node) rows(b *bytes.Buffer, path string) error {
	names, nodes, err := n.keys()
	if err != nil {
		return err
	}
	for i, name := range names {
		k := nodes[i]
		fmt.Fprintf(b, "| `%s%s` | %s | %s |\n", path, name, k.holds(), inCell(k.Description))
		if in := k.inner(); in != nil {
			if err := in.rows(b, path+name+k.step()); err != nil {
				return err
			}
		}
	}
	return nil
}

// keys returns the properties of an object in the order of the schema.
func (n *node) keys() (names []string, nodes []*node, err error) {
	d := json.NewDecoder(bytes.NewReader(n.Properties))
	if len(n.Properties) == 0 {
		return nil, nil, nil
	}
	if _, err := d.Token(); err != nil {
		return nil, nil, err
	}
	for d.More() {
		name, err := d.Token()
		if err != nil {
			return nil, nil, err
		}
		var k node
		if err := d.Decode(&k); err != nil {
			return nil, nil, err
		}
		names, nodes = append(names, name.(string)), append(nodes, &k)
	}
	return names, nodes, nil
}

// values returns what the free keys of a map hold; nil if it has none.
func (n *node) values() *node {
	var v node
	if len(n.Additional) == 0 || n.Additional[0] != '{' || json.Unmarshal(n.Additional, &v) != nil {
		return nil
	}
	return &v
}

// inner returns the object whose keys are to be listed below n; nil if there is none.
func (n *node) inner() *node {
	switch v := n.values(); {
	case len(n.Properties) > 0:
		return n
	case n.Items != nil:
		return n.Items.inner()
	case v != nil:
		return v.inner()
	}
	for _, a := range n.AnyOf {
		if in := a.inner(); in != nil {
			return in
		}
	}
	return nil
}

// step is how a path goes on into the object below n.
func (n *node) step() string {
	switch v := n.values(); {
	case len(n.Properties) > 0:
		return "."
	case n.Items != nil:
		return "[]" + n.Items.step()
	case v != nil:
		return "{}" + v.step()
	}
	for _, a := range n.AnyOf {
		if a.inner() != nil {
			return a.step()
		}
	}
	return "."
}

// holds says in words what a value may be.
func (n *node) holds() string {
	switch v := n.values(); {
	case n.Const != nil:
		return fmt.Sprint(n.Const)
	case len(n.Enum) > 0:
		var words []string
		for _, e := range n.Enum {
			words = append(words, fmt.Sprint(e))
		}
		return strings.Join(words, ", ")
	case n.Items != nil:
		return "list of " + plural(n.Items.holds())
	case len(n.AnyOf) > 0:
		var words []string
		for _, a := range n.AnyOf {
			words = append(words, a.holds())
		}
		return strings.Join(words, " or ")
	case v != nil && len(n.Properties) == 0:
		return "map of " + plural(v.holds())
	}
	switch t := n.Type.(type) {
	case string:
		return word(t)
	case []any:
		var words []string
		for _, x := range t {
			words = append(words, word(fmt.Sprint(x)))
		}
		return strings.Join(words, " or ")
	}
	return "value"
}

func word(t string) string {
	switch t {
	case "string":
		return "text"
	case "boolean":
		return "true or false"
	}
	return t
}

// plural makes "number or null" into "numbers or null".
func plural(s string) string {
	first, rest, _ := strings.Cut(s, " ")
	if first == "text" || first == "true" || first == "null" {
		return s
	}
	return strings.TrimSpace(first + "s " + rest)
}

func sentence(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + strings.TrimSuffix(s[1:], ".")
}
