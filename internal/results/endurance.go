package results

import (
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
)

type enduranceEntry struct {
	LitH      map[string]*float64 `json:"lit_h"`
	HeldH     *float64            `json:"held_h"`
	CutOffH   *float64            `json:"cut_off_h"`
	RechargeH *float64            `json:"recharge_h"`
	StandingH *float64            `json:"standing_h"`
	DrainA    *float64            `json:"drain_a"`
	Curve     []sampleEntry       `json:"curve"`
	Runs      []runEntry          `json:"runs"`
	Week      []sampleEntry       `json:"week"`
	Days      []dayEntry          `json:"days"`
}

type runEntry struct {
	Name         string        `json:"name"`
	TemperatureC *float64      `json:"temperature_c"`
	Aged         bool          `json:"aged"`
	Recharge     bool          `json:"recharge"`
	Curve        []sampleEntry `json:"curve"`
}

// dayEntry is one day of a week with an outage each day.
type dayEntry struct {
	Started *float64 `json:"started"`
	Lowest  *float64 `json:"lowest"`
	Held    bool     `json:"held"`
}

type sampleEntry struct {
	TH       *float64 `json:"t_h"`
	BatteryV *float64 `json:"battery_v"`
	SoC      *float64 `json:"soc"`
	CurrentA *float64 `json:"current_a"`
}

// endurance returns the hours. The key "curve" repeats the outage at the coldest room
// and the end of the battery's life, which the figures beside it come from.
func endurance(d *design.Design) enduranceEntry {
	e := d.Endurance
	out := enduranceEntry{
		LitH: map[string]*float64{}, CutOffH: positive(e.CutOff.Hours()), RechargeH: positive(e.Recharge.Hours()),
		HeldH: positive(e.Held.Hours()), StandingH: positive(e.Standing.Hours()), DrainA: figure(e.DrainA),
		Curve: []sampleEntry{}, Runs: []runEntry{}, Week: []sampleEntry{}, Days: []dayEntry{},
	}
	for _, l := range e.Lit {
		out.LitH[l.Circuit] = figure(l.For.Hours())
	}
	var worst *facts.Run
	for _, r := range e.Runs {
		out.Runs = append(out.Runs, runEntry{
			Name: r.Name, TemperatureC: figure(r.Temperature), Aged: r.Aged, Recharge: r.Recharge, Curve: curve(r.Curve),
		})
		if r.Aged && !r.Recharge && (worst == nil || r.Temperature < worst.Temperature) {
			worst = r
		}
	}
	if e.Week != nil {
		out.Week = curve(e.Week.Curve)
	}
	for _, x := range e.Days {
		out.Days = append(out.Days, dayEntry{Started: figure(x.Started), Lowest: figure(x.Lowest), Held: x.Held})
	}
	if worst != nil {
		out.Curve = curve(worst.Curve)
	}
	return out
}

func curve(samples []facts.Sample) []sampleEntry {
	out := []sampleEntry{}
	for _, s := range samples {
		out = append(out, sampleEntry{TH: figure(s.Hours), BatteryV: figure(s.Volt), SoC: figure(s.SoC), CurrentA: figure(s.Current)})
	}
	return out
}
