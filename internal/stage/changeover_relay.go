package stage

import (
	"slices"
	"strconv"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// changeoverRelay lights its boards through a break contact when nothing holds its
// coil: no mains, no daylight.
func changeoverRelay() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "changeover-relay",
			Doc:  "Relay that lights what hangs on its break contact when nothing holds its coil in.",
			Ports: []describe.Port{
				{Name: "break", Doc: "plus behind the break contact: live while the coil is dead"},
				{Name: "make", Doc: "plus behind the make contact: live while the coil is held"},
				{Name: "coil", Doc: "what holds the coil in", Sink: true, Max: 2, Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "coil", Type: describe.StageRef, Doc: "The supply that holds the coil in while mains is on."},
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage that it takes the plus from."},
				describe.Field{Name: "rated", Type: describe.Current, Min: "0.1 A", Max: "200 A", Doc: "Contact rating for direct current at the nominal voltage; without it the next standard rating."},
				describe.Field{Name: "class", Type: describe.Choice, Choices: relayChoices(), Doc: "Class of the relay; without it the first whose contact breaks the load and whose coil its photocell can work."},
				describe.Field{Name: "coil_resistance", Type: describe.Resistance, Min: "1 Ω", Max: "100 kΩ", Doc: "Coil resistance at 20 °C; without it from the relay class."},
			),
		},
		Class: ControlClass, Rank: 8, Heading: "Changeover",
		Expand: expandChangeover,
		Steps:  []Step{{Control, sizeRelay}, {Trunk, sizeContact}},
	}
}

// relayChoices are the relay classes of the catalogue.
func relayChoices() []string {
	var out []string
	for _, c := range catalogue.RelayClasses() {
		out = append(out, c.Name)
	}
	return out
}

// feed is one source that holds a coil.
type feed struct {
	rail string       // rail key, or empty
	pin  *circuit.Pin // signal output, when rail is empty
	from string       // stage name
}

func (b *Build) coilFeeds(s *describe.Stage) []feed {
	var out []feed
	if key, ok := b.ref(s, "coil"); ok {
		out = append(out, b.feedOf(key))
	}
	for _, f := range b.feedersOf(s.Name.Val, "coil") {
		out = append(out, b.feedOf(f.Name.Val+".out"))
	}
	return out
}

func (b *Build) feedOf(key string) feed {
	name := key
	for i := range key {
		if key[i] == '.' {
			name = key[:i]
			break
		}
	}
	if p := b.outs[key]; p != nil {
		return feed{pin: p, from: name}
	}
	return feed{rail: key, from: name}
}

func expandChangeover(b *Build, s *describe.Stage) {
	brk, mk := changeoverPoles(inSeries(b.Site), b.used(s.Name.Val+".make"))
	pins := []string{"A1", "A2"}
	for _, t := range []string{"1", "2", "3", "4"}[:max(2, len(brk)+len(mk))] {
		pins = append(pins, t+"1", t+"2", t+"4")
	}
	k := b.Part("relay", circuit.Relay, "Changeover relay", pins...)
	coil := b.Element(k, "coil", "coil", "A1", "A1", "A2", "A2")
	contact := func(name, a, z, rest string) {
		e := b.Element(k, name, "contact", "1", a, "2", z)
		e.Control = coil.ID
		e.Params = []circuit.Param{{Name: "rest_closed", Value: map[string]float64{"break": 1, "make": 0}[rest]}}
	}
	for _, t := range brk {
		contact(t+"1-"+t+"2", t+"1", t+"2", "break")
	}
	d := b.Part("suppressor", circuit.Diode, "Diode across the coil", "A", "K")
	b.Element(d, "", "diode", "A", "A", "K", "K")
	b.Join(k.Pin("A1"), d.Pin("K"))
	b.Join(k.Pin("A2"), d.Pin("A"))
	for _, t := range mk {
		contact(t+"1-"+t+"4", t+"1", t+"4", "make")
	}
	const coilWidth, poleWidth, seriesWidth = 22, 18, 8
	width := coilWidth
	for _, poles := range [][]string{brk, mk} {
		if len(poles) > 0 {
			width += poleWidth + seriesWidth*(len(poles)-1)
		}
	}
	b.sketch(width, "lights the board", "without mains", "in the dark")

	feeds := b.coilFeeds(s)
	levels := []int{coilLevel1, coilLevel2, coilLevel3}
	for i, f := range feeds {
		local := "coil" + strconv.Itoa(i+1)
		end := k.Pin("A1")
		var r *circuit.Part
		if len(feeds) > 1 {
			r = b.Part("feed"+strconv.Itoa(i+1), circuit.Schottky, "Schottky diode in the coil feed", "A", "K")
			b.Element(r, "", "schottky", "A", "A", "K", "K")
			b.Join(r.Pin("K"), k.Pin("A1"))
			end = r.Pin("A")
		}
		if i == 0 && f.rail != "" { // straight down from its rail to the coil
			y := 38
			if r != nil {
				b.symbol("schottky", r, 15, feedRow, "V", "L")
				b.line(nil, 15, feedRow+2, 15, 38)
				y = feedRow - 2
			}
			b.number(b.coilRail(f, end, local, 15, y), 15, 9)
			continue
		}
		y := levels[i]
		way := []int{15, y}
		if i == 0 {
			way = append(way, 15, 38)
		}
		if r != nil {
			b.symbol("schottky", r, 8, float64(y), "H", "A")
			b.line(nil, append([]int{10, y}, way...)...)
			way = []int{6, y}
		}
		b.coilFeed(f, end, local, y, append([]int{0, y}, way...)...)
	}
	b.symbol("coil", k, 15, 40, "V", "L")
	b.line(nil, 15, 36, 21, 36, 21, 38)
	b.symbol("diode", d, 21, 40, "U", "R")
	b.line(nil, 21, 42, 21, 44, 15, 44)
	down := b.lead(circuit.OpDown, "minus", k.Pin("A2"), Minus, 15, 42, 15, downEnd)
	from, _ := b.ref(s, "from")
	x := 26
	x = b.poles(k, "break", brk, "2", from, b.outRail(s, "break"), "in", x)
	if len(mk) > 0 {
		b.poles(k, "make", mk, "4", from, b.outRail(s, "make"), "in2", x)
	}
	b.point(b.TestPoint("coil", "Coil of the changeover", k.Pin("A1")), 15, 29, "E")
	b.number(down, 15, 48.5)
}

// changeoverPoles are the poles of a changeover that break and make: one each, or two in
// series; none make where nothing hangs on that port.
func changeoverPoles(series, makeUsed bool) (brk, mk []string) {
	brk, mk = []string{"1"}, []string{"2"}
	if series {
		brk, mk = []string{"1", "2"}, []string{"3", "4"}
	}
	if !makeUsed {
		mk = nil
	}
	return brk, mk
}

// poles draws the contacts of one port in series from x on, with the leads before and
// behind them, and returns where the next port's begin.
func (b *Build) poles(k *circuit.Part, symbol string, poles []string, end, from, to, in string, x int) int {
	const level, half, step, next = 17, 2, 8, 8
	at := x + half + 3 // of the first contact
	up := b.lead(circuit.OpIn, in, k.Pin(poles[0]+"1"), from, x, upEnd, x, level, at-half, level)
	b.number(up, float64(x), 11)
	for i, t := range poles {
		b.symbol(symbol, k, float64(at), level, "H", "C", "1", t+"1", "2", t+end)
		if i > 0 {
			b.Join(k.Pin(poles[i-1]+end), k.Pin(t+"1")) // a link on the relay itself
			b.line(nil, at-step+half, level, at-half, level)
		}
		at += step
	}
	at -= step
	out := b.lead(circuit.OpUp, symbol, k.Pin(poles[len(poles)-1]+end), to, at+half, level, at+half+3, level, at+half+3, upEnd)
	b.number(out, float64(at+half+3), 11)
	return at + half + 3 + next
}

// sizeRelay takes the coil from the relay class, and sums what it draws.
func sizeRelay(p *Plan, s *describe.Stage) {
	k := p.part(s, "relay")
	nominal := p.Site.Duty.Nominal.Val
	class := p.relayFor(s)
	ohm := p.coilOhm(s, class)
	_, pinned := describe.Get[quantity.Ohm](s.Fields, "coil_resistance")
	i := quantity.Ampere(float64(nominal) / float64(ohm))
	// Low and High at the coil are judged on the solved circuit; here the class's own
	// limits say what the coil needs.
	in := sizing.CoilInput{Class: class, Rated: nominal, Low: p.Highest, High: nominal * quantity.Volt(class.CoilMost), Ambient: p.Site.Duty.CableAmbient.Val}
	pick, ws, err := sizing.CoilPickUp(in)
	if err != nil {
		p.block(k.Designation, k.At, "", err)
	}
	for _, w := range ws {
		p.work(k.Designation, "", w)
	}
	dawn, err := p.warmPickUp(class)
	if err != nil {
		p.block(k.Designation, k.At, "", err)
	}
	poles := quantity.Ohm(1)
	if p.inSeries() {
		poles = 2
	}
	k.Description = class.Title + ", two poles"
	if len(class.SeriesRows) == 0 && onePole(k) {
		k.Description = class.Title + ", one pole"
	}
	if poles > 1 {
		k.Description += " in series"
		k.Note = "link 12 to 21 on the relay"
		if k.Pin("41") != nil {
			k.Note += " and 34 to 41"
		}
	}
	set(k, "coil", nominal.String()+" "+quantity.Format(ohm, 3), float64(ohm), "Ω", true, pinned)
	params(k, "coil",
		circuit.Param{Name: "ohm", Value: float64(ohm), Tol: float64(class.CoilTol)},
		circuit.Param{Name: "pickup_volt", Value: float64(nominal) * float64(class.PickUp)},
		circuit.Param{Name: "dropout_volt", Value: float64(nominal) * float64(class.DropOut)},
	)
	for _, part := range k.Elements {
		if part.Model == "contact" {
			part.Params = append(part.Params, circuit.Param{Name: "ohm", Value: float64(class.ContactTyp), Tol: contactTol})
		}
	}
	for _, d := range p.C.Parts {
		switch {
		case d.Stage != s.Name.Val:
		case d.Kind == circuit.Diode:
			p.diode(d)
			p.suppress(d, k, ohm, class)
		case d.Kind == circuit.Schottky:
			p.schottky(d)
		}
	}
	p.ContactOhm = poles * class.ContactTyp
	p.TrunkOhm += p.ContactOhm
	p.Held += i
	if r, ok := describe.Get[describe.Ref](s.Fields, "coil"); ok {
		p.aux[r.Val.Stage] += i
	}
	p.F.Relays = append(p.F.Relays, &facts.Relay{
		Part: k, Coil: ohm, CoilA: i, PickUp: pick.Needs, PickUpCold: dawn, DropOut: quantity.Volt(float64(nominal) * float64(class.DropOut)),
	})
}

// onePole reports whether only the first pole of a relay is used, and takes the spare one
// off it: classes that are not made with two poles have none.
func onePole(k *circuit.Part) bool {
	if slices.ContainsFunc(k.Elements, furtherPole) {
		return false
	}
	k.Pins = slices.DeleteFunc(k.Pins, func(n *circuit.Pin) bool { return strings.HasPrefix(n.Name, "2") })
	return true
}

// furtherPole reports whether an element is a contact of another pole than the first.
func furtherPole(e *circuit.Element) bool {
	return e.Model == "contact" && !strings.HasPrefix(e.Pins[0].Pin.Name, "1")
}

// diode records a small rectifier diode: 1N4004 class, 1 A.
func (p *Plan) diode(d *circuit.Part) {
	set(d, "type", "1 A, 100 V", 1, "A", true, false)
	d.Note = "1N4002 to 1N4007 class, 1 A, at least 100 V"
	params(d, "", circuit.Param{Name: "is", Value: diodeIS}, circuit.Param{Name: "n", Value: diodeN})
}

// suppress records what the diode across a coil does: what switches the coil bears no
// more than the supply and the diode's drop, and the relay lets go later. A Zener diode
// in series would shorten the delay and load the driving transistor with its voltage; the
// lamps do not mind some tens of milliseconds, so the diode stands alone.
func (p *Plan) suppress(d, k *circuit.Part, coil quantity.Ohm, class catalogue.RelayClass) {
	in := sizing.SuppressionInput{Supply: p.Highest, Coil: coil, Forward: catalogue.Diode1N4004.Drop(quantity.Ampere(float64(p.Highest) / float64(coil)))}
	across, _, w := sizing.Suppression(in, class.DropOut)
	p.work(d.Designation, "", w)
	p.work(d.Designation, "voltage across what switches the coil", sizing.Working{
		Formula: "U = U_max + U_F", Value: float64(across), Unit: "V", Source: "inductive discharge into a clamp (circuit textbooks)",
		Substituted: sizing.Digits(float64(in.Supply)) + " V + " + sizing.Digits(float64(in.Forward)) + " V",
	})
}

// schottky records a small Schottky diode, 60 V 1 A. Its law is the model's own.
func (p *Plan) schottky(d *circuit.Part) {
	set(d, "type", "60 V 1 A", 1, "A", true, false)
	d.Note = "Schottky diode, 1 A, at least 60 V; drops 0.3 V or less at the coil's current"
}

// The 1N4004's law as the open textbook on semiconductors prints it: 18.8 nA with an
// emission coefficient of 2.
const (
	diodeIS = 18.8e-9
	diodeN  = 2
)

// sizeContact holds the contact against the load.
func sizeContact(p *Plan, s *describe.Stage) {
	k := p.part(s, "relay")
	load := p.Light
	rated, given := describe.Get[quantity.Ampere](s.Fields, "rated")
	if !given {
		r, w, err := p.contactLoad(p.relayFor(s))
		if err != nil {
			p.block(k.Designation, k.At, w.Source, err)
		}
		p.work(k.Designation, "", w)
		rated.Val = r
	}
	set(k, "contact", rated.Val.String()+" DC", float64(rated.Val), "A", false, given)
	for _, r := range p.F.Relays {
		if r.Part == k {
			r.Contact, r.Rated = load, rated.Val
		}
	}
}

// filaments reports whether any lamp is of the incandescent kind, whose inrush
// contacts must make.
func (p *Plan) filaments() bool {
	for _, t := range p.Site.Luminaires {
		if t.Kind.Val == "filament" && p.usedType(t.Name.Val) {
			return true
		}
	}
	return false
}
