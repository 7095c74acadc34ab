package fit

import (
	"math"
	"sort"

	"flankwright/profile"
)

// spread is a weight accumulated along a curve, by which break points are dealt
// out: equal shares of it need equal effort to draw.
type spread struct {
	from, to float64 // the curve's domain
	total    float64
	// At equal steps of the parameter, the weight per step and its running sum;
	// nil where the weight is constant.
	weights, sums []float64
}

// The numbers of parameter steps a spread is tabled over. Weights are smooth: 32 give
// totals to a few parts in ten thousand, and break points of arcs need no more, since
// deviation is measured and not inferred. Chords can be many more than arcs, and one
// of them a little too long costs them all.
const (
	arcSteps   = 32
	chordSteps = 256
)

// arcSpread accumulates |k'|^(1/3) ds with k' the rate of the curvature by arc
// length. The best tangent-continuous arcs take equal shares of it (an arc of
// length L misses a curve by k' L^3/(72 sqrt 3)). For an involute the integral is
// rb^(1/3) times the roll angle, so equal steps in roll angle are best.
func arcSpread(c profile.Curve) spread {
	from, to := c.Domain()
	switch exact := c.(type) {
	case backward:
		return arcSpread(exact.Curve).backward()
	case profile.Involute:
		return spread{from: from, to: to, total: math.Cbrt(exact.BaseRadius) * math.Abs(to-from)}
	case profile.CircleArc, profile.StraightLine:
		return spread{from: from, to: to} // one arc draws them
	}
	return newSpread(c, arcSteps, func(u float64) float64 {
		return math.Cbrt(math.Abs(c.CurvatureRate(u))) * c.Speed(u)
	})
}

// chordSpread accumulates |k|^(1/2) ds: a chord of length L misses a curve by
// k L^2/8.
func chordSpread(c profile.Curve) spread {
	return newSpread(c, chordSteps, func(u float64) float64 {
		return math.Sqrt(math.Abs(c.Curvature(u))) * c.Speed(u)
	})
}

// newSpread tables a weight given per unit of the parameter. The weight is taken
// as linear between midpoints of steps, so that it is continuous and dealt break
// points follow it smoothly.
func newSpread(c profile.Curve, steps int, weight func(u float64) float64) spread {
	from, to := c.Domain()
	s := spread{from: from, to: to, weights: make([]float64, steps+1), sums: make([]float64, steps+1)}
	step := (to - from) / float64(steps)
	mid := func(i int) float64 { return weight(from+(float64(i)+0.5)*step) * math.Abs(step) }
	before := mid(0)
	s.weights[0] = before // a midpoint is never at an end, where a weight may be infinite
	for i := 1; i <= steps; i++ {
		here := before
		if i < steps {
			here = mid(i)
		}
		s.weights[i] = (before + here) / 2
		before = here
	}
	for i := range steps {
		s.sums[i+1] = s.sums[i] + (s.weights[i]+s.weights[i+1])/2
	}
	s.total = s.sums[steps]
	return s
}

// backward is the spread of the curve travelled the other way.
func (s spread) backward() spread {
	s.from, s.to = s.to, s.from
	if s.sums != nil {
		n := len(s.sums)
		weights, sums := make([]float64, n), make([]float64, n)
		for i := range sums {
			weights[i] = s.weights[n-1-i]
			sums[i] = s.total - s.sums[n-1-i]
		}
		s.weights, s.sums = weights, sums
	}
	return s
}

// at is the parameter up to which the share q in [0, 1] of the total lies.
func (s spread) at(q float64) float64 {
	switch {
	case q <= 0:
		return s.from
	case q >= 1:
		return s.to
	case s.sums == nil || s.total == 0:
		return s.from + q*(s.to-s.from)
	}
	want := q * s.total
	i := max(0, sort.SearchFloat64s(s.sums, want)-1)
	// Within the step the sum is w0 x + (w1 - w0) x^2/2; the root is taken in the
	// form that does not cancel.
	w0, w1, rest := s.weights[i], s.weights[i+1], want-s.sums[i]
	part := 2 * rest / (w0 + math.Sqrt(math.Max(0, w0*w0+2*(w1-w0)*rest)))
	return s.from + (float64(i)+math.Min(part, 1))*(s.to-s.from)/float64(len(s.sums)-1)
}
