package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Options say how curves are drawn.
type Options struct {
	Curves    Kind    // Arc or Line
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
	Deviation        float64 // mm, largest distance found between drawn and exact curve
	pitch            float64 // rad, from one tooth to the next
	teeth            int
}

// NewTooth draws a solved tooth. The error is of type profile.Violations where the
// tolerance cannot be met or is larger than the tooth.
func NewTooth(t *profile.Tooth, o Options) (*Tooth, error) {
	if err := checkTolerance(t, o.Tolerance); err != nil {
		return nil, err
	}
	if err := checkCount(t, o); err != nil {
		return nil, err
	}
	f := &Tooth{Tolerance: o.Tolerance, pitch: t.Pitch(), teeth: t.Spec.Teeth}
	f.Land = f.draw(t.Land, o, ends{})
	smooth := t.LandSmooth
	for _, p := range t.Side {
		f.Side = append(f.Side, f.draw(p.Curve, o, ends{start: smooth, end: p.SmoothEnd})...)
		smooth = p.SmoothEnd
	}
	if t.Root != nil {
		f.Root = f.draw(*t.Root, o, ends{})
	}
	f.absorbShort(t)
	f.link()
	return f, nil
}

// draw fits one exact curve and keeps the largest deviation. A curve too short to be
// drawn is left out; its neighbours are linked over it.
func (f *Tooth) draw(c profile.Curve, o Options, e ends) []Segment {
	if span := r2.Norm(r2.Sub(profile.End(c), profile.Start(c))); span < ShortestSegment {
		f.Deviation = math.Max(f.Deviation, span)
		return nil
	}
	fit := func() ([]Segment, float64) { return fitArcs(c, o.Tolerance, e) }
	if o.Curves == Line {
		fit = func() ([]Segment, float64) { return fitChords(c, o.Tolerance) }
	}
	segments, worst := fit()
	f.Deviation = math.Max(f.Deviation, worst)
	return segments
}

// absorbShort removes segments shorter than ShortestSegment; a neighbour takes
// over their end. How far a point moved counts as deviation.
func (f *Tooth) absorbShort(t *profile.Tooth) {
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
		f.Side[0].Start = r2.Vec{Y: t.Land.Radius}
		f.Land = nil
	}
	if total(f.Root) < ShortestSegment {
		middle := math.Pi/2 + f.pitch/2
		last := &f.Side[len(f.Side)-1]
		if f.Root != nil {
			f.Deviation = math.Max(f.Deviation, total(f.Root)/2)
		}
		radius := r2.Norm(last.End)
		last.End = r2.Vec{X: radius * math.Cos(middle), Y: radius * math.Sin(middle)}
		f.Root = nil
	}
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
		f.Root[n-1].End = r2.Rotate(mirrored(last), f.pitch, r2.Vec{})
	}
}

// mirrored is the point on the other side of the tooth's middle, +Y.
func mirrored(p r2.Vec) r2.Vec { return r2.Vec{X: -p.X, Y: p.Y} }
