package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// biarc joins a, left with one heading, to b, reached with another, by two arcs
// that share a tangent. Their joint can lie anywhere on one circle through a and
// b, on which the directions to the joint and from it differ by half the turn:
// the circle leaves a with the chord's heading less that half. The point of it
// nearest to near, seen from its center, is taken.
// (Bolton, Biarc curves, Computer-Aided Design 7, 1975.)
func biarc(a r2.Vec, headingA float64, b r2.Vec, headingB float64, near r2.Vec) (Segment, Segment) {
	chord := math.Atan2(b.Y-a.Y, b.X-a.X)
	fromA, toB := wrapped(chord-headingA), wrapped(headingB-chord)
	half := (fromA + toB) / 2
	joint := nearestOn(ArcTo(a, b, math.Tan(half/2)), near)
	first, _ := arcFrom(a, headingA, joint)
	back, _ := arcFrom(b, headingB+math.Pi, joint)
	return first, back.Reversed()
}

// nearestOn is the point of the segment's circle (or line) nearest to p.
func nearestOn(s Segment, p r2.Vec) r2.Vec {
	d := r2.Unit(r2.Sub(s.End, s.Start))
	normal := r2.Vec{X: -d.Y, Y: d.X} // left of travel
	if s.Bulge != 0 {
		center := s.Center()
		normal = r2.Unit(r2.Sub(center, p))
		if s.Bulge < 0 {
			normal = r2.Scale(-1, normal)
		}
	}
	return r2.Sub(p, r2.Scale(s.offset(p), normal))
}
