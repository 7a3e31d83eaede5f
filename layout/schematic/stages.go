package schematic

import (
	"fmt"

	"gloamwright/internal/stage"
)

// planStages breaks the stages into sheets.
func (b *book) planStages() ([]*plan, error) {
	boxes := b.boxes()
	if len(boxes) == 0 {
		return nil, nil
	}
	starts := breakUp(len(boxes), func(i, j int) (float64, bool) {
		p, ok := b.arrange(boxes[i:j], j == i+1)
		if !ok {
			return 0, false
		}
		c := costSheet
		if j < len(boxes) {
			slack := 1 - float64(p.end-colFirst)/float64(colLast-colFirst)
			c += costSlack * slack * slack
			if boxes[j-1].class == boxes[j].class {
				c += costGroup
			}
		}
		for _, r := range p.runs {
			if r.leave {
				c += costCut
			}
		}
		return c, true
	})
	if starts == nil {
		return nil, fmt.Errorf("the stages cannot be laid out on sheets")
	}
	var out []*plan
	for n, i := range starts {
		j := len(boxes)
		if n+1 < len(starts) {
			j = starts[n+1]
		}
		p, _ := b.arrange(boxes[i:j], j == i+1)
		out = append(out, p)
	}
	nameStageSheets(out)
	return out, nil
}

// nameStageSheets gives the sheets their supplementary titles after what stands on
// them; equal titles are counted.
func nameStageSheets(plans []*plan) {
	count := map[string]int{}
	for _, p := range plans {
		p.title = stageTitle(p)
		count[p.title]++
	}
	n := map[string]int{}
	for _, p := range plans {
		if t := p.title; count[t] > 1 {
			n[t]++
			p.title = fmt.Sprintf("%s %d", t, n[t])
		}
	}
}

func stageTitle(p *plan) string {
	supply, control, battery, relay := false, false, false, false
	for _, x := range p.boxes {
		supply = supply || x.class == stage.SupplyClass
		control = control || x.class == stage.ControlClass
		battery = battery || x.st.Kind == "battery"
		relay = relay || x.st.Kind == "changeover-relay"
	}
	switch {
	case supply && control:
		return "Supply and control"
	case supply && battery:
		return "Supply and battery"
	case supply:
		return "Supply"
	case relay:
		return "Changeover and control"
	}
	return "Control"
}

// drawStages draws one sheet of stages between their rails.
func (b *book) drawStages(sh *Sheet, p *plan) error {
	for i, x := range p.boxes {
		b.drawStage(sh, p, x, p.xs[i])
	}
	b.drawRails(sh, p)
	b.drawLinks(sh, p)
	b.nameTerminals(sh)
	b.blackProbe(sh, p)
	b.readingsTable(sh, p)
	b.contactTables(sh, p)
	return b.stageNotes(sh, p)
}
