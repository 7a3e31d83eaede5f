package describe

import (
	"regexp"
	"strconv"
)

// NamedLeg is a leg with what tells it apart within its circuit.
type NamedLeg struct {
	Leg *Leg
	// Path counts points from the board: "3" is the third of the main run, "3a1" the
	// first on the first branch that hangs on it.
	Path string
	// Name is the leg's identity, on which its labels hang: its place when it has one
	// that no leg before it has, else its path.
	Name string
}

// likePath matches places that could be taken for a path; they are no identity.
var likePath = regexp.MustCompile(`^[0-9]+([a-z]+[0-9]+)*$`)

// NamedLegs returns all legs of the circuit: each point, then its branches, then the
// next point.
func (c *Circuit) NamedLegs() []NamedLeg {
	var out []NamedLeg
	used := map[string]bool{}
	var run func(legs []*Leg, before string)
	run = func(legs []*Leg, before string) {
		for i, leg := range legs {
			path := before + strconv.Itoa(i+1)
			n := NamedLeg{Leg: leg, Path: path, Name: LegName(used, path, leg.Place.Val)}
			out = append(out, n)
			for j, b := range leg.Branches {
				run(b, n.Path+branchLetters(j))
			}
		}
	}
	run(c.Points, "")
	return out
}

// LegName returns the identity of a leg within its circuit. used holds the places of
// the legs before it and takes up this one's.
func LegName(used map[string]bool, path, place string) string {
	if place == "" || used[place] || likePath.MatchString(place) {
		return path
	}
	used[place] = true
	return place
}

// branchLetters counts a … z, aa, ab …
func branchLetters(i int) string {
	s := ""
	for i++; i > 0; i = (i - 1) / 26 {
		s = string(rune('a'+(i-1)%26)) + s
	}
	return s
}
