package design_test

import (
	"fmt"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
	"gloamwright/internal/stage"
)

// generated decodes a generated site.
func generated(tb testing.TB, n int, o sitegen.Options) *describe.Site {
	tb.Helper()
	src := sitegen.Site(n, o)
	site, list := describe.Parse("site.yaml", src, stage.Schema())
	if list.HasErrors() {
		tb.Fatalf("%s\n%s", list.Render(describe.Sources{"site.yaml": src}), src)
	}
	return site
}

// varied is how many generated sites are designed.
const varied = 200

// Every generated site is designed, whatever its shape.
func TestGeneratedSitesAreDesigned(t *testing.T) {
	count := varied
	if testing.Short() {
		count = varied / 5
	}
	for i := range count {
		n, o := sitegen.Varied(i)
		t.Run(fmt.Sprintf("%d", i), func(t *testing.T) {
			d, err := design.Make(generated(t, n, o), nil)
			if err != nil {
				t.Fatalf("%+v: %v\n%s", o, err, sitegen.Site(n, o))
			}
			checkWorkings(t, d)
			for _, c := range d.Conditions {
				if !(c.Residual < nanoAmpere) {
					t.Errorf("%s: %g A left over", c.Key, c.Residual)
				}
			}
			if len(d.Luminaires) != n || d.Totals.Luminaires != n {
				t.Errorf("%d luminaires in the outcome, %d in the totals, want %d", len(d.Luminaires), d.Totals.Luminaires, n)
			}
		})
	}
}
