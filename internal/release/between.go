package release

import (
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/results"
)

// Between compares two designs of one description, such as before and after it was
// saved.
func Between(was, is *design.Design, schema *describe.Schema) (*design.Changes, error) {
	old, err := recordOf(was)
	if err != nil {
		return nil, err
	}
	now, err := recordOf(is)
	if err != nil {
		return nil, err
	}
	return compareDesign(old, was.Site, now, is, schema).notice(), nil
}

func recordOf(d *design.Design) (*record, error) {
	js, err := results.JSON(d)
	if err != nil {
		return nil, err
	}
	return readRecord(resultsFile, js)
}

// compareDesign compares a record with its description and a design.
func compareDesign(old *record, was *describe.Site, now *record, d *design.Design, schema *describe.Schema) *comparison {
	values, scopes := changedValues(was, d.Site, schema)
	nameLamps(values, scopes, now)
	n := names{map[string]string{}, map[string]string{}, map[string]string{}, d.Site.Practice.LengthUnit()}
	for _, b := range d.Circuit.Boards {
		n.titles[b.Name], n.strips[b.Name] = b.Title, b.Strip
	}
	for from, to := range renamings(was, d.Site) {
		n.renamed[from] = to.Name.Val
	}
	return compareRecords(old, now, values, scopes, n)
}
