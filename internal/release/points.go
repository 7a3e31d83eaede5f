package release

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"gloamwright/internal/describe"
)

// pointsOf lists the luminaires of a circuit as the register remembers them.
func pointsOf(c *describe.Circuit) []Point {
	l := newLinker()
	for _, n := range c.NamedLegs() {
		err := l.add(Point{Path: n.Path, Leg: n.Leg.Length.Val.String(), Lamp: n.Leg.Luminaire.Val, Place: n.Leg.Place.Val})
		if err != nil {
			panic("release: a description's paths hang together: " + err.Error())
		}
	}
	return l.points
}

// linker finds, from the paths of points, their names and on which point each one
// hangs. Points come in order: each after the one it hangs on.
type linker struct {
	points []Point
	used   map[string]bool // places
	index  map[string]int  // of a point by its path
	run    map[string]int  // number of a run by its path without the last count
	runs   map[int]int     // branches of a point
	length map[string]int  // of a run
}

func newLinker() *linker {
	return &linker{used: map[string]bool{}, index: map[string]int{}, run: map[string]int{"": 0}, runs: map[int]int{}, length: map[string]int{}}
}

var pathForm = regexp.MustCompile(`^((?:[1-9][0-9]*[a-z]+)*)([1-9][0-9]*)$`)

func (l *linker) add(p Point) error {
	m := pathForm.FindStringSubmatch(p.Path)
	if m == nil {
		return fmt.Errorf("%q is no path of a point, such as 3 or 3a1", p.Path)
	}
	p.before = -1
	if run := m[1]; run != "" {
		on := strings.TrimRight(run, "abcdefghijklmnopqrstuvwxyz")
		before, ok := l.index[on]
		if !ok {
			return fmt.Errorf("point %s hangs on a point %s that does not stand before it", p.Path, on)
		}
		p.before = before
		if _, known := l.run[run]; !known {
			l.runs[before]++
			l.run[run] = l.runs[before]
		}
	}
	p.run = l.run[m[1]]
	if m[2] != strconv.Itoa(l.length[m[1]]+1) {
		return fmt.Errorf("point %s is out of order", p.Path)
	}
	l.length[m[1]]++
	p.Name = describe.LegName(l.used, p.Path, p.Place)
	l.index[p.Path] = len(l.points)
	l.points = append(l.points, p)
	return nil
}
