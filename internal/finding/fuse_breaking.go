package finding

import (
	"errors"
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// fuseBreaking holds the breaking capacity against the prospective current.
var fuseBreaking = &Check{
	Name:  "fuse-breaking",
	Title: "fuse cannot break the short-circuit current",
	Doc: "The prospective short-circuit current at the fuse must not exceed its DC breaking capacity, or the fuse bursts and the arc goes on. " +
		"Take a fuse of a higher breaking capacity or one before it that limits the current.",
	Source: "IEC 60364-4-43 clause 434.5.1; current after IEC 61660-1",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			b := broken(x)
			if b == nil {
				continue
			}
			v, bound := pair(x.Prospective, quantity.Ampere(b.Bound))
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: short-circuit current %s, breaks %s", fuseTitle(x), v, bound),
				Remedy:  fmt.Sprintf("A fuse that breaks at least %s DC; this kind (%s) breaks %s.", sayUp(x.Prospective), x.Style, bound),
				Value:   float64(x.Prospective), Limit: b.Bound, Unit: "A",
			})
		}
	},
}

// broken returns what stands in the way where a fuse cannot break what can flow; nil if
// it can, or if its class is not known. Its voltage is another check's business.
func broken(x *facts.Fuse) *sizing.BlockedError {
	if x.Class == nil {
		return nil
	}
	var b *sizing.BlockedError
	if _, err := sizing.Breaking(sizing.BreakingInput{Class: x.Class, Rating: x.Rating, Prospective: x.Prospective}); errors.As(err, &b) {
		return b
	}
	return nil
}
