package readertest

import (
	"encoding/json"
	"fmt"
	"image"
	"image/png"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"flankwright/export/svg/svgtest"
)

// SVG shows the file to every reader, one subtest each: the strict one of this
// module, xmllint, svgelements, librsvg, resvg and OpenSCAD. The margin is what
// the page has on each side of the drawing, in its unit.
func SVG(t *testing.T, path string, want Expect, margin float64) {
	t.Run("strict", func(t *testing.T) { strictSVG(t, path, want, margin) })
	t.Run("xmllint", func(t *testing.T) { run(t, nil, program(t, "xmllint", "libxml2-utils"), "--noout", path) })
	t.Run("svgelements", func(t *testing.T) { svgelements(t, path, want, margin) })
	if want.PartArea <= 0 {
		return // nothing is filled
	}
	for _, rule := range []string{"evenodd", "nonzero"} {
		t.Run("rsvg-"+rule, func(t *testing.T) { rsvg(t, path, want, rule) })
		t.Run("resvg-"+rule, func(t *testing.T) { resvg(t, path, want, rule) })
	}
	t.Run("openscad", func(t *testing.T) { openscadSVG(t, path, want) })
}

func readSVG(t *testing.T, path string) *svgtest.File {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	f, err := svgtest.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	return f
}

func strictSVG(t *testing.T, path string, want Expect, margin float64) {
	f := readSVG(t, path)
	if f.Unit != want.Unit.String() {
		t.Errorf("unit %s, want %s", f.Unit, want.Unit)
	}
	w, h := want.Span[2]-want.Span[0]+2*margin, want.Span[3]-want.Span[1]+2*margin
	if !near(f.Width, w, 1e-8*w) || !near(f.Height, h, 1e-8*h) {
		t.Errorf("page %v by %v, want %v by %v", f.Width, f.Height, w, h)
	}
	area, length := 0.0, 0.0
	for _, s := range f.Shapes {
		if s.Element != "path" || s.Attr["stroke"] == "" {
			continue // a marker, whose stroke is that of its group
		}
		area += s.Area()
		for _, p := range s.Subpaths {
			length += p.Length
		}
	}
	if !near(area, want.PartArea, 1e-6*want.PartArea) || !near(length, want.PartLen, 1e-6*want.PartLen) {
		t.Errorf("area %.12g, length %.12g, want %.12g, %.12g", area, length, want.PartArea, want.PartLen)
	}
}

func svgelements(t *testing.T, path string, want Expect, margin float64) {
	py := python(t, "svgelements", "python3-svgelements")
	var r struct {
		Width, Height float64
		Shapes        []struct {
			ID       string
			Bbox     [4]float64
			Subpaths []struct {
				Area, Length float64
				Closed       bool
			}
		}
	}
	if err := json.Unmarshal(run(t, nil, py, script(t, "svgelements_read.py"), path, "25.4"), &r); err != nil {
		t.Fatal(err)
	}
	mm := 1 / want.Unit.Scale()
	// Its millimetre is a pixel at 25.4 to the inch only to 5.4e-7, and the
	// script asks for chords of 0.004 rad.
	const tol = 4e-6
	w := (want.Span[2] - want.Span[0] + 2*margin) * mm
	h := (want.Span[3] - want.Span[1] + 2*margin) * mm
	if !near(r.Width, w, tol*w) || !near(r.Height, h, tol*h) {
		t.Errorf("page %v by %v mm, want %v by %v", r.Width, r.Height, w, h)
	}
	area, length := 0.0, 0.0
	for _, l := range want.Layers {
		length += l.Length * mm
	}
	for _, s := range r.Shapes {
		for _, p := range s.Subpaths {
			length -= p.Length
			if strings.HasPrefix(s.ID, "part") {
				area -= p.Area // y runs down
			}
		}
	}
	if a := want.PartArea * mm * mm; !near(area, a, tol*want.Gross*mm*mm) {
		t.Errorf("area %.12g mm2, want %.12g", area, a)
	}
	if !near(length, 0, tol*want.PartLen*mm*2) {
		t.Errorf("lengths differ by %g mm", length)
	}
}

// filled writes a copy of the file with nothing but the part, filled black by
// the given rule and without a stroke, and returns its path.
func filled(t *testing.T, path, rule string) (string, *svgtest.File) {
	t.Helper()
	f := readSVG(t, path)
	unit := f.Unit
	var b strings.Builder
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" width="%[1]v%[3]s" height="%[2]v%[3]s" viewBox="0 0 %[1]v %[2]v">`, f.Width, f.Height, unit)
	for _, s := range f.Shapes {
		if strings.HasPrefix(s.ID, "part") {
			fmt.Fprintf(&b, `<path d="%s" fill="#000000" stroke="none" fill-rule="%s"/>`, s.Attr["d"], rule)
		}
	}
	b.WriteString("</svg>\n")
	out := filepath.Join(t.TempDir(), "filled.svg")
	if err := os.WriteFile(out, []byte(b.String()), 0o666); err != nil {
		t.Fatal(err)
	}
	return out, f
}

// pixelsPerMM makes the longer side of a picture some 1,600 pixels.
func pixelsPerMM(f *svgtest.File, mm float64) float64 {
	return math.Max(1, math.Round(1600/(math.Max(f.Width, f.Height)*mm)))
}

// comparePixels checks the size of a picture and its filled area. A renderer
// rounds coverage to some 1/256 along the edge, which on a picture this size
// stays well below a thousandth of the area. It may stretch the picture to whole
// pixels.
func comparePixels(t *testing.T, f *svgtest.File, want Expect, ppmm float64, w, h int, area float64) {
	t.Helper()
	mm := 1 / want.Unit.Scale()
	if !near(float64(w), f.Width*mm*ppmm, 1.01) || !near(float64(h), f.Height*mm*ppmm, 1.01) {
		t.Errorf("%d by %d pixels at %v per mm for %v by %v %s", w, h, ppmm, f.Width, f.Height, f.Unit)
	}
	if got, a := area/(ppmm*ppmm), want.PartArea*mm*mm; !near(got, a, (1e-3+1/float64(w)+1/float64(h))*a) {
		t.Errorf("filled %v mm2, want %v", got, a)
	}
}

func rsvg(t *testing.T, path string, want Expect, rule string) {
	exe := program(t, "rsvg-convert", "librsvg2-bin")
	in, f := filled(t, path, rule)
	ppmm := pixelsPerMM(f, 1/want.Unit.Scale())
	dpi := fmt.Sprint(25.4 * ppmm)
	out := filepath.Join(t.TempDir(), "out.png")
	run(t, nil, exe, "-d", dpi, "-p", dpi, "-o", out, in)
	file, err := os.Open(out)
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	img, err := png.Decode(file)
	if err != nil {
		t.Fatal(err)
	}
	b := img.Bounds()
	comparePixels(t, f, want, ppmm, b.Dx(), b.Dy(), coverage(img))
}

// coverage adds up the opacity of all pixels.
func coverage(img image.Image) float64 {
	sum := 0.0
	b := img.Bounds()
	for y := b.Min.Y; y < b.Max.Y; y++ {
		for x := b.Min.X; x < b.Max.X; x++ {
			_, _, _, a := img.At(x, y).RGBA()
			sum += float64(a) / 0xffff
		}
	}
	return sum
}

func resvg(t *testing.T, path string, want Expect, rule string) {
	node := program(t, "node", "nodejs")
	modules := nodeModules(t, "@resvg/resvg-js")
	in, f := filled(t, path, rule)
	ppmm := pixelsPerMM(f, 1/want.Unit.Scale())
	var r struct {
		PixelWidth, PixelHeight int
		Filled                  float64
	}
	out := run(t, []string{"NODE_PATH=" + modules}, node, script(t, "resvg_read.js"), in, fmt.Sprint(ppmm))
	if err := json.Unmarshal(out, &r); err != nil {
		t.Fatal(err)
	}
	comparePixels(t, f, want, ppmm, r.PixelWidth, r.PixelHeight, r.Filled)
}
