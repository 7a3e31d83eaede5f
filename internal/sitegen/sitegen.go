// Package sitegen writes descriptions of sites that nobody thought of: many shapes,
// every stage and luminaire kind, up to thousands of luminaires. Tests and benchmarks
// run the program on them. The same arguments always give the same text.
package sitegen

import (
	"fmt"
	"math/rand/v2"
	"strings"
)

// Shape is how luminaires hang on circuits and circuits on boards.
type Shape string

// The shapes.
const (
	Rows     Shape = "rows"      // about eight luminaires one after the other on each circuit
	OneWay   Shape = "one way"   // all luminaires one after the other on one circuit
	ManyWays Shape = "many ways" // one luminaire on each circuit
	Deep     Shape = "deep"      // branches on branches
	Comb     Shape = "comb"      // a branch of one luminaire on every point of the run
	Boards   Shape = "boards"    // a tree of boards, each feeding the next
)

// Shapes lists all shapes.
var Shapes = []Shape{Rows, OneWay, ManyWays, Deep, Comb, Boards}

// Control is what lights the boards.
type Control string

// The controls.
const (
	Module     Control = "module"     // relay, twilight switch module
	Comparator Control = "comparator" // relay, comparator card with a light-dependent resistor
	Follower   Control = "follower"   // relay, light-dependent resistor and transistor
	MainsOnly  Control = "mains only" // relay without a sensor: lit by day and night
	Direct     Control = "direct"     // no relay: boards on the cut-off, always lit
)

// Controls lists all controls.
var Controls = []Control{Module, Comparator, Follower, MainsOnly, Direct}

// Options chooses a site. The zero value is a 24 V site in rows with a twilight module.
type Options struct {
	Seed    uint64
	Volts   int     // nominal: 12, 24, 36, 48; 0: 24
	Shape   Shape   // "": Rows
	Control Control // "": Module
	Cells   string  // battery class; "": vrla-agm
	Gauges  bool    // AWG, feet and ANSI paper
	Long    bool    // names as long as the language allows, with letters beyond ASCII
	Extras  bool    // isolator, indicator, meters, suppressor, test switch, more test points
	// Discrete takes a transformer supply, a linear charger and a Zener feed for the coil
	// in place of modules, at 12 and 24 V.
	Discrete bool
	Singles  bool  // one single part of each kind
	Taper    bool  // legs may get thinner
	Lamps    Lamps // "": Mixed
	// Backwards writes stages, luminaires and keys of circuits in the opposite order; it
	// is the same site.
	Backwards bool
}

// Lamps is the choice of luminaire kinds.
type Lamps string

// The choices.
const (
	Mixed   Lamps = "mixed"   // drivers and strings
	Drivers Lamps = "drivers" // constant power
	Old     Lamps = "old"     // filament, ballast, resistive
)

// Varied returns the number of luminaires and the options of the i-th of an endless row
// of sites in which all options occur together in ever new ways.
func Varied(i int) (n int, o Options) {
	r := rand.New(rand.NewPCG(uint64(i), 20))
	pick := func(k int) int { return r.IntN(k) }
	o = Options{
		Seed: uint64(i), Volts: []int{12, 24, 36, 48}[pick(4)], Shape: Shapes[i%len(Shapes)], Control: Controls[pick(len(Controls))],
		Cells:  []string{"vrla-agm", "vrla-gel", "flooded", "nicd", "nimh", "lifepo4"}[pick(6)],
		Gauges: pick(3) == 0, Long: pick(4) == 0, Extras: pick(2) == 0, Taper: pick(3) == 0,
		Lamps: []Lamps{Mixed, Drivers, Old}[pick(3)], Discrete: pick(3) == 0, Singles: pick(4) == 0,
	}
	return 1 + pick([]int{6, 16, 40}[pick(3)]), o
}

// Site writes a description with n luminaires.
func Site(n int, o Options) []byte {
	if o.Volts == 0 {
		o.Volts = 24
	}
	if o.Shape == "" {
		o.Shape = Rows
	}
	if o.Control == "" {
		o.Control = Module
	}
	if o.Cells == "" {
		o.Cells = "vrla-agm"
	}
	if o.Lamps == "" {
		o.Lamps = Mixed
	}
	if o.Volts > 24 {
		o.Discrete = false
	}
	w := &writer{Options: o, n: max(n, 1), rand: rand.New(rand.NewPCG(o.Seed, 7))}
	w.plan()
	w.head()
	w.section("stages", w.stages())
	w.section("luminaires", w.luminaires())
	w.circuits()
	w.singles()
	if o.Extras {
		w.line("test_points:\n  - {name: Battery plus again, at: store.plus}")
	}
	return []byte(w.b.String())
}

// writer is a description in the making.
type writer struct {
	Options
	n       int
	rand    *rand.Rand
	b       strings.Builder
	types   []string // luminaire types
	watt    float64  // of one luminaire
	leg     float64  // m
	boards  []board
	planned []planned
}

// board is a board and the number of ways that it needs.
type board struct {
	name, from string
	ways       int
}

// planned is a circuit: its board and its luminaires.
type planned struct {
	board string
	lamps int
}

func (w *writer) line(format string, args ...any) {
	fmt.Fprintf(&w.b, format, args...)
	w.b.WriteByte('\n')
}

// The load of a generated site stays within what a battery main fuse carries: power
// and length of a leg fall with the number of luminaires.
const (
	mostAmps  = 60.0 // of all luminaires together
	mostWatt  = 6.0  // of one
	dropShare = 0.03 // of the nominal voltage, over the farthest circuit in 2.5 mm²
	ohmMetre  = 0.0082
)

// plan deals the luminaires out to circuits and the circuits to boards.
func (w *writer) plan() {
	volts := float64(w.Volts)
	w.watt = min(mostWatt, mostAmps*volts/float64(w.n))
	run := map[Shape]int{Rows: 8, OneWay: w.n, ManyWays: 1, Deep: 12, Comb: 16, Boards: 5}[w.Shape]
	onBoard := 20
	if w.Shape == Boards {
		onBoard = 3
	}
	for left := w.n; left > 0; left -= run {
		k := len(w.planned)
		if k%onBoard == 0 {
			w.board(k / onBoard)
		}
		b := &w.boards[len(w.boards)-1]
		b.ways++
		w.planned = append(w.planned, planned{b.name, min(run, left)})
	}
	moment := float64(run) * float64(run+1) / 2 * w.watt / volts * ohmMetre * 2
	w.leg = min(12, max(0.1, dropShare*volts/moment))
}

// board adds a board: the first on the control, others on the first or, in a tree of
// boards, each two on one before them.
func (w *writer) board(k int) {
	from := map[Control]string{Direct: "guard"}[w.Control]
	if from == "" {
		from = "transfer.break"
	}
	if k > 0 {
		parent := 0
		if w.Shape == Boards {
			parent = (k - 1) / 2
		}
		from = w.boards[parent].name
		w.boards[parent].ways++
	}
	w.boards = append(w.boards, board{name: w.word("board", k+1), from: from})
}

// long fills a name up to the length that the language allows.
const (
	longName = 40
	filler   = "çàéöñ"
)

// word is an identifier with a number.
func (w *writer) word(stem string, k int) string {
	name := fmt.Sprintf("%s%d", stem, k)
	if w.Long {
		name += "-"
		for i := 0; len([]rune(name)) < longName; i++ {
			name += string([]rune(filler)[i%5])
		}
	}
	return name
}

func (w *writer) length(metres float64) string {
	if w.Gauges {
		return fmt.Sprintf("%.1f ft", metres/0.3048)
	}
	return fmt.Sprintf("%.2f m", metres)
}

func (w *writer) head() {
	system, paper, mains := "metric", "iso", "°C"
	ambient := "35 " + mains
	if w.Gauges {
		system, paper, ambient = "awg", "ansi", "95 °F"
	}
	w.line("gloamwright: 1\njob: {number: GEN-%d, title: Generated site, client: Nobody, site: %s}", w.Seed, w.title("Nowhere"))
	w.line("practice: {conductors: %s, paper: %s, taper: %s}", system, paper, map[bool]string{true: "yes", false: "no"}[w.Taper])
	w.line("duty: {nominal: %d V, outage: %d h, recharge: %d h, cable_ambient: %s}", w.Volts, 1+w.rand.IntN(6), 12+w.rand.IntN(24), ambient)
}

// title is a text that may be as long as a title block bears.
func (w *writer) title(s string) string {
	if !w.Long {
		return s
	}
	return s + strings.Repeat(" and beyond", 8)
}

// section writes a mapping, backwards if asked.
func (w *writer) section(key string, entries []string) {
	w.line("%s:", key)
	for i := range entries {
		if w.Backwards {
			i = len(entries) - 1 - i
		}
		w.line("  %s", entries[i])
	}
}
