package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestRelayContact(t *testing.T) {
	run(t, relayContact, []limitCase{
		{"on its rating", func(f *facts.Facts) { f.Relay.Contact = 8 }, nil},
		{"just over", func(f *facts.Facts) { f.Relay.Contact = 8.1 }, []string{
			"stop -K1: -K1, changeover: contact carries 8.1 A, rated 8 A DC | A relay rated 8.1 A DC or more, or circuits for 100 mA on another.",
		}},
	})
}
