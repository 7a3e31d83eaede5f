package packet

import (
	"bytes"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// placedText is a text on a list sheet with its box.
type placedText struct {
	ink.Written
	sheet int
	box   ink.Rect
}

// textsOf lists what is written on the list sheets of a packet.
func textsOf(p *Packet) []placedText {
	if list, ok := textsRead[p]; ok {
		return list
	}
	var out []placedText
	for i, r := range p.recorders {
		if p.plans[i].s.drawing != nil {
			continue
		}
		eachCall(r.Calls, func(c ink.Call) {
			if w, ok := c.(ink.Written); ok {
				out = append(out, placedText{w, i + 1, ink.TextBox(w.At, w.Text, w.Font, w.Anchor, w.Turn)})
			}
		})
	}
	textsRead[p] = out
	return out
}

// textsRead keeps what was read: the tests look often.
var textsRead = map[*Packet][]placedText{}

func eachCall(calls []ink.Call, f func(ink.Call)) {
	for _, c := range calls {
		if g, ok := c.(ink.Grouped); ok {
			eachCall(g.Calls, f)
			continue
		}
		f(c)
	}
}

// checkSheets fails for text outside the margins, on other text, or too small.
func checkSheets(t *testing.T, p *Packet, pg, side page) {
	t.Helper()
	texts := textsOf(p)
	for _, w := range texts {
		g := pg
		if p.plans[w.sheet-1].s.side {
			g = side
		}
		if w.box.X < g.l-0.3 || w.box.X+w.box.W > g.right()+0.3 || w.box.Y < g.t || w.box.Y+w.box.H > g.h-g.bottom+0.3 {
			t.Errorf("sheet %d: %q at %.1f, %.1f is outside the margins", w.sheet, w.Text, w.box.X, w.box.Y)
		}
		if pt := w.Font.Size / mmPerPoint; pt < 6.9 && !strings.HasPrefix(p.plans[w.sheet-1].s.key, keyWorkings) && p.plans[w.sheet-1].s.key != keyLegend {
			t.Errorf("sheet %d: %q is set in %.1f pt", w.sheet, w.Text, pt)
		}
	}
	// two texts may not lie on each other: more than a quarter by a tenth of a millimetre
	for i, a := range texts {
		for _, b := range texts[i+1:] {
			if a.sheet != b.sheet {
				break
			}
			dx := min(a.box.X+a.box.W, b.box.X+b.box.W) - max(a.box.X, b.box.X)
			dy := min(a.box.Y+a.box.H, b.box.Y+b.box.H) - max(a.box.Y, b.box.Y)
			if dx > 0.25 && dy > 0.1 {
				t.Errorf("sheet %d: %q lies on %q by %.2f x %.2f mm", a.sheet, a.Text, b.Text, dx, dy)
			}
		}
	}
}

func TestSheetsAreClean(t *testing.T) {
	for _, name := range examples {
		for _, paper := range []string{"iso", "ansi"} {
			t.Run(name+" "+paper, func(t *testing.T) {
				d := example(t, name)
				site := *d.Site
				site.Practice.Paper.Val = paper
				d.Facts = copyFacts(d.Facts)
				d.Facts.Site = &site
				pg, side := pages(paper)
				checkSheets(t, built(t, d), pg, side)
			})
		}
	}
}

// TestBlanksAreLargeEnough measures every frame to write in and every box to tick.
func TestBlanksAreLargeEnough(t *testing.T) {
	p := built(t, example(t, "bracken-reach"))
	ticks, blanks := 0, 0
	for i, r := range p.recorders {
		if p.plans[i].s.drawing != nil || p.plans[i].s.key == keyLegend {
			continue
		}
		eachCall(r.Calls, func(c ink.Call) {
			s, ok := c.(ink.Stroked)
			if !ok || s.Pen.Color != ink.Dusk {
				return
			}
			b := s.Path.Bounds()
			switch s.Pen.Width {
			case tickLine:
				ticks++
				if b.W < tickSize-0.01 || b.H < tickSize-0.01 {
					t.Errorf("sheet %d: a box to tick is %.1f x %.1f", i+1, b.W, b.H)
				}
			case blankLine:
				if b.H == 0 { // the horizon's mark in the foot
					return
				}
				blanks++
				if b.H < blankRow-0.01 || b.W < 9 {
					t.Errorf("sheet %d: a blank is %.1f x %.1f", i+1, b.W, b.H)
				}
			}
		})
	}
	if ticks < 100 || blanks < 100 {
		t.Errorf("%d boxes to tick and %d blanks were found", ticks, blanks)
	}
}

var nextLine = regexp.MustCompile(`^sheet (\d+), (.*)$`)

// TestReferencesAreTrue follows every "Next", every line of the contents, every sheet
// number in a text and every reference to a block of the fault-finding table.
func TestReferencesAreTrue(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		p := built(t, d)
		n := len(p.Sheets)
		nexts := 0
		sheetNumber := regexp.MustCompile(`[Ss]heets?\x{00A0}(\d+)(?: (?:and|to) (\d+))?`)
		for _, w := range textsOf(p) {
			if m := nextLine.FindStringSubmatch(strings.ReplaceAll(w.Text, noBreak, " ")); m != nil {
				k, _ := strconv.Atoi(m[1])
				nexts++
				if k != w.sheet+1 {
					t.Errorf("%s sheet %d leads on to sheet %d", name, w.sheet, k)
				} else if want := p.plans[k-1].short(); want != m[2] && p.plans[k-1].s.drawing == nil {
					t.Errorf("%s sheet %d calls sheet %d %q, it is %q", name, w.sheet, k, m[2], want)
				}
			}
			for _, m := range sheetNumber.FindAllStringSubmatch(w.Text, -1) {
				for _, s := range m[1:] {
					if k, err := strconv.Atoi(s); s != "" && (err != nil || k < 1 || k > n) {
						t.Errorf("%s sheet %d: there is no sheet %s", name, w.sheet, s)
					}
				}
			}
		}
		lists := 0
		for _, x := range p.plans[:n-1] {
			if x.s.drawing == nil {
				lists++
			}
		}
		if nexts != lists {
			t.Errorf("%s: %d sheets lead on, want %d", name, nexts, lists)
		}
		// contents: every section's first sheet bears its title
		for _, k := range p.contents {
			f := p.refs.first[k.key]
			if f == 0 || p.plans[f-1].s.key != k.key {
				t.Errorf("%s: the contents name %q on sheet %d", name, k.title, f)
			}
		}
		// 42.3: sheet 42, block 3
		block := regexp.MustCompile(`^(\d+)\.(\d+)$`)
		found := 0
		for _, w := range textsOf(p) {
			m := block.FindStringSubmatch(w.Text)
			if m == nil || p.plans[w.sheet-1].s.key != keyTestPoints || w.box.X < 170 {
				continue
			}
			found++
			k, _ := strconv.Atoi(m[1])
			if k < 1 || k > n || p.plans[k-1].s.key != keyFaults {
				t.Errorf("%s sheet %d refers to %s", name, w.sheet, w.Text)
				continue
			}
			if !slices.ContainsFunc(textsOn(p, k), func(x placedText) bool {
				return x.Text == m[2] && x.Color == ink.White
			}) {
				t.Errorf("%s sheet %d: sheet %s has no block %s", name, w.sheet, m[1], m[2])
			}
		}
		if found == 0 {
			t.Errorf("%s: no reading leads to a block", name)
		}
	}
}

func textsOn(p *Packet, sheet int) []placedText {
	var out []placedText
	for _, w := range textsOf(p) {
		if w.sheet == sheet {
			out = append(out, w)
		}
	}
	return out
}

// TestDesignationsExist looks up every designation on every list sheet.
func TestDesignationsExist(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		have := map[string]bool{}
		for _, p := range d.Circuit.Parts {
			have[p.Designation] = true
			strip, _, _ := strings.Cut(p.Designation, ":")
			have[strip] = true
		}
		for _, c := range d.Circuit.Cables {
			have[c.Designation] = true
		}
		p := built(t, d)
		count := 0
		for _, w := range textsOf(p) {
			if p.plans[w.sheet-1].s.key == keyLegend {
				continue
			}
			for _, m := range findDesignations(w.Text) {
				n := w.Text[m[0]:m[1]]
				whole, _, _ := strings.Cut(n, ":")
				count++
				if !have[n] && !have[whole] {
					t.Errorf("%s sheet %d: nothing bears %s", name, w.sheet, n)
				}
			}
		}
		if count < 500 {
			t.Errorf("%s: only %d designations were found", name, count)
		}
	}
}

// TestListsHoldEverything compares the lists with the circuit: parts, cables, wires,
// fuses, readings, each exactly once.
func TestListsHoldEverything(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		p := built(t, d)
		marks := map[string]int{}
		for _, s := range p.plans {
			for _, b := range s.blocks {
				for _, m := range b.marks {
					marks[m]++
				}
			}
		}
		once := func(mark string) {
			t.Helper()
			if marks[mark] != 1 {
				t.Errorf("%s: %q stands %d times", name, mark, marks[mark])
			}
		}
		bought := 0
		for _, x := range d.Circuit.Parts {
			if x.Kind != circuit.MainsConnection {
				bought++
				once(rowMark(x.Designation))
			}
		}
		for _, c := range d.Circuit.Cables {
			once("cable " + c.Designation)
		}
		for _, c := range d.Circuit.Conductors {
			if c.Cable == nil {
				once(rowMark("wire " + c.Number))
			}
		}
		for _, f := range d.Fuses {
			once("fuse " + f.Part.Designation)
		}
		for _, r := range d.Readings {
			for _, c := range d.Conditions {
				if c.Shown {
					once(readingMark(r.Point.Label, c.Key))
				}
			}
		}
		// quantities: the designations of a row expand to its quantity
		b := newBook(d, nil)
		total := 0
		for _, g := range b.partItems() {
			for _, it := range g {
				total += it.count
				if got := expanded(t, compressed(it.names)); !slices.Equal(sorted(got), sorted(it.names)) {
					t.Errorf("%s: %q expands to %v, want %v", name, compressed(it.names), got, it.names)
				}
			}
		}
		if total != bought {
			t.Errorf("%s: the parts list has %d parts, the circuit %d", name, total, bought)
		}
	}
}

func sorted(list []string) []string {
	out := slices.Clone(list)
	slices.Sort(out)
	return out
}

// expanded undoes compressed.
func expanded(t *testing.T, s string) []string {
	var out []string
	for _, x := range strings.Split(s, ", ") {
		a, z, ok := strings.Cut(x, "…")
		if !ok {
			out = append(out, x)
			continue
		}
		i := len(a)
		for i > 0 && a[i-1] >= '0' && a[i-1] <= '9' {
			i--
		}
		from, err1 := strconv.Atoi(a[i:])
		to, err2 := strconv.Atoi(z[i:])
		if err1 != nil || err2 != nil || to < from || !strings.HasPrefix(z, a[:i]) {
			t.Fatalf("bad range %q", x)
		}
		for n := from; n <= to; n++ {
			out = append(out, fmt.Sprint(a[:i], n))
		}
	}
	return out
}

// TestStatus: the black bar stands on all sheets or on none, and a draft says so.
func TestStatus(t *testing.T) {
	d := example(t, "juniper-flat")
	d.Issued = false
	p := built(t, d)
	for i := range p.plans {
		if p.plans[i].s.drawing == nil && !slices.ContainsFunc(textsOn(p, i+1), func(w placedText) bool { return strings.Contains(w.Text, draft) }) {
			t.Errorf("sheet %d of a draft does not say so", i+1)
		}
	}
	d.Findings = append(slices.Clone(d.Findings), stopFinding())
	p = built(t, d)
	for i := range p.plans {
		if p.plans[i].s.drawing != nil {
			continue
		}
		bars := 0
		for _, w := range textsOn(p, i+1) {
			if w.Text == notForConstruction && w.Color == ink.White {
				bars++
			}
		}
		if bars < 3 {
			t.Errorf("sheet %d says %d times that nothing must be built from it", i+1, bars)
		}
	}
}

// TestDocument checks the file: the same bytes twice, sound by qpdf, under 1 MB, its
// fonts embedded.
func TestDocument(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		d.Issued = true
		a, b := built(t, d), built(t, d)
		if !bytes.Equal(a.PDF, b.PDF) {
			t.Errorf("%s: two builds differ", name)
		}
		if len(a.PDF) > 1<<20 {
			t.Errorf("%s: %d bytes", name, len(a.PDF))
		}
		if n := bytes.Count(a.PDF, []byte("/FontFile2")); n < 5 {
			t.Errorf("%s: %d fonts are embedded", name, n)
		}
		qpdf, err := exec.LookPath("qpdf")
		if err != nil {
			t.Log("qpdf is not installed: the file is not checked by it")
			continue
		}
		file := filepath.Join(t.TempDir(), "packet.pdf")
		if err := os.WriteFile(file, a.PDF, 0o600); err != nil {
			t.Fatal(err)
		}
		if out, err := exec.Command(qpdf, "--check", file).CombinedOutput(); err != nil {
			t.Errorf("%s: qpdf: %v\n%s", name, err, out)
		}
	}
}
