package finding

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
)

// batteryVented warns of cells that hold free electrolyte.
var batteryVented = &Check{
	Name:  "battery-vented",
	Title: "vented cells",
	Doc: "Vented cells give off hydrogen and carry free acid or lye: never in a sealed box or a room where people sleep, " +
		"upright, in a tray, with eye protection at hand, and topped up with purified water.",
	Source: "IEC 62485-2 clauses 7 and 10 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := classOf(f)
		if c == nil || c.GasFloat < ventedGas {
			return
		}
		b := f.Battery
		report(Finding{
			Severity: Caution, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: vented cells, %g mA of gas current for each Ah at float", title(b.Part.Designation, b.ClassName), c.GasFloat),
			Remedy: fmt.Sprintf("A tray and an enclosure with air; valve-regulated cells gas with %g mA for each Ah.",
				catalogue.VRLAAGM.GasFloat),
			Value: c.GasFloat, Limit: ventedGas, Unit: "mA/Ah",
		})
	},
}

// ventedGas is the gas current from which a class counts as vented: table 1 of
// IEC 62485-2 gives 1 mA per Ah for valve-regulated and 5 for vented cells.
const ventedGas = 5
