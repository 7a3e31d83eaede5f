package schematic

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// typicalAt is what a pointer resting on a pin or a wire tells of its voltage: the
// solved value against L− in an outage at night, or in the first condition that tables
// print. It is empty where nothing was solved.
func (b *book) typicalAt(n *circuit.Pin) string {
	if n == nil {
		return ""
	}
	chosen := -1
	for i, c := range b.d.Conditions {
		if n.Net < 0 || n.Net >= len(c.Volts) {
			continue
		}
		if c.Key == outageNight {
			chosen = i
			break
		}
		if chosen < 0 && c.Shown {
			chosen = i
		}
	}
	if chosen < 0 {
		return ""
	}
	c := b.d.Conditions[chosen]
	return quantity.Fixed(c.Volts[n.Net], 1) + " with " + lower(c.Name)
}

// tellPin adds to a pin's object what a technician asks of it: the wires that end on it,
// its net and the voltage to expect.
func (b *book) tellPin(o *object, n *circuit.Pin) {
	if n == nil {
		return
	}
	if wires := b.wiresAt[n]; len(wires) > 0 {
		word := ", wire "
		if len(wires) > 1 {
			word = ", wires "
		}
		o.Title += word + strings.Join(wires, ", ")
		o.Data = append(o.Data, ink.Attr{Name: "conductor", Value: strings.Join(wires, " ")})
	}
	if b.d.Netlist != nil && n.Net >= 0 && n.Net < len(b.d.Netlist.Nets) {
		o.Data = append(o.Data, ink.Attr{Name: "net", Value: b.d.Netlist.Nets[n.Net]})
	}
	if v := b.typicalAt(n); v != "" {
		o.Title += ", " + v
	}
}

func lower(s string) string {
	r, n := utf8.DecodeRuneInString(s)
	return string(unicode.ToLower(r)) + s[n:]
}
