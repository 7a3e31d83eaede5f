package sizing

import (
	"fmt"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Drain is one small current that a system takes all the time.
type Drain struct {
	Name    string
	Current quantity.Ampere
}

// StandingInput states what a system takes with mains off and no lamp lit.
type StandingInput struct {
	Class    *catalogue.BatteryClass
	Capacity quantity.AmpereHour
	Drains   []Drain
}

// hoursPerMonth is a twelfth of a year of 365.25 days.
const hoursPerMonth = 365.25 * 24 / 12

// StandingTime returns how long a full battery stands until it is empty when mains
// stays off and no lamp is lit: capacity over the sum of drains and self-discharge.
// The capacity is the rated one: discharges this slow give no less.
func StandingTime(in StandingInput) (quantity.Second, Working) {
	self := float64(in.Class.SelfDischarge) * float64(in.Capacity) / hoursPerMonth
	total := self
	parts := []string{fmt.Sprintf("%s × %s ÷ %s", num(float64(in.Class.SelfDischarge), ""), num(float64(in.Capacity), "Ah"), num(hoursPerMonth, "h"))}
	for _, d := range in.Drains {
		total += float64(d.Current)
		parts = append(parts, num(float64(d.Current), "A"))
	}
	t := quantity.Hours(float64(in.Capacity) / total)
	return t, Working{
		Name: "stands without mains", Formula: "t = C ÷ (s × C ÷ 1 month + ΣI)",
		Substituted: num(float64(in.Capacity), "Ah") + " ÷ (" + strings.Join(parts, " + ") + ")",
		Value:       t.Hours(), Unit: "h", Source: "self-discharge: " + in.Class.Evidence.String(),
	}
}
