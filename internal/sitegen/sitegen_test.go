package sitegen_test

import (
	"bytes"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/sitegen"
	"gloamwright/internal/stage"
)

func lamps(site *describe.Site) int {
	n := 0
	var walk func([]*describe.Leg)
	walk = func(legs []*describe.Leg) {
		for _, l := range legs {
			n++
			for _, b := range l.Branches {
				walk(b)
			}
		}
	}
	for _, c := range site.Circuits {
		walk(c.Points)
	}
	return n
}

// Every generated site is a description without a mistake and has the number of
// luminaires that was asked for.
func TestEverySiteIsValid(t *testing.T) {
	for i := range 300 {
		n, o := sitegen.Varied(i)
		src := sitegen.Site(n, o)
		site, list := describe.Parse("site.yaml", src, stage.Schema())
		if list.HasErrors() {
			t.Fatalf("site %d: %s\n%s", i, list.Render(describe.Sources{"site.yaml": src}), src)
		}
		if got := lamps(site); got != n {
			t.Errorf("site %d has %d luminaires, want %d", i, got, n)
		}
		if !bytes.Equal(src, sitegen.Site(n, o)) {
			t.Errorf("site %d is not the same twice", i)
		}
	}
}

// The row of varied sites uses every stage kind and every luminaire kind.
func TestEveryKindOccurs(t *testing.T) {
	used := map[string]bool{}
	for i := range 60 {
		n, o := sitegen.Varied(i)
		site, list := describe.Parse("site.yaml", sitegen.Site(n, o), stage.Schema())
		if list.HasErrors() {
			t.Fatal(list)
		}
		for _, s := range site.Stages {
			used[s.Kind.Val] = true
		}
		for _, l := range site.Luminaires {
			used[l.Kind.Val] = true
		}
		for _, p := range site.Parts {
			used["single "+p.Kind.Val] = true
		}
	}
	for _, k := range stage.Kinds() {
		if !used[k.Name] {
			t.Errorf("no site has a %s", k.Name)
		}
	}
	for _, k := range stage.LuminaireKinds() {
		if !used[k.Name] {
			t.Errorf("no site has a %s", k.Name)
		}
	}
	for _, k := range stage.Schema().Parts {
		if !used["single "+k.Name] {
			t.Errorf("no site has a single %s", k.Name)
		}
	}
}

func TestLargeSites(t *testing.T) {
	for _, shape := range sitegen.Shapes {
		if shape == sitegen.ManyWays {
			continue
		}
		site, list := describe.Parse("site.yaml", sitegen.Site(1000, sitegen.Options{Shape: shape}), stage.Schema())
		if list.HasErrors() {
			t.Fatalf("%s: %v", shape, list)
		}
		if got := lamps(site); got != 1000 {
			t.Errorf("%s: %d luminaires, want 1000", shape, got)
		}
	}
}
