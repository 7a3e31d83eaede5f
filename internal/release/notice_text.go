package release

import (
	"fmt"
	"io"
	"strings"

	"gloamwright/internal/design"
)

// toolHeads are the headings of work.
var toolHeads = map[string]string{
	design.ReCut: "Re-cut", design.Replace: "Replace", design.ReTerminate: "Re-terminate", design.ReFuse: "Re-fuse",
	design.Adjust: "Adjust", design.Relabel: "Relabel", design.TestAgain: "Test again",
}

// ToolHead returns the heading of a kind of work: "Re-cut".
func ToolHead(tool string) string { return toolHeads[tool] }

// WriteNotice prints a change notice in the order in which a technician works.
func WriteNotice(w io.Writer, c *design.Changes) {
	if Unchanged(c) {
		fmt.Fprintf(w, "  Nothing has changed since revision %s.\n", c.From)
		return
	}
	WriteValues(w, c)
	if len(c.Work) > 0 {
		fmt.Fprintln(w, "\n  What to do, in this order")
	}
	tool := ""
	for _, i := range c.Work {
		if i.Tool != tool {
			tool = i.Tool
			fmt.Fprintf(w, "    %s\n", ToolHead(tool))
		}
		fmt.Fprintf(w, "      %s%s\n", workLine(i), from(i, c))
	}
	lists(w, "Labels to print", c.New)
	lists(w, "Labels to take off", c.Gone)
	WriteFindings(w, c)
	if len(c.Stays) > 0 {
		fmt.Fprintln(w, "\n  What stays")
	}
	for _, s := range c.Stays {
		if s.Of > 0 && s.Count == 0 {
			continue
		}
		fmt.Fprintf(w, "    %s: %s\n", stayHead(s), s.Text)
	}
}

// WriteValues prints the values of the description that changed.
func WriteValues(w io.Writer, c *design.Changes) {
	fmt.Fprintln(w, "  What changed")
	if len(c.Values) == 0 {
		fmt.Fprintln(w, "       no value of the description; what is computed from it differs")
	}
	for _, v := range c.Values {
		text := fmt.Sprintf("%s: %s", v.What, arrow(v.Was, v.Is))
		if v.Why != "" {
			text += "  # " + v.Why
		}
		fmt.Fprintf(w, "    %2d %s\n", v.Number, text)
	}
}

// arrow prints what was and what is.
func arrow(was, is string) string {
	switch {
	case was == "":
		return is + ", new"
	case is == "":
		return was + ", gone"
	}
	return was + " -> " + is
}

func workLine(i design.WorkItem) string {
	text := i.What
	if text != "" {
		text += ": "
	}
	text += i.Do
	switch {
	case i.Was != "" && i.Is != "":
		text += ", " + i.Was + " -> " + i.Is
	case i.Was != "":
		text += ", was " + i.Was
	case i.Is != "":
		text += ", " + i.Is
	}
	return text
}

// from names the changed values that force an item, unless it is all of them.
func from(i design.WorkItem, c *design.Changes) string {
	if len(i.Causes) == 0 || len(i.Causes) == len(c.Values) {
		return ""
	}
	return " (from " + strings.Trim(strings.ReplaceAll(fmt.Sprint(i.Causes), " ", ", "), "[]") + ")"
}

func lists(w io.Writer, head string, l design.LabelList) {
	if len(l.All()) == 0 {
		return
	}
	fmt.Fprintf(w, "\n  %s\n", head)
	for _, s := range []struct {
		name   string
		labels []string
	}{{"devices, lights, terminals", l.Parts}, {"cables", l.Cables}, {"wires and cores", l.Wires}, {"test points", l.Points}} {
		if len(s.labels) > 0 {
			fmt.Fprintf(w, "    %s: %s\n", s.name, together(s.labels))
		}
	}
}

// WriteFindings prints the findings that came and went.
func WriteFindings(w io.Writer, c *design.Changes) {
	if len(c.Raised)+len(c.Cleared) == 0 {
		return
	}
	fmt.Fprintln(w, "\n  Findings")
	for _, f := range c.Raised {
		fmt.Fprintf(w, "    new  %-8s %s\n", f.Severity, f.Message)
	}
	for _, f := range c.Cleared {
		fmt.Fprintf(w, "    gone %-8s %s\n", f.Severity, f.Message)
	}
}

func stayHead(s design.Stay) string {
	if s.Of == 0 {
		return s.Things
	}
	return fmt.Sprintf("%d of %d %s", s.Count, s.Of, s.Things)
}

// WriteShort prints a change on one screen: the values, how much work of each kind
// they make, and the findings.
func WriteShort(w io.Writer, c *design.Changes) {
	if Unchanged(c) {
		fmt.Fprintln(w, "  Nothing has changed.")
		return
	}
	const mostLines = 12
	short := *c
	if len(short.Values) > mostLines {
		short.Values = short.Values[:mostLines]
	}
	WriteValues(w, &short)
	if n := len(c.Values) - len(short.Values); n > 0 {
		fmt.Fprintf(w, "       and %d more\n", n)
	}
	for _, tool := range design.Tools {
		var labels []string
		for _, i := range c.Work {
			if i.Tool == tool {
				labels = append(labels, i.Labels...)
			}
		}
		if len(labels) == 0 {
			continue
		}
		text := together(labels)
		const widest = 90
		if r := []rune(text); len(r) > widest {
			text = string(r[:widest]) + " …"
		}
		fmt.Fprintf(w, "  %-13s %s\n", ToolHead(tool), text)
	}
	WriteFindings(w, c)
}
