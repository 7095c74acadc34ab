package profile

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/spatial/r2"
)

// CutterFillet is the root fillet that the rounded tip of a pinion-type cutter leaves in a
// ring: the envelope of a circle of radius rho whose center, on the cutter at the radius R
// and the angle psi from the middle of its tooth, rolls with it inside the ring. It is the
// left fillet of a space centered on +Y, travelled from the root land to the flank.
//
// With the cutter's axis at the distance A and the ratio k = z_0/z of its teeth to the
// ring's, the center has come to
//
//	c(f) = i (A exp(-i k f) + R exp(i ((1 - k) f + psi)))
//
// when the cutter has turned by f and the ring by k f, in complex notation and in the
// ring's frame. The point is rho beside it along the normal of the center's path, which
// passes through the pitch point (the law of gearing; Litvin and Fuentes, 2nd ed., 6.2).
// Offset is rho, counted to the right of travel of c, hence negative where the center lies
// inside the cutter's operating pitch circle; with g = 1 + Offset kappa_c the speed is
// |c' g|, the curvature kappa_c/|g| and its rate by arc length kappa_c'/g^3.
type CutterFillet struct {
	CenterDistance float64 // mm, A
	CenterRadius   float64 // mm, R
	CenterAngle    float64 // rad, psi
	Ratio          float64 // k, below 1
	Offset         float64 // mm, signed
	Sense          float64 // +1 where the envelope travels with c, -1 against it
	From, To       float64 // rad, f
}

// Domain returns the cutter's angles at the root land and at the flank.
func (c CutterFillet) Domain() (from, to float64) { return c.From, c.To }

// path returns c and its first three derivatives at f.
func (c CutterFillet) path(f float64) (c0, c1, c2, c3 complex128) {
	k := c.Ratio
	a := cmplx.Rect(c.CenterDistance, -k*f)
	b := cmplx.Rect(c.CenterRadius, (1-k)*f+c.CenterAngle)
	ka, kb := complex(0, -k), complex(0, 1-k) // d/df of either
	i := complex(0, 1)
	return i * (a + b), i * (ka*a + kb*b), i * (ka*ka*a + kb*kb*b), i * (ka*ka*ka*a + kb*kb*kb*b)
}

// At is the point at f.
func (c CutterFillet) At(f float64) r2.Vec {
	c0, c1, _, _ := c.path(f)
	right := c1 * complex(0, -1/cmplx.Abs(c1))
	p := c0 + complex(c.Offset, 0)*right
	return r2.Vec{X: real(p), Y: imag(p)}
}

// Heading is the direction of travel at f, from the root to the flank: that of c', with
// the factor exp(i ((1-k) f + psi)) taken out, which turns, from what is left, which does not
// turn past a half circle.
func (c CutterFillet) Heading(f float64) float64 {
	k := c.Ratio
	turn := (1-k)*f + c.CenterAngle
	sin, cos := math.Sincos(f + c.CenterAngle)
	heading := turn + math.Atan2(-(k*c.CenterDistance*sin), k*c.CenterDistance*cos-(1-k)*c.CenterRadius)
	if c.Sense < 0 {
		heading += math.Pi
	}
	return heading
}

// bend returns the speed of c, its curvature, and the curvature's rate by arc length.
func (c CutterFillet) bend(f float64) (speed, kappa, rate float64) {
	_, c1, c2, c3 := c.path(f)
	speed = cmplx.Abs(c1)
	cross := func(a, b complex128) float64 { return imag(cmplx.Conj(a) * b) }
	kappa = cross(c1, c2) / (speed * speed * speed)
	along := real(cmplx.Conj(c1)*c2) / (speed * speed) // relative rate of the speed by f
	rate = (cross(c1, c3)/(speed*speed*speed) - 3*kappa*along) / speed
	return speed, kappa, rate
}

// rate is the speed of the envelope with its sign: negative where a parallel has folded.
func (c CutterFillet) rate(f float64) float64 {
	speed, kappa, _ := c.bend(f)
	return c.Sense * speed * (1 + c.Offset*kappa)
}

// Speed is |c' g|.
func (c CutterFillet) Speed(f float64) float64 { return math.Abs(c.rate(f)) }

// Curvature is kappa_c/|g|.
func (c CutterFillet) Curvature(f float64) float64 {
	_, kappa, _ := c.bend(f)
	return kappa / math.Abs(1+c.Offset*kappa)
}

// CurvatureRate is kappa_c'/g^3.
func (c CutterFillet) CurvatureRate(f float64) float64 {
	_, kappa, rate := c.bend(f)
	g := 1 + c.Offset*kappa
	return rate / (g * g * g)
}

// Parallel keeps the center's path.
func (c CutterFillet) Parallel(d float64) Curve {
	c.Offset += c.Sense * d
	return c
}
