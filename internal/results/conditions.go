package results

import (
	"gloamwright/internal/design"
)

type condEntry struct {
	Name       string            `json:"name"`
	Title      string            `json:"title"`
	Number     int               `json:"number"`
	From       string            `json:"from"`
	MainsV     *float64          `json:"mains_v"`
	Mains      *float64          `json:"mains"`
	DaylightLx *float64          `json:"daylight_lx"`
	Charge     string            `json:"charge"`
	Battery    string            `json:"battery"`
	BatteryV   *float64          `json:"battery_v"`
	BatterySoC *float64          `json:"battery_soc"`
	BatteryA   *float64          `json:"battery_a"`
	Lit        []string          `json:"lit"`
	Settled    bool              `json:"settled"`
	ResidualA  *float64          `json:"residual_a"`
	State      map[string]string `json:"state"`
	// Values holds the parameters that stand in place of those under network.
	Values map[string]map[string]*float64 `json:"values"`
	Volts  map[string]*float64            `json:"volts"`
	// Either lists the other states in which the condition may be found.
	Either []eitherEntry `json:"either,omitempty"`
}

type eitherEntry struct {
	State map[string]string `json:"state"` // by designation, of the parts that stand elsewhere
	By    string            `json:"by"`    // "history" or "tolerance"
	Lit   []string          `json:"lit"`
}

func conditions(d *design.Design, nets []string) []condEntry {
	out := []condEntry{}
	for _, c := range d.Conditions {
		e := condEntry{
			Name: c.Key, Title: c.Name, Number: c.Number, From: c.From, MainsV: figure(c.MainsV), Mains: to(c.Mains, networkDigits), DaylightLx: to(c.Lux, networkDigits), Charge: c.Charge,
			Battery: c.Battery, BatteryV: to(c.BatteryV, networkDigits), BatterySoC: figure(c.BatterySoC), BatteryA: to(c.BatteryA, readingDigits),
			Lit: list(c.Lit), Settled: c.Settled, ResidualA: figure(c.Residual),
			State: map[string]string{}, Values: map[string]map[string]*float64{}, Volts: make(map[string]*float64, len(c.Volts)),
		}
		for _, s := range c.State {
			e.State[s.Element] = s.Position
		}
		for _, v := range c.Values {
			e.Values[v.Element] = map[string]*float64{}
			for _, p := range v.Params {
				e.Values[v.Element][p.Name] = to(p.Value, networkDigits)
			}
		}
		for i, v := range c.Volts {
			e.Volts[nets[i]] = to(v, networkDigits)
		}
		for _, x := range c.Either {
			o := eitherEntry{State: map[string]string{}, By: "history", Lit: list(x.Lit)}
			if x.Tolerance {
				o.By = "tolerance"
			}
			for _, s := range x.Parts {
				o.State[s.Element] = s.Position
			}
			e.Either = append(e.Either, o)
		}
		out = append(out, e)
	}
	return out
}

// byCondition returns a list of values as a map by condition name.
func byCondition[T ~float64](conds []string, values []T, digits int) map[string]*float64 {
	out := make(map[string]*float64, len(values))
	for i, v := range values {
		out[conds[i]] = to(v, digits)
	}
	return out
}
