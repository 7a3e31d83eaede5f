package finding

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"

	"gloamwright/internal/facts"
)

// blocked reports the sizing steps for which nothing fits.
var blocked = &Check{
	Name:   "blocked",
	Title:  "nothing fits",
	Doc:    "A sizing step found no product or size that meets all limits at once. The finding names the limit that blocks and the smallest change that frees it.",
	Source: "the limit's own source",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, b := range f.Blocked {
			found := Finding{Severity: Stop, Subject: b.Subject, At: b.At, Remedy: sentence(b.Remedy), Source: b.Source}
			unit := ""
			if b.Unit != "" {
				unit = " " + b.Unit
			}
			figure, bound := apart(b.Figure, b.Bound)
			switch {
			case b.Unknown:
				found.Message = fmt.Sprintf("%s: %s", b.Subject, b.Limit)
			case b.What != "":
				found.Message = fmt.Sprintf("%s: nothing fits (%s): %s is %s%s, limit %s%s", b.Subject, b.Limit, b.What, figure, unit, bound, unit)
			default:
				found.Message = fmt.Sprintf("%s: nothing fits; %s %s%s, limit %s%s", b.Subject, b.Limit, figure, unit, bound, unit)
			}
			if !b.Unknown {
				found.Value, found.Limit, found.Unit = b.Figure, b.Bound, b.Unit
			}
			report(found)
		}
	},
}

// sentence gives s a capital and a full stop.
func sentence(s string) string {
	if s == "" {
		return ""
	}
	r, n := utf8.DecodeRuneInString(s)
	return string(unicode.ToUpper(r)) + strings.TrimSuffix(s[n:], ".") + "."
}
