package bisect

import (
	"math"
	"testing"
)

func TestRoot(t *testing.T) {
	for _, c := range []struct{ a, b float64 }{{0, 2}, {2, 0}} {
		if x := Root(func(x float64) float64 { return x*x - 2 }, c.a, c.b); math.Abs(x-math.Sqrt2) > 3e-16 {
			t.Errorf("from %g to %g: %v", c.a, c.b, x)
		}
	}
}
