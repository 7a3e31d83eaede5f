package schematic

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// mainPart is the part that a stage is there for.
func mainPart(st *circuit.Stage) *circuit.Part {
	for _, kinds := range [][]circuit.Kind{
		{circuit.Battery, circuit.ChargerUnit, circuit.Supply, circuit.Relay, circuit.CutOff, circuit.PhotoSwitch, circuit.Transformer},
		{circuit.Comparator, circuit.Regulator, circuit.Shunt, circuit.SwitchIsolator, circuit.PushButton, circuit.SignalLamp, circuit.Voltmeter},
		{circuit.NPN, circuit.PNP, circuit.Zener, circuit.Suppressor},
	} {
		for _, p := range st.Parts {
			if slices.Contains(kinds, p.Kind) {
				return p
			}
		}
	}
	for _, p := range st.Parts {
		if p.Kind != circuit.Terminal && p.Kind != circuit.MainsConnection {
			return p
		}
	}
	return nil
}

// blockLines are the three lines of a stage's block: its main part with ratings,
// then what was found for it, then what it does.
func (b *book) blockLines(x *stageBox) []string {
	var out []string
	p := mainPart(x.st)
	if p != nil {
		out = append(out, p.Designation)
		for _, v := range p.Values {
			switch n := len(out) - 1; {
			case !v.Show || v.Text == "":
			case width(out[n]+" "+v.Text, valueStyle) <= blockWidth-1.6:
				out[n] += " " + v.Text
			default:
				out = append(out, v.Text)
			}
		}
	}
	add := func(s string) { out = append(out, s) }
	switch x.st.Kind {
	case "battery":
		out = out[:min(len(out), 1)]
		for _, q := range x.st.Parts {
			if q.Kind == circuit.Fuse {
				add(strings.Join(append([]string{q.Designation}, valueLines(q, labelRoom)...), " "))
			}
		}
		if t := b.d.Endurance.Held; t > 0 && b.d.Site != nil {
			add(fmt.Sprintf("%s at %s", quantity.Format(t, 2), b.d.Site.Duty.BatteryRoom.Val.Low))
		}
	case "charger", "linear-charger":
		if t := b.d.Endurance.Recharge; t > 0 {
			out = append(out[:min(len(out), 2)], "full in "+quantity.Format(t, 2))
		}
	case "changeover-relay":
		out = out[:min(len(out), 1)]
		for _, v := range p.Values {
			if v.Name == "contact" {
				out[0] += " " + v.Text
			}
		}
		add("coil live: dark")
		add("coil dead: lit")
	case "photocell":
		out = out[:min(len(out), 1)]
		if v, ok := stageField[quantity.Lux](b, x.st.Name, "dark_below"); ok {
			add("dark below " + v.String())
		}
		if v, ok := stageField[quantity.Lux](b, x.st.Name, "light_above"); ok {
			add("light above " + v.String())
		}
	}
	if x.st.Name == partsStage && b.d.Site != nil {
		out = nil
		for _, c := range []struct {
			n    int
			what string
		}{{len(b.d.Site.Parts), "single part"}, {len(b.d.Site.TestPoints), "test point"}} {
			switch {
			case c.n == 1:
				out = append(out, "1 "+c.what)
			case c.n > 1:
				out = append(out, fmt.Sprintf("%d %ss", c.n, c.what))
			}
		}
	}
	purpose := ink.Wrap(strings.Join(x.st.Sketch.Purpose, " "), valueStyle.font(), (blockWidth-1.6)*module)
	if len(out)+len(purpose) <= 3 {
		out = append(out, purpose...)
	}
	return out
}

// stageField is a field of a stage of the description.
func stageField[T any](b *book, stage, field string) (v T, ok bool) {
	if b.d.Site == nil {
		return v, false
	}
	for _, s := range b.d.Site.Stages {
		if s.Name.Val == stage {
			f, ok := describe.Get[T](s.Fields, field)
			return f.Val, ok
		}
	}
	return v, false
}

// legend explains the lines.
func (b *book) legend(sh *Sheet) {
	const x = float64(colText)
	t := sh.scene.object(classBlock, "lines", "Lines")
	t.add(textAt(x, 8.5, "Lines", nameStyle, ink.Start))
	for i, s := range []string{"energy", "control, its supply", "place of its own"} {
		y := 10.6 + 2.4*float64(i)
		switch i {
		case 0:
			t.add(segment(railPen, x, y, x+5.6, y), &head{tip: point{x + 7, y}, dx: 1, len: 1.4, wid: 1})
		case 1:
			t.add(segment(normalPen, x, y, x+5.8, y), &head{tip: point{x + 7, y}, dx: 1, len: 1.2, wid: 0.8})
		default:
			t.add(boundarySide(x, y, x+7, y))
		}
		t.add(textAt(x+8, y+0.4, s, valueStyle, ink.Start))
	}
}
