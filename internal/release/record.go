package release

import (
	"encoding/json"
	"fmt"
	"strconv"
)

// record is what comparing needs of a results.json. Two records are compared, never a
// record and a design, so that what is compared is what was issued.
type record struct {
	Gloamwright int
	Job         recordJob
	Status      string
	Findings    []recordFinding
	Parts       []recordPart
	Conductors  []recordWire
	Fuses       []recordFuse
	Conditions  []recordCondition
	TestPoints  []recordPoint `json:"test_points"`
	Luminaires  []recordLamp
	Battery     *recordBattery
	Endurance   recordEndurance
	Function    []recordFunction
	Thresholds  []recordThreshold
}

type recordJob struct{ Number, Title, Prepared, Revision, Date string }

type recordFinding struct{ Severity, Check, Subject, Message string }

type recordPart struct {
	Designation, Kind, Stage, Circuit, Description, Requirement string
	Values                                                      map[string]recordValue
}

type recordValue struct{ Text string }

type recordWire struct {
	Number, Run, Circuit, From, To, Size, Colour, Fuse string
	Length                                             float64 `json:"length_m"`
}

type recordFuse struct {
	Designation, Board, Feeds, Style, Colour string
	Way                                      int
	Rating                                   float64 `json:"rating_a"`
	Load                                     float64 `json:"design_current_a"`
	Ampacity                                 float64 `json:"cable_ampacity_a"`
	Size                                     string  `json:"cable_size"`
	Prospective                              float64 `json:"prospective_a"`
	FarEnd                                   float64 `json:"far_end_a"`
}

type recordCondition struct {
	Name, Title string
	Number      int // 0: not read by a technician
}

type recordPoint struct {
	Label, Shows, Terminal, Black string
	Readings                      map[string]recordBand
}

type recordBand struct {
	Low     float64 `json:"low_v"`
	Typical float64 `json:"typical_v"`
	High    float64 `json:"high_v"`
	Or      []struct {
		With    string
		Low     float64 `json:"low_v"`
		Typical float64 `json:"typical_v"`
		High    float64 `json:"high_v"`
	}
}

type recordLamp struct {
	Designation, Circuit, Kind, Type, Place string
	Power                                   float64 `json:"power_w"`
	Low                                     float64 `json:"low_v"`
	High                                    float64 `json:"high_v"`
}

type recordBattery struct {
	Designation string
	Capacity    float64 `json:"capacity_ah"`
	Required    float64 `json:"required_ah"`
}

type recordEndurance struct {
	Held float64 `json:"held_h"`
}

type recordFunction struct {
	Circuit string
	Found   map[string]bool
}

type recordThreshold struct {
	Key, Name, Unit, Text string
	Value                 float64
}

// resultsVersion is the version of results.json that can be compared.
const resultsVersion = 1

// readRecord decodes a results.json; name says which in messages.
func readRecord(name string, data []byte) (*record, error) {
	var r record
	if err := json.Unmarshal(data, &r); err != nil {
		return nil, fmt.Errorf("%s cannot be read: %w", name, err)
	}
	if r.Gloamwright != resultsVersion {
		return nil, fmt.Errorf("%s is of version %d, this program compares version %d; issue with the program that wrote it, or a newer one", name, r.Gloamwright, resultsVersion)
	}
	return &r, nil
}

// wired says whether a part is one that a technician fits: the mains stays with
// licensed persons, bars belong to their boards.
func (p *recordPart) fitted() bool { return p.Kind != "mains" && p.Kind != "busbar" }

// cable is a run with its cores.
type cable struct {
	Label string
	Cores []recordWire
}

// cables groups the cores of each run, in the order of the conductors.
func (r *record) cables() []cable {
	var out []cable
	at := map[string]int{}
	for _, w := range r.Conductors {
		if w.Run == "" {
			continue
		}
		i, ok := at[w.Run]
		if !ok {
			i = len(out)
			at[w.Run] = i
			out = append(out, cable{Label: w.Run})
		}
		out[i].Cores = append(out[i].Cores, w)
	}
	return out
}

// wires returns the conductors that are no core of a cable.
func (r *record) wires() []recordWire {
	var out []recordWire
	for _, w := range r.Conductors {
		if w.Run == "" {
			out = append(out, w)
		}
	}
	return out
}

// amperes prints a rating.
func amperes(a float64) string {
	if a > 0 && a < 1 {
		return strconv.FormatFloat(a*1000, 'g', 4, 64) + " mA"
	}
	return strconv.FormatFloat(a, 'g', 4, 64) + " A"
}
