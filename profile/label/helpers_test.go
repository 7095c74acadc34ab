package label_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
	"flankwright/profile/label"
)

// points are n+1 points along a segment, ends included, found through the center of an
// arc and not by halving.
func points(s fit.Segment, n int) []r2.Vec {
	out := make([]r2.Vec, n+1)
	for i := range out {
		share := float64(i) / float64(n)
		if s.Kind == fit.Arc {
			out[i] = r2.Rotate(s.Start, s.Included()*share, s.Center())
		} else {
			out[i] = r2.Add(r2.Scale(1-share, s.Start), r2.Scale(share, s.End))
		}
	}
	return out
}

// cloud are points along all strokes, at most so far apart.
func cloud(paths []fit.Path, apart float64) []r2.Vec {
	var out []r2.Vec
	for _, p := range paths {
		for _, s := range p.Segments {
			out = append(out, points(s, 1+int(s.Length()/apart))...)
		}
	}
	return out
}

// drawn is Strokes of a text that can be drawn.
func drawn(t testing.TB, text string) ([]fit.Path, float64) {
	t.Helper()
	paths, width, err := label.Strokes(text)
	if err != nil {
		t.Fatalf("%q: %v", text, err)
	}
	return paths, width
}

// disc is a circle as part of a web: material inside, or outside for a hole.
type disc struct {
	center r2.Vec
	radius float64
	hole   bool
}

// web is a region bounded by circles.
type web []disc

// Clearance is the distance to the nearest circle.
func (w web) Clearance(p r2.Vec) float64 {
	least := math.Inf(1)
	for _, d := range w {
		c := d.radius - r2.Norm(r2.Sub(p, d.center))
		if d.hole {
			c = -c
		}
		least = math.Min(least, c)
	}
	return least
}

// annulus is the web between a bore and an outer circle, with holes of one radius.
func annulus(bore, outer, hole float64, at ...r2.Vec) web {
	w := web{{radius: outer}}
	if bore > 0 {
		w = append(w, disc{radius: bore, hole: true})
	}
	for _, c := range at {
		w = append(w, disc{center: c, radius: hole, hole: true})
	}
	return w
}

// ring are n points on a circle, the first on +Y.
func ring(n int, radius float64) []r2.Vec {
	out := make([]r2.Vec, n)
	for i := range out {
		out[i] = r2.Rotate(r2.Vec{Y: radius}, 2*math.Pi*float64(i)/float64(n), r2.Vec{})
	}
	return out
}

// bar is a straight web, as of a rack: between two levels and two ends.
type bar struct{ box r2.Box }

// Clearance is the least of the signed distances to the four edges.
func (b bar) Clearance(p r2.Vec) float64 {
	return min(p.X-b.box.Min.X, b.box.Max.X-p.X, p.Y-b.box.Min.Y, b.box.Max.Y-p.Y)
}

// counted counts how often a region is asked.
type counted struct {
	label.Region
	asked *int
}

// Clearance passes the question on.
func (c counted) Clearance(p r2.Vec) float64 { *c.asked++; return c.Region.Clearance(p) }
