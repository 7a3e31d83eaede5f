package results

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// handmade returns a small design whose network can be solved by hand: a 24.5 V source
// of 0.02 Ω (-G1) feeds 12 Ω (-E11, Porch) through 0.24 Ω of wire each way, so that
// 24.5 ÷ 12.5 = 1.96 A flow.
func handmade() *design.Design {
	at := func(line int) describe.Span { return describe.Span{File: "site.yaml", Line: line, Col: 5} }
	box := &circuit.Place{Key: "box", Designation: "+A1", Name: "Main cabinet"}
	part := func(d string, kind circuit.Kind, place *circuit.Place, pins ...string) *circuit.Part {
		p := &circuit.Part{Key: "key" + d, Designation: d, Kind: kind, Place: place, At: at(9)}
		for _, n := range pins {
			p.Pins = append(p.Pins, &circuit.Pin{Part: p, Name: n})
		}
		return p
	}
	g := part("-G1", circuit.Battery, box, "+", "-")
	g.Stage, g.Description = "store", "Battery block"
	g.Values = []circuit.Value{{Name: "capacity", Text: "33 Ah", Num: 33, Unit: "Ah", Show: true}, {Name: "voltage", Text: "24 V", Num: 24, Unit: "V"}}
	g.Pinned = []string{"capacity"}
	f1 := part("-F101", circuit.Fuse, box, "1", "2")
	f1.Description, f1.Stage = "Blade fuse, <medium> & \"quoted\", with comma", "board"
	e1 := part("-E11", circuit.LuminaireLamp, nil, "+", "-")
	e1.Circuit, e1.Description = "Porch", "Luminaire"
	e2 := part("-E12", circuit.LuminaireLamp, nil, "+", "-")
	e2.Circuit, e2.Description = "Porch", "Luminaire"
	tm := part("-X1:2", circuit.Terminal, box, "in", "out")
	tm.Description, tm.Strip = "Terminal", "cabinet"

	cable := &circuit.Cable{Key: "leg", Designation: "-W11", Size: quantity.WireSize{Area: 1.5}, Length: 18, From: box, Circuit: "Porch", Pinned: true}
	plus := &circuit.Conductor{
		Key: "leg/plus", Number: "11+", Cable: cable, Circuit: "Porch", From: f1.Pin("1"), To: e1.Pin("+"), Positive: true,
		Size: quantity.WireSize{Area: 1.5}, Colour: "RD", Length: 18, Ohm: 0.24,
	}
	minus := &circuit.Conductor{
		Key: "leg/minus", Number: "11−", Cable: cable, Circuit: "Porch", From: g.Pin("-"), To: e1.Pin("-"),
		Size: quantity.WireSize{Area: 1.5}, Colour: "BK", Length: 18, Ohm: 0.24,
	}
	cable.Cores = []*circuit.Conductor{plus, minus}
	lead := &circuit.Conductor{
		Key: "lead", Number: "1", From: g.Pin("+"), To: f1.Pin("2"), Positive: true,
		Size: quantity.WireSize{Area: quantity.SquareMM(1.308), Gauge: "16"}, Colour: "RD", Length: 0.3, Ohm: 0,
	}

	board := &circuit.Board{Name: "board", Title: "Main board", Number: 1}
	way := &circuit.Way{Board: board, Number: 1, Fuse: f1, Lighting: &circuit.Lighting{Name: "Porch", Lit: "outage"}}
	spare := &circuit.Way{Board: board, Number: 2, Fuse: part("-F102", circuit.Fuse, box, "1", "2")}
	board.Ways = []*circuit.Way{way, spare}

	// Nets: 0 is the battery's minus, 1 its plus, 2 the lamp's plus, 3 its minus.
	nets := []string{"-G1:-", "-G1:+", "-E11:+", "-E11:-"}
	for i, p := range []*circuit.Pin{g.Pin("-"), g.Pin("+"), e1.Pin("+"), e1.Pin("-")} {
		p.Net = i
	}
	element := func(id, key, model string, a, b int, params ...circuit.Param) *circuit.Element {
		return &circuit.Element{ID: id, Part: key, Model: model, Params: params,
			Pins: []circuit.ElementPin{{Name: "1", Net: a}, {Name: "2", Net: b}}}
	}
	ohm := func(v float64) circuit.Param { return circuit.Param{Name: "ohm", Value: v, Tol: 0.1} }
	netlist := &circuit.Netlist{Nets: nets, Elements: []*circuit.Element{
		element("-G1", g.Key, "battery", 1, 0, circuit.Param{Name: "volt", Value: 24.5}, ohm(0.02)),
		element("11+", "leg/plus", "conductor", 1, 2, ohm(0.24)),
		element("-E11", e1.Key, "resistor", 2, 3, ohm(12)),
		element("11−", "leg/minus", "conductor", 3, 0, ohm(0.24)),
	}}
	var values []facts.ElementValues
	for _, e := range netlist.Elements {
		values = append(values, facts.ElementValues{Element: e.ID, Params: e.Params})
	}
	const amps = 24.5 / 12.5
	volts := []quantity.Volt{0, 24.5 - 0.02*amps, 24.5 - 0.26*amps, 0.24 * amps}

	point := &circuit.TestPoint{Key: "tp", Label: "TP1", Shows: "Battery terminals", Red: g.Pin("+"), Black: tm.Pin("out"), Stage: "store"}
	val := func(s string) describe.At[string] { return describe.At[string]{Val: s} }
	upper := &facts.Fuse{Part: part("-F1", circuit.Fuse, box, "1", "2"), Rating: 20, Style: "blade", Feeds: "battery", Prospective: 900}
	return &design.Design{
		Facts: &facts.Facts{
			Site: &describe.Site{Job: describe.Job{
				Number: val("T-1"), Title: val("Standby lighting"), Client: val("Reed & Heron <Trust>"), Site: val("Mill"), Prepared: val("A. Marlowe"),
				Revision: val("A"), Date: val("2026-12-01"),
			}},
			Circuit: &circuit.Circuit{
				Places: []*circuit.Place{box}, Parts: []*circuit.Part{g, f1, e1, e2, tm}, Conductors: []*circuit.Conductor{lead, plus, minus},
				Cables: []*circuit.Cable{cable}, Boards: []*circuit.Board{board}, TestPoints: []*circuit.TestPoint{point},
			},
			Netlist: netlist, Elements: values,
			Conditions: []*facts.Condition{{
				Key: "outage-night", Number: 1, Charge: facts.Off, Name: "Mains off, dark", Battery: "rested full", BatteryV: volts[1], BatterySoC: 1, BatteryA: -amps,
				Lit: []string{"Porch"}, Settled: true, Volts: volts, State: []facts.State{{Element: "-K1", Position: "released"}}, Residual: 1e-13,
			}},
			Readings:   []*facts.Reading{{Point: point, Bands: []facts.Band{{Low: 24.1, Typical: volts[1], High: 24.8, Root: 0.2}}}},
			Luminaires: []*facts.Luminaire{{Part: e1, Point: &circuit.Point{Place: "door"}, Circuit: "Porch", Type: "lantern", Kind: "resistive", Volts: []quantity.Volt{volts[2] - volts[3]}, Amps: []quantity.Ampere{amps}, Drop: 0.04, Watt: 48}},
			Conductors: []*facts.Conductor{
				{Conductor: lead, Current: amps, Ampacity: 18}, {Conductor: plus, Current: amps, Ampacity: 17.5, Fuse: "-F101"}, {Conductor: minus, Current: amps, Ampacity: 17.5, Fuse: "-F101"},
			},
			Fuses: []*facts.Fuse{
				upper,
				{
					Part: f1, Board: board, Way: way, Rating: 3, Style: "blade, medium", Colour: "violet", Feeds: "Porch", Design: amps, CableAmpacity: 17.5,
					CableSize: quantity.WireSize{Area: 1.5}, Prospective: 300, FarEnd: 45, Opens: true, OpensWithin: 0.1, DiscriminatesTo: 120, Before: upper,
					Breaking: 1000, BreakingVolt: 32, Slowest: []catalogue.GatePoint{{Multiple: 2, Time: 5}, {Multiple: 1.35, Time: catalogue.Never}},
				},
			},
			Battery:   facts.Battery{Part: g, Class: "vrla-agm", Series: 12, Blocks: 2, Parallel: 1, BlockVolt: 12, Capacity: 33, Required: 29.123456789, EndVolt: 21},
			CutOff:    &facts.CutOff{Part: part("-Q1", circuit.CutOff, box), Opens: 21, Recloses: 25.2, Rated: 5},
			Endurance: facts.Endurance{Runs: []*facts.Run{{Name: "warm", Temperature: 30, Aged: true, Curve: []facts.Sample{{Hours: 9}}}, {Name: "cold", Temperature: 5, Aged: true, Curve: []facts.Sample{{Hours: 0.5, Volt: 24, SoC: 0.9, Current: -2}}}}, Lit: []facts.LitFor{{Circuit: "Porch", For: 5400}}, Held: 5400, Week: &facts.Run{Curve: []facts.Sample{{Hours: 168}}}, Days: []facts.Day{{Started: 1, Lowest: 0.4, Held: true}}},
			Function:  []*facts.FunctionRow{{Circuit: "Porch", Asked: "outage", Wanted: []bool{true}, Known: []bool{false}, Found: []bool{true}}},
			Thresholds: []*facts.Threshold{
				{Key: "lights-on", Name: "Lights come on", Value: 9.5, Low: 8, High: math.Inf(1), Unit: "lx", Text: "9.5 lx"},
			},
			Faults: []*facts.Fault{{
				Key: "f101-open", Part: "-F101", What: "-F101 open", Sign: "Porch dark", Dark: []facts.Seen{{Circuit: "Porch", Condition: "outage-night"}},
				Moved: []facts.Moved{{Point: "TP1", Condition: "outage-night", Volt: 24.5}}, Group: 1,
			}},
			Workings: []sizing.Working{{For: "-W11", Name: "drop", Formula: "I × R", Substituted: "1.96 A × 0.48 Ω", Value: 0.9408, Unit: "V", Source: "Ohm's law"}},
			Totals:   facts.Totals{Luminaires: 1, Bound: 0.99},
		},
		Findings: []finding.Finding{{Severity: finding.Caution, Check: "lamp-drop-near", Subject: "-E11", At: at(12), Message: "m", Remedy: "r", Value: 4.9, Limit: 5, Unit: "%", Source: "s"}},
	}
}
