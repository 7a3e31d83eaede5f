package sizing

import (
	"math"

	"gloamwright/internal/quantity"
)

// Allowance for cutting, and the step to which lengths are rounded up (common
// practice, no source).
const (
	cuttingAllowance = 0.03
	cuttingStepMetre = 0.5 // m
	cuttingStepFoot  = 1.0 // ft
)

// SpareLinks is how many spare fuse-links of each class and rating are kept (common
// practice, no source).
const SpareLinks = 2

// CuttingStep is the step to which the lengths of a job are rounded up, in its unit.
func CuttingStep(lengths quantity.LengthUnit) float64 {
	if lengths == quantity.InFeet {
		return cuttingStepFoot
	}
	return cuttingStepMetre
}

// Drawn returns the length to draw from the store for pieces of a length together.
func Drawn(length quantity.Metre, lengths quantity.LengthUnit) quantity.Metre {
	const rounding = 1e-9
	step := CuttingStep(lengths)
	return lengths.Metres(math.Ceil(lengths.Of(length)*(1+cuttingAllowance)/step-rounding) * step)
}

// moneyStep is what a line of a bill is rounded to: a hundredth of the currency.
const moneyStep = 100

// LineCost returns the price of a line of a bill, rounded to a hundredth as a person
// who adds up the lines would have it.
func LineCost(each, quantity float64) float64 { return math.Round(each*quantity*moneyStep) / moneyStep }
