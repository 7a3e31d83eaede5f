package sizing

import "gloamwright/internal/quantity"

// DividerRatio is the part of the supply at the node between a resistor to plus and
// one to minus (voltage divider, circuit textbooks).
func DividerRatio(upper, lower quantity.Ohm) float64 { return float64(lower / (lower + upper)) }
