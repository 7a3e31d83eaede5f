package design_test

import (
	"fmt"
	"testing"

	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
)

// The whole of Make on the example.
func BenchmarkMake(b *testing.B) {
	site := load(b, "bracken-reach")
	for b.Loop() {
		if _, err := design.Make(site, nil); err != nil {
			b.Fatal(err)
		}
	}
}

// The same on generated sites of 10 to 1000 luminaires, in rows of eight and on a tree
// of boards. Time a luminaire should not grow with their number.
func BenchmarkMakeGenerated(b *testing.B) {
	for _, shape := range []sitegen.Shape{sitegen.Rows, sitegen.Boards} {
		for _, n := range []int{10, 100, 1000} {
			b.Run(fmt.Sprintf("%s/%d", shape, n), func(b *testing.B) {
				site := generated(b, n, sitegen.Options{Shape: shape, Control: sitegen.Comparator})
				for b.Loop() {
					if _, err := design.Make(site, nil); err != nil {
						b.Fatal(err)
					}
				}
				b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N)/float64(n), "µs/luminaire")
			})
		}
	}
}
