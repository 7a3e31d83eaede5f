package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// CoilInput states a relay coil and the supply that must hold it.
type CoilInput struct {
	Class   catalogue.RelayClass
	Rated   quantity.Volt
	Low     quantity.Volt    // at the coil when the supply is lowest
	High    quantity.Volt    // at the coil when it is highest
	Ambient quantity.Celsius // hottest
}

// PickUp is a coil at the hottest ambient.
type PickUp struct {
	Hot      quantity.Celsius // copper temperature after long service
	Needs    quantity.Volt    // to operate again at once when hot
	Releases quantity.Volt    // at most, when cold
	Hold     quantity.Ampere  // coil current at the highest voltage, cold
}

// coilReference is the temperature at which relay limits hold (catalogue glossary).
const coilReference quantity.Celsius = 20

// CoilPickUp returns the voltage that a hot coil needs: the must-operate voltage of
// the class at 20 °C, raised as the copper's resistance is (IEC 60028; pull depends on
// current), with the coil as warm as its own rise at the highest supply voltage makes
// it. The lowest supply voltage must reach it, the highest must not overheat the coil.
func CoilPickUp(in CoilInput) (PickUp, []Working, error) {
	over := float64(in.High / in.Rated)
	hot := in.Ambient + quantity.Celsius(in.Class.CoilRise*over*over)
	cold := in.Class.PickUp * quantity.Ratio(in.Rated)
	ratio := (catalogue.CopperZero + float64(hot)) / (catalogue.CopperZero + float64(coilReference))
	p := PickUp{
		Hot: hot, Needs: quantity.Volt(float64(cold) * ratio),
		Releases: in.Rated * quantity.Volt(in.Class.DropOut),
		Hold:     quantity.Ampere(float64(in.High) / (float64(in.Class.CoilResistance(in.Rated)) * (1 - float64(in.Class.CoilTol)))),
	}
	ws := []Working{{
		Name: "coil temperature", Formula: "t = t_ambient + Δt × (U_max ÷ U_n)^2",
		Substituted: fmt.Sprintf("%s + %s × (%s ÷ %s)^2", num(float64(in.Ambient), "°C"), num(in.Class.CoilRise, "K"), num(float64(in.High), "V"), num(float64(in.Rated), "V")),
		Value:       float64(hot), Unit: "°C", Source: "coil rise goes with the power; " + in.Class.Evidence.String(),
	}, {
		Name: "pick-up of the hot coil", Formula: "U = k × U_n × (234.5 + t) ÷ (234.5 + 20)",
		Substituted: fmt.Sprintf("%s × %s × (234.5 + %s) ÷ (234.5 + 20)", num(float64(in.Class.PickUp), ""), num(float64(in.Rated), "V"), num(float64(hot), "°C")),
		Value:       float64(p.Needs), Unit: "V", Source: "IEC 60028 temperature law; " + in.Class.Evidence.String(), Uses: []string{"coil temperature"},
	}}
	switch most := in.Rated * quantity.Volt(in.Class.CoilMost); {
	case in.Low < p.Needs:
		return p, ws, &BlockedError{
			Limit: LimitPickUp, Subject: "the voltage at the coil when the supply is lowest", Value: float64(in.Low), Bound: float64(p.Needs), Unit: "V",
			Frees: fmt.Sprintf("feed the coil with at least %v, or take one rated for less", p.Needs),
		}
	case in.High > most*(1+slack):
		return p, ws, &BlockedError{
			Limit: LimitCoilHeat, Subject: "the voltage at the coil when the supply is highest", Value: float64(in.High), Bound: float64(most), Unit: "V",
			Frees: fmt.Sprintf("put a resistor of about %v before the coil", dropper(in, most)),
		}
	}
	return p, ws, nil
}

// dropper is the E12 resistor that takes the excess over most off a coil.
func dropper(in CoilInput, most quantity.Volt) quantity.Ohm {
	r := float64(in.Class.CoilResistance(in.Rated))
	return quantity.Ohm(catalogue.E12.AtLeast(r * (float64(in.High/most) - 1)))
}

// ContactInput states what a contact switches.
type ContactInput struct {
	Class   catalogue.RelayClass
	Volt    quantity.Volt   // highest voltage across the open contact
	Current quantity.Ampere // steady
	Lamps   bool            // filament lamps with their inrush
	Series  bool            // two poles in series
}

// ContactLoad checks a contact against the class's DC ratings and returns the
// current that it may break: the rating at the next listed voltage, or less if the
// rule I₂ × U₂ = ⅔ × I₁ × U₁ between listed voltages says so (relay application note).
func ContactLoad(in ContactInput) (quantity.Ampere, Working, error) {
	var below, row *catalogue.ContactRating
	rows := in.Class.ContactRows
	if in.Series {
		rows = in.Class.SeriesRows
	}
	for i := range rows {
		r := &rows[i]
		if r.Volt >= in.Volt {
			row = r
			break
		}
		below = r
	}
	w := Working{Name: "contact rating", Formula: "I from the class's DC ratings", Unit: "A"}
	switch {
	case row == nil && below == nil:
		return 0, w, &UnknownError{What: "the DC rating of the contact", Source: "the class lists none", Ask: "take the maker's load-limit curve"}
	case row == nil:
		i, d := Derate(DerateInput{Current: below.Current, Volt: below.Volt, To: in.Volt})
		d.Name = w.Name
		return i, d, contactVerdict(in, i)
	}
	i := row.Current
	if in.Lamps && row.Lamp > 0 {
		i = row.Lamp
	}
	w.Value, w.Source = float64(i), row.Evidence.String()
	w.Substituted = fmt.Sprintf("rated at %s for %s → %s", num(float64(row.Volt), "V"), num(float64(in.Volt), "V"), num(float64(i), "A"))
	return i, w, contactVerdict(in, i)
}

func contactVerdict(in ContactInput, may quantity.Ampere) error {
	if in.Current <= may {
		return nil
	}
	return &BlockedError{
		Limit: LimitContact, Subject: "the current of the contact", Value: float64(in.Current), Bound: float64(may), Unit: "A",
		Frees: fmt.Sprintf("take a contactor rated for at least %v at %v DC, or share the load over two contacts", in.Current, in.Volt),
	}
}

// DerateInput states a contact rating and a higher voltage.
type DerateInput struct {
	Current quantity.Ampere
	Volt    quantity.Volt
	To      quantity.Volt
}

// Derate returns what a contact may break above its rated DC voltage with a
// resistive load: I₂ = ⅔ × I₁ × U₁ ÷ U₂ (relay application note).
func Derate(in DerateInput) (quantity.Ampere, Working) {
	v := 2.0 / 3 * float64(in.Current) * float64(in.Volt) / float64(in.To)
	return quantity.Ampere(v), Working{
		Name: "contact current above rated voltage", Formula: "I₂ = 2 ÷ 3 × I₁ × U₁ ÷ U₂",
		Substituted: fmt.Sprintf("2 ÷ 3 × %s × %s ÷ %s", num(float64(in.Current), "A"), num(float64(in.Volt), "V"), num(float64(in.To), "V")),
		Value:       v, Unit: "A", Source: "relay application note on DC loads",
	}
}

// SuppressionInput states a coil and what guards the contact or transistor that
// switches it.
type SuppressionInput struct {
	Supply  quantity.Volt // highest
	Coil    quantity.Ohm
	Zener   quantity.Volt // in series with the diode; 0: diode alone
	Forward quantity.Volt // of the diode
}

// Suppression returns the voltage across the opening switch and how much longer the
// coil current takes to fall to the share hold than with the supply alone driving it
// down, as a multiple of the coil's time constant L ÷ R: with a clamp of U_c the
// current decays as i = (I + U_c ÷ R) e^(−t R ÷ L) − U_c ÷ R (inductive discharge,
// circuit textbooks).
func Suppression(in SuppressionInput, hold quantity.Ratio) (switchVolt quantity.Volt, times float64, w Working) {
	clamp := float64(in.Zener + in.Forward)
	i0 := float64(in.Supply) / float64(in.Coil)
	c := clamp / float64(in.Coil)
	times = math.Log((i0 + c) / (float64(hold)*i0 + c))
	return in.Supply + in.Zener + in.Forward, times, Working{
		Name: "release delay", Formula: "t ÷ (L ÷ R) = ln((I + U_c ÷ R) ÷ (k × I + U_c ÷ R))",
		Substituted: fmt.Sprintf("ln((%s + %s) ÷ (%s × %s + %s))", num(i0, "A"), num(c, "A"), num(float64(hold), ""), num(i0, "A"), num(c, "A")),
		Value:       times, Source: "inductive discharge into a clamp (circuit textbooks)",
	}
}
