package circuit

// Sketch is the hand-made drawing of a stage: symbols, wires and ports at whole
// modules. Its axes start at the left edge of the stage's frame and at the L+
// rail; y runs down, the L− rail is at y = 56, the frame from 6 to 50.
type Sketch struct {
	Width   int // modules
	Bottom  int // level of the lowest part of a sketch that is made by itself; past 50 it leaves the frame
	Purpose []string
	Items   []SketchItem
}

// Op is what a sketch item draws.
type Op uint8

// The sketch items and which fields they use.
const (
	OpSymbol   Op = iota + 1 // Part, Symbol, X, Y, Turn, Label
	OpWire                   // Pts, Wire (nil: a track without number)
	OpUp                     // lead up to the plus rail: Pts end at y 3, ring (Part, a terminal) at y 2, Rail
	OpIn                     // as OpUp, on the side where a series stage takes the rail away
	OpDown                   // lead down: Pts end at y 52, ring (Part) at y 53, Rail L−
	OpLeft                   // port on the left edge at Y: Name, Rail
	OpRight                  // port on the right edge at Y
	OpTerminal               // ring of a strip in a level wire: Part, X, Y
	OpBlock                  // plain box X,Y..X2,Y2 with Part's designation
	OpStub                   // lead inside a box: Pts
	OpPair                   // upright cable oval at X,Y with half height Y2: Cable
	OpPlace                  // nested frame X,Y..X2,Y2: Place
	OpPoint                  // test point: TP, X, Y, Side
	OpNumber                 // wire number at X,Y: Wire
	OpCore                   // core text of a cable that runs apart, at X,Y: Wire
	OpMains                  // mains strip frame: X, rings at Ys, leads to X2; Names
	OpField                  // box "U<" at X,Y with a dashed link up to Y2
)

// SketchItem is one item of a Sketch.
type SketchItem struct {
	Op     Op
	Part   *Part
	Symbol string // symbol name, such as "resistor"
	X, Y   float64
	X2, Y2 float64
	Turn   string // V upright, H level, U upside down, HU level reversed, B block
	Label  string // slot of designation and values: L, R, A, B; "" none
	Side   string // N, E, S, W
	Name   string
	Names  []string
	Pts    [][2]int
	Ys     []int // levels of a mains frame's rings, or of a converter's left pins
	Ys2    []int // levels of a converter's right pins
	Wire   *Conductor
	Cable  *Cable
	TP     *TestPoint
	Place  *Place
	Rail   string
	Pins   map[string]string // symbol pin name -> part pin name, where they differ
}
