package design

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
)

// collapse looks at lamps that have voltage but less than they work from: if their
// line cannot carry their power at all, it records how much it can.
func (m *maker) collapse() error {
	for i, c := range m.f.Conditions {
		sol := m.solved[c.Key]
		if len(sol.Starved) == 0 {
			continue
		}
		margin, err := m.net.LoadMargin(m.envs[i], sol.State)
		if err != nil {
			return fmt.Errorf("how much the lines carry in condition %q: %w", c.Name, err)
		}
		if margin.Unlimited || margin.Factor >= 1 || m.f.Collapse != nil && m.f.Collapse.Share <= margin.Factor {
			continue
		}
		for _, l := range m.f.Luminaires {
			for _, id := range margin.Loads {
				if l.Part.Designation == id {
					m.f.Collapse = &facts.Collapse{Circuit: l.Circuit, Condition: strings.ToLower(c.Name), Share: margin.Factor, At: l.Part.At}
				}
			}
		}
	}
	return nil
}
