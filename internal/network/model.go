package network

import (
	"math"
	"strings"
)

// Model is one device law. The list that Models returns is the reference for
// everyone who makes elements or solves results.json by other means.
type Model struct {
	Name   string
	Doc    string // what it stands for
	Pins   []ModelPin
	Params []ParamSpec
	Law    string // the equation, with pin and parameter names
	Source string
	Memory string // names of the two positions, "on/off" in that order; "" without memory

	branches int                // unknown currents of its own
	moved    bool               // its position is another element's (Control)
	rest     bool               // position when the state says nothing
	eval     func(c *cell)      // fills f and j at v; not needed where straight is there
	straight func(c *cell) line // instead of eval: a law that is a line whatever the voltages are
	limit    func(c *cell, old []float64) bool
	next     func(c *cell) bool              // position that the voltages at v call for
	check    func(p []float64) string        // what is wrong with the parameters together
	derive   func(p []float64, given []bool) // fills in parameters that were not given
	direct   func(p []float64, on bool) bool // pins 0 and 1 are joined without resistance
	works    func(p []float64) (low float64) // lowest working voltage of a load
	joined   [][2]int                        // pins between which current can flow
	drives   []int                           // parameters that bring energy in
}

// ModelPin is a pin of a model.
type ModelPin struct {
	Name     string
	Optional bool
}

// ParamSpec is a parameter of a model.
type ParamSpec struct {
	Name     string
	Unit     string
	Doc      string
	Default  float64
	Required bool
	Min, Max float64 // allowed range, ends included; both 0: any finite number
}

// Models returns all models in their printing order.
func Models() []*Model {
	return []*Model{
		resistorModel, conductorModel, fuseModel, switchModel, contactModel, ntcModel, meterModel, capacitorModel, ldrModel,
		sourceModel, batteryModel, chargerModel, supplyModel, transformerModel, regulatorModel,
		diodeModel, schottkyModel, ledModel, zenerModel, suppressorModel, bridgeModel, npnModel, pnpModel,
		coilModel, cutOffModel, photoswitchModel, comparatorModel,
		powerModel, currentModel, ledStringModel, filamentModel,
	}
}

// pins makes required pins.
func pins(names ...string) []ModelPin {
	out := make([]ModelPin, len(names))
	for i, n := range names {
		out[i].Name = n
	}
	return out
}

// maxLocal is the largest number of unknowns of one model: pins and own currents.
const maxLocal = 6

// cell is one element at one moment: what its law sees and what it says.
type cell struct {
	v  [maxLocal]float64 // pin voltages, then own currents
	f  [maxLocal]float64 // currents out of the nets into the pins, then own equations
	j  [maxLocal][maxLocal]float64
	p  []float64    // parameters
	on bool         // position, its own or that of the element that moves it
	at *Environment // the condition
}

// clear makes room for an element of k unknowns.
func (c *cell) clear(k int) {
	c.f = [maxLocal]float64{}
	clear(c.j[:k])
}

// evaluate fills f and j at v.
func (m *Model) evaluate(c *cell) {
	if m.straight != nil {
		c.along(m.straight(c))
		return
	}
	m.eval(c)
}

// flow adds a current i from pin a through the element to pin b that depends on
// their difference with the given slope.
func (c *cell) flow(a, b int, i, slope float64) {
	c.f[a] += i
	c.f[b] -= i
	c.j[a][a] += slope
	c.j[a][b] -= slope
	c.j[b][a] -= slope
	c.j[b][b] += slope
}

// flowBy adds the slope of a current from a to b to the voltage of pin k.
func (c *cell) flowBy(a, b, k int, slope float64) {
	c.j[a][k] += slope
	c.j[b][k] -= slope
}

// across is the voltage of pin a against pin b.
func (c *cell) across(a, b int) float64 { return c.v[a] - c.v[b] }

// series writes the law of an electromotive force and a resistance between pins 0
// and 1, the current being the element's own unknown number 2.
func (c *cell) series(emf, ohm float64) { c.along(line{emf: emf, ohm: ohm}) }

// open says that no current flows through the own unknown number 2.
func (c *cell) open() { c.along(line{open: true}) }

func (c *cell) along(l line) {
	c.through(c.v[2])
	c.f[2] = l.off(c.v[0]-c.v[1], c.v[2])
	c.j[2][0], c.j[2][1], c.j[2][2] = l.slopes()
}

func (c *cell) through(i float64) {
	c.f[0], c.f[1] = i, -i
	c.j[0][2], c.j[1][2] = 1, -1
}

// resistance is the largest that a description may ask for.
const maxOhm = 1e12

// ohms is the parameter of a resistance.
func ohms(doc string, def float64) ParamSpec {
	return ParamSpec{Name: "ohm", Unit: "Ω", Doc: doc, Default: def, Max: maxOhm}
}

// needed returns p as a required parameter.
func needed(p ParamSpec) ParamSpec {
	p.Required = true
	return p
}

// limits returns p with a lawful range.
func limits(p ParamSpec, low, high float64) ParamSpec {
	p.Min, p.Max = low, high
	return p
}

// positive returns p restricted to numbers above zero.
func positive(p ParamSpec) ParamSpec { return limits(p, math.SmallestNonzeroFloat64, math.MaxFloat64) }

// param makes a parameter that may be any number from zero up.
func param(name, unit string, def float64, doc string) ParamSpec {
	return ParamSpec{Name: name, Unit: unit, Doc: doc, Default: def, Max: math.MaxFloat64}
}

// positions splits Memory into its two words.
func (m *Model) positions() (on, off string) {
	on, off, _ = strings.Cut(m.Memory, "/")
	return on, off
}
