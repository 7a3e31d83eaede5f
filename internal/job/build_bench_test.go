package job_test

import (
	"fmt"
	"os"
	"path/filepath"
	"testing"

	"gloamwright/internal/job"
	"gloamwright/internal/sitegen"
)

// BenchmarkBuild measures a whole build in the process, from the file to every
// document: the 24 V example, then generated sites of ten to a thousand luminaires.
// Growth is to be read from the ratios within one run.
func BenchmarkBuild(b *testing.B) {
	build := func(path string) func(b *testing.B) {
		return func(b *testing.B) {
			for b.Loop() {
				d, err := job.Load(path, nil)
				if err != nil {
					b.Fatal(err)
				}
				if _, err := job.Documents(d); err != nil {
					b.Fatal(err)
				}
			}
		}
	}
	b.Run("bracken-reach", build("../../examples/bracken-reach.yaml"))
	for _, n := range []int{10, 100, 1000} {
		path := filepath.Join(b.TempDir(), fmt.Sprintf("site-%d.yaml", n))
		if err := os.WriteFile(path, sitegen.Site(n, sitegen.Options{}), 0o644); err != nil {
			b.Fatal(err)
		}
		b.Run(fmt.Sprintf("luminaires-%d", n), build(path))
	}
}
