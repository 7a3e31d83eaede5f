package stage_test

import (
	"testing"

	"gloamwright/internal/stage"
)

// TestSchema holds every kind's own statement: names, docs, types, and every default
// and bound, which must parse.
func TestSchema(t *testing.T) {
	s := stage.Schema()
	if err := s.Validate(); err != nil {
		t.Fatal(err)
	}
	if len(s.Stages) != 15 || len(s.Luminaires) != 5 || len(s.Parts) != 12 {
		t.Errorf("%d stage, %d luminaire and %d part kinds", len(s.Stages), len(s.Luminaires), len(s.Parts))
	}
}
