package sitegen

import (
	"bytes"
	"fmt"
	"math/rand/v2"

	"gopkg.in/yaml.v3"
)

// Shuffled writes a description with the keys of every mapping, at every level, in a
// random order: the same site. Lists keep their order, which means something. It panics
// on what is no YAML.
func Shuffled(src []byte, seed uint64) []byte {
	var doc yaml.Node
	if err := yaml.Unmarshal(src, &doc); err != nil {
		panic(fmt.Sprintf("sitegen: %v", err))
	}
	r := rand.New(rand.NewPCG(seed, 11))
	var walk func(n *yaml.Node)
	walk = func(n *yaml.Node) {
		n.HeadComment, n.LineComment, n.FootComment = "", "", "" // they would travel with their keys
		if n.Kind == yaml.MappingNode {
			r.Shuffle(len(n.Content)/2, func(i, j int) {
				n.Content[2*i], n.Content[2*j] = n.Content[2*j], n.Content[2*i]
				n.Content[2*i+1], n.Content[2*j+1] = n.Content[2*j+1], n.Content[2*i+1]
			})
		}
		for _, c := range n.Content {
			walk(c)
		}
	}
	walk(&doc)
	var b bytes.Buffer
	e := yaml.NewEncoder(&b)
	e.SetIndent(2)
	if err := e.Encode(&doc); err != nil {
		panic(fmt.Sprintf("sitegen: %v", err))
	}
	return b.Bytes()
}
