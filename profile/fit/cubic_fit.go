package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// fitCubics draws the curve as the fewest Bezier cubics found within the tolerance in
// mm, tangent to the curve at all joints, and measures the deviation. With the
// tangents kept, the lengths of the two handles are free; the best choice misses the
// curve by the sixth power of the length (de Boor, Hoellig and Sabin, High accuracy
// geometric Hermite interpolation, Computer Aided Geometric Design 4, 1987), so one or
// two pieces carry a flank. Circles and straight lines stay what they are.
func fitCubics(c profile.Curve, tolerance float64) ([]Segment, float64) {
	switch exact := c.(type) {
	case profile.CircleArc:
		return splitCircle(exact), 0
	case profile.StraightLine:
		return []Segment{LineTo(exact.A, exact.B)}, 0
	}
	s := arcSpread(c)
	for n := 1; ; n++ {
		if chain, worst := cubicChain(c, s, n, tolerance); worst <= tolerance {
			return chain, worst
		}
	}
}

// cubicChain draws n cubics. They start with equal shares of the arc spread, which is
// steep where curvature changes fast; shares are then evened out by the deviations
// found, which go with the sixth power of the length.
func cubicChain(c profile.Curve, s spread, n int, tolerance float64) ([]Segment, float64) {
	const rounds, power = 4, 1.0 / 6
	shares, chain := make([]float64, n), make([]Segment, n)
	found := make([]float64, n)
	for i := range shares {
		shares[i] = 1 / float64(n)
	}
	worst := math.Inf(1)
	for range rounds {
		sum, u, worstNow := 0.0, s.from, 0.0
		for i := range chain {
			sum += shares[i]
			next := s.at(sum)
			if i == n-1 {
				next = s.to
			}
			chain[i], found[i] = fitCubic(c, u, next)
			worstNow = math.Max(worstNow, found[i])
			u = next
		}
		worst = worstNow
		if worst <= tolerance || n == 1 {
			break
		}
		total := 0.0
		for i := range shares {
			shares[i] /= math.Pow(found[i], power)
			total += shares[i]
		}
		for i := range shares {
			shares[i] /= total
		}
	}
	return chain, worst
}

// cubicSamples is the number of places at which a cubic's distance from the curve is
// taken while its handles are found.
const cubicSamples = 15

// fitCubic draws the stretch of the curve from u0 to u1 as one cubic and measures its
// deviation. The handle lengths minimize the distances along the curve's normals, by
// Gauss-Newton steps; distances are weighted up where they were large, which levels
// the lobes of the error (Lawson's method).
func fitCubic(c profile.Curve, u0, u1 float64) (Segment, float64) {
	a, b := c.At(u0), c.At(u1)
	start, end := direction(c.Heading(u0)), direction(c.Heading(u1))
	chord := r2.Norm(r2.Sub(b, a))
	p, q := chord/3, chord/3 // handle lengths
	cubic := func(p, q float64) Segment {
		return CubicTo(a, r2.Add(a, r2.Scale(p, start)), r2.Sub(b, r2.Scale(q, end)), b)
	}
	var weights [cubicSamples]float64
	for i := range weights {
		weights[i] = 1
	}
	best, least := cubic(p, q), math.Inf(1)
	const steps = 12 // Newton needs four, levelling the rest
	for range steps {
		s := cubic(p, q)
		f := follow(c, u0, u1, s)
		if f.worst < least {
			best, least = s, f.worst
		}
		// Normal equations of the weighted distances in the two handle lengths.
		var pp, pq, qq, pr, qr float64
		for i, d := range f.samples {
			v, w := 1-d.u, weights[i]
			gp, gq := 3*v*v*d.u*r2.Dot(start, d.normal), -3*v*d.u*d.u*r2.Dot(end, d.normal)
			pp += w * gp * gp
			pq += w * gp * gq
			qq += w * gq * gq
			pr += w * gp * d.distance
			qr += w * gq * d.distance
			weights[i] = w * (math.Abs(d.distance) + levelFloor*f.worst)
		}
		det := pp*qq - pq*pq
		if !(det > 0) {
			break
		}
		p -= (qq*pr - pq*qr) / det
		q -= (pp*qr - pq*pr) / det
		if !(p > 0 && q > 0) {
			break
		}
		level(&weights)
	}
	return best, measureCubic(c, u0, u1, best)
}

// levelFloor keeps the weight of a place whose distance happens to be zero.
const levelFloor = 0.1

// level scales weights so that they neither fade nor grow.
func level(weights *[cubicSamples]float64) {
	sum := 0.0
	for _, w := range weights {
		sum += w
	}
	for i := range weights {
		weights[i] *= cubicSamples / sum
	}
}

// direction is the unit vector of a heading.
func direction(heading float64) r2.Vec {
	sin, cos := math.Sincos(heading)
	return r2.Vec{X: cos, Y: sin}
}

// footing is one place of a cubic as seen from the curve.
type footing struct {
	u        float64 // of the cubic
	distance float64 // mm along the curve's normal, positive to the left
	normal   r2.Vec
}

// following is a cubic compared with the curve at even places.
type following struct {
	samples [cubicSamples]footing
	worst   float64
}

// follow finds the foot on the curve of each place.
func follow(c profile.Curve, u0, u1 float64, s Segment) following {
	var f following
	foot := u0
	for i := range f.samples {
		u := (float64(i) + 1) / (cubicSamples + 1)
		if i == 0 {
			foot = u0 + u*(u1-u0)
		} else {
			foot += (u1 - u0) / (cubicSamples + 1)
		}
		var d float64
		var normal r2.Vec
		foot, d, normal = footOn(c, foot, s.cubicAt(u))
		f.samples[i] = footing{u: u, distance: d, normal: normal}
		f.worst = math.Max(f.worst, math.Abs(d))
	}
	return f
}

// footOn drops a perpendicular from the point p on the curve, starting near u, and
// returns its parameter, the signed distance and the curve's left normal there. With
// the signed speed of the parametrization g and the point's place (x along, d left of
// travel), Newton's step is x / (g (1 - k d)).
func footOn(c profile.Curve, u float64, p r2.Vec) (foot, d float64, normal r2.Vec) {
	from, to := c.Domain()
	sense := math.Copysign(1, to-from)
	const steps = 20
	for range steps {
		along := direction(c.Heading(u))
		q := r2.Sub(p, c.At(u))
		x := r2.Dot(q, along)
		normal = r2.Vec{X: -along.Y, Y: along.X}
		d = r2.Dot(q, normal)
		step := x / (c.Speed(u) * (1 - c.Curvature(u)*d)) * sense
		if !(math.Abs(step) > footRounding*math.Abs(to-from)) {
			break
		}
		// A foot may lie a little past the end, never far.
		u = math.Min(math.Max(u+step, math.Min(from, to)), math.Max(from, to))
	}
	return u, d, normal
}

// footRounding is the step, as a part of the domain, at which a foot is found: its
// effect on the distance is of second order, far below a tolerance's last digit.
const footRounding = 1e-9

// measureCubic is the largest distance of the cubic from the curve. Its error has at
// most three lobes between the ends, which 48 places see; a parabola finds each top.
func measureCubic(c profile.Curve, u0, u1 float64, s Segment) float64 {
	const places = 48
	var found [places + 1]float64
	at := func(i float64) float64 {
		_, d, _ := footOn(c, u0+i/places*(u1-u0), s.cubicAt(i/places))
		return math.Abs(d)
	}
	for i := 1; i < places; i++ {
		found[i] = at(float64(i))
	}
	worst := 0.0
	for i := 1; i < places; i++ {
		left, mid, right := found[i-1], found[i], found[i+1]
		if mid < left || mid < right {
			continue
		}
		worst = math.Max(worst, mid)
		if bend := left - 2*mid + right; bend < 0 {
			worst = math.Max(worst, at(float64(i)+(left-right)/(2*bend)))
		}
	}
	return worst
}
