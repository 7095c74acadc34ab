package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Web is the disc between the roots of the teeth and the bore, where there is room for
// a label. Lengths are mm.
type Web struct {
	Root float64 // radius of the root circle
	Bore float64 // radius of the bore; 0 for none
}

// Clearance is the distance in mm from a point to the nearer edge of the web, positive
// on it.
func (w Web) Clearance(p r2.Vec) float64 {
	radius := r2.Norm(p)
	outer := w.Root - radius
	if w.Bore == 0 {
		return outer
	}
	return math.Min(outer, radius-w.Bore)
}
