package catalogue

import (
	"math"
	"slices"

	"gloamwright/internal/quantity"
)

// Never is the upper limit of an opening time that a standard does not bound.
var Never = quantity.Second(math.Inf(1))

// GatePoint is one point of a time-current limit: at Multiple times the rating,
// the limit is Time.
type GatePoint struct {
	Multiple float64
	Time     quantity.Second
}

// Gates are the limits between which a fuse of one class opens. Fastest holds
// points before which it must not open, Slowest points by which it must have
// opened, both by rising multiple. Either may be empty: unknown.
type Gates struct {
	Fastest, Slowest []GatePoint
}

// Known reports whether the class has published limits.
func (g Gates) Known() bool { return len(g.Fastest) > 0 && len(g.Slowest) > 0 }

// GateBand gives the gates of all ratings up to UpTo.
type GateBand struct {
	UpTo  quantity.Ampere
	Gates Gates
	Evidence
}

// FuseClass is a family of fuse-links of one standard.
type FuseClass struct {
	Name    string // "blade"; how a description names it
	Title   string // "Blade fuse, type C"
	Ratings []quantity.Ampere
	Bands   []GateBand
	// Conventional is the multiple of the rating at which the link surely opens
	// within the conventional time: I₂ of IEC 60364-4-43 clause 433.1.
	Conventional quantity.Ratio
	Volt         quantity.Volt // highest DC system voltage
	// Breaking is the breaking capacity; if BreakingMultiple times the rating is more,
	// that holds.
	Breaking         quantity.Ampere
	BreakingMultiple float64
	// DC says that the voltage and breaking capacity are DC ratings; Sheet that they are
	// not the standard's own for every link: the link's sheet must state them.
	DC, Sheet bool
	Colours   []string // in words, parallel to Ratings; nil: no colour code
	Capacity  Evidence // of Volt and Breaking
}

// Gates returns the limits of one rating and their source; unknown gates if the
// class has none for it.
func (c *FuseClass) Gates(rating quantity.Ampere) (Gates, Evidence) {
	for _, b := range c.Bands {
		if rating <= b.UpTo {
			return b.Gates, b.Evidence
		}
	}
	return Gates{}, Evidence{}
}

// Colour returns the body colour of a rating in words; empty if there is none.
func (c *FuseClass) Colour(rating quantity.Ampere) string {
	for i, r := range c.Ratings {
		if r == rating && i < len(c.Colours) {
			return c.Colours[i]
		}
	}
	return ""
}

// BreakingCapacity returns the highest current that a link of that rating breaks.
func (c *FuseClass) BreakingCapacity(rating quantity.Ampere) quantity.Ampere {
	return max(c.Breaking, quantity.Ampere(c.BreakingMultiple)*rating)
}

// FuseClasses lists the classes in the order in which they are tried.
func FuseClasses() []*FuseClass {
	return []*FuseClass{
		FuseBlade, FuseBlade58, FuseBladeHigh, FuseCylinder10, FuseCylinder14, FuseKnife, FuseStrip,
		FuseCartridgeT, FuseCartridgeF, FuseCartridgeHighT,
	}
}

// FuseClassOf returns the class of that name; nil if there is none.
func FuseClassOf(name string) *FuseClass {
	for _, c := range FuseClasses() {
		if c.Name == name {
			return c
		}
	}
	return nil
}

// Makes reports whether the class has a link of exactly that rating.
func (c *FuseClass) Makes(rating quantity.Ampere) bool { return slices.Contains(c.Ratings, rating) }
