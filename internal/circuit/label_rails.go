package circuit

import (
	"fmt"
	"strings"
)

// labelPlaces keeps the designations of places given before: +A1, +B1.
func (c *Circuit) labelPlaces(n *namer) {
	for _, p := range c.Places {
		letter := strings.TrimRight(p.Designation, "0123456789")
		p.Designation = n.give("place", p.Key, 1, func(i int) string { return fmt.Sprintf("%s%d", letter, i) })
	}
}

// labelRails keeps the names of rails given before, so that a stage that is put in does
// not rename those behind it. Whatever bears a rail's name follows.
func (c *Circuit) labelRails(n *namer) {
	count := map[string]int{}
	for _, r := range c.Rails {
		count[r.Name]++
	}
	now := map[string]string{}
	for _, r := range c.Rails {
		if r.Key == "" || count[r.Name] > 1 {
			continue
		}
		was := r.Name
		r.Name = n.give("rail", r.Key, 1, func(i int) string {
			switch {
			case !strings.HasPrefix(was, "P"):
				return fmt.Sprintf("%dL+", i)
			case i == 1:
				return "P+"
			}
			return fmt.Sprintf("P%d+", i)
		})
		now[was] = r.Name
	}
	rename := func(name *string) {
		if is, ok := now[*name]; ok {
			*name = is
		}
	}
	for _, w := range c.Conductors {
		rename(&w.Rail)
	}
	for _, b := range c.Boards {
		rename(&b.Rail)
	}
	for _, s := range c.Stages {
		if s.Sketch == nil {
			continue
		}
		for i := range s.Sketch.Items {
			rename(&s.Sketch.Items[i].Rail)
		}
	}
}
