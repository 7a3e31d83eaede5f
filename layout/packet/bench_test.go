package packet

import (
	"testing"

	"gloamwright/layout/schematic"
)

// BenchmarkMake is the packet of a finished design, from its schematic sheets to the
// bytes of the document.
func BenchmarkMake(b *testing.B) {
	d := example(b, "bracken-reach")
	sheets, err := schematic.Sheets(d)
	if err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for b.Loop() {
		pdf, err := Make(d, sheets)
		if err != nil {
			b.Fatal(err)
		}
		b.ReportMetric(float64(len(pdf)), "bytes")
	}
}
