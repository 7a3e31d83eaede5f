package finding

import (
	"slices"
	"strings"
	"testing"
	"unicode"

	"github.com/google/go-cmp/cmp"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestSoundSiteOnlyHearsWhatIsAlwaysSaid(t *testing.T) {
	var got []string
	for _, x := range Judge(sound()) {
		got = append(got, x.Severity.String()+" "+x.Check)
	}
	if d := cmp.Diff([]string{"caution escape-route"}, got); d != "" {
		t.Errorf("findings (-want +got):\n%s", d)
	}
}

func TestChecksAreCompleteAndInOrder(t *testing.T) {
	all := All()
	if len(all) < 30 {
		t.Errorf("%d checks, want at least 30", len(all))
	}
	if !slices.IsSortedFunc(all, func(a, b *Check) int { return strings.Compare(a.Name, b.Name) }) {
		t.Error("All is not in the order of names")
	}
	seen := map[string]bool{}
	for i, c := range all {
		if c == nil {
			t.Fatalf("check %d is nil", i)
		}
		if c.Name == "" || c.Title == "" || c.Doc == "" || c.Source == "" || c.Run == nil {
			t.Errorf("%s: name, title, doc, source and run must all be set", c.Name)
		}
		if seen[c.Name] {
			t.Errorf("%s: name given twice", c.Name)
		}
		seen[c.Name] = true
		if strings.HasSuffix(c.Title, ".") || !strings.HasSuffix(c.Doc, ".") {
			t.Errorf("%s: a title ends without a full stop, a doc with one", c.Name)
		}
		if r := []rune(c.Title); unicode.IsUpper(r[0]) && !unicode.IsUpper(r[1]) {
			t.Errorf("%s: title %q begins with a capital", c.Name, c.Title)
		}
	}
}

func TestReferenceHoldsEveryCheck(t *testing.T) {
	ref := Reference()
	for i, c := range All() {
		if want := (Entry{c.Name, c.Title, c.Doc, c.Source}); ref[i] != want {
			t.Errorf("entry %d is %+v, want %+v", i, ref[i], want)
		}
	}
}

// spoiled breaks the sound site in many ways at once.
func spoiled() *facts.Facts {
	f := sound()
	for _, l := range f.Luminaires {
		l.Drop = 0.09
	}
	f.Battery.Capacity = 10
	f.Site.Practice.Negative.Val = "RD"
	f.Site.Duty.BatteryRoom.Val.High = 45
	f.Fuses[1].Rating = 19
	f.Relays[0].Contact = 9
	f.Site.Job.Date.Val = ""
	f.Supplies[0].Current = 1
	f.Charger.Current = 20
	f.Conditions[1].Settled = false
	return f
}

func TestJudgeSortsGravestFirstThenByPlace(t *testing.T) {
	got := Judge(spoiled())
	if len(got) < 12 {
		t.Fatalf("%d findings, want at least 12", len(got))
	}
	for i := 1; i < len(got); i++ {
		a, b := got[i-1], got[i]
		if a.Severity > b.Severity || a.Severity == b.Severity && a.At.File == b.At.File && a.At.Line > b.At.Line {
			t.Errorf("%d: %v %s line %d stands before %v %s line %d", i, a.Severity, a.Check, a.At.Line, b.Severity, b.Check, b.At.Line)
		}
	}
	for range 5 {
		if d := cmp.Diff(got, Judge(spoiled())); d != "" {
			t.Fatalf("two runs differ:\n%s", d)
		}
	}
}

func TestEveryFindingSaysWhatItNeeds(t *testing.T) {
	for _, x := range Judge(spoiled()) {
		if x.Severity < Stop || x.Severity > Note || x.Subject == "" || x.Message == "" || x.Source == "" || x.Check == "" {
			t.Errorf("incomplete: %+v", x)
		}
		if x.Severity != Note && x.Check != escapeRoute.Name && !strings.ContainsAny(x.Remedy, "0123456789") {
			t.Errorf("%s: remedy %q holds no figure", x.Check, x.Remedy)
		}
		if strings.HasSuffix(x.Message, ".") || x.Remedy != "" && !strings.HasSuffix(x.Remedy, ".") {
			t.Errorf("%s: message ends with a full stop or remedy without: %q / %q", x.Check, x.Message, x.Remedy)
		}
		for _, word := range []string{"about", "approx", "should", "etc."} {
			if strings.Contains(x.Message+" "+x.Remedy, word) {
				t.Errorf("%s: says %q", x.Check, word)
			}
		}
	}
}

func TestPairTellsFigureFromLimit(t *testing.T) {
	for _, tc := range []struct {
		v, limit        quantity.Ratio
		figure, atLimit string
	}{
		{0.0495, 0.05, "4.95 %", "5 %"},
		{0.05004, 0.05, "5.004 %", "5 %"},
		{0.0500001, 0.05, "5.00001 %", "5 %"},
	} {
		v, l := pair(tc.v, tc.limit)
		if v != tc.figure || l != tc.atLimit {
			t.Errorf("pair(%g, %g) = %q, %q; want %q, %q", float64(tc.v), float64(tc.limit), v, l, tc.figure, tc.atLimit)
		}
	}
}

func TestOverAndUnderForgiveRounding(t *testing.T) {
	limit := quantity.Volt(0.1 + 0.2) // 0.30000000000000004
	if over(limit, quantity.Volt(0.3)) || under(quantity.Volt(0.3), limit) {
		t.Error("rounding counts as passing the limit")
	}
	if !over(quantity.Volt(0.3001), quantity.Volt(0.3)) || !under(quantity.Volt(0.2999), quantity.Volt(0.3)) {
		t.Error("a real step over the limit is forgiven")
	}
	if !under(quantity.Celsius(-5), 0) || over(quantity.Celsius(0), 0) || !over(quantity.Celsius(-4), -5) {
		t.Error("limits at and below zero")
	}
}
