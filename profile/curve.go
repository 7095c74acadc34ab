package profile

import "gonum.org/v1/gonum/spatial/r2"

// Curve is an exact plane curve, travelled as its parameter u runs from the
// first to the second value of Domain (which may fall). Gears are travelled
// counter-clockwise, with the material on the left, rings likewise with the
// material on the right.
type Curve interface {
	// Domain returns the parameters of the first and last point.
	Domain() (from, to float64)
	// At is the point at u, in mm.
	At(u float64) r2.Vec
	// Heading is the direction of travel at u, in rad from +X, continuous in u.
	Heading(u float64) float64
	// Speed is |dP/du| in mm per unit of u.
	Speed(u float64) float64
	// Curvature is the signed curvature at u in 1/mm, positive where travel
	// turns left.
	Curvature(u float64) float64
	// CurvatureRate is the derivative of Curvature by arc length, in 1/mm^2.
	CurvatureRate(u float64) float64
	// Parallel is the exact curve at the distance d in mm to the right of
	// travel, away from the material.
	Parallel(d float64) Curve
}

// Part names the part of the tooth a curve draws.
type Part uint8

// The parts of a tooth, from the tip down.
const (
	PartLand Part = iota
	PartTipRounding
	PartTipChamfer
	PartFlank
	PartFillet
	PartRoot
)

// Piece is one exact curve of a tooth.
type Piece struct {
	Part  Part
	Curve Curve
	// SmoothEnd says that the next curve continues in the same direction.
	SmoothEnd bool
}

// Start is the first point of c.
func Start(c Curve) r2.Vec {
	from, _ := c.Domain()
	return c.At(from)
}

// End is the last point of c.
func End(c Curve) r2.Vec {
	_, to := c.Domain()
	return c.At(to)
}
