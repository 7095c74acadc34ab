package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// offset is the signed distance in mm from the segment, a line or an arc
// prolonged to its full circle, to the point p: positive where p lies to the left
// of travel. One formula serves both and keeps its digits as the arc straightens:
// with d the chord, q = p - Start, b the bulge and J a quarter turn left,
//
//	N = 4b (q.q - q.d) - 2 (1 - b^2) q.Jd
//	K = |d| (1 + b^2)
//	offset = -N / (K + sqrt(K^2 + 4 b N))
//
// which is N/4b = |p - center|^2 - R^2 divided by |p - center| + R.
func (s Segment) offset(p r2.Vec) float64 {
	r := s.ruler()
	return r.offset(p)
}

// ruler is what offsets from one segment have in common.
type ruler struct {
	start, d r2.Vec
	b4, j, k float64 // 4b, 2 (1 - b^2), K
}

func (s *Segment) ruler() ruler {
	d, b := r2.Sub(s.End, s.Start), s.Bulge
	return ruler{start: s.Start, d: d, b4: 4 * b, j: 2 * (1 - b*b), k: math.Hypot(d.X, d.Y) * (1 + b*b)}
}

func (r *ruler) offset(p r2.Vec) float64 {
	d, q := r.d, r2.Sub(p, r.start)
	n := r.b4*(r2.Dot(q, q)-r2.Dot(q, d)) - r.j*(d.X*q.Y-d.Y*q.X)
	return -n / (r.k + math.Sqrt(math.Max(0, r.k*r.k+r.b4*n)))
}

// deviationSamples is how many equal parameter steps the search for the largest
// distance starts from. A best arc's distance swings three times over its piece;
// twelve steps see each swing, and a parabola then finds its top to well within
// 1 %.
const deviationSamples = 12

// deviation measures the largest distance between the segment and the stretch of
// the curve from u0 to u1, whose ends belong to the segment's ends. At the place
// of the largest distance the normal is common to both, so it is the distance
// either way.
func deviation(c profile.Curve, u0, u1 float64, s Segment) float64 {
	var samples [deviationSamples + 1]float64
	ruler := s.ruler()
	at := func(i float64) float64 { return u0 + i/deviationSamples*(u1-u0) }
	for i := range samples {
		samples[i] = math.Abs(ruler.offset(c.At(at(float64(i)))))
	}
	worst := math.Max(samples[0], samples[deviationSamples])
	for i := 1; i < deviationSamples; i++ {
		left, mid, right := samples[i-1], samples[i], samples[i+1]
		if mid < left || mid < right {
			continue
		}
		worst = math.Max(worst, mid)
		if bend := left - 2*mid + right; bend < 0 {
			top := float64(i) + (left-right)/(2*bend)
			worst = math.Max(worst, math.Abs(ruler.offset(c.At(at(top)))))
		}
	}
	return worst
}
