package stage

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// charger returns the kind: a packaged constant-current, constant-voltage charger with float and
// boost stages and temperature compensation.
func charger() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "charger",
			Doc:  "Packaged charger: constant current, then constant voltage, with float and boost stages and temperature compensation.",
			Fields: fields(
				describe.Field{Name: "to", Type: describe.StageRef, Required: true, Feeds: true, Port: "charge", Doc: "The battery that it charges."},
				describe.Field{Name: "mains", Type: describe.Mains, Required: true, Doc: "Mains voltage and its tolerance."},
				describe.Field{Name: "current", Type: describe.Current, Min: "10 mA", Max: "200 A", Doc: "Rated current; without it sized from the recharge time and the standing load."},
				describe.Field{Name: "float", Type: describe.Voltage, Min: "1 V", Max: "60 V", Doc: "Float setting at the reference temperature of the battery's class (25 °C, 20 °C for gel and flooded); without it from the battery's class."},
				describe.Field{Name: "boost", Type: describe.Voltage, Min: "1 V", Max: "60 V", Doc: "Boost setting at the same temperature; without it from the battery's class."},
				describe.Field{Name: "compensation", Type: describe.Bool, Default: "yes", Doc: "Temperature compensation by a probe at the battery."},
				describe.Field{Name: "accuracy", Type: describe.Percent, Default: "1 %", Min: "0 %", Max: "10 %", Doc: "Tolerance of the float and boost voltages, both ways."},
				describe.Field{Name: "own", Type: describe.Current, Default: "5 mA", Min: "0 mA", Max: "1 A", Doc: "Current that it takes from the battery while mains is off."},
				describe.Field{Name: "fuse", Type: describe.Current, Min: "0.1 A", Max: "200 A", Doc: "Output fuse; without it sized."},
			),
		},
		Class: SupplyClass, Rank: 1, Heading: "Charger",
		Expand: func(b *Build, s *describe.Stage) {
			probe := compensated(s)
			pins := []string{"L", "N", "PE", "+", "-"}
			if probe {
				pins = append(pins, "θ+", "θ-")
			}
			t := b.Part("charger", circuit.ChargerUnit, "Battery charger", pins...)
			b.Element(t, "", "charger", "+", "+", "-", "-")
			f := b.Part("fuse", circuit.Fuse, "Charger fuse and holder", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			store, _ := describe.Get[describe.Ref](s.Fields, "to")
			rail := store.Val.Stage + ".plus"

			b.sketch(25, "fills the battery", "and keeps it full")
			b.mains(t, []string{"L", "N", "PE"}, 6, 25, 27, 33)
			right, ry := []string{"+", "-"}, []int{-4, 4}
			if probe {
				right, ry = []string{"+", "θ+", "θ-", "-"}, []int{-4, -2, 2, 4}
			}
			b.converter(t, 10, 29, 5, []string{"L", "N", "PE"}, right, []int{-4, -2, 4}, ry, probe)
			w := b.Wire(t.Pin("+"), f.Pin("2"), true, leadLength)
			b.line(w, 14, 25, 19, 25, 19, 15)
			b.symbol("fuse", f, 19, 13, "V", "L")
			up := b.lead(circuit.OpUp, "plus", f.Pin("1"), rail, 19, 11, 19, upEnd)
			down := b.lead(circuit.OpDown, "minus", t.Pin("-"), Minus, 14, 33, 19, 33, 19, downEnd)
			if probe {
				b.outs[s.Name.Val+".θ+"] = t.Pin("θ+")
				b.outs[s.Name.Val+".θ-"] = t.Pin("θ-")
				b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "temp+", Y: pairLevel})
				b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "temp-", Y: pairLevel + 4})
				b.line(nil, 14, pairLevel, 25, pairLevel)
				b.line(nil, 14, pairLevel+4, 25, pairLevel+4)
			}
			b.point(b.TestPoint("output", b.cur.Heading+" output", t.Pin("+")), 19, 19, "W")
			b.number(w, 19, 23)
			b.number(up, 19, 9)
			b.number(down, 19, 42)
		},
		Steps: []Step{{Charging, sizeCharger}},
	}
}

func compensated(s *describe.Stage) bool {
	v, ok := describe.Get[bool](s.Fields, "compensation")
	return ok && v.Val
}

// sizeCharger chooses or checks the charger's current and its voltage settings.
func sizeCharger(p *Plan, s *describe.Stage) {
	t, fuse := p.part(s, "charger"), p.part(s, "fuse")
	b := &p.F.Battery
	given, pinned := describe.Get[quantity.Ampere](s.Fields, "current")
	nominal := p.Site.Duty.Nominal.Val
	stock := p.ratings(s.Kind.Val, nominal, catalogue.ChargerCurrents)
	in := sizing.ChargerInput{
		Stock: stock, Class: p.Class, Capacity: b.Capacity, Removed: b.Removed, In: p.Site.Duty.Recharge.Val, Standing: p.Standing + p.Held,
	}
	c, ws, err := sizing.ChargerCurrent(in)
	if err != nil && !pinned {
		p.block(t.Designation, t.At, "", err)
	}
	for _, w := range ws {
		p.work(t.Designation, "", w, b.Part.Designation+": capacity fitted")
	}
	rated := given.Val
	if !pinned {
		rated = max(c.Rated, stock[0])
	}
	need := c.Needed
	if k := p.more.Charge; k > 1 && !pinned {
		asked := need * quantity.Ampere(k)
		if r, ok := catalogue.NextRating(stock, asked); ok && r <= c.Limit {
			rated = r
		}
		p.work(t.Designation, "current that the simulated recharge asks", sizing.Working{
			Formula: "I × k, k from the recharge followed hour by hour", Substituted: fmt.Sprintf("%.4f A × %.4f", float64(need), k),
			Value: float64(asked), Unit: "A", Source: "simulated recharge",
		}, t.Designation+": charger current needed")
		need = asked
	}
	if !pinned && err == nil {
		rated = p.cheapestRating(t, s.Kind.Val, nominal, rated, c.Limit)
	}
	limit := quantity.Ampere(float64(p.Class.MaxCharge) * float64(b.Capacity))
	mains := must[quantity.Toleranced[quantity.Volt]](s, "mains")
	_, pinnedFloat := describe.Get[quantity.Volt](s.Fields, "float")
	_, pinnedBoost := describe.Get[quantity.Volt](s.Fields, "boost")
	acc := float64(must[quantity.Ratio](s, "accuracy"))
	set(t, "rating", nominal.String()+" "+rated.String(), float64(rated), "A", true, pinned)
	set(t, "float", "float "+quantity.Format(p.Float, 3), float64(p.Float), "V", true, pinnedFloat)
	set(t, "boost", "boost "+quantity.Format(p.Boost, 3), float64(p.Boost), "V", true, pinnedBoost)
	set(t, "mains", mains.String(), float64(mains.Nominal), "V", false, true)
	params(t, "",
		circuit.Param{Name: "float_volt", Value: float64(p.Float), Tol: acc},
		circuit.Param{Name: "boost_volt", Value: float64(p.Boost), Tol: acc},
		circuit.Param{Name: "limit_ampere", Value: float64(rated), Tol: powerTol},
		circuit.Param{Name: "standby_ampere", Value: float64(must[quantity.Ampere](s, "own")), Tol: ownTol},
	)
	p.F.Charger = facts.Charger{
		Part: t, Current: rated, Required: need, Limit: limit, Float: p.Float, Boost: p.Boost,
		PerKelvin: quantity.Volt(p.Cells) * p.Class.Slope, Compensated: compensated(s), Pinned: pinned, Mains: mains,
	}
	for _, boost := range []bool{false, true} {
		_, w := sizing.ChargeVoltage(sizing.ChargeInput{Class: p.Class, Cells: p.Cells, Boost: boost, At: p.Class.ChargeAt})
		p.work(t.Designation, "", w)
	}
	fuseGiven, _ := describe.Get[quantity.Ampere](s.Fields, "fuse")
	f := p.systemFuse(fuse, "charger", rated, fuseGiven)
	p.ChargeSize, f.CableAmpacity = p.leastFor(fuse.Designation, f.Class, f.Rating, catalogue.LeastFixed, 1)
	f.CableSize = p.ChargeSize
}
