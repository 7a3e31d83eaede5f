package published

import (
	"fmt"
	"math"
	"strings"

	"gloamwright/internal/network"
)

func cells(n int, emf, ohm float64) string {
	var b strings.Builder
	below := "0"
	for k := range n {
		at := fmt.Sprintf("c%d", k+1)
		fmt.Fprintf(&b, "G%d battery %s %s emf=%g ohm=%g\n", k+1, at, below, emf, ohm)
		below = at
	}
	return b.String()
}

func parallelCells(n int, emf, ohm float64) string {
	var b strings.Builder
	for k := range n {
		fmt.Fprintf(&b, "G%d battery p 0 emf=%g ohm=%g\n", k+1, emf, ohm)
	}
	return b.String()
}

// uniform is a distributor of n metres with the load of each metre in its middle.
func uniform(n int, volt, ohmPerMetre, amperePerMetre float64) string {
	var b strings.Builder
	fmt.Fprintf(&b, "V1 source n0 0 volt=%g\n", volt)
	for k := range n {
		fmt.Fprintf(&b, "W%da conductor n%d m%d ohm=%g\nE%d constant-current m%d 0 ampere=%g\nW%db conductor m%d n%d ohm=%g\n",
			k, k, k, ohmPerMetre/2, k, k, amperePerMetre, k, k, k+1, ohmPerMetre/2)
	}
	return b.String()
}

// bias is a circuit that ends in transistor Q1, with 0.7 V at the given collector
// current, and the gain.
func bias(ampere, beta float64, text string) string {
	return text + fmt.Sprintf(" is=%g bf=%g\n", ampere/math.Expm1(0.7/network.VT25), beta)
}

func adjustable(upper, lower, iadj float64) string {
	return fmt.Sprintf(`V1 source in 0 volt=25
U1 regulator in out adj iadj=%g
R1 resistor out adj ohm=%g
R2 resistor adj 0 ohm=%g
RL resistor out 0 ohm=100`, iadj, upper, lower)
}
