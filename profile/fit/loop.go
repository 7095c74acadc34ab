package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Loop draws a closed loop of exact curves, each ending where the next begins, turned
// by turn in rad about the origin, and measures the deviation in mm. Circles and
// straight lines stay what they are, except that chords are drawn where the options ask
// for lines.
func Loop(pieces []profile.Piece, o Options, turn float64) (Path, float64) {
	if !(o.Tolerance >= LeastTolerance) {
		panic("fit: tolerance below LeastTolerance")
	}
	o.Tolerance -= pointRounding
	rotate := r2.NewRotation(turn, r2.Vec{}).Rotate
	c := chain{of: &Tooth{exact: profile.Outline{Teeth: 1}}} // no repetition
	worst := 0.0
	for _, p := range pieces {
		if from, to := p.Curve.Domain(); math.Abs(to-from)*p.Curve.Speed((from+to)/2) < ShortestSegment {
			continue
		}
		var list []Segment
		var deviation float64
		if o.Curves == Line {
			list, deviation = fitChords(p.Curve, o.Tolerance)
		} else {
			list, deviation = fitArcs(p.Curve, o.Tolerance, ends{start: true, end: true})
		}
		worst = math.Max(worst, deviation)
		for _, s := range list {
			if s.Length() >= ShortestSegment {
				c.add(0, []Segment{s.Mapped(rotate, false)})
			}
		}
	}
	if n := len(c.segments); n > 0 {
		c.segments[n-1].End = c.segments[0].Start
	}
	return Path{Segments: c.segments, Closed: true}, worst
}
