package packet

import (
	"regexp"
	"strings"
	"testing"
)

// A job in gauges prints no length in metres anywhere; its longest leg, 30 ft in the
// description, stands on the schematic and in the cable list.
func TestLengthsInFeet(t *testing.T) {
	p := built(t, example(t, "juniper-flat"))
	metres := regexp.MustCompile(`([0-9]|Length|Total|Taken|Planned) m([^³²[:alpha:]]|$)`)
	feet := 0
	for i, r := range p.recorders {
		for _, w := range writtenOn(r) {
			text := strings.ReplaceAll(w.Text, noBreak, " ")
			if metres.MatchString(text) {
				t.Errorf("sheet %d prints %q", i+1, text)
			}
			if strings.Contains(text, "30 ft") {
				feet++
			}
		}
	}
	if feet == 0 {
		t.Error("no text prints 30 ft")
	}
	if cables := textOf(p, keyCables); !strings.Contains(cables, "Planned ft") || !strings.Contains(cables, "30.0") {
		t.Error("the cable list is not in feet")
	}
}
