package readertest

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/profile/fit"
)

// Style is how the flanks of a sample are drawn.
type Style uint8

// The styles.
const (
	Arcs Style = iota
	Cubics
	Lines
)

// Sample is a part for tests of writers and readers: a wheel with n lobes, each
// a tip arc, a flank, a root arc tangent to it and a flank back. It has the
// entities of a real outline without asking the solver for one.
type Sample struct {
	Lobes     int
	Style     Style
	Unit      export.Unit
	Reference bool    // with two circles that are not cut
	Open      bool    // one lobe only, and a bore
	Size      float64 // radius at the tips, mm
}

// Drawing returns the sheet. Inner loops come first, and the outline starts in
// the middle of a tip.
func (s Sample) Drawing() export.Drawing {
	d := export.Drawing{Unit: s.Unit}
	center := r2.Vec{X: s.Size / 16, Y: -s.Size / 32} // not the origin, on purpose
	d.Items = append(d.Items, export.Item{
		Layer: export.LayerBore, Role: export.Hole, Circle: &export.Circle{Center: center, Radius: s.Size / 4},
	})
	outline := s.outline(center)
	d.Items = append(d.Items, export.Item{Layer: export.LayerOutline, Role: export.Outer, Path: &outline})
	if s.Reference {
		for _, f := range []float64{0.9, 0.97} {
			d.Items = append(d.Items, export.Item{
				Layer: export.LayerReference, Role: export.Marker,
				Circle: &export.Circle{Center: center, Radius: s.Size * f},
			})
		}
	}
	return d
}

func (s Sample) outline(center r2.Vec) fit.Path {
	// Many lobes are shallow, as teeth are; deep ones would cross each other.
	tip := s.Size
	root := tip * (1 - min(0.2, 2.4/float64(s.Lobes)))
	pitch := 2 * math.Pi / float64(s.Lobes)
	at := func(r, a float64) r2.Vec {
		return r2.Add(center, r2.Vec{X: -r * math.Sin(a), Y: r * math.Cos(a)})
	}
	arc := func(a float64) float64 { return math.Tan(a / 4) }
	var segs []fit.Segment
	var cur r2.Vec
	add := func(seg fit.Segment) { segs, cur = append(segs, seg), seg.End }
	lobes := s.Lobes
	if s.Open {
		lobes = 1
	}
	cur = at(tip, 0)
	first := cur
	for i := range lobes {
		a := pitch * float64(i)
		// Half a tip land, a flank down, the root, a flank up, half a land.
		down, bottom := a+0.15*pitch, a+0.30*pitch
		up, top := a+0.70*pitch, a+0.85*pitch
		add(fit.ArcTo(cur, at(tip, down), arc(0.15*pitch)))
		add(s.flank(cur, at(root, bottom), 0.11))
		add(fit.ArcTo(cur, at(root, up), arc(0.40*pitch)))
		add(s.flank(cur, at(tip, top), 0.11))
		end := at(tip, a+pitch)
		if i == lobes-1 && !s.Open {
			end = first
		}
		add(fit.ArcTo(cur, end, arc(0.15*pitch)))
	}
	if s.Style == Lines {
		for i := range segs {
			segs[i] = fit.LineTo(segs[i].Start, segs[i].End)
		}
	}
	return fit.Path{Segments: segs, Closed: !s.Open}
}

// flank is a shallow curve between a and b, hollow seen from outside the part.
func (s Sample) flank(a, b r2.Vec, bulge float64) fit.Segment {
	if s.Style != Cubics {
		return fit.ArcTo(a, b, -bulge)
	}
	d := r2.Sub(b, a)
	n := r2.Vec{X: -d.Y, Y: d.X}
	third := func(f float64) r2.Vec { return r2.Add(r2.Add(a, r2.Scale(f, d)), r2.Scale(2*bulge/3, n)) }
	return fit.CubicTo(a, third(1.0/3), third(2.0/3), b)
}
