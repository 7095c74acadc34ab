package svg_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/svg"
	"flankwright/export/svg/svgtest"
	"flankwright/profile/fit"
)

// Whatever the path, Marshal refuses it or writes a file that passes the strict
// reader. Handles of cubics stay near their ends: what lies off the page is
// legal there.
func FuzzMarshal(f *testing.F) {
	f.Add(1.0, 2.0, 3.0, 4.0, 0.5, -0.3, uint8(0))
	f.Add(0.0, 1e-9, 3.0, 4.0, 0.99, -0.99, uint8(1))
	f.Add(1e5, -1e5, 1e-6, 4.0, 1e-9, 1e-10, uint8(2))
	f.Add(math.NaN(), math.Inf(1), 3.0, 4.0, 0.5, -0.3, uint8(3))
	f.Add(-7.0, 0.125, 3.0, 900000.0, 0.5, -0.3, uint8(7))
	f.Fuzz(func(t *testing.T, a, b, c, d, bulge1, bulge2 float64, bits uint8) {
		p, q, r := r2.Vec{X: a, Y: b}, r2.Vec{X: c, Y: d}, r2.Vec{X: b, Y: c}
		path := fit.Path{Segments: []fit.Segment{fit.ArcTo(p, q, bulge1), fit.ArcTo(q, r, bulge2)}}
		if bits&1 != 0 {
			path.Segments = append(path.Segments, fit.CubicTo(r, r, p, p))
			path.Closed = true
		}
		drawing := export.Drawing{Unit: export.Unit(bits >> 1 & 1), Items: []export.Item{
			{Layer: "OUTLINE", Role: export.Role(bits >> 2 % 3), Path: &path},
			{Layer: "BORE", Role: export.Hole, Circle: &export.Circle{Center: p, Radius: math.Abs(d)}},
		}}
		data, err := svg.Marshal(drawing, svg.Options{})
		if err != nil {
			if data != nil {
				t.Fatalf("bytes with the error %v", err)
			}
			return
		}
		if _, err := svgtest.Read(data); err != nil {
			t.Fatalf("%v\n%s", err, data)
		}
	})
}
