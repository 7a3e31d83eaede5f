package design_test

import (
	"bytes"
	"cmp"
	"encoding/json"
	"fmt"
	"math/rand/v2"
	"slices"
	"testing"

	gocmp "github.com/google/go-cmp/cmp"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/results"
	"gloamwright/internal/sitegen"
)

// bytesOf designs a site and returns its results.json.
func bytesOf(t *testing.T, site *describe.Site) []byte {
	t.Helper()
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	text, err := results.JSON(d)
	if err != nil {
		t.Fatal(err)
	}
	return text
}

func sameText(t *testing.T, what string, a, b []byte) {
	t.Helper()
	if bytes.Equal(a, b) {
		return
	}
	x, y := bytes.Split(a, []byte("\n")), bytes.Split(b, []byte("\n"))
	for i := range min(len(x), len(y)) {
		if !bytes.Equal(x[i], y[i]) {
			t.Fatalf("%s: line %d of results.json was\n%s\nand is\n%s", what, i+1, x[i], y[i])
		}
	}
	t.Fatalf("%s: results.json had %d lines and has %d", what, len(x), len(y))
}

// The same description gives the same bytes, in whatever order stages and luminaire
// types stand in the file.
func TestOrderInTheFileDoesNotMatter(t *testing.T) {
	for _, name := range examples(t) {
		first := bytesOf(t, load(t, name))
		sameText(t, name+" once more", first, bytesOf(t, load(t, name)))
		rng := rand.New(rand.NewPCG(1, 2))
		for range 3 {
			site := load(t, name)
			rng.Shuffle(len(site.Stages), func(i, j int) { site.Stages[i], site.Stages[j] = site.Stages[j], site.Stages[i] })
			rng.Shuffle(len(site.Luminaires), func(i, j int) { site.Luminaires[i], site.Luminaires[j] = site.Luminaires[j], site.Luminaires[i] })
			sameText(t, name+" shuffled", first, bytesOf(t, site))
		}
	}
}

// withoutPlaces drops what points into the file, and the order of the findings, which
// follows it: all that may differ between two texts of one site.
func withoutPlaces(t *testing.T, text []byte) []byte {
	t.Helper()
	var v any
	if err := json.Unmarshal(text, &v); err != nil {
		t.Fatal(err)
	}
	var walk func(v any)
	walk = func(v any) {
		switch x := v.(type) {
		case map[string]any:
			delete(x, "at")
			for _, y := range x {
				walk(y)
			}
		case []any:
			for _, y := range x {
				walk(y)
			}
		}
	}
	walk(v)
	list := v.(map[string]any)["findings"].([]any)
	slices.SortFunc(list, func(a, b any) int { return cmp.Compare(fmt.Sprint(a), fmt.Sprint(b)) })
	out, err := json.MarshalIndent(v, "", " ")
	if err != nil {
		t.Fatal(err)
	}
	return out
}

// A text whose sections and keys stand the other way round describes the same site.
func TestBackwardsTextIsTheSameSite(t *testing.T) {
	for i := range 12 {
		n, o := sitegen.Varied(i)
		o.Backwards = false
		site := generated(t, n, o)
		if _, err := design.Make(site, nil); err != nil {
			continue // TestGeneratedSitesAreDesigned reports it
		}
		forward := withoutPlaces(t, bytesOf(t, generated(t, n, o)))
		o.Backwards = true
		sameText(t, "site backwards", forward, withoutPlaces(t, bytesOf(t, generated(t, n, o))))
	}
}

// Labels that were given stay with their things when the site grows.
func TestKeptLabelsStay(t *testing.T) {
	site := load(t, "juniper-flat")
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	kept := d.Labels
	grown := load(t, "juniper-flat")
	extra := *grown.Circuits[3]
	extra.Name.Val = "Annexe"
	extra.Points = slices.Clone(extra.Points[:1])
	grown.Circuits = append(grown.Circuits, &extra)
	g, err := design.Make(grown, kept)
	if err != nil {
		t.Fatal(err)
	}
	if diff := gocmp.Diff(only(kept, g.Labels), kept); diff != "" {
		t.Errorf("labels moved (-is +was):\n%s", diff)
	}
	if len(g.Labels) <= len(kept) {
		t.Errorf("%d labels, want more than %d", len(g.Labels), len(kept))
	}
}

// only returns those of all that have a key in some.
func only(some, all circuit.Labels) circuit.Labels {
	out := circuit.Labels{}
	for k := range some {
		if v, ok := all[k]; ok {
			out[k] = v
		}
	}
	return out
}

// What the description gives stands in the outcome as it was given, too large or too
// small as it may be.
func TestPinnedValuesAreNeverChanged(t *testing.T) {
	site := load(t, "bracken-reach")
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	pinnedCircuits := 0
	for _, c := range site.Circuits {
		if !c.Fuse.Given {
			continue
		}
		pinnedCircuits++
		for _, f := range d.Fuses {
			if f.Feeds == c.Name.Val && (f.Rating != c.Fuse.Val || !f.Pinned) {
				t.Errorf("%s: fuse of %v given, %v in the outcome", c.Name.Val, c.Fuse.Val, f.Rating)
			}
		}
		for _, w := range d.Conductors {
			if w.Conductor.Circuit == c.Name.Val && w.Conductor.Cable != nil && w.Conductor.Size != c.Cable.Val {
				t.Errorf("%s: %v given, %v in the outcome", c.Name.Val, c.Cable.Val, w.Conductor.Size)
			}
		}
	}
	if pinnedCircuits != 2 {
		t.Errorf("%d circuits with a given fuse, want 2", pinnedCircuits)
	}
}
