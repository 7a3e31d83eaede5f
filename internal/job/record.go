package job

import (
	"fmt"

	"gloamwright/internal/commission"
	"gloamwright/internal/design"
	"gloamwright/internal/release"
	"gloamwright/layout/packet"
)

// Record writes the documents of a commissioning record.
func Record(d *design.Design, r *commission.Record) ([]release.File, error) {
	js, err := r.JSON()
	if err != nil {
		return nil, err
	}
	pdf, err := packet.Record(d, r)
	if err != nil {
		return nil, fmt.Errorf("commissioning record: %w", err)
	}
	return []release.File{{Name: "record.pdf", Data: pdf}, {Name: "record.json", Data: js}}, nil
}
