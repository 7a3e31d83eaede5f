package release

import "gloamwright/internal/design"

// findings finds the findings that only one of the records has. A finding with the
// same check and subject, but another figure, is in both.
func (c *comparison) findings() {
	c.out.Raised = without(c.now.Findings, c.old.Findings)
	c.out.Cleared = without(c.old.Findings, c.now.Findings)
}

func without(list, other []recordFinding) []design.FindingChange {
	type key struct{ severity, check, subject string }
	count := map[key]int{}
	for _, f := range other {
		count[key{f.Severity, f.Check, f.Subject}]++
	}
	var out []design.FindingChange
	for _, f := range list {
		k := key{f.Severity, f.Check, f.Subject}
		if count[k] > 0 {
			count[k]--
			continue
		}
		out = append(out, design.FindingChange{Severity: f.Severity, Subject: f.Subject, Message: f.Message})
	}
	return out
}
