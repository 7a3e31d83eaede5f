package stage

import (
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// oneGap is the highest voltage that a single contact gap is given to break: above it
// the current that one gap breaks falls steeply (load-limit curves of relays), and two
// poles stand in series.
const oneGap quantity.Volt = 30

// inSeries reports whether a changeover has two poles in series.
func inSeries(site *describe.Site) bool {
	p := &Plan{Site: site}
	p.voltages()
	return p.inSeries()
}

// inSeries is the same where the voltages are known.
func (p *Plan) inSeries() bool { return p.Highest > oneGap }

// relayFor is the class of a changeover relay: the first whose contact breaks the load
// at the highest voltage and whose coil the photocells that hold it can work; a class
// given by the user stands. Where none suits both, the contact comes first.
func (p *Plan) relayFor(s *describe.Stage) catalogue.RelayClass {
	if v, ok := describe.Get[string](s.Fields, "class"); ok {
		c, _ := catalogue.RelayClassOf(v.Val)
		return c
	}
	if c, ok := p.relays[s]; ok {
		return c
	}
	_, rated := describe.Get[quantity.Ampere](s.Fields, "rated")
	var best catalogue.RelayClass
	most := quantity.Ampere(-1)
	carries := false
	for _, c := range p.coilClasses(p.Site.Duty.Nominal.Val) {
		if p.twoPoles(s) && len(c.SeriesRows) == 0 {
			continue // not made with two poles
		}
		may, _, err := p.contactLoad(c)
		fits := err == nil || rated
		if fits && p.photocellsWork(s, c) {
			p.relays[s] = c
			return c
		}
		switch {
		case fits && !carries:
			best, carries = c, true
		case !carries && may > most:
			best, most = c, may
		}
	}
	p.relays[s] = best
	return best
}

// twoPoles reports whether a changeover needs a second pole: for two gaps in series, or
// because both its break and its make contact feed something.
func (p *Plan) twoPoles(s *describe.Stage) bool {
	return p.inSeries() || slices.ContainsFunc(p.part(s, "relay").Elements, furtherPole)
}

// coilClasses lists the classes that are made with a coil of that rated voltage, in the
// order in which they are tried.
func (p *Plan) coilClasses(rated quantity.Volt) []catalogue.RelayClass {
	var out []catalogue.RelayClass
	for _, c := range catalogue.RelayClasses() {
		if c.CoilVolt == 0 || rated <= c.CoilVolt {
			out = append(out, c)
		}
	}
	return out
}

// contactLoad holds the contacts of a class against the lighting load.
func (p *Plan) contactLoad(c catalogue.RelayClass) (quantity.Ampere, sizing.Working, error) {
	return sizing.ContactLoad(sizing.ContactInput{
		Class: c, Volt: p.Highest, Current: p.Light, Lamps: p.filaments(), Series: p.inSeries(),
	})
}

// feedLoss is what the Schottky diode of the feed and a closed driver take off the
// voltage of a coil that a photocell holds (common practice, no source).
const feedLoss quantity.Volt = 0.7

// photocellsWork reports whether every photocell that holds a relay can work its coil on
// the nearly empty battery.
func (p *Plan) photocellsWork(s *describe.Stage, c catalogue.RelayClass) bool {
	for _, o := range p.Site.Stages {
		h, ok := describe.Get[describe.Ref](o.Fields, "holds")
		if !ok || o.Kind.Val != "photocell" || h.Val.Stage != s.Name.Val {
			continue
		}
		if must[string](o, "built") != "follower" {
			if warm, err := p.warmPickUp(c); err != nil || warm > p.End-feedLoss {
				return false
			}
			continue
		}
		if _, _, _, err := p.follower(o, s, c); err != nil {
			return false
		}
	}
	return true
}

// coilOhm is the resistance of a relay's coil: the user's, or that of its class.
func (p *Plan) coilOhm(s *describe.Stage, c catalogue.RelayClass) quantity.Ohm {
	if v, ok := describe.Get[quantity.Ohm](s.Fields, "coil_resistance"); ok {
		return v.Val
	}
	return c.CoilResistance(p.Site.Duty.Nominal.Val)
}

// coilFeeds counts the sources that hold a relay's coil.
func (p *Plan) coilFeeds(s *describe.Stage) int {
	n := 0
	if _, ok := describe.Get[describe.Ref](s.Fields, "coil"); ok {
		n++
	}
	for _, o := range p.Site.Stages {
		if h, ok := describe.Get[describe.Ref](o.Fields, "holds"); ok && o.Kind.Val == "photocell" && h.Val.Stage == s.Name.Val {
			n++
		}
	}
	return n
}

// warmPickUp is the pick-up voltage of a coil that has been dead all night, in the
// hottest ambient.
func (p *Plan) warmPickUp(c catalogue.RelayClass) (quantity.Volt, error) {
	nominal := p.Site.Duty.Nominal.Val
	c.CoilRise = 0
	dawn, _, err := sizing.CoilPickUp(sizing.CoilInput{
		Class: c, Rated: nominal, Low: p.Highest, High: nominal * quantity.Volt(c.CoilMost), Ambient: p.Site.Duty.CableAmbient.Val,
	})
	return dawn.Needs, err
}
