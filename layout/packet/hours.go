package packet

import (
	"fmt"
	"math"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// Measures of the pictures of hours, mm.
const (
	hoursHeight = 62
	outageWidth = 80
	chargeLeft  = 114
	chargeWidth = 58
)

// hours is the pictures of an outage and of the recharge after it.
func (b *book) hours() []block {
	outages, charge := b.outageRuns(), b.rechargeRun()
	if len(outages) == 0 {
		return nil
	}
	const over, under = 6.2, 9.5
	picture := block{h: over + hoursHeight + under, draw: func(p *pad, y, _ float64) {
		b.outagePlot(p, outages, y+over)
		if charge != nil {
			b.chargePlot(p, charge, y+over)
		}
	}}
	return []block{b.head(0, b.pg.width, "Hours", "an outage from a full battery, then the recharge"), picture}
}

// outageRuns are the runs that bound what the battery does: the worst, and the
// longest.
func (b *book) outageRuns() []*facts.Run {
	var worst, best *facts.Run
	for _, r := range b.d.Endurance.Runs {
		if r.Recharge || len(r.Curve) < 2 {
			continue
		}
		if worst == nil || length(r) < length(worst) {
			worst = r
		}
		if best == nil || length(r) > length(best) {
			best = r
		}
	}
	switch {
	case worst == nil:
		return nil
	case best == worst:
		return []*facts.Run{worst}
	}
	return []*facts.Run{worst, best}
}

func (b *book) rechargeRun() *facts.Run {
	for _, r := range b.d.Endurance.Runs {
		if r.Recharge && len(r.Curve) > 1 {
			return r
		}
	}
	return nil
}

// length is how long a run lasts, in hours.
func length(r *facts.Run) float64 { return r.Curve[len(r.Curve)-1].Hours }

// runName says under what the battery runs: "5 °C, end of life".
func runName(r *facts.Run) string {
	age := "new"
	if r.Aged {
		age = "end of life"
	}
	return fmt.Sprintf("%v, %s", r.Temperature, age)
}

func (b *book) outagePlot(p *pad, runs []*facts.Run, top float64) {
	asked := b.d.Site.Duty.Outage.Val.Hours()
	low, high, most := math.Inf(1), 0.0, asked
	for _, r := range runs {
		for _, s := range r.Curve {
			low, high = min(low, float64(s.Volt)), max(high, float64(s.Volt))
		}
		most = max(most, length(r))
	}
	if q := b.d.CutOff; q != nil {
		low = min(low, float64(q.Opens))
	}
	x, y := hourAxis(most*1.05), linearAxis(low-0.2, high+0.1, 6)
	r := ink.Rect{X: p.pg.l + plotLeft, Y: top, W: outageWidth, H: hoursHeight}
	g := p.plot(x, y, r)
	p.write(p.pg.l, top-2.6, "volts at the battery", noteText, ink.Start)
	p.write(r.X+r.W, top+hoursHeight+8, "hours of outage", noteText, ink.End)
	if q := b.d.CutOff; q != nil {
		g.level(float64(q.Opens), fmt.Sprintf("%s opens at %s", q.Part.Designation, figure(q.Opens)))
	}
	g.demand(asked, b.d.Site.Duty.Outage.Val.String()+" asked")
	curves := make([][]xy, len(runs))
	for i, run := range runs {
		for _, s := range run.Curve {
			curves[i] = append(curves[i], xy{s.Hours, float64(s.Volt)})
		}
		width := 0.6
		if i > 0 {
			width = 0.4
		}
		g.curve(curves[i], width, curveDashes[(i+1)%2])
	}
	for i, run := range runs {
		g.name(spread(curves[i]), runName(run), figure(lasts(run)))
	}
	g.close()
}

// lasts is the length of a run as a duration.
func lasts(r *facts.Run) quantity.Second { return quantity.Hours(length(r)) }

// spread picks values along a curve to name it at, from the middle outwards.
func spread(values []xy) []xy {
	var out []xy
	for _, share := range []float64{0.8, 0.6, 0.9, 0.97, 0.45, 0.3, 0.15} {
		out = append(out, values[int(share*float64(len(values)-1))])
	}
	return out
}

// leastScale is the current that the axis reaches at least, in amperes: a charger may
// give next to nothing.
const leastScale = 0.1

func (b *book) chargePlot(p *pad, run *facts.Run, top float64) {
	asked := b.d.Site.Duty.Recharge.Val.Hours()
	amps := leastScale
	var charge, current []xy
	for _, s := range run.Curve {
		charge = append(charge, xy{s.Hours, float64(s.SoC) * 100})
		amps = max(amps, float64(s.Current))
	}
	x := hourAxis(max(asked, length(run)))
	y, right := linearAxis(0, 100, 4), linearAxis(0, amps*1.02, 4)
	for _, s := range run.Curve {
		current = append(current, xy{s.Hours, right.at(float64(s.Current)) * 100})
	}
	r := ink.Rect{X: p.pg.l + chargeLeft, Y: top, W: chargeWidth, H: hoursHeight}
	g := p.plot(x, y, r)
	g.rightFigures(right)
	p.write(r.X-9, top-2.6, "% charged", noteText, ink.Start)
	p.write(p.pg.right(), top-2.6, "A charging", noteText, ink.End)
	p.write(r.X+r.W, top+hoursHeight+8, "hours of recharge", noteText, ink.End)
	g.demand(asked, b.d.Site.Duty.Recharge.Val.String()+" asked")
	g.curve(charge, 0.6, nil)
	g.curve(current, 0.4, dashLong)
	if full := b.d.Endurance.Recharge; full > 0 {
		at := g.at(xy{full.Hours(), 0})
		p.stroke(at.X, r.Y, at.X, r.Y+r.H, 0.35, ink.Black, dashDots...)
		g.name([]xy{{full.Hours(), 80}, {full.Hours(), 60}, {full.Hours(), 40}}, figure(full)+": full")
	}
	g.name(spread(charge), "charge")
	g.name(spread(current), "current")
	g.close()
}
