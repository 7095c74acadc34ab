package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// arcShare is the spread a best arc covers per cube root of its deviation e:
// (72 sqrt 3)^(1/3).
const arcShare = 4.996099

// fixedShare is what an arc next to a prescribed tangent covers of what a free one
// does: tangent to the curve at its end it misses it by 2 k' L^3/81 where a free
// one misses it by k' L^3/(72 sqrt 3).
const fixedShare = 0.6873648

// ends says at which ends of a curve the tangent is prescribed.
type ends struct{ start, end bool }

// arcLimit is the least number of tangent-continuous arcs that can draw a curve of
// that spread within the tolerance, as a real number: one arc per free share, and
// for each prescribed tangent what the arc beside it falls short.
func arcLimit(s spread, tolerance float64, e ends) float64 {
	n := s.total / (arcShare * math.Cbrt(tolerance))
	if e.start {
		n += 1 - fixedShare
	}
	if e.end {
		n += 1 - fixedShare
	}
	return n
}

// fitArcs draws the curve as the fewest tangent-continuous arcs found within the
// tolerance in mm, tangent to the curve at its prescribed ends, and measures the
// deviation.
func fitArcs(c profile.Curve, tolerance float64, e ends) ([]Segment, float64) {
	switch exact := c.(type) {
	case profile.CircleArc:
		return splitCircle(exact), 0
	case profile.StraightLine:
		return []Segment{LineTo(exact.A, exact.B)}, 0
	}
	if e.end && !e.start {
		chain, worst := fitArcs(backward{c}, tolerance, ends{start: true})
		return Path{Segments: chain}.Reversed().Segments, worst
	}
	s := arcSpread(c)
	least := 1
	if e.start && e.end {
		least = 2 // one arc cannot meet two tangents
	}
	limit := arcLimit(s, tolerance, e)
	for n := max(least, int(math.Ceil(limit/limitSlack))); ; n++ {
		f := newArcFit(c, s, e, n)
		if worst := f.best(tolerance); worst <= tolerance {
			return f.chain, worst
		}
	}
}

// limitSlack is by how much a chain may undercut the formula for the least number
// of arcs, which takes the curvature's rate as constant along each.
const limitSlack = 1.03

// backward is a curve travelled from its end to its start.
type backward struct{ profile.Curve }

func (b backward) Domain() (from, to float64) {
	from, to = b.Curve.Domain()
	return to, from
}

func (b backward) Heading(u float64) float64 { return b.Curve.Heading(u) + math.Pi }

func (b backward) Curvature(u float64) float64 { return -b.Curve.Curvature(u) }

// splitCircle draws a circular arc in equal parts of less than a half turn each.
func splitCircle(c profile.CircleArc) []Segment {
	const largest = 0.9 * math.Pi // readers want arcs safely below pi
	n := max(1, int(math.Ceil(math.Abs(c.To-c.From)/largest)))
	segments := make([]Segment, n)
	at := c.At(c.From)
	for i := range segments {
		next := c.At(c.From + (c.To-c.From)*float64(i+1)/float64(n))
		segments[i] = ArcTo(at, next, math.Tan((c.To-c.From)/float64(n)/4))
		at = next
	}
	return segments
}

// arcFrom is the arc that leaves a with the heading and ends in b, and the
// heading it arrives with.
func arcFrom(a r2.Vec, heading float64, b r2.Vec) (Segment, float64) {
	chord := math.Atan2(b.Y-a.Y, b.X-a.X)
	half := wrapped(chord - heading)
	return ArcTo(a, b, math.Tan(half/2)), chord + half
}

// wrapped brings an angle into [-pi, pi].
func wrapped(angle float64) float64 {
	if math.Abs(angle) <= math.Pi {
		return angle
	}
	return math.Remainder(angle, 2*math.Pi)
}
