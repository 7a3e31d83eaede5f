package job

import (
	"fmt"
	"io"

	"gloamwright/internal/design"
	"gloamwright/internal/finding"
	"gloamwright/internal/quantity"
)

// figure is one thing that a change of the description may move.
type figure struct{ Name, Value string }

// figures lists what was sized, thing by thing.
func figures(d *design.Design) []figure {
	var out []figure
	add := func(name, value string) { out = append(out, figure{name, value}) }
	if b := d.Battery; b.Part != nil {
		add("Battery "+b.Part.Designation, fmt.Sprintf("%s (needs %s)", b.Capacity, quantity.Format(b.Required, 3)))
		add("End of discharge", quantity.Format(b.EndVolt, 3))
	}
	if c := d.Charger; c.Part != nil {
		add("Charger "+c.Part.Designation, c.Current.String())
	}
	add("Holds", hours(d.Endurance.Held))
	add("Full again after", hours(d.Endurance.Recharge))
	for _, f := range d.Fuses {
		if f.Way == nil || !f.Way.Spare() {
			add("Fuse "+f.Part.Designation+", "+f.Feeds, f.Rating.String())
		}
	}
	for _, c := range d.Circuit.Cables {
		where := c.Circuit
		if where == "" && c.To != nil {
			where = "to " + c.To.Name
		}
		add("Cable "+c.Designation+", "+where, fmt.Sprintf("2 × %s, %s", c.Size, d.Site.Practice.LengthUnit().Format(c.Length)))
	}
	add("Worst drop", fmt.Sprintf("%.2f %%", 100*float64(d.Totals.WorstDrop)))
	add("Load at the end of discharge", quantity.Format(d.Totals.LoadA, 3))
	add("Copper", fmt.Sprintf("%.2f kg", d.Totals.CopperKg))
	if b := d.Bill; b != nil {
		add("Cost", b.Sum(b.Total)+unpriced(b))
	}
	return out
}

// findingDifferences writes the findings that are new, gone or have another figure,
// and returns their number.
func findingDifferences(w io.Writer, was, is *design.Design) int {
	key := func(f finding.Finding) string { return f.Check + "\x00" + f.Subject }
	before := map[string]finding.Finding{}
	for _, f := range was.Findings {
		before[key(f)] = f
	}
	n := 0
	after := map[string]bool{}
	for _, f := range is.Findings {
		after[key(f)] = true
		switch old, ok := before[key(f)]; {
		case !ok:
			fmt.Fprintf(w, "  + %s: %s\n", f.Severity, f.Message)
			n++
		case old.Message != f.Message:
			fmt.Fprintf(w, "    %s: %s\n      was: %s\n", f.Severity, f.Message, old.Message)
			n++
		}
	}
	for _, f := range was.Findings {
		if !after[key(f)] {
			fmt.Fprintf(w, "  - %s: %s\n", f.Severity, f.Message)
			n++
		}
	}
	return n
}

// Differences writes what would differ between a design of the file as it stands and
// one with changed values.
func Differences(w io.Writer, was, is *design.Design) {
	fmt.Fprintln(w, "  Against the file as it stands:")
	old := map[string]string{}
	for _, f := range figures(was) {
		old[f.Name] = f.Value
	}
	n, same := 0, 0
	seen := map[string]bool{}
	for _, f := range figures(is) {
		seen[f.Name] = true
		switch v, ok := old[f.Name]; {
		case !ok:
			fmt.Fprintf(w, "  + %-34s %s\n", f.Name, f.Value)
			n++
		case v != f.Value:
			fmt.Fprintf(w, "    %-34s %s, was %s\n", f.Name, f.Value, v)
			n++
		default:
			same++
		}
	}
	for _, f := range figures(was) {
		if !seen[f.Name] {
			fmt.Fprintf(w, "  - %-34s %s\n", f.Name, f.Value)
			n++
		}
	}
	n += findingDifferences(w, was, is)
	if n == 0 {
		fmt.Fprintln(w, "    nothing")
	}
	fmt.Fprintf(w, "    %d other figures stay.\n\n", same)
}
