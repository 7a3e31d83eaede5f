package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestRelayContactNear(t *testing.T) {
	run(t, relayContactNear, []limitCase{
		{"four fifths", func(f *facts.Facts) { f.Relays[0].Contact = 6.4 }, nil},
		{"just more", func(f *facts.Facts) { f.Relays[0].Contact = 6.5 }, []string{
			"caution -K1: -K1, changeover: contact carries 6.5 A, 81.2 % of its rating, limit 80 % | A relay rated 8.13 A DC or more.",
		}},
		{"on its rating", func(f *facts.Facts) { f.Relays[0].Contact = 8 }, []string{
			"caution -K1: -K1, changeover: contact carries 8 A, 100 % of its rating, limit 80 %",
		}},
		{"over it is another check", func(f *facts.Facts) { f.Relays[0].Contact = 8.1 }, nil},
	})
}
