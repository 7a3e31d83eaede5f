package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// ChargerInput states what a charger must put back and carry besides.
type ChargerInput struct {
	Class    *catalogue.BatteryClass
	Capacity quantity.AmpereHour // rated, of the whole battery
	Removed  quantity.AmpereHour // taken out by the longest outage
	In       quantity.Second     // recharge time
	Standing quantity.Ampere     // load that the charger carries all the time
	Factor   quantity.Ratio      // Ah returned for each Ah taken; 0: the class's
	Stock    []quantity.Ampere   // currents to choose from; empty: the standard ones
}

// Charger is a chosen charger current.
type Charger struct {
	Needed quantity.Ampere
	Rated  quantity.Ampere // the next standard current
	Limit  quantity.Ampere // the battery's highest charge current plus the standing load
}

// ChargerCurrent returns the current of a charger: what was taken times the charge
// factor, divided by the recharge time, plus the standing load (IEEE 946 practice),
// then the next standard current. It must not exceed the battery's limit on top of
// the standing load.
func ChargerCurrent(in ChargerInput) (Charger, []Working, error) {
	k := in.Factor
	if k == 0 {
		k = in.Class.ChargeFactor
	}
	need := float64(k)*float64(in.Removed)/in.In.Hours() + float64(in.Standing)
	limit := float64(in.Class.MaxCharge) * float64(in.Capacity)
	c := Charger{Needed: quantity.Ampere(need), Limit: quantity.Ampere(limit) + in.Standing}
	ws := []Working{{
		Name: "charger current needed", Formula: "I = k × Q ÷ t + I_standing",
		Substituted: fmt.Sprintf("%s × %s ÷ %s + %s", num(float64(k), ""), num(float64(in.Removed), "Ah"), num(in.In.Hours(), "h"), num(float64(in.Standing), "A")),
		Value:       need, Unit: "A", Source: "IEEE 946 charger formula (from memory); " + in.Class.ChargeEvi.String(),
	}, {
		Name: "battery's charge limit", Formula: "I_max = c × C",
		Substituted: fmt.Sprintf("%s × %s", num(float64(in.Class.MaxCharge), ""), num(float64(in.Capacity), "Ah")),
		Value:       limit, Unit: "A", Source: in.Class.ChargeEvi.String(),
	}}
	stock := in.Stock
	if len(stock) == 0 {
		stock = catalogue.ChargerCurrents
	}
	rated, ok := catalogue.NextRating(stock, c.Needed)
	switch {
	case !ok:
		return c, ws, &BlockedError{
			Limit: LimitCharge, Subject: "the charger current", Value: need, Bound: float64(stock[len(stock)-1]), Unit: "A",
			Frees: "allow a longer recharge, or put two chargers in parallel",
		}
	case rated > c.Limit*(1+slack):
		hours := float64(k) * float64(in.Removed) / limit
		smaller, fits := largestAtMost(stock, c.Limit)
		free := fmt.Sprintf("allow %s for the recharge", upHours(hours))
		if fits && smaller > in.Standing {
			hours = float64(k) * float64(in.Removed) / float64(smaller-in.Standing)
			free = fmt.Sprintf("a charger of %v needs a recharge time of %s", smaller, upHours(hours))
		}
		c.Rated = rated
		return c, ws, &BlockedError{
			Limit: LimitCharge, Subject: "the charger current", Value: float64(rated), Bound: float64(c.Limit), Unit: "A",
			Frees: free + ", or fit a larger battery",
		}
	}
	c.Rated = rated
	ws = append(ws, Working{
		Name: "charger rated current", Formula: "next standard current",
		Substituted: fmt.Sprintf("%s → %s", num(need, "A"), num(float64(rated), "A")),
		Value:       float64(rated), Unit: "A", Source: "common practice for standard currents",
		Uses: []string{"charger current needed", "battery's charge limit"},
	})
	return c, ws, nil
}

func largestAtMost(list []quantity.Ampere, v quantity.Ampere) (quantity.Ampere, bool) {
	for i := len(list) - 1; i >= 0; i-- {
		if list[i] <= v {
			return list[i], true
		}
	}
	return 0, false
}

// ChargeInput states a battery and its temperature.
type ChargeInput struct {
	Class *catalogue.BatteryClass
	Cells int
	Boost bool // boost instead of float
	At    quantity.Celsius
}

// ChargeVoltage returns the float or boost voltage of a battery at a temperature:
// the class's voltage per cell with its temperature law.
func ChargeVoltage(in ChargeInput) (quantity.Volt, Working) {
	base, name := in.Class.Float, "float voltage"
	if in.Boost {
		base, name = in.Class.Boost, "boost voltage"
	}
	v := in.Class.ChargeVolt(base, in.At) * quantity.Volt(in.Cells)
	return v, Working{
		Name: name, Formula: "U = n × (u + s × (t − t₀))",
		Substituted: fmt.Sprintf("%d × (%s + %s × (%s − %s))", in.Cells, num(float64(base), "V"), bracketed(float64(in.Class.Slope), "V/K"),
			num(float64(in.At), "°C"), num(float64(in.Class.ChargeAt), "°C")),
		Value: float64(v), Unit: "V", Source: in.Class.ChargeEvi.String(),
	}
}

// SupplyInput states what a mains supply carries.
type SupplyInput struct {
	Load   quantity.Ampere // continuous
	Factor quantity.Ratio  // greatest load as a part of the rating; 0 means 0.8
	Stock  []quantity.Ampere
}

// supplyFactor keeps a supply cool: common practice, no source.
const supplyFactor = 0.8

// SupplyCurrent returns the next standard current of a mains supply above its load.
func SupplyCurrent(in SupplyInput) (quantity.Ampere, Working, error) {
	k := in.Factor
	if k == 0 {
		k = supplyFactor
	}
	stock := in.Stock
	if len(stock) == 0 {
		stock = catalogue.SupplyCurrents
	}
	need := in.Load / quantity.Ampere(k)
	w := Working{Name: "supply current", Formula: "I_n ≥ I ÷ k, next standard current", Unit: "A", Source: "common practice, no source"}
	rated, ok := catalogue.NextRating(stock, need)
	if !ok {
		return 0, w, &BlockedError{
			Limit: LimitLoad, Subject: "the supply current", Value: float64(need), Bound: float64(stock[len(stock)-1]), Unit: "A",
			Frees: "share the load over two supplies",
		}
	}
	w.Value = float64(rated)
	w.Substituted = fmt.Sprintf("%s ÷ %s = %s → %s", num(float64(in.Load), "A"), num(float64(k), ""), num(float64(need), "A"), num(float64(rated), "A"))
	return rated, w, nil
}

// upHours writes hours, rounded up to a tenth: a time that is allowed must suffice.
func upHours(h float64) string { return num(math.Ceil(h*10)/10, "h") }
