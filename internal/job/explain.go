package job

import (
	"fmt"
	"io"
	"slices"
	"strings"

	"gloamwright/internal/design"
	"gloamwright/internal/sizing"
)

// NothingCalled is returned when explain is asked for something that is not there.
type NothingCalled struct {
	Name string
	Near []string
}

// Error names what there is instead.
func (n *NothingCalled) Error() string {
	s := fmt.Sprintf("nothing in this job is called %q", n.Name)
	if len(n.Near) > 0 {
		s += "; there are " + strings.Join(n.Near, ", ")
	}
	return s
}

// Explain writes every working of the thing called what (a designation, a circuit, a
// stage), the workings that they depend on and those that depend on them, each so that
// a pocket calculator can follow it.
func Explain(w io.Writer, d *design.Design, what string) error {
	subjects, heading := subjectsOf(d, what)
	if len(subjects) == 0 {
		return &NothingCalled{what, known(d)}
	}
	fmt.Fprintln(w, heading)
	var own []sizing.Working
	for _, x := range d.Workings {
		if slices.Contains(subjects, x.For) {
			own = append(own, x)
		}
	}
	if len(own) == 0 {
		fmt.Fprintln(w, "\n  Nothing about it is calculated: it is given, or follows from the wiring.")
	}
	for _, x := range own {
		show(w, x)
	}
	var up, down []sizing.Working
	for _, x := range d.Workings {
		if slices.Contains(subjects, x.For) {
			continue
		}
		for _, o := range own {
			if slices.Contains(o.Uses, id(x)) && !has(up, x) {
				up = append(up, x)
			}
			if slices.Contains(x.Uses, id(o)) && !has(down, x) {
				down = append(down, x)
			}
		}
	}
	section(w, "It depends on", up)
	section(w, "On it depend", down)
	for _, f := range d.Findings {
		if slices.Contains(subjects, f.Subject) {
			fmt.Fprintf(w, "\n  %s: %s\n", f.Severity, f.Message)
		}
	}
	return nil
}

func id(x sizing.Working) string { return x.For + ": " + x.Name }

func has(list []sizing.Working, x sizing.Working) bool {
	return slices.ContainsFunc(list, func(o sizing.Working) bool { return id(o) == id(x) })
}

func section(w io.Writer, head string, list []sizing.Working) {
	if len(list) == 0 {
		return
	}
	fmt.Fprintf(w, "\n%s\n", head)
	for _, x := range list {
		show(w, x)
	}
}

func show(w io.Writer, x sizing.Working) {
	pinned := ""
	if x.Pinned {
		pinned = "  (given: checked)"
	}
	fmt.Fprintf(w, "\n  %s, %s = %s %s%s\n", x.For, x.Name, sizing.Digits(x.Value), x.Unit, pinned)
	fmt.Fprintf(w, "    %s\n", x.Formula)
	if x.Substituted != "" {
		fmt.Fprintf(w, "    %s\n", x.Substituted)
	}
	fmt.Fprintf(w, "    source: %s\n", x.Source)
}

// subjectsOf returns the subjects of workings that what stands for.
func subjectsOf(d *design.Design, what string) (subjects []string, heading string) {
	for _, p := range d.Circuit.Parts {
		if strings.EqualFold(p.Designation, what) {
			return []string{p.Designation}, p.Designation + ", " + p.Description
		}
	}
	for _, c := range d.Circuit.Cables {
		if strings.EqualFold(c.Designation, what) {
			s := []string{c.Designation}
			if c.Circuit != "" {
				s = append(s, c.Circuit)
			}
			return s, fmt.Sprintf("%s, cable 2 × %s, %s", c.Designation, c.Size, d.Site.Practice.LengthUnit().Format(c.Length))
		}
	}
	for _, c := range d.Site.Circuits {
		if strings.EqualFold(c.Name.Val, what) {
			s := []string{c.Name.Val}
			for _, f := range d.Fuses {
				if f.Way != nil && f.Way.Lighting != nil && f.Way.Lighting.Name == c.Name.Val {
					s = append(s, f.Part.Designation)
				}
			}
			return s, "Circuit " + c.Name.Val
		}
	}
	for _, st := range d.Circuit.Stages {
		if strings.EqualFold(st.Name, what) {
			s := []string{st.Name}
			for _, p := range st.Parts {
				s = append(s, p.Designation)
			}
			return s, fmt.Sprintf("Stage %s, %s", st.Name, st.Kind)
		}
	}
	for _, l := range d.Site.Luminaires {
		if strings.EqualFold(l.Name.Val, what) {
			return []string{"luminaire " + l.Name.Val}, "Luminaire " + l.Name.Val
		}
	}
	return nil, ""
}

// known lists what can be explained, for a message.
func known(d *design.Design) []string {
	var out []string
	for _, s := range d.Circuit.Stages {
		out = append(out, s.Name)
	}
	for _, c := range d.Site.Circuits {
		out = append(out, c.Name.Val)
	}
	return append(out, "and every designation, such as "+d.Fuses[0].Part.Designation)
}
