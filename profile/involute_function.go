package profile

import "math"

// Inv is the involute function of a pressure angle a in radians,
//
//	inv a = tan a - a,   0 <= a < pi/2
//
// (ISO 21771:2007, 4.2.6). Outside that range the result has no meaning.
func Inv(a float64) float64 { return rollInv(math.Tan(a)) }

// rollInv is inv as a function of the roll angle t = tan a: t - atan t. That
// difference loses digits where t is small. Up to 1 half the angle is taken,
//
//	t - atan t = t u^2 + 2 (u - atan u),   u = tan(a/2) = t/(1 + sqrt(1 + t^2))
//
// in which nothing cancels, until the series t^3/3 - t^5/5 + t^7/7 - ... is short.
func rollInv(t float64) float64 {
	const seriesLimit = 0.1 // ten terms leave less than 1e-17 of the first
	const direct = 1        // from here on the difference loses two bits at most
	switch {
	case math.Abs(t) >= direct:
		return t - math.Atan(t)
	case math.Abs(t) >= seriesLimit:
		u := t / (1 + math.Sqrt(1+t*t))
		return t*u*u + 2*rollInv(u)
	}
	q := t * t
	sum := 0.0
	for k := 10; k >= 1; k-- {
		sum = 1/float64(2*k+1) - q*sum
	}
	return t * q * sum
}

// InverseInv is the pressure angle in radians whose involute function is y >= 0;
// NaN for a negative or infinite y.
func InverseInv(y float64) float64 { return math.Atan(inverseRollInv(y)) }

// inverseRollInv is the roll angle t with t - atan t = y, for 0 <= y < +Inf;
// NaN elsewhere. Newton's method on a convex function, started above the root,
// falls monotonically until rounding stops it.
func inverseRollInv(y float64) float64 {
	if !(y >= 0) || math.IsInf(y, 1) {
		return math.NaN()
	}
	if y == 0 {
		return 0
	}
	// Both starts lie above the root: with c = cbrt(3y) the root is
	// c + c^3/5 + 0.017 c^5 + ..., and atan t < pi/2 everywhere.
	const seriesStart = 1.5
	t := y + math.Pi/2
	if c := math.Cbrt(3 * y); c < seriesStart {
		t = c + c*c*c/4
	}
	for {
		next := t - (rollInv(t)-y)*(1+t*t)/(t*t)
		if !(next < t) || next <= 0 {
			return t
		}
		t = next
	}
}
