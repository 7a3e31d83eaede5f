package describe

import (
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
)

// TestExamplesParse: what a message proposes is itself right.
func TestExamplesParse(t *testing.T) {
	for typ, x := range typeExamples {
		if typ == Curve {
			continue // a list, read node by node
		}
		f := Field{Name: "x", Type: typ}
		if _, err := f.parse(x); err != nil {
			t.Errorf("type %d: %q: %v", typ, x, err)
		}
	}
	for key, x := range ownExamples {
		var got map[string]any
		if err := yaml.Unmarshal([]byte(x), &got); err != nil || len(got) != 1 || !strings.HasPrefix(x, key+":") {
			t.Errorf("%s: %q is read as %v, %v", key, x, got, err)
		}
	}
}
