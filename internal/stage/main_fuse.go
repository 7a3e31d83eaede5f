package stage

import (
	"cmp"
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// sizeMainFuse chooses the main fuse for the greater of load and charge current, its
// class by the short-circuit current of the battery and by what a short at the boards
// still gives, and the size of the trunk: battery cable, rails and leads in the energy's
// way.
func sizeMainFuse(p *Plan, s *describe.Stage) {
	part, cable := p.part(s, "fuse"), p.cable(s, "cable")
	load := max(p.Light+p.Standing, p.F.Charger.Current)
	prospective, w := sizing.Prospective(sizing.FaultInput{Source: p.Full, Internal: p.Internal})
	p.work(p.part(s, "battery").Designation, "prospective short-circuit current", w)
	p.F.Battery.Prospective = prospective
	given, _ := describe.Get[quantity.Ampere](s.Fields, "fuse")
	pinned, _ := describe.Get[quantity.WireSize](s.Fields, "cable")
	behind := p.largestWay()
	m, err := sizing.ChooseMainFuse(sizing.MainFuseInput{
		Classes: p.mainClasses(s, given.Val), Stock: p.stocked, Pinned: given.Val, Load: load, LoadFactor: p.Site.Practice.LoadFactor.Val,
		Above: behind * discriminationRatio, System: p.Highest, Prospective: prospective,
		Empty: p.Empty, Internal: p.Internal * usedBattery, Within: p.Site.Practice.ClearWithin.Val,
		Cables: p.trunkCables(load, cable, pinned), Withstand: adiabaticK,
		Cold: func(r quantity.Ampere) quantity.Ohm { return quantity.Ohm(fuseOhm(r)) },
	})
	if err != nil {
		p.block(part.Designation, part.At, "", err)
		if m.Class == nil {
			m.Class = p.classOf(given.Val, catalogue.FuseKnife)
		}
	}
	class, rating := m.Class, given.Val
	if !given.Given {
		if !m.OverSmaller {
			behind = 0
		}
		var w sizing.Working
		rating, w, err = p.rate(class, load, behind)
		p.rated(part, "everything", w, err)
	}
	f := p.fit(part, class, rating, "everything", load, given.Given)
	part.Description = class.Title + " and holder, at the plus pole"
	p.TrunkOhm += quantity.Ohm(fuseOhm(rating))

	size, iz := p.leastFor(part.Designation, class, rating, catalogue.LeastFixed, 1)
	if m.Cable.Size.Area > size.Area && !pinned.Given {
		size, iz = m.Cable.Size, m.Cable.Ampacity
	}
	size, iz = p.trunkFor(size, iz, cable, quantity.Ohm(fuseOhm(rating))+isolatorOhm+cutOffOhm)
	p.TrunkSize = size
	if pinned.Given {
		size, iz = pinned.Val, p.ampacity(pinned.Val, 1)
	}
	f.CableAmpacity, f.CableSize = iz, size
	c, _ := catalogue.ConductorOf(size)
	p.run(cable, size, sizing.PerMetre(c, p.running(size)))
	p.CabinetOhm = quantity.Ohm(fuseOhm(rating)) + 2*quantity.Ohm(cable.Length)*sizing.PerMetre(c, p.running(size))
	if q := p.part(s, "isolator"); q != nil {
		p.isolator(q, p.pricedRating(q, "isolator", catalogue.IsolatorCurrents, load), false)
	}
	p.TrunkOhm += 2 * quantity.Ohm(cable.Length) * sizing.PerMetre(c, p.running(size))
	p.CutOffOhm = p.TrunkOhm
	t, _ := catalogue.ConductorOf(p.TrunkSize)
	p.TrunkOhm += quantity.Ohm(p.trunkLength()) * sizing.PerMetre(t, p.running(p.TrunkSize))
}

// mainClasses lists the classes for the battery's main fuse: the one that the user
// fixes, those that the highest voltage allows, and what makes a rating given by the
// user.
func (p *Plan) mainClasses(s *describe.Stage, given quantity.Ampere) []*catalogue.FuseClass {
	if v, ok := describe.Get[string](s.Fields, "fuse_class"); ok {
		return []*catalogue.FuseClass{catalogue.FuseClassOf(v.Val)}
	}
	list := p.ratedClasses()
	// Knife links stand farther above the fuses behind them than cylindrical ones of the
	// same order: they come first, and cylindrical ones where a short opens no knife link.
	slices.SortStableFunc(list, func(a, b *catalogue.FuseClass) int { return cmp.Compare(cylindrical(a), cylindrical(b)) })
	if c := p.classOf(given, list[0]); given > 0 && !slices.Contains(list, c) {
		list = append(list, c)
	}
	return list
}

// cylindrical is 1 for classes of cylindrical links.
func cylindrical(c *catalogue.FuseClass) int {
	if c == catalogue.FuseCylinder10 || c == catalogue.FuseCylinder14 {
		return 1
	}
	return 0
}

// trunkCables lists the sizes that the battery cable may take with the loop from the
// battery's poles to the boards, the main fuse left out. Leads of the trunk are of the
// same size.
func (p *Plan) trunkCables(load quantity.Ampere, cable *circuit.Cable, pinned describe.At[quantity.WireSize]) []sizing.CableOption {
	fixed := p.trunkParts(load)
	option := func(size quantity.WireSize) (sizing.CableOption, bool) {
		c, ok := catalogue.ConductorOf(size)
		iz := p.ampacity(size, 1)
		metre := sizing.PerMetre(c, p.running(size))
		return sizing.CableOption{Size: c.Size, Ampacity: iz, Loop: fixed + quantity.Ohm(2*cable.Length+p.trunkLength())*metre}, ok && iz > 0
	}
	if pinned.Given {
		o, _ := option(pinned.Val)
		return []sizing.CableOption{o}
	}
	var out []sizing.CableOption
	for _, c := range p.sizes() {
		if o, ok := option(c.Size); ok && c.Size.Area >= catalogue.LeastFixed.Least(p.System)-areaSlack {
			out = append(out, o)
		}
	}
	return out
}

// trunkParts is the resistance of what stands in the energy's way besides fuse and
// conductors, with an ammeter of the range for load.
func (p *Plan) trunkParts(load quantity.Ampere) quantity.Ohm {
	var sum quantity.Ohm
	for _, s := range p.Site.Stages {
		switch s.Kind.Val {
		case "battery":
			if p.part(s, "isolator") != nil {
				sum += isolatorOhm
			}
		case "isolator":
			sum += isolatorOhm
		case "low-voltage-disconnect":
			sum += cutOffOhm
		case "meter":
			if must[string](s, "reads") == "amps" {
				full, given := describe.Get[quantity.Ampere](s.Fields, "range")
				if !given {
					full.Val, _ = catalogue.NextRating(catalogue.MeterRanges, load)
				}
				if full.Val > 0 {
					sum += shuntOhm(full.Val)
				}
			}
		}
	}
	return sum + p.ContactOhm
}

// trunkShare is the part of the permitted drop that the way from the battery to the
// boards may take, so that enough is left for feeders and legs (common practice, no
// source).
const trunkShare = 0.25

// trunkFor returns the thinnest size from size up with which the way from the
// battery to the boards keeps within its share of the drop.
func (p *Plan) trunkFor(size quantity.WireSize, iz quantity.Ampere, cable *circuit.Cable, fixed quantity.Ohm) (quantity.WireSize, quantity.Ampere) {
	most := float64(p.permittedDrop()) * trunkShare
	metres := quantity.Ohm(2*cable.Length + p.trunkLength())
	for _, c := range p.sizes() {
		if c.Size.Area < size.Area-areaSlack {
			continue
		}
		z := p.ampacity(c.Size, 1)
		if z == 0 {
			continue
		}
		size, iz = c.Size, z
		if float64(p.Light)*float64(fixed+metres*sizing.PerMetre(c, p.running(c.Size))) <= most {
			break
		}
	}
	return size, iz
}

// largestWay estimates the largest fuse behind the main one: the charger's, a card's,
// or that of the circuit or board with the greatest load, or one given.
func (p *Plan) largestWay() quantity.Ampere {
	var most quantity.Ampere
	for _, f := range p.F.Fuses { // those of charger and cards are sized already
		most = max(most, f.Rating)
	}
	for _, b := range p.C.Boards {
		if b.Parent != nil {
			continue
		}
		for _, w := range b.Ways {
			var ib quantity.Ampere
			add := func(pt *circuit.Point) { ib += p.LampDesign(p.loads[pt.Type]) }
			given := describe.At[quantity.Ampere]{}
			switch {
			case w.Lighting != nil:
				w.Lighting.Walk(func(pt, _ *circuit.Point) { add(pt) })
				given = p.circuitOf(w.Lighting.Name).Fuse
			case w.Feeds != nil:
				p.below(w.Feeds, add)
				given, _ = describe.Get[quantity.Ampere](p.stageOf(w.Feeds.Name).Fields, "fuse")
			}
			r := given.Val
			if !given.Given {
				_, r, _ = p.nextFuse(ib/quantity.Ampere(p.Site.Practice.LoadFactor.Val), 0)
			}
			most = max(most, r)
		}
	}
	return most
}

// trunkLength is the length of all single wires in the energy's way, both poles.
func (p *Plan) trunkLength() quantity.Metre {
	var sum quantity.Metre
	for _, w := range p.C.Conductors {
		if w.Cable == nil && p.onTrunk(w) {
			sum += w.Length
		}
	}
	return sum
}
