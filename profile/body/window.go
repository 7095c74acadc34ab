package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// window is the shape of equal windows between parallel-sided arms. Lengths are mm.
type window struct {
	n          int
	outer, hub float64 // radii of the outer and inner edge
	arm        float64 // width of an arm
	corner     float64 // radius of the four corners
}

// sin is the sine of half the angle from one arm to the next.
func (w window) sin() float64 { return math.Sin(math.Pi / float64(w.n)) }

// widestArm is the width at which two arms meet at the hub, 2 R_hub sin(pi/n): their
// sides are a/2 beside the arms' middles, which are pi/n from the window's.
func (w window) widestArm() float64 { return 2 * w.hub * w.sin() }

// largestCorner is the corner radius at which a piece of the window vanishes, the lesser
// of two. A corner's center is a/2 + rho beside the middle of its arm, at R_o - rho from
// the axis at the outer edge and R_h + rho at the hub.
//
//	(R_o - R_h)/2              the side of the arm: both centers are one
//	(R_h s - a/2)/(1 - s)      the hub's edge: likewise; never with two arms
//
// with s = sin(pi/n), the sine of the angle of a center in the window's middle. The outer
// edge is never the first to vanish: that far out there is more room between the arms. In
// front of a small hub corners grow much while its edge shrinks little, so there the limit
// is where leastPiece is left of it: its length is
//
//	2 R_h (pi/n - asin q) >= 2 R_h (s - q),   q = (a/2 + rho)/(R_h + rho)
func (w window) largestCorner() float64 {
	s := w.sin()
	largest := (w.outer - w.hub) / 2
	if w.n > 2 {
		short := leastPiece / (2 * w.hub)
		largest = math.Min(largest, (w.hub*(s-short)-w.arm/2)/(1-s+short))
	}
	return largest
}

// center is where the center of a corner is from the axis, along the arm and beside it.
func (w window) center(distance float64) (along, beside float64) {
	beside = w.arm/2 + w.corner
	return math.Sqrt((distance - beside) * (distance + beside)), beside
}

// loop is the window that follows the arm k, counted counter-clockwise from +Y: along
// the outer edge, in along the first arm, around the hub, and out along the next arm.
// All joints are smooth.
func (w window) loop(k int) []profile.Piece {
	const right = math.Pi / 2
	pitch := 2 * math.Pi / float64(w.n)
	arm := right + pitch*float64(k)
	next := right + pitch*float64(k+1)
	outAlong, beside := w.center(w.outer - w.corner)
	inAlong, _ := w.center(w.hub + w.corner)
	out, in := math.Atan2(beside, outAlong), math.Atan2(beside, inAlong)
	// at is a point along an arm and to its left.
	at := func(angle, along, left float64) r2.Vec {
		sin, cos := math.Sincos(angle)
		return r2.Vec{X: along*cos - left*sin, Y: along*sin + left*cos}
	}
	corner := func(center r2.Vec, from, to float64) profile.Curve {
		return profile.CircleArc{Center: center, Radius: w.corner, From: from, To: to}
	}
	side := func(angle, from, to, left float64) profile.Curve {
		return profile.StraightLine{A: at(angle, from, left), B: at(angle, to, left)}
	}
	var pieces []profile.Piece
	for _, c := range []profile.Curve{
		profile.CircleArc{Radius: w.outer, From: next - out, To: arm + out},
		corner(at(arm, outAlong, beside), arm+out, arm-right),
		side(arm, outAlong, inAlong, w.arm/2),
		corner(at(arm, inAlong, beside), arm-right, arm+in-math.Pi),
		profile.CircleArc{Radius: w.hub, From: arm + in, To: next - in},
		corner(at(next, inAlong, -beside), next-in+math.Pi, next+right),
		side(next, inAlong, outAlong, -w.arm/2),
		corner(at(next, outAlong, -beside), next+right, next-out),
	} {
		pieces = append(pieces, profile.Piece{Curve: c, SmoothEnd: true})
	}
	return pieces
}

// narrowest is the narrowest opening of the window: across between its edges, or between
// the two sides where they begin at the hub. A point at t along an arm and a/2 beside it
// is t sin(pi/n) - a/2 cos(pi/n) from the window's middle.
func (w window) narrowest() float64 {
	along, _ := w.center(w.hub + w.corner)
	width := 2 * (along*w.sin() - w.arm/2*math.Cos(math.Pi/float64(w.n)))
	return math.Min(width, w.outer-w.hub)
}
