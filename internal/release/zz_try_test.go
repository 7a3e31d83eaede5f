package release

import (
	"fmt"
	"os"
	"strings"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/results"
	"gloamwright/internal/stage"
)

func TestZZ(t *testing.T) {
	src, _ := os.ReadFile("../../examples/bracken-reach.yaml")
	site, _ := describe.Parse("x.yaml", src, stage.Schema())
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	js, _ := results.JSON(d)
	r := (*Register)(nil).Next("A", d.Labels, site, d.Circuit)
	src2 := []byte(strings.Replace(string(src), "along: 28 m", "along: 42 m", 1))
	src2 = []byte(strings.Replace(string(src2), "[11 m corridor at half landing, 3 m corridor at top landing]", "[11 m corridor at half landing, 2 m porch, 3 m corridor at top landing]  # darker than thought", 1))
	site2, list := describe.Parse("x.yaml", src2, stage.Schema())
	if list.HasErrors() {
		t.Fatal(list)
	}
	kept, _ := r.Keep(site2)
	d2, err := design.Make(site2, kept)
	if err != nil {
		t.Fatal(err)
	}
	js2, _ := results.JSON(d2)
	a, err := readRecord("a", js)
	if err != nil {
		t.Fatal(err)
	}
	b, _ := readRecord("b", js2)
	v, s := changedValues(site, site2, stage.Schema())
	ch := compareRecords(a, b, v, s, map[string]string{}, map[string]string{"main": "-X3"})
	for _, x := range ch.Values {
		fmt.Printf("%+v\n", x)
	}
	for _, w := range ch.Work {
		fmt.Printf("%-12s %-30s %-60s %s -> %s %v %s\n", w.Tool, w.What, w.Do, w.Was, w.Is, w.Causes, w.Test)
	}
	for _, w := range ch.Stays {
		fmt.Printf("%+v\n", w)
	}
	fmt.Println(ch.New, ch.Gone, ch.Raised, ch.Cleared, ch.Rows)
}
