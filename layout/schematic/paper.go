package schematic

import "fmt"

// Paper is a sheet size in millimetres, trimmed.
type Paper struct {
	Name string
	W, H float64
}

// The papers of circuit diagrams.
var (
	paperA3      = Paper{"A3", 420, 297}
	paperTabloid = Paper{"Tabloid", 431.8, 279.4}
)

// Zone names the zone of a place: fields of 50 mm counted from the sheet's centre
// lines outward (ISO 5457), letters down the short side without I and O, numbers
// along the long side.
func (p Paper) Zone(x, y float64) string {
	field := func(at, length float64, fields int) int {
		n := fields / 2
		for k := 1 - n; k < n; k++ {
			if at < length/2+50*float64(k) {
				return k + n - 1
			}
		}
		return fields - 1
	}
	return fmt.Sprintf("%c%d", "ABCDEFGHJKLM"[field(y, p.H, 6)], field(x, p.W, 8)+1)
}
