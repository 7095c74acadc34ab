package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// nearestCrossing is the crossing of two parallels nearest to the corner it is for;
// false where they do not cross or one of them is gone.
func nearestCrossing(a, b profile.Curve, corner r2.Vec) (r2.Vec, bool) {
	if a == nil || b == nil {
		return r2.Vec{}, false
	}
	best := span{length: math.Inf(1)}
	for _, p := range crossings(a, b) {
		best = best.shorter(spanOf(corner, p))
	}
	return best.to, !math.IsInf(best.length, 1)
}

// withEnd is the piece with its end moved to a point of its line or circle, nil where
// that is not ahead of its start.
func withEnd(c profile.Curve, at r2.Vec) profile.Curve {
	switch c := c.(type) {
	case profile.StraightLine:
		if r2.Dot(r2.Sub(at, c.A), r2.Sub(c.B, c.A)) > 0 {
			return profile.StraightLine{A: c.A, B: at}
		}
	case profile.CircleArc:
		to := moved(c, c.To, at)
		if (to-c.From)*(c.To-c.From) > 0 {
			c.To = to
			return c
		}
	}
	return nil
}

// withStart is likewise the piece with its start moved.
func withStart(c profile.Curve, at r2.Vec) profile.Curve {
	switch c := c.(type) {
	case profile.StraightLine:
		if r2.Dot(r2.Sub(c.B, at), r2.Sub(c.B, c.A)) > 0 {
			return profile.StraightLine{A: at, B: c.B}
		}
	case profile.CircleArc:
		from := moved(c, c.From, at)
		if (c.To-from)*(c.To-c.From) > 0 {
			c.From = from
			return c
		}
	}
	return nil
}

// moved is the angle of a point of the circle, within half a turn of an angle it had.
func moved(c profile.CircleArc, angle float64, at r2.Vec) float64 {
	out := r2.Sub(at, c.Center)
	return angle + math.Remainder(math.Atan2(out.Y, out.X)-angle, 2*math.Pi)
}

// leftAt is what the beam leaves where its path turns at a point: the farthest point of
// what the path skips, beyond the beam's edge. False where nothing a file could show
// is left.
func leftAt(at r2.Vec, d float64, t *track) (profile.Leftover, bool) {
	worst := spanOf(at, t.corner)
	if len(t.skipped) > 0 {
		worst = span{}
	}
	for _, c := range t.skipped {
		if far := spanOf(at, farthestOn(c, at)); far.length > worst.length {
			worst = far
		}
	}
	depth := worst.length - d
	return profile.Leftover{At: worst.to, Depth: depth}, depth > finestArc
}
