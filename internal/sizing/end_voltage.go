package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// EndInput states what the lamps need and what the way to them drops.
type EndInput struct {
	Class *catalogue.BatteryClass
	Cells int
	Lamp  quantity.Volt // lowest voltage at which the lamps work
	Drop  quantity.Volt // from the battery to the farthest lamp, at most
}

// EndOfDischarge returns the battery voltage at which a discharge must stop: that of
// the class, or what keeps the farthest lamp in its working range with the drop taken
// off, whichever is higher (IEEE 485 clause 5: minimum system voltage plus cable
// drop, divided by the cells).
func EndOfDischarge(in EndInput) (quantity.Volt, Working) {
	class := in.Class.EndVolt * quantity.Volt(in.Cells)
	lamp := in.Lamp + in.Drop
	v := max(class, lamp)
	return v, Working{
		Name: "end of discharge", Formula: "U_end = max(n × u_end ; U_lamp + ΔU)",
		Substituted: fmt.Sprintf("max(%d × %s ; %s + %s)", in.Cells, num(float64(in.Class.EndVolt), "V"), num(float64(in.Lamp), "V"), num(float64(in.Drop), "V")),
		Value:       float64(v), Unit: "V", Source: "IEEE 485 clause 5 (from memory); " + in.Class.Evidence.String(),
	}
}

// CutOffInput states the battery that a low-voltage disconnect saves.
type CutOffInput struct {
	Class    *catalogue.BatteryClass
	Cells    int
	End      quantity.Volt  // end of discharge of the sizing, at the battery
	Drop     quantity.Volt  // between battery and sense point when it is loaded
	Reserve  quantity.Volt  // how far Drop and the end of discharge may be off
	Accuracy quantity.Ratio // of the module's settings, both ways
}

// CutOff returns the voltages at which a low-voltage disconnect opens and recloses,
// as set at its sense point: it must never open before the end of discharge that the
// battery was sized for, so it opens below that by its own accuracy and the reserve, and never below
// the class's lowest end voltage; it recloses at the class's reclosing voltage, which
// a resting empty battery does not reach by itself (common practice).
func CutOff(in CutOffInput) (opens, recloses quantity.Volt, w []Working, err error) {
	n := quantity.Volt(in.Cells)
	o := (in.End - in.Drop - in.Reserve) / quantity.Volt(1+in.Accuracy)
	r := in.Class.Recloses * n
	w = []Working{{
		Name: "cut-off opens", Formula: "U_open = (U_end − ΔU − U_reserve) ÷ (1 + accuracy)",
		Substituted: fmt.Sprintf("(%s − %s − %s) ÷ (1 + %s)", num(float64(in.End), "V"),
			num(float64(in.Drop), "V"), num(float64(in.Reserve), "V"), num(float64(in.Accuracy), "")),
		Value: float64(o), Unit: "V", Source: "common practice; " + in.Class.Evidence.String(),
	}, {
		Name: "cut-off recloses", Formula: "U_reclose = n × u_reclose",
		Substituted: fmt.Sprintf("%d × %s", in.Cells, num(float64(in.Class.Recloses), "V")),
		Value:       float64(r), Unit: "V", Source: "common practice",
	}}
	if least := in.Class.LowestEnd * n; (o*quantity.Volt(1-in.Accuracy))+in.Drop < least*(1-slack) {
		err = &BlockedError{
			Limit: LimitVoltage, Subject: "the battery voltage at which the cut-off opens", Value: float64(o*quantity.Volt(1-in.Accuracy) + in.Drop),
			Bound: float64(least), Unit: "V", Frees: "shorten the wire to the sense point, or take a more accurate module",
		}
	}
	return o, r, w, err
}
