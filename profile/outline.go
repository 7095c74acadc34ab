package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Outline is a toothed edge as exact curves: one tooth, centered on +Y, whose other side
// is a mirror image, and its repetitions. The part's edge is one, and so is the path of a
// beam's middle beside it.
//
// Of a gear it is a tooth and turns about the axis; of a ring it is a space, which is the
// tooth of an external gear with the opposite shift, with the material outside; of a rack
// it is a tooth that repeats along the datum line. All are travelled with the next
// repetition ahead: counter-clockwise, or towards -X.
type Outline struct {
	Form  Form
	Teeth int
	// Advance is the pitch of a rack in mm; 0 for the others.
	Advance float64
	// Land is the whole land from the right corner to the left one: of a gear or rack the
	// tip land, of a ring the root land.
	Land Curve
	// LandSmooth says that Side starts in the direction Land ends in.
	LandSmooth bool
	// Side is the left side from the end of the land on: of a gear or rack rounding or
	// chamfer if any, flank, fillet if it has any length; of a ring the other way round.
	Side []Piece
	// Root is what lies between this Side and the next repetition's, nil where they meet.
	Root Curve
}

// Pitch is the angle from one tooth to the next, in rad; 0 for a rack.
func (o Outline) Pitch() float64 {
	if o.Form == FormRack {
		return 0
	}
	return 2 * math.Pi / float64(o.Teeth)
}

// Step is the way from the tooth to its n-th repetition, and a turn of all of it about
// the origin in rad; n need not be whole.
func (o Outline) Step(n, turn float64) func(r2.Vec) r2.Vec {
	if o.Form != FormRack {
		return r2.NewRotation(turn+n*o.Pitch(), r2.Vec{}).Rotate
	}
	move, rotate := r2.Vec{X: -n * o.Advance}, r2.NewRotation(turn, r2.Vec{}).Rotate
	return func(p r2.Vec) r2.Vec { return rotate(r2.Add(p, move)) }
}

// Between is the point as high as p in the middle between the tooth and its next
// repetition.
func (o Outline) Between(p r2.Vec) r2.Vec { return o.Step(0.5, 0)(r2.Vec{Y: o.Height(p)}) }

// Height is a point's distance from the axis, or its height over the datum line.
func (o Outline) Height(p r2.Vec) float64 {
	if o.Form == FormRack {
		return p.Y
	}
	return math.Hypot(p.X, p.Y)
}

// Depth is the depth of the teeth in mm, from the land to the end of a side.
func (o Outline) Depth() float64 {
	land := o.Height(Start(o.Land))
	if n := len(o.Side); n > 0 {
		return land - o.Height(End(o.Side[n-1].Curve))
	}
	return 0
}
