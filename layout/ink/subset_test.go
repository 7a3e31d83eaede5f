package ink

import (
	"encoding/binary"
	"slices"
	"strings"
	"testing"

	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
	"pgregory.net/rapid"
)

// sameGlyphs reads file back and compares outline, advance and map of each rune
// with the whole font.
func sameGlyphs(t interface{ Fatalf(string, ...any) }, face Face, file []byte, runes []rune) {
	whole, err := sfnt.Parse(fontFile(face))
	if err != nil {
		t.Fatalf("%v", err)
	}
	part, err := sfnt.Parse(file)
	if err != nil {
		t.Fatalf("subset of %v: %v", face, err)
	}
	var a, b sfnt.Buffer
	const ppem = fixed.Int26_6(unitsPerEm)
	for _, r := range runes {
		i, _ := whole.GlyphIndex(&a, r)
		k, err := part.GlyphIndex(&b, r)
		if err != nil || k == 0 {
			t.Fatalf("%v: %U has glyph %d, %v", face, r, k, err)
		}
		want, err := whole.LoadGlyph(&a, i, ppem, nil)
		if err != nil {
			t.Fatalf("%v", err)
		}
		want = slices.Clone(want)
		got, err := part.LoadGlyph(&b, k, ppem, nil)
		if err != nil {
			t.Fatalf("%v: %U: %v", face, r, err)
		}
		if !slices.Equal(got, want) {
			t.Fatalf("%v: %U has another outline", face, r)
		}
		w1, _ := whole.GlyphAdvance(&a, i, ppem, font.HintingNone)
		w2, _ := part.GlyphAdvance(&b, k, ppem, font.HintingNone)
		if w1 != w2 {
			t.Fatalf("%v: %U is %v wide, was %v", face, r, w2, w1)
		}
	}
	for r := rune(' '); r < 0x2600; r++ {
		if k, _ := part.GlyphIndex(&b, r); k != 0 && !slices.Contains(runes, r) {
			t.Fatalf("%v: %U is in the subset unasked", face, r)
		}
	}
}

// known lists the runes that a face has a glyph for.
func known(face Face) (list []rune) {
	for r := range rune(0xFFFF) {
		if metrics(face).cmap[r] != 0 {
			list = append(list, r)
		}
	}
	return list
}

func TestSubsetWhole(t *testing.T) {
	for face := range Face(len(faceNames)) {
		file, err := subsetFont(fontFile(face), &metrics(face).cmap, known(face))
		if err != nil {
			t.Fatal(err)
		}
		sameGlyphs(t, face, file, known(face))
	}
}

func TestSubsetRandom(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		face := Face(rapid.IntRange(0, len(faceNames)-1).Draw(t, "face"))
		runes := rapid.SliceOfN(rapid.SampledFrom(known(face)), 0, 40).Draw(t, "runes")
		file, err := subsetFont(fontFile(face), &metrics(face).cmap, runes)
		if err != nil {
			t.Fatal(err)
		}
		sameGlyphs(t, face, file, runes)
	})
}

// TestSubsetSums: each table has the sum its directory entry states, and the
// whole file sums to the figure of ISO/IEC 14496-22.
func TestSubsetSums(t *testing.T) {
	runes := []rune("−F12 2 A Ω Ä é")
	file, err := subsetFont(fontFile(Regular), &metrics(Regular).cmap, runes)
	if err != nil {
		t.Fatal(err)
	}
	if len(file)%4 != 0 || checksum(file) != checksumTarget {
		t.Errorf("file sums to %08X", checksum(file))
	}
	tables, err := readTables(file)
	if err != nil {
		t.Fatal(err)
	}
	for i := range int(binary.BigEndian.Uint16(file[4:])) {
		record := file[12+16*i:]
		name := string(record[:4])
		data := slices.Clone(tables[name])
		if name == "head" {
			binary.BigEndian.PutUint32(data[headAdjustment:], 0)
		}
		if got := checksum(data); got != binary.BigEndian.Uint32(record[4:]) {
			t.Errorf("table %s sums to %08X", name, got)
		}
	}
	parsed, err := sfnt.Parse(file)
	if err != nil {
		t.Fatal(err)
	}
	for id, want := range map[sfnt.NameID]string{sfnt.NameIDFamily: "Go", sfnt.NameIDCopyright: "Bigelow", sfnt.NameIDLicense: "Redistribution and use"} {
		if got, err := parsed.Name(nil, id); err != nil || !strings.Contains(got, want) {
			t.Errorf("name %d is %q, %v", id, got, err)
		}
	}
	if len(file) > 6000 {
		t.Errorf("subset of %d signs takes %d bytes", len(runes), len(file))
	}
}

func TestSubsetRefuses(t *testing.T) {
	cmap := &metrics(Regular).cmap
	if _, err := subsetFont(fontFile(Regular), cmap, []rune("✓")); err == nil {
		t.Error("a sign without a glyph accepted")
	}
	whole := fontFile(Regular)
	for _, n := range []int{0, 4, 11, 40, 200, 5000} {
		if _, err := subsetFont(whole[:n], cmap, []rune("A")); err == nil {
			t.Errorf("font cut to %d bytes accepted", n)
		}
	}
}
