package profile

import "math"

// bracketedRoot finds where f changes sign between a and b, to the last bit the
// function resolves. f(a) and f(b) must differ in sign; if rounding has made
// them agree, the end with the smaller value is returned. Secant steps with the
// Illinois correction, and a bisection whenever those do not halve the bracket.
func bracketedRoot(f func(float64) float64, a, b float64) float64 {
	fa, fb := f(a), f(b)
	if fa == 0 {
		return a
	}
	if fb == 0 {
		return b
	}
	if (fa > 0) == (fb > 0) {
		if math.Abs(fa) < math.Abs(fb) {
			return a
		}
		return b
	}
	wa, wb := fa, fb // weighted values that steer the secant
	for {
		width := math.Abs(b - a)
		c := b - wb*(b-a)/(wb-wa)
		for range 2 {
			if !(c > math.Min(a, b) && c < math.Max(a, b)) {
				c = a + (b-a)/2
				if c == a || c == b {
					if math.Abs(fa) < math.Abs(fb) {
						return a
					}
					return b
				}
			}
			fc := f(c)
			switch {
			case fc == 0:
				return c
			case (fc > 0) == (fb > 0):
				b, fb, wb = c, fc, fc
				wa /= 2
			default:
				a, fa, wa = c, fc, fc
				wb /= 2
			}
			if math.Abs(b-a) <= width/2 {
				break
			}
			c = a + (b-a)/2
		}
	}
}
