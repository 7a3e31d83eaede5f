package job

import (
	"fmt"
	"strings"
	"testing"

	"gloamwright/internal/design"
	"gloamwright/internal/finding"
)

// TestFindingsAlike: of many alike the first stands in full, the others by name, and
// nothing is left uncounted; a few alike and steps for which nothing fits all stand.
func TestFindingsAlike(t *testing.T) {
	d := &design.Design{}
	add := func(check string, n int) {
		for i := range n {
			name := fmt.Sprintf("-%s%d", check, i+1)
			d.Findings = append(d.Findings, finding.Finding{Severity: finding.Stop, Check: check, Subject: name, Message: name + ": too much", Remedy: "Less."})
		}
	}
	add("blocked", 5)
	add("lamp", 13)
	add("fuse", 3)
	var b strings.Builder
	Findings(&b, d)
	got := b.String()
	for want, times := range map[string]int{
		"Findings: 21 stop": 1, "-blocked5: too much": 1, "-lamp1: too much": 1, "-lamp2: too much": 0, "-fuse3: too much": 1,
		"likewise -lamp2, -lamp3, -lamp4, -lamp5, -lamp6, -lamp7, -lamp8, -lamp9, -lamp10, -lamp11 and 2 more": 1, "likewise": 1,
	} {
		if strings.Count(got, want) != times {
			t.Errorf("%q stands %d times, want %d:\n%s", want, strings.Count(got, want), times, got)
		}
	}
}
