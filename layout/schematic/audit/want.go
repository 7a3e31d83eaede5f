package audit

import "gloamwright/internal/circuit"

// FromCircuit is what the sheets of a circuit must show: every pin but those of
// bars, which are lines, and of contacts that nothing is connected to.
func FromCircuit(c *circuit.Circuit) *Want {
	w := &Want{Pins: map[string]int{}, Probes: map[string]int{}}
	pieces := c.Pieces()
	size := map[int]int{}
	for _, p := range pieces {
		size[p]++
	}
	for _, p := range c.Parts {
		if p.Kind == circuit.BusBar {
			continue
		}
		for _, n := range p.Pins {
			if p.Kind == circuit.Relay && size[pieces[n]] == 1 {
				continue
			}
			w.Pins[PinName(n)] = pieces[n]
		}
	}
	for _, t := range c.TestPoints {
		w.Probes[t.Label] = pieces[t.Red]
	}
	if c.Black != nil {
		w.Probes["TP0"] = pieces[c.Black]
	}
	return w
}

// PinName is how a pin is named in the data of a sheet.
func PinName(n *circuit.Pin) string {
	if n.Part.Kind == circuit.MainsConnection {
		return n.Part.Key + ":" + n.Name
	}
	return n.Part.Designation + ":" + n.Name
}
