package stage

import (
	"errors"
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// Phase orders the steps of sizing over all stages.
type Phase uint8

// The phases, in the order in which they run: what comes later builds on the
// figures of those before.
const (
	Control    Phase = iota + 1 // relay, photocell, indicators: what they draw
	Storage                     // the battery
	Charging                    // the charger
	Trunk                       // what the whole load flows through, up to the boards
	Cables                      // feeders, legs and way fuses
	Supplying                   // supplies of control
	phaseCount                  // not a phase
)

// Step is one step of sizing of a stage kind.
type Step struct {
	Phase Phase
	Run   func(p *Plan, s *describe.Stage)
}

// Plan is the sizing of one site: what is known so far.
type Plan struct {
	Site   *describe.Site
	C      *circuit.Circuit
	F      *facts.Facts
	System catalogue.System

	Class *catalogue.BatteryClass
	Cells int
	// Voltages of the whole battery.
	End, Empty, Full, Float, Boost, Highest quantity.Volt

	// Light is the current of all luminaires at the end of discharge, Standing what
	// flows besides while they are lit, Held what flows while mains is off by day.
	Light, Standing, Held quantity.Ampere
	// TrunkOhm is the resistance from the battery's terminals to the boards' bars.
	// CutOffOhm is the part of it up to the cabinet's terminals.
	TrunkOhm, CutOffOhm quantity.Ohm
	// CabinetOhm is the resistance from the battery's terminals to the cabinet's, fuse and
	// battery cable alone; ContactOhm that of the changeover's contact.
	CabinetOhm, ContactOhm quantity.Ohm
	// Internal is the battery's resistance when full and new.
	Internal quantity.Ohm

	TrunkSize, ChargeSize quantity.WireSize
	ControlSize           quantity.WireSize // of control wires, where a short circuit asks more than usual; zero: the usual

	ambient  quantity.Celsius // of the cables
	grouping int              // loaded circuits run together

	// Block is what the battery is built of.
	Block catalogue.Block

	more     Reserve
	prices   map[string]float64                       // by the name of the thing
	sells    map[string]bool                          // first words of the names that have a price
	aux      map[string]quantity.Ampere               // what auxiliary supplies feed, by stage name
	relays   map[*describe.Stage]catalogue.RelayClass // the classes chosen
	cabled   bool
	wayClass *catalogue.FuseClass // of the ways of circuits
	loads    map[string]Load
	parts    map[string]*circuit.Part
	sources  map[*circuit.Part]raw // fuses that a transformer supply feeds, not the battery
}

// Reserve is what the simulated outage and recharge ask beyond the sizing formulas, as
// factors of the battery's capacity and of the charger's current; 1 or less asks
// nothing.
type Reserve struct{ Capacity, Charge float64 }

// Size sizes every part and conductor of c and writes what came out to f. What
// cannot be met is listed in f.Blocked.
func Size(site *describe.Site, c *circuit.Circuit, f *facts.Facts, more Reserve) *Plan {
	p := &Plan{
		more: more, Site: site, C: c, F: f, System: catalogue.System(site.Practice.Conductors.Val),
		aux: map[string]quantity.Ampere{}, loads: map[string]Load{}, parts: map[string]*circuit.Part{},
		sources: map[*circuit.Part]raw{}, relays: map[*describe.Stage]catalogue.RelayClass{},
	}
	for _, part := range c.Parts {
		p.parts[part.Key] = part
	}
	p.laying()
	p.readPrices()
	p.voltages()
	p.F.Totals.HighestV = quantity.Volt(math.Ceil(float64(p.Highest) - stepSlack))
	p.wayClass = p.fuseClasses()[0]
	for _, t := range site.Luminaires {
		p.loads[t.Name.Val] = luminaireKindOf(t.Kind.Val).Load(p, t)
	}
	p.endOfDischarge()
	p.luminaires()
	p.standing()
	order := ordered(site)
	for ph := Control; ph < phaseCount; ph++ {
		for _, s := range order {
			for _, st := range kindOf(s.Kind.Val).Steps {
				if st.Phase == ph {
					st.Run(p, s)
				}
			}
		}
		if ph == Trunk {
			p.settleFuses()
		}
	}
	p.foremost()
	p.singles()
	p.wires()
	p.protect()
	p.bill()
	return p
}

// part returns a part of stage s by its local key.
func (p *Plan) part(s *describe.Stage, local string) *circuit.Part {
	return p.parts[s.Name.Val+"/"+local]
}

// battery returns the description's battery stage; the decoder sees to it that there
// is one.
func (p *Plan) battery() *describe.Stage {
	for _, s := range p.Site.Stages {
		if s.Kind.Val == "battery" {
			return s
		}
	}
	return nil
}

// LampEnd is the lowest voltage that a lamp sees while it must be lit: the end of
// discharge less the permitted drop.
func (p *Plan) LampEnd() quantity.Volt {
	return p.End - p.permittedDrop()
}

// LampDesign is the greatest current of a lamp over the voltages that it sees: a
// driver takes most at the end of discharge, a string most at float.
func (p *Plan) LampDesign(l Load) quantity.Ampere { return max(l.At(p.LampEnd()), l.At(p.Float)) }

// luminaires sizes the lamps and sums what they draw.
func (p *Plan) luminaires() {
	for _, b := range p.C.Boards {
		for _, w := range b.Ways {
			if w.Lighting == nil {
				continue
			}
			w.Lighting.Walk(func(pt, _ *circuit.Point) {
				l := p.loads[pt.Type]
				pt.Luminaire.Values = l.Values
				pt.Luminaire.Pinned = l.Pinned
				for _, e := range pt.Luminaire.Elements {
					e.Params = l.Params
				}
				// A driver takes most at the end, a string while the battery is fuller.
				p.Light += max(l.At(p.LampEnd()), l.At((p.Full+p.End)/2))
				p.F.Totals.Luminaires++
				p.F.Totals.LoadWatt += l.Rated
			})
		}
	}
}

// standing sums what the stages themselves draw while mains is off: always, and
// besides that the coil while it is held in by daylight.
func (p *Plan) standing() {
	for _, s := range p.Site.Stages {
		for _, f := range kindOf(s.Kind.Val).Fields {
			if f.Name == "own" {
				if v, ok := describe.Get[quantity.Ampere](s.Fields, f.Name); ok && p.drawsOwn(s) {
					p.Standing += v.Val
				}
			}
		}
	}
}

// drawsOwn reports whether the stage's own current applies as it is built.
func (p *Plan) drawsOwn(s *describe.Stage) bool {
	switch s.Kind.Val {
	case "photocell":
		return must[string](s, "built") == "module"
	case "meter":
		return must[string](s, "reads") == "volts"
	}
	return true
}

// Load returns the load of a luminaire type.
func (p *Plan) Load(luminaire string) Load { return p.loads[luminaire] }

// Ampacity returns what a conductor carries where it runs; 0 if the tables do not say.
func (p *Plan) Ampacity(w *circuit.Conductor) quantity.Ampere {
	grouped := 1
	if w.Cable != nil && w.Circuit != "" {
		grouped = p.grouping
	}
	return p.ampacity(w.Size, grouped)
}

// work records a working; uses names the workings, as "subject: name", that feed it.
func (p *Plan) work(subject, name string, w sizing.Working, uses ...string) {
	w.For = subject
	w.Uses = append(w.Uses, uses...)
	if name != "" {
		w.Name = name
	}
	p.F.Workings = append(p.F.Workings, w)
}

// block records that nothing fits, or that a table does not reach far enough.
func (p *Plan) block(subject string, at describe.Span, source string, err error) {
	var b *sizing.BlockedError
	var u *sizing.UnknownError
	x := &facts.Blocked{Subject: subject, At: at, Source: source}
	switch {
	case errors.As(err, &b):
		x.Limit, x.Figure, x.Bound, x.Unit, x.Remedy = string(b.Limit), b.Value, b.Bound, b.Unit, b.Frees
		x.What = b.Subject
	case errors.As(err, &u):
		x.Unknown, x.Limit, x.Remedy = true, u.What+" is not known", u.Ask
		if u.Source != "" {
			x.Source = u.Source
		}
	default:
		x.Unknown, x.Limit = true, err.Error()
	}
	p.F.Blocked = append(p.F.Blocked, x)
}

// set records a value of a part and whether the user gave it.
func set(part *circuit.Part, name, text string, num float64, unit string, show, pinned bool) {
	part.Values = append(part.Values, circuit.Value{Name: name, Text: text, Num: num, Unit: unit, Show: show})
	if pinned {
		part.Pinned = append(part.Pinned, name)
	}
}

// params sets the parameters of a part's first element whose ID ends in suffix.
func params(part *circuit.Part, suffix string, list ...circuit.Param) {
	for _, e := range part.Elements {
		if suffix == "" && e.ID == part.Designation || suffix != "" && e.ID == part.Designation+"."+suffix {
			e.Params = append(e.Params, list...)
			return
		}
	}
	panic(fmt.Sprintf("stage: %s has no element %q", part.Key, suffix))
}

// Tolerances of parts whose data do not state one (common practice, no source).
const (
	resistorTol = 0.01 // metal film
	fuseTol     = 0.2  // cold resistance of a link and its holder
	contactTol  = 0.5
	powerTol    = 0.05
)

// leastFor returns the thinnest standard size whose ampacity in the cabinet or in
// its run bears a fuse of that rating, not thinner than least.
func (p *Plan) leastFor(subject string, class *catalogue.FuseClass, rating quantity.Ampere, least catalogue.LeastSize, grouped int) (quantity.WireSize, quantity.Ampere) {
	table := catalogue.AmpacityOf(p.System)
	need := sizing.CableFor(class, rating)
	var last sizing.Working
	for _, c := range p.sizes() {
		if c.Size.Area < least.Least(p.System)-areaSlack {
			continue
		}
		iz, w, err := sizing.Ampacity(sizing.AmpacityInput{Table: table, Size: c.Size, Ambient: p.ambient, Grouped: grouped})
		if err != nil {
			continue
		}
		last = w
		if iz >= need {
			p.work(subject, "ampacity of "+c.Size.String(), w)
			return c.Size, iz
		}
	}
	p.block(subject, describe.Span{}, last.Source, &sizing.BlockedError{
		Limit: sizing.LimitAmpacity, Subject: "the thickest cable in stock", Value: last.Value, Bound: float64(need), Unit: "A",
		Frees: "share the load over two boards, or stock thicker cable",
	})
	all := p.sizes()
	return all[len(all)-1].Size, quantity.Ampere(last.Value)
}

// areaSlack lets equal areas that differ by rounding count as equal, in mm².
const areaSlack = 1e-3

// sizes returns the conductor sizes to choose from, thinnest first.
func (p *Plan) sizes() []catalogue.Conductor {
	all := catalogue.Conductors(p.System)
	stock := p.Site.Practice.Sizes.Val
	if len(stock) == 0 {
		return all
	}
	var out []catalogue.Conductor
	for _, c := range all {
		for _, s := range stock {
			if got, ok := catalogue.ConductorOf(s); ok && got.Size == c.Size {
				out = append(out, c)
			}
		}
	}
	if len(out) == 0 {
		return all
	}
	return out
}

// ampacity returns what a size carries in its run; 0 if the tables do not say.
func (p *Plan) ampacity(size quantity.WireSize, grouped int) quantity.Ampere {
	iz, _, err := sizing.Ampacity(sizing.AmpacityInput{Table: catalogue.AmpacityOf(systemOf(size)), Size: size, Ambient: p.ambient, Grouped: grouped})
	if err != nil {
		return 0
	}
	return iz
}

func systemOf(s quantity.WireSize) catalogue.System {
	if s.Gauge != "" {
		return catalogue.AWG
	}
	return catalogue.Metric
}
