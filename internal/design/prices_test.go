package design_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/sizing"
	"gloamwright/internal/stage"
)

// shop is a small site at 24 V: a charger, one board with two circuits of driver lamps.
// Without prices it takes 1 mm² throughout, 1 A fuses before both circuits, a battery
// of one string.
const shop = `gloamwright: 1
job: {number: T-1, title: Trial, client: Nobody, site: Bench, prepared: N. N., revision: A, date: 2026-12-01}
practice:
  currency: EUR
  prices: {%s}
duty: {nominal: 24 V, outage: 4 h, recharge: 24 h, battery_room: 15 °C..25 °C, cable_ambient: 30 °C}
stages:
  charger: {kind: charger, to: store, mains: 230 V ± 10 %%}
  store: {kind: battery, cells: vrla-agm, fuse: 7.5 A}
  guard: {kind: low-voltage-disconnect, from: store}
  board: {kind: distribution-board, from: guard, ways: 3}
luminaires:
  lamp: {kind: led-driver, power: 4 W, works: 18 V..32 V}
circuits:
  - {name: Hall, board: board, lit: outage, points: [5 m lamp, 3 m lamp]}
  - {name: Yard, board: board, lit: outage, points: [20 m lamp, 10 m lamp at gate]}
`

func priced(t *testing.T, prices ...string) *design.Design {
	t.Helper()
	site, list := describe.Parse("shop.yaml", []byte(fmt.Sprintf(shop, strings.Join(prices, ", "))), stage.Schema())
	if list.HasErrors() {
		t.Fatal(list.Render(site.Sources))
	}
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

// reasons lists what the firm's prices decided, as subject and name of a working.
func reasons(d *design.Design) []string {
	var out []string
	for _, w := range d.Workings {
		if w.Source == sizing.FirmPrices {
			out = append(out, w.Name)
		}
	}
	return out
}

// chosen says what of the shop prices can move.
func chosen(d *design.Design) string {
	s := fmt.Sprintf("battery %d of %v, charger %v, cut-off %v;", d.Battery.Blocks*d.Battery.Parallel, d.Battery.Capacity, d.Charger.Current, d.CutOff.Rated)
	for _, f := range d.Fuses {
		if f.Way != nil {
			s += fmt.Sprintf(" %s %v %v;", f.Feeds, f.Rating, f.CableSize)
		}
	}
	return s
}

// TestPricesChoose: for each sort of thing, the cheapest that fits is taken; where the
// price of what would be taken without prices is missing, that is taken and named.
func TestPricesChoose(t *testing.T) {
	plain := chosen(priced(t))
	without := "battery 2 of 7 Ah, charger 500 mA, cut-off 3 A; Hall 1 A 1 mm²; Yard 1 A 1 mm²;"
	if plain != without {
		t.Fatalf("without prices: %s", plain)
	}
	const metal = "1 mm²: 0.60, 1.5 mm²: 0.80, 2.5 mm²: 1.20"
	for _, c := range []struct {
		name, prices string
		moves        []string // pairs: what stands without prices, what in its place
		missing      string
		reason       string // name of a working
	}{
		{"a larger charger is cheaper", "charger 24 V 0.5 A: 60, charger 24 V 0.8 A: 52, charger 24 V 1 A: 55", []string{"charger 500 mA", "charger 800 mA"}, "", "least price"},
		{"a rating that is no standard one", "charger 24 V 0.5 A: 60, charger 24 V 0.7 A: 40", []string{"charger 500 mA", "charger 700 mA"}, "", "least price"},
		{"chargers of another voltage", "charger 12 V 1 A: 1", nil, "charger 24 V 0.5 A", ""},
		{"the least charger has no price", "charger 24 V 0.8 A: 1", nil, "charger 24 V 0.5 A", ""},
		{"a charger that the battery does not stand", "charger 24 V 0.5 A: 60, charger 24 V 5 A: 1", nil, "", ""},
		{"a larger cut-off is cheaper", "low-voltage-disconnect 3 A: 30, low-voltage-disconnect 5 A: 20", []string{"cut-off 3 A", "cut-off 5 A"}, "", "least price"},
		{"a larger block is cheaper", "block vrla-agm 12 V 7 Ah: 20, block vrla-agm 12 V 12 Ah: 19", []string{"2 of 7 Ah", "2 of 12 Ah"}, "", "least price"},
		{"two strings are cheaper than one", "block vrla-agm 12 V 7 Ah: 20, block vrla-agm 12 V 4 Ah: 9", []string{"2 of 7 Ah", "4 of 8 Ah"}, "", "least price"},
		{"a block without a price", "block vrla-agm 12 V 12 Ah: 1", nil, "block vrla-agm 12 V 7 Ah", ""},
		{"a thicker cable is cheaper", "1 mm²: 0.60, 1.5 mm²: 0.50", []string{"1 mm²", "1.5 mm²"}, "", "cost of cable"},
		{"the cable of the least copper has no price", "1.5 mm²: 0.50", nil, "1 mm²", ""},
		{"a thicker cable is cheaper by less than its terminals", "1 mm²: 0.60, 1.5 mm²: 0.59, terminal 1 mm²: 1, terminal 1.5 mm²: 1.10", []string{"Yard 1 A 1 mm²", "Yard 1 A 1.5 mm²"}, "", "cost of cable"},
		{"a terminal has no price", "1 mm²: 0.60, 1.5 mm²: 0.59, terminal 0.75 mm²: 1", []string{"1 mm²", "1.5 mm²"}, "terminal 1 mm²", "cost of cable"},
		{"a thicker cable is cheaper by less than its wires", "1 mm²: 0.60, 1.5 mm²: 0.59, wire 1 mm²: 0.10, wire 1.5 mm²: 0.40", []string{"Yard 1 A 1 mm²", "Yard 1 A 1.5 mm²"}, "", "cost of cable"},
		{"a larger fuse is cheaper", metal + ", fuse blade 1 A: 3, fuse blade 2 A: 2", []string{" 1 A 1 mm²", " 2 A 1 mm²"}, "", "fuse rating by price"},
		{"too large a fuse is cheaper", metal + ", fuse blade 1 A: 3, fuse blade 30 A: 1", nil, "", "cost of cable"},
		{"a fuse without a price", metal + ", fuse blade 2 A: 2", nil, "fuse blade 1 A", "cost of cable"},
		{"fuses without conductors", "fuse blade 1 A: 3, fuse blade 2 A: 2", nil, "", ""},
		{"prices of what is added up only", "luminaire lamp: 10, resistor: 0", nil, "", ""},
	} {
		d := priced(t, c.prices)
		want := strings.NewReplacer(c.moves...).Replace(without)
		if got := chosen(d); got != want {
			t.Errorf("%s:\n got %s\nwant %s", c.name, got, want)
		}
		missing := ""
		for _, m := range d.Unpriced {
			missing += m.Name
		}
		if missing != c.missing {
			t.Errorf("%s: missing %q, want %q", c.name, missing, c.missing)
		}
		if r := reasons(d); c.reason == "" && len(r) > 0 || c.reason != "" && !slices.Contains(r, c.reason) {
			t.Errorf("%s: reasons %q, want %q", c.name, r, c.reason)
		}
		checkWorkings(t, d)
	}
}

// TestBill adds up a bill by hand.
func TestBill(t *testing.T) {
	if d := priced(t); d.Bill != nil {
		t.Error("a bill without prices")
	}
	d := priced(t, "1 mm²: 0.62", "luminaire lamp: 38.00", "fuse blade 1 A: 3.12", "fuse-link blade 1 A: 0.30", "fuse-holder blade: 0",
		"block vrla-agm 12 V 7 Ah: 21", "enclosure Main cabinet: 85", "distribution-board 3 ways: 6")
	// Cables of 1 mm²: 38 m of two circuits and 2 m from the battery are with 3 % for
	// cutting 41.2 m, drawn as 41.5 m.
	hand := map[string]float64{
		"1 mm²": 25.73, "luminaire lamp": 152, "fuse-link blade 1 A": 0.60, "fuse-holder blade": 0, "block vrla-agm 12 V 7 Ah": 42,
		"enclosure Main cabinet": 85, "distribution-board 3 ways": 6, "fuse blade 1 A": 3.12 * 3, // both circuits and the charger
	}
	total := 0.0
	for _, l := range d.Bill.Lines {
		want, ok := hand[l.Name]
		if ok != l.Priced || math.Abs(l.Cost-want) > 0.005001 {
			t.Errorf("%s: %v of %v at %v make %v, by hand %v", l.Name, l.Quantity, l.Unit, l.Each, l.Cost, want)
		}
		if delete(hand, l.Name); ok {
			total += want
		} else if !slices.Contains(d.Bill.Without, l.Name) {
			t.Errorf("%s has no price, and nothing says so", l.Name)
		}
	}
	if len(hand) > 0 || math.Abs(total-d.Bill.Total) > 0.01 {
		t.Errorf("total %v, by hand %v; not billed: %v", d.Bill.Total, total, hand)
	}
	if got := d.Bill.Sum(d.Bill.Total); got != "320.69 EUR" {
		t.Errorf("printed as %s", got)
	}
}

// TestBillInFeet: on a job in feet conductors are priced and drawn by the foot.
func TestBillInFeet(t *testing.T) {
	src := strings.Replace(fmt.Sprintf(shop, "18 AWG: 0.20, 14 AWG: 0.15"), "  currency: EUR", "  currency: EUR\n  conductors: awg", 1)
	site, list := describe.Parse("shop.yaml", []byte(src), stage.Schema())
	if list.HasErrors() {
		t.Fatal(list.Render(site.Sources))
	}
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	checkWorkings(t, d)
	feet := 0.0
	for _, c := range d.Circuit.Cables {
		if c.Circuit != "" && c.Size.String() != "14 AWG" {
			t.Errorf("%s has %v, 14 AWG is cheaper", c.Designation, c.Size)
		}
		if c.Size.String() == "14 AWG" {
			feet += float64(c.Length) / 0.3048 // ISO 80000-3: 1 ft = 0.3048 m
		}
	}
	for _, l := range d.Bill.Lines {
		if l.Name == "14 AWG" && (l.Unit != "ft" || l.Quantity != math.Ceil(feet*1.03) || math.Abs(l.Cost-0.15*l.Quantity) > 0.005001) {
			t.Errorf("%v %s for %v, by hand %v ft", l.Quantity, l.Unit, l.Cost, math.Ceil(feet*1.03))
		}
	}
}
