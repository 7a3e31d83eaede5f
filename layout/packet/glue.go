package packet

import (
	"regexp"
	"strings"
)

const noBreak = "\u00A0"

// gluing lists what must not be parted at the end of a line.
var gluing = []struct {
	at *regexp.Regexp
	to string
}{
	// number and unit
	{regexp.MustCompile(`(\d) (mm²|cm²|m³/h|mm|km|m|V|kA|mA|A|Ah|kΩ|MΩ|mΩ|Ω|kW|mW|W|°C|K/W|K|%|lx|lm|Nm|h|min|s|ms|days|day|hours|hour|AWG|pc|lb|kg|µF|nF|mF)([\s,.;:)/]|$)`), "${1}" + noBreak + "${2}${3}"},
	// signs
	{regexp.MustCompile(`([≤≥±×÷]) `), "${1}" + noBreak},
	{regexp.MustCompile(` ([×])`), noBreak + "${1}"},
	{regexp.MustCompile(`\bDC (\d)`), "DC" + noBreak + "${1}"},
	// word and number
	{regexp.MustCompile(`\b([Ss]heets?|[Ll]ines?|[Bb]locks?|[Cc]onditions?|[Pp]laces?|[Rr]evision|[Hh]old point) ([A-Z]?\d|[A-Z]\b)`), "${1}" + noBreak + "${2}"},
	// thousands
	{regexp.MustCompile(`(\d) (\d{3})\b`), "${1}" + noBreak + "${2}"},
}

// glue puts no-break spaces where a line must not end.
func glue(text string) string {
	if !strings.Contains(text, " ") {
		return text
	}
	for _, g := range gluing {
		text = g.at.ReplaceAllString(text, g.to)
	}
	return text
}
