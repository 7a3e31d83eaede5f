package design_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/design"
	"gloamwright/internal/pocket"
)

// threeDigits is how well a pocket calculator must agree with the program.
const threeDigits = 1e-3

// checkWorkings puts every working of a design into a pocket calculator.
func checkWorkings(t *testing.T, d *design.Design) (checked int) {
	t.Helper()
	for _, w := range d.Workings {
		got, err := pocket.Result(w.Substituted)
		if err != nil {
			t.Errorf("%s, %s: %v", w.For, w.Name, err)
			continue
		}
		if got != w.Value && !(math.Abs(got-w.Value) <= threeDigits*math.Abs(w.Value)) {
			t.Errorf("%s, %s: %q gives %.6g, the value is %.6g %s", w.For, w.Name, w.Substituted, got, w.Value, w.Unit)
		}
		if w.For == "" || w.Name == "" || w.Formula == "" || w.Source == "" {
			t.Errorf("%+v lacks a subject, a name, a formula or a source", w)
		}
		checked++
	}
	return checked
}

// Every working of every example gives its value on a pocket calculator.
func TestWorkingsGiveTheirValues(t *testing.T) {
	for _, name := range examples(t) {
		d, err := design.Make(load(t, name), nil)
		if err != nil {
			t.Fatal(err)
		}
		t.Logf("%s: %d workings", name, checkWorkings(t, d))
	}
}

// The voltage at the worst lamp of every circuit, worked out by hand down the cable, is
// the solver's.
func TestDropByHandIsTheSolvers(t *testing.T) {
	for _, name := range examples(t) {
		d, err := design.Make(load(t, name), nil)
		if err != nil {
			t.Fatal(err)
		}
		end := slices.IndexFunc(d.Conditions, func(c *designCondition) bool { return c.Key == "end" })
		found := map[string]bool{}
		for _, w := range d.Workings {
			lamp, ok := strings.CutPrefix(w.Name, "voltage at ")
			if !ok {
				continue
			}
			lamp, _, _ = strings.Cut(lamp, ",")
			byHand, err := pocket.Result(w.Substituted)
			if err != nil {
				t.Fatal(err)
			}
			for _, l := range d.Luminaires {
				if l.Part.Designation == lamp {
					found[w.For] = true
					if v := float64(l.Volts[end]); math.Abs(v-byHand) > threeDigits*v {
						t.Errorf("%s: %.4f V by hand, %.4f V by the solver", lamp, byHand, v)
					}
				}
			}
		}
		for _, c := range d.Site.Circuits {
			if !found[c.Name.Val] {
				t.Errorf("%s: no drop is worked out for %s", name, c.Name.Val)
			}
		}
	}
}
