package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestRelayContact(t *testing.T) {
	run(t, relayContact, []limitCase{
		{"on its rating", func(f *facts.Facts) { f.Relays[0].Contact = 8 }, nil},
		{"just over", func(f *facts.Facts) { f.Relays[0].Contact = 8.1 }, []string{
			"stop -K1: -K1, changeover: contact carries 8.1 A, rated 8 A DC | A relay rated 8.1 A DC or more, or circuits for 100 mA on another.",
		}},
		{"a second relay over its own", func(f *facts.Facts) {
			second := *f.Relays[0]
			second.Contact = 9
			f.Relays = append(f.Relays, &second)
		}, []string{
			"stop -K1: -K1, changeover: contact carries 9 A, rated 8 A DC | A relay rated 9 A DC or more, or circuits for 1 A on another.",
		}},
	})
}
