package network

import "slices"

// Margin says how far a circuit is from the collapse of its voltage.
type Margin struct {
	// Factor is the largest factor of all constant-power loads for which each of
	// them still gets its power; below 1 the circuit cannot carry its loads as they
	// are, and 1 − Factor is the share that is too much.
	Factor float64
	// Loads are those that lose their power first when the factor is exceeded.
	Loads []string
	Parts []string
	// Unlimited is set when even marginTop times the loads get their power.
	Unlimited bool
}

// Search of the load factor.
const (
	marginTop   = 64.0
	marginLeast = 1e-3
	marginFine  = 1e-5 // relative
)

// LoadMargin finds the largest factor of all constant-power loads for which an
// operating point exists in which each of them is in its working range. Positions
// are those that the circuit has in this condition with its loads next to nothing;
// they are held. Without constant-power loads that have voltage it is unlimited.
//
// A constant-power load beyond that factor has no operating point at its power: its
// voltage collapses until the load itself gives up (T. Van Cutsem, C. Vournas,
// "Voltage Stability of Electric Power Systems", 1998, chapter 2: at most E²/4R can
// be taken from an electromotive force E behind a resistance R).
func (n *Network) LoadMargin(at Environment, from State) (Margin, error) {
	base := at.loadFactor()
	at.LoadFactor = base * marginLeast
	r, err := n.start(&at, from)
	if err != nil {
		return Margin{}, err
	}
	idle, err := r.settle(false, nil)
	if err != nil {
		return Margin{}, err
	}
	if len(idle.Starved) > 0 {
		return n.margin(0, idle.Starved), nil
	}
	r.hold()
	good := slices.Clone(r.x)
	var lost []string
	carries := func(factor float64) (bool, error) {
		at.LoadFactor = base * factor
		copy(r.x, good)
		if err := r.converge(true); err != nil {
			return false, err
		}
		s, err := r.finish()
		if err != nil {
			return false, err
		}
		if len(s.Starved) > 0 {
			lost = s.Starved
			return false, nil
		}
		copy(good, r.x)
		return true, nil
	}
	low, high := marginLeast, 1.0
	for {
		ok, err := carries(high)
		if err != nil {
			return Margin{}, err
		}
		if !ok {
			break
		}
		low = high
		if high >= marginTop {
			return Margin{Factor: high, Unlimited: true}, nil
		}
		high *= 2
	}
	for high-low > marginFine*high {
		mid := (low + high) / 2
		ok, err := carries(mid)
		if err != nil {
			return Margin{}, err
		}
		if ok {
			low = mid
		} else {
			high = mid
		}
	}
	return n.margin(low, lost), nil
}

func (n *Network) margin(factor float64, loads []string) Margin {
	m := Margin{Factor: factor, Loads: loads}
	for _, id := range loads {
		if p := n.devices[n.byID[id]].el.Part; !slices.Contains(m.Parts, p) {
			m.Parts = append(m.Parts, p)
		}
	}
	return m
}
