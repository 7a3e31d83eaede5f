package commission

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// Filled is a sheet as a technician filled it.
type Filled struct {
	Job, Revision, Sheet string
	Tester, Meter, Date  string
	Readings             []Reading
}

// Reading is one filled line.
type Reading struct {
	Condition, Point string
	Text             string // as written; empty: not taken
	At               describe.Span
}

// maxSheet bounds the size of a filled sheet in bytes.
const maxSheet = 4 << 20

// Read reads a filled sheet, YAML or CSV by what it looks like. Every mistake comes
// with its place.
func Read(file string, src []byte) (*Filled, describe.List) {
	if len(src) > maxSheet {
		return nil, oneMistake(file, 0, "too large", "A filled readings sheet has at most a few hundred lines.")
	}
	if strings.HasSuffix(strings.ToLower(file), ".csv") || strings.HasPrefix(strings.TrimPrefix(string(src), "\ufeff"), "readings_of,") {
		return readCSV(file, string(src))
	}
	return readYAML(file, src)
}

func oneMistake(file string, line int, summary, detail string) describe.List {
	return describe.List{mistake(file, line, 1, summary, detail)}
}

func mistake(file string, line, col int, summary, detail string) describe.Diagnostic {
	return describe.Diagnostic{
		Severity: describe.Error, Code: "R001", Summary: summary, Detail: detail,
		At: describe.Span{File: file, Line: line, Col: col, Len: 1},
	}
}

func readYAML(file string, src []byte) (*Filled, describe.List) {
	var doc yaml.Node
	if err := yaml.Unmarshal(src, &doc); err != nil {
		return nil, oneMistake(file, 0, "not readable", "This is not YAML as gloamwright readings wrote it: "+strings.TrimPrefix(err.Error(), "yaml: ")+".")
	}
	if len(doc.Content) != 1 || doc.Content[0].Kind != yaml.MappingNode {
		return nil, oneMistake(file, 1, "not a readings sheet", "Begin with the sheet that gloamwright readings writes.")
	}
	f := &Filled{}
	var list describe.List
	top := doc.Content[0]
	seen := map[string]bool{}
	for i := 0; i+1 < len(top.Content); i += 2 {
		k, v := top.Content[i], top.Content[i+1]
		if seen[k.Value] {
			list = append(list, mistake(file, k.Line, k.Column, "repeated: "+k.Value, "It stands twice; keep one."))
			continue
		}
		seen[k.Value] = true
		switch k.Value {
		case "readings_of":
			f.Job = v.Value
		case "revision":
			f.Revision = v.Value
		case "sheet":
			f.Sheet = v.Value
		case "tester":
			f.Tester = v.Value
		case "meter":
			f.Meter = v.Value
		case "date":
			f.Date = v.Value
		default:
			list = append(list, f.condition(file, k, v)...)
		}
	}
	return f, list
}

// condition reads the points of one condition.
func (f *Filled) condition(file string, k, v *yaml.Node) describe.List {
	var list describe.List
	if v.Kind != yaml.MappingNode {
		return describe.List{mistake(file, v.Line, v.Column, "no readings under "+k.Value, "Each line is a test point with its band and measured.")}
	}
	for i := 0; i+1 < len(v.Content); i += 2 {
		p, m := v.Content[i], v.Content[i+1]
		r := Reading{Condition: k.Value, Point: p.Value, At: describe.Span{File: file, Line: p.Line, Col: p.Column, Len: len(p.Value)}}
		if m.Kind != yaml.MappingNode {
			list = append(list, mistake(file, m.Line, m.Column, "no band at "+p.Value, "Keep the line as gloamwright readings wrote it and fill in measured."))
			continue
		}
		for j := 0; j+1 < len(m.Content); j += 2 {
			if m.Content[j].Value == "measured" && m.Content[j+1].Tag != "!!null" {
				r.Text = strings.TrimSpace(m.Content[j+1].Value)
				r.At = describe.Span{File: file, Line: m.Content[j+1].Line, Col: m.Content[j+1].Column, Len: max(1, len(r.Text))}
			}
		}
		f.Readings = append(f.Readings, r)
	}
	return list
}

func readCSV(file, src string) (*Filled, describe.List) {
	r := csv.NewReader(strings.NewReader(strings.TrimPrefix(src, "\ufeff")))
	r.FieldsPerRecord = -1
	f := &Filled{}
	pairs := func(row []string) {
		for i := 0; i+1 < len(row); i += 2 {
			switch row[i] {
			case "readings_of":
				f.Job = row[i+1]
			case "revision":
				f.Revision = row[i+1]
			case "sheet":
				f.Sheet = row[i+1]
			case "tester":
				f.Tester = row[i+1]
			case "meter":
				f.Meter = row[i+1]
			case "date":
				f.Date = row[i+1]
			}
		}
	}
	for {
		row, err := r.Read()
		if errors.Is(err, io.EOF) {
			return f, nil
		}
		if err != nil {
			return nil, oneMistake(file, 0, "not readable", "This is not CSV as gloamwright readings wrote it: "+err.Error()+".")
		}
		line, _ := r.FieldPos(0)
		switch {
		case row[0] == "readings_of" || row[0] == "tester":
			pairs(row)
		case row[0] == csvHead[0] || len(row) < 2:
		default:
			x := Reading{Condition: row[0], Point: row[1], At: describe.Span{File: file, Line: line, Col: 1, Len: 1}}
			if len(row) >= len(csvHead) {
				x.Text = strings.TrimSpace(row[len(csvHead)-1])
			}
			f.Readings = append(f.Readings, x)
		}
	}
}

// volts reads a reading: a bare number is in volts, as the sheet's column says.
func volts(text string) (float64, error) {
	if v, err := strconv.ParseFloat(strings.ReplaceAll(text, "−", "-"), 64); err == nil {
		return v, nil
	}
	v, err := quantity.Parse[quantity.Volt](text)
	if err != nil {
		return 0, fmt.Errorf("%q is not a voltage: write it like 25.3 V", text)
	}
	return float64(v), nil
}
