package results

import (
	"gloamwright/internal/design"
)

type condEntry struct {
	Name       string              `json:"name"`
	Title      string              `json:"title"`
	Number     int                 `json:"number"`
	From       string              `json:"from"`
	MainsV     *float64            `json:"mains_v"`
	DaylightLx *float64            `json:"daylight_lx"`
	Battery    string              `json:"battery"`
	BatteryV   *float64            `json:"battery_v"`
	BatterySoC *float64            `json:"battery_soc"`
	BatteryA   *float64            `json:"battery_a"`
	Lit        []string            `json:"lit"`
	Settled    bool                `json:"settled"`
	ResidualA  *float64            `json:"residual_a"`
	State      map[string]string   `json:"state"`
	Volts      map[string]*float64 `json:"volts"`
}

func conditions(d *design.Design, nets []string) []condEntry {
	out := []condEntry{}
	for _, c := range d.Conditions {
		e := condEntry{
			Name: c.Key, Title: c.Name, Number: c.Number, From: c.From, MainsV: figure(c.MainsV), DaylightLx: figure(c.Lux),
			Battery: c.Battery, BatteryV: to(c.BatteryV, networkDigits), BatterySoC: figure(c.BatterySoC), BatteryA: to(c.BatteryA, readingDigits),
			Lit: list(c.Lit), Settled: c.Settled, ResidualA: figure(c.Residual),
			State: map[string]string{}, Volts: make(map[string]*float64, len(c.Volts)),
		}
		for _, s := range c.State {
			e.State[s.Element] = s.Position
		}
		for i, v := range c.Volts {
			e.Volts[nets[i]] = to(v, networkDigits)
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
