package commission

import (
	"fmt"
	"math"
	"slices"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
)

// Verdict is the judgement of one measurement.
type Verdict string

// The verdicts. Only Inside passes.
const (
	Inside     Verdict = "inside"
	Outside    Verdict = "outside"
	Missing    Verdict = "missing"
	UnitSlip   Verdict = "unit slip"      // inside if the unit were another
	Swapped    Verdict = "probes swapped" // inside if the sign were turned
	Unreadable Verdict = "unreadable"
)

// Judged is one measurement with its verdict.
type Judged struct {
	Line
	Measured float64
	Text     string
	Verdict  Verdict
	Says     string // one sentence for the technician; empty when inside
	At       describe.Span
}

// Record is a commissioning record.
type Record struct {
	Job, Title, Site, Client, Revision string
	Tester, Meter, Date                string
	Judged                             []Judged
	Likely                             []Likely
	Next                               *Next
	Passed                             bool
	Open                               int // measurements that did not pass
}

// Mismatch says that a filled sheet does not belong to the description.
type Mismatch struct{ Text string }

// Error says why.
func (m *Mismatch) Error() string { return m.Text }

// Accept holds a filled sheet against the design. The list holds what is wrong with
// the sheet itself; the record is nil only when it belongs to another design.
func Accept(d *design.Design, f *Filled) (*Record, error) {
	j := d.Site.Job
	lines := Lines(d)
	switch {
	case f.Job != j.Number.Val:
		return nil, &Mismatch{fmt.Sprintf("the readings are of job %s, the description is %s", f.Job, j.Number.Val)}
	case f.Revision != j.Revision.Val:
		return nil, &Mismatch{fmt.Sprintf("the readings are of revision %s, the description is revision %s", f.Revision, j.Revision.Val)}
	case f.Sheet != Fingerprint(lines):
		return nil, &Mismatch{"the bands have changed since this sheet was written: write a new one with gloamwright readings and take the readings again"}
	}
	r := &Record{
		Job: j.Number.Val, Title: j.Title.Val, Site: j.Site.Val, Client: j.Client.Val, Revision: j.Revision.Val,
		Tester: f.Tester, Meter: f.Meter, Date: f.Date,
	}
	taken := map[[2]string]Reading{}
	for _, x := range f.Readings {
		taken[[2]string{x.Condition, x.Point}] = x
	}
	for _, l := range lines {
		x := taken[[2]string{l.Condition, l.Point}]
		r.Judged = append(r.Judged, judge(l, x))
	}
	for _, x := range r.Judged {
		if x.Verdict != Inside {
			r.Open++
		}
	}
	r.Passed = r.Open == 0
	r.Likely, r.Next = diagnose(d, r.Judged)
	return r, nil
}

// Factors by which a unit slips: millivolts written for volts and the other way.
var slips = []struct {
	factor float64
	says   string
}{
	{1000, "it would be inside as volts: was it read in volts and written with mV?"},
	{0.001, "it would be inside as millivolts: was it read in mV and written with V?"},
}

// holds reports whether a reading lies in a band of the line.
func (l Line) holds(v float64) bool {
	if l.Low-hair <= v && v <= l.High+hair {
		return true
	}
	return slices.ContainsFunc(l.Or, func(o Or) bool { return o.Low-hair <= v && v <= o.High+hair })
}

// judge compares one reading with its band.
func judge(l Line, x Reading) Judged {
	out := Judged{Line: l, Text: x.Text, At: x.At}
	if x.Text == "" {
		out.Verdict, out.Says = Missing, "not taken"
		return out
	}
	v, err := volts(x.Text)
	if err != nil || math.IsInf(v, 0) || math.IsNaN(v) {
		out.Verdict, out.Says = Unreadable, fmt.Sprintf("%q is not a voltage: write it like 25.3 V", x.Text)
		return out
	}
	out.Measured = v
	in := l.holds
	switch {
	case in(v):
		out.Verdict = Inside
		return out
	case l.Low > 0 && in(-v):
		out.Verdict, out.Says = Swapped, "it would be inside with the probes the other way round: red on "+l.Red+", black on "+l.Black
		return out
	}
	if l.Low > 0 {
		for _, s := range slips {
			if in(v * s.factor) {
				out.Verdict, out.Says = UnitSlip, s.says
				return out
			}
		}
	}
	out.Verdict = Outside
	if v < l.Low {
		out.Says = fmt.Sprintf("%.1f V below the band", l.Low-v)
	} else {
		out.Says = fmt.Sprintf("%.1f V above the band", v-l.High)
	}
	return out
}
