package release

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"strconv"

	"gopkg.in/yaml.v3"

	"gloamwright/internal/circuit"
)

// registerVersion is the version of the register's format.
const registerVersion = "1"

// registerHead begins every register.
const registerHead = `# Labels given to the things of %[1]s. "gloamwright issue" writes this file;
# keep it in version control beside the description and do not change it by hand.
# A label stays with its thing and is never used again after the thing is gone.
`

const checksumKey = "checksum: "

// Encode returns the register as its file. description is the name of the file that
// it belongs to.
func (r *Register) Encode(description string) ([]byte, error) {
	top := mapping()
	put(top, "register", plain(registerVersion))
	put(top, "revisions", flow(texts(r.Revisions...)))
	if len(r.Texts) > 0 {
		sums := mapping()
		for _, revision := range circuit.SortedKeys(r.Texts) {
			put(sums, revision, text(r.Texts[revision]))
		}
		put(top, "texts", sums)
	}

	labels := mapping()
	var group *yaml.Node
	last := ""
	for _, id := range circuit.SortedKeys(r.Labels) {
		sort, key := sortOf(id)
		if sort != last || group == nil {
			group, last = mapping(), sort
			put(labels, sort, group)
		}
		put(group, key, text(r.Labels[id]))
	}
	put(top, "labels", labels)

	circuits := mapping()
	for _, name := range circuit.SortedKeys(r.Ways) {
		c := mapping()
		put(c, "board", text(r.Ways[name].Board))
		put(c, "way", plain(strconv.Itoa(r.Ways[name].Number)))
		points := mapping()
		for _, p := range r.Points[name] {
			words := []string{p.Leg, p.Lamp}
			if p.Place != "" {
				words = append(words, p.Place)
			}
			put(points, p.Path, flow(texts(words...)))
		}
		put(c, "points", points)
		put(circuits, name, c)
	}
	put(top, "circuits", circuits)

	feeders := mapping()
	for _, name := range circuit.SortedKeys(r.Feeders) {
		f := mapping()
		put(f, "board", text(r.Feeders[name].Board))
		put(f, "way", plain(strconv.Itoa(r.Feeders[name].Number)))
		put(feeders, name, flow(f))
	}
	put(top, "feeders", feeders)

	retired := &yaml.Node{Kind: yaml.SequenceNode}
	for _, g := range r.Retired {
		e := mapping()
		put(e, "sort", text(g.Sort))
		put(e, "label", text(g.Label))
		put(e, "last", text(g.Last))
		retired.Content = append(retired.Content, flow(e))
	}
	put(top, "retired", retired)

	var b bytes.Buffer
	fmt.Fprintf(&b, registerHead, description)
	enc := yaml.NewEncoder(&b)
	enc.SetIndent(2)
	if err := enc.Encode(top); err != nil {
		return nil, fmt.Errorf("cannot write the register: %w", err)
	}
	if err := enc.Close(); err != nil {
		return nil, fmt.Errorf("cannot write the register: %w", err)
	}
	b.WriteString(checksumKey + checksum(b.Bytes()) + "\n")
	return b.Bytes(), nil
}

// checksum is over everything before the checksum's line, whatever line ends a
// version control system has put in.
func checksum(b []byte) string {
	sum := sha256.Sum256(bytes.ReplaceAll(b, []byte("\r\n"), []byte("\n")))
	return hex.EncodeToString(sum[:])
}

func mapping() *yaml.Node { return &yaml.Node{Kind: yaml.MappingNode} }

func put(m *yaml.Node, key string, value *yaml.Node) { m.Content = append(m.Content, text(key), value) }

// text is a text, quoted where YAML would read it as something else.
func text(s string) *yaml.Node {
	n := &yaml.Node{}
	n.SetString(s)
	return n
}

// plain is a number.
func plain(s string) *yaml.Node { return &yaml.Node{Kind: yaml.ScalarNode, Tag: "!!int", Value: s} }

func texts(list ...string) *yaml.Node {
	n := &yaml.Node{Kind: yaml.SequenceNode}
	for _, s := range list {
		n.Content = append(n.Content, text(s))
	}
	return n
}

func flow(n *yaml.Node) *yaml.Node {
	n.Style |= yaml.FlowStyle
	return n
}
