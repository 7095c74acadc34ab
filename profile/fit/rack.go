package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Bar is the body of a rack: how far its back lies below the datum line, and how far
// the path of a beam runs outside the part, 0 for the part's own edge; both in mm.
type Bar struct{ Height, Outside float64 }

// Rack is the closed outline of a rack: the toothed edge, two walls and the back, counter-
// clockwise from the middle of the back, turned by turn in rad about the origin. A beam
// goes round the four corners of the bar on arcs.
func (f *Tooth) Rack(halfTeeth bool, bar Bar, turn float64) Path {
	edge := f.Outline(Extent{HalfTeeth: halfTeeth}, 0)
	d := bar.Outside
	first, last := edge.Segments[0].Start, edge.Segments[len(edge.Segments)-1].End
	middle := r2.Vec{X: (first.X + last.X) / 2, Y: -bar.Height - d}
	path := bend{options: f.options}
	path.to(middle)
	path.corner(r2.Vec{X: first.X, Y: -bar.Height}, d, -math.Pi/2)
	path.corner(r2.Vec{X: first.X, Y: first.Y - d}, d, 0)
	for _, s := range edge.Segments {
		s.Start = path.at
		path.segments = append(path.segments, s)
		path.at = s.End
	}
	path.corner(r2.Vec{X: last.X, Y: last.Y - d}, d, math.Pi/2)
	path.corner(r2.Vec{X: last.X, Y: -bar.Height}, d, math.Pi)
	path.to(middle)
	rotate := r2.NewRotation(turn, r2.Vec{}).Rotate
	out := Path{Closed: true, Segments: make([]Segment, len(path.segments))}
	for i, s := range path.segments {
		out.Segments[i] = s.Mapped(rotate, false)
		if i > 0 {
			out.Segments[i].Start = out.Segments[i-1].End
		}
	}
	out.Segments[len(out.Segments)-1].End = out.Segments[0].Start
	return out
}

// bend gathers straight lines and the arcs between them.
type bend struct {
	options  Options
	segments []Segment
	begun    bool
	at       r2.Vec
}

// to goes straight to a point.
func (b *bend) to(p r2.Vec) {
	if b.begun && r2.Norm(r2.Sub(p, b.at)) >= ShortestSegment {
		b.segments = append(b.segments, LineTo(b.at, p))
		b.at = p
	}
	if !b.begun {
		b.begun, b.at = true, p
	}
}

// corner goes round a corner of the part by a quarter turn of the radius, which begins
// where the angle about the corner is from; straight to it where there is no radius.
func (b *bend) corner(p r2.Vec, radius, from float64) {
	arc := profile.CircleArc{Center: p, Radius: radius, From: from, To: from + math.Pi/2}
	b.to(profile.Start(arc))
	if radius < ShortestSegment {
		return
	}
	list := []Segment{ArcTo(b.at, profile.End(arc), math.Tan(math.Pi/8))}
	if b.options.Curves == Line {
		list, _ = fitChords(arc, b.options.Tolerance-pointRounding)
	}
	for _, s := range list {
		s.Start = b.at
		b.segments = append(b.segments, s)
		b.at = s.End
	}
}
