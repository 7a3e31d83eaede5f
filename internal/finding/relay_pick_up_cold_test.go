package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestRelayPickUpCold(t *testing.T) {
	run(t, relayPickUpCold, []limitCase{
		{"exactly enough", func(f *facts.Facts) { f.Relays[0].PickUpCold, f.Relays[0].LowestCold = 18, 18 }, nil},
		{"just too low", func(f *facts.Facts) { f.Relays[0].PickUpCold, f.Relays[0].LowestCold = 18, 17.9 }, []string{
			"stop -K1: -K1, changeover: coil gets 17.9 V from the nearly empty battery, picks up at 18 V | A coil that picks up at 17.9 V, or an end of discharge higher by 0.1 V.",
		}},
		{"not held from the battery", func(f *facts.Facts) { f.Relays[0].LowestCold = 3 }, nil},
	})
}
