package export

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// leadIn is the way from the pierce point onto a cut: a quarter turn of the given radius
// in mm on the scrap side, right of travel, that arrives at a point in its direction of
// travel. The pierce is a radius behind the point and a radius beside the cut.
func leadIn(at, along r2.Vec, radius float64) Item {
	right := r2.Vec{X: along.Y, Y: -along.X}
	pierce := r2.Add(at, r2.Scale(radius, r2.Sub(right, along)))
	// Scrap is on the right, so the arc comes in turning right: clockwise.
	quarter := -math.Tan(math.Pi / 8)
	path := fit.Path{Segments: []fit.Segment{fit.ArcTo(pierce, at, quarter)}}
	return Item{Layer: LayerLead, Role: Marker, Path: &path}
}

// roomForLead is how large a lead-in may be in mm inside a hole: half the radius of a
// round one, and area by perimeter, which is that for a circle, of any other.
func roomForLead(p fit.Path) float64 { return math.Abs(p.Area()) / p.Length() }
