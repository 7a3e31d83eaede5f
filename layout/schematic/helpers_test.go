package schematic

import (
	"hash/fnv"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/stage"
	"gloamwright/layout/ink"
	"gloamwright/layout/schematic/audit"
)

// parsed decodes a description.
func parsed(tb testing.TB, src []byte) *describe.Site {
	tb.Helper()
	site, list := describe.Parse("site.yaml", src, stage.Schema())
	if list.HasErrors() {
		tb.Fatalf("%s\n%s", list.Render(describe.Sources{"site.yaml": src}), src)
	}
	return site
}

// designed designs a description.
func designed(tb testing.TB, src []byte) *design.Design {
	tb.Helper()
	d, err := design.Make(parsed(tb, src), nil)
	if err != nil {
		tb.Fatal(err)
	}
	return d
}

// samples are the descriptions that come with the program.
func samples(tb testing.TB) map[string][]byte {
	tb.Helper()
	out := map[string][]byte{}
	for _, pattern := range []string{"../../examples/*.yaml", "../../templates/starters/*.yaml"} {
		files, err := filepath.Glob(pattern)
		if err != nil || len(files) == 0 {
			tb.Fatalf("no descriptions in %s: %v", pattern, err)
		}
		for _, f := range files {
			src, err := os.ReadFile(f)
			if err != nil {
				tb.Fatal(err)
			}
			out[strings.TrimSuffix(filepath.Base(f), ".yaml")] = src
		}
	}
	return out
}

// dressed is a site whose parts bear ratings as long as any that sizing gives, without
// the sizing: what a drawing must have room for.
func dressed(tb testing.TB, site *describe.Site) *design.Design {
	tb.Helper()
	return dressedWith(tb, site, nil)
}

// dressedWith is the same with labels that were given before.
func dressedWith(tb testing.TB, site *describe.Site, kept circuit.Labels) *design.Design {
	tb.Helper()
	c := stage.Expand(site)
	c.Label(kept)
	ratings := map[circuit.Kind][]string{
		circuit.Fuse: {"7.5 A"}, circuit.Battery: {"48 V 1200 Ah", "flooded"}, circuit.Supply: {"24 V 0.75 A"},
		circuit.ChargerUnit: {"48 V 12.5 A", "float 54.5 V", "boost 57.6 V"}, circuit.Resistor: {"1.05 kΩ"},
		circuit.Capacitor: {"4.7 µF"}, circuit.Electrolytic: {"2200 µF", "63 V"}, circuit.Diode: {"1 A, 100 V"},
		circuit.Schottky: {"60 V 1 A"}, circuit.Zener: {"24 V 5 W"}, circuit.Relay: {"48 V 2.56 kΩ"},
		circuit.CutOff: {"opens 42.6 V", "closes 50.4 V", "30 A"}, circuit.SwitchIsolator: {"125 A"}, circuit.PNP: {"2N2907A"},
		circuit.NPN: {"2N2222A"}, circuit.Potentiometer: {"22 kΩ"}, circuit.Preset: {"470 Ω"}, circuit.NTC: {"10 kΩ"},
		circuit.Transformer: {"2 × 18 V", "120 VA"}, circuit.Bridge: {"200 V 4 A"}, circuit.Shunt: {"60 mV", "100 A"},
		circuit.Ammeter: {"100 A"}, circuit.Voltmeter: {"60 V"}, circuit.Suppressor: {"58 V", "600 W"}, circuit.SignalLamp: {"GN"},
		circuit.PhotoSwitch: {"dark 10 lx", "light 14 lx"}, circuit.Regulator: {"1.25 V ref", "3 K/W"},
	}
	for _, p := range c.Parts {
		p.Values = nil
		for _, t := range ratings[p.Kind] {
			p.Values = append(p.Values, circuit.Value{Name: "rating", Text: t, Show: true})
		}
	}
	sizes := []quantity.WireSize{{Area: 0.75}, {Area: 1}, {Area: 1.5}, {Area: 2.5}, {Area: 16}}
	for _, w := range c.Cables {
		h := fnv.New32a()
		h.Write([]byte(w.Key))
		w.Size = sizes[h.Sum32()%uint32(len(sizes))]
	}
	for _, w := range c.Conductors {
		w.Size, w.Colour = sizes[1], "RD"
		if w.Cable != nil {
			w.Size = w.Cable.Size
		}
	}
	for _, r := range c.Rails {
		r.Size, r.Colour = sizes[4], "GNYE"
	}
	f := &facts.Facts{Site: site, Circuit: c, Netlist: c.Resolve()}
	for i, k := range plainConditions {
		f.Conditions = append(f.Conditions, &facts.Condition{Key: k, Number: i + 1, Name: "Mains off, daylight", Shown: true})
	}
	for _, t := range c.TestPoints {
		r := &facts.Reading{Point: t}
		for range f.Conditions {
			r.Bands = append(r.Bands, facts.Band{Low: 24.8, Typical: 25.3, High: 25.9})
		}
		f.Readings = append(f.Readings, r)
	}
	return &design.Design{Facts: f}
}

// drawn draws a design and reads its sheets back, from the calls or from the files.
func drawn(tb testing.TB, d *design.Design, files bool) []audit.Sheet {
	tb.Helper()
	sheets, err := Sheets(d)
	if err != nil {
		tb.Fatal(err)
	}
	var out []audit.Sheet
	for _, s := range sheets {
		page := audit.FromRecorder(recorded(tb, s))
		if files {
			data, err := s.SVG()
			if err != nil {
				tb.Fatal(err)
			}
			if page, err = audit.FromSVG(data); err != nil {
				tb.Fatal(err)
			}
		}
		out = append(out, audit.Sheet{Number: s.Number, Page: page, Format: s.Paper, Circuit: s.Circuit(), Moved: s.Moved()})
	}
	return out
}

func recorded(tb testing.TB, s *Sheet) *ink.Recorder {
	tb.Helper()
	r := ink.NewRecorder(s.Paper.W, s.Paper.H, s.Supplement)
	s.Draw(r, Options{})
	if err := r.Err(); err != nil {
		tb.Fatal(err)
	}
	return r
}
