package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestDateMissing(t *testing.T) {
	run(t, dateMissing, []limitCase{
		{"dated", nil, nil},
		{"not dated", func(f *facts.Facts) { f.Site.Job.Date.Val = "" }, []string{
			"caution job.date: Job T-1, revision A: no date",
		}},
	})
}
