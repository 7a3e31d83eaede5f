package main

import (
	"bytes"
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
)

// letters writes the class letters of reference designations and what bears them.
func letters() []byte {
	var b bytes.Buffer
	fmt.Fprintf(&b, "# Reference designations\n\nA part is named by a class letter and a number: -F3. The letters are the main classes of %s, one letter each, **from memory**: the text of that\n"+
		"edition was not seen. The edition of 2019 puts things into classes by what they are there for, with codes of up to three letters; its classes B, C, E, F, G and K were\n"+
		"seen and mean the same, except for a battery, which stores and would be C there. Here it is G, as one that gives energy; every set of sheets says so in its legend.\n\n"+
		"| letter | purpose, in this project's words | what bears it |\n|---|---|---|\n", circuit.LetterEdition)
	for _, c := range circuit.Classes {
		var kinds []string
		for _, k := range circuit.KindsOf(c.Letter) {
			kinds = append(kinds, strings.ReplaceAll(string(k), "-", " "))
		}
		if c.Letter == "W" {
			kinds = []string{"cable", "leg of a lighting circuit"}
		}
		fmt.Fprintf(&b, "| %s | %s | %s |\n", c.Letter, c.Purpose, strings.Join(kinds, ", "))
	}
	b.WriteString("\nBoards count from 1: -F101 is the fuse of board 1, way 1. Terminals are named by their strip: -X1:3. A luminaire and the cable that feeds it share one number: -E12, -W12;\n" +
		"the cores of -W12 are 12+ and 12−. Places begin with a plus: +A1. A reference names sheet and zone: /3.B7. Test points are TP1, TP2 and so on; the black probe rests on TP0.\n")
	return b.Bytes()
}
