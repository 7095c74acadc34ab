package fit

import (
	"math"

	"gonum.org/v1/gonum/integrate/quad"
	"gonum.org/v1/gonum/spatial/r2"
)

// CubicTo returns the Bezier cubic from a to b with the handles c1 and c2.
func CubicTo(a, c1, c2, b r2.Vec) Segment {
	return Segment{Kind: Cubic, Start: a, End: b, C1: c1, C2: c2}
}

// cubicDerivative is the derivative of the Bezier cubic at u in [0, 1].
func (s Segment) cubicDerivative(u float64) r2.Vec {
	d0, d1, d2 := r2.Sub(s.C1, s.Start), r2.Sub(s.C2, s.C1), r2.Sub(s.End, s.C2)
	v := 1 - u
	return r2.Scale(3, r2.Add(r2.Add(r2.Scale(v*v, d0), r2.Scale(2*v*u, d1)), r2.Scale(u*u, d2)))
}

// cubicLength integrates the speed; a flank-like cubic is smooth enough that
// eight panels of five Gauss points leave only rounding.
func (s Segment) cubicLength() float64 {
	const panels, points = 8, 5
	sum := 0.0
	for i := range panels {
		a, b := float64(i)/panels, float64(i+1)/panels
		sum += quad.Fixed(func(u float64) float64 { return r2.Norm(s.cubicDerivative(u)) }, a, b, points, quad.Legendre{}, 0)
	}
	return sum
}

// cubicArea is the exact swept area of a Bezier cubic, from integrating
// x dy - y dx over its Bernstein form.
func (s Segment) cubicArea() float64 {
	p0, p1, p2, p3 := s.Start, s.C1, s.C2, s.End
	return (6*r2.Cross(p0, p1) + 3*r2.Cross(p0, p2) + r2.Cross(p0, p3) +
		3*r2.Cross(p1, p2) + 3*r2.Cross(p1, p3) + 6*r2.Cross(p2, p3)) / 20
}

// at is the point at u in [0, 1].
func (s Segment) cubicAt(u float64) r2.Vec {
	v := 1 - u
	return r2.Add(
		r2.Add(r2.Scale(v*v*v, s.Start), r2.Scale(3*v*v*u, s.C1)),
		r2.Add(r2.Scale(3*v*u*u, s.C2), r2.Scale(u*u*u, s.End)))
}

// cubicBounds widens b by the extremes of each coordinate, the roots of the
// quadratic derivative.
func (s Segment) cubicBounds(b *r2.Box) {
	grow := func(u float64) {
		if u > 0 && u < 1 {
			q := s.cubicAt(u)
			b.Min = r2.Vec{X: math.Min(b.Min.X, q.X), Y: math.Min(b.Min.Y, q.Y)}
			b.Max = r2.Vec{X: math.Max(b.Max.X, q.X), Y: math.Max(b.Max.Y, q.Y)}
		}
	}
	for _, c := range [2][4]float64{
		{s.Start.X, s.C1.X, s.C2.X, s.End.X},
		{s.Start.Y, s.C1.Y, s.C2.Y, s.End.Y},
	} {
		d0, d1, d2 := c[1]-c[0], c[2]-c[1], c[3]-c[2]
		for _, u := range quadraticRoots(d0-2*d1+d2, 2*(d1-d0), d0) {
			grow(u)
		}
	}
}

// quadraticRoots solves a u^2 + b u + c = 0 without cancellation; NaN stands for a
// root there is not.
func quadraticRoots(a, b, c float64) [2]float64 {
	q := -(b + math.Copysign(math.Sqrt(b*b-4*a*c), b)) / 2
	return [2]float64{q / a, c / q}
}
