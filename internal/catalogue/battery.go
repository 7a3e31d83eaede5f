package catalogue

import (
	"math"

	"gloamwright/internal/quantity"
)

// Family is an electrochemical system; it decides which sizing standard applies.
type Family string

// The families.
const (
	LeadAcid    Family = "lead-acid"
	NickelCd    Family = "nickel-cadmium"
	NickelMH    Family = "nickel-metal hydride"
	LithiumIron Family = "lithium iron phosphate"
)

// RatePoint says what part of the rated capacity a full cell gives when it is
// discharged evenly in Time.
type RatePoint struct {
	Time     quantity.Second
	Fraction quantity.Ratio
	End      quantity.Volt // per cell, at which the discharge stops
}

// TempPoint is one line of a temperature table.
type TempPoint struct {
	At     quantity.Celsius
	Factor quantity.Ratio
}

// RestPoint is the voltage of a cell at rest at one state of charge.
type RestPoint struct {
	Charge quantity.Ratio // 0 to 1
	Volt   quantity.Volt
}

// Spread is a value with the range in which a class's products lie.
type Spread struct{ Low, Typical, High float64 }

// Block is one product size: so many cells in one case, and its capacity.
type Block struct {
	Cells    int
	Capacity quantity.AmpereHour
}

// BatteryClass is a class of cells. All voltages are per cell.
type BatteryClass struct {
	Name   string // as a description names it
	Title  string
	Family Family

	Cell      quantity.Volt   // nominal
	RatedTime quantity.Second // the discharge time that its capacity is rated for
	Rates     []RatePoint     // by rising time
	Ends      []EndPoint      // loss of capacity when the discharge stops higher
	EndVolt   quantity.Volt   // default end of discharge in standby service
	LowestEnd quantity.Volt   // never below
	Size      []TempPoint     // multiply the required size, by rising temperature
	SizeEvi   Evidence

	Float, Boost  quantity.Volt    // at ChargeAt
	ChargeAt      quantity.Celsius // temperature of the two
	Slope         quantity.Volt    // change of the charge voltage per kelvin; negative
	FloatBand     quantity.Range[quantity.Volt]
	MaxCharge     quantity.Ratio // highest charge current, A per Ah of rated capacity
	ChargeFactor  quantity.Ratio // Ah returned for each Ah taken
	ChargeLowest  quantity.Celsius
	ChargeHighest quantity.Celsius
	ChargeEvi     Evidence

	Rest    []RestPoint // by rising charge
	RestEvi Evidence

	OhmAh         Spread // internal resistance of a full cell × its rated capacity, Ω·Ah
	ResistanceEvi Evidence

	GasFloat, GasBoost float64 // I_gas of IEC 62485-2, mA per Ah; 0: seals its gas in
	GasEvi             Evidence

	SelfDischarge quantity.Ratio // of rated capacity in a month at 20 °C
	Opens         quantity.Volt  // cut-off setting, per cell
	Recloses      quantity.Volt
	Blocks        []Block // standard products, by rising capacity
	Evidence              // of Rates and voltages
}

// BatteryClasses lists the classes in printing order.
func BatteryClasses() []*BatteryClass {
	return []*BatteryClass{VRLAAGM, VRLAGel, Flooded, NiCd, NiMH, LiFePO4}
}

// BatteryClassOf returns the class of that name, or nil.
func BatteryClassOf(name string) *BatteryClass {
	for _, c := range BatteryClasses() {
		if c.Name == name {
			return c
		}
	}
	return nil
}

// CellsFor returns the number of cells in series for a nominal system voltage: the
// system voltages of the trade (12, 24, 36, 48 V) take 6 lead-acid, 10 nickel or 4
// lithium iron cells for each 12 V; another voltage takes the nearest number.
func (c *BatteryClass) CellsFor(nominal quantity.Volt) int {
	n := math.Round(float64(nominal) / leadTwelve * float64(c.cellsPerTwelve()))
	return max(1, int(n))
}

// ExtraLow is the highest DC voltage of the whole system: parts of it can be touched, so
// the 60 V limit of IEC 61140 for dry places is kept.
const ExtraLow quantity.Volt = 60

// leadTwelve is the system voltage that the trade counts in.
const leadTwelve = 12

func (c *BatteryClass) cellsPerTwelve() int {
	switch c.Family {
	case NickelCd, NickelMH:
		return 10
	case LithiumIron:
		return 4
	default:
		return 6
	}
}

// RestVolt returns the rest voltage of a cell at a state of charge, linear between
// the listed points.
func (c *BatteryClass) RestVolt(charge quantity.Ratio) quantity.Volt {
	p := c.Rest
	if charge <= p[0].Charge {
		return p[0].Volt
	}
	for i := 1; i < len(p); i++ {
		if charge <= p[i].Charge {
			f := float64(charge-p[i-1].Charge) / float64(p[i].Charge-p[i-1].Charge)
			return p[i-1].Volt + quantity.Volt(f)*(p[i].Volt-p[i-1].Volt)
		}
	}
	return p[len(p)-1].Volt
}

// ChargeVolt returns a charge voltage v of the class, which holds at ChargeAt, at
// temperature t.
func (c *BatteryClass) ChargeVolt(v quantity.Volt, t quantity.Celsius) quantity.Volt {
	return v + c.Slope*quantity.Volt(t-c.ChargeAt)
}
