package finding

import (
	"gloamwright/internal/facts"
)

// dateMissing finds a job without a date.
var dateMissing = &Check{
	Name:   "date-missing",
	Title:  "no date",
	Doc:    "Every sheet carries the date of its revision; without one nobody can tell on site which paper is the newer. It is never taken from the clock.",
	Source: "ISO 7200 (date of issue is a mandatory field)",
	Run: func(f *facts.Facts, report func(Finding)) {
		j := f.Site.Job
		if j.Date.Val != "" {
			return
		}
		report(Finding{
			Severity: Caution, Subject: "job.date", At: j.Number.Pos,
			Message: "Job " + j.Number.Val + ", revision " + j.Revision.Val + ": no date",
			Remedy:  "job.date of 10 characters, year first.",
			Value:   0, Limit: 1, Unit: "dates", Over: true,
		})
	},
}
