package describe

import (
	"fmt"
	"strings"
	"testing"
)

// large is a description with ten boards and n luminaires on circuits of ten.
func large(n int) string {
	var b strings.Builder
	head, tail, _ := strings.Cut(least, "  board: {kind: distribution-board, from: store}\n")
	b.WriteString(head)
	for i := range 10 {
		fmt.Fprintf(&b, "  board%d: {kind: distribution-board, from: store, ways: 60}\n", i)
	}
	middle, _, _ := strings.Cut(tail, "circuits:")
	b.WriteString(middle + "circuits:\n")
	for i := range n / 10 {
		fmt.Fprintf(&b, "  - {name: Circuit %d, board: board%d, points: [%s]}\n", i, i%10, strings.TrimSuffix(strings.Repeat("4 m lamp at a place, ", 10), ", "))
	}
	return b.String()
}

func BenchmarkParse(b *testing.B) {
	schema := testSchema()
	for _, n := range []int{10, 100, 1000} {
		src := []byte(large(n))
		b.Run(fmt.Sprintf("%d luminaires", n), func(b *testing.B) {
			for b.Loop() {
				if _, list := Parse("x.yaml", src, schema); list.HasErrors() {
					b.Fatal(list)
				}
			}
		})
	}
}
