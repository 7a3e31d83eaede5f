// Package quantity holds the physical quantities of the trade, one Go type each,
// so that the compiler keeps volts from amperes, and reads and prints them with
// their units.
//
// A quantity is a float64 in the unit that its type names. Parsing never accepts
// a number without a unit; formatting always prints one.
package quantity

// Volt is an electric potential difference in volts.
type Volt float64

// Ampere is an electric current in amperes.
type Ampere float64

// Ohm is an electrical resistance in ohms.
type Ohm float64

// Watt is a power in watts.
type Watt float64

// Metre is a length in metres.
type Metre float64

// SquareMM is a conductor cross-section in square millimetres.
type SquareMM float64

// Celsius is a temperature in degrees Celsius.
type Celsius float64

// Second is a duration in seconds.
type Second float64

// AmpereHour is a battery capacity in ampere-hours.
type AmpereHour float64

// Lux is an illuminance in lux.
type Lux float64

// Lumen is a luminous flux in lumens.
type Lumen float64

// Farad is a capacitance in farads.
type Farad float64

// Ratio is a pure number; 1 means 100 %.
type Ratio float64

// KelvinPerWatt is a thermal resistance in kelvins per watt.
type KelvinPerWatt float64

// SecondsPerHour converts hours to seconds.
const SecondsPerHour = 3600

// Hours returns d in hours.
func (d Second) Hours() float64 { return float64(d) / SecondsPerHour }

// Hours returns a duration of h hours.
func Hours(h float64) Second { return Second(h * SecondsPerHour) }

// Range is a closed interval of one quantity, low end first.
type Range[T ~float64] struct{ Low, High T }

// Contains reports whether v lies in r, ends included.
func (r Range[T]) Contains(v T) bool { return r.Low <= v && v <= r.High }

// Toleranced is a nominal value with a symmetrical relative tolerance,
// such as 230 V ± 10 %.
type Toleranced[T ~float64] struct {
	Nominal T
	Plus    Ratio // 0.1 for ± 10 %
}

// Low returns the smallest value inside the tolerance.
func (t Toleranced[T]) Low() T { return T(float64(t.Nominal) * (1 - float64(t.Plus))) }

// High returns the largest value inside the tolerance.
func (t Toleranced[T]) High() T { return T(float64(t.Nominal) * (1 + float64(t.Plus))) }

// WireSize is a conductor size as a practitioner writes it: "1.5 mm²" or "16 AWG".
type WireSize struct {
	Area  SquareMM // for a gauge: the area of ASTM B258
	Gauge string   // "16", "4/0"; empty for a metric size
}

// Rating is a voltage and a current given together, such as "24 V 0.5 A".
type Rating struct {
	Volt   Volt
	Ampere Ampere
}
