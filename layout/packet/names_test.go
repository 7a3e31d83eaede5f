package packet

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/layout/ink"
	"gloamwright/layout/schematic"
)

func copyFacts(f *facts.Facts) *facts.Facts {
	c := *f
	return &c
}

func stopFinding() finding.Finding {
	return finding.Finding{Severity: finding.Stop, Check: "fuse-cable", Subject: "-F101", Message: "-F101: 20 A, limit 9.4 A", Remedy: "10 A.", Value: 20, Limit: 9.4, Unit: "A"}
}

// longNames are names of sixty letters and more, in scripts that the type faces hold.
var longNames = strings.NewReplacer(
	"Bunkroom corridor", "Außenflur hinter der großen Küche für müde Nachtwächter",
	"Mess and galley", "Αίθουσα φαγητού και μαγειρείο του σταθμού, άκρη της λίμνης",
	"Slip path", "Дорожка к лодочному сараю мимо старой пристани, склад вёсел",
	"Boat loft", "Donaudampfschifffahrtsgesellschaftskapitänskajütenetage",
	"Bracken Reach Trust", "Stiftung zur Förderung der Vogelwarte am südlichen Ende des Sees",
	"Field station, boathouse and bunkrooms", "Vogelwarte, Bootshaus, Schlafräume, Werkstatt, Funkraum und Steg am Südufer",
	"title: Standby lighting", "title: Bereitschaftsbeleuchtung für Vogelwarte, Bootshaus und Schlafräume",
	"Annex board", "Unterverteilung im Dachgeschoss des Bootshauses am See",
	"west door", "westliche Türe neben dem Schuhregal und der Garderobe",
)

func TestLongNames(t *testing.T) {
	path := filepath.Join("..", "..", "examples", "bracken-reach.yaml")
	src, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	d := made(t, path, []byte(longNames.Replace(string(src))))
	p := built(t, d)
	checkSheets(t, p, a4, a4Side)
	if len(p.Cut) == 0 {
		t.Fatal("nothing was cut: the names are not long enough for this test")
	}
	// what is cut in one place stands in full in another
	var all strings.Builder
	for _, w := range textsOf(p) {
		all.WriteString(w.Text)
	}
	bare := strings.NewReplacer(" ", "", noBreak, "")
	text := bare.Replace(all.String())
	names := []string{d.Site.Job.Title.Val, d.Site.Job.Site.Val, d.Site.Job.Client.Val}
	for _, c := range d.Site.Circuits {
		names = append(names, c.Name.Val)
	}
	for _, x := range d.Circuit.Boards {
		names = append(names, x.Title)
	}
	for _, x := range d.Circuit.Places {
		names = append(names, x.Name)
	}
	for _, l := range d.Luminaires {
		names = append(names, l.Point.Place)
	}
	for _, r := range d.Readings {
		names = append(names, r.Point.Shows)
	}
	for _, n := range names {
		if !strings.Contains(text, bare.Replace(ink.Clean(n))) {
			t.Errorf("%q stands in full nowhere", n)
		}
	}
}

func TestMissingGlyphIsReported(t *testing.T) {
	path := filepath.Join("..", "..", "examples", "bracken-reach.yaml")
	src, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	d := made(t, path, []byte(strings.Replace(string(src), "A. Marlowe", "A. 山 Marlowe", 1)))
	sheets, err := schematic.Sheets(d)
	if err != nil {
		t.Fatal(err)
	}
	if _, err = Make(d, sheets); err == nil || !strings.Contains(err.Error(), "山") {
		t.Errorf("a sign that no face has: error %v", err)
	}
}

func TestGlue(t *testing.T) {
	for in, want := range map[string]string{
		"a fuse of 2 A here":      "a fuse of 2~A here",
		"≤ 5 % of 24 V":           "≤~5~% of 24~V",
		"see sheet 12, block 3":   "see sheet~12, block~3",
		"2 × 1.5 mm², DC 24 V":    "2~×~1.5~mm², DC~24~V",
		"1 379 A":                 "1~379~A",
		"5 lights on 2 boards":    "5 lights on 2 boards",
		"Hold point 1 on sheet 7": "Hold point~1 on sheet~7",
		"at point 1":              "at point 1",
		"0.03 m³/h of air":        "0.03~m³/h of air",
		"3 K/W, 4 K/h":            "3~K/W, 4~K/h",
		"12 345 A, 12 3456":       "12~345~A, 12 3456",
		"revision B. Revision Be": "revision~B. Revision Be",
		"30 ft, 5 for 2 mA.":      "30~ft, 5 for 2~mA.",
	} {
		if got := strings.ReplaceAll(glue(in), noBreak, "~"); got != want {
			t.Errorf("glue(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestDesignationsInText(t *testing.T) {
	for in, want := range map[string]string{
		"At -X1:71 and -X1:72, with -E15:+ joined": "-X1:71 -X1:72 -E15:+",
		"-E1…-E5, -E9: replace":                    "-E1 -E5 -E9",
		"ISO 8820-3, AB-F1, x/-F2, 5-F1":           "",
		"-G1:− to -K1.2:A1":                        "-G1:− -K1.2:A1",
		"low-voltage -X3:L+ end":                   "-X3:L+",
	} {
		var got []string
		for _, m := range findDesignations(in) {
			got = append(got, in[m[0]:m[1]])
		}
		if strings.Join(got, " ") != want {
			t.Errorf("%q: %q, want %q", in, strings.Join(got, " "), want)
		}
	}
}

// TestWrapKeepsDesignations: a designation is never broken, other words are when they
// must.
func TestWrapKeepsDesignations(t *testing.T) {
	for _, width := range []float64{9, 14, 25, 60} {
		text := "-X1:71 Donaudampfschifffahrtsgesellschaft -E15:+ and 24 V at -K1:A1"
		var all strings.Builder
		for _, l := range wrap(text, tableText, width) {
			all.WriteString(l.String())
			if w := l.width(); w > width+0.01 && len(l) != 1 {
				t.Errorf("a line of %.1f mm in a column of %.1f", w, width)
			}
			for _, s := range l {
				if strings.HasPrefix(s.text, "-") && s.ref != s.text {
					t.Errorf("%q was broken", s.text)
				}
			}
		}
		bare := strings.NewReplacer(" ", "", noBreak, "")
		if bare.Replace(all.String()) != bare.Replace(text) {
			t.Errorf("width %.0f: %q became %q", width, text, all.String())
		}
	}
}
