package catalogue

import "testing"

// TestGatesAreSound: every class's gates fall with the current, and the fastest
// limit is below the slowest wherever both exist.
func TestGatesAreSound(t *testing.T) {
	for _, c := range FuseClasses() {
		if len(c.Colours) > 0 && len(c.Colours) != len(c.Ratings) {
			t.Errorf("%s: %d colours for %d ratings", c.Name, len(c.Colours), len(c.Ratings))
		}
		for i, r := range c.Ratings {
			if i > 0 && r <= c.Ratings[i-1] {
				t.Errorf("%s: %v out of order", c.Name, r)
			}
			g, evi := c.Gates(r)
			if !g.Known() {
				if c != FuseStrip {
					t.Errorf("%s %v: no gates", c.Name, r)
				}
				continue
			}
			if evi.Source == "" {
				t.Errorf("%s %v: gates without a source", c.Name, r)
			}
			for _, list := range [][]GatePoint{g.Fastest, g.Slowest} {
				for k := 1; k < len(list); k++ {
					if list[k].Multiple <= list[k-1].Multiple || list[k].Time >= list[k-1].Time {
						t.Errorf("%s %v: gate %v after %v", c.Name, r, list[k], list[k-1])
					}
				}
			}
			for _, f := range g.Fastest {
				for _, s := range g.Slowest {
					if f.Multiple >= s.Multiple && f.Time >= s.Time && s.Time > 0 && f.Multiple == s.Multiple {
						t.Errorf("%s %v: fastest %v not below slowest %v", c.Name, r, f, s)
					}
				}
			}
			if q := float64(c.Conventional); q != g.Slowest[0].Multiple {
				t.Errorf("%s: conventional current %v, first slowest gate %v", c.Name, q, g.Slowest[0].Multiple)
			}
		}
	}
}

// TestBladeTable holds figures of ISO 8820-3 that users know by heart: colours (read)
// and the 5 s at twice the rating (from memory).
func TestBladeTable(t *testing.T) {
	for rating, want := range map[float64]string{2: "grey", 3: "violet", 5: "light brown", 7.5: "brown", 10: "red", 15: "light blue", 20: "yellow", 25: "clear", 30: "light green"} {
		for i, r := range FuseBlade.Ratings {
			if float64(r) == rating && FuseBlade.Colours[i] != want {
				t.Errorf("%v is %s, want %s", r, FuseBlade.Colours[i], want)
			}
		}
	}
	g, _ := FuseBlade.Gates(10)
	if g.Slowest[2].Multiple != 2 || g.Slowest[2].Time != 5 {
		t.Errorf("at twice the rating: %v", g.Slowest[2])
	}
	if FuseBlade.Colour(10) != "red" || FuseKnife.Colour(63) != "" {
		t.Error("colour lookup")
	}
}

// TestCartridgeBreaking: 35 A or ten times the rating, as a datasheet prints for 4,
// 5 and 6.3 A (read: 40, 50, 63 A).
func TestCartridgeBreaking(t *testing.T) {
	for _, c := range []struct{ rating, want float64 }{{1, 35}, {3.15, 35}, {4, 40}, {5, 50}, {6.3, 63}} {
		for _, r := range FuseCartridgeT.Ratings {
			if float64(r) == c.rating && float64(FuseCartridgeT.BreakingCapacity(r)) != c.want {
				t.Errorf("%v breaks %v, want %v A", r, FuseCartridgeT.BreakingCapacity(r), c.want)
			}
		}
	}
}
