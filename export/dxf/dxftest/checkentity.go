package dxftest

import (
	"fmt"
	"math"
	"slices"
)

// minSegment is the shortest piece that importers keep apart from a point, mm.
const minSegment = 1e-6

// shortest is minSegment in the unit of the file, less a step of rounding. R12
// files do not say their unit, so they get the smaller of the two.
func (c *checker) shortest() float64 {
	if c.Int("$INSUNITS") == 4 {
		return minSegment - 2e-9
	}
	return minSegment/25.4 - 2e-9
}

func (c *checker) entity(e *Entity) {
	bad := func(format string, args ...any) {
		c.fail("line %d: %s: %s", e.Line, e.Kind, fmt.Sprintf(format, args...))
	}
	markers := map[string][]string{
		"LINE": {"AcDbLine"}, "CIRCLE": {"AcDbCircle"}, "ARC": {"AcDbCircle", "AcDbArc"},
		"LWPOLYLINE": {"AcDbPolyline"}, "SPLINE": {"AcDbSpline"},
	}
	if c.Version() == "AC1015" {
		want, ok := markers[e.Kind]
		if !ok {
			bad("not allowed in an AC1015 file")
		}
		c.markers(e.Kind, e.Line, e.groups, append([]string{"AcDbEntity"}, want...)...)
	}
	if e.Layer == "0" {
		bad("on layer 0")
	}
	switch e.Kind {
	case "LWPOLYLINE", "POLYLINE":
		c.polyline(e, bad)
	case "LINE":
		a, b := e.Vertices[0], e.Vertices[1]
		if math.Hypot(b.X-a.X, b.Y-a.Y) < c.shortest() {
			bad("too short")
		}
	case "CIRCLE":
		if !(e.Radius > 0) {
			bad("radius %v", e.Radius)
		}
	case "ARC":
		turn := math.Mod(e.To-e.From+360, 360)
		if !(e.Radius > 0) || turn <= 0 || turn >= 180 || e.From >= 360 || e.To >= 360 {
			bad("radius %v from %v to %v", e.Radius, e.From, e.To)
		}
		if e.Radius*turn*math.Pi/180 < c.shortest() {
			bad("too short")
		}
	case "SPLINE":
		if e.Flag != 8 || e.Degree != 3 {
			bad("flag %d, degree %d", e.Flag, e.Degree)
		}
		if e.counts[72] != len(e.Knots) || e.counts[73] != len(e.Vertices) || e.counts[74] != 0 {
			bad("declares %v, has %d knots and %d points", e.counts, len(e.Knots), len(e.Vertices))
		}
		if !slices.Equal(e.Knots, []float64{0, 0, 0, 0, 1, 1, 1, 1}) || len(e.Vertices) != 4 {
			bad("knots %v for %d points", e.Knots, len(e.Vertices))
		}
	}
}

func (c *checker) polyline(e *Entity, bad func(string, ...any)) {
	n := len(e.Vertices)
	if e.Flag != 0 && e.Flag != 1 {
		bad("flag %d", e.Flag)
	}
	if e.Kind == "LWPOLYLINE" && e.counts[90] != n {
		bad("declares %d vertices, has %d", e.counts[90], n)
	}
	if e.Kind == "POLYLINE" && e.counts[66] != 1 {
		bad("group 66 is %d", e.counts[66])
	}
	if n < 2 {
		bad("%d vertices", n)
		return
	}
	bulges := 0
	for _, p := range e.groups {
		if p.Code == 42 {
			bulges++
		}
	}
	if bulges != 0 && bulges != n {
		bad("%d bulges for %d vertices", bulges, n)
	}
	for i, v := range e.Vertices {
		w := e.Vertices[(i+1)%n]
		if (e.Closed || i+1 < n) && math.Hypot(w.X-v.X, w.Y-v.Y) < c.shortest() {
			bad("vertex %d coincides with the next", i)
		}
		if math.Abs(v.Bulge) >= 1 {
			bad("bulge %v at vertex %d", v.Bulge, i)
		}
	}
	if !e.Closed && e.Vertices[n-1].Bulge != 0 {
		bad("bulge at the last vertex of an open polyline")
	}
}

// Coincident returns a line for each two pieces of the entities that run
// through the same ends with the same turn: drawn, and cut, twice.
func Coincident(entities []Entity) ([]string, error) {
	type key [5]float64
	seen := map[key]string{}
	var out []string
	for i := range entities {
		e := &entities[i]
		ps, err := e.Pieces()
		if err != nil {
			return nil, err
		}
		for j, p := range ps {
			if p.X1 < p.X0 || p.X1 == p.X0 && p.Y1 < p.Y0 {
				p = p.Reversed()
			}
			r := func(x float64) float64 { return math.Round(x*1e7) / 1e7 }
			k := key{r(p.X0), r(p.Y0), r(p.X1), r(p.Y1), r(p.Area)}
			place := fmt.Sprintf("line %d, %s on %s, piece %d", e.Line, e.Kind, e.Layer, j)
			if before, ok := seen[k]; ok {
				out = append(out, place+" is "+before)
			}
			seen[k] = place
		}
	}
	return out, nil
}
