package describe

import (
	"fmt"
	"slices"
)

// circuits checks the boards of all circuits and the ways of all boards.
func (r *resolver) circuits() {
	var boards []string
	for _, s := range r.site.Stages {
		if k := r.stageKind(s); k != nil && k.board() {
			boards = append(boards, s.Name.Val)
		}
	}
	for _, c := range r.site.Circuits {
		if !c.Board.Given {
			continue
		}
		s := r.stages[c.Board.Val]
		if s == nil {
			r.unknown(codeUnknownName, "unknown board", c.Board.Pos, fmt.Sprintf("No board is called %q.", clip(c.Board.Val)), c.Board.Val, "Boards", boards)
		} else if k := r.stageKind(s); k != nil && !k.board() {
			detail := fmt.Sprintf("%s is a %s and has no ways. ", s.Name.Val, k.Name)
			if len(boards) == 0 {
				detail += "Add a board among the stages and put the circuit on it."
			} else {
				detail += "Boards: " + listed(boards) + "."
			}
			r.report(codeNotBoard, "circuit on a stage that is no board", c.Board.Pos, detail)
		}
	}
	for _, s := range r.site.Stages {
		if k := r.stageKind(s); k != nil && k.board() {
			r.ways(s, k)
		}
	}
}

// user is what hangs on one way of a board: a circuit or a further board.
type user struct {
	name string
	at   Span
	way  At[int]
}

// usersOf returns what hangs on the board: its circuits, then the boards it feeds.
func (r *resolver) usersOf(board *Stage) (users []user, circuits int) {
	for _, c := range r.site.Circuits {
		if c.Board.Given && c.Board.Val == board.Name.Val {
			at := c.Name.Pos
			if !c.Name.Given {
				at = c.Pos
			}
			users = append(users, user{c.Name.Val, at, c.Way})
		}
	}
	circuits = len(users)
	for _, f := range r.feeds {
		if k := r.stageKind(f.to); f.from != board || !k.board() || f.by != f.to {
			continue
		}
		way, _ := intField(f.to.Fields, fieldWay)
		users = append(users, user{f.to.Name.Val, f.at, way})
	}
	return users, circuits
}

// ways checks that what hangs on a board finds a way each.
func (r *resolver) ways(s *Stage, k *Kind) {
	users, circuits := r.usersOf(s)
	ways, bounded := intField(s.Fields, fieldWays)
	taken := map[int]user{}
	for _, u := range users {
		switch first, twice := taken[u.way.Val]; {
		case !u.way.Given:
		case bounded && u.way.Val > ways.Val:
			r.report(codeWay, "no such way", u.way.Pos, fmt.Sprintf("%s has %d ways; there is no way %d.", s.Name.Val, ways.Val, u.way.Val))
		case twice:
			r.report(codeWay, "way pinned twice", u.way.Pos, fmt.Sprintf("Way %d of %s holds %s already. Give %s another way.", u.way.Val, s.Name.Val, first.name, u.name),
				Related{first.way.Pos, "first pinned here"})
		default:
			taken[u.way.Val] = u
		}
	}
	if !bounded || len(users) <= ways.Val {
		return
	}
	hang := counted(circuits, "circuit")
	if boards := len(users) - circuits; boards > 0 {
		hang += " and " + counted(boards, "board")
	}
	var related []Related
	if ways.Given {
		related = []Related{{ways.Pos, "the ways are given here"}}
	}
	r.report(codeWays, "more circuits than ways", users[ways.Val].at, fmt.Sprintf("%s has %s, and %s hang on it. Give it ways: %d or more, or move some to another board.",
		s.Name.Val, counted(ways.Val, "way"), hang, len(users)), related...)
}

func counted(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}

// intField returns a field that holds a count, whatever kind registered it.
func intField(f Fields, name string) (At[int], bool) {
	a, ok := f.vals[name]
	n, isInt := a.Val.(int)
	return At[int]{Val: n, Pos: a.Pos, Given: a.Given}, ok && isInt
}

// formerNames checks that no two circuits claim the labels of one former name.
func (r *resolver) formerNames() {
	first := map[string]Span{}
	for _, c := range r.site.Circuits {
		if !c.Was.Given {
			continue
		}
		was := c.Was.Val
		if c.Name.Val == was {
			r.report(codeWas, "former name is the present one", c.Was.Pos, fmt.Sprintf("%s was not renamed. Remove was:.", was))
			continue
		}
		if at, twice := first[was]; twice {
			r.report(codeWas, "former name claimed twice", c.Was.Pos, fmt.Sprintf("Two circuits say they were %s; its labels can follow only one.", was), Related{at, "first claimed here"})
			continue
		}
		first[was] = c.Was.Pos
		i := slices.IndexFunc(r.site.Circuits, func(o *Circuit) bool { return o.Name.Given && o.Name.Val == was && !o.Was.Given })
		if i >= 0 {
			o := r.site.Circuits[i]
			r.report(codeWas, "former name still in use", c.Was.Pos, fmt.Sprintf("A circuit is still called %s and keeps its labels. Remove was:, or give that circuit its own was:.", was),
				Related{o.Name.Pos, "in use here"})
		}
	}
}

// lamps checks the luminaires of all points.
func (r *resolver) lamps() {
	used := map[string]bool{}
	known := map[string]bool{}
	var names []string
	for _, l := range r.site.Luminaires {
		known[l.Name.Val] = true
		names = append(names, l.Name.Val)
	}
	var walk func(legs []*Leg)
	walk = func(legs []*Leg) {
		for _, leg := range legs {
			name := leg.Luminaire.Val
			used[name] = true
			if leg.Luminaire.Given && !known[name] {
				r.unknown(codeUnknownName, "unknown luminaire", leg.Luminaire.Pos, fmt.Sprintf("No luminaire is called %q.", clip(name)), name, "Luminaires", names)
			}
			for _, b := range leg.Branches {
				walk(b)
			}
		}
	}
	for _, c := range r.site.Circuits {
		walk(c.Points)
	}
	if r.list.HasErrors() {
		return // the point that uses it may be the one that could not be read
	}
	for _, l := range r.site.Luminaires {
		if !used[l.Name.Val] {
			r.warn(codeUnused, "unused luminaire", l.Name.Pos, fmt.Sprintf("No point uses the luminaire %s.", l.Name.Val))
		}
	}
}

// bareBoards finds boards that nothing hangs on.
func (r *resolver) bareBoards() {
	if r.list.HasErrors() {
		return
	}
	for _, s := range r.site.Stages {
		if !r.stageKind(s).board() {
			continue
		}
		if users, _ := r.usersOf(s); len(users) == 0 {
			r.warn(codeBareBoard, "board that nothing hangs on", s.Name.Pos, fmt.Sprintf("No circuit and no board hangs on %s.", s.Name.Val))
		}
	}
}
