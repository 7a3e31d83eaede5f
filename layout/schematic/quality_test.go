package schematic

import (
	"bufio"
	"fmt"
	"os"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
	"gloamwright/layout/schematic/audit"
)

// measured are the quality numbers of a design's circuit sheets.
func measured(tb testing.TB, d *design.Design) []audit.Quality {
	tb.Helper()
	return audit.Measure(drawn(tb, d, false), audit.FromDesign(d))
}

// numbers prints one sheet's numbers in a line.
func numbers(q audit.Quality) string {
	var b strings.Builder
	for _, t := range audit.Targets {
		fmt.Fprintf(&b, "%s %s, ", t.Symbol, t.Print(q))
	}
	fmt.Fprintf(&b, "over rails %d, pairs %d, shape %.2f", q.OverRails, q.Leaving, q.Aspect)
	return b.String()
}

const (
	goldenScores = "testdata/quality.txt"
	worse        = 1.02 // a greater score than this share of the old one needs a reason
	leastScore   = 0.01 // the last printed figure
)

// kept reads the scores that the sheets had, by description and sheet.
func kept(t *testing.T) map[string]float64 {
	t.Helper()
	f, err := os.Open(goldenScores)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	out := map[string]float64{}
	for lines := bufio.NewScanner(f); lines.Scan(); {
		line, _, _ := strings.Cut(lines.Text(), "#")
		var name string
		var sheet int
		var score float64
		if strings.TrimSpace(line) == "" {
			continue
		}
		if _, err := fmt.Sscan(line, &name, &sheet, &score); err != nil {
			t.Fatalf("%s: %q: %v", goldenScores, line, err)
		}
		out[fmt.Sprint(name, " ", sheet)] = score
	}
	return out
}

// No sheet that comes with the program gets worse unseen.
func TestQualityIsKept(t *testing.T) {
	was := kept(t)
	list := samples(t)
	for _, name := range circuit.SortedKeys(list) {
		for _, q := range measured(t, designed(t, list[name])) {
			key := fmt.Sprint(name, " ", q.Sheet)
			old, ok := was[key]
			switch now := q.Score(); {
			case !ok:
				t.Errorf("%s: not in %s; add the line\n%s %.2f # %s", key, goldenScores, key, now, numbers(q))
			case now > old*worse+leastScore/2:
				t.Errorf("%s reads worse than before: score %.2f, was %.2f. Mend the drawing; or, if it has to be so, say why in %s:\n%s %.2f # the reason (%s)",
					key, now, old, goldenScores, key, now, numbers(q))
			case now < old/worse-leastScore/2:
				t.Logf("%s reads better than before: score %.2f, was %.2f; write it into %s", key, now, old, goldenScores)
			}
			delete(was, key)
		}
	}
	for _, key := range circuit.SortedKeys(was) {
		t.Errorf("%s: in %s, but no such sheet is drawn", key, goldenScores)
	}
}

// mostWithin is the share of the generated sites' sheets that are within each target.
const mostWithin = 0.95

// On boards the sites ask for what a target forbids: a run folded into ladders takes
// longer lines than the shortest tree, and one way, or the rest of a circuit, does not
// fill a sheet.
var boardsWithin = map[string]float64{"B": 0.9, "Lr": 0.85, "U": 0.4}

// The numbers of the generated sites, stages and boards apart: most sheets are within
// each target. Printed are least, median and greatest.
func TestGeneratedQuality(t *testing.T) {
	var sheets [2][]audit.Quality
	for i := range varied {
		n, o := sitegen.Varied(i)
		for _, q := range measured(t, dressed(t, parsed(t, sitegen.Site(n, o)))) {
			k := 0
			if q.Board {
				k = 1
			}
			sheets[k] = append(sheets[k], q)
			if q.Score() > farOut {
				t.Logf("site %d sheet %d: score %.2f: %s", i, q.Sheet, q.Score(), numbers(q))
			}
		}
	}
	for k, kind := range []string{"stages", "boards"} {
		report := func(name string, value func(q audit.Quality) float64, met func(q audit.Quality) bool) (share float64) {
			var list []float64
			within := 0
			for _, q := range sheets[k] {
				list = append(list, value(q))
				if met(q) {
					within++
				}
			}
			slices.Sort(list)
			t.Logf("%s, %s: %.2f, %.2f, %.2f; %d of %d within", kind, name, list[0], list[len(list)/2], list[len(list)-1], within, len(list))
			return float64(within) / float64(len(list))
		}
		for _, x := range audit.Targets {
			need := mostWithin
			if v, ok := boardsWithin[x.Symbol]; ok && kind == "boards" {
				need = v
			}
			if share := report(x.Symbol, x.Value, func(q audit.Quality) bool { return x.Distance(q) == 0 }); share < need {
				t.Errorf("%s: %.0f %% of the sheets are within the target of %s, not %.0f %%", kind, 100*share, x.Symbol, 100*need)
			}
		}
		report("score", audit.Quality.Score, func(q audit.Quality) bool { return q.Score() < 1 })
	}
}

// farOut is a score that is worth a look.
const farOut = 5
