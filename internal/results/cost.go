package results

import "gloamwright/internal/design"

// costEntry is what is bought, at the firm's prices.
type costEntry struct {
	Currency string      `json:"currency"`
	Total    *float64    `json:"total"`
	Lines    []costLine  `json:"lines"`
	Without  []string    `json:"without"`
	Missing  []missEntry `json:"missing"`
}

type costLine struct {
	Name         string   `json:"name"`
	Designations []string `json:"designations"`
	Place        string   `json:"place"`
	Colour       string   `json:"colour"`
	Quantity     *float64 `json:"quantity"`
	Unit         string   `json:"unit"`
	Each         *float64 `json:"each"`
	Cost         *float64 `json:"cost"`
}

// missEntry is a price whose lack kept a choice from looking at prices.
type missEntry struct {
	Name string `json:"name"`
	At   string `json:"at"`
}

// moneyDigits keeps the hundredths of any bill.
const moneyDigits = 12

func money(v float64) *float64 { return to(v, moneyDigits) }

func cost(d *design.Design) *costEntry {
	b := d.Bill
	if b == nil {
		return nil
	}
	out := &costEntry{Currency: b.Currency, Total: money(b.Total), Lines: []costLine{}, Without: list(b.Without), Missing: []missEntry{}}
	for _, l := range b.Lines {
		e := costLine{Name: l.Name, Designations: []string{}, Place: placeText(l.Place), Colour: l.Colour, Quantity: figure(l.Quantity), Unit: l.Unit}
		for _, p := range l.Parts {
			e.Designations = append(e.Designations, p.Designation)
		}
		if l.Priced {
			e.Each, e.Cost = money(l.Each), money(l.Cost)
		}
		out.Lines = append(out.Lines, e)
	}
	for _, m := range d.Unpriced {
		out.Missing = append(out.Missing, missEntry{m.Name, m.At.String()})
	}
	return out
}
