package dxf

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export/fixed"
	"flankwright/profile/fit"
)

// maxArcRadius bounds the radius of an ARC, in drawing units. The angles have
// twelve decimals, half a unit of which is 8.7e-15 rad: at this radius the ends
// move by 1e-9, one step. Flatter arcs can only be vertices with a bulge.
const maxArcRadius = 1e5

// arc is what an ARC entity holds; angles in degrees, counter-clockwise from
// `from` to `to`.
type arc struct {
	center   r2.Vec
	radius   float64
	from, to float64
}

// placeArc returns the ARC whose ends are nearest to those of the segment.
//
// Center and radius have nine decimals like everything else, which leaves each
// end a radial error that no angle can mend. Where the center moves along the
// bisector of the chord the radius makes up for it; by what it moves across,
// times the sine of half the included angle, one end comes out too near and the
// other too far. Of the four grid points around the center one is within half a
// step of the bisector (0.71 if one simply rounded). With that one, and half a
// step for the radius, an end is off by less than one step, and the ends of two
// arcs that meet agree to 2e-9.
func placeArc(s *fit.Segment) arc {
	exact := s.Center()
	var best arc
	least := math.Inf(1)
	for i := range 4 {
		c := r2.Vec{
			X: fixed.Round(neighbor(exact.X, i&1 == 1)),
			Y: fixed.Round(neighbor(exact.Y, i&2 == 2)),
		}
		d0, d1 := r2.Norm(r2.Sub(s.Start, c)), r2.Norm(r2.Sub(s.End, c))
		radius := fixed.Round((d0 + d1) / 2)
		if off := math.Max(math.Abs(d0-radius), math.Abs(d1-radius)); off < least {
			least = off
			best = arc{center: c, radius: radius}
		}
	}
	from, to := s.Start, s.End
	if s.Bulge < 0 {
		from, to = to, from
	}
	best.from, best.to = direction(best.center, from), direction(best.center, to)
	return best
}

// neighbor is the grid line below or above x.
func neighbor(x float64, above bool) float64 {
	steps := math.Floor(x / fixed.Step)
	if above {
		steps++
	}
	return steps * fixed.Step
}

// direction is the angle of p seen from c, in degrees, in [0, 360).
func direction(c, p r2.Vec) float64 {
	deg := math.Atan2(p.Y-c.Y, p.X-c.X) * (180 / math.Pi)
	if deg < 0 {
		deg += 360
	}
	// A tiny negative angle rounds to a full turn, which is no turn at all.
	const half = 0.5e-12
	if deg >= 360-half {
		return 0
	}
	return deg
}
