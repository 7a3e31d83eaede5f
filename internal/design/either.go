package design

import (
	"maps"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
)

// otherState is another way in which a condition may stand, with all readings there.
type otherState struct {
	facts.Either
	bands []network.Band
}

// others finds the other states in which a condition may be found. A relay between its
// drop-out and its pick-up voltage stays where it was before, a comparator within its
// hysteresis too; and what moves at a corner of the tolerances may stand either way from
// the start. The cut-off stands where the setting up of the condition puts it, so a state
// with another position of it is none.
func (m *maker) others(n *network.Network, sol *network.Solution, i int, doubtful []string) ([]otherState, error) {
	var out []otherState
	seen := []network.State{sol.State}
	for _, e := range m.f.Netlist.Elements {
		on, moves := sol.State[e.ID]
		if !moves || m.given(m.f.Conditions[i], e.ID) {
			continue
		}
		flipped := maps.Clone(sol.State)
		flipped[e.ID] = !on
		other, err := n.SolveNear(m.envs[i], flipped, sol)
		moved := err == nil && other.State[e.ID] != on
		byTolerance := !moved && slices.Contains(doubtful, e.ID)
		if byTolerance {
			not := !on
			other, err = n.SolveNear(m.envs[i].With(network.Override{Element: e.ID, Stuck: &not}), flipped, sol)
			moved = err == nil
		}
		// Where the other position comes to no rest it is not found either.
		if !moved || slices.ContainsFunc(seen, func(s network.State) bool { return maps.Equal(s, other.State) }) {
			continue
		}
		if q := m.f.CutOff; q != nil && other.State[q.Part.Designation] != sol.State[q.Part.Designation] {
			continue
		}
		seen = append(seen, other.State)
		bands, _, err := m.pointBands(other)
		if err != nil {
			return nil, err
		}
		o := otherState{bands: bands, Either: facts.Either{Parts: m.elsewhere(n, sol.State, other.State), Tolerance: byTolerance}}
		lit := m.litIn(other)
		for _, s := range m.site.Circuits {
			if lit[s.Name.Val] {
				o.Lit = append(o.Lit, s.Name.Val)
			}
		}
		out = append(out, o)
	}
	return out, nil
}

// given reports whether an element's position is given in a condition: the cut-off's by
// the setting up, that of what never comes to rest by the design.
func (m *maker) given(c *facts.Condition, element string) bool {
	p := m.partOf(element)
	return p == nil || p.Kind == circuit.CutOff || slices.Contains(c.Restless, element)
}

// elsewhere lists the parts that stand elsewhere in b than in a, and where: the relays,
// which a technician sees, or without any what moves beside them.
func (m *maker) elsewhere(n *network.Network, a, b network.State) []facts.State {
	var relays, rest []facts.State
	for _, e := range m.f.Netlist.Elements {
		if a[e.ID] == b[e.ID] {
			continue
		}
		p := m.partOf(e.ID)
		if p.Kind == circuit.Relay {
			relays = append(relays, facts.State{Element: p.Designation, Position: relayWord(b[e.ID])})
			continue
		}
		on, off := n.Positions(e.ID)
		if !b[e.ID] {
			on = off
		}
		rest = append(rest, facts.State{Element: p.Designation, Position: on})
	}
	if len(relays) > 0 {
		return relays
	}
	return rest
}

// relayWord is where a relay stands, as a person sees it.
func relayWord(pickedUp bool) string {
	if pickedUp {
		return "held in"
	}
	return "let go"
}

// withOthers returns the band of one test point in a condition with what it shows in the
// other states: a band that meets it widens it, for no reading tells the two apart; one
// that lies elsewhere stands beside it.
func withOthers(b facts.Band, others []otherState, point int) (facts.Band, []facts.Or) {
	var out []facts.Or
	for _, o := range others {
		x := band(o.bands[point])
		if x.Low > b.High+alikeVolt || x.High < b.Low-alikeVolt {
			out = append(out, facts.Or{Band: x, With: stateWords(o.Parts)})
			continue
		}
		b.Low, b.High = min(b.Low, x.Low), max(b.High, x.High)
	}
	return b, out
}

// stateWords are positions in one phrase: "-K1 let go and -K2 held in".
func stateWords(parts []facts.State) string {
	var out []string
	for _, s := range parts {
		out = append(out, s.Element+" "+s.Position)
	}
	return strings.Join(out, " and ")
}
