package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// lampHigh finds lamps that get more than their working voltage.
var lampHigh = &Check{
	Name:  "lamp-high",
	Title: "lamp above its working voltage",
	Doc: "In no condition, lit on purpose or not, may a lamp get more than the high end of its working range: it can fail at once. " +
		"Boost and float voltages are what usually does it. Take a lamp of a wider range or lower the charging voltage.",
	Source: "the lamp's working range in the description; voltages from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, l := range f.Luminaires {
			high := l.Works.High
			worst := -1
			for i, v := range l.Volts {
				if over(v, high) && (worst < 0 || v > l.Volts[worst]) {
					worst = i
				}
			}
			if high <= 0 || worst < 0 {
				continue
			}
			v, bound := pair(l.Volts[worst], high)
			other := fmt.Sprintf("a charging voltage lower by %s", sayUp(l.Volts[worst]-high))
			if l.Volts[worst] > high*quantity.Volt(chargingSpan) {
				other = fmt.Sprintf("a battery of a lower nominal voltage than %s", say(f.Site.Duty.Nominal.Val))
			}
			report(Finding{
				Severity: Stop, Subject: l.Part.Designation, At: l.Part.At,
				Message: fmt.Sprintf("%s: %s at the lamp in “%s”; it works to %s",
					title(l.Part.Designation, l.Circuit), v, strings.ToLower(f.Conditions[worst].Name), bound),
				Remedy: fmt.Sprintf("A lamp that works to %s, or %s.", sayUp(l.Volts[worst]), other),
				Value:  float64(l.Volts[worst]), Limit: float64(high), Unit: "V",
			})
		}
	},
}

// chargingSpan is how far above its working range a lamp may be and still be helped by a
// lower charging voltage: from boost down to the resting voltage of a full lead-acid
// cell it is 2.40 V to 2.13 V (IEC 60896-22 guide values, from memory).
const chargingSpan = 2.40 / 2.13
