package results

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"slices"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// withBill is the small design with prices: both lamps at 38, the cable at 0.62 a metre,
// two spare links at 0.30, an enclosure; the battery has no price.
func withBill() *design.Design {
	d := handmade()
	b := &facts.Bill{Currency: "EUR", Total: 173.07, Without: []string{"block vrla-agm 12 V 33 Ah"}, ByPart: map[*circuit.Part]*facts.BillLine{}}
	add := func(l *facts.BillLine) {
		b.Lines = append(b.Lines, l)
		for _, p := range l.Parts {
			b.ByPart[p] = l
		}
	}
	of := func(kind circuit.Kind) (out []*circuit.Part) {
		for _, p := range d.Circuit.Parts {
			if p.Kind == kind {
				out = append(out, p)
			}
		}
		return out
	}
	add(&facts.BillLine{Name: "block vrla-agm 12 V 33 Ah", Parts: of(circuit.Battery), Quantity: 2, Unit: "pc"})
	add(&facts.BillLine{Name: "luminaire lamp", Parts: of(circuit.LuminaireLamp), Quantity: 2, Unit: "pc", Each: 38, Priced: true, Cost: 76})
	add(&facts.BillLine{Name: "terminal 2.5 mm²", Parts: of(circuit.Terminal), Quantity: 1, Unit: "pc", Priced: true})
	add(&facts.BillLine{Name: "enclosure Main cabinet", Place: d.Circuit.Places[0], Quantity: 1, Unit: "pc", Each: 85, Priced: true, Cost: 85})
	add(&facts.BillLine{Name: "1.5 mm²", Cores: 2, Size: quantity.WireSize{Area: 1.5}, Colour: "RD BK", Quantity: 18.5, Unit: "m", Each: 0.62, Priced: true, Cost: 11.47})
	add(&facts.BillLine{Name: "fuse-link blade 3 A", Spare: &facts.Fuse{Class: catalogue.FuseBlade, Rating: 3}, Quantity: 2, Unit: "pc", Each: 0.3, Priced: true, Cost: 0.6})
	d.Bill = b
	d.Unpriced = []facts.Unpriced{{Name: "block vrla-agm 12 V 33 Ah", At: describe.Span{File: "site.yaml", Line: 9, Col: 5}}}
	return d
}

// TestCostFollowsTheSchema: the bill stands in results.json as the contract has it.
func TestCostFollowsTheSchema(t *testing.T) {
	js := mustJSON(t, withBill())
	v, err := jsonschema.UnmarshalJSON(bytes.NewReader(js))
	if err != nil {
		t.Fatal(err)
	}
	if err := schema(t).Validate(v); err != nil {
		t.Error(err)
	}
	var out struct{ Cost costEntry }
	if err := json.Unmarshal(js, &out); err != nil {
		t.Fatal(err)
	}
	c := out.Cost
	if c.Currency != "EUR" || *c.Total != 173.07 || len(c.Lines) != 6 || c.Lines[0].Cost != nil || *c.Lines[4].Each != 0.62 || *c.Lines[4].Quantity != 18.5 ||
		c.Missing[0].At != "site.yaml:9:5" || !slices.Equal(c.Lines[1].Designations, []string{"-E11", "-E12"}) {
		t.Errorf("cost: %+v", c)
	}
}

// TestCostInThePartsTable: each row has what is bought, at what price.
func TestCostInThePartsTable(t *testing.T) {
	var b bytes.Buffer
	if err := partsList(withBill()).Write(&b); err != nil {
		t.Fatal(err)
	}
	got, err := csv.NewReader(&b).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []string
	for _, r := range got[1:] {
		rows = append(rows, strings.Join(append([]string{r[1], r[2], r[3], r[4]}, r[8:]...), "|"))
	}
	for _, want := range []string{
		"1|piece|Battery block|33 Ah, 24 V|2||", "2|piece|Luminaire||2|38|76", "1|piece|Terminal|to 2.5 mm²|1|0|0",
		"18|m|Cable|2 × 1.5 mm², RD BK|18.5|0.62|11.47", "1|piece|Enclosure||1|85|85", "2|piece|Blade fuse, type C, spare link|3 A|2|0.3|0.6",
		"0.3|m|Wire|16 AWG, RD|||",
	} {
		if !slices.Contains(rows, want) {
			t.Errorf("no row %q in\n%s", want, strings.Join(rows, "\n"))
		}
	}
}
