package describe

import (
	"testing"
)

// FuzzParse asks of any file: no panic, every place inside the file, mistakes or a
// site that holds what it must, and text that can be printed.
func FuzzParse(f *testing.F) {
	f.Add(sample(f))
	f.Add(least)
	f.Add("\ufeffjob: *x\r\n")
	f.Add("a: &a [*a]\n")
	f.Add("job: |\n  x\n\ry: {\u3000}\n---\n")
	f.Add("\"a\\\nb\": 'it''s'\n? [x]\n: !!str y\n<<: {}\n")
	for _, m := range mistakes {
		f.Add(m.new)
		f.Add("stages:\n  " + m.new)
	}
	schema := testSchema()
	f.Fuzz(func(t *testing.T, src string) {
		s, list := Parse("x.yaml", []byte(src), schema)
		check := func(at Span) {
			if at == (Span{}) {
				return
			}
			if at.File != "x.yaml" {
				t.Fatalf("span in %q", at.File)
			}
			marked(t, src, at)
		}
		for _, d := range list {
			check(d.At)
			for _, r := range d.Related {
				check(r.At)
			}
			if d.Severity == 0 || d.Code == "" || d.Summary == "" || d.Detail == "" {
				t.Fatalf("incomplete diagnostic %+v", d)
			}
		}
		list.Render(s.Sources)
		if list.HasErrors() {
			return
		}
		if s.Job.Number.Val == "" || s.Duty.Nominal.Val == 0 || s.Duty.Outage.Val == 0 || len(s.Circuits) == 0 {
			t.Fatal("no errors, and yet an incomplete site")
		}
		for _, c := range s.Circuits {
			if len(c.Points) == 0 {
				t.Fatal("a circuit without points")
			}
			check(c.Name.Pos)
			for _, leg := range c.Points {
				check(leg.Length.Pos)
				check(leg.Luminaire.Pos)
			}
		}
	})
}
