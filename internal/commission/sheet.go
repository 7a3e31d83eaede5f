// Package commission turns the readings that a technician takes into a record: it
// writes the sheet to fill, judges every reading against its band, and for those
// outside names the likely faults and the next reading to take. Nothing passes by
// being absent.
package commission

import (
	"bytes"
	"crypto/sha256"
	"encoding/csv"
	"encoding/hex"
	"fmt"
	"math"
	"strconv"

	"gloamwright/internal/design"
	"gloamwright/internal/facts"
)

// Line is one measurement: a test point in a condition, with its band.
type Line struct {
	Condition string // key
	Name      string // of the condition
	Number    int    // of the condition on the packet's sheets
	Point     string // TP3
	Shows     string
	Red       string
	Black     string
	Low       float64 // V
	Typical   float64
	High      float64
	Or        []Or // bands beside that one, where a relay may stand either way
}

// Or is a band beside that of a line.
type Or struct {
	Low, High float64
	With      string // "-K1 let go"
}

// beside says in words what a line may show instead.
func (l Line) beside() string {
	s := ""
	for _, o := range l.Or {
		s += fmt.Sprintf("; or %.1f V to %.1f V with %s", o.Low, o.High, o.With)
	}
	return s
}

// Lines lists every measurement of a design: the conditions in the order of
// energising, the points in the order of their labels. Low is rounded down and high up
// to a tenth of a volt, as the packet prints them.
func Lines(d *design.Design) []Line {
	var out []Line
	for i, c := range d.Conditions {
		if !c.Shown {
			continue
		}
		for _, r := range d.Readings {
			b := r.Bands[i]
			var or []Or
			for _, o := range r.OrAt(i) {
				or = append(or, Or{Low: down(float64(o.Low)), High: up(float64(o.High)), With: o.With})
			}
			out = append(out, Line{
				Or:        or,
				Condition: c.Key, Name: c.Name, Number: c.Number, Point: r.Point.Label, Shows: r.Point.Shows,
				Red: r.Point.Red.String(), Black: r.Point.Black.String(),
				Low: down(float64(b.Low)), Typical: math.Round(float64(b.Typical)*10) / 10, High: up(float64(b.High)),
			})
		}
	}
	return out
}

// Bands are printed in whole tenths of a volt, never narrower than computed.
const (
	tenths = 10
	hair   = 1e-9
)

func down(v float64) float64 { return math.Floor(v*tenths+hair) / tenths }
func up(v float64) float64   { return math.Ceil(v*tenths-hair) / tenths }

// Fingerprint identifies the set of measurements with their bands, so that a filled
// sheet cannot be held against another design.
func Fingerprint(lines []Line) string {
	h := sha256.New()
	for _, l := range lines {
		fmt.Fprintf(h, "%s|%s|%s|%s|%.1f|%.1f\n", l.Condition, l.Point, l.Red, l.Black, l.Low, l.High)
		if len(l.Or) > 0 {
			fmt.Fprintln(h, l.beside())
		}
	}
	return hex.EncodeToString(h.Sum(nil))[:12]
}

// YAML writes the sheet to fill.
func YAML(d *design.Design) []byte {
	lines := Lines(d)
	var b bytes.Buffer
	j := d.Site.Job
	fmt.Fprintf(&b, "# Readings of %s, %s, revision %s. Write each reading after measured, such as 25.3 V.\n", j.Number.Val, j.Site.Val, j.Revision.Val)
	b.WriteString("# A point that you could not read: leave it empty; it is then an open point.\n")
	fmt.Fprintf(&b, "readings_of: %s\nrevision: %s\nsheet: %s\ntester: \"\"\nmeter: \"\"       # maker's number of the meter, and when it was last checked\ndate: \"\"        # year-month-day\n", quote(j.Number.Val), quote(j.Revision.Val), Fingerprint(lines))
	last := ""
	for _, l := range lines {
		if l.Condition != last {
			c := conditionOf(d, l.Condition)
			fmt.Fprintf(&b, "\n# %d %s\n# Set: %s\n# Expect: %s\n%s:\n", c.Number, c.Name, c.Set, c.Expect, l.Condition)
			last = l.Condition
		}
		fmt.Fprintf(&b, "  %s: {red: %s, black: %s, low: %.1f V, typical: %.1f V, high: %.1f V, measured: }   # %s\n",
			l.Point, quote(l.Red), quote(l.Black), l.Low, l.Typical, l.High, l.Shows+l.beside())
	}
	return b.Bytes()
}

func quote(s string) string { return strconv.Quote(s) }

func conditionOf(d *design.Design, key string) *facts.Condition {
	for _, c := range d.Conditions {
		if c.Key == key {
			return c
		}
	}
	panic("commission: no condition " + key)
}

// csvHead is the head row of the sheet as CSV.
var csvHead = []string{"condition", "point", "shows", "red", "black", "low_v", "typical_v", "high_v", "measured"}

// CSV writes the sheet to fill as comma-separated values. The first row names the job
// and the sheet.
func CSV(d *design.Design) ([]byte, error) {
	lines := Lines(d)
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	j := d.Site.Job
	rows := [][]string{
		{"readings_of", j.Number.Val, "revision", j.Revision.Val, "sheet", Fingerprint(lines), "", "", ""},
		{"tester", "", "meter", "", "date", "", "", "", ""},
		csvHead,
	}
	f := func(v float64) string { return strconv.FormatFloat(v, 'f', 1, 64) }
	for _, l := range lines {
		rows = append(rows, []string{l.Condition, l.Point, l.Shows + l.beside(), l.Red, l.Black, f(l.Low), f(l.Typical), f(l.High), ""})
	}
	if err := w.WriteAll(rows); err != nil {
		return nil, fmt.Errorf("readings sheet: %w", err)
	}
	return b.Bytes(), nil
}
