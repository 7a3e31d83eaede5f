package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// TwilightInput states a comparator card: the light resistor stands between plus and
// the light signal, Load between it and minus. A divider of Upper, a preset and Lower
// gives the reference at the preset's wiper; it reaches the comparator's + input
// through Input, and Hysteresis leads there from the output. The output is low while
// it is light; in the dark PullUp holds it up. All switching points are ratios of the
// supply, so that its voltage does not matter.
type TwilightInput struct {
	Cell   catalogue.LightResistor
	Dark   quantity.Lux // dark below
	Bright quantity.Lux // light again above; greater than Dark
	Low    float64      // of the supply: the output while it conducts
	PullUp quantity.Ohm // from the output to plus while it blocks
	Most   quantity.Volt
}

// Twilight is a sized comparator card.
type Twilight struct {
	Load                     quantity.Ohm
	Upper, Preset, Lower     quantity.Ohm
	Input, Hysteresis        quantity.Ohm
	Wiper                    quantity.Ratio // of the preset's track, counted from its lower end
	Reference                quantity.Ratio // at the wiper, of the supply, with nothing connected
	SignalDark, SignalBright float64        // of the supply, at the two thresholds
	Bright                   quantity.Lux   // that results
	Slow                     quantity.Farad // across Load
	Source                   quantity.Ohm   // of the reference as Hysteresis sees it
}

// Orders of the card's resistors (common practice, no source): the preset, and the
// input resistor among which the search runs. The capacitor's time constant spans ten
// half-waves of the flicker of mains lamps at 50 Hz.
const (
	twilightPreset = 10e3
	inputLow       = 33e3
	inputHigh      = 82e3
	slowTime       = 0.1
	wiperLeast     = 0.02 // of the supply: the reference stays off both rails
	twilightTol    = 0.05 // of the light threshold, with preferred values
	twilightLeast  = 1.2  // ratio of thresholds that any card reaches
)

// cellReference is the illuminance that cells are listed at, in lx.
const cellReference = 10

const twilightSource = "comparator with hysteresis (electronics textbooks)"

// TwilightCard chooses the resistors of a comparator card and its preset's setting.
// Load is the preferred value nearest to the geometric mean of the cell's resistances
// at both thresholds, where the signal is steepest. The preset's wiper reaches the dark
// threshold with any cell of the class. Input and Hysteresis are searched among
// preferred values for the light threshold nearest to what is asked.
func TwilightCard(in TwilightInput) (Twilight, []Working, error) {
	if in.Bright <= in.Dark || in.Dark <= 0 {
		return Twilight{}, nil, &BlockedError{
			Limit: LimitRange, Subject: "the illuminance above which it is light", Value: float64(in.Bright), Bound: float64(in.Dark), Unit: "lx",
			Frees: fmt.Sprintf("set it above %v, such as %v", in.Dark, 2*in.Dark),
		}
	}
	rd, rb := in.cell(in.Dark), in.cell(in.Bright)
	t := Twilight{Load: quantity.Ohm(catalogue.E24.Nearest(math.Sqrt(rd * rb)))}
	t.SignalDark, t.SignalBright = DividerRatio(quantity.Ohm(rd), t.Load), DividerRatio(quantity.Ohm(rb), t.Load)
	t.Slow = quantity.Farad(catalogue.E6.AtLeast(slowTime / float64(t.Load)))
	if !t.reach(in) {
		return Twilight{}, nil, tooWide(in)
	}
	best := math.Inf(1)
	for _, r := range catalogue.E24.Between(inputLow, inputHigh) {
		try := t
		try.Input = quantity.Ohm(r)
		try.fit(in)
		if e := math.Abs(math.Log(float64(try.Bright / in.Bright))); e < best {
			best, t = e, try
		}
	}
	if t.Wiper < 0 || t.Wiper > 1 || best > math.Log(1+twilightTol) {
		return Twilight{}, nil, tooWide(in)
	}
	ws := t.workings(in, rd, rb)
	if heat := quantity.Watt(float64(in.Most) * float64(in.Most) / (4 * float64(t.Load))); heat > in.Cell.Power {
		return t, ws, &BlockedError{
			Limit: LimitDissipation, Subject: "the heat of the light resistor", Value: float64(heat), Bound: float64(in.Cell.Power), Unit: "W",
			Frees: "shade the sensor and set a lower illuminance, or take a packaged module",
		}
	}
	return t, ws, nil
}

// cell is the typical resistance of the cell, R = R10 × (E ÷ 10 lx)^−γ, with its dark
// resistance left out: it is far above at any twilight setting.
func (in *TwilightInput) cell(e quantity.Lux) float64 {
	return float64(in.Cell.At10) * math.Pow(float64(e)/cellReference, -in.Cell.Gamma)
}

// tooWide says that the thresholds lie too far apart for one card.
func tooWide(in TwilightInput) error {
	most := widest(in)
	return &BlockedError{
		Limit: LimitRange, Subject: "light_above over dark_below", Value: float64(in.Bright / in.Dark), Bound: most,
		Frees: fmt.Sprintf("set light_above to %v at most, or take a packaged module (built: module)", in.Dark*quantity.Lux(most)),
	}
}

// widest is the greatest round ratio of the thresholds at which the preset still
// reaches the setting of any cell of the class.
func widest(in TwilightInput) float64 {
	for _, r := range []float64{50, 20, 10, 5, 3, 2, 1.5} {
		try := in
		try.Bright = in.Dark * quantity.Lux(r)
		t := Twilight{Load: quantity.Ohm(catalogue.E24.Nearest(math.Sqrt(try.cell(try.Dark) * try.cell(try.Bright))))}
		t.SignalDark, t.SignalBright = DividerRatio(quantity.Ohm(try.cell(try.Dark)), t.Load), DividerRatio(quantity.Ohm(try.cell(try.Bright)), t.Load)
		if t.reach(try) {
			return r
		}
	}
	return twilightLeast
}

// reach chooses the reference divider: the preset with the largest fixed resistors
// with which its wiper reaches the signal of any cell of the class at the dark
// threshold, at all tolerances. It reports false when none does.
func (t *Twilight) reach(in TwilightInput) bool {
	least, most := in.Cell.Bounds(in.Dark)
	k := t.SignalBright - t.SignalDark // share of the output in the + input, nearly
	wiper := func(signal float64) float64 { return (signal - k*in.Low) / (1 - k) }
	low := wiper(DividerRatio(most, t.Load*quantity.Ohm(1-setTolerance)))
	high := wiper(DividerRatio(least, t.Load*quantity.Ohm(1+setTolerance)))
	if low < wiperLeast || high > 1-wiperLeast {
		return false
	}
	t.Preset = twilightPreset
	track := twilightPreset * (1 - float64(catalogue.PresetTol))
	covers := func(upper, lower float64) bool {
		const up, down = 1 + setTolerance, 1 - setTolerance
		return lower*up/(lower*up+track+upper*down) <= low && (lower*down+track)/(lower*down+track+upper*up) >= high
	}
	sum := track / (high - low)
	for _, u := range catalogue.E24.Between(sum*(1-high)/2, sum*(1-high)*1.2) {
		for _, l := range catalogue.E24.Between(sum*low/2, sum*low*1.2) {
			if covers(u, l) && u+l > float64(t.Upper+t.Lower) {
				t.Upper, t.Lower = quantity.Ohm(u), quantity.Ohm(l)
			}
		}
	}
	return t.Upper > 0
}

// fit finds the hysteresis resistor for the input resistor at hand, and with it the
// wiper's place and the light threshold that result.
func (t *Twilight) fit(in TwilightInput) {
	ladder := float64(t.Upper + t.Preset + t.Lower)
	w := (t.SignalDark + t.SignalBright) / 2
	source := func() float64 { return float64(t.Input) + w*(1-w)*ladder } // of the wiper as seen by Hysteresis
	share := func(r float64) float64 { return source() / (source() + r) }
	for range 20 { // w and the source resistance depend on each other a little
		// Dark: w(1−a) + a·Low; bright: w(1−b) + b, a with Hysteresis alone, b with PullUp too.
		k := (t.SignalBright - w) / (1 - w)
		r := source()*(1-k)/k - float64(in.PullUp)
		t.Hysteresis = quantity.Ohm(catalogue.E24.Nearest(max(r, source())))
		a := share(float64(t.Hysteresis))
		w = (t.SignalDark - a*in.Low) / (1 - a)
	}
	t.Source = quantity.Ohm(source())
	b := share(float64(t.Hysteresis + in.PullUp))
	signal := w*(1-b) + b
	t.Reference = quantity.Ratio(w)
	t.Wiper = quantity.Ratio((w*ladder - float64(t.Lower)) / float64(t.Preset))
	cell := float64(t.Load) * (1 - signal) / signal
	t.Bright = quantity.Lux(cellReference * math.Pow(cell/float64(in.Cell.At10), -1/in.Cell.Gamma))
}

func (t *Twilight) workings(in TwilightInput, rd, rb float64) []Working {
	ladder := float64(t.Upper + t.Preset + t.Lower)
	w := float64(t.Reference)
	source := float64(t.Source)
	a := source / (source + float64(t.Hysteresis))
	all := source + float64(t.Hysteresis+in.PullUp)
	signal := w + (1-w)*source/all
	law := func(name string, e quantity.Lux, r float64) Working {
		return Working{
			Name: name, Formula: "R = R_10 × (E ÷ 10 lx)^(−γ)",
			Substituted: fmt.Sprintf("%s × (%s ÷ 10 lx)^(−%s)", num(float64(in.Cell.At10), "Ω"), num(float64(e), "lx"), num(in.Cell.Gamma, "")),
			Value:       r, Unit: "Ω", Source: in.Cell.Evidence.String(),
		}
	}
	node := func(name string, r float64, v float64) Working {
		return Working{
			Name: name, Formula: "x = R_load ÷ (R_load + R_cell)",
			Substituted: fmt.Sprintf("%s ÷ (%s + %s)", num(float64(t.Load), "Ω"), num(float64(t.Load), "Ω"), num(r, "Ω")),
			Value:       v, Source: twilightSource,
		}
	}
	return []Working{
		law("cell at the dark threshold", in.Dark, rd), law("cell at the light threshold", in.Bright, rb),
		{
			Name: "resistor of the light divider", Formula: "R_load = √(R_dark × R_light), nearest E24 value",
			Substituted: fmt.Sprintf("√(%s × %s) → %s", num(rd, "Ω"), num(rb, "Ω"), num(float64(t.Load), "Ω")),
			Value:       float64(t.Load), Unit: "Ω", Source: catalogue.PreferredEvidence.String(), Uses: []string{"cell at the dark threshold", "cell at the light threshold"},
		},
		node("light signal at the dark threshold", rd, t.SignalDark), node("light signal at the light threshold", rb, t.SignalBright),
		{
			Name: "source of the reference", Formula: "R_s = R_input + w × (1 − w) × (R_upper + R_preset + R_lower)",
			Substituted: fmt.Sprintf("%s + %s × (1 − %s) × (%s + %s + %s)", num(float64(t.Input), "Ω"), num(w, ""), num(w, ""),
				num(float64(t.Upper), "Ω"), num(float64(t.Preset), "Ω"), num(float64(t.Lower), "Ω")),
			Value: source, Unit: "Ω", Source: "Thévenin's theorem",
		},
		{
			Name: "reference at the wiper", Formula: "w = (x_dark − a × U_low ÷ U) ÷ (1 − a), a = R_s ÷ (R_s + R_hysteresis)",
			Substituted: fmt.Sprintf("(%s − %s × %s) ÷ (1 − %s)", num(t.SignalDark, ""), num(a, ""), num(in.Low, ""), num(a, "")),
			Value:       w, Source: twilightSource, Uses: []string{"light signal at the dark threshold", "source of the reference"},
		},
		{
			Name: "setting of the preset, from its lower end", Formula: "s = (w × (R_upper + R_preset + R_lower) − R_lower) ÷ R_preset",
			Substituted: fmt.Sprintf("(%s × %s − %s) ÷ %s", num(w, ""), num(ladder, "Ω"), num(float64(t.Lower), "Ω"), num(float64(t.Preset), "Ω")),
			Value:       float64(t.Wiper), Source: "divider rule", Uses: []string{"reference at the wiper"},
		},
		{
			Name: "reference in the dark", Formula: "x = w + (1 − w) × R_s ÷ (R_s + R_hysteresis + R_base + R_off)",
			Substituted: fmt.Sprintf("%s + (1 − %s) × %s ÷ (%s + %s + %s)", num(w, ""), num(w, ""), num(source, "Ω"), num(source, "Ω"), num(float64(t.Hysteresis), "Ω"), num(float64(in.PullUp), "Ω")),
			Value:       signal, Source: twilightSource, Uses: []string{"reference at the wiper", "source of the reference"},
		},
		{
			Name: "light again above", Formula: "E = 10 lx × (R_load × (1 ÷ x − 1) ÷ R_10)^(−1 ÷ γ)",
			Substituted: fmt.Sprintf("10 lx × (%s × (1 ÷ %s − 1) ÷ %s)^(−1 ÷ %s)", num(float64(t.Load), "Ω"), num(signal, ""), num(float64(in.Cell.At10), "Ω"), num(in.Cell.Gamma, "")),
			Value:       float64(t.Bright), Unit: "lx", Source: in.Cell.Evidence.String(), Uses: []string{"reference in the dark"},
		},
		{
			Name: "capacitor of the light signal", Formula: "C ≥ 0.1 s ÷ R_load, next E6 value",
			Substituted: fmt.Sprintf("0.1 s ÷ %s → %s", num(float64(t.Load), "Ω"), num(float64(t.Slow), "F")),
			Value:       float64(t.Slow), Unit: "F", Source: "ten half-waves of 50 Hz flicker: common practice, no source",
		},
	}
}
