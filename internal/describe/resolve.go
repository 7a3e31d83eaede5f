package describe

import (
	"fmt"
	"slices"
	"strings"
)

// resolve checks every name against what bears it, and the connections that result.
func (d *decoder) resolve() {
	r := &resolver{decoder: d, stages: map[string]*Stage{}}
	for _, s := range d.site.Stages {
		r.stages[s.Name.Val] = s
		r.names = append(r.names, s.Name.Val)
	}
	r.references()
	r.twoSources()
	r.loops()
	r.circuits()
	r.feedsNothing()
	r.seconds()
	r.formerNames()
	r.nets()
	r.lamps()
	r.bareBoards()
}

// resolver holds what the checks across the description share. Its maps are only
// looked up; everything that reports runs over slices in file order.
type resolver struct {
	*decoder
	stages map[string]*Stage
	names  []string // stage names in file order
	feeds  []feed
}

// feed is one resolved connection between stages, in the energy's direction.
type feed struct {
	from, to         *Stage
	fromPort, toPort string // toPort is empty when the fed stage does not name it
	by               *Stage // the stage whose key states it
	at               Span
}

func (d *decoder) stageKind(s *Stage) *Kind { return kindNamed(d.schema.Stages, s.Kind.Val) }

// references finds the stage and the port that each reference names and completes
// references that leave the port out.
func (r *resolver) references() {
	for _, u := range r.refs {
		ref := u.stage.Fields.vals[u.field.Name].Val.(Ref)
		other := r.stages[ref.Stage]
		if other == nil {
			r.unknown(codeUnknownName, "unknown stage", u.at, fmt.Sprintf("No stage is called %q.", clip(ref.Stage)), ref.Stage, "Stages", r.names)
			continue
		}
		if other == u.stage {
			r.report(codeLoop, "stage feeds itself", u.at, fmt.Sprintf("%s names itself under %s. Name another stage.", other.Name.Val, u.field.Name))
			continue
		}
		k := r.stageKind(other)
		if k == nil {
			continue // its kind has been reported
		}
		port, ok := r.choosePort(u, ref, other, k)
		if !ok {
			continue
		}
		ref.Port = port
		u.stage.Fields.Set(u.field.Name, At[any]{Val: ref, Pos: u.at, Given: true})
		r.connect(u, other, port)
	}
}

func (r *resolver) connect(u refUse, other *Stage, port string) {
	if u.field.Feeds {
		r.feeds = append(r.feeds, feed{from: u.stage, to: other, toPort: port, by: u.stage, at: u.at})
		return
	}
	f := feed{from: other, to: u.stage, fromPort: port, by: u.stage, at: u.at}
	if own := r.stageKind(u.stage).port(u.field.Name); own != nil && own.Sink {
		f.toPort = own.Name
	}
	r.feeds = append(r.feeds, f)
}

// choosePort returns the port that a reference means: the one it names, else the
// field's own, else the only suitable one.
func (r *resolver) choosePort(u refUse, ref Ref, other *Stage, k *Kind) (string, bool) {
	suitable := k.sides(u.field.Feeds)
	name := other.Name.Val
	verb := "gives"
	if u.field.Feeds {
		verb = "takes"
	}
	if ref.Port != "" {
		if slices.Contains(suitable, ref.Port) {
			return ref.Port, true
		}
		if k.port(ref.Port) != nil {
			r.report(codePort, "unsuitable port", u.at, fmt.Sprintf("%s.%s %s nothing. %s", name, ref.Port, verb, portsOf(name, k, verb, suitable)))
			return "", false
		}
		detail := fmt.Sprintf("%s (%s) has no port %q. ", name, k.Name, clip(ref.Port))
		if near := nearest(ref.Port, suitable); near != "" {
			detail += "Did you mean " + name + "." + near + "?"
		} else {
			detail += portsOf(name, k, verb, suitable)
		}
		r.report(codePort, "unknown port", u.at, detail)
		return "", false
	}
	if slices.Contains(suitable, u.field.Port) {
		return u.field.Port, true
	}
	if len(suitable) == 1 {
		return suitable[0], true
	}
	if len(suitable) == 0 {
		r.report(codePort, "no suitable port", u.at, portsOf(name, k, verb, nil))
	} else {
		r.report(codePort, "port left open", u.at, fmt.Sprintf("%s has several ports here. Say which: %s.", name, dotted(name, suitable, " or ")))
	}
	return "", false
}

func portsOf(name string, k *Kind, verb string, suitable []string) string {
	if len(suitable) == 0 {
		return fmt.Sprintf("%s is a %s and %s nothing.", name, k.Name, verb)
	}
	return "It " + verb + " at: " + dotted(name, suitable, ", ") + "."
}

func dotted(stage string, ports []string, joint string) string {
	out := make([]string, len(ports))
	for i, p := range ports {
		out[i] = stage + "." + p
	}
	return strings.Join(out, joint)
}

// twoSources finds ports that more stages feed than may.
func (r *resolver) twoSources() {
	type sink struct {
		stage *Stage
		port  string
	}
	fed := map[sink][]feed{}
	for _, f := range r.feeds {
		if f.toPort == "" {
			continue
		}
		key := sink{f.to, f.toPort}
		fed[key] = append(fed[key], f)
		most := r.stageKind(f.to).port(f.toPort).Max
		if most == 0 || len(fed[key]) != most+1 {
			continue
		}
		var others []string
		var related []Related
		for _, g := range fed[key][:most] {
			others = append(others, g.from.Name.Val)
			related = append(related, Related{g.at, "fed from " + g.from.Name.Val + " here"})
		}
		r.report(codeTwoSources, "two sources feed one thing", f.at, fmt.Sprintf("%s.%s is fed from %s already; %s cannot feed it too. It takes %s.",
			f.to.Name.Val, f.toPort, strings.Join(others, " and "), f.from.Name.Val, sources(most)), related...)
	}
}

func sources(n int) string {
	if n == 1 {
		return "one source"
	}
	return fmt.Sprintf("at most %d sources", n)
}

// loops finds stages that feed each other in a circle. A connection into a signal
// port carries a command, no energy, and closes no loop of supply.
func (r *resolver) loops() {
	const (
		unseen = iota
		open
		done
	)
	state := map[*Stage]int{}
	into := map[*Stage][]feed{} // by the fed stage, in file order
	for _, f := range r.feeds {
		if f.toPort == "" || !r.stageKind(f.to).port(f.toPort).Signal {
			into[f.to] = append(into[f.to], f)
		}
	}
	var path []feed
	var walk func(s *Stage)
	walk = func(s *Stage) {
		state[s] = open
		for _, f := range into[s] {
			path = append(path, f)
			switch state[f.from] {
			case unseen:
				walk(f.from)
			case open:
				i := slices.IndexFunc(path, func(g feed) bool { return g.to == f.from })
				r.loop(path[i:])
			}
			path = path[:len(path)-1]
		}
		state[s] = done
	}
	for _, s := range r.site.Stages {
		if state[s] == unseen {
			walk(s)
		}
	}
}

// loop reports one circle; each feed's source is fed by the next.
func (r *resolver) loop(circle []feed) {
	boards := true
	var steps []string
	var related []Related
	for i, f := range circle {
		boards = boards && r.stageKind(f.to).board()
		steps = append(steps, f.to.Name.Val+" is fed from "+f.from.Name.Val)
		if i > 0 {
			related = append(related, Related{f.at, "and " + f.to.Name.Val + " is fed from " + f.from.Name.Val + " here"})
		}
	}
	what := "stages"
	if boards {
		what = "boards"
	}
	r.report(codeLoop, "loop of "+what, circle[0].at, strings.Join(steps, ", ")+": no source feeds the loop. Feed one of them from outside it.", related...)
}

// feedsNothing finds stages that must feed another and do not.
func (r *resolver) feedsNothing() {
	for _, s := range r.site.Stages {
		k := r.stageKind(s)
		if k == nil || !k.MustFeed || slices.ContainsFunc(r.feeds, func(f feed) bool { return f.from == s }) || r.namedAnywhere(s) {
			continue
		}
		r.report(codeFeedsNone, k.Name+" that feeds nothing", s.Name.Pos, fmt.Sprintf("No stage takes from %s. Let one: give it from: %s, or remove %s.", s.Name.Val, s.Name.Val, s.Name.Val))
	}
}

// seconds finds stages of kinds of which a job has at most one: the sizing of a second one
// would need to know which lights hang on which.
func (r *resolver) seconds() {
	first := map[string]*Stage{}
	for _, s := range r.site.Stages {
		k := r.stageKind(s)
		if k == nil || !k.Single {
			continue
		}
		if one := first[k.Name]; one != nil {
			r.report(codeSecond, "second "+k.Name, s.Name.Pos, fmt.Sprintf("A job has one %s, and %s is it. Remove %s, or describe its lights as a job of their own.", k.Name, one.Name.Val, s.Name.Val),
				Related{one.Name.Pos, "the first is here"})
			continue
		}
		first[k.Name] = s
	}
}

// namedAnywhere reports whether a reference names s but could not be resolved, which
// has been reported; a second message would only confuse.
func (r *resolver) namedAnywhere(s *Stage) bool {
	return slices.ContainsFunc(r.refs, func(u refUse) bool {
		ref := u.stage.Fields.vals[u.field.Name].Val.(Ref)
		return !u.field.Feeds && ref.Stage == s.Name.Val
	})
}

// nets checks the stages that parts and test points name.
func (r *resolver) nets() {
	for _, p := range r.site.Parts {
		for _, pin := range p.Pins {
			r.net(pin.Net)
		}
	}
	for _, t := range r.site.TestPoints {
		r.net(t.At_)
	}
}

func (r *resolver) net(n At[string]) {
	stage, port, dotted := strings.Cut(n.Val, ".")
	if !dotted {
		return
	}
	s := r.stages[stage]
	if s == nil {
		r.unknown(codeUnknownName, "unknown stage", n.Pos, fmt.Sprintf("No stage is called %q.", clip(stage)), stage, "Stages", r.names)
		return
	}
	k := r.stageKind(s)
	if k == nil || k.Nets == nil || slices.Contains(k.Nets, port) || k.port(port) != nil {
		return
	}
	all := append(slices.Clone(k.Nets), append(k.sides(false), k.sides(true)...)...)
	r.unknown(codePort, "unknown port", n.Pos, fmt.Sprintf("%s (%s) has no port %q.", stage, k.Name, clip(port)), port, "Ports", all)
}
