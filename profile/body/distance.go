package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// span is a distance and the two points it is between.
type span struct {
	length float64 // mm
	from   r2.Vec
	to     r2.Vec
}

// spanOf is the span between two points.
func spanOf(from, to r2.Vec) span { return span{r2.Norm(r2.Sub(to, from)), from, to} }

// shorter is the shorter of the two, s if they are equal.
func (s span) shorter(o span) span {
	if o.length < s.length {
		return o
	}
	return s
}

// middle is the point halfway.
func (s span) middle() r2.Vec { return r2.Scale(0.5, r2.Add(s.from, s.to)) }

// between is the least distance between two pieces, exact but for rounding.
//
// It is 0 at a crossing. Else one of its points is an end, or both are inner points
// where the common normal meets the pieces at right angles: that of a line and a circle
// goes through the circle's center at right angles to the line, that of two circles
// through both centers. Two lines have none unless they are parallel, and then an end is
// as near.
func between(a, b profile.Curve) span {
	best := span{length: math.Inf(1)}
	for _, p := range [2]r2.Vec{profile.Start(a), profile.End(a)} {
		best = best.shorter(spanOf(p, nearestOn(b, p)))
	}
	for _, p := range [2]r2.Vec{profile.Start(b), profile.End(b)} {
		best = best.shorter(spanOf(nearestOn(a, p), p))
	}
	for _, p := range crossings(a, b) {
		if lies(a, p) && lies(b, p) {
			return span{0, p, p}
		}
	}
	circle, isArc := a.(profile.CircleArc)
	other, isArcToo := b.(profile.CircleArc)
	switch {
	case isArc && isArcToo:
		// The point of a nearest to b's center, or opposite, and b's nearest to that.
		along := r2.Sub(other.Center, circle.Center)
		for _, way := range [2]float64{0, math.Pi} {
			if angle := math.Atan2(along.Y, along.X) + way; sweeps(circle, angle) {
				p := circle.At(angle)
				best = best.shorter(spanOf(p, nearestOn(b, p)))
			}
		}
	case isArc:
		foot := nearestOn(b, circle.Center)
		best = best.shorter(spanOf(nearestOn(a, foot), foot))
	case isArcToo:
		foot := nearestOn(a, other.Center)
		best = best.shorter(spanOf(foot, nearestOn(b, foot)))
	}
	return best
}

// distance is the least distance between two loops; it says nothing of which is
// inside which.
func distance(a, b Loop) span {
	best := span{length: math.Inf(1)}
	for _, p := range a.Pieces {
		for _, q := range b.Pieces {
			best = best.shorter(between(p.Curve, q.Curve))
		}
	}
	return best
}

// nearestOn is the point of a piece nearest to p.
func nearestOn(c profile.Curve, p r2.Vec) r2.Vec {
	switch c := c.(type) {
	case profile.StraightLine:
		along := r2.Sub(c.B, c.A)
		u := r2.Dot(r2.Sub(p, c.A), along) / r2.Norm2(along)
		return c.At(math.Max(0, math.Min(1, u)))
	case profile.CircleArc:
		out := r2.Sub(p, c.Center)
		if angle := math.Atan2(out.Y, out.X); sweeps(c, angle) {
			return c.At(angle)
		}
	}
	from, to := profile.Start(c), profile.End(c)
	if r2.Norm2(r2.Sub(to, p)) < r2.Norm2(r2.Sub(from, p)) {
		return to
	}
	return from
}

// farthestOn is the point of a piece farthest from p: on an arc the one beyond the
// center, if the arc has it, else an end.
func farthestOn(c profile.Curve, p r2.Vec) r2.Vec {
	if arc, ok := c.(profile.CircleArc); ok {
		out := r2.Sub(arc.Center, p)
		if angle := math.Atan2(out.Y, out.X); sweeps(arc, angle) {
			return arc.At(angle)
		}
	}
	from, to := profile.Start(c), profile.End(c)
	if r2.Norm2(r2.Sub(to, p)) > r2.Norm2(r2.Sub(from, p)) {
		return to
	}
	return from
}

// sweeps says whether the arc passes the angle.
func sweeps(c profile.CircleArc, angle float64) bool {
	sweep := c.To - c.From
	ahead := math.Mod(math.Copysign(1, sweep)*(angle-c.From), 2*math.Pi)
	if ahead < 0 {
		ahead += 2 * math.Pi
	}
	return ahead <= math.Abs(sweep)
}

// lies says whether a point of the piece's line or circle is on the piece itself.
func lies(c profile.Curve, p r2.Vec) bool {
	switch c := c.(type) {
	case profile.StraightLine:
		along := r2.Sub(c.B, c.A)
		u := r2.Dot(r2.Sub(p, c.A), along)
		return u >= 0 && u <= r2.Norm2(along)
	case profile.CircleArc:
		out := r2.Sub(p, c.Center)
		return sweeps(c, math.Atan2(out.Y, out.X))
	}
	return false
}
