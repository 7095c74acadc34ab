package label

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// glyph is the drawing of one character in a box from x = 0 to width, in cap heights.
type glyph struct {
	width   float64
	strokes []stroke
}

// stroke is a polyline drawn without lifting the pen. Its corners may be rounded.
type stroke []vertex

// vertex is a corner of a stroke, in cap heights; the two lines that meet there are
// joined by an arc of the given radius that touches both, 0 for a sharp corner. The
// first and the last vertex of a stroke have no radius.
type vertex struct{ x, y, radius float64 }

// at is the place of the vertex, moved by the given amount.
func (v vertex) at(moved r2.Vec) r2.Vec { return r2.Vec{X: v.x + moved.X, Y: v.y + moved.Y} }

// stub is the length in cap heights up to which a line counts as none. Between two
// roundings that use up the whole line, rounding of doubles leaves some 1e-16; the
// shortest line meant to be drawn is above 0.01.
const stub = 1e-9

// path draws the stroke. Neighbouring segments share their points to the last bit, and
// the two ends of a stroke that returns to its start are the same point.
func (s stroke) path(moved r2.Vec) fit.Path {
	segments := make([]fit.Segment, 0, 2*len(s))
	pen := s[0].at(moved)
	lineTo := func(p r2.Vec) {
		if r2.Norm(r2.Sub(p, pen)) > stub {
			segments = append(segments, fit.LineTo(pen, p))
			pen = p
		}
	}
	for i := 1; i < len(s)-1; i++ {
		corner := s[i].at(moved)
		if s[i].radius == 0 {
			lineTo(corner)
			continue
		}
		turn, trim := s.rounding(i)
		before := r2.Unit(r2.Sub(s[i-1].at(moved), corner))
		after := r2.Unit(r2.Sub(s[i+1].at(moved), corner))
		lineTo(r2.Add(corner, r2.Scale(trim, before)))
		end := r2.Add(corner, r2.Scale(trim, after))
		segments = append(segments, fit.ArcTo(pen, end, math.Tan(turn/4)))
		pen = end
	}
	last := s[len(s)-1].at(moved)
	lineTo(last)
	segments[len(segments)-1].End = last // where an arc ended there but for rounding
	return fit.Path{Segments: segments}
}

// rounding is the signed angle in rad by which the stroke turns at vertex i, and the
// length that its arc takes off the lines on either side:
//
//	trim = R tan(|turn|/2)
func (s stroke) rounding(i int) (turn, trim float64) {
	in := r2.Sub(s[i].at(r2.Vec{}), s[i-1].at(r2.Vec{}))
	out := r2.Sub(s[i+1].at(r2.Vec{}), s[i].at(r2.Vec{}))
	turn = math.Atan2(r2.Cross(in, out), r2.Dot(in, out))
	return turn, s[i].radius * math.Tan(math.Abs(turn)/2)
}
