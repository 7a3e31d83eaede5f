package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestRelayPickUp(t *testing.T) {
	run(t, relayPickUp, []limitCase{
		{"exactly enough", func(f *facts.Facts) { f.Relays[0].LowestFeed = 19.6 }, nil},
		{"just too low", func(f *facts.Facts) { f.Relays[0].LowestFeed = 19.5 }, []string{
			"stop -K1: -K1, changeover: coil gets 19.5 V, picks up hot at 19.6 V | A supply that gives 0.1 V more at low mains, or a coil that picks up at 19.5 V.",
		}},
		{"no relay", func(f *facts.Facts) { f.Relays = nil }, nil},
	})
}
