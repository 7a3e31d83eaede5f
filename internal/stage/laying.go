package stage

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/sizing"
)

// laying sets how cables are laid. Where the ampacity tables end before the ambient
// temperature or the grouping that the description states, no size is known to fit: that
// is reported once, and the last step of the table stands in, so that everything else can
// still be sized and shown.
func (p *Plan) laying() {
	p.ambient, p.grouping = p.Site.Duty.CableAmbient.Val, p.Site.Practice.Grouping.Val
	t := catalogue.AmpacityOf(p.System)
	if _, err := t.AmbientFactor(p.ambient); err != nil {
		last := t.Ambient[len(t.Ambient)-1].UpTo
		p.block("Cables", p.Site.Duty.CableAmbient.Pos, "", &sizing.UnknownError{
			What: fmt.Sprintf("the ampacity at %s", p.ambient), Source: err.Error(), Ask: fmt.Sprintf("A way for the cables that is not hotter than %s.", last),
		})
		p.ambient = last
	}
	if _, err := t.GroupFactor(p.grouping); err != nil {
		last := t.Group[len(t.Group)-1].UpTo / t.GroupOf
		p.block("Cables", p.Site.Practice.Grouping.Pos, "", &sizing.UnknownError{
			What: fmt.Sprintf("the ampacity of %d circuits run together", p.grouping), Source: err.Error(), Ask: fmt.Sprintf("At most %d loaded circuits in one bundle.", last),
		})
		p.grouping = last
	}
}
