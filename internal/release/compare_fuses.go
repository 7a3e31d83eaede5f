package release

import (
	"fmt"
	"slices"

	"gloamwright/internal/design"
)

// fuses finds the fuses to change, the places to fill and to empty, and the rows of the
// fuse map whose figures moved.
func (c *comparison) fuses() {
	var boards []string // whose door copy is void
	pairs(c.old.Fuses, c.now.Fuses, func(f *recordFuse) string { return f.Designation }, func(o, n *recordFuse) {
		f := n
		switch {
		case o == nil:
			c.do(design.WorkItem{Tool: design.ReFuse, Do: c.spot(n) + ": put in " + n.body(), Is: amperes(n.Rating)}, n.Designation)
		case n == nil:
			f = o
			c.do(design.WorkItem{Tool: design.ReFuse, Do: c.spot(o) + ": take out " + o.body(), Was: amperes(o.Rating)}, o.Designation)
		case o.Rating != n.Rating || o.Style != n.Style || o.Colour != n.Colour:
			c.do(design.WorkItem{Tool: design.ReFuse, Do: fmt.Sprintf("%s: %s out, %s in", c.spot(n), o.body(), n.body()), Was: amperes(o.Rating), Is: amperes(n.Rating)}, n.Designation)
		case o.Feeds == n.Feeds:
			if o.row() != n.row() {
				c.out.Rows[n.Designation] = true
			}
			return
		default:
			c.out.Rows[n.Designation] = true
		}
		if f.Board != "" && !slices.Contains(boards, f.Board) {
			boards = append(boards, f.Board)
		}
	})
	for _, b := range boards {
		strip := c.names.strips[b]
		if strip == "" {
			continue
		}
		item := design.WorkItem{Tool: design.Relabel, Do: "New door copy: " + c.title(b), Was: "revision " + c.old.Job.Revision}
		if c.now.Job.Revision != c.old.Job.Revision {
			item.Is = "revision " + c.now.Job.Revision
		}
		c.do(item, strip)
	}
}

// row prints what the fuse map says of a fuse.
func (f *recordFuse) row() string {
	return fmt.Sprintf("%.3g %.3g %s %.0f %.0f", f.Load, f.Ampacity, f.Size, f.Prospective, f.FarEnd)
}

// body says which fuse it is, as one sees it.
func (f *recordFuse) body() string {
	if f.Colour != "" {
		return f.Colour
	}
	return amperes(f.Rating)
}

// spot says where the fuse sits.
func (c *comparison) spot(f *recordFuse) string {
	if f.Board == "" {
		return "Fuse, feeds " + f.Feeds
	}
	return fmt.Sprintf("%s, place %d", c.title(f.Board), f.Way)
}

func (c *comparison) title(board string) string {
	if t := c.names.titles[board]; t != "" {
		return t
	}
	return capital(board)
}
