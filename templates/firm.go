package templates

import (
	"bytes"
	"errors"
	"fmt"
	"image"
	"image/draw"
	"image/png"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strings"

	"gloamwright/internal/describe"
	"gloamwright/layout/ink"
)

// Firm is the firm that makes the documents.
type Firm struct {
	Name string
	Logo *ink.Picture // nil for none
}

// firmFile names the firm; the program brings none.
const firmFile = "firm.yaml"

// readFirm reads the firm's name and its logo, a file beside it.
func readFirm(r *reader, t *Texts, top node) {
	r.fields(top, []string{"name", "logo"}, func(key string, v node) {
		switch key {
		case "name":
			t.Firm.Name = strings.TrimSpace(r.word(v))
			if t.Firm.Name == "" {
				r.report(v.at(), "a firm without a name", "")
			}
		case "logo":
			t.Firm.Logo = r.logo(t, v)
		}
	})
}

// logo reads the file that a node names, an SVG or a PNG of the folder of texts.
func (r *reader) logo(t *Texts, n node) *ink.Picture {
	name := r.word(n)
	if !filepath.IsLocal(name) {
		r.report(n.at(), fmt.Sprintf("the logo %q is outside the folder of texts", name), "Name a file of this folder.")
		return nil
	}
	file := filepath.Join(filepath.Dir(n.file), name)
	src, err := os.ReadFile(file)
	if err != nil {
		detail := err.Error()
		if errors.Is(err, fs.ErrNotExist) {
			detail = "Put the file beside " + firmFile + "."
		}
		r.report(n.at(), fmt.Sprintf("the logo %q cannot be read", name), detail)
		return nil
	}
	t.Files = append(t.Files, File{path.Clean(filepath.ToSlash(name)), src})
	switch strings.ToLower(filepath.Ext(name)) {
	case ".svg":
		return r.svg(file, src)
	case ".png":
		return r.png(n, name, src)
	}
	r.report(n.at(), fmt.Sprintf("the logo %q is neither SVG nor PNG", name), "")
	return nil
}

// mostDots is the widest and highest PNG that is taken: at 20 mm it prints with more
// than 1200 dots an inch.
const mostDots = 1000

// png reads a logo of dots. It is written anew with eight bits a colour and not
// interlaced, which every reader of the documents knows.
func (r *reader) png(n node, name string, src []byte) *ink.Picture {
	size, err := png.DecodeConfig(bytes.NewReader(src))
	if err != nil {
		r.report(n.at(), fmt.Sprintf("the logo %q is no PNG", name), err.Error())
		return nil
	}
	if size.Width > mostDots || size.Height > mostDots || size.Width < 1 || size.Height < 1 {
		r.report(n.at(), fmt.Sprintf("the logo %q has %d × %d dots", name, size.Width, size.Height), fmt.Sprintf("At most %d × %[1]d.", mostDots))
		return nil
	}
	from, err := png.Decode(bytes.NewReader(src))
	if err != nil {
		r.report(n.at(), fmt.Sprintf("the logo %q is damaged", name), err.Error())
		return nil
	}
	dots := image.NewNRGBA(image.Rect(0, 0, size.Width, size.Height))
	draw.Draw(dots, dots.Bounds(), from, from.Bounds().Min, draw.Src)
	var out bytes.Buffer
	if err := png.Encode(&out, dots); err != nil {
		r.report(n.at(), fmt.Sprintf("the logo %q cannot be written", name), err.Error())
		return nil
	}
	return &ink.Picture{W: float64(size.Width), H: float64(size.Height), PNG: out.Bytes()}
}

// svg reads a logo of filled shapes.
func (r *reader) svg(file string, src []byte) *ink.Picture {
	r.sources[file] = src
	d := &drawing{text: src}
	p := d.read()
	for _, f := range d.faults {
		r.report(describe.Span{File: file, Line: f.line, Col: f.col, Len: 1}, f.what, f.help)
	}
	if len(d.faults) > 0 {
		return nil
	}
	return p
}
