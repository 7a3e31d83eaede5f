package job

import (
	"fmt"
	"io"
	"strings"

	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/internal/quantity"
)

// Summary writes what a contractor wants to see first: what was sized, how long
// it holds, and what was judged.
func Summary(w io.Writer, d *design.Design) {
	j := d.Site.Job
	head := j.Title.Val
	if j.Site.Val != "" {
		head += ", " + j.Site.Val
	}
	fmt.Fprintf(w, "%s  %s (revision %s)\n\n", j.Number.Val, head, j.Revision.Val)
	row := func(name, format string, a ...any) { fmt.Fprintf(w, "  %-10s %s\n", name, fmt.Sprintf(format, a...)) }
	duty := d.Site.Duty
	b := d.Battery
	if b.Part != nil {
		row("Battery", "%s %s, %d × %v %v %s; needs %s", b.Part.Designation, b.Capacity, b.Blocks*b.Parallel, b.BlockVolt, b.BlockAh, b.ClassName, b.Required)
	}
	if d.Endurance.Held > 0 {
		row("Holds", "%s at %v, end of life; %v asked", hours(d.Endurance.Held), duty.BatteryRoom.Val.Low, duty.Outage.Val)
	}
	if c := d.Charger; c.Part != nil {
		text := fmt.Sprintf("%s %v, float %v", c.Part.Designation, c.Current, quantity.Format(c.Float, 3))
		if d.Endurance.Recharge > 0 {
			text += fmt.Sprintf("; full again after %s, %v asked", hours(d.Endurance.Recharge), duty.Recharge.Val)
		}
		row("Charger", "%s", text)
	}
	row("Lights", "%d on %d circuits, %s, %s at the end of discharge", d.Totals.Luminaires, len(d.Site.Circuits), d.Totals.LoadWatt, quantity.Format(d.Totals.LoadA, 3))
	row("Cables", "%d runs, %s; worst drop %.2f %% at %s, limit %v", len(d.Circuit.Cables), d.Totals.CableM, 100*float64(d.Totals.WorstDrop), d.Totals.WorstLamp, d.Site.Practice.LampDrop.Val)
	row("Fuses", "%s", fuseLine(d))
	if b := d.Bill; b != nil {
		row("Cost", "%s%s", b.Sum(b.Total), without(b))
	}
	fmt.Fprintln(w)
	for _, x := range d.Warnings {
		fmt.Fprintf(w, "  look at %s: %s. %s\n", x.At, x.Summary, x.Detail)
	}
	Findings(w, d)
}

func hours(s quantity.Second) string { return fmt.Sprintf("%.1f h", s.Hours()) }

// without says how much of the bill has no price.
func without(b *facts.Bill) string {
	if len(b.Without) == 0 {
		return ""
	}
	return "; without a price: " + someOf(b.Without)
}

func fuseLine(d *design.Design) string {
	var order []string
	count := map[string]int{}
	for _, f := range d.Fuses {
		if f.Way != nil && f.Way.Spare() {
			continue
		}
		r := f.Rating.String()
		if count[r] == 0 {
			order = append(order, r)
		}
		count[r]++
	}
	for i, r := range order {
		order[i] = fmt.Sprintf("%d × %s", count[r], r)
	}
	return strings.Join(order, ", ")
}

// Findings writes the findings, gravest first. Of many that one check reports, the first
// stands in full and the others by name; documents and results hold them all.
func Findings(w io.Writer, d *design.Design) {
	fmt.Fprintf(w, "  Findings: %d stop, %s, %s\n", d.Count(finding.Stop), plural(d.Count(finding.Caution), "caution"), plural(d.Count(finding.Note), "note"))
	for _, f := range d.Findings {
		alike := likewise(d.Findings, f)
		if len(alike) > fewAlike && *alike[0] != f {
			continue
		}
		fmt.Fprintf(w, "  %-8s %s\n", f.Severity, f.Message)
		if f.Remedy != "" {
			fmt.Fprintf(w, "           %s\n", f.Remedy)
		}
		if f.At.Line > 0 {
			fmt.Fprintf(w, "           at %s:%d:%d\n", f.At.File, f.At.Line, f.At.Col)
		}
		if len(alike) > fewAlike {
			fmt.Fprintf(w, "           likewise %s\n", subjects(alike[1:]))
		}
	}
}

const (
	fewAlike  = 3  // so many findings of one check are shown in full
	mostNamed = 10 // so many others are named
)

// likewise returns the findings of f's check and severity. A step for which nothing fits
// is always shown in full.
func likewise(all []finding.Finding, f finding.Finding) []*finding.Finding {
	if f.NothingFits() {
		return nil
	}
	var out []*finding.Finding
	for i := range all {
		if x := &all[i]; x.Check == f.Check && x.Severity == f.Severity {
			out = append(out, x)
		}
	}
	return out
}

// subjects names what findings are about.
func subjects(list []*finding.Finding) string {
	var names []string
	for _, f := range list {
		names = append(names, f.Subject)
	}
	return someOf(names)
}

// someOf lists the first names and counts the rest.
func someOf(names []string) string {
	some := names[:min(len(names), mostNamed)]
	s := strings.Join(some, ", ")
	if more := len(names) - len(some); more > 0 {
		s += fmt.Sprintf(" and %d more", more)
	}
	return s
}

func plural(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}
