package sizing

import "fmt"

// Limit names what stands in the way of a choice.
type Limit string

// The limits.
const (
	LimitDrop        Limit = "voltage drop"
	LimitAmpacity    Limit = "ampacity"
	LimitClearing    Limit = "far-end clearing"
	LimitLeastSize   Limit = "least conductor size"
	LimitStock       Limit = "stocked sizes"
	LimitLoad        Limit = "load current"
	LimitOverload    Limit = "overload protection"
	LimitBreaking    Limit = "breaking capacity"
	LimitVoltage     Limit = "rated voltage"
	LimitBattery     Limit = "voltage of the battery when full"
	LimitReclose     Limit = "voltage at which it closes again"
	LimitCapacity    Limit = "battery capacity"
	LimitCharge      Limit = "charge current"
	LimitChargeVolt  Limit = "charging voltage"
	LimitPickUp      Limit = "relay pick-up"
	LimitCoilHeat    Limit = "coil voltage"
	LimitContact     Limit = "contact rating"
	LimitHeadroom    Limit = "headroom"
	LimitDissipation Limit = "dissipation"
	LimitRange       Limit = "setting range"
	LimitCollapse    Limit = "voltage collapse"
)

// BlockedError says that nothing fits: which limit blocks, by how much, and the
// smallest change that frees it.
type BlockedError struct {
	Limit   Limit
	Subject string // what cannot be met: a luminaire, a leg, a fuse
	Value   float64
	Bound   float64
	Unit    string
	Frees   string // the smallest change, as a sentence for an electrician
}

// Error returns the limit, the figures and the remedy.
func (e *BlockedError) Error() string {
	s := fmt.Sprintf("%s: %s is %s, the limit %s", e.Limit, e.Subject, num(e.Value, e.Unit), num(e.Bound, e.Unit))
	if e.Frees != "" {
		s += "; " + e.Frees
	}
	return s
}

// UnknownError says that the tables held here do not reach far enough.
type UnknownError struct {
	What   string // what cannot be stated
	Source string // the table that ends
	Ask    string // where the user finds the figure
}

// Error returns what is not known and where to find it.
func (e *UnknownError) Error() string {
	s := e.What + " is not known"
	if e.Source != "" {
		s += ": " + e.Source
	}
	if e.Ask != "" {
		s += "; " + e.Ask
	}
	return s
}
