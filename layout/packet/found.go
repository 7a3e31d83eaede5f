package packet

import (
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
)

// What was found of a part; nil of a part of another kind.

func (b *book) fuseOf(p *circuit.Part) *facts.Fuse {
	return first(b.d.Fuses, func(x *facts.Fuse) bool { return x.Part == p })
}

func (b *book) lamp(p *circuit.Part) *facts.Luminaire {
	return first(b.d.Luminaires, func(x *facts.Luminaire) bool { return x.Part == p })
}

func (b *book) relayOf(p *circuit.Part) *facts.Relay {
	return first(b.d.Relays, func(x *facts.Relay) bool { return x.Part == p })
}

func (b *book) supplyOf(p *circuit.Part) *facts.Supply {
	return first(b.d.Supplies, func(x *facts.Supply) bool { return x.Part == p })
}

// first returns the first of a list that is meant; nil if none is.
func first[T any](list []*T, meant func(*T) bool) *T {
	if i := slices.IndexFunc(list, meant); i >= 0 {
		return list[i]
	}
	return nil
}
