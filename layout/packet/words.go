package packet

import (
	"fmt"
	"math"
	"path/filepath"
	"regexp"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/sheet"
	"gloamwright/templates"
)

// words are the standing texts with the conditions and values of the job.
type words struct {
	texts  *templates.Texts
	holds  map[string]bool
	values map[string]string
}

// textError is mistakes in a firm's standing texts, as they are printed.
type textError struct{ text string }

func (e *textError) Error() string { return e.text }

// Firm reads who makes the documents of a design, for the title blocks of its schematic.
// Mistakes in the firm's texts are an error that names their places.
func Firm(d *design.Design) (sheet.Firm, error) {
	texts, err := loadTexts(d)
	if err != nil {
		return sheet.Firm{}, err
	}
	return sheet.Firm{Name: texts.Firm.Name, Logo: texts.Firm.Logo}, nil
}

// loadTexts loads the standing texts, those of the firm first.
func loadTexts(d *design.Design) (*templates.Texts, error) {
	dir := d.Site.Practice.Texts.Val
	if dir != "" && !filepath.IsAbs(dir) {
		dir = filepath.Join(filepath.Dir(d.Site.File), dir)
	}
	texts, list, sources := templates.Load(dir)
	if list.HasErrors() {
		return nil, &textError{"the standing texts hold mistakes:\n" + list.Render(sources)}
	}
	return texts, nil
}

// TextFiles are the files of the firm's folder of texts that the packet of d is made
// with.
func TextFiles(d *design.Design) ([]templates.File, error) {
	texts, err := loadTexts(d)
	if err != nil {
		return nil, err
	}
	return texts.Files, nil
}

// readTexts fills the standing texts in.
func (b *book) readTexts() error {
	texts, err := loadTexts(b.d)
	if err != nil {
		return err
	}
	b.words = words{texts: texts, holds: b.holding(), values: b.valuesOfJob()}
	return nil
}

// mainsParts are the parts that take the mains.
func (b *book) mainsParts() []string {
	var out []string
	for _, p := range b.d.Circuit.Parts {
		switch p.Kind {
		case circuit.Supply, circuit.ChargerUnit, circuit.Transformer:
			out = append(out, p.Designation)
		}
	}
	return out
}

// partOf is the designation of the first part that matches.
func (b *book) partOf(match func(p *circuit.Part) bool) string {
	for _, p := range b.d.Circuit.Parts {
		if match(p) {
			return p.Designation
		}
	}
	return ""
}

func kindIs(kinds ...circuit.Kind) func(p *circuit.Part) bool {
	return func(p *circuit.Part) bool { return slices.Contains(kinds, p.Kind) }
}

// largeCapacitor is the capacitance from which a capacitor is warned of, F; common
// practice, no source.
const largeCapacitor = 1e-3

func bigCapacitor(p *circuit.Part) bool {
	if p.Kind != circuit.Electrolytic && p.Kind != circuit.Capacitor {
		return false
	}
	for _, v := range p.Values {
		if v.Unit == "F" && v.Num >= largeCapacitor {
			return true
		}
	}
	return false
}

// suppressor is the diode or suppressor across the relay's coil.
func (b *book) suppressor() string {
	if b.d.Relay == nil {
		return ""
	}
	return b.partOf(func(p *circuit.Part) bool {
		return p.Stage == b.d.Relay.Part.Stage && (p.Kind == circuit.Suppressor ||
			kindIs(circuit.Diode, circuit.Schottky, circuit.Zener)(p) && strings.Contains(p.Description, "across"))
	})
}

// holding says which conditions of the vocabulary hold for the job.
func (b *book) holding() map[string]bool {
	d := b.d
	class := d.Battery.Class
	polarised, comes := false, false
	for _, l := range d.Luminaires {
		polarised = polarised || l.Kind != "filament" && l.Kind != "resistive"
	}
	for _, c := range d.Site.Circuits {
		comes = comes || c.Lit.Val != "always"
	}
	night := b.condition("outage-night")
	return map[string]bool{
		"mains":         len(b.mainsParts()) > 0,
		"battery":       d.Battery.Part != nil,
		"gas":           d.Battery.Gas && d.Battery.OpeningCM2 > 0,
		"liquid":        strings.Contains(class, "flooded") || class == "nicd",
		"lithium":       strings.Contains(class, "lifepo4"),
		"isolator":      b.partOf(kindIs(circuit.SwitchIsolator)) != "",
		"charger":       d.Charger.Part != nil,
		"probe":         b.partOf(kindIs(circuit.NTC)) != "",
		"cut-off":       d.CutOff != nil,
		"relay":         d.Relay != nil,
		"suppressor":    b.suppressor() != "",
		"regulator":     b.partOf(kindIs(circuit.Regulator)) != "",
		"big-capacitor": b.partOf(bigCapacitor) != "",
		"polarised":     polarised,
		"comes-on":      comes,
		"outage-night":  night != nil && night.Shown,
		"labels":        b.first(keyLabels) > 0,
		"red-line":      b.first(keyRedLine) > 0,
		"never":         false,
	}
}

// colourWords are the codes of IEC 60757.
var colourWords = map[string]string{"BK": "black", "BN": "brown", "RD": "red", "OG": "orange", "YE": "yellow", "GN": "green", "BU": "blue",
	"VT": "violet", "GY": "grey", "WH": "white", "PK": "pink", "GD": "gold", "TQ": "turquoise", "SR": "silver", "GNYE": "green-yellow"}

// valuesOfJob fills the values of the vocabulary; one that the job has not is empty.
func (b *book) valuesOfJob() map[string]string {
	d, job, p := b.d, b.d.Site.Job, b.d.Site.Practice
	v := map[string]string{}
	for _, w := range templates.Values {
		v[w.Name] = ""
	}
	v["job-number"], v["revision"] = job.Number.Val, job.Revision.Val
	v["highest"] = d.Totals.HighestV.String()
	v["nominal"], v["outage"] = d.Site.Duty.Nominal.Val.String(), d.Site.Duty.Outage.Val.String()
	v["battery-room"], v["lamp-drop"] = degrees(d.Site.Duty.BatteryRoom.Val), p.LampDrop.Val.String()
	v["positive"], v["negative"] = p.Positive.Val, p.Negative.Val
	v["positive-word"], v["negative-word"] = colourWords[p.Positive.Val], colourWords[p.Negative.Val]
	v["mains-parts"], v["cells"] = listed(b.mainsParts()), d.Battery.ClassName
	v["isolator"], v["probe"] = b.partOf(kindIs(circuit.SwitchIsolator)), b.partOf(kindIs(circuit.NTC))
	v["suppressor"], v["regulator"] = b.suppressor(), b.partOf(kindIs(circuit.Regulator))
	v["big-capacitor"] = b.partOf(bigCapacitor)
	v["lamp-count"], v["fuse-count"], v["worst-lamp"] = fmt.Sprint(d.Totals.Luminaires), fmt.Sprint(len(d.Fuses)), d.Totals.WorstLamp
	v["mains-volt"], _, _ = strings.Cut(b.mainsText(), " ±")
	if t := d.Battery; t.Part != nil {
		v["battery"], v["battery-short"] = t.Part.Designation, figure(t.Prospective)
		if t.OpeningCM2 > 0 {
			v["air"], v["opening"] = fmt.Sprintf("%.2g m³/h", t.Ventilation), fmt.Sprintf("%.0f cm²", math.Ceil(t.OpeningCM2))
		}
		if r := b.readingAt(t.Part); r != nil {
			v["tp-battery"], v["band-battery"] = r.Point.Label, b.bandIn(r, "outage-day")
		}
	}
	if f := b.mainFuse(); f != nil {
		v["main-fuse"] = f.Part.Designation
		v["load-band"] = ampereBand(float64(f.LoadLow), float64(f.LoadHigh)) + " A"
	}
	if c := d.Charger; c.Part != nil {
		v["charger"], v["charger-float"] = c.Part.Designation, quantity.Fixed(c.Float, 1)+" at 20 °C"
		if r := b.readingAt(c.Part); r != nil {
			v["tp-charger"], v["band-charger"] = r.Point.Label, b.bandIn(r, "mains-day")
		}
	}
	if d.Relay != nil {
		v["relay"] = d.Relay.Part.Designation
	}
	for _, key := range []string{"end", "cut-off", "outage-night"} {
		if c := b.condition(key); c != nil {
			v["n-"+key] = fmt.Sprint(c.Number)
			if key != "outage-night" {
				v["expect-"+key] = ampereBand(float64(c.BatteryBand.Low), float64(c.BatteryBand.High)) + " A"
			}
		}
	}
	return v
}

// bandIn is a reading's band in a condition; empty if there is no such condition.
func (b *book) bandIn(r *facts.Reading, condition string) string {
	c := b.condition(condition)
	if c == nil {
		return ""
	}
	i := b.conditionIndex(c)
	out := bandText(r.Bands[i])
	for _, o := range r.OrAt(i) {
		out += fmt.Sprintf(", or %s with %s", bandText(o.Band), o.With)
	}
	return out
}

// readingAt is the test point whose red probe rests on a part.
func (b *book) readingAt(p *circuit.Part) *facts.Reading {
	for _, r := range b.d.Readings {
		if r.Point.Red != nil && r.Point.Red.Part == p {
			return r
		}
	}
	return nil
}

// applies reports whether all conditions of a text hold.
func (w *words) applies(when []string) bool {
	for _, c := range when {
		name, not := strings.CutPrefix(c, "not ")
		if w.holds[name] == not {
			return false
		}
	}
	return true
}

var braces = regexp.MustCompile(`\{([^{}]*)\}`)

// say fills in a standing text: values, references, bold.
func (b *book) say(text string, more map[string]string) string {
	text = braces.ReplaceAllStringFunc(text, func(m string) string {
		name := m[1 : len(m)-1]
		if s, ok := more[name]; ok {
			return s
		}
		if s, ok := b.words.values[name]; ok {
			return s
		}
		fn, key, _ := strings.Cut(name, " ")
		switch fn {
		case "sheet":
			return b.sheets(key)
		case "Sheet":
			return b.upperSheets(key)
		case "first":
			b.refs.asked[key] = true
			return fmt.Sprint(b.first(key))
		case "line":
			return b.lineNumber[key]
		}
		return ""
	})
	parts := strings.Split(text, "**")
	for i := 1; i < len(parts); i += 2 {
		parts[i] = bold(parts[i])
	}
	return strings.Join(parts, "")
}

// remedy is what to do about a fault.
func (b *book) remedy(f *facts.Fault) string {
	best, do := "", ""
	for _, r := range b.words.texts.Remedies {
		if strings.HasPrefix(f.Key, r.Fault) && len(r.Fault) > len(best) {
			best, do = r.Fault, r.Do
		}
	}
	return b.say(do, map[string]string{"part": f.Part})
}
