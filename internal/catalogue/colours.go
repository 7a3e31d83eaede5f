package catalogue

// Colour is one letter code of IEC 60757 with its word.
type Colour struct{ Code, Word string }

// Colours are the codes of IEC 60757 table 1 in the table's order, which is also the
// order in which codes combine (RDBU is red and blue). Read in a standard that
// reproduces the 1983 edition.
var Colours = []Colour{
	{"BK", "black"}, {"BN", "brown"}, {"RD", "red"}, {"OG", "orange"}, {"YE", "yellow"},
	{"GN", "green"}, {"BU", "blue"}, {"VT", "violet"}, {"GY", "grey"}, {"WH", "white"},
	{"PK", "pink"}, {"GD", "gold"}, {"TQ", "turquoise"}, {"SR", "silver"}, {"GNYE", "green-and-yellow"},
}

// ColourEvidence is the source of Colours.
var ColourEvidence = Evidence{Source: "IEC 60757 table 1", Seen: true}

// ColourWord returns the word of a code, or of two joined codes ("RDBU" is "red and
// blue"); ok is false if the code is unknown. GNYE belongs to the protective conductor
// alone (IEC 60445) and is known here so that its misuse can be named.
func ColourWord(code string) (word string, ok bool) {
	for _, c := range Colours {
		if c.Code == code {
			return c.Word, true
		}
	}
	if len(code) != 4 {
		return "", false
	}
	a, okA := ColourWord(code[:2])
	b, okB := ColourWord(code[2:])
	if !okA || !okB || a == b {
		return "", false
	}
	return a + " and " + b, true
}
