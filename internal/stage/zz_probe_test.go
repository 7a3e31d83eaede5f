package stage_test

import (
	"fmt"
	"os"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/stage"
)

func TestProbe(t *testing.T) {
	file := os.Getenv("PROBE")
	if file == "" {
		t.Skip()
	}
	src, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	site, list := describe.Parse(file, src, stage.Schema())
	for _, d := range list {
		t.Error(d)
	}
	if t.Failed() {
		t.FailNow()
	}
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range d.Findings {
		fmt.Println(f.Severity, f.Check, f.Message)
	}
	for _, x := range d.Thresholds {
		fmt.Println(x.Key, x.Value, x.Unit, x.Text)
	}
	for _, w := range d.Workings {
		fmt.Println(w.For, "|", w.Name, "|", w.Formula, "|", w.Substituted, "=", w.Value, w.Unit)
	}
	for _, p := range d.Circuit.Parts {
		if p.Kind != "terminal" {
			fmt.Println(p.Designation, p.Key, p.Description, p.Values)
		}
	}
	for _, r := range d.Readings {
		fmt.Print(r.Point.Label, " ", r.Point.Shows)
		for i, b := range r.Bands {
			fmt.Printf(" %s:%.2f", d.Conditions[i].Key, float64(b.Typical))
		}
		fmt.Println()
	}
	for _, c := range d.Conditions {
		fmt.Println(c.Key, c.Lit, c.BatteryA, c.BatteryV)
	}
}
