package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// FuseInput states what a fuse feeds.
type FuseInput struct {
	Class      *catalogue.FuseClass
	Stock      []quantity.Ampere // ratings to choose from, ascending; empty: all of the class
	Load       quantity.Ampere   // design current I_B
	LoadFactor quantity.Ratio    // greatest continuous load as a part of the rating; 0 means 1
	Cable      quantity.Ampere   // ampacity I_z of the cable behind it; 0: not yet chosen
}

// ChooseFuse returns the smallest rating that carries the load continuously,
// I_n ≥ I_B ÷ load factor (common practice for links in warm holders), and that the
// cable bears: I_B ≤ I_n ≤ I_z and I_2 ≤ 1.45 I_z (IEC 60364-4-43 clause 433.1).
func ChooseFuse(in FuseInput) (quantity.Ampere, Working, error) {
	k := in.LoadFactor
	if k == 0 {
		k = 1
	}
	need := in.Load / quantity.Ampere(k)
	stock := in.Stock
	if len(stock) == 0 {
		stock = in.Class.Ratings
	}
	w := Working{
		Name: "fuse rating", Formula: "I_n ≥ I_B ÷ k_load, next standard rating",
		Unit: "A", Source: "IEC 60364-4-43 clause 433.1 (from memory); load factor by practice",
	}
	rating, ok := catalogue.NextRating(stock, need)
	if !ok {
		top := stock[len(stock)-1]
		return 0, w, &BlockedError{
			Limit: LimitLoad, Subject: "the rating needed", Value: float64(need), Bound: float64(top), Unit: "A",
			Frees: fmt.Sprintf("share the load over two ways, or stay at or below %v", top*quantity.Ampere(k)),
		}
	}
	w.Value = float64(rating)
	w.Substituted = fmt.Sprintf("%s ÷ %s = %s → %s", num(float64(in.Load), "A"), num(float64(k), ""),
		num(float64(need), "A"), num(float64(rating), "A"))
	if in.Cable > 0 {
		if _, err := Coordinate(CoordinateInput{Class: in.Class, Load: in.Load, Rating: rating, Cable: in.Cable}); err != nil {
			return rating, w, err
		}
	}
	return rating, w, nil
}

// CoordinateInput states a fuse, its load and its cable.
type CoordinateInput struct {
	Class  *catalogue.FuseClass
	Load   quantity.Ampere // I_B
	Rating quantity.Ampere // I_n
	Cable  quantity.Ampere // I_z
}

// overloadFactor bounds the conventional opening current: I_2 ≤ 1.45 I_z
// (IEC 60364-4-43 clause 433.1, from memory).
const overloadFactor = 1.45

// Coordinate checks I_B ≤ I_n ≤ I_z and I_2 ≤ 1.45 I_z (IEC 60364-4-43 clause
// 433.1). The working is the greatest rating that the cable allows.
func Coordinate(in CoordinateInput) (Working, error) {
	most := CableAllows(in.Class, in.Cable)
	w := Working{
		Name:        "greatest fuse that the cable allows",
		Formula:     "I_n ≤ min(I_z ; 1.45 × I_z ÷ k₂)",
		Substituted: fmt.Sprintf("min(%s ; 1.45 × %s ÷ %s)", num(float64(in.Cable), "A"), num(float64(in.Cable), "A"), num(float64(in.Class.Conventional), "")),
		Value:       float64(most), Unit: "A",
		Source: "IEC 60364-4-43 clause 433.1 (from memory)",
	}
	switch {
	case in.Load > in.Rating:
		return w, &BlockedError{
			Limit: LimitLoad, Subject: "the load of the fuse", Value: float64(in.Load), Bound: float64(in.Rating), Unit: "A",
			Frees: fmt.Sprintf("fit a fuse of at least %v", in.Load),
		}
	case in.Rating > most*(1+slack):
		return w, &BlockedError{
			Limit: LimitOverload, Subject: "the fuse rating", Value: float64(in.Rating), Bound: float64(most), Unit: "A",
			Frees: fmt.Sprintf("take a cable that carries %v, or a fuse of at most %v", CableFor(in.Class, in.Rating), most),
		}
	}
	return w, nil
}

// slack lets equal figures that differ by rounding count as equal.
const slack = 1e-9

// CableAllows returns the greatest fuse rating of a class for a cable that carries
// iz: the lesser of I_z and 1.45 I_z ÷ k_2, where k_2 is the class's conventional
// opening current as a multiple of its rating.
func CableAllows(c *catalogue.FuseClass, iz quantity.Ampere) quantity.Ampere {
	return min(iz, iz*overloadFactor/quantity.Ampere(c.Conventional))
}

// CableFor returns the least ampacity that a cable needs behind a fuse of that class
// and rating: CableAllows turned round (IEC 60364-4-43 clause 433.1).
func CableFor(c *catalogue.FuseClass, rating quantity.Ampere) quantity.Ampere {
	return max(rating, rating*quantity.Ampere(c.Conventional)/overloadFactor)
}
