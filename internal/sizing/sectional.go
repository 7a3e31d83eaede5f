package sizing

import (
	"fmt"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Period is one stretch of the load cycle of a battery.
type Period struct {
	Name    string
	Current quantity.Ampere // at the lowest voltage of the period, which is the most that a constant power draws
	Time    quantity.Second
}

// SectionalInput states a load cycle and the conditions in which the battery must
// carry it.
type SectionalInput struct {
	Class   *catalogue.BatteryClass
	Rates   []catalogue.RatePoint // the battery's own table; empty: the class's
	Periods []Period              // in the order in which they come
	Random  Period                // a load that may come at any time; zero: none
	EndVolt quantity.Volt         // per cell, at which the discharge must stop; 0: the class's
	Coldest quantity.Celsius
	Ageing  quantity.Ratio // capacity left at the end of life, 0.8; 0 means 1
	Margin  quantity.Ratio // design margin, 0.1 for ten per cent
}

// Sectional returns the rated capacity that a load cycle needs: the sectional method
// of IEEE 485 (lead-acid) and IEEE 1115 (nickel-cadmium), which this program uses for
// lithium and nickel-metal-hydride cells too. Section S takes the periods 1 to S;
// F_S = Σ (A_P − A_(P−1)) × K_t(from the start of P to the end of S), where K_t is
// the rated capacity that gives one ampere for the time t to the end voltage. The
// largest section counts, times temperature factor (never below 1), design margin
// and ageing; nickel-cadmium cells lose what long float charging takes.
//
// The workings are the sections, the largest first named "worst section", and the
// required capacity.
func Sectional(in SectionalInput) (quantity.AmpereHour, []Working, error) {
	if len(in.Periods) == 0 {
		return 0, nil, fmt.Errorf("sizing: a load cycle needs at least one period")
	}
	if err := PlausibleRates(in.Rates); err != nil {
		return 0, nil, err
	}
	end := in.EndVolt
	if end == 0 {
		end = in.Class.EndVolt
	}
	if end < in.Class.LowestEnd {
		return 0, nil, &BlockedError{
			Limit: LimitCapacity, Subject: "the end voltage of a cell", Value: float64(end), Bound: float64(in.Class.LowestEnd), Unit: "V",
			Frees: fmt.Sprintf("stop the discharge at %v a cell or more", in.Class.LowestEnd),
		}
	}
	worst, at := Working{}, 0
	for s := range in.Periods {
		w, err := in.section(s, end)
		if err != nil {
			return 0, nil, err
		}
		if s == 0 || w.Value > worst.Value {
			worst, at = w, s
		}
	}
	if in.Random.Current > 0 {
		k, err := in.rate(in.Random.Time, end)
		if err != nil {
			return 0, nil, err
		}
		worst.Value += float64(in.Random.Current) * k
		worst.Formula += " + A_R × K_t(R)"
		worst.Substituted += " + " + num(float64(in.Random.Current), "A") + " × " + num(k, "h")
	}
	worst.Name = fmt.Sprintf("worst section, to the end of period %d", at+1)

	req, w, err := in.required(worst)
	return req, []Working{worst, w}, err
}

// required applies the factors.
func (in *SectionalInput) required(worst Working) (quantity.AmpereHour, Working, error) {
	kt, listed := in.Class.SizeFactor(in.Coldest)
	if !listed {
		return 0, Working{}, &UnknownError{
			What:   fmt.Sprintf("the capacity at %v", in.Coldest),
			Source: fmt.Sprintf("%s is held down to %v", in.Class.SizeEvi.Source, in.Class.Size[0].At),
			Ask:    "keep the battery warmer",
		}
	}
	kt = max(kt, 1)
	ageing := in.Ageing
	if ageing == 0 {
		ageing = 1
	}
	v := worst.Value * float64(kt) * (1 + float64(in.Margin)) / float64(ageing)
	w := Working{
		Name: "required capacity", Formula: "C = F × k_temperature × (1 + margin) ÷ ageing",
		Substituted: join("×", num(worst.Value, "Ah"), num(float64(kt), ""), "(1 + "+num(float64(in.Margin), "")+")") + " ÷ " + num(float64(ageing), ""),
		Unit:        "Ah", Source: standardOf(in.Class) + "; " + in.Class.SizeEvi.String(),
		Uses: []string{worst.Name},
	}
	if in.Class.Family == catalogue.NickelCd {
		v /= float64(catalogue.FloatLoss)
		w.Formula += " ÷ k_float"
		w.Substituted += " ÷ " + num(float64(catalogue.FloatLoss), "")
	}
	w.Value = v
	return quantity.AmpereHour(v), w, nil
}

func standardOf(c *catalogue.BatteryClass) string {
	switch c.Family {
	case catalogue.LeadAcid:
		return "IEEE 485 sectional method"
	case catalogue.NickelCd:
		return "IEEE 1115 sectional method"
	default:
		return "sectional method of IEEE 485, applied to this class"
	}
}

// section computes F_S of the section that ends with period s.
func (in *SectionalInput) section(s int, end quantity.Volt) (Working, error) {
	f := 0.0
	var formula, sub []string
	for p := 0; p <= s; p++ {
		var t quantity.Second
		for q := p; q <= s; q++ {
			t += in.Periods[q].Time
		}
		k, err := in.rate(t, end)
		if err != nil {
			return Working{}, err
		}
		before := quantity.Ampere(0)
		if p > 0 {
			before = in.Periods[p-1].Current
		}
		f += float64(in.Periods[p].Current-before) * k
		formula = append(formula, fmt.Sprintf("(A%d − A%d) × K_t%d", p+1, p, p+1))
		sub = append(sub, fmt.Sprintf("(%s − %s) × %s", num(float64(in.Periods[p].Current), "A"), num(float64(before), "A"), num(k, "h")))
	}
	evi := in.Class.Evidence.String()
	if len(in.Rates) > 0 {
		evi = "capacity table given in the description"
	}
	return Working{
		Formula: "F = " + strings.Join(formula, " + "), Substituted: strings.Join(sub, " + "),
		Value: f, Unit: "Ah", Source: standardOf(in.Class) + "; K_t from " + evi,
	}, nil
}

// rate returns K_t in hours: the rated capacity that gives one ampere for the time t.
func (in *SectionalInput) rate(t quantity.Second, end quantity.Volt) (float64, error) {
	return CapacityFactor(in.Class, in.Rates, t, end)
}

// CapacityFactor returns K_t of IEEE 485 in hours: the rated capacity divided by the
// current that a full cell gives for the time t until it reaches the end voltage.
// rates is the battery's own table; empty takes the class's.
func CapacityFactor(c *catalogue.BatteryClass, rates []catalogue.RatePoint, t quantity.Second, end quantity.Volt) (float64, error) {
	if len(rates) == 0 {
		rates = c.Rates
	}
	f, _ := catalogue.FractionAt(rates, t)
	part, known := c.EndPart(t, end)
	if !known || part <= 0 {
		return 0, &UnknownError{
			What:   fmt.Sprintf("the capacity of %s cells to %v", strings.ToLower(c.Title[:1])+c.Title[1:], end),
			Source: "the class's table does not list so high an end voltage",
			Ask:    "choose lamps that work lower, thicker cables, or a higher system voltage",
		}
	}
	return t.Hours() / (float64(f) * float64(part)), nil
}
