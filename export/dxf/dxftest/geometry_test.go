package dxftest_test

import (
	"math"
	"testing"

	"flankwright/export/dxf/dxftest"
)

// Known areas and lengths, so that the measure of the tests is measured too.
func TestMeasure(t *testing.T) {
	type e = dxftest.Entity
	type v = dxftest.Vertex
	quarter := math.Tan(math.Pi / 8)
	for _, tc := range []struct {
		name         string
		es           []e
		area, length float64
		closed, open int
		minX, maxX   float64
	}{
		{name: "circle", es: []e{{Kind: "CIRCLE", Radius: 2}}, area: 4 * math.Pi, length: 4 * math.Pi, closed: 1, minX: -2, maxX: 2},
		{name: "quarter arcs", es: []e{{Kind: "LWPOLYLINE", Closed: true, Vertices: []v{
			{2, 0, quarter}, {0, 2, quarter}, {-2, 0, quarter}, {0, -2, quarter},
		}}}, area: 4 * math.Pi, length: 4 * math.Pi, closed: 1, minX: -2, maxX: 2},
		{name: "clockwise", es: []e{{Kind: "LWPOLYLINE", Closed: true, Vertices: []v{
			{2, 0, -quarter}, {0, -2, -quarter}, {-2, 0, -quarter}, {0, 2, -quarter},
		}}}, area: 4 * math.Pi, length: 4 * math.Pi, closed: 1, minX: -2, maxX: 2},
		{name: "rotor", es: []e{
			{Kind: "ARC", Radius: 1, From: 270, To: 90},
			{Kind: "LINE", Vertices: []v{{-3, 1, 0}, {0, 1, 0}}},
			{Kind: "LINE", Vertices: []v{{-3, 1, 0}, {-3, -1, 0}}},
			{Kind: "LINE", Vertices: []v{{-3, -1, 0}, {0, -1, 0}}},
		}, area: 6 + math.Pi/2, length: 8 + math.Pi, closed: 1, minX: -3, maxX: 1},
		{name: "open", es: []e{{Kind: "POLYLINE", Vertices: []v{{0, 0, 0}, {3, 4, 0}}}}, length: 5, open: 1, minX: 0, maxX: 3},
		{name: "parabola", es: []e{ // y = x(1-x)
			{Kind: "SPLINE", Vertices: []v{{0, 0, 0}, {1.0 / 3, 1.0 / 3, 0}, {2.0 / 3, 1.0 / 3, 0}, {1, 0, 0}}},
			{Kind: "LINE", Vertices: []v{{1, 0, 0}, {0, 0, 0}}},
		}, area: 1.0 / 6, length: 1 + (math.Sqrt2+math.Asinh(1))/2, closed: 1, minX: 0, maxX: 1},
		{name: "run", es: []e{{Kind: dxftest.Run, Vertices: []v{{0, 0, 0}, {2, 0, 0}, {2, 2, 0}, {0, 0, 0}}}},
			area: 2, length: 4 + math.Sqrt(8), closed: 1, minX: 0, maxX: 2},
	} {
		ls, err := dxftest.Measure(tc.es, 1e-9)
		if err != nil || len(ls) != 1 {
			t.Fatalf("%s: %v %v", tc.name, ls, err)
		}
		const tol = 1e-6
		if l := ls[0]; math.Abs(l.Area-tc.area) > tol || math.Abs(l.Length-tc.length) > tol || l.Closed != tc.closed || l.Open != tc.open {
			t.Errorf("%s: %+v, want area %v, length %v", tc.name, l, tc.area, tc.length)
		}
		span, err := dxftest.Span(tc.es)
		if err != nil || math.Abs(span[0]-tc.minX) > tol || math.Abs(span[2]-tc.maxX) > tol {
			t.Errorf("%s: span %v %v", tc.name, span, err)
		}
	}
}
