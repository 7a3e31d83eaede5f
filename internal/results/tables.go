package results

import (
	"encoding/csv"
	"io"
	"strconv"

	"gloamwright/internal/design"
)

// Table is one CSV file: UTF-8, a row of headings first, comma and CRLF as RFC 4180
// has them. Numbers stand in the unit that the heading names, with a decimal point; an
// empty field means that there is no such figure.
type Table struct {
	Name     string
	Headings []string
	Rows     [][]string
}

// Write writes the table.
func (t *Table) Write(w io.Writer) error {
	c := csv.NewWriter(w)
	c.UseCRLF = true
	if err := c.Write(t.Headings); err != nil {
		return err
	}
	return c.WriteAll(t.Rows)
}

// Tables returns the tables of a design.
func Tables(d *design.Design) []*Table {
	return []*Table{wireRuns(d), fuseMap(d), testPointTable(d), partsList(d), labels(d)}
}

// cell prints a figure, empty for none.
func cell(v *float64) string {
	if v == nil {
		return ""
	}
	return strconv.FormatFloat(*v, 'f', -1, 64)
}

// given prints whether the user gave a value.
func given(pinned bool) string {
	if pinned {
		return "given"
	}
	return ""
}
