package describe

import "strings"

// ownExamples shows how a required key of the sections is written.
var ownExamples = map[string]string{
	"gloamwright": "gloamwright: 1",
	"job":         "job: {number: JB-1, title: Standby lighting}",
	"number":      "number: JB-1",
	"title":       "title: Standby lighting",
	"duty":        "duty: {nominal: 24 V, outage: 3 h}",
	"nominal":     "nominal: 24 V",
	"outage":      "outage: 3 h",
	"luminaires":  "luminaires: {lamp: {kind: led-driver, power: 6 W, works: 18 V..32 V}}",
	"circuits":    "circuits: [{name: Stair, board: board, lit: outage-night, points: [9 m lamp]}]",
	"points":      "points: [9 m lamp at door, 4 m lamp]",
	"leg":         "leg: 9 m",
}

// typeExamples shows how a value of a type is written.
var typeExamples = map[Type]string{
	Voltage: "24 V", Current: "300 mA", Power: "6 W", Length: "9 m", Size: "1.5 mm²", Temperature: "-5 °C", Duration: "4 h", Illuminance: "10 lx",
	Flux: "600 lm", Resistance: "4.7 kΩ", Capacitance: "47 µF", Capacity: "55 Ah", Percent: "5 %", ThermalRes: "3 K/W", Count: "8", Bool: "yes",
	VoltageRange: "18 V..32 V", TemperatureRange: "5 °C..30 °C", Mains: "230 V ± 10 %", VoltAmp: "24 V 0.5 A", Curve: `["20 h 55 Ah", "5 h 47 Ah"]`,
}

// ownRemedy says how the missing key of a section is written.
func ownRemedy(key string) string {
	if key == "stages" {
		return " Start from a ready one: gloamwright new."
	}
	if x, ok := ownExamples[key]; ok {
		return " Such as " + x
	}
	return ""
}

// fieldRemedy says what the missing key of a kind is and how it is written.
func fieldRemedy(fields []Field) func(key string) string {
	return func(key string) string {
		for _, f := range fields {
			if f.Name != key {
				continue
			}
			s := " " + strings.TrimSuffix(f.Doc, ".") + "."
			if len(f.Choices) > 0 {
				return s + " Choices: " + listed(f.Choices) + "."
			}
			if x := typeExamples[f.Type]; x != "" {
				s += " Such as " + key + ": " + x
			}
			return s
		}
		return ownRemedy(key)
	}
}
