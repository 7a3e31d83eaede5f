package stage

import (
	"fmt"
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// fuseOhm estimates the cold resistance of a fuse with its holder: the link drops
// about 0.1 V at its rating, the holder adds 2 mΩ (common practice, no source).
func fuseOhm(rating quantity.Ampere) float64 { return 0.1/float64(rating) + 0.002 }

// fuseClasses lists the classes that fuses are chosen from, in the order in which they
// are tried: rated for direct current of the highest voltage, with published opening
// times. A class that the firm has fixed stands alone, and the findings judge it.
func (p *Plan) fuseClasses() []*catalogue.FuseClass {
	if c := catalogue.FuseClassOf(p.Site.Practice.FuseClass.Val); c != nil {
		return []*catalogue.FuseClass{c}
	}
	return p.ratedClasses()
}

// ratedClasses lists the classes rated for direct current of the highest voltage, with
// published opening times; where none is, the one of the highest voltage.
func (p *Plan) ratedClasses() []*catalogue.FuseClass {
	var out []*catalogue.FuseClass
	most := catalogue.FuseBlade
	for _, c := range catalogue.FuseClasses() {
		if g, _ := c.Gates(c.Ratings[0]); !c.DC || !g.Known() {
			continue
		}
		if c.Volt > most.Volt {
			most = c
		}
		// The 58 V execution of a blade fuse opens no sooner than the usual one.
		if c.Volt >= p.Highest && !(c == catalogue.FuseBlade58 && slices.Contains(out, catalogue.FuseBlade)) {
			out = append(out, c)
		}
	}
	if len(out) == 0 {
		return []*catalogue.FuseClass{most}
	}
	return out
}

// lastResort is the class for a rating given by the user that no DC class makes: its
// voltage is common practice only, and the parts list says what its sheet must state.
var lastResort = catalogue.FuseCartridgeHighT

// classOf returns the class for a rating given by the user: the first that makes it, from
// first on.
func (p *Plan) classOf(rating quantity.Ampere, first *catalogue.FuseClass) *catalogue.FuseClass {
	if first.Makes(rating) {
		return first
	}
	for _, c := range p.fuseClasses() {
		if c.Makes(rating) {
			return c
		}
	}
	if !p.Site.Practice.FuseClass.Given && lastResort.Makes(rating) && lastResort.Volt >= p.Highest {
		return lastResort
	}
	return first
}

// nextFuse returns the first class with a rating of at least need that breaks a
// prospective current, and that rating; ok is false if none does.
func (p *Plan) nextFuse(need, prospective quantity.Ampere) (c *catalogue.FuseClass, rating quantity.Ampere, ok bool) {
	for _, c := range p.fuseClasses() {
		r, ok := catalogue.NextRating(p.stocked(c), need)
		if ok && c.BreakingCapacity(r) >= prospective {
			return c, r, true
		}
	}
	return p.fuseClasses()[0], 0, false
}

// systemFuse sizes a fuse of the cabinet for a load. What can flow at a short circuit
// is not known yet: see settleFuses.
func (p *Plan) systemFuse(part *circuit.Part, feeds string, load quantity.Ampere, given describe.At[quantity.Ampere]) *facts.Fuse {
	if given.Given {
		return p.fit(part, p.classOf(given.Val, p.fuseClasses()[0]), given.Val, feeds, load, true)
	}
	class, _, _ := p.nextFuse(load/quantity.Ampere(p.Site.Practice.LoadFactor.Val), 0)
	r, w, err := p.rate(class, load, 0)
	p.rated(part, feeds, w, err)
	return p.fit(part, class, r, feeds, load, false)
}

// rate chooses a rating for the load, or above the largest fuse behind; where the class
// has none the largest it has.
func (p *Plan) rate(class *catalogue.FuseClass, load, behind quantity.Ampere) (quantity.Ampere, sizing.Working, error) {
	k := p.Site.Practice.LoadFactor.Val
	in := sizing.FuseInput{Class: class, Stock: p.stocked(class), Load: load, LoadFactor: k}
	least := behind * discriminationRatio
	if least > load/quantity.Ampere(k) {
		in.Load, in.LoadFactor = least, 1
	}
	r, w, err := sizing.ChooseFuse(in)
	if err != nil {
		r = class.Ratings[len(class.Ratings)-1]
	}
	if in.LoadFactor == 1 && least > 0 {
		w.Formula = "I_n ≥ 1.6 × largest fuse behind it, next standard rating"
		w.Substituted = fmt.Sprintf("1.6 × %s A = %s A → %s A", sizing.Digits(float64(behind)), sizing.Digits(float64(least)), sizing.Digits(float64(r)))
		w.Source = "discrimination ratio of IEC 60269-1 (from memory)"
	}
	return r, w, err
}

// rated records how a rating was found.
func (p *Plan) rated(part *circuit.Part, feeds string, w sizing.Working, err error) {
	if err != nil {
		p.block(part.Designation, part.At, w.Source, err)
	}
	p.work(part.Designation, "fuse rating", w, feeds+": design current")
}

// stocked returns the ratings of a class to choose from: those that the firm stocks, or
// all.
func (p *Plan) stocked(class *catalogue.FuseClass) []quantity.Ampere {
	var out []quantity.Ampere
	for _, r := range p.Site.Practice.Fuses.Val {
		if class.Makes(r) {
			out = append(out, r)
		}
	}
	if len(out) == 0 {
		return class.Ratings
	}
	slices.Sort(out)
	return out
}

// fit records a chosen fuse.
func (p *Plan) fit(part *circuit.Part, class *catalogue.FuseClass, rating quantity.Ampere, feeds string, load quantity.Ampere, pinned bool) *facts.Fuse {
	f := &facts.Fuse{Part: part, Feeds: feeds, Pinned: pinned, Design: load}
	set(part, "rating", "", 0, "A", true, pinned)
	params(part, "", circuit.Param{Name: "ohm"})
	p.link(f, class, rating)
	p.F.Fuses = append(p.F.Fuses, f)
	return f
}

// link puts a link of a class and rating into a fuse.
func (p *Plan) link(f *facts.Fuse, class *catalogue.FuseClass, rating quantity.Ampere) {
	part := f.Part
	part.Description = class.Title + " and holder"
	part.Note = ""
	if class.Sheet {
		part.Note = "its own sheet must state this"
	}
	for i := range part.Values {
		if v := &part.Values[i]; v.Name == "rating" {
			v.Text, v.Num = rating.String(), float64(rating)
		}
	}
	for i := range part.Elements[0].Params {
		if x := &part.Elements[0].Params[i]; x.Name == "ohm" {
			x.Value, x.Tol = fuseOhm(rating), fuseTol
		}
	}
	gates, _ := class.Gates(rating)
	f.Class, f.Rating, f.Style, f.Colour = class, rating, class.Title, class.Colour(rating)
	f.Breaking, f.BreakingVolt = class.BreakingCapacity(rating), class.Volt
	f.Fastest, f.Slowest = gates.Fastest, gates.Slowest
}

// settleFuses looks again at the fuses of the cabinet once the way from the battery to
// it is known: one that could not break what flows there gives way to a class that can.
func (p *Plan) settleFuses() {
	s := p.battery()
	if s == nil {
		return
	}
	flows, _ := sizing.Prospective(sizing.FaultInput{Source: p.Full, Internal: p.Internal, Loop: []sizing.Series{{Name: "way to the cabinet", Ohm: p.CabinetOhm}}})
	for _, f := range p.F.Fuses {
		if _, raw := p.sources[f.Part]; raw || f.Part == p.part(s, "fuse") {
			continue
		}
		if f.Breaking < flows {
			if class, rating, ok := p.breaks(f, flows); ok { // else the finding on breaking capacity says so
				p.link(f, class, rating)
				if p.chargerFuse(f) {
					p.ChargeSize, _ = p.leastFor(f.Part.Designation, class, rating, catalogue.LeastFixed, 1)
				}
			}
		}
		if p.chargerFuse(f) {
			p.ChargeSize = p.withstands(f, p.ChargeSize)
		} else {
			p.ControlSize = thicker(p.ControlSize, p.withstands(f, controlWire[p.System]))
		}
	}
	for _, f := range p.F.Fuses {
		if _, raw := p.sources[f.Part]; raw || f.Part == p.part(s, "fuse") {
			continue
		}
		f.CableSize = p.controlSize()
		if p.chargerFuse(f) {
			f.CableSize = p.ChargeSize
		}
		f.CableAmpacity = p.ampacity(f.CableSize, 1)
	}
}

// withstands returns the thinnest size from size up that stands a short behind a fuse of
// the cabinet until it opens.
func (p *Plan) withstands(f *facts.Fuse, size quantity.WireSize) quantity.WireSize {
	for _, c := range p.sizes() {
		if c.Size.Area < size.Area-areaSlack {
			continue
		}
		size = c.Size
		lead := 2 * quantity.Ohm(leadLength) * sizing.PerMetre(c, p.running(c.Size))
		i, _ := sizing.LeastFault(sizing.FaultInput{
			Source: p.Empty, Internal: p.Internal * usedBattery, Loop: []sizing.Series{{Name: "loop", Ohm: p.CabinetOhm + quantity.Ohm(fuseOhm(f.Rating)) + lead}},
		})
		t, _, err := sizing.OpeningTime(sizing.OpeningInput{Class: f.Class, Rating: f.Rating, Current: i})
		if err != nil || t.Latest <= sizing.Withstand(c.Size.Area, i, adiabaticK) {
			break
		}
	}
	return size
}

// breaks returns a class and rating for a fuse that break a current.
func (p *Plan) breaks(f *facts.Fuse, flows quantity.Ampere) (*catalogue.FuseClass, quantity.Ampere, bool) {
	if f.Pinned {
		for _, c := range p.fuseClasses() {
			if c.Makes(f.Rating) && c.BreakingCapacity(f.Rating) >= flows {
				return c, f.Rating, true
			}
		}
		return nil, 0, false
	}
	class, rating, ok := p.nextFuse(f.Design/quantity.Ampere(p.Site.Practice.LoadFactor.Val), flows)
	if !ok {
		return nil, 0, false
	}
	for i := range p.F.Workings {
		if w := &p.F.Workings[i]; w.For == f.Part.Designation && w.Name == "fuse rating" {
			_, again, _ := p.rate(class, f.Design, 0)
			w.Substituted, w.Value = again.Substituted, again.Value
		}
	}
	return class, rating, true
}

// chargerFuse reports whether a fuse is that of a charger.
func (p *Plan) chargerFuse(f *facts.Fuse) bool {
	k := p.kindName(f.Part.Stage)
	return k == "charger" || k == "linear-charger"
}
