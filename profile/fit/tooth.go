package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Options say how curves are drawn.
type Options struct {
	Curves    Kind    // Arc, Cubic or Line
	Tolerance float64 // mm, the largest deviation allowed
}

// ShortestSegment is the least length in mm of a drawn segment: twice what the
// strictest reader found tells apart, so that rounding leaves it apart too. Pieces
// of a profile that come out shorter, such as the root arc of an almost
// full-radius root, are absorbed by their neighbours.
const ShortestSegment = 2e-6

// Tooth is a tooth as drawn: its land and root from corner to corner, and its left
// side between them.
type Tooth struct {
	Land, Side, Root []Segment
	Tolerance        float64 // mm, as asked
	Deviation        float64 // mm, largest distance found between drawn and exact curve, before rounding
	exact            profile.Outline
	options          Options
	// The least numbers of arcs that could draw land, side and root.
	landLimit, sideLimit, rootLimit int
}

// NewTooth draws a solved tooth. The error is of type profile.Violations where the
// tolerance cannot be met or is larger than the tooth.
func NewTooth(t profile.Outline, o Options) (*Tooth, error) {
	if err := checkTolerance(t, o.Tolerance); err != nil {
		return nil, err
	}
	if err := checkCount(t, o); err != nil {
		return nil, err
	}
	f := &Tooth{Tolerance: o.Tolerance, exact: t, options: o}
	o.Tolerance -= pointRounding
	f.Land, f.landLimit = f.draw(t.Land, o, ends{})
	smooth := t.LandSmooth
	for _, p := range t.Side {
		segments, limit := f.draw(p.Curve, o, ends{start: smooth, end: p.SmoothEnd})
		f.Side = append(f.Side, segments...)
		f.sideLimit += limit
		smooth = p.SmoothEnd
	}
	if t.Root != nil {
		f.Root, f.rootLimit = f.draw(t.Root, o, ends{})
	}
	f.absorbShort(t)
	f.link()
	return f, nil
}

// draw fits one exact curve and keeps the largest deviation; limit is the least number
// of arcs that could draw it. A curve too short to be drawn is left out; its neighbours
// are linked over it.
func (f *Tooth) draw(c profile.Curve, o Options, e ends) (segments []Segment, limit int) {
	if span := r2.Norm(r2.Sub(profile.End(c), profile.Start(c))); span < ShortestSegment {
		f.Deviation = math.Max(f.Deviation, span)
		return nil, 0
	}
	var worst float64
	switch o.Curves {
	case Line:
		segments, worst = fitChords(c, o.Tolerance)
	case Cubic:
		segments, worst = fitCubics(c, o.Tolerance)
	default:
		segments, worst = fitArcs(c, o.Tolerance, e)
	}
	f.Deviation = math.Max(f.Deviation, worst)
	limit = max(1, int(math.Ceil(arcLimit(arcSpread(c), o.Tolerance, e))))
	if o.Curves == Arc {
		limit = min(limit, len(segments)) // the formula takes curvature to change evenly along each arc
	}
	return segments, limit
}

// ArcLimit is the least number of tangent-continuous arcs that could draw the extent
// within the tolerance.
func (f *Tooth) ArcLimit(e Extent) int {
	teeth, spaces := f.span(e)
	sides := 2 * f.sideLimit
	switch {
	case !e.Partial() && f.exact.Form != profile.FormRack:
		return (teeth + spaces) * (f.landLimit + sides + f.rootLimit)
	case teeth > 0:
		return teeth*(f.landLimit+sides) + (teeth+1)*f.rootLimit
	}
	return (spaces+1)*f.landLimit + spaces*(sides+f.rootLimit)
}

// absorbShort removes segments shorter than ShortestSegment; a neighbour takes
// over their end. How far a point moved counts as deviation.
func (f *Tooth) absorbShort(t profile.Outline) {
	kept := f.Side[:0]
	for _, s := range f.Side {
		short := s.Length() < ShortestSegment
		if short {
			f.Deviation = math.Max(f.Deviation, s.Length())
		}
		if n := len(kept); short && n > 0 {
			kept[n-1].End = s.End
			continue
		}
		if !short {
			kept = append(kept, s)
		}
	}
	f.Side = kept
	if total(f.Land) < ShortestSegment {
		f.Deviation = math.Max(f.Deviation, total(f.Land)/2)
		f.Side[0].Start = middleOf(t.Land)
		f.Land = nil
	}
	if total(f.Root) < ShortestSegment {
		last := &f.Side[len(f.Side)-1]
		if f.Root != nil {
			f.Deviation = math.Max(f.Deviation, total(f.Root)/2)
		}
		last.End = t.Between(last.End)
		f.Root = nil
	}
}

// middleOf is the point in the middle of a land.
func middleOf(land profile.Curve) r2.Vec {
	from, to := land.Domain()
	return r2.Vec{Y: land.At((from + to) / 2).Y} // on +Y but for rounding
}

func total(segments []Segment) float64 {
	sum := 0.0
	for _, s := range segments {
		sum += s.Length()
	}
	return sum
}

// link gives neighbouring segments the same point where rounding in two curves'
// formulas left it a bit apart.
func (f *Tooth) link() {
	for i := 1; i < len(f.Side); i++ {
		f.Side[i].Start = f.Side[i-1].End
	}
	if n := len(f.Land); n > 0 {
		f.Land[n-1].End = f.Side[0].Start
		f.Land[0].Start = mirrored(f.Side[0].Start)
	}
	if n := len(f.Root); n > 0 {
		last := f.Side[len(f.Side)-1].End
		f.Root[0].Start = last
		f.Root[n-1].End = f.exact.Step(1, 0)(mirrored(last))
	}
}

// mirrored is the point on the other side of the tooth's middle, +Y.
func mirrored(p r2.Vec) r2.Vec { return r2.Vec{X: -p.X, Y: p.Y} }
