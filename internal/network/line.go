package network

// line is the law of an electromotive force and a resistance in series, v = emf + ohm·i,
// or of an open contact, i = 0. Conductors, fuses, contacts and resistors, by far the
// most elements of a circuit, follow one: its slopes never change, so they are put into
// the matrix once for all steps of Newton's method.
type line struct {
	emf, ohm float64
	open     bool
}

// off is by how much voltage and current miss the line. From 1 Ω up it is written as a
// current.
func (l *line) off(v, i float64) float64 {
	switch {
	case l.open:
		return -i
	case l.ohm < 1:
		return v - l.emf - l.ohm*i
	}
	return (v-l.emf)/l.ohm - i
}

// slopes are those of off to the voltages of the two pins and to the current.
func (l *line) slopes() (red, black, current float64) {
	switch {
	case l.open:
		return 0, 0, -1
	case l.ohm < 1:
		return 1, -1, -l.ohm
	}
	return 1 / l.ohm, -1 / l.ohm, -1
}

// rule is the line that a device follows in a run, if it follows one.
type rule struct {
	line
	follows bool
}

// rule finds the lines that devices follow as they are now, and puts what never changes
// while they do into base, the matrix without the bent laws.
func (r *run) rule() {
	n, c := r.n, &r.cell
	if r.rules == nil {
		r.rules = make([]rule, len(n.devices))
	}
	clear(n.base)
	for _, p := range n.self {
		n.base[p] = insulation + r.shunt
	}
	for i, d := range n.devices {
		if d.m.straight == nil {
			continue
		}
		u := &r.rules[i]
		if u.follows = r.faults[i] == nil; !u.follows {
			continue
		}
		c.at, c.on, c.p = r.at, r.position(d), r.driven(i, d)
		u.line = d.m.straight(c)
		red, black, current := u.slopes()
		// Pins 0 and 1, and 2 the current, with d.places in rows of three.
		for k, v := range [9]float64{2: 1, 5: -1, 6: red, 7: black, 8: current} {
			if p := d.places[k]; p >= 0 {
				n.base[p] += v
			}
		}
	}
}

// plain reports whether parameter k of device i is the resistance of the line that it
// follows.
func (r *run) plain(i, k int) bool {
	return k == 0 && r.rules[i].follows && !r.rules[i].open && r.rules[i].emf == 0 && r.rules[i].ohm == r.p[i][0]
}

// through is the voltage between pins 0 and 1 of a device and its current.
func (r *run) through(d *device) (v, current float64) {
	if u := d.at[0]; u >= 0 {
		v = r.x[u]
	}
	if u := d.at[1]; u >= 0 {
		v -= r.x[u]
	}
	return v, r.x[d.at[2]]
}
