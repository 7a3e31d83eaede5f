package network

import "fmt"

// checkShort refuses a short between pins that the model does not have.
func (d *device) checkShort(o *Override) error {
	if o.Open {
		return nil
	}
	for _, name := range o.Short {
		if d.pin(name) < 0 {
			return fault(d.el, fmt.Sprintf("model %s has no pin %q to short", d.m.Name, name))
		}
	}
	return nil
}

func (d *device) pin(name string) int {
	for k, p := range d.m.Pins {
		if p.Name == name {
			return k
		}
	}
	return -1
}

// broken evaluates an element that is open or shorted.
func (d *device) broken(c *cell, o *Override) {
	own := len(d.m.Pins)
	switch {
	case d.series() && o.Open:
		c.open()
	case d.series():
		c.series(0, ShortOhm)
	case o.Open:
		for b := range d.m.branches {
			c.f[own+b] = -c.v[own+b]
			c.j[own+b][own+b] = -1
		}
	default:
		d.m.evaluate(c)
		a, b := d.pin(o.Short[0]), d.pin(o.Short[1])
		c.flow(a, b, c.across(a, b)/ShortOhm, 1/ShortOhm)
	}
}
