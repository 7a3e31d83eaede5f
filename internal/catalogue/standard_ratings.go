package catalogue

import "gloamwright/internal/quantity"

// The ratings in which packaged units are sold. Common practice, no source: makers
// differ, and `practice` can state the firm's own stock.
var (
	// ChargerCurrents are output currents of packaged battery chargers.
	ChargerCurrents = []quantity.Ampere{0.5, 0.8, 1, 1.5, 2, 3, 4, 5, 6, 8, 10, 12, 15, 20, 25, 30, 40, 50, 60, 80, 100}
	// SupplyCurrents are output currents of regulated mains supplies.
	SupplyCurrents = []quantity.Ampere{0.1, 0.2, 0.3, 0.5, 0.8, 1, 1.25, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 15, 20, 25, 30, 40}
	// TransformerRatings are ratings of safety transformers in VA.
	TransformerRatings = []float64{3, 5, 6, 10, 12, 15, 20, 25, 30, 40, 50, 60, 63, 80, 100, 120, 160, 200, 250, 320, 400, 500}
	// CutOffCurrents are ratings of low-voltage disconnect modules.
	CutOffCurrents = []quantity.Ampere{3, 5, 10, 15, 20, 30, 40, 60, 80, 100, 150, 200, 300}
	// IsolatorCurrents are ratings of DC isolators.
	IsolatorCurrents = []quantity.Ampere{16, 20, 25, 32, 40, 63, 80, 100, 125, 160, 200, 250, 315, 400}
	// ResistorWatts are power ratings of resistors.
	ResistorWatts = []quantity.Watt{0.25, 0.5, 1, 2, 3, 5, 7, 10, 15, 20, 25, 50}
)

// NextRating returns the smallest entry of list that is at least v; ok is false if
// none is. The list ascends.
func NextRating[T ~float64](list []T, v T) (rating T, ok bool) {
	for _, r := range list {
		if r >= v*(1-seriesSlack) {
			return r, true
		}
	}
	return 0, false
}
