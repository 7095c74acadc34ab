package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Involute is a flank: an involute of a base circle about the origin, the left
// flank of a tooth centered on +Y, travelled from the tip inwards.
//
// With the roll angle t (the tangent of the pressure angle at the point) and
// psi_b the tooth's half angle on the base circle,
//
//	P(t) = rb (1 + i t) exp(i (pi/2 + psi_b - t)),   |P| = rb sqrt(1 + t^2)
//
// in complex notation. Its radius of curvature is rb t and its normal touches
// the base circle (Litvin and Fuentes, 2nd ed., 10.3).
type Involute struct {
	BaseRadius    float64 // mm
	BaseHalfAngle float64 // rad, psi_b
	From, To      float64 // roll angles, From > To >= 0
}

// Domain returns the roll angles at the tip and at the root end.
func (c Involute) Domain() (from, to float64) { return c.From, c.To }

// At is the point at the roll angle t.
func (c Involute) At(t float64) r2.Vec {
	sin, cos := math.Sincos(math.Pi/2 + c.BaseHalfAngle - t)
	return r2.Vec{X: c.BaseRadius * (cos - t*sin), Y: c.BaseRadius * (sin + t*cos)}
}

// Heading is the direction of inward travel at t.
func (c Involute) Heading(t float64) float64 { return 3*math.Pi/2 + c.BaseHalfAngle - t }

// Speed is rb t.
func (c Involute) Speed(t float64) float64 { return c.BaseRadius * math.Abs(t) }

// Curvature is 1/(rb t); +Inf on the base circle.
func (c Involute) Curvature(t float64) float64 { return 1 / (c.BaseRadius * t) }

// CurvatureRate is 1/(rb^2 t^3); +Inf on the base circle.
func (c Involute) CurvatureRate(t float64) float64 {
	return 1 / (c.BaseRadius * c.BaseRadius * t * t * t)
}

// Parallel is the involute of the same base circle turned by d/rb.
func (c Involute) Parallel(d float64) Curve {
	turn := d / c.BaseRadius
	return Involute{c.BaseRadius, c.BaseHalfAngle + turn, c.From + turn, c.To + turn}
}

// rollAt is the roll angle of an involute of the base radius rb at radius R >= rb:
// sqrt(R^2 - rb^2)/rb, from the product that keeps its digits near rb.
func rollAt(radius, base float64) float64 {
	return math.Sqrt((radius-base)*(radius+base)) / base
}
