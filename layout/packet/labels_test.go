package packet

import (
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// Every thing that bears a label gets it, and as often as it has ends: a wire or cable
// at both ends, with the text twice on a flag or sleeve.
func TestLabelsEqualEnds(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		p := built(t, d)
		got := map[string]int{} // what is set in the type of labels
		for _, r := range sheetsOf(p, keyLabels) {
			for _, w := range writtenOn(r) {
				if w.Font.Face == ink.MonoBold || strings.HasPrefix(w.Text, "TP") && w.Font.Face == ink.Bold {
					got[w.Text]++
				}
			}
		}
		want := map[string]int{}
		for _, w := range d.Circuit.Conductors {
			want[w.Number] += 4
		}
		for _, c := range d.Circuit.Cables {
			want[c.Designation] += 4
		}
		for _, x := range d.Circuit.TestPoints {
			want[x.Label]++
		}
		for _, x := range d.Circuit.Parts {
			switch x.Kind {
			case circuit.MainsConnection, circuit.BusBar:
			case circuit.Terminal:
				_, n, _ := strings.Cut(x.Designation, ":")
				want[n]++ // shares its figure with wires of the same number
			default:
				want[x.Designation]++
			}
		}
		for label, n := range want {
			if got[label] != n {
				t.Errorf("%s: label %q is printed %d times, want %d", name, label, got[label], n)
			}
		}
	}
}

// The printer crosses stand in the margins and the cells inside the text width.
func TestLabelCellsFillTheWidth(t *testing.T) {
	for _, w := range []float64{deviceW * 7, lampW * 11, flagW * 6, sleeveW * 10, plateW*3 + 2*1.5} {
		if w > a4.width+slack || w < a4.width-5 {
			t.Errorf("a row of labels is %.2f mm wide, the text %.0f mm", w, a4.width)
		}
	}
	if w := sleeveWidth([]string{"1", "22"}); w != sleeveW {
		t.Errorf("short texts get sleeves of %.1f mm, want %d", w, sleeveW)
	}
	long := sleeveWidth([]string{"12L+.10"})
	if half := long/2 - 0.8; spans("12L+.10", flagName).width() > half || long <= sleeveW {
		t.Errorf("a sleeve of %.1f mm is too narrow for 12L+.10", long)
	}
}
