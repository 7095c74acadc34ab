package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// crossings are the points where the whole lines or circles cross that two pieces are
// parts of: none, one or two; the same circle or line twice has none.
func crossings(a, b profile.Curve) []r2.Vec {
	switch a := a.(type) {
	case profile.StraightLine:
		switch b := b.(type) {
		case profile.StraightLine:
			return lineLine(a, b)
		case profile.CircleArc:
			return lineCircle(a, b)
		}
	case profile.CircleArc:
		switch b := b.(type) {
		case profile.StraightLine:
			return lineCircle(b, a)
		case profile.CircleArc:
			return circleCircle(a, b)
		}
	}
	return nil
}

// parallelSine is the sine of the angle between two lines below which they count as
// parallel: a thousand roundings, so that the crossing of any others has digits left.
const parallelSine = 1e-12

// lineLine crosses two lines. With unit directions u, v and w from a to b the crossing
// is (w x v)/(u x v) along u.
func lineLine(a, b profile.StraightLine) []r2.Vec {
	u, v := r2.Unit(r2.Sub(a.B, a.A)), r2.Unit(r2.Sub(b.B, b.A))
	sine := r2.Cross(u, v)
	if math.Abs(sine) < parallelSine {
		return nil
	}
	along := r2.Cross(r2.Sub(b.A, a.A), v) / sine
	return []r2.Vec{r2.Add(a.A, r2.Scale(along, u))}
}

// lineCircle crosses a line and a circle: sqrt((r - h)(r + h)) either way from the foot
// of the center on the line, h away from it.
func lineCircle(line profile.StraightLine, circle profile.CircleArc) []r2.Vec {
	u := r2.Unit(r2.Sub(line.B, line.A))
	out := r2.Sub(circle.Center, line.A)
	foot := r2.Add(line.A, r2.Scale(r2.Dot(out, u), u))
	h := math.Abs(r2.Cross(u, out))
	square := (circle.Radius - h) * (circle.Radius + h)
	if square < 0 {
		return nil
	}
	half := r2.Scale(math.Sqrt(square), u)
	return []r2.Vec{r2.Sub(foot, half), r2.Add(foot, half)}
}

// circleCircle crosses two circles with centers D apart: on the common chord, which cuts
// the line of centers at c = (D^2 + r1^2 - r2^2)/(2 D) from the first, sqrt((r1 - c)(r1 + c))
// either way.
func circleCircle(a, b profile.CircleArc) []r2.Vec {
	out := r2.Sub(b.Center, a.Center)
	apart := r2.Norm(out)
	if apart == 0 {
		return nil
	}
	c := (apart + (a.Radius-b.Radius)*(a.Radius+b.Radius)/apart) / 2
	square := (a.Radius - c) * (a.Radius + c)
	if square < 0 {
		return nil
	}
	u := r2.Unit(out)
	foot := r2.Add(a.Center, r2.Scale(c, u))
	half := r2.Scale(math.Sqrt(square), r2.Vec{X: -u.Y, Y: u.X})
	return []r2.Vec{r2.Sub(foot, half), r2.Add(foot, half)}
}
