package profile_test

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// norm is the distance from the gear axis.
func norm(p r2.Vec) float64 { return math.Hypot(p.X, p.Y) }

// along are the parameters of n+1 points spread evenly over a curve's domain.
func along(c profile.Curve, n int) []float64 {
	from, to := c.Domain()
	us := make([]float64, n+1)
	for i := range us {
		us[i] = from + (to-from)*float64(i)/float64(n)
	}
	us[n] = to
	return us
}

// nearest is the point of c nearest to p: the best of many points, then a golden
// section between its neighbours. The distance is stationary there, so it is
// good to rounding while the parameter is not.
func nearest(c profile.Curve, p r2.Vec) (u, distance float64) {
	const steps = 400
	off := func(u float64) float64 { return norm(r2.Sub(c.At(u), p)) }
	us := along(c, steps)
	best := 0
	for i, u := range us {
		if off(u) < off(us[best]) {
			best = i
		}
	}
	a, b := us[max(best-1, 0)], us[min(best+1, steps)]
	const golden = 0.6180339887498949
	const halvings = 80 // golden^80 = 2e-17: to the last bit of the bracket
	for range halvings {
		l, r := b-golden*(b-a), a+golden*(b-a)
		if off(l) < off(r) {
			b = r
		} else {
			a = l
		}
	}
	return (a + b) / 2, off((a + b) / 2)
}

// difference is the derivative of f at u by the five-point formula
// (f(u-2h) - 8 f(u-h) + 8 f(u+h) - f(u+2h))/(12 h), off by h^4 f””'/30
// (Abramowitz and Stegun, 25.3.6).
func difference(f func(float64) float64, u, h float64) float64 {
	return (f(u-2*h) - 8*f(u-h) + 8*f(u+h) - f(u+2*h)) / (12 * h)
}
