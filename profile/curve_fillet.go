package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Fillet is the root fillet a rounded rack tip leaves: the envelope of a circle
// of radius rho whose center, fixed in the rack at the half width w from the
// middle of its tooth and at the height vc over the pitch line, rolls with it on
// the reference circle of radius r. It is the left fillet of a tooth centered on
// +Y, travelled from the flank down to the root.
//
// Its parameter is the angle p of the contact normal in the rack, from the
// pressure angle (flank) to pi/2 (root). At p the rack has moved by
//
//	U = -w - vc cot p
//
// and the point, in the rack's frame with the gear axis as origin, is
//
//	(-vc cot p + rho cos p, r + vc - rho sin p)
//
// turned by U/r and by the angle of the space's middle. With v = vc and s = sin p
// the derivatives by p and the curvature are
//
//	heading rate  -h,  h = 1 - v/(r s^2)
//	speed          g = v^2/(r s^3) + rho h
//	curvature     -h/g
//
// The normal passes through the pitch point (the law of gearing; Litvin and
// Fuentes, 2nd ed., 6.2), which holds for vc of either sign; with vc = 0 the
// fillet is a circular arc.
type Fillet struct {
	Reference   float64 // mm, r
	HalfWidth   float64 // mm, w
	Height      float64 // mm, vc
	Rounding    float64 // mm, rho; its parallels may have it below zero
	SpaceMiddle float64 // rad from +Y, counter-clockwise
	From, To    float64 // rad, contact normal angles
}

// Domain returns the contact normal angles at the flank and at the root.
func (c Fillet) Domain() (from, to float64) { return c.From, c.To }

// turn is the angle by which the rack's frame stands turned at p.
func (c Fillet) turn(cot float64) float64 {
	return c.SpaceMiddle + (-c.HalfWidth-c.Height*cot)/c.Reference
}

// At is the point at the contact normal angle p.
func (c Fillet) At(p float64) r2.Vec {
	sp, cp := math.Sincos(p)
	cot := cp / sp
	u := -c.Height*cot + c.Rounding*cp
	v := c.Reference + c.Height - c.Rounding*sp
	sin, cos := math.Sincos(c.turn(cot))
	return r2.Vec{X: u*cos - v*sin, Y: u*sin + v*cos}
}

// radius is the distance of the point at p from the gear axis.
func (c Fillet) radius(p float64) float64 {
	sp, cp := math.Sincos(p)
	return math.Hypot(-c.Height*cp/sp+c.Rounding*cp, c.Reference+c.Height-c.Rounding*sp)
}

// halfAngle is the angle from +Y, counter-clockwise, at which the point at p lies:
// the half angle of the tooth there.
func (c Fillet) halfAngle(p float64) float64 {
	sp, cp := math.Sincos(p)
	cot := cp / sp
	u := -c.Height*cot + c.Rounding*cp
	v := c.Reference + c.Height - c.Rounding*sp
	return c.turn(cot) - math.Atan2(u, v)
}

// Heading is the direction of travel at p, from the flank to the root.
func (c Fillet) Heading(p float64) float64 {
	sp, cp := math.Sincos(p)
	return 3*math.Pi/2 - p + c.turn(cp/sp)
}

// rates returns h and g of the type's comment and their derivatives by p.
func (c Fillet) rates(p float64) (h, g, dh, dg float64) {
	s, cos := math.Sincos(p)
	r, v := c.Reference, c.Height
	h = 1 - v/(r*s*s)
	g = v*v/(r*s*s*s) + c.Rounding*h
	dh = 2 * v * cos / (r * s * s * s)
	dg = -3*v*v*cos/(r*s*s*s*s) + c.Rounding*dh
	return h, g, dh, dg
}

// Speed is |g|.
func (c Fillet) Speed(p float64) float64 {
	_, g, _, _ := c.rates(p)
	return math.Abs(g)
}

// Curvature is -h/g: a hollow, so negative, where h > 0.
func (c Fillet) Curvature(p float64) float64 {
	h, g, _, _ := c.rates(p)
	return -h / g
}

// CurvatureRate is d(-h/g)/dp divided by g.
func (c Fillet) CurvatureRate(p float64) float64 {
	h, g, dh, dg := c.rates(p)
	return (h*dg - dh*g) / (g * g * g)
}

// Parallel keeps the center's path and takes d off the rounding.
func (c Fillet) Parallel(d float64) Curve {
	c.Rounding -= d
	return c
}

// LeastRadius is the smallest radius of curvature of the hollow, at the root:
//
//	rho + vc^2/(r - vc)
//
// (Mitchiner and Mabie 1982, J. Mech. Design 104; AGMA 908-B89). It holds for
// vc < r.
func (c Fillet) LeastRadius() float64 {
	return c.Rounding + c.Height*c.Height/(c.Reference-c.Height)
}
