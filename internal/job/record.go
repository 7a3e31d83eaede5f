package job

import (
	"gloamwright/internal/commission"
	"gloamwright/internal/design"
	"gloamwright/internal/release"
)

// Record writes the documents of a commissioning record.
func Record(_ *design.Design, r *commission.Record) ([]release.File, error) {
	js, err := r.JSON()
	if err != nil {
		return nil, err
	}
	return []release.File{{Name: "record.json", Data: js}}, nil
}
