package label

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// Region is the web of a part, on which a label may lie.
type Region interface {
	// Clearance is the distance in mm from p to the nearest edge of the web, positive
	// on the material and negative off it. It must be 1-Lipschitz, as any such distance
	// is: it changes by no more than p moves. Place relies on that, and on nothing else;
	// a Clearance that understates distances off the part makes it slow, not wrong.
	Clearance(p r2.Vec) float64
}

// setting is a text set on a region: the drawing in cap heights, enlarged to the
// height in mm and moved so that the drawing's origin comes to lie on origin.
type setting struct {
	region Region
	paths  []fit.Path
	height float64 // mm
	origin r2.Vec  // mm
}

// clearance is the distance in mm from a point of the drawing to the nearest edge.
func (s setting) clearance(p r2.Vec) float64 {
	return s.region.Clearance(r2.Add(s.origin, r2.Scale(s.height, p)))
}

// least is the least clearance of the strokes in mm: found at a point of theirs, and at
// most slack above the true least, or by as much as it falls short of the clearance that
// matters, where only a bound is of use (by trial in TestEffort the fewest questions).
func (s setting) least(matters, slack float64) float64 {
	least := math.Inf(1)
	for _, p := range s.paths {
		for _, piece := range p.Segments {
			least = s.leastAlong(piece, least, matters, slack)
		}
	}
	return least
}

// leastAlong lowers least to what a piece comes to. With c at the middle of a piece and
// r from there to its farthest point, no point of it has less than c - r, so that a piece
// with c - r >= least - slack need not be looked at closer. As least <= c, none with
// r <= slack is.
func (s setting) leastAlong(piece fit.Segment, least, matters, slack float64) float64 {
	middle, reach := middleOf(piece)
	c := s.clearance(middle)
	least = math.Min(least, c) // NaN where the region gives one, which fits nowhere
	if math.IsNaN(c) || c-s.height*reach >= least-math.Max(slack, matters-least) {
		return least
	}
	first, second := halved(piece, middle)
	return s.leastAlong(second, s.leastAlong(first, least, matters, slack), matters, slack)
}

// undecided is the length in cap heights below which a piece whose clearance is within
// that length of the margin is taken as too close: 1/10 of the finest line an engraver
// leaves (1/100 of the height). Without it a stroke along an edge at exactly the margin
// would be halved for ever.
const undecided = 1.0 / 1024

// clear proves that every point of the strokes keeps the margin in mm.
func (s setting) clear(margin float64) bool {
	for _, p := range s.paths {
		for _, piece := range p.Segments {
			if !s.clearAlong(piece, margin) {
				return false
			}
		}
	}
	return true
}

// clearAlong proves that every point of a piece keeps the margin in mm: there is one that
// does not, or the ball around its middle does, or both halves do.
func (s setting) clearAlong(piece fit.Segment, margin float64) bool {
	middle, reach := middleOf(piece)
	c := s.clearance(middle)
	if c-s.height*reach >= margin {
		return true
	}
	if !(c >= margin) || reach < undecided {
		return false
	}
	first, second := halved(piece, middle)
	return s.clearAlong(first, margin) && s.clearAlong(second, margin)
}

// middleOf is the point halfway along a line or an arc, and the distance from there to
// its farthest points. These are its ends, for an arc below a full turn too.
//
// An arc lies right of its chord when it turns counter-clockwise, with a rise of half
// the chord times the bulge.
func middleOf(piece fit.Segment) (middle r2.Vec, reach float64) {
	chord := r2.Sub(piece.End, piece.Start)
	middle = r2.Scale(0.5, r2.Add(piece.Start, piece.End))
	middle = r2.Add(middle, r2.Scale(piece.Bulge/2, r2.Vec{X: chord.Y, Y: -chord.X}))
	return middle, r2.Norm(r2.Sub(piece.End, middle))
}

// halved is the piece before and after its middle. Half the angle has the bulge
//
//	tan(atan(b)/2) = b / (1 + sqrt(1 + b^2))
func halved(piece fit.Segment, middle r2.Vec) (first, second fit.Segment) {
	first, second = piece, piece
	first.End, second.Start = middle, middle
	if piece.Bulge != 0 {
		b := piece.Bulge / (1 + math.Sqrt(1+piece.Bulge*piece.Bulge))
		first.Bulge, second.Bulge = b, b
	}
	return first, second
}
