package finding

import (
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// fuseTitle returns how messages about a fuse begin: "-F103, Boathouse".
func fuseTitle(x *facts.Fuse) string { return title(x.Part.Designation, x.Feeds) }

// spare reports whether the fuse stands in a way on which nothing hangs.
func spare(x *facts.Fuse) bool { return x.Way != nil && x.Way.Spare() }

// opensFrom returns the least current at which a fuse of the same class and of that
// rating surely opens within a time; ok is false where its standard promises none.
func opensFrom(x *facts.Fuse, rating quantity.Ampere, within quantity.Second) (a quantity.Ampere, ok bool) {
	if x.Class == nil {
		return 0, false
	}
	a, _, err := sizing.CurrentToOpen(x.Class, rating, within)
	return a, err == nil
}

// nextFuse prints the least rating of the fuse's class that carries its load within the
// load factor; the bare figure where the class is unknown or has none.
func nextFuse(f *facts.Facts, x *facts.Fuse) string {
	need := quantity.Ampere(float64(x.Design) / loadFactor(f))
	if x.Class != nil {
		return nextRated(x.Class.Ratings, need)
	}
	return sayUp(need)
}
