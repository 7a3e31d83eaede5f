package packet

import "gloamwright/layout/ink"

// crosses draws four crosses of 4 mm in the margins, by which the offset of a printer
// is seen.
func (p *pad) crosses() {
	const half, out = 2.0, 4.5
	for _, x := range []float64{p.pg.l - out - 1, p.pg.right() + out} {
		for _, y := range []float64{p.pg.top() + 2, p.pg.end()} {
			p.stroke(x-half, y, x+half, y, hairline, ink.Black)
			p.stroke(x, y-half, x, y+half, hairline, ink.Black)
		}
	}
}
