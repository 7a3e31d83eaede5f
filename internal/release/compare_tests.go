package release

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// tests finds the lines of the checklist that are to be done again, from the work that
// was found before.
func (c *comparison) tests() {
	readings := c.work[design.TestAgain] // are taken last
	c.work[design.TestAgain] = nil
	again := func(test, do, was, is, label string) {
		c.do(design.WorkItem{Tool: design.TestAgain, Test: test, Do: do, Was: was, Is: is}, label)
	}
	there := c.labelsNow()
	for _, w := range slices.Concat(c.work[design.ReCut], c.work[design.ReTerminate]) {
		for _, l := range w.Labels {
			if there[l] {
				c.retestConductor(l, again)
			}
		}
	}
	lamps := lampsOf(c.now)
	for _, w := range c.work[design.Replace] {
		for _, l := range w.Labels {
			if lamps[l] != nil {
				again(design.TestPolarity, polarityAtLight, "", "", l)
			}
		}
	}
	for _, w := range c.work[design.ReFuse] {
		for _, l := range w.Labels {
			if there[l] {
				again(design.TestFuse, "Rating in its place, against the fuse map", "", "", l)
			}
		}
	}
	for _, w := range c.work[design.Adjust] {
		for _, l := range w.Labels {
			again(design.TestSetting, "Settings, measured", "", "", l)
		}
	}
	c.loads(again)
	c.functions(again)
	c.endurance(again)
	c.work[design.TestAgain] = append(distinct(c.work[design.TestAgain]), readings...)
}

// labelsNow returns the labels of all conductors, runs and fuses of the new record.
func (c *comparison) labelsNow() map[string]bool {
	out := map[string]bool{}
	for _, w := range c.now.Conductors {
		out[w.Number] = true
		if w.Run != "" {
			out[w.Run] = true
		}
	}
	for _, f := range c.now.Fuses {
		out[f.Designation] = true
	}
	return out
}

const polarityAtLight = "Polarity at the light"

// retestConductor asks for the tests of a cable or wire that was worked at, given its
// label or that of one of its cores.
func (c *comparison) retestConductor(label string, again againFunc) {
	lamps := lampsOf(c.now)
	for _, w := range c.now.Conductors {
		if w.Number != label && w.Run != label {
			continue
		}
		if w.Run == "" {
			again(design.TestLoop, "Continuity, and a tug at both ends", "", "", w.Number)
			continue
		}
		again(design.TestLoop, "Resistance of the run, far end joined", "", "", w.Run)
		again(design.TestInsulate, "Insulation between the cores and to earth", "", "", w.Run)
		if lamp := partOf(w.To); lamps[lamp] != nil {
			again(design.TestPolarity, polarityAtLight, "", "", lamp)
		} else {
			again(design.TestPolarity, "Polarity at the far end", "", "", w.Run)
		}
	}
}

// partOf returns the part of a terminal: "-E15" of "-E15:+".
func partOf(terminal string) string { return terminal[:max(strings.LastIndexByte(terminal, ':'), 0)] }

// distinct drops items that say the same of the same label.
func distinct(items []design.WorkItem) []design.WorkItem {
	var out []design.WorkItem
	seen := map[string]bool{}
	for _, w := range items {
		key := w.Test + "|" + w.Do + "|" + strings.Join(w.Labels, "|")
		if !seen[key] {
			seen[key] = true
			out = append(out, w)
		}
	}
	return out
}

type againFunc func(test, do, was, is, label string)

// loads finds the fuses through which another current flows.
func (c *comparison) loads(again againFunc) {
	pairs(c.old.Fuses, c.now.Fuses, func(f *recordFuse) string { return f.Designation }, func(o, n *recordFuse) {
		if n == nil {
			return
		}
		was, is := "", load(n.Load)
		if o != nil {
			was = load(o.Load)
		}
		if was != is {
			again(design.TestLoad, "Current with its lights on", was, is, n.Designation)
		}
	})
}

// load prints a current as a clamp meter shows it.
func load(a float64) string { return fmt.Sprintf("%.2f A", a) }

// functions finds the circuits that are lit in other conditions than before.
func (c *comparison) functions(again againFunc) {
	var names []string
	pairs(c.old.Function, c.now.Function, func(f *recordFunction) string { return c.names.of(f.Circuit) }, func(o, n *recordFunction) {
		if n == nil {
			return
		}
		same := o != nil
		for k, lit := range n.Found {
			same = same && o.Found[k] == lit
		}
		if !same {
			names = append(names, n.Circuit)
		}
	})
	for _, n := range names {
		c.do(design.WorkItem{Tool: design.TestAgain, Test: design.TestFunction, What: n, Do: "What is lit when, against the function table"}, "")
	}
}

// endurance finds whether the outage has to be tried again: with another battery or
// cut-off, or because the lights are to last no longer so long.
func (c *comparison) endurance(again againFunc) {
	var labels []string
	for _, p := range c.now.Parts {
		set := slices.ContainsFunc(c.work[design.Adjust], func(w design.WorkItem) bool { return slices.Contains(w.Labels, p.Designation) })
		switch {
		case p.Kind == string(circuit.Battery) && c.replaced(p.Designation), p.Kind == string(circuit.CutOff) && (set || c.replaced(p.Designation)):
			labels = append(labels, p.Designation)
		}
	}
	was, is := hours(c.old.Endurance.Held), hours(c.now.Endurance.Held)
	if len(labels) == 0 && c.now.Endurance.Held < c.old.Endurance.Held && was != is && c.now.Battery != nil {
		labels = append(labels, c.now.Battery.Designation)
	}
	for _, l := range labels {
		again(design.TestEndurance, "Discharge until the cut-off opens", was, is, l)
	}
}

func hours(h float64) string { return fmt.Sprintf("%.1f h", h) }
