package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// CircleArc is an arc of a circle, travelled from the angle From to the angle
// To, counter-clockwise where To > From.
type CircleArc struct {
	Center   r2.Vec
	Radius   float64 // mm
	From, To float64 // rad from +X about Center
}

// Domain returns the angles of the first and last point.
func (c CircleArc) Domain() (from, to float64) { return c.From, c.To }

// At is the point at the angle a.
func (c CircleArc) At(a float64) r2.Vec {
	sin, cos := math.Sincos(a)
	return r2.Vec{X: c.Center.X + c.Radius*cos, Y: c.Center.Y + c.Radius*sin}
}

// sense is +1 counter-clockwise, -1 clockwise.
func (c CircleArc) sense() float64 { return math.Copysign(1, c.To-c.From) }

// Heading is a quarter turn ahead of the radius.
func (c CircleArc) Heading(a float64) float64 { return a + c.sense()*math.Pi/2 }

// Speed is the radius.
func (c CircleArc) Speed(float64) float64 { return math.Abs(c.Radius) }

// Curvature is the signed reciprocal of the radius.
func (c CircleArc) Curvature(float64) float64 { return c.sense() / c.Radius }

// CurvatureRate is 0.
func (c CircleArc) CurvatureRate(float64) float64 { return 0 }

// Parallel has the radius changed by d, larger where travel is counter-clockwise.
func (c CircleArc) Parallel(d float64) Curve {
	c.Radius += c.sense() * d
	return c
}

// StraightLine is a straight piece from A to B.
type StraightLine struct{ A, B r2.Vec }

// Domain is 0 at A and 1 at B.
func (c StraightLine) Domain() (from, to float64) { return 0, 1 }

// At is the point at the share u of the way.
func (c StraightLine) At(u float64) r2.Vec {
	return r2.Add(r2.Scale(1-u, c.A), r2.Scale(u, c.B))
}

// Heading is the direction from A to B.
func (c StraightLine) Heading(float64) float64 {
	return math.Atan2(c.B.Y-c.A.Y, c.B.X-c.A.X)
}

// Speed is the length.
func (c StraightLine) Speed(float64) float64 { return r2.Norm(r2.Sub(c.B, c.A)) }

// Curvature is 0.
func (c StraightLine) Curvature(float64) float64 { return 0 }

// CurvatureRate is 0.
func (c StraightLine) CurvatureRate(float64) float64 { return 0 }

// Parallel is the line moved to the right of travel by d.
func (c StraightLine) Parallel(d float64) Curve {
	along := r2.Unit(r2.Sub(c.B, c.A))
	move := r2.Vec{X: d * along.Y, Y: -d * along.X}
	return StraightLine{r2.Add(c.A, move), r2.Add(c.B, move)}
}
