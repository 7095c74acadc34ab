package profile

import "math"

// Outline is an outline of equal teeth about the origin as exact curves: one tooth,
// centered on +Y, whose other side is a mirror image. The part's edge is one, and so is
// the path of a beam's middle beside it.
type Outline struct {
	Teeth int
	// Land is the whole tip land, from the right corner to the left one.
	Land CircleArc
	// LandSmooth says that Side starts in the direction Land ends in.
	LandSmooth bool
	// Side is the left side from the end of the land to the root: rounding or chamfer
	// if any, flank, fillet if it has any length.
	Side []Piece
	// Root is the whole root arc from this tooth's fillet to the next one's, nil where
	// the two fillets meet.
	Root *CircleArc
}

// Pitch is the angle from one tooth to the next, in rad.
func (o Outline) Pitch() float64 { return 2 * math.Pi / float64(o.Teeth) }

// Depth is the depth of the teeth in mm, from the land to the root.
func (o Outline) Depth() float64 {
	root := o.Land.Radius
	if n := len(o.Side); n > 0 {
		end := End(o.Side[n-1].Curve)
		root = math.Hypot(end.X, end.Y)
	}
	return o.Land.Radius - root
}
