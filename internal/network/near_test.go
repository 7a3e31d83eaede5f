package network

import (
	"errors"
	"maps"
	"math"
	"testing"
)

// A fault solved from near the sound solution stands where the one solved from nothing
// stands, for every element open in turn; so does the sound circuit itself, apart.
func TestSolveNear(t *testing.T) {
	for _, tc := range []struct {
		name, text string
		at         Environment
	}{
		{"lamps, outage", banded, Environment{}},
		{"lamps, mains", banded, Environment{Mains: 1, Charge: Float}},
		{"photocell, dark", comparatorCell, Environment{Lux: 0.5}},
		{"photocell, light", comparatorCell, Environment{Lux: 500}},
	} {
		t.Run(tc.name, func(t *testing.T) {
			c := compile(t, tc.text)
			sound := c.solve(tc.at, nil)
			same := func(what string, at Environment) {
				t.Helper()
				want, err := c.Solve(at, nil)
				got, err2 := c.Apart().SolveNear(at, nil, sound)
				if err != nil || err2 != nil {
					var chatter *ChatterError
					if !errors.As(err, &chatter) || !errors.As(err2, &chatter) {
						t.Errorf("%s: %v from nothing, %v from near", what, err, err2)
					}
					return
				}
				if !maps.Equal(want.State, got.State) {
					t.Errorf("%s: %v from nothing, %v from near", what, want.State, got.State)
					return
				}
				for k, v := range want.Volts {
					if math.Abs(v-got.Volts[k]) > 1e-6 {
						t.Errorf("%s: net %d at %.9g V from nothing, %.9g V from near", what, k, v, got.Volts[k])
					}
				}
			}
			same("sound", tc.at)
			for _, d := range c.devices {
				same(d.el.ID+" open", tc.at.With(Override{Element: d.el.ID, Open: true}))
			}
		})
	}
}
