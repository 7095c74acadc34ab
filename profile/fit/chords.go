package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// fitChords draws the curve as the fewest chords within the tolerance in mm on both
// sides of it, and measures the deviation. The ends stay on the curve; joints between
// lie outside the bend by half the sagitta, so that a chord leaves the curve as far
// on one side as on the other. A chord of length L sags by k L^2/8, so balanced chords
// take equal shares of the integral of sqrt(k) ds that are sqrt 2 as long as those of
// chords with their ends on the curve: 0.71 of their number.
func fitChords(c profile.Curve, tolerance float64) ([]Segment, float64) {
	if line, ok := c.(profile.StraightLine); ok {
		return []Segment{LineTo(line.A, line.B)}, 0
	}
	s := chordSpread(c)
	for n := chordCount(s, tolerance); ; n++ {
		if chain, worst := chordChain(c, s, n); worst <= tolerance {
			return chain, worst
		}
	}
}

// endChord is the length of the first and last chord in that of the others. With one end
// on the curve and the other outside by o, a chord of sagitta g comes to lie
// g (1 - o/4g)^2 inside; an inner one of sagitta 2o lies o inside. The two are equal at
// g = 1.457 o, and lengths go with the root of the sagitta: (1 + sqrt(1/2))/2.
const endChord = 0.8535533906

// chordCount is the least number of balanced chords.
func chordCount(s spread, tolerance float64) int {
	if single := s.total / math.Sqrt(8*tolerance); single <= 1 {
		return 1
	}
	return max(2, int(math.Ceil(s.total/(4*math.Sqrt(tolerance))+2*(1-endChord))))
}

// chordChain draws n chords.
func chordChain(c profile.Curve, s spread, n int) (chain []Segment, worst float64) {
	chain = make([]Segment, n)
	if n == 1 {
		chain[0] = LineTo(c.At(s.from), c.At(s.to))
		return chain, deviation(c, s.from, s.to, chain[0])
	}
	share := 1 / (float64(n-2) + 2*endChord)
	// An inner chord takes L sqrt k = total times share and sags by its square over 8.
	outside := s.total * share * s.total * share / 16
	u, at := s.from, c.At(s.from)
	for i := range chain {
		next, end := s.to, c.At(s.to)
		if i < n-1 {
			next = s.at((endChord + float64(i)) * share)
			along := direction(c.Heading(next))
			right := math.Copysign(outside, c.Curvature(next))
			end = r2.Add(c.At(next), r2.Vec{X: right * along.Y, Y: -right * along.X})
			worst = math.Max(worst, outside)
		}
		chain[i] = LineTo(at, end)
		worst = math.Max(worst, deviation(c, u, next, chain[i]))
		u, at = next, end
	}
	return chain, worst
}
