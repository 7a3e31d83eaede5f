// Package results writes a Design as data: results.json, the one machine-readable
// contract, and the tables that a spreadsheet or a label printer reads.
//
// The JSON's keys, units and meanings are set down in docs/results.schema.json. The
// same Design always gives the same bytes.
package results

import (
	"bytes"
	"encoding/json"
	"fmt"

	"gloamwright/internal/design"
)

// version is the value of the key "gloamwright": it rises when a key changes its
// meaning or goes; new keys leave it.
const version = 1

// document is results.json; the keys stand in this order.
type document struct {
	Gloamwright int            `json:"gloamwright"`
	Job         jobEntry       `json:"job"`
	Status      string         `json:"status"`
	Issued      bool           `json:"issued"`
	Findings    []findingEntry `json:"findings"`
	Parts       []partEntry    `json:"parts"`
	Conductors  []wireEntry    `json:"conductors"`
	Fuses       []fuseEntry    `json:"fuses"`
	Network     []elementEntry `json:"network"`
	Reference   string         `json:"reference"`
	Conditions  []condEntry    `json:"conditions"`
	TestPoints  []pointEntry   `json:"test_points"`
	Luminaires  []lampEntry    `json:"luminaires"`
	Battery     *batteryEntry  `json:"battery"`
	Charger     *chargerEntry  `json:"charger"`
	CutOff      *cutOffEntry   `json:"cut_off"`
	Relay       *relayEntry    `json:"relay"`
	Supply      *supplyEntry   `json:"supply"`
	Endurance   enduranceEntry `json:"endurance"`
	Function    []functionRow  `json:"function"`
	Thresholds  []threshold    `json:"thresholds"`
	Faults      []faultEntry   `json:"faults"`
	Totals      totalsEntry    `json:"totals"`
	Cost        *costEntry     `json:"cost"`
	Workings    []workingEntry `json:"workings"`
}

// jobEntry identifies the work.
type jobEntry struct {
	Number   string `json:"number"`
	Title    string `json:"title"`
	Client   string `json:"client"`
	Site     string `json:"site"`
	Prepared string `json:"prepared"`
	Revision string `json:"revision"`
	Date     string `json:"date"`
}

// The values of status.
const (
	forConstruction    = "construction"
	notForConstruction = "not-for-construction"
)

// JSON returns results.json of a design. It fails if two conditions or two nets bear
// the same name, for then a reader could not tell them apart.
func JSON(d *design.Design) ([]byte, error) {
	nets, err := netNames(d)
	if err != nil {
		return nil, err
	}
	conds, err := conditionNames(d)
	if err != nil {
		return nil, err
	}
	j := d.Site.Job
	out := document{
		Gloamwright: version,
		Job: jobEntry{
			Number: j.Number.Val, Title: j.Title.Val, Client: j.Client.Val, Site: j.Site.Val,
			Prepared: j.Prepared.Val, Revision: j.Revision.Val, Date: j.Date.Val,
		},
		Status: notForConstruction, Issued: d.Issued,
		Findings: findings(d), Parts: parts(d), Conductors: conductors(d), Fuses: fuses(d),
		Network: network(d, nets), Conditions: conditions(d, nets),
		TestPoints: testPoints(d, nets, conds), Luminaires: luminaires(d, conds),
		Battery: battery(d), Charger: charger(d), CutOff: cutOff(d), Relay: relay(d), Supply: supply(d),
		Endurance: endurance(d), Function: function(d, conds), Thresholds: thresholds(d), Faults: faults(d),
		Totals: totals(d), Cost: cost(d), Workings: workings(d),
	}
	if len(nets) > 0 {
		out.Reference = nets[0]
	}
	if d.ForConstruction() {
		out.Status = forConstruction
	}
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	if err := e.Encode(out); err != nil {
		return nil, fmt.Errorf("results.json: %w", err)
	}
	return b.Bytes(), nil
}

// netNames returns the name of every net of the netlist.
func netNames(d *design.Design) ([]string, error) {
	if d.Netlist == nil {
		return nil, nil
	}
	if twice := repeated(d.Netlist.Nets); twice != "" {
		return nil, fmt.Errorf("two nets are both named %q", twice)
	}
	return d.Netlist.Nets, nil
}

// conditionNames returns the key of every condition.
func conditionNames(d *design.Design) ([]string, error) {
	var out []string
	for _, c := range d.Conditions {
		out = append(out, c.Key)
	}
	if twice := repeated(out); twice != "" {
		return nil, fmt.Errorf("two operating conditions are both named %q", twice)
	}
	return out, nil
}

// repeated returns a name that occurs twice in list; empty if none does.
func repeated(list []string) string {
	seen := make(map[string]bool, len(list))
	for _, n := range list {
		if seen[n] {
			return n
		}
		seen[n] = true
	}
	return ""
}
