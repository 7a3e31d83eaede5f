package stage

import (
	"slices"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
)

// foremost names the relay and the supply that documents speak of where a job has
// several: the relay that a photocell holds, for it tells what dusk does, and the supply
// that is a packaged one. All of them are sized and judged.
func (p *Plan) foremost() {
	held := func(r *facts.Relay) bool {
		return slices.ContainsFunc(p.Site.Stages, func(s *describe.Stage) bool {
			v, ok := describe.Get[describe.Ref](s.Fields, "holds")
			return ok && v.Val.Stage == r.Part.Stage
		})
	}
	if len(p.F.Relays) > 0 {
		p.F.Relay = p.F.Relays[max(0, slices.IndexFunc(p.F.Relays, held))]
	}
	packaged := func(s *facts.Supply) bool {
		return slices.ContainsFunc(p.Site.Stages, func(o *describe.Stage) bool {
			return o.Name.Val == s.Part.Stage && o.Kind.Val == "regulated-supply"
		})
	}
	if len(p.F.Supplies) > 0 {
		p.F.Supply = p.F.Supplies[max(0, slices.IndexFunc(p.F.Supplies, packaged))]
	}
}
