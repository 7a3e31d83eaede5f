package stage

import (
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/sizing"
)

// singles gives the single parts their values and tells which of them cannot be built
// as described.
func (p *Plan) singles() {
	for _, d := range p.Site.Parts {
		k := partKindOf(d.Kind.Val)
		part := p.parts["parts/"+d.Name.Val]
		if k.Name == "contact" {
			part = p.parts["parts/"+partField[string](d, "of")]
			if part != nil && part.Kind != circuit.Relay {
				part = nil
			}
		} else if part == nil && len(k.Ports) == 1 {
			p.block("part "+d.Name.Val, d.Pos, "", &sizing.UnknownError{What: "what the terminal is for", Ask: "put it on a net that a part with two pins is on"})
			continue
		} else if part == nil {
			p.block("part "+d.Name.Val, d.Pos, "", &sizing.UnknownError{What: "a use for a part with both pins on one net", Ask: "put its pins on two nets"})
			continue
		}
		k.Size(p, d, part)
		for _, pin := range d.Pins {
			p.knownNet(pin.Net)
		}
	}
	for _, t := range p.Site.TestPoints {
		p.knownNet(t.At_)
	}
	p.looseEnds()
	for _, st := range p.C.Stages {
		if st.Sketch != nil && st.Sketch.Bottom > lastRow {
			p.block("parts", st.At, "", &sizing.UnknownError{What: "how to draw so many parts in series", Ask: "join some of them into one, such as two resistors"})
		}
	}
}

// knownNet refuses stage.port where the stage gives nothing there.
func (p *Plan) knownNet(net describe.At[string]) {
	name, port, dotted := strings.Cut(net.Val, ".")
	if !dotted || port == minusNet {
		return
	}
	var have []string
	for _, x := range kindOf(p.stageOf(name).Kind.Val).Ports {
		if x.Signal && (x.Sink || kindOf(p.stageOf(name).Kind.Val).Class == BoardClass) {
			continue
		}
		if x.Name == port {
			return
		}
		have = append(have, name+"."+x.Name)
	}
	have = append(have, minusNet)
	p.block("net "+net.Val, net.Pos, "", &sizing.UnknownError{What: "the net " + net.Val, Ask: "name one of " + strings.Join(have, ", ") + ", or a net of your own"})
}

// looseEnds refuses nets of the user's own that have one pin only.
func (p *Plan) looseEnds() {
	count := map[string]int{}
	for _, d := range p.Site.Parts {
		for _, pin := range d.Pins {
			count[pin.Net.Val]++
		}
	}
	for _, d := range p.Site.Parts {
		for _, pin := range d.Pins {
			if n := pin.Net; count[n.Val] == 1 && n.Val != minusNet && !strings.Contains(n.Val, ".") {
				p.block("part "+d.Name.Val, n.Pos, "", &sizing.UnknownError{What: "what else is on the net " + n.Val, Ask: "put another pin on it, or correct its name"})
			}
		}
	}
	for _, t := range p.Site.TestPoints {
		if n := t.At_; count[n.Val] == 0 && n.Val != minusNet && !strings.Contains(n.Val, ".") {
			p.block("test point "+t.Name.Val, n.Pos, "", &sizing.UnknownError{What: "the net " + n.Val, Ask: "name a net that a part is on, or stage.port"})
		}
	}
}
