// Package facts holds what was computed about one site, as plain values: the
// findings are judged from it and the Design hands it to the documents. Nothing is
// computed here.
package facts

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// Facts is everything computed about one site. Slices are in printing order.
type Facts struct {
	Site       *describe.Site
	Circuit    *circuit.Circuit
	Netlist    *circuit.Netlist
	Elements   []ElementValues // all parameters as they are used, in the order of Netlist.Elements
	Conditions []*Condition
	Readings   []*Reading   // one a test point, in the order of Circuit.TestPoints
	Luminaires []*Luminaire // in label order
	Conductors []*Conductor // in the order of Circuit.Conductors
	Fuses      []*Fuse
	Battery    Battery
	Charger    Charger
	Relays     []*Relay  // changeover relays, in the order of their stages
	Relay      *Relay    // the one of them that a photocell holds, else the first; nil: the job has none
	CutOff     *CutOff   // nil: the job has none
	Supplies   []*Supply // auxiliary and raw supplies
	Supply     *Supply   // the first of them that mains feeds; nil: the job has none
	Endurance  Endurance
	Function   []*FunctionRow
	Loops      []*Loop // feeders first, then circuits
	Thresholds []*Threshold
	Faults     []*Fault
	Workings   []sizing.Working
	Blocked    []*Blocked
	Collapse   *Collapse // nil: every lamp gets its power where it must
	Totals     Totals
	Bill       *Bill      // nil: the firm gives no prices
	Unpriced   []Unpriced // things that were chosen without looking at prices, for theirs is missing
}

// Condition is one operating condition, solved.
type Condition struct {
	Key        string // "floating-day", stable
	Number     int    // order of energising, from 1
	Name       string // "Mains off, dark"
	Set        string // how a technician brings it about
	Expect     string // what is then to be seen
	From       string // key of the condition that it is reached from, empty: at rest
	MainsV     quantity.Volt
	Mains      float64 // share of the nominal mains voltage
	Charge     string  // what a charger does: Off, Float or Boost
	Lux        quantity.Lux
	Dark       bool
	Battery    string // "floating", "rested full", "end of discharge", "cut off", "recharging"
	BatteryV   quantity.Volt
	BatterySoC quantity.Ratio
	BatteryA   quantity.Ampere // into the battery positive
	Lit        []string        // circuit names
	Settled    bool
	Restless   []string // elements that never come to rest, where not settled
	State      []State
	Values     []ElementValues // parameters that stand in place of the netlist's here
	Volts      []quantity.Volt // by net
	Residual   float64         // largest current imbalance at a node, A
	Shown      bool            // printed in the packet's six conditions
	// Either are the other ways in which the condition may stand: a relay within its
	// hysteresis, or moved by the tolerances.
	Either []Either
	// BatteryBand is the band of the current's magnitude; zero while floating.
	BatteryBand quantity.Range[quantity.Ampere]
}

// Either is another state in which a condition may be found.
type Either struct {
	// Parts stand elsewhere: "-K1 let go".
	Parts []State
	// Tolerance is set when it takes the tolerances of the parts; else it depends on
	// what was before.
	Tolerance bool
	Lit       []string // the circuits that are then lit
}

// Loop is the resistance of a run of two cores with its far end joined, as it is
// measured before anything is live.
type Loop struct {
	Name      string          // "feeder of Annex board", "Boathouse"
	From      [2]*circuit.Pin // where to measure
	Joined    [2]*circuit.Pin // what to join
	Low, High quantity.Ohm
	Length    quantity.Metre
}

// What a charger does in a condition.
const (
	Off   = "off"
	Float = "float"
	Boost = "boost"
)

// ElementValues is parameters of one element of the netlist.
type ElementValues struct {
	Element string
	Params  []circuit.Param
}

// State is the position of one relay, switch or cut-off.
type State struct{ Element, Position string }

// Reading is what a test point shows.
type Reading struct {
	Point *circuit.TestPoint
	Bands []Band // one a condition, same order
	// Or is what it shows instead in another state of the condition, where a meter tells
	// the two apart; no more than one a state.
	Or [][]Or
}

// Or is a band apart from the first one, in another state of the condition.
type Or struct {
	Band
	With string // the state in words: "-K1 let go"
}

// At returns the band in a condition and those beside it.
func (r *Reading) At(condition int) []Band {
	out := []Band{r.Bands[condition]}
	for _, o := range r.OrAt(condition) {
		out = append(out, o.Band)
	}
	return out
}

// OrAt returns the bands beside that of a condition, most often none.
func (r *Reading) OrAt(condition int) []Or {
	if condition >= len(r.Or) {
		return nil
	}
	return r.Or[condition]
}

// Band is the lowest, typical and highest voltage to expect. Root is the half-width
// by root-sum-square, for information; Low and High are worst case and contain the
// meter's own error.
type Band struct {
	Low, Typical, High quantity.Volt
	Root               quantity.Volt
}

// Luminaire is the outcome at one lamp.
type Luminaire struct {
	Part    *circuit.Part
	Point   *circuit.Point
	Circuit string
	Type    string
	Kind    string
	Volts   []quantity.Volt   // by condition
	Amps    []quantity.Ampere // by condition
	Drop    quantity.Ratio    // of the nominal voltage, from battery terminals, worst condition
	WorstV  quantity.Volt     // lowest voltage while it must be lit
	Works   quantity.Range[quantity.Volt]
	Watt    quantity.Watt
	// Rated is the greatest lasting current that the lamp's type states, Dimmest the
	// share of it below which the lamp counts as too dim; 0: the type states none.
	Rated   quantity.Ampere
	Dimmest quantity.Ratio
}

// Conductor is the outcome on one conductor.
type Conductor struct {
	Conductor *circuit.Conductor
	Current   quantity.Ampere // highest over all conditions
	Ampacity  quantity.Ampere // with ambient and grouping
	Fuse      string          // designation of the fuse that protects it
}

// Fuse is the outcome at one fuse.
type Fuse struct {
	Part              *circuit.Part
	Board             *circuit.Board // nil for a system fuse
	Way               *circuit.Way
	Rating            quantity.Ampere
	Style             string // "blade, medium" …
	Colour            string // body colour as a word, empty if none
	Feeds             string
	Pinned            bool
	Design            quantity.Ampere // current it carries for long, highest
	LoadLow, LoadHigh quantity.Ampere // measured load to expect, band
	CableAmpacity     quantity.Ampere
	CableSize         quantity.WireSize
	Prospective       quantity.Ampere // at its own terminals
	Breaking          quantity.Ampere // breaking capacity, DC
	BreakingVolt      quantity.Volt
	FarEnd            quantity.Ampere // short at the farthest luminaire
	OpensWithin       quantity.Second // at FarEnd; 0 if it would not open: see Opens
	Opens             bool
	DiscriminatesFrom quantity.Ampere // … from this current on
	DiscriminatesTo   quantity.Ampere // selective to the fuse before it up to this current; 0: none before
	Before            *Fuse
	Class             *catalogue.FuseClass
	Fastest           []catalogue.GatePoint // must not open before, by rising multiple
	Slowest           []catalogue.GatePoint // must have opened by
	Withstand         quantity.Second       // time the cable stands FarEnd (adiabatic)
}

// Battery is the outcome of sizing the store.
type Battery struct {
	Part              *circuit.Part
	Class             string // "vrla-agm"
	ClassName         string // "VRLA-AGM"
	Series            int    // cells in series
	Blocks            int    // blocks in series
	Parallel          int
	BlockVolt         quantity.Volt
	BlockAh           quantity.AmpereHour // capacity of one block
	BlockNeed         quantity.AmpereHour // what one block must have at least
	Capacity          quantity.AmpereHour
	RatedHours        float64 // discharge time that Capacity is stated for
	Required          quantity.AmpereHour
	Pinned            bool
	TemperatureFactor float64
	EndVolt           quantity.Volt // end of discharge, whole battery
	FullVolt          quantity.Volt // rested full
	FloatVolt         quantity.Volt
	Prospective       quantity.Ampere
	Resistance        quantity.Ohm
	Fuse              *circuit.Part
	Ventilation       float64 // m³/h of air, IEC 62485-2; 0 if none is needed
	OpeningCM2        float64 // free opening of each of two vents
	Gas               bool
	Removed           quantity.AmpereHour   // taken out by the asked outage
	Rates             []catalogue.RatePoint // capacity table given in the description; empty: the class's
}

// Charger is the outcome of sizing the charger.
type Charger struct {
	Part        *circuit.Part
	Current     quantity.Ampere
	Required    quantity.Ampere
	Limit       quantity.Ampere // what the battery stands
	Float       quantity.Volt   // whole battery, at the class's reference temperature, as Boost
	Boost       quantity.Volt
	PerKelvin   quantity.Volt // whole battery, negative
	Compensated bool
	Pinned      bool
	Mains       quantity.Toleranced[quantity.Volt]
	Impedance   quantity.Ohm // of its output; 0: a constant-current, constant-voltage charger
}

// Relay is the outcome at the changeover relay.
type Relay struct {
	Part    *circuit.Part
	Coil    quantity.Ohm // at 20 °C
	CoilA   quantity.Ampere
	PickUp  quantity.Volt // with a hot coil
	DropOut quantity.Volt
	// LowestFeed is the lowest coil voltage with mains on, at low mains: the coil may
	// be hot when it has to pick up.
	LowestFeed quantity.Volt
	// PickUpCold is the pick-up with the coil at ambient temperature, LowestCold the
	// lowest coil voltage from the battery, by daylight at the end of discharge: the
	// coil has been dead all night when it has to pick up.
	PickUpCold, LowestCold quantity.Volt
	Contact                quantity.Ampere
	Rated                  quantity.Ampere
}

// CutOff is the outcome at the low-voltage cut-off.
type CutOff struct {
	Part            *circuit.Part
	Opens, Recloses quantity.Volt
	// AtBattery is the battery's voltage when it opens under the load of the lights;
	// 0: not found.
	AtBattery      quantity.Volt
	Current, Rated quantity.Ampere
}

// Supply is the outcome at the presence supply.
type Supply struct {
	Part    *circuit.Part
	Volt    quantity.Volt
	Rated   quantity.Ampere
	Current quantity.Ampere
	Mains   quantity.Toleranced[quantity.Volt]
	Pinned  bool
}

// Endurance is the outage and the recharge, hour by hour.
type Endurance struct {
	Runs     []*Run
	Held     quantity.Second // shortest time that all lit circuits stay lit: coldest, aged
	Lit      []LitFor        // coldest, aged
	CutOff   quantity.Second // 0: does not open within the run
	Recharge quantity.Second // until full again after the asked outage
	Standing quantity.Second // mains off by daylight, from full
	DrainA   quantity.Ampere // current then
	Week     *Run            // one asked outage a day for a week; nil without a charger
	Days     []Day
}

// Day is one day of that week.
type Day struct {
	Started, Lowest quantity.Ratio // state of charge when mains failed and when it came back
	Held            bool
}

// LitFor is how long a circuit stays lit.
type LitFor struct {
	Circuit string
	For     quantity.Second
}

// Run is one simulated outage or recharge.
type Run struct {
	Name        string // "Outage, coldest, end of life"
	Temperature quantity.Celsius
	Aged        bool
	Recharge    bool
	Curve       []Sample
}

// Sample is one step of a Run.
type Sample struct {
	Hours   float64
	Volt    quantity.Volt
	SoC     quantity.Ratio
	Current quantity.Ampere // into the battery positive
}

// FunctionRow compares what a circuit asks for with what was found.
type FunctionRow struct {
	Circuit string
	Asked   string
	Wanted  []bool // by condition
	Known   []bool // false: the condition asks nothing of it (battery cut off)
	Found   []bool
}

// Threshold is a value at which something changes over.
type Threshold struct {
	Key, Name string
	Value     float64
	Unit      string
	Low, High float64 // band
	Text      string
	Restless  []string // elements that never come to rest on the way there
}

// Fault is the circuit with one thing wrong.
type Fault struct {
	Key       string
	Part      string // designation or wire number
	What      string // "-F102 open"
	Sign      string // what a person sees
	Dark, Lit []Seen // circuits that are dark or lit though they should not be
	Opens     string // fuse that the fault blows, empty for none
	Within    quantity.Second
	Moved     []Moved
	Best      Moved    // the reading that tells it best from others with the same sign
	NextBest  string   // the same in words; empty if no reading moves
	Unsettled []string // conditions in which no operating point was found
	Group     int      // faults with the same sign have the same number
}

// Seen is a circuit seen dark or lit in a condition.
type Seen struct{ Circuit, Condition string }

// Moved is a reading that leaves its band.
type Moved struct {
	Point     string
	Condition string
	Volt      quantity.Volt
}

// Blocked is a sizing step for which nothing fits.
type Blocked struct {
	Subject       string // designation or circuit name
	Limit         string // which limit blocks
	What          string // what Figure is, if the limit's name does not say it
	Figure, Bound float64
	Unit          string
	Unknown       bool   // Limit says what is not known; there are no figures
	Remedy        string // the smallest change that frees it
	Source        string
	At            describe.Span
}

// Collapse says that constant-power lamps ask more than their line can carry.
type Collapse struct {
	Circuit   string
	Condition string
	Share     float64 // of the power, that the line carries at most
	At        describe.Span
}

// Totals is the sums that summaries print.
type Totals struct {
	Luminaires int
	LoadWatt   quantity.Watt
	LoadA      quantity.Ampere // at the end of discharge
	CableM     quantity.Metre
	CopperKg   float64
	WorstDrop  quantity.Ratio
	WorstLamp  string
	Bound      quantity.Ratio // least copper or cost that any choice needs, of the chosen
	Proven     bool           // the choice is the least possible
	LowestV    quantity.Volt
	HighestV   quantity.Volt // that the system reaches, boost in the coldest room, whole volts upwards
}
