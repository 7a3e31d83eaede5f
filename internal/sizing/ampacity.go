package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// AmpacityInput states how a cable is laid.
type AmpacityInput struct {
	Table   *catalogue.AmpacityTable
	Size    quantity.WireSize
	Ambient quantity.Celsius
	Grouped int // loaded circuits run together, itself counted; 0 means 1
}

// Ampacity returns the current I_z that a cable carries continuously: the table's
// row for its size times the factors for ambient temperature and grouping
// (IEC 60364-5-52, or NFPA 70 for gauges).
func Ampacity(in AmpacityInput) (quantity.Ampere, Working, error) {
	grouped := max(in.Grouped, 1)
	row, ok := in.Table.Current(in.Size)
	if !ok {
		return 0, Working{}, &UnknownError{
			What:   fmt.Sprintf("the ampacity of %v", in.Size),
			Source: in.Table.Name + " does not list that size",
			Ask:    "take a size that the table lists",
		}
	}
	ka, err := in.Table.AmbientFactor(in.Ambient)
	if err != nil {
		return 0, Working{}, &UnknownError{What: "the ampacity at that temperature", Source: err.Error(), Ask: "run the cable where it is cooler"}
	}
	kg, err := in.Table.GroupFactor(grouped)
	if err != nil {
		return 0, Working{}, &UnknownError{What: "the ampacity of so many cables together", Source: err.Error(), Ask: "run the cables apart"}
	}
	iz := row.Current * quantity.Ampere(ka) * quantity.Ampere(kg)
	return iz, Working{
		Name:        "ampacity",
		Formula:     "I_z = I_table × k_ambient × k_group",
		Substituted: join("×", num(float64(row.Current), "A"), num(float64(ka), ""), num(float64(kg), "")),
		Value:       float64(iz), Unit: "A",
		Source: fmt.Sprintf("%s; %s; %s", row.Evidence, in.Table.AmbientEvi, in.Table.GroupEvi),
	}, nil
}
