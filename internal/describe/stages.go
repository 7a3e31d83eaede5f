package describe

import (
	"fmt"
	"strings"

	"gopkg.in/yaml.v3"
)

// refUse is one reference from a stage to another.
type refUse struct {
	stage *Stage
	field *Field
	at    Span
}

func (d *decoder) readStages(e entry) {
	list := d.entries(e.val, "stages")
	if e.val.Kind == yaml.MappingNode && len(e.val.Content) == 0 {
		d.report(codeNoValue, "no stages", e.at, "Name at least a battery, what charges it, and a board.")
	}
	for _, s := range list[:d.few(len(list), maxStages, e.at, "stages")] {
		if err := checkIdentifier(s.key); err != nil {
			d.fail(s.at, err)
		}
		st := &Stage{Name: At[string]{Val: s.key, Pos: s.at, Given: true}}
		d.site.Stages = append(d.site.Stages, st)
		d.kind(s.val, s.at, "The stage "+s.key, "stage", d.schema.Stages, &st.Kind, &st.Fields, nil, st)
	}
}

func (d *decoder) readLuminaires(e entry) {
	list := d.entries(e.val, "luminaires")
	for _, l := range list[:d.few(len(list), maxTypes, e.at, "luminaire types")] {
		if err := checkIdentifier(l.key); err != nil {
			d.fail(l.at, err)
		}
		lum := &Luminaire{Name: At[string]{Val: l.key, Pos: l.at, Given: true}}
		d.site.Luminaires = append(d.site.Luminaires, lum)
		d.kind(l.val, l.at, "The luminaire "+l.key, "luminaire", d.schema.Luminaires, &lum.Kind, &lum.Fields, nil, nil)
	}
}

// kind reads a mapping that names a kind and holds its fields, besides those of own.
// st is the stage that it belongs to, if any.
func (d *decoder) kind(n *yaml.Node, owner Span, what, group string, kinds []Kind, dst *At[string], vals *Fields, own []field, st *Stage) {
	if n.Kind != yaml.MappingNode {
		if isNull(n) {
			d.report(codeNoValue, "missing value", owner, fmt.Sprintf("%s needs a mapping with its kind, such as {kind: %s, …}.", what, exampleKind(kinds)))
			return
		}
		d.entries(n, what)
		return
	}
	k := d.kindOf(n, owner, what, group, kinds, dst)
	fields := append([]field{{"kind", false, func(entry) {}}}, own...)
	if k == nil {
		// The keys cannot be judged, but those of own and repetitions can.
		for _, e := range d.entries(n, what) {
			for _, f := range own {
				if f.name == e.key && !isNull(e.val) {
					f.read(e)
				}
			}
		}
		return
	}
	for i := range k.Fields {
		f := &k.Fields[i]
		fields = append(fields, field{f.Name, f.Required, func(e entry) { d.readField(e, f, vals, st) }})
	}
	d.mappingOf(n, owner, fmt.Sprintf("%s (%s)", what, k.Name), fields, fieldRemedy(k.Fields))
	for _, f := range k.Fields {
		if _, given := vals.vals[f.Name]; given || f.Default == "" {
			continue
		}
		if v, err := f.parse(f.Default); err == nil {
			vals.Set(f.Name, At[any]{Val: v})
		}
	}
}

func exampleKind(kinds []Kind) string {
	if len(kinds) == 0 {
		return "…"
	}
	return kinds[0].Name
}

// kindOf reads the key kind. It returns nil when it has reported why there is none.
func (d *decoder) kindOf(n *yaml.Node, owner Span, what, group string, kinds []Kind, dst *At[string]) *Kind {
	for i := 0; i+1 < len(n.Content); i += 2 {
		key, val := follow(n.Content[i]), follow(n.Content[i+1])
		if key.Kind != yaml.ScalarNode || key.Value != "kind" {
			continue
		}
		if val.Kind != yaml.ScalarNode || isNull(val) {
			d.report(codeNoValue, "missing kind", d.src.of(n.Content[i]), fmt.Sprintf("%s needs the name of its kind. Kinds: %s.", what, listed(kindNames(kinds))))
			return nil
		}
		at := d.src.of(val)
		*dst = At[string]{Val: val.Value, Pos: at, Given: true}
		if k := kindNamed(kinds, val.Value); k != nil {
			return k
		}
		d.unknown(codeUnknownKind, "unknown kind", at, fmt.Sprintf("There is no %s kind %q.", group, clip(val.Value)), val.Value, "Kinds", kindNames(kinds))
		return nil
	}
	d.report(codeMissingKey, "missing key", owner, fmt.Sprintf("%s needs the key kind. Kinds: %s.", what, listed(kindNames(kinds))))
	return nil
}

// readField reads one field of a kind.
func (d *decoder) readField(e entry, f *Field, vals *Fields, st *Stage) {
	switch f.Type {
	case Curve:
		d.readCurve(e, vals)
		return
	case StageRef:
		d.readRef(e, f, vals, st)
		return
	}
	s, ok := d.scalar(e.val, e.key)
	if !ok {
		return
	}
	at := d.src.of(e.val)
	v, err := f.parse(s)
	if err != nil {
		d.fail(at, err)
		return
	}
	vals.Set(f.Name, At[any]{Val: v, Pos: at, Given: true})
}

// readRef reads "store" or "transfer.break". It is resolved when all stages are known.
func (d *decoder) readRef(e entry, f *Field, vals *Fields, st *Stage) {
	s, ok := d.scalar(e.val, e.key)
	if !ok {
		return
	}
	at := d.src.of(e.val)
	name, port, _ := strings.Cut(s, ".")
	if err := checkIdentifier(name); err != nil || strings.HasSuffix(s, ".") {
		d.report(codeName, "bad name", at, fmt.Sprintf("%q does not name a stage: write the stage, or stage.port.", clip(s)))
		return
	}
	vals.Set(f.Name, At[any]{Val: Ref{name, port}, Pos: at, Given: true})
	if st != nil {
		d.refs = append(d.refs, refUse{st, f, at})
	}
}

// readCurve reads a capacity table: times that grow give capacities that grow.
func (d *decoder) readCurve(e entry, vals *Fields) {
	items := d.items(e.val, e.key)
	var points []RatePoint
	for _, n := range items[:d.few(len(items), maxList, e.at, "points")] {
		s, ok := d.scalar(n, "A point of a capacity table")
		if !ok {
			continue
		}
		p, err := parseRatePoint(s)
		if err != nil {
			d.fail(d.src.of(n), err)
			continue
		}
		for _, q := range points {
			if (p.Time > q.Time) != (p.Capacity > q.Capacity) || p.Time == q.Time {
				d.report(codeRange, "capacity table out of order", d.src.of(n),
					fmt.Sprintf("%v in %v cannot stand beside %v in %v: a longer discharge gives more capacity.", p.Capacity, p.Time, q.Capacity, q.Time))
				break
			}
		}
		points = append(points, p)
	}
	if len(points) > 0 {
		vals.Set(e.key, At[any]{Val: points, Pos: d.src.of(e.val), Given: true})
	}
}
