package stage

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// battery returns the kind: blocks in series and parallel, the main fuse at the plus
// terminal, an isolator if asked.
func battery() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "battery",
			Doc:  "The store: blocks in series and parallel, a main fuse at the plus terminal and an isolator.",
			Ports: []describe.Port{
				{Name: "plus", Doc: "plus behind main fuse and isolator"},
				{Name: "charge", Doc: "where a charger feeds in; the same rail", Sink: true, Max: 1},
			},
			MustFeed: true,
			Single:   true,
			Fields: fields(
				describe.Field{Name: "cells", Type: describe.Choice, Required: true, Choices: cellChoices(), Doc: "Battery class."},
				describe.Field{Name: "capacity", Type: describe.Capacity, Min: "0.5 Ah", Max: "5000 Ah", Doc: "Capacity of the whole battery at its class's rated time; without it sized."},
				describe.Field{Name: "series", Type: describe.Count, Min: "1", Max: "40", Doc: "Cells in series; without it from the nominal voltage."},
				describe.Field{Name: "parallel", Type: describe.Count, Min: "1", Max: "8", Doc: "Strings in parallel; without it as few as the block list allows."},
				describe.Field{Name: "along", Type: describe.Length, Default: "2 m", Min: "0.1 m", Max: "100 m", Doc: "Length of the battery cable, battery to cabinet."},
				describe.Field{Name: "cable", Type: describe.Size, Doc: "Size of the battery cable; without it sized."},
				describe.Field{Name: "fuse", Type: describe.Current, Min: "0.5 A", Max: "500 A", Doc: "Main fuse; without it sized."},
				describe.Field{Name: "fuse_class", Type: describe.Choice, Choices: fuseChoices(), Doc: "Class of the main fuse; without it the first that fits."},
				describe.Field{Name: "isolator", Type: describe.Bool, Default: "yes", Doc: "Isolator between main fuse and cabinet."},
				describe.Field{Name: "end", Type: describe.Voltage, Min: "1 V", Max: "60 V", Doc: "End-of-discharge voltage of the whole battery; without it from the class, the lamps and the cut-off."},
				describe.Field{Name: "table", Type: describe.Curve, Doc: "Capacity against discharge time of the battery at hand; without it the class's table."},
			),
		},
		Class: SupplyClass, Rank: 2, Heading: "Battery",
		Expand: func(b *Build, s *describe.Stage) {
			home := b.cur.Place
			b.cur.Place = b.Place(s.Name.Val, "B", Text(s, "place", "Battery box"))
			g := b.Part("battery", circuit.Battery, "Battery", "+", "-")
			b.Element(g, "", "battery", "+", "+", "-", "-")
			f := b.Part("fuse", circuit.Fuse, "Main fuse and holder, at the plus pole", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			withIsolator := false
			if v, ok := describe.Get[bool](s.Fields, "isolator"); ok {
				withIsolator = v.Val
			}
			var q *circuit.Part
			if withIsolator {
				q = b.Part("isolator", circuit.SwitchIsolator, "Isolator, DC rated", "1", "2")
				b.Element(q, "", "switch", "1", "1", "2", "2")
			}
			box := b.cur.Place
			along := must[quantity.Metre](s, "along")
			b.cur.Place = home
			tPlus := b.Terminal(cabinet, "plus")
			tMinus := b.Terminal(cabinet, "minus")
			tMinus.Lower = true
			b.cur.Place = box
			w := b.Cable("cable", box, home, along)
			pin, _ := describe.Get[quantity.WireSize](s.Fields, "cable")
			w.Pinned = pin.Given

			b.sketch(30, "carries the lights", "through an outage")
			top := f.Pin("1")
			if q != nil {
				top = q.Pin("1")
			}
			wPlus := b.Core(w, top, tPlus.Pin("in"), true)
			wMinus := b.Core(w, g.Pin("-"), tMinus.Pin("in"), false)
			rail := s.Name.Val + ".plus"
			b.onRail(b.rails[rail], tPlus.Pin("out"))
			b.onRail(b.rails[Minus], tMinus.Pin("out"))
			if b.C.Black == nil {
				b.C.Black = tMinus.Pin("out")
			}
			if q != nil {
				b.add(circuit.SketchItem{Op: circuit.OpUp, Part: tPlus, Wire: wPlus, Rail: b.rails[rail].Name, Pts: points([]int{22, 14, 22, upEnd})})
				b.symbol("switch_disc", q, 22, 16, "V", "L")
				link := b.Wire(f.Pin("1"), q.Pin("2"), true, bridgeLength)
				b.line(link, 22, 18, 22, 21)
			} else {
				b.add(circuit.SketchItem{Op: circuit.OpUp, Part: tPlus, Wire: wPlus, Rail: b.rails[rail].Name, Pts: points([]int{22, 21, 22, upEnd})})
			}
			b.symbol("fuse", f, 22, 23, "V", "L")
			pole := b.Wire(g.Pin("+"), f.Pin("2"), true, bridgeLength)
			b.line(pole, 22, 25, 22, 33)
			b.number(pole, 22, 27)
			b.point(b.TestPoint("terminals", "Battery terminals", g.Pin("+")), 22, 29, "W")
			b.symbol("battery", g, 22, 35, "V", "L")
			b.add(circuit.SketchItem{Op: circuit.OpDown, Part: tMinus, Wire: wMinus, Rail: b.rails[Minus].Name, Pts: points([]int{22, 37, 22, downEnd})})
			b.add(circuit.SketchItem{Op: circuit.OpCore, Wire: wPlus, X: 22, Y: 9.4})
			b.add(circuit.SketchItem{Op: circuit.OpCore, Wire: wMinus, X: 22, Y: 42})

			for _, c := range b.feedersOf(s.Name.Val, "charge") {
				if c.Kind.Val == "charger" && compensated(c) {
					b.probe(s, c, along)
				}
			}
			b.cur.Place = box
		},
		Steps: []Step{{Storage, sizeBattery}, {Trunk, sizeMainFuse}},
	}
}

// cellChoices are the battery classes of the catalogue.
func cellChoices() []string {
	var out []string
	for _, c := range catalogue.BatteryClasses() {
		out = append(out, c.Name)
	}
	return out
}

// fuseChoices are the fuse classes of the catalogue.
func fuseChoices() []string {
	var out []string
	for _, c := range catalogue.FuseClasses() {
		out = append(out, c.Name)
	}
	return out
}

// probe adds the charger's temperature probe at the battery and its cable.
func (b *Build) probe(s, c *describe.Stage, along quantity.Metre) {
	n := b.Part("probe", circuit.NTC, "Temperature probe, on the battery", "1", "2")
	n.Values = []circuit.Value{{Name: "resistance", Text: "10 kΩ", Num: 10e3, Unit: "Ω", Show: true}}
	w := b.Cable("probe-cable", b.places["cabinet"], b.cur.Place, along)
	w.Size = quantity.WireSize{Area: 0.5}
	plus := b.Core(w, b.outs[c.Name.Val+".θ+"], n.Pin("1"), true)
	minus := b.Core(w, b.outs[c.Name.Val+".θ-"], n.Pin("2"), false)
	b.add(circuit.SketchItem{Op: circuit.OpLeft, Name: "temp+", Y: pairLevel, Wire: plus, Cable: w})
	b.add(circuit.SketchItem{Op: circuit.OpLeft, Name: "temp-", Y: pairLevel + 4, Wire: minus, Cable: w})
	b.line(plus, 0, pairLevel, 8, pairLevel)
	b.line(minus, 0, pairLevel+4, 8, pairLevel+4)
	b.symbol("ntc", n, 8, 29, "V", "L")
	// The charger's side of the pair is the same wire.
	for _, st := range b.C.Stages {
		if st.Name != c.Name.Val {
			continue
		}
		for i := range st.Sketch.Items {
			switch it := &st.Sketch.Items[i]; {
			case it.Op == circuit.OpRight && it.Name == "temp+":
				it.Wire, it.Cable = plus, w
			case it.Op == circuit.OpRight && it.Name == "temp-":
				it.Wire, it.Cable = minus, w
			case it.Op == circuit.OpWire && it.Wire == nil && len(it.Pts) == 2 && it.Pts[1] == [2]int{25, pairLevel}:
				it.Wire = plus
			case it.Op == circuit.OpWire && it.Wire == nil && len(it.Pts) == 2 && it.Pts[1] == [2]int{25, pairLevel + 4}:
				it.Wire = minus
			}
		}
	}
}

// must returns a field that has a default or is required.
func must[T any](s *describe.Stage, name string) T {
	v, ok := describe.Get[T](s.Fields, name)
	if !ok {
		panic("stage: " + s.Kind.Val + " has no " + name + "; the decoder must supply it")
	}
	return v.Val
}

// cable returns a cable of stage s by its local key.
func (p *Plan) cable(s *describe.Stage, local string) *circuit.Cable {
	for _, c := range p.C.Cables {
		if c.Key == s.Name.Val+"/"+local {
			return c
		}
	}
	return nil
}

// sizeBattery sizes the battery over the load cycle of an outage: lights and what
// the stages draw, for the whole of it, at the coldest room and the end of life.
func sizeBattery(p *Plan, s *describe.Stage) {
	g := p.part(s, "battery")
	b := &p.F.Battery
	amps, outage := p.Light+p.Standing, p.Site.Duty.Outage.Val
	practice := p.Site.Practice
	table, _ := describe.Get[[]describe.RatePoint](s.Fields, "table")
	rates := p.rates(table.Val)
	need, ws, err := sizing.Sectional(sizing.SectionalInput{
		Class: p.Class, Rates: rates, EndVolt: p.End / quantity.Volt(p.Cells), Coldest: p.Site.Duty.BatteryRoom.Val.Low,
		Periods: []sizing.Period{{Name: "outage at night", Current: amps, Time: outage}},
		Ageing:  practice.Ageing.Val, Margin: practice.Margin.Val,
	})
	if err != nil {
		p.block(g.Designation, g.At, "", err)
	}
	for _, w := range ws {
		p.work(g.Designation, "", w, "battery: end of discharge")
	}
	if k := p.more.Capacity; k > 1 {
		p.work(g.Designation, "capacity that the simulated outage asks", sizing.Working{
			Formula: "C × k, k from the outage followed hour by hour", Substituted: fmt.Sprintf("%.4f Ah × %.4f", float64(need), k),
			Value: float64(need) * k, Unit: "Ah", Source: "simulated discharge",
		}, g.Designation+": required capacity")
		need *= quantity.AmpereHour(k)
	}
	given, pinned := describe.Get[quantity.AmpereHour](s.Fields, "capacity")
	parallel, _ := describe.Get[int](s.Fields, "parallel")
	var bank sizing.Bank
	if pinned {
		bank.Capacity = given.Val
		bank.Parallel = max(1, parallel.Val)
		bank.Block = p.blockOf(given.Val / quantity.AmpereHour(bank.Parallel))
		bank.Series = p.Cells / bank.Block.Cells
	} else {
		bank, err = p.bank(g, sizing.BankInput{Class: p.Class, Required: need, Cells: p.Cells, Stock: practice.Blocks.Val, Parallel: parallel.Val})
		if err != nil {
			p.block(g.Designation, g.At, "", err)
			bank = sizing.Bank{Block: p.Class.Blocks[len(p.Class.Blocks)-1], Series: 1, Parallel: 1, Capacity: max(need, 1)}
		}
	}
	p.Block = bank.Block
	var w sizing.Working
	p.Internal, w = sizing.Internal(p.Class.OhmAh.Typical, p.Cells, bank.Capacity)
	p.work(g.Designation, "", w, g.Designation+": capacity fitted")
	set(g, "capacity", p.Site.Duty.Nominal.Val.String()+" "+bank.Capacity.String(), float64(bank.Capacity), "Ah", true, pinned)
	set(g, "class", strings.ToUpper(p.Class.Name), 0, "", true, true)
	g.Description = fmt.Sprintf("Battery, %s, %d × %v %s", strings.ToLower(p.Class.Title[:1])+p.Class.Title[1:], bank.Series*bank.Parallel,
		quantity.Volt(bank.Block.Cells)*p.Class.Cell, bank.Block.Capacity)
	params(g, "", circuit.Param{Name: "emf", Value: float64(p.Full)}, circuit.Param{Name: "ohm", Value: float64(p.Internal)})
	*b = facts.Battery{
		Part: g, Class: p.Class.Name, ClassName: p.Class.Title, Series: p.Cells, Blocks: bank.Series, Parallel: bank.Parallel,
		BlockAh: bank.Block.Capacity, BlockNeed: need / quantity.AmpereHour(max(1, bank.Parallel)),
		BlockVolt: quantity.Volt(bank.Block.Cells) * p.Class.Cell, Capacity: bank.Capacity, Required: need, Pinned: pinned,
		RatedHours: p.Class.RatedTime.Hours(), Rates: rates, EndVolt: p.End, FullVolt: p.Full, FloatVolt: p.Float, Resistance: p.Internal,
		Fuse: p.part(s, "fuse"), Removed: quantity.AmpereHour(float64(amps) * outage.Hours()),
	}
	if f, listed := p.Class.SizeFactor(p.Site.Duty.BatteryRoom.Val.Low); listed {
		b.TemperatureFactor = max(float64(f), 1)
	}
	p.air(g, b)
}

// rates turns a table given in the description into parts of its largest capacity.
func (p *Plan) rates(table []describe.RatePoint) []catalogue.RatePoint {
	var most quantity.AmpereHour
	for _, x := range table {
		most = max(most, x.Capacity)
	}
	var out []catalogue.RatePoint
	for _, x := range table {
		out = append(out, catalogue.RatePoint{Time: x.Time, Fraction: quantity.Ratio(x.Capacity / most), End: p.Class.EndVolt})
	}
	slices.SortFunc(out, func(a, b catalogue.RatePoint) int { return cmp.Compare(a.Time, b.Time) })
	return out
}

// blockOf returns the standard block nearest to a capacity, for words in the papers.
func (p *Plan) blockOf(c quantity.AmpereHour) catalogue.Block {
	best := catalogue.Block{Cells: 1, Capacity: c}
	for _, b := range p.Class.Blocks {
		if p.Cells%b.Cells == 0 {
			best.Cells = b.Cells
			if b.Capacity >= c {
				break
			}
		}
	}
	return best
}

// air finds the ventilation that the battery needs while it is boosted.
func (p *Plan) air(g *circuit.Part, b *facts.Battery) {
	air, ws := sizing.Ventilation(sizing.VentilationInput{Class: p.Class, Cells: p.Cells, Capacity: b.Capacity, Boost: true})
	b.Ventilation, b.OpeningCM2, b.Gas = air.Flow, air.Opening, air.Flow > 0
	if b.Gas {
		for _, w := range ws {
			p.work(g.Designation, "", w, g.Designation+": capacity fitted")
		}
	}
}
