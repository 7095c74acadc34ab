package profile_test

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// rounding is the difference, in units of a gear's diameter, that a few dozen
// operations on doubles leave on a coordinate: about 40 units of their last place.
const rounding = 1e-14

// checkCurve compares every derivative a curve states with five-point differences
// of the one before it, from At up, over its whole domain.
func checkCurve(t *testing.T, name string, c profile.Curve) {
	t.Helper()
	from, to := c.Domain()
	sense := math.Copysign(1, to-from)
	// The step makes the error of the formula and the rounding of At about equal
	// for functions as smooth as these.
	const share = 1e-3
	h := math.Abs(to-from) * share
	const formula = 1e-8 // relative
	for i := range 21 {
		u := from + (to-from)*(0.02+0.96*float64(i)/20)
		at := fmt.Sprintf("%s at %v", name, u)
		dx := sense * difference(func(u float64) float64 { return c.At(u).X }, u, h)
		dy := sense * difference(func(u float64) float64 { return c.At(u).Y }, u, h)
		speed := c.Speed(u)
		near(t, at+": speed", speed, math.Hypot(dx, dy), formula*speed)
		turn := math.Remainder(c.Heading(u)-math.Atan2(dy, dx), 2*math.Pi)
		near(t, at+": heading", turn, 0, formula)
		curvature := sense * difference(c.Heading, u, h) / speed
		near(t, at+": curvature", c.Curvature(u), curvature, formula*(math.Abs(curvature)+1/speed))
		rate := sense * difference(c.Curvature, u, h) / speed
		near(t, at+": curvature rate", c.CurvatureRate(u), rate, formula*(math.Abs(rate)+math.Abs(curvature)/speed+1/(speed*speed)))
	}
}

// checkParallel looks, for every point of the parallel at d, for the nearest point
// of the curve: it must be d away, to the right of travel. Only half the domain is
// sampled so that the nearest point is not an end.
func checkParallel(t *testing.T, name string, c profile.Curve, d float64) {
	t.Helper()
	parallel := c.Parallel(d)
	from, to := parallel.Domain()
	if f, l := c.Domain(); math.Signbit(l-f) != math.Signbit(to-from) {
		t.Errorf("%s: the parallel at %v runs the other way", name, d)
	}
	checkCurve(t, fmt.Sprintf("%s, parallel at %v", name, d), parallel)
	for i := range 11 {
		u := from + (to-from)*(0.25+0.5*float64(i)/10)
		p := parallel.At(u)
		foot, off := nearest(c, p)
		near(t, fmt.Sprintf("%s: distance of the parallel at %v", name, d), off, math.Abs(d), 1e-13*(1+norm(p)))
		h := c.Heading(foot)
		right := r2.Vec{X: math.Sin(h), Y: -math.Cos(h)}
		// The foot's parameter is good to the root of the rounding only.
		const stationary = 1e-6
		near(t, name+": side of the parallel", r2.Dot(r2.Sub(p, c.At(foot)), right), d, stationary*math.Max(1, math.Abs(d)))
		turn := math.Remainder(parallel.Heading(u)-h, 2*math.Pi)
		near(t, name+": heading of the parallel", turn, 0, stationary)
	}
	back := parallel.Parallel(-d)
	bf, bt := back.Domain()
	f, l := c.Domain()
	for _, share := range []float64{0, 0.3, 1} {
		near(t, name+": parallel and back", norm(r2.Sub(back.At(bf+(bt-bf)*share), c.At(f+(l-f)*share))), 0, 1e-13*(1+norm(c.At(f))))
	}
}
