// Package stage knows the stage and luminaire kinds: one file each, with the
// kind's fields, its expansion into parts, pins, conductors and test points, its
// steps of sizing and its sketch for the drawing. Adding a kind is adding a file
// and a line in the lists below.
package stage

import (
	"cmp"
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// Kind is one stage kind.
type Kind struct {
	describe.Kind
	Class   Class
	Rank    int    // order among stages at the same distance from the source
	Heading string // default heading on the drawing
	// Expand builds the stage's parts into the circuit.
	Expand func(b *Build, s *describe.Stage)
	// Steps size the stage; each runs once, in the phase it names.
	Steps []Step
}

// Class says on which kind of sheet a stage is drawn.
type Class uint8

// The classes, in sheet order.
const (
	SupplyClass  Class = iota // supplies, charger, battery, isolator, cut-off
	ControlClass              // photocell, test switch, changeover
	BoardClass                // distribution boards
)

// LuminaireKind is one kind of lamp.
type LuminaireKind struct {
	describe.Kind
	Symbol string // name of its symbol
	// Load sizes the lamp and returns what it draws.
	Load func(p *Plan, t *describe.Luminaire) Load
	// Build adds the lamp's elements to the part.
	Build func(b *Build, p *circuit.Part)
}

// The kinds, in the order of the reference; filled once when the program starts.
var (
	kindTable      []*Kind
	luminaireTable []*LuminaireKind
	partTable      []*PartKind
)

func init() {
	kindTable = []*Kind{
		regulatedSupply(), transformerSupply(), charger(), linearCharger(), battery(), isolator(), meter(), lowVoltageDisconnect(),
		shuntRegulator(), testSwitch(), photocell(), changeoverRelay(), indicator(), suppressor(), distributionBoard(),
	}
	luminaireTable = []*LuminaireKind{ledDriver(), ledString(), filament(), ballast(), resistive()}
	partTable = []*PartKind{
		partResistor(), partCapacitor(), partDiode(), partSchottky(), partZener(), partLED(),
		partFuse(), partSwitch(), partLamp(), partRelay(), partContact(), partTerminal(),
	}
	for _, k := range kindTable {
		k.Nets = []string{minusNet}
	}
}

// Kinds returns the stage kinds by reference order.
func Kinds() []*Kind { return kindTable }

// LuminaireKinds returns the luminaire kinds by reference order.
func LuminaireKinds() []*LuminaireKind { return luminaireTable }

// Schema returns what the description decoder needs to know of all kinds.
func Schema() *describe.Schema {
	s := &describe.Schema{}
	for _, k := range kindTable {
		s.Stages = append(s.Stages, k.Kind)
	}
	for _, k := range luminaireTable {
		s.Luminaires = append(s.Luminaires, k.Kind)
	}
	for _, k := range partTable {
		s.Parts = append(s.Parts, k.Kind)
	}
	return s
}

func kindOf(name string) *Kind {
	for _, k := range kindTable {
		if k.Name == name {
			return k
		}
	}
	panic("stage: no kind " + name + "; the decoder must refuse it")
}

func luminaireKindOf(name string) *LuminaireKind {
	for _, k := range luminaireTable {
		if k.Name == name {
			return k
		}
	}
	panic("stage: no luminaire kind " + name + "; the decoder must refuse it")
}

// commonFields are keys that every stage kind takes.
func commonFields() []describe.Field {
	return []describe.Field{
		{Name: "title", Type: describe.Text, Doc: "Heading on the drawing; without it the kind's own."},
		{Name: "place", Type: describe.Text, Doc: "Name of the enclosure or spot where the stage stands; without it the main cabinet, or the kind's own."},
	}
}

// fields joins the kind's own fields with those that all kinds take.
func fields(own ...describe.Field) []describe.Field { return append(own, commonFields()...) }

// ordered returns the stages in the order of the energy's way: sheet class, then
// distance from the source along the references, then rank, then name. The order
// of the file does not matter.
func ordered(site *describe.Site) []*describe.Stage {
	depth := map[string]int{}
	byName := map[string]*describe.Stage{}
	for _, s := range site.Stages {
		byName[s.Name.Val] = s
	}
	var walk func(s *describe.Stage, guard int) int
	walk = func(s *describe.Stage, guard int) int {
		if d, ok := depth[s.Name.Val]; ok {
			return d
		}
		d := 0
		if guard > 0 {
			for _, f := range kindOf(s.Kind.Val).Fields {
				if f.Type != describe.StageRef || f.Feeds {
					continue
				}
				if r, ok := describe.Get[describe.Ref](s.Fields, f.Name); ok {
					if up := byName[r.Val.Stage]; up != nil {
						d = max(d, 1+walk(up, guard-1))
					}
				}
			}
			for _, other := range site.Stages {
				for _, f := range kindOf(other.Kind.Val).Fields {
					if f.Type != describe.StageRef || !f.Feeds || kindOf(s.Kind.Val).Class != ControlClass && f.Port != "charge" {
						continue
					}
					if r, ok := describe.Get[describe.Ref](other.Fields, f.Name); ok && r.Val.Stage == s.Name.Val {
						d = max(d, 1+walk(other, guard-1))
					}
				}
			}
		}
		depth[s.Name.Val] = d
		return d
	}
	out := slices.Clone(site.Stages)
	for _, s := range out {
		walk(s, len(out))
	}
	slices.SortStableFunc(out, func(a, b *describe.Stage) int {
		ka, kb := kindOf(a.Kind.Val), kindOf(b.Kind.Val)
		return cmp.Or(cmp.Compare(ka.Class, kb.Class), cmp.Compare(depth[a.Name.Val], depth[b.Name.Val]),
			cmp.Compare(ka.Rank, kb.Rank), cmp.Compare(a.Name.Val, b.Name.Val))
	})
	return out
}
