package describe

import (
	"fmt"
	"slices"
)

// Validate reports the first fault of the schema itself: a kind or field without a
// name, doc or type, a name used twice, a default or bound that does not parse. It is
// meant for a test of the room that registers the kinds.
func (s *Schema) Validate() error {
	for _, group := range []struct {
		what  string
		kinds []Kind
	}{{"stage", s.Stages}, {"luminaire", s.Luminaires}, {"part", s.Parts}} {
		seen := map[string]bool{}
		for _, k := range group.kinds {
			if seen[k.Name] {
				return fmt.Errorf("describe: %s kind %q is registered twice", group.what, k.Name)
			}
			seen[k.Name] = true
			if err := k.validate(); err != nil {
				return fmt.Errorf("describe: %s kind %q: %w", group.what, k.Name, err)
			}
		}
	}
	return nil
}

// reserved are the keys that the decoder itself reads in stages, luminaires and parts.
var reserved = []string{"kind", "name", "pins"}

func (k Kind) validate() error {
	if err := checkIdentifier(k.Name); err != nil {
		return err
	}
	if k.Doc == "" {
		return fmt.Errorf("no doc")
	}
	ports := map[string]bool{}
	for _, p := range k.Ports {
		if p.Name == "" || ports[p.Name] || p.Max < 0 {
			return fmt.Errorf("port %q has no name, comes twice or has a negative bound", p.Name)
		}
		ports[p.Name] = true
	}
	seen := map[string]bool{}
	for _, f := range k.Fields {
		if f.Name == "" || seen[f.Name] || slices.Contains(reserved, f.Name) {
			return fmt.Errorf("field %q has no name, comes twice or takes a name that is in use", f.Name)
		}
		seen[f.Name] = true
		if err := f.validate(); err != nil {
			return fmt.Errorf("field %q: %w", f.Name, err)
		}
	}
	return nil
}

func (f Field) validate() error {
	switch {
	case f.Doc == "":
		return fmt.Errorf("no doc")
	case !f.Type.valid():
		return fmt.Errorf("type %d is none", f.Type)
	case f.Required && f.Default != "":
		return fmt.Errorf("required, and yet with a default")
	case (f.Type == Choice) != (len(f.Choices) > 0):
		return fmt.Errorf("choices belong to the type Choice, and only to it")
	case f.Type != StageRef && (f.Port != "" || f.Feeds):
		return fmt.Errorf("a port belongs to the type StageRef")
	case f.Stands && f.Type != Voltage && f.Type != VoltageRange:
		return fmt.Errorf("only a voltage is one that a part stands")
	case f.Default != "" && (f.Type == StageRef || f.Type == Curve):
		return fmt.Errorf("%v has no default", f.Type)
	}
	bound := types[f.Type].bound
	for _, b := range []string{f.Min, f.Max} {
		if b == "" {
			continue
		}
		if bound == 0 {
			return fmt.Errorf("%v has no bounds", f.Type)
		}
		if _, err := types[bound].parse(b); err != nil {
			return fmt.Errorf("bound: %w", err)
		}
	}
	if f.Min != "" && f.Max != "" {
		low, high := boundEnds(bound, f.Min, 1), boundEnds(bound, f.Max, 1)
		for i := range low {
			if low[i] > high[i] {
				return fmt.Errorf("the bounds %s and %s are the wrong way round", f.Min, f.Max)
			}
		}
	}
	if f.Default == "" {
		return nil
	}
	_, err := f.parse(f.Default)
	return err
}

// parse reads the text of a field that is written as a single value and is no
// reference.
func (f Field) parse(s string) (any, error) {
	if f.Type == Choice {
		return parseChoice(s, f.Choices)
	}
	v, err := types[f.Type].parse(s)
	if err == nil && !f.Stands {
		err = checkELV(f.Type, v)
	}
	if err == nil {
		err = checkBounds(f.Type, v, s, f.Min, f.Max)
	}
	if err != nil {
		return nil, err
	}
	return v, nil
}

// kindNamed finds a kind.
func kindNamed(kinds []Kind, name string) *Kind {
	i := slices.IndexFunc(kinds, func(k Kind) bool { return k.Name == name })
	if i < 0 {
		return nil
	}
	return &kinds[i]
}

func kindNames(kinds []Kind) []string {
	out := make([]string, len(kinds))
	for i, k := range kinds {
		out[i] = k.Name
	}
	return out
}

// port finds a port of k.
func (k *Kind) port(name string) *Port {
	i := slices.IndexFunc(k.Ports, func(p Port) bool { return p.Name == name })
	if i < 0 {
		return nil
	}
	return &k.Ports[i]
}

// sides returns the names of k's sink ports, or of its source ports.
func (k *Kind) sides(sink bool) []string {
	var out []string
	for _, p := range k.Ports {
		if p.Sink == sink {
			out = append(out, p.Name)
		}
	}
	return out
}

// field finds a field of k.
func (k *Kind) field(name string) *Field {
	i := slices.IndexFunc(k.Fields, func(f Field) bool { return f.Name == name })
	if i < 0 {
		return nil
	}
	return &k.Fields[i]
}

// board reports whether circuits may be put on stages of kind k.
func (k *Kind) board() bool {
	f := k.field(fieldWays)
	return f != nil && f.Type == Count
}

// The fields by which a board is known; see Kind.
const (
	fieldWays = "ways"
	fieldWay  = "way"
)
