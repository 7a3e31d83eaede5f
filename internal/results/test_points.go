package results

import (
	"strconv"

	"gloamwright/internal/design"
)

// testPointTable is one row for each reading: a test point in an operating condition.
func testPointTable(d *design.Design) *Table {
	t := &Table{Name: "test-points.csv", Headings: []string{
		"label", "shows", "red probe", "black probe", "condition", "condition in words", "low V", "typical V", "high V",
	}}
	for _, r := range d.Readings {
		black := ""
		if r.Point.Black != nil {
			black = r.Point.Black.String()
		}
		for i, b := range r.Bands {
			c := d.Conditions[i]
			t.Rows = append(t.Rows, []string{
				r.Point.Label, r.Point.Shows, r.Point.Red.String(), black, strconv.Itoa(c.Number), c.Name,
				cell(figure(b.Low)), cell(figure(b.Typical)), cell(figure(b.High)),
			})
			for _, o := range r.OrAt(i) {
				t.Rows = append(t.Rows, []string{
					r.Point.Label, r.Point.Shows, r.Point.Red.String(), black, strconv.Itoa(c.Number), c.Name + ", or with " + o.With,
					cell(figure(o.Low)), cell(figure(o.Typical)), cell(figure(o.High)),
				})
			}
		}
	}
	return t
}
