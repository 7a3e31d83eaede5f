package job

import (
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"text/tabwriter"

	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/internal/quantity"
)

// sweepMost bounds the number of designs of one sweep.
const sweepMost = 200

var sweepForm = regexp.MustCompile(`^(-?[0-9.]+)\s*([^0-9.\s]*)\s*\.\.\s*(-?[0-9.]+)\s*([^0-9./]*[^0-9./\s])\s*/\s*([0-9.]+)\s*([^0-9.\s]*)$`)

// sweepValues returns the values of a range such as 2h..12h/1h, as texts.
func sweepValues(text string) ([]string, error) {
	bad := &BadSet{fmt.Sprintf("--sweep %s: write it as path=from..to/step, such as duty.outage=2h..12h/1h", text)}
	m := sweepForm.FindStringSubmatch(strings.TrimSpace(text))
	if m == nil {
		return nil, bad
	}
	from, err1 := strconv.ParseFloat(m[1], 64)
	to, err2 := strconv.ParseFloat(m[3], 64)
	step, err3 := strconv.ParseFloat(m[5], 64)
	unit := m[4]
	if errors.Join(err1, err2, err3) != nil || step <= 0 || to < from || m[2] != "" && m[2] != unit || m[6] != "" && m[6] != unit {
		return nil, bad
	}
	n := int((to-from)/step + 1e-9)
	if n+1 > sweepMost {
		return nil, &BadSet{fmt.Sprintf("--sweep %s: %d steps; at most %d", text, n+1, sweepMost)}
	}
	var out []string
	for i := 0; i <= n; i++ {
		v := strconv.FormatFloat(from+float64(i)*step, 'f', -1, 64)
		if len(v) > 10 {
			v = strconv.FormatFloat(from+float64(i)*step, 'f', 6, 64)
		}
		out = append(out, strings.TrimSpace(v+" "+unit))
	}
	return out, nil
}

// unpriced tells a cost that leaves something out from one that does not.
func unpriced(b *facts.Bill) string {
	if len(b.Without) == 0 {
		return ""
	}
	return fmt.Sprintf(", %d unpriced", len(b.Without))
}

// Sweep designs the site once for each value of a range and writes a table.
func Sweep(w io.Writer, path string, set []string, sweep string) error {
	key, span, ok := strings.Cut(sweep, "=")
	if !ok {
		return &BadSet{fmt.Sprintf("--sweep %s: write it as path=from..to/step, such as duty.outage=2h..12h/1h", sweep)}
	}
	values, err := sweepValues(span)
	if err != nil {
		return err
	}
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	for i, v := range values {
		d, err := Load(path, append(set[:len(set):len(set)], key+"="+v))
		if err != nil {
			return fmt.Errorf("%s = %s: %w", key, v, err)
		}
		cost := []string{"", ""} // head and figure of its column, where there are prices
		if b := d.Bill; b != nil {
			cost = []string{"cost\t", b.Sum(b.Total) + unpriced(b) + "\t"}
		}
		if i == 0 {
			fmt.Fprintf(t, "%s\tbattery\tneeds\tcharger\theld\tcopper\t%sworst drop\tstop\tcautions\t\n", key, cost[0])
		}
		fmt.Fprintf(t, "%s\t%s\t%s\t%s\t%s\t%.2f kg\t%s%.2f %%\t%d\t%d\t\n", v, d.Battery.Capacity, quantity.Format(d.Battery.Required, 3), d.Charger.Current,
			hours(d.Endurance.Held), d.Totals.CopperKg, cost[1], 100*float64(d.Totals.WorstDrop), d.Count(finding.Stop), d.Count(finding.Caution))
	}
	return t.Flush()
}
