package describe

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Price is what the firm pays for one thing: a metre or foot of conductor, or a piece.
type Price struct {
	Of   At[string] // name of the thing, as PriceName writes it
	Cost At[float64]

	Word   string            // its first word, one of PricedThings; empty for a cable
	Size   quantity.WireSize // of a cable, wire or terminal
	Rating quantity.Rating   // of a unit that is bought by its current; Volt 0 where it is by that alone
}

// PricedThing is one sort of thing that can have a price.
type PricedThing struct {
	Word    string // the first word of its name; empty: a conductor size alone
	Follows string // what stands behind the word; empty: nothing
	Example string
	Doc     string
	// Chooses says that the price takes part in a choice; others are added up only.
	Chooses bool
	read    func(rest string, p *Price) (canonical string, err error)
}

// PricedThings lists what can have a price, in the order of the reference.
func PricedThings() []PricedThing { return slices.Clone(pricedThings) }

var pricedThings = []PricedThing{
	{"", "a conductor size", "1.5 mm²", "A metre of two-core cable, a foot where the job's lengths are in feet.", true, priceOfSize},
	{"wire", "a conductor size", "wire 1.5 mm²", "A metre or foot of single wire in an enclosure.", true, priceOfSize},
	{"terminal", "a conductor size", "terminal 4 mm²", "One terminal that takes conductors up to that size. A conductor gets the cheapest that takes it.", true, priceOfSize},
	{"fuse", "a class and a rating", "fuse blade 2 A", "A fuse-link with its holder.", true, priceOfFuse},
	{"fuse-holder", "a class", "fuse-holder blade", "The holder of a spare way.", false, priceOfClass},
	{"fuse-link", "a class and a rating", "fuse-link blade 2 A", "A fuse-link alone, kept as a spare.", false, priceOfFuse},
	{"block", "cells, volts and capacity", "block vrla-agm 12 V 55 Ah", "A battery block of the standard list.", true, priceOfBlock},
	{"charger", "volts and amperes", "charger 24 V 3 A", "A packaged charger.", true, priceOfRating},
	{"regulated-supply", "volts and amperes", "regulated-supply 24 V 0.5 A", "A packaged mains supply.", true, priceOfRating},
	{"transformer", "volts and amperes", "transformer 18 V 2 A", "The transformer of a transformer-supply, by the direct voltage and current that the supply is rated for.", false, priceOfRating},
	{"low-voltage-disconnect", "amperes", "low-voltage-disconnect 10 A", "A cut-off.", true, priceOfCurrent},
	{"isolator", "amperes", "isolator 16 A", "An isolator.", true, priceOfCurrent},
	{"changeover-relay", "volts of its coil", "changeover-relay 24 V", "The relay of a changeover.", false, priceOfVolt},
	{"relay", "volts of its coil", "relay 24 V", "A relay that is a single part.", false, priceOfVolt},
	{"distribution-board", "a number of ways", "distribution-board 8 ways", "Both bars of a board; its fuses and terminals are apart.", false, priceOfWays},
	{"enclosure", "the name of a place", "enclosure Main cabinet", "The enclosure of that place. It stands in the parts list where it has a price.", false, priceOfPlace},
	{"luminaire", "a luminaire type", "luminaire corridor", "A luminaire of that type.", false, priceOfLuminaire},
	{"photocell", "", "photocell", "A twilight switch module.", false, nil},
	{"light-sensor", "", "light-sensor", "The light-dependent resistor of a photocell.", false, nil},
	{"temperature-probe", "", "temperature-probe", "The probe of a compensated charger.", false, nil},
	{"indicator", "", "indicator", "A signal lamp.", false, nil},
	{"meter", "", "meter", "A panel meter.", false, nil},
	{"shunt", "", "shunt", "The shunt of an ammeter.", false, nil},
	{"switch", "", "switch", "A push-button or switch.", false, nil},
	{"suppressor", "", "suppressor", "A surge suppressor.", false, nil},
	{"regulator", "", "regulator", "The regulator of a linear charger.", false, nil},
	{"bridge", "", "bridge", "A bridge rectifier.", false, nil},
	{"transistor", "", "transistor", "A transistor.", false, nil},
	{"comparator", "", "comparator", "A comparator.", false, nil},
	{"diode", "", "diode", "A rectifier diode.", false, nil},
	{"schottky", "", "schottky", "A Schottky diode.", false, nil},
	{"zener", "", "zener", "A Zener diode.", false, nil},
	{"led", "", "led", "A light-emitting diode.", false, nil},
	{"resistor", "", "resistor", "A resistor, whatever its value.", false, nil},
	{"preset", "", "preset", "A preset or trimmer.", false, nil},
	{"capacitor", "", "capacitor", "A capacitor, whatever its value.", false, nil},
}

// PriceName writes the name of a thing as Price holds it: its word and what follows,
// each as it prints itself.
func PriceName(word string, follows ...any) string {
	parts := []string{word}
	for _, f := range follows {
		parts = append(parts, fmt.Sprint(f))
	}
	return strings.TrimSpace(strings.Join(parts, " "))
}

// Thing returns what sort of thing the price is of.
func (p *Price) Thing() PricedThing {
	return pricedThings[slices.IndexFunc(pricedThings, func(t PricedThing) bool { return t.Word == p.Word })]
}

// mostPrice keeps a total printable.
const mostPrice = 1e9

// maxCurrency is how many characters the name of a currency may have: it stands in the
// heads of columns.
const maxCurrency = 12

func checkCurrency(s string) error { return checkText(s, maxCurrency) }

// readPrices reads what the firm pays, in its own currency.
func (d *decoder) readPrices(e entry) {
	list := d.entries(e.val, "prices")
	first := map[string]Span{}
	for _, p := range list[:d.few(len(list), maxPrices, e.at, "prices")] {
		x, err := readPriceName(p.key)
		if err != nil {
			d.fail(p.at, err)
			continue
		}
		x.Of.Pos, x.Of.Given = p.at, true
		s, ok := d.scalar(p.val, "A price")
		if !ok {
			continue
		}
		cost, err := strconv.ParseFloat(s, 64)
		if err != nil || strings.Trim(s, "0123456789.") != "" || cost > mostPrice {
			d.report(codeCount, "bad price", d.src.of(p.val), fmt.Sprintf("%q is not a price: write a number in your currency, with a decimal point and without its sign, such as 0.85. 0 is for what another price holds.", clip(s)))
			continue
		}
		if was, twice := first[x.Of.Val]; twice {
			d.report(codeRepeated, "price given twice", p.at, fmt.Sprintf("%s has a price already. Remove one of them.", x.Of.Val), Related{was, "first given here"})
			continue
		}
		first[x.Of.Val] = p.at
		x.Cost = At[float64]{Val: cost, Pos: d.src.of(p.val), Given: true}
		d.site.Practice.Prices = append(d.site.Practice.Prices, x)
	}
}

// readPriceName reads the name of a priced thing.
func readPriceName(key string) (Price, error) {
	var p Price
	if err := checkText(key, MaxName); err != nil {
		return p, err
	}
	key = strings.Join(strings.Fields(key), " ")
	word, rest, _ := strings.Cut(key, " ")
	if c := key[0]; '0' <= c && c <= '9' || strings.EqualFold(word, "AWG") {
		word, rest = "", key
	}
	i := slices.IndexFunc(pricedThings, func(t PricedThing) bool { return t.Word == word })
	if i < 0 {
		said := fmt.Sprintf("%q is nothing that can have a price. ", clip(key))
		return p, &valueError{codePrice, "unknown part", said + didYouMean(word, "A name starts with a conductor size or one of", priceWords())}
	}
	t := &pricedThings[i]
	p.Word = word
	switch {
	case t.read == nil && rest != "":
		return p, &valueError{codePrice, "name too long", fmt.Sprintf("A %s has one price, whatever its value: write %s alone.", word, word)}
	case t.read == nil:
		p.Of.Val = word
		return p, nil
	case rest == "":
		return p, incomplete(t)
	}
	canonical, err := t.read(rest, &p)
	if err != nil {
		return p, err
	}
	p.Of.Val = PriceName(word, canonical)
	return p, nil
}

func incomplete(t *PricedThing) error {
	return &valueError{codePrice, "name too short", fmt.Sprintf("Behind %s stands %s: write %s.", t.Word, t.Follows, t.Example)}
}

func priceWords() []string {
	var out []string
	for _, t := range pricedThings {
		if t.Word != "" {
			out = append(out, t.Word)
		}
	}
	return out
}

func priceOfSize(rest string, p *Price) (string, error) {
	var err error
	if p.Size, err = quantity.ParseWireSize(rest); err != nil {
		return "", err
	}
	return p.Size.String(), checkBounds(Size, p.Size, rest, leastSize, mostSize)
}

// fuseClass reads the class that a name starts with.
func fuseClass(s string) (*catalogue.FuseClass, string, error) {
	word, rest, _ := strings.Cut(s, " ")
	var names []string
	for _, c := range catalogue.FuseClasses() {
		if c.Name == word {
			return c, rest, nil
		}
		names = append(names, c.Name)
	}
	return nil, "", &valueError{codePrice, "unknown fuse class", strings.TrimSpace(fmt.Sprintf("%q is no class of fuses. %s", clip(word), didYouMean(word, "Classes", names)))}
}

func priceOfClass(rest string, p *Price) (string, error) {
	c, more, err := fuseClass(rest)
	switch {
	case err != nil:
		return "", err
	case more != "":
		return "", &valueError{codePrice, "name too long", fmt.Sprintf("A %s takes every rating of its class: write %s %s.", p.Word, p.Word, c.Name)}
	}
	return c.Name, nil
}

func priceOfFuse(rest string, p *Price) (string, error) {
	c, more, err := fuseClass(rest)
	if err != nil {
		return "", err
	}
	if more == "" {
		return "", &valueError{codePrice, "name too short", fmt.Sprintf("A price is for one rating: write %s %s %v.", p.Word, c.Name, c.Ratings[0])}
	}
	a, err := quantity.Parse[quantity.Ampere](more)
	if err != nil {
		return "", err
	}
	if !slices.Contains(c.Ratings, a) {
		return "", &valueError{codePrice, "no such fuse", fmt.Sprintf("Fuses of class %s have no rating of %v. Ratings: %s.", c.Name, a, printed(c.Ratings))}
	}
	p.Rating.Ampere = a
	return c.Name + " " + a.String(), nil
}

func printed[T fmt.Stringer](list []T) string {
	out := make([]string, len(list))
	for i, v := range list {
		out[i] = v.String()
	}
	return listed(out)
}

func priceOfBlock(rest string, _ *Price) (string, error) {
	word, more, _ := strings.Cut(rest, " ")
	class := catalogue.BatteryClassOf(word)
	if class == nil {
		var names []string
		for _, c := range catalogue.BatteryClasses() {
			names = append(names, c.Name)
		}
		return "", &valueError{codePrice, "unknown cells", strings.TrimSpace(fmt.Sprintf("%q are no cells. %s", clip(word), didYouMean(word, "Cells", names)))}
	}
	volt, capacity, err := quantity.Cut[quantity.Volt](more)
	if err == nil && capacity == "" || more == "" {
		return "", &valueError{codePrice, "name too short", "A price is for one block: write block " + BlockName(class, class.Blocks[0]) + "."}
	}
	if err != nil {
		return "", err
	}
	c, err := quantity.Parse[quantity.AmpereHour](capacity)
	if err != nil {
		return "", err
	}
	var have []string
	for _, b := range class.Blocks {
		v := quantity.Volt(b.Cells) * class.Cell
		if b.Capacity == c && printsAlike(v, volt) {
			return BlockName(class, b), nil
		}
		have = append(have, fmt.Sprintf("%v %v", v, b.Capacity))
	}
	return "", &valueError{codePrice, "no such block", fmt.Sprintf("There is no %s block of %v %v. Blocks: %s.", class.Name, volt, c, listed(have))}
}

// BlockName names a block behind the word block: cells, volts, capacity.
func BlockName(class *catalogue.BatteryClass, b catalogue.Block) string {
	return fmt.Sprintf("%s %v %v", class.Name, quantity.Volt(b.Cells)*class.Cell, b.Capacity)
}

// printsAlike compares voltages as they are printed, for cells times a cell's voltage
// may be off by rounding.
func printsAlike(a, b quantity.Volt) bool { return a.String() == b.String() }

func priceOfRating(rest string, p *Price) (string, error) {
	r, err := quantity.ParseRating(rest)
	if err == nil {
		err = checkELV(VoltAmp, r)
	}
	if err == nil {
		err = checkBounds(VoltAmp, r, rest, "1 V 1 mA", "60 V 500 A")
	}
	p.Rating = r
	return r.String(), err
}

func priceOfCurrent(rest string, p *Price) (string, error) {
	a, err := quantity.Parse[quantity.Ampere](rest)
	if err == nil {
		err = checkBounds(Current, a, rest, "1 mA", "1000 A")
	}
	p.Rating.Ampere = a
	return a.String(), err
}

func priceOfVolt(rest string, _ *Price) (string, error) {
	v, err := quantity.Parse[quantity.Volt](rest)
	if err == nil {
		err = checkELV(Voltage, v)
	}
	if err == nil {
		err = checkBounds(Voltage, v, rest, "1 V", "60 V")
	}
	return v.String(), err
}

func priceOfWays(rest string, p *Price) (string, error) {
	digits, unit, _ := strings.Cut(rest, " ")
	n, err := parseCount(digits)
	if err == nil && unit != "ways" && unit != "" {
		err = &valueError{codePrice, "unknown part", fmt.Sprintf("A board is named by its ways: write %s 8 ways.", p.Word)}
	}
	if err == nil {
		err = checkBounds(Count, n, rest, "1", "60")
	}
	return fmt.Sprintf("%d ways", n), err
}

func priceOfPlace(rest string, _ *Price) (string, error) { return rest, nil }

func priceOfLuminaire(rest string, _ *Price) (string, error) { return rest, checkIdentifier(rest) }
