package ink

import (
	"bytes"
	"crypto/sha256"
	"fmt"
	"image"
	"image/color"
	"image/png"
)

// pdfImage is a picture of the document.
type pdfImage struct{ object int }

func sumOf(file []byte) string {
	sum := sha256.Sum256(file)
	return string(sum[:])
}

// pictures writes every PNG once, however often it is shown.
func (d *pdfDoc) pictures() error {
	d.images = map[string]pdfImage{}
	var fault error
	for _, s := range d.sheets {
		walk(s.Calls, func(c Call) {
			p, ok := c.(Pictured)
			if !ok || fault != nil {
				return
			}
			sum := sumOf(p.PNG)
			if _, known := d.images[sum]; known {
				return
			}
			picture, err := png.Decode(bytes.NewReader(p.PNG))
			if err != nil {
				fault = fmt.Errorf("picture: %w", err)
				return
			}
			d.images[sum] = pdfImage{d.image(picture)}
			d.shown = append(d.shown, sum)
		})
	}
	return fault
}

// image writes the dots of a picture and, where some let the paper through, how much.
func (d *pdfDoc) image(p image.Image) int {
	box := p.Bounds()
	dots := make([]byte, 0, 3*box.Dx()*box.Dy())
	cover := make([]byte, 0, box.Dx()*box.Dy())
	clear := false
	for y := box.Min.Y; y < box.Max.Y; y++ {
		for x := box.Min.X; x < box.Max.X; x++ {
			c := color.NRGBAModel.Convert(p.At(x, y)).(color.NRGBA)
			dots, cover = append(dots, c.R, c.G, c.B), append(cover, c.A)
			clear = clear || c.A < 0xFF
		}
	}
	entries := fmt.Sprintf("/Type /XObject /Subtype /Image /Width %d /Height %d /BitsPerComponent 8 ", box.Dx(), box.Dy())
	mask := ""
	if clear {
		mask = fmt.Sprintf("/SMask %d 0 R ", d.add(stream(cover, entries+"/ColorSpace /DeviceGray ")))
	}
	return d.add(stream(dots, entries+"/ColorSpace /DeviceRGB "+mask))
}
