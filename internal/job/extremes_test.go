package job

import (
	"errors"
	"path/filepath"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

// TestExtremes gives every quantity of every stage and luminaire of the examples, and
// every figure of the duty, values at the ends of its range and a few ordinary ones.
// Each either is designed, with findings where it is wrong, or is a mistake that names
// its line: never a message of the solver's own. Every few of them are drawn, too.
// drawnOf says that one in so many designs is drawn: drawing them all takes minutes.
const drawnOf = 12

func TestExtremes(t *testing.T) {
	done := map[string]bool{} // by kind, key and value: once is enough
	for _, example := range []string{"corrie-bothy", "juniper-flat", "bracken-reach"} {
		path := filepath.Join("..", "..", "examples", example+".yaml")
		d, err := Load(path, nil)
		if err != nil {
			t.Fatal(err)
		}
		tried := 0
		try := func(key, value string) {
			d, err := Load(path, []string{key + "=" + value})
			tried++
			if err == nil && tried%drawnOf == 0 {
				_, err = Documents(d)
			}
			var m *Mistakes
			var b *BadSet
			if err != nil && !errors.As(err, &m) && !errors.As(err, &b) {
				t.Errorf("%s: %s=%s: %v", example, key, value, err)
			}
		}
		all := func(kind, prefix string, fields []describe.Field) {
			for _, f := range fields {
				for _, v := range append([]string{f.Min, f.Max}, f.Choices...) {
					if at := kind + " " + f.Name + " " + v; v != "" && !done[at] {
						done[at] = true
						try(prefix+"."+f.Name, v)
					}
				}
			}
		}
		for _, s := range d.Site.Stages {
			for _, k := range stage.Kinds() {
				if k.Name == s.Kind.Val {
					all(k.Name, "stages."+s.Name.Val, k.Fields)
				}
			}
		}
		for _, l := range d.Site.Luminaires {
			for _, k := range stage.LuminaireKinds() {
				if k.Name == l.Kind.Val {
					all(k.Name, "luminaires."+l.Name.Val, k.Fields)
				}
			}
		}
		for _, x := range [][2]string{{"duty.nominal", "6 V"}, {"duty.nominal", "12 V"}, {"duty.nominal", "24 V"}, {"duty.nominal", "36 V"}, {"duty.nominal", "48 V"}, {"duty.outage", "1 min"}, {"duty.outage", "30 d"}, {"duty.recharge", "1 h"}, {"duty.battery_room", "-40 °C..60 °C"}, {"duty.cable_ambient", "60 °C"}} {
			try(x[0], x[1])
		}
	}
}
