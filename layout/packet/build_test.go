package packet

import (
	"os"
	"path/filepath"
	"sync"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/stage"
	"gloamwright/layout/schematic"
)

var (
	designs     = map[string]*design.Design{}
	designsLock sync.Mutex
)

// example designs an example site; each is made once.
func example(t testing.TB, name string) *design.Design {
	t.Helper()
	designsLock.Lock()
	defer designsLock.Unlock()
	if d := designs[name]; d != nil {
		c := *d
		return &c
	}
	path := filepath.Join("..", "..", "examples", name+".yaml")
	src, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	d := made(t, path, src)
	designs[name] = d
	c := *d
	return &c
}

// made designs a description.
func made(t testing.TB, path string, src []byte) *design.Design {
	t.Helper()
	site, list := describe.Options{}.Parse(path, src, stage.Schema())
	if list.HasErrors() {
		t.Fatal(list)
	}
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

// built makes the packet of a design.
func built(t *testing.T, d *design.Design) *Packet {
	t.Helper()
	sheets, err := schematic.Sheets(d)
	if err != nil {
		t.Fatal(err)
	}
	p, err := Build(d, sheets)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// examples are the sites that every test of whole packets runs on.
var examples = []string{"bracken-reach", "juniper-flat"}

// TestWrite writes the packets of the examples for looking at, when asked to by
// PACKET_OUT.
func TestWrite(t *testing.T) {
	dir := os.Getenv("PACKET_OUT")
	if dir == "" {
		t.Skip("PACKET_OUT names no folder")
	}
	for _, name := range examples {
		d := example(t, name)
		d.Issued = os.Getenv("PACKET_DRAFT") == ""
		p := built(t, d)
		if err := os.WriteFile(filepath.Join(dir, name+".pdf"), p.PDF, 0o644); err != nil {
			t.Fatal(err)
		}
		t.Logf("%s: %d sheets, %d bytes, cut: %q", name, len(p.Sheets), len(p.PDF), p.Cut)
	}
}
