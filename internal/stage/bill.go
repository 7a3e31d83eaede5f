package stage

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// bill puts the firm's prices on everything that is bought; nothing if it gives none.
func (p *Plan) bill() {
	if len(p.prices) == 0 {
		return
	}
	b := &biller{p: p, bill: &facts.Bill{Currency: p.currency(), ByPart: map[*circuit.Part]*facts.BillLine{}}, held: p.heldSizes()}
	for _, part := range p.C.Parts {
		b.part(part)
	}
	for _, place := range p.C.Places {
		if name := describe.PriceName("enclosure", place.Name); p.priced(name) {
			b.line(&facts.BillLine{Name: name, Place: place, Quantity: 1, Unit: "pc"})
		}
	}
	b.conductors()
	b.spares()
	exact := 0.0
	for _, l := range b.bill.Lines {
		b.settle(l)
		exact += l.Each * l.Quantity
	}
	b.bill.Total = sizing.LineCost(1, exact)
	p.F.Bill = b.bill
}

func (p *Plan) priced(name string) bool { _, ok := p.price(name); return ok }

// biller is a bill in the making.
type biller struct {
	p    *Plan
	bill *facts.Bill
	held map[*circuit.Part]quantity.WireSize
}

func (b *biller) line(l *facts.BillLine) *facts.BillLine {
	b.bill.Lines = append(b.bill.Lines, l)
	return l
}

// settle looks up the price of a line.
func (b *biller) settle(l *facts.BillLine) {
	l.Each, l.Priced = b.p.price(l.Name)
	if !l.Priced {
		if !slices.Contains(b.bill.Without, l.Name) {
			b.bill.Without = append(b.bill.Without, l.Name)
		}
		return
	}
	l.Cost = sizing.LineCost(l.Each, l.Quantity)
}

// part adds a part to the line of its name.
func (b *biller) part(part *circuit.Part) {
	name, n := b.nameOf(part), 1
	if name == "" {
		return
	}
	if part == b.p.F.Battery.Part {
		n = max(1, b.p.F.Battery.Blocks*b.p.F.Battery.Parallel)
	}
	i := slices.IndexFunc(b.bill.Lines, func(l *facts.BillLine) bool { return l.Name == name })
	if i < 0 {
		i = len(b.bill.Lines)
		b.line(&facts.BillLine{Name: name, Unit: "pc"})
	}
	l := b.bill.Lines[i]
	l.Parts = append(l.Parts, part)
	l.Quantity += float64(n)
	b.bill.ByPart[part] = l
}

// plainNames are the names of parts that have one price whatever their values.
var plainNames = map[circuit.Kind]string{
	circuit.Resistor: "resistor", circuit.Preset: "preset", circuit.Potentiometer: "preset", circuit.Capacitor: "capacitor", circuit.Electrolytic: "capacitor",
	circuit.Diode: "diode", circuit.Schottky: "schottky", circuit.Zener: "zener", circuit.LED: "led", circuit.Suppressor: "suppressor",
	circuit.NPN: "transistor", circuit.PNP: "transistor", circuit.Comparator: "comparator", circuit.LDR: "light-sensor", circuit.NTC: "temperature-probe",
	circuit.PhotoSwitch: "photocell", circuit.PushButton: "switch", circuit.SignalLamp: "indicator", circuit.Voltmeter: "meter", circuit.Ammeter: "meter",
	circuit.Shunt: "shunt", circuit.Bridge: "bridge", circuit.Regulator: "regulator",
}

// nameOf names a part as practice.prices does; empty for what is not bought, or with
// another part.
func (b *biller) nameOf(part *circuit.Part) string {
	p := b.p
	nominal := p.Site.Duty.Nominal.Val
	switch part.Kind {
	case circuit.MainsConnection:
		return ""
	case circuit.Fuse:
		return b.fuse(part)
	case circuit.Battery:
		return blockName(p.Class, p.Block)
	case circuit.ChargerUnit:
		return ratedName("charger", nominal, quantity.Ampere(valueOf(part, "rating").Num))
	case circuit.Supply:
		return describe.PriceName("regulated-supply", valueOf(part, "rating").Text)
	case circuit.Transformer:
		r, _ := describe.Get[quantity.Rating](p.stageOf(part.Stage).Fields, "rated")
		return describe.PriceName("transformer", r.Val)
	case circuit.CutOff:
		return ratedName("low-voltage-disconnect", 0, quantity.Ampere(valueOf(part, "rating").Num))
	case circuit.SwitchIsolator:
		return ratedName("isolator", 0, quantity.Ampere(valueOf(part, "rating").Num))
	case circuit.Relay:
		for _, d := range p.Site.Parts {
			if p.parts["parts/"+d.Name.Val] == part {
				return describe.PriceName("relay", partField[quantity.Volt](d, "rated"))
			}
		}
		return describe.PriceName("changeover-relay", nominal)
	case circuit.BusBar:
		for _, bd := range p.C.Boards {
			if bd.Plus == part {
				return fmt.Sprintf("distribution-board %d ways", len(bd.Ways))
			}
		}
		return ""
	case circuit.Terminal:
		name, _, _ := p.terminalFor(b.held[part])
		return name
	case circuit.LuminaireLamp:
		return describe.PriceName("luminaire", strings.TrimPrefix(part.Description, "Luminaire "))
	}
	if name, ok := plainNames[part.Kind]; ok {
		return name
	}
	return string(part.Kind)
}

// fuse names a fuse with its holder, or the holder of a spare way.
func (b *biller) fuse(part *circuit.Part) string {
	for _, f := range b.p.F.Fuses {
		if f.Part == part {
			return fuseName(f.Class, f.Rating)
		}
	}
	class := b.p.wayClass
	if v := valueOf(part, "rating"); v.Num > 0 { // a single part on a rail of control
		return fuseName(class, quantity.Ampere(v.Num))
	}
	return describe.PriceName("fuse-holder", class.Name)
}

func valueOf(part *circuit.Part, name string) circuit.Value {
	for _, v := range part.Values {
		if v.Name == name {
			return v
		}
	}
	return circuit.Value{}
}

// heldSizes finds the thickest conductor that each terminal holds.
func (p *Plan) heldSizes() map[*circuit.Part]quantity.WireSize {
	out := map[*circuit.Part]quantity.WireSize{}
	for _, w := range p.C.Conductors {
		for _, pin := range []*circuit.Pin{w.From, w.To} {
			if pin.Part.Kind == circuit.Terminal && w.Size.Area > out[pin.Part].Area {
				out[pin.Part] = w.Size
			}
		}
	}
	for _, part := range p.C.Parts {
		if part.Kind == circuit.Terminal && out[part].Area == 0 {
			out[part] = controlWire[p.System]
		}
	}
	return out
}

// conductors adds the cables and wires by size and colours, in the length to draw.
func (b *biller) conductors() {
	type cut struct {
		line   *facts.BillLine
		length quantity.Metre
	}
	var cuts []*cut
	add := func(cores int, size quantity.WireSize, colour, name string, length quantity.Metre) {
		i := slices.IndexFunc(cuts, func(c *cut) bool { return c.line.Cores == cores && c.line.Size == size && c.line.Colour == colour })
		if i < 0 {
			i = len(cuts)
			cuts = append(cuts, &cut{line: b.line(&facts.BillLine{Name: name, Cores: cores, Size: size, Colour: colour, Unit: b.p.lengths().Symbol()})})
		}
		cuts[i].length += length
	}
	for _, c := range b.p.C.Cables {
		if len(c.Cores) == 0 {
			continue
		}
		name := c.Size.String()
		if len(c.Cores) != 2 { // the price of a size is that of two cores
			name = fmt.Sprintf("%d × %v", len(c.Cores), c.Size)
		}
		var colours []string
		for _, w := range c.Cores {
			colours = append(colours, w.Colour)
		}
		add(len(c.Cores), c.Size, strings.Join(colours, " "), name, c.Length)
	}
	for _, w := range b.p.C.Conductors {
		if w.Cable == nil {
			add(0, w.Size, w.Colour, describe.PriceName("wire", w.Size), w.Length)
		}
	}
	for _, c := range cuts {
		c.line.Quantity = b.p.lengths().Of(sizing.Drawn(c.length, b.p.lengths()))
	}
}

// spares adds the spare fuse-links of each class and rating.
func (b *biller) spares() {
	for i, f := range b.p.F.Fuses {
		same := func(x *facts.Fuse) bool { return x.Class == f.Class && x.Rating == f.Rating }
		if !slices.ContainsFunc(b.p.F.Fuses[:i], same) {
			b.line(&facts.BillLine{Name: describe.PriceName("fuse-link", f.Class.Name, f.Rating), Spare: f, Quantity: sizing.SpareLinks, Unit: "pc"})
		}
	}
}
