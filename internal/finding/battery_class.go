package finding

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// classOf returns the battery's class; nil if the job has no battery of a known class.
func classOf(f *facts.Facts) *catalogue.BatteryClass {
	if f.Battery.Part == nil {
		return nil
	}
	return catalogue.BatteryClassOf(f.Battery.Class)
}

// whole returns a cell voltage for the whole battery.
func whole(f *facts.Facts, cell quantity.Volt) quantity.Volt {
	return cell * quantity.Volt(f.Battery.Series)
}

// floatAt returns the float voltage that the class asks for at a temperature, for the
// whole battery.
func floatAt(f *facts.Facts, c *catalogue.BatteryClass, t quantity.Celsius) quantity.Volt {
	return whole(f, c.ChargeVolt(c.Float, t))
}
