package sizing

import (
	"gloamwright/internal/quantity"
)

// Cells is a battery of like cells in rows.
type Cells struct {
	Source   quantity.Volt // electromotive force of one cell
	Internal quantity.Ohm  // of one cell
	Series   int
	Parallel int
}

// Whole returns the electromotive force and internal resistance of the battery
// (circuit textbooks).
func (c Cells) Whole() (quantity.Volt, quantity.Ohm) {
	return c.Source * quantity.Volt(c.Series), c.Internal * quantity.Ohm(c.Series) / quantity.Ohm(c.Parallel)
}

// Terminal returns current and terminal voltage of a source with internal resistance
// that feeds a load (circuit textbooks).
func Terminal(source quantity.Volt, internal, load quantity.Ohm) (quantity.Ampere, quantity.Volt) {
	i := float64(source) / float64(internal+load)
	return quantity.Ampere(i), quantity.Volt(i * float64(load))
}

// InternalFrom returns the internal resistance of a source from its electromotive
// force and its terminal voltage under a current: the commissioning measurement.
func InternalFrom(source, terminal quantity.Volt, current quantity.Ampere) quantity.Ohm {
	return quantity.Ohm(float64(source-terminal) / float64(current))
}

// Efficiency returns the ampere-hour and watt-hour efficiency of a cell from a
// discharge and the charge that restores it (battery textbooks).
func Efficiency(out, in Cycle) (ah, wh quantity.Ratio) {
	ah = quantity.Ratio(out.charge() / in.charge())
	return ah, ah * quantity.Ratio(out.Volt/in.Volt)
}

// Cycle is one constant-current discharge or charge.
type Cycle struct {
	Current quantity.Ampere
	Time    quantity.Second
	Volt    quantity.Volt // mean
}

func (c Cycle) charge() float64 { return float64(c.Current) * c.Time.Hours() }
