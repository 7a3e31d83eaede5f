package sitegen

import "fmt"

// stages returns the entries of the section stages.
func (w *writer) stages() []string {
	mains := "230 V ± 10 %"
	if w.Gauges {
		mains = "120 V ± 10 %"
	}
	var out []string
	add := func(format string, args ...any) { out = append(out, fmt.Sprintf(format, args...)) }
	if w.Discrete {
		add("raw: {kind: transformer-supply, rated: %.0f V 1.5 A, open: %.0f V, mains: %s}", 1.5*float64(w.Volts), 1.8*float64(w.Volts), mains)
		add("charger: {kind: linear-charger, from: raw, to: store}")
	} else {
		add("charger: {kind: charger, to: store, mains: %s}", mains)
	}
	add("store: {kind: battery, cells: %s, along: %s}", w.Cells, w.length(2))
	guarded := "store"
	if w.Extras {
		add("switch: {kind: isolator, from: store}")
		add("amps: {kind: meter, from: switch, reads: amps}")
		guarded = "amps"
	}
	add("guard: {kind: low-voltage-disconnect, from: %s}", guarded)
	if w.Extras {
		add("volts: {kind: meter, from: guard}")
		add("lamp: {kind: indicator, from: store}")
		add("surge: {kind: suppressor, from: guard}")
	}
	if w.Control != Direct {
		if w.Discrete {
			add("presence: {kind: shunt-regulator, from: raw, volts: %d V}", w.Volts)
		} else {
			add("presence: {kind: regulated-supply, mains: %s}", mains)
		}
		coil := "presence"
		if w.Extras {
			add("try: {kind: test-switch, from: presence}")
			coil = "try"
		}
		add("transfer: {kind: changeover-relay, coil: %s, from: guard}", coil)
	}
	switch w.Control {
	case Module, Comparator, Follower:
		add("dusk: {kind: photocell, built: %s, from: guard, holds: transfer, dark_below: %d lx}", w.Control, 5+w.rand.IntN(20))
	}
	for k, b := range w.boards {
		along := ""
		if k > 0 {
			along = ", along: " + w.length(w.leg+1)
		}
		add("%s: {kind: distribution-board, title: %s, from: %s%s, ways: %d}", b.name, w.title(fmt.Sprintf("Board %d", k+1)), b.from, along, b.ways+w.rand.IntN(4))
	}
	return out
}

// luminaires returns the entries of the section luminaires and notes their types.
func (w *writer) luminaires() []string {
	v, watt := float64(w.Volts), max(w.watt, 0.1)
	works := fmt.Sprintf("%.1f V..%.1f V", 0.75*v, 1.34*v)
	var out []string
	add := func(name, format string, args ...any) {
		w.types = append(w.types, name)
		out = append(out, name+": "+fmt.Sprintf(format, args...))
	}
	switch w.Lamps {
	case Old:
		add(w.word("bulb", 1), "{kind: filament, rated: %.0f V, power: %.2f W}", v, watt)
		add(w.word("tube", 1), "{kind: ballast, power: %.2f W, works: %s}", watt, works)
		add(w.word("mat", 1), "{kind: resistive, rated: %.0f V, power: %.2f W}", v, watt)
	case Drivers:
		add(w.word("spot", 1), "{kind: led-driver, power: %.2f W, works: %s, flux: 300 lm}", watt, works)
	default:
		series := max(1, int(0.62*v/3.1))
		strings := max(1, int(watt/v/0.02))
		add(w.word("spot", 1), "{kind: led-driver, power: %.2f W, works: %s, flux: 300 lm}", watt, works)
		add(w.word("line", 1), "{kind: led-string, forward: 3.1 V, series: %d, strings: %d, current: %.2f mA, flux: 90 lm}", series, strings, min(20, 1000*watt/v))
	}
	return out
}

// circuits writes the section circuits.
func (w *writer) circuits() {
	w.line("circuits:")
	lit := map[Control]string{Module: "outage-night", Comparator: "outage-night", Follower: "outage-night", MainsOnly: "outage", Direct: "always"}[w.Control]
	lamp := 0
	next := func(metres float64) string {
		lamp++
		place := ""
		if lamp%3 == 0 {
			place = fmt.Sprintf(" at place %d", lamp)
		}
		return w.length(metres*(0.5+w.rand.Float64())) + " " + w.types[lamp%len(w.types)] + place
	}
	for i, c := range w.planned {
		name := fmt.Sprintf("Circuit %d", i+1)
		if w.Long {
			name += " of the farther rooms"
		}
		points := w.points(c.lamps, 0, next)
		if w.Backwards {
			w.line("  - points: %s\n    lit: %s\n    board: %s\n    name: %s", points, lit, c.board, name)
		} else {
			w.line("  - {name: %s, board: %s, lit: %s, points: %s}", name, c.board, lit, points)
		}
	}
}

// deepest is how many branches hang inside each other at most.
const deepest = 9

// points writes a run of n luminaires with its branches.
func (w *writer) points(n, depth int, next func(float64) string) string {
	s := "["
	for i := 0; n > 0; i++ {
		if i > 0 {
			s += ", "
		}
		s += next(w.leg)
		n--
		side := 0
		switch {
		case n > 0 && w.Shape == Comb:
			side = 1
		case n > 1 && w.Shape == Deep && depth < deepest:
			side = 1 + w.rand.IntN(n-1)
		}
		if side > 0 && depth < deepest {
			inner := "[" + next(w.leg) + "]"
			if w.Shape == Deep {
				inner = w.points(side, depth+1, next)
			}
			s += ", {branch: " + inner + "}"
			n -= side
		}
	}
	return s + "]"
}

// singles writes the section parts: a spur of the battery with one single part of each
// kind at least.
func (w *writer) singles() {
	if !w.Singles {
		return
	}
	w.line("parts:")
	for _, p := range []string{
		"{name: spur-fuse, kind: fuse, rating: 1 A, pins: {1: store.plus, 2: spur}}",
		"{name: spur-switch, kind: switch, pins: {1: spur, 2: on}}",
		"{name: eye-resistor, kind: resistor, value: 10 kΩ, power: 0.5 W, pins: {1: on, 2: eye}}",
		"{name: eye-led, kind: led, pins: {A: eye, K: minus}}",
		fmt.Sprintf("{name: pilot, kind: lamp, rated: %d V, power: 1 W, pins: {1: on, 2: minus}}", w.Volts),
		fmt.Sprintf("{name: helper-coil, kind: relay, rated: %d V, pins: {A1: on, A2: minus}}", w.Volts),
		"{name: helper-contact, kind: contact, of: helper-coil, pins: {1: on, 2: out}}",
		"{name: way-out, kind: diode, pins: {A: out, K: mid}}",
		"{name: way-on, kind: schottky, pins: {A: mid, K: load}}",
		"{name: load-resistor, kind: resistor, value: 4.7 kΩ, power: 1 W, pins: {1: load, 2: ref}}",
		fmt.Sprintf("{name: ref-zener, kind: zener, volts: %d V, pins: {A: minus, K: ref}}", w.Volts/2),
		"{name: load-capacitor, kind: capacitor, value: 100 nF, pins: {1: load, 2: minus}}",
		"{name: load-terminal, kind: terminal, pins: {1: load}}",
	} {
		w.line("  - %s", p)
	}
}
