package fit

import (
	"math"

	"flankwright/profile"
)

// fitChords draws the curve as chords with their ends on it, within the tolerance
// in mm, and measures the deviation. A chord of length L misses the curve by
// k L^2/8, so n chords need an equal share of the integral of sqrt(k/(8e)) ds.
func fitChords(c profile.Curve, tolerance float64) ([]Segment, float64) {
	if line, ok := c.(profile.StraightLine); ok {
		return []Segment{LineTo(line.A, line.B)}, 0
	}
	s := chordSpread(c)
	for n := max(1, int(math.Ceil(s.total/math.Sqrt(8*tolerance)))); ; n++ {
		chain := make([]Segment, n)
		worst := 0.0
		u, at := s.from, c.At(s.from)
		for i := range chain {
			next := s.at(float64(i+1) / float64(n))
			chain[i] = LineTo(at, c.At(next))
			worst = math.Max(worst, deviation(c, u, next, chain[i]))
			u, at = next, chain[i].End
		}
		if worst <= tolerance {
			return chain, worst
		}
	}
}
