package packet

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// TestBlocksOfStrings: where strings stand in parallel, what is ordered is one block's
// capacity, a share of the battery's.
func TestBlocksOfStrings(t *testing.T) {
	path := filepath.Join("..", "..", "examples", "bracken-reach.yaml")
	src, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	given := strings.Replace(string(src), "kind: battery,", "kind: battery, capacity: 52 Ah, parallel: 2,", 1)
	d := made(t, path, []byte(given))
	b := &book{d: d}
	what, must := b.describe(d.Battery.Part)
	if !strings.Contains(what, "12 V 26 Ah") || must != "≥ "+figure(d.Battery.Required/2)+"; all of one batch" {
		t.Errorf("%q, %q: want blocks of 12 V 26 Ah that have half of %v", what, must, d.Battery.Required)
	}
}
