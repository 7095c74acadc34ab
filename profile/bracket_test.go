package profile

import (
	"math"
	"testing"
)

func TestBracketedRoot(t *testing.T) {
	for name, tc := range map[string]struct {
		f    func(float64) float64
		a, b float64
		want float64
		ulps float64 // allowed, in units of the root's last place
	}{
		"line":             {func(x float64) float64 { return x - 0.3 }, 0, 1, 0.3, 0},
		"falling":          {func(x float64) float64 { return 0.3 - x }, 0, 1, 0.3, 0},
		"turned around":    {func(x float64) float64 { return x - 0.3 }, 1, 0, 0.3, 0},
		"square root of 2": {func(x float64) float64 { return x*x - 2 }, 0, 2, math.Sqrt2, 1},
		"cubic, flat":      {func(x float64) float64 { return math.Pow(x-0.7, 3) }, 0, 1, 0.7, 1},
		"steep":            {func(x float64) float64 { return math.Expm1(50 * (x - 0.9)) }, -1, 1, 0.9, 2},
		"step":             {func(x float64) float64 { return math.Copysign(1, x-1/math.Pi) }, 0, 1, 1 / math.Pi, 1},
		"pole":             {func(x float64) float64 { return 1 / (x - 1/math.Pi) }, 0, 1, 1 / math.Pi, 1},
		"root at an end":   {func(x float64) float64 { return x }, 0, 1, 0, 0},
		"other end":        {func(x float64) float64 { return x - 1 }, 0, 1, 1, 0},
		"tiny root":        {func(x float64) float64 { return x - 1e-200 }, 0, 1, 1e-200, 0},
		"negative":         {func(x float64) float64 { return x + 1e3 }, -1e6, 0, -1e3, 0},
	} {
		calls := 0
		got := bracketedRoot(func(x float64) float64 { calls++; return tc.f(x) }, tc.a, tc.b)
		ulp := math.Nextafter(math.Abs(tc.want), math.Inf(1)) - math.Abs(tc.want)
		if math.Abs(got-tc.want) > tc.ulps*ulp {
			t.Errorf("%s: %.17g, want %.17g", name, got, tc.want)
		}
		// A bisection halves at least every second call: 2100 binary places
		// between the smallest and the largest double bound it for any function.
		const most = 4300
		if calls > most {
			t.Errorf("%s took %d calls", name, calls)
		}
	}
}

// TestBracketedRootIsBounded holds the secant to its promise on the kind of
// function it is for: never worse than a bisection at every second call.
func TestBracketedRootIsBounded(t *testing.T) {
	calls := 0
	bracketedRoot(func(x float64) float64 { calls++; return math.Tan(x) - x - 0.0149 }, 0.1, 1.2)
	const most = 2 * 56 // a bisection to the last bit takes 53 and the ends
	if calls > most {
		t.Errorf("%d calls", calls)
	}
}

// TestBracketedRootSameSign checks the end with the smaller value comes back when
// rounding has made both ends agree in sign, and that NaN ends the search.
func TestBracketedRootSameSign(t *testing.T) {
	f := func(x float64) float64 { return 1e-17 + x }
	if got := bracketedRoot(f, 0, 1); got != 0 {
		t.Errorf("got %v, want the left end", got)
	}
	if got := bracketedRoot(f, 1, 0); got != 0 {
		t.Errorf("got %v, want the right end", got)
	}
	bracketedRoot(func(float64) float64 { return math.NaN() }, 0, 1)
	bracketedRoot(func(x float64) float64 {
		if x > 0.2 && x < 0.8 {
			return math.NaN()
		}
		return x - 0.5
	}, 0, 1)
}
