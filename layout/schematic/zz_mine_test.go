package schematic

import (
	"os"
	"path/filepath"
	"testing"

	"gloamwright/layout/schematic/audit"
)

func TestMine(t *testing.T) {
	files, _ := filepath.Glob("/tmp/try/sites/*.yaml")
	for _, f := range append(files, "/work/main/examples/corrie-bothy.yaml") {
		src, _ := os.ReadFile(f)
		t.Run(filepath.Base(f), func(t *testing.T) {
			d := designed(t, src)
			for _, x := range audit.Judge(drawn(t, d, false), audit.FromCircuit(d.Circuit)) {
				t.Error(x)
			}
		})
	}
}
