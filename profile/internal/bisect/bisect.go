// Package bisect finds where a function changes sign, for packages that do it rarely
// enough not to mind the steps.
package bisect

// Root is where f changes sign between a and b, to the last bit; f(a) and f(b) must
// differ in sign or one be zero.
func Root(f func(float64) float64, a, b float64) float64 {
	below := f(a) < 0
	for {
		mid := a + (b-a)/2
		if mid == a || mid == b {
			return mid
		}
		if (f(mid) < 0) == below {
			a = mid
		} else {
			b = mid
		}
	}
}
