// Package nettext reads a netlist written as text, for tests and for the published
// examples.
package nettext

import (
	"fmt"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
)

// Read makes a netlist from lines "ID model net net … name=value …"; nets stand in the
// order of the model's pins, "0" is net 0, "-" leaves an optional pin out. A value may
// carry a tolerance, "ohm=100~0.05". "by=K1" is the Control. pins names the pins of a
// model in order; nil: there is no such model.
func Read(text string, pins func(model string) []string) (*circuit.Netlist, error) {
	nl := &circuit.Netlist{Nets: []string{"0"}}
	index := map[string]int{"0": 0}
	for _, line := range strings.Split(text, "\n") {
		w := strings.Fields(line)
		if len(w) == 0 || strings.HasPrefix(w[0], "#") {
			continue
		}
		if len(w) < 2 || pins(w[1]) == nil {
			return nil, fmt.Errorf("%s: no such model", line)
		}
		names := pins(w[1])
		el := &circuit.Element{ID: w[0], Part: "part " + w[0], Model: w[1]}
		pin := 0
		for _, s := range w[2:] {
			name, value, isParam := strings.Cut(s, "=")
			if isParam {
				if err := param(el, name, value); err != nil {
					return nil, fmt.Errorf("%s: %w", line, err)
				}
				continue
			}
			if pin >= len(names) {
				return nil, fmt.Errorf("%s: too many nets", line)
			}
			if s != "-" {
				k, ok := index[s]
				if !ok {
					k = len(nl.Nets)
					index[s] = k
					nl.Nets = append(nl.Nets, s)
				}
				el.Pins = append(el.Pins, circuit.ElementPin{Name: names[pin], Net: k})
			}
			pin++
		}
		nl.Elements = append(nl.Elements, el)
	}
	return nl, nil
}

// param reads "name=value" or "name=value~tolerance".
func param(el *circuit.Element, name, value string) error {
	if name == "by" {
		el.Control = value
		return nil
	}
	number, tol, _ := strings.Cut(value, "~")
	p := circuit.Param{Name: name}
	var err error
	if p.Value, err = strconv.ParseFloat(number, 64); err != nil {
		return err
	}
	if tol != "" {
		if p.Tol, err = strconv.ParseFloat(tol, 64); err != nil {
			return err
		}
	}
	el.Params = append(el.Params, p)
	return nil
}
