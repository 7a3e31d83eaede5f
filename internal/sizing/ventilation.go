package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// VentilationInput states a battery in a room or box.
type VentilationInput struct {
	Class    *catalogue.BatteryClass
	Cells    int
	Capacity quantity.AmpereHour // of the whole battery
	Boost    bool                // charged at boost voltage
	Charger  quantity.Ampere     // rated current; 0: leaves out what a failed charger sets free
}

// Air is what a battery needs against its hydrogen.
type Air struct {
	Flow    float64 // m³/h
	Opening float64 // cm² free, in and out each, by natural draught
}

// Constants of IEC 62485-2 clause 7: dilution below 4 % by volume, hydrogen per
// ampere-hour, safety factor; the factor of the opening. Read on pages that
// reproduce them.
const (
	airFactor     = 0.05 // 24 × 0.42·10⁻³ m³/Ah × 5
	openingFactor = 28   // cm² per m³/h at 0.1 m/s
)

const airSource = "IEC 62485-2 clause 7"

// Ventilation returns the air flow that keeps hydrogen below its limit,
// Q = 0.05 × n × I_gas × C ÷ 1000, and the free opening A = 28 × Q at the bottom and at
// the top of the room or box (IEC 62485-2 clause 7). Sealed classes without a gas
// current need none by this rule.
func Ventilation(in VentilationInput) (Air, []Working) {
	gas, state := in.Class.GasFloat, "float"
	if in.Boost {
		gas, state = in.Class.GasBoost, "boost"
	}
	q := airFactor * float64(in.Cells) * gas * float64(in.Capacity) / 1000
	a := Air{Flow: q, Opening: openingFactor * q}
	ws := []Working{{
		Name: "air flow, " + state + " charge", Formula: "Q = 0.05 × n × I_gas × C ÷ 1000",
		Substituted: fmt.Sprintf("0.05 × %d × %s × %s ÷ 1000", in.Cells, num(gas, "mA/Ah"), num(float64(in.Capacity), "Ah")),
		Value:       q, Unit: "m³/h", Source: airSource + "; I_gas: " + gasSource(in.Class),
	}, {
		Name: "free opening", Formula: "A = 28 × Q", Substituted: "28 × " + num(q, "m³/h"),
		Value: a.Opening, Unit: "cm²", Source: airSource, Uses: []string{"air flow, " + state + " charge"},
	}}
	if in.Charger > 0 && in.Class.GasEvi.Source != "" {
		_, w := Hydrogen(in.Cells, in.Charger)
		w.Name = "hydrogen if the whole charger current gasses"
		ws = append(ws, w)
	}
	return a, ws
}

func gasSource(c *catalogue.BatteryClass) string {
	if c.GasEvi.Source == "" {
		return "the class gives off none in normal service"
	}
	return c.GasEvi.String()
}

// hydrogenAh is the hydrogen that one ampere-hour of overcharge sets free in one
// cell, in m³ at 25 °C: 1.27·10⁻⁷ m³/s per ampere (UFC 3-520-01, read).
const hydrogenAh = 1.27e-7 * quantity.SecondsPerHour

// Hydrogen returns the hydrogen of n cells that are overcharged with a current, in
// m³/h at 25 °C (UFC 3-520-01: 1.27·10⁻⁷ m³/s per ampere and cell).
func Hydrogen(n int, i quantity.Ampere) (float64, Working) {
	v := hydrogenAh * float64(n) * float64(i)
	return v, Working{
		Name: "hydrogen", Formula: "q = q_Ah × n × I",
		Substituted: fmt.Sprintf("%s × %d × %s", num(hydrogenAh, "m³/Ah"), n, num(float64(i), "A")),
		Value:       v, Unit: "m³/h", Source: "UFC 3-520-01",
	}
}
