// Package sheet turns a drawing in millimetres into what a file shows of it:
// scaled to the unit of the file, every coordinate rounded once, and checked
// against the rules that readers rely on. Both writers start from here, so DXF
// and SVG of one drawing agree to the last digit.
package sheet

import (
	"fmt"
	"math"
	"slices"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/fixed"
	"flankwright/profile/fit"
)

// MinSegment is the shortest chord that may be written, mm. The strictest
// importer known takes points closer than this for one point.
const MinSegment = 1e-6

// maxLayerName is the length limit of names in AC1009 files.
const maxLayerName = 31

// Sheet is a checked drawing. Its lengths are in Unit, unlike those of
// export.Drawing, and rounded to fixed.Decimals.
type Sheet struct {
	Unit   export.Unit
	Items  []export.Item // in the order of the drawing
	Bounds r2.Box        // least box around all items, rounded

	// What Items point into.
	segments []fit.Segment
	paths    []fit.Path
	circles  []export.Circle
}

// New scales, rounds and checks d. The error is an *Error; the first violation
// ends the search. The drawing is not changed and not kept.
//
// A layer name, a path or a circle that breaks a Rule is refused. What New does
// not look for are loops that cross themselves or each other: that needs the
// exact geometry and is the solver's promise.
func New(d export.Drawing) (*Sheet, error) {
	s := new(Sheet)
	if err := s.Set(d); err != nil {
		return nil, err
	}
	return s, nil
}

// Set makes s the sheet of another drawing, as New does, in the memory of the one
// before. After an error s is of no use but to be set again.
func (s *Sheet) Set(d export.Drawing) error {
	if len(d.Items) == 0 {
		return &Error{Rule: RuleEmpty, Item: -1, Segment: -1}
	}
	if d.Unit != export.Millimetre && d.Unit != export.Inch {
		return &Error{Rule: RuleUnit, Item: -1, Segment: -1, Detail: fmt.Sprint(uint8(d.Unit))}
	}
	segments, paths, circles := 0, 0, 0
	for _, it := range d.Items {
		if it.Path != nil {
			paths++
			segments += len(it.Path.Segments)
		}
		if it.Circle != nil {
			circles++
		}
	}
	// Room for all, so that nothing moves while items point into it.
	s.Unit = d.Unit
	s.Items = slices.Grow(s.Items[:0], len(d.Items))
	s.segments = slices.Grow(s.segments[:0], segments)
	s.paths = slices.Grow(s.paths[:0], paths)
	s.circles = slices.Grow(s.circles[:0], circles)
	b := builder{Sheet: s, scale: d.Unit.Scale()}
	for i, it := range d.Items {
		b.item, b.layer = i, it.Layer
		out, err := b.convert(it)
		if err != nil {
			return err
		}
		s.Items = append(s.Items, out)
	}
	s.Bounds = bounds(s.Items)
	if !fixed.InRange(s.Bounds.Min.X) || !fixed.InRange(s.Bounds.Min.Y) ||
		!fixed.InRange(s.Bounds.Max.X) || !fixed.InRange(s.Bounds.Max.Y) {
		return &Error{Rule: RuleFinite, Item: -1, Segment: -1, Detail: fmt.Sprint(s.Bounds)}
	}
	return nil
}

// builder converts item by item into the arrays of the sheet.
type builder struct {
	*Sheet
	scale float64
	item  int          // index of the item being converted, for errors
	layer export.Layer // its layer
}

// fail makes the error for the current item.
func (b *builder) fail(rule Rule, segment int, at r2.Vec, detail string) error {
	return &Error{Rule: rule, Layer: b.layer, Item: b.item, Segment: segment, At: at, Detail: detail}
}

func (b *builder) convert(it export.Item) (export.Item, error) {
	none := r2.Vec{}
	if !ValidLayer(it.Layer) {
		return it, b.fail(RuleLayer, -1, none, "")
	}
	if it.Role > export.Marker {
		return it, b.fail(RuleRole, -1, none, fmt.Sprint(uint8(it.Role)))
	}
	if (it.Path == nil) == (it.Circle == nil) {
		return it, b.fail(RuleShape, -1, none, "")
	}
	out := export.Item{Layer: it.Layer, Role: it.Role}
	if c := it.Circle; c != nil {
		center, ok := b.round(c.Center)
		radius := fixed.Round(c.Radius * b.scale)
		if !ok || !fixed.InRange(radius) {
			return it, b.fail(RuleFinite, -1, none, fmt.Sprint(*c))
		}
		if radius < MinSegment*b.scale {
			return it, b.fail(RuleRadius, -1, none, fmt.Sprint(c.Radius))
		}
		b.circles = append(b.circles, export.Circle{Center: center, Radius: radius})
		out.Circle = &b.circles[len(b.circles)-1]
		return out, nil
	}
	path, err := b.path(it.Path)
	if err != nil {
		return it, err
	}
	b.paths = append(b.paths, path)
	out.Path = &b.paths[len(b.paths)-1]
	return out, nil
}

// path rounds the points of p and checks every segment.
func (b *builder) path(p *fit.Path) (fit.Path, error) {
	n := len(p.Segments)
	if n == 0 || p.Closed && n < 2 {
		return fit.Path{}, b.fail(RuleSegments, -1, r2.Vec{}, fmt.Sprintf("%d", n))
	}
	first := len(b.segments)
	b.segments = b.segments[:first+n]
	// The capacity is cut so that nothing appended to one path can reach the next.
	segs := b.segments[first : first+n : first+n]
	least := MinSegment * b.scale
	for i := range segs {
		s, out := &p.Segments[i], &segs[i]
		*out = fit.Segment{Kind: s.Kind}
		ok := true
		if i > 0 && s.Start == p.Segments[i-1].End {
			out.Start = segs[i-1].End
		} else {
			out.Start, ok = b.round(s.Start)
		}
		if err := b.segment(out, s, i, least, ok); err != nil {
			return fit.Path{}, err
		}
		if i > 0 && out.Start != segs[i-1].End {
			return fit.Path{}, b.fail(RuleGap, i, s.Start, "")
		}
	}
	if p.Closed {
		if segs[n-1].End != segs[0].Start {
			return fit.Path{}, b.fail(RuleGap, n-1, p.Segments[n-1].End, "the path does not close")
		}
		if n == 2 && segs[0].Kind != fit.Cubic && segs[1].Kind != fit.Cubic && segs[0].Bulge == -segs[1].Bulge {
			return fit.Path{}, b.fail(RuleFlat, 1, p.Segments[1].Start, "")
		}
	}
	return fit.Path{Segments: segs, Closed: p.Closed}, nil
}

// segment rounds and checks all of s but its start, which out holds already; i is
// its index in the path.
func (b *builder) segment(out, s *fit.Segment, i int, least float64, startOK bool) error {
	var ok bool
	out.End, ok = b.round(s.End)
	if !startOK || !ok {
		return b.fail(RuleFinite, i, s.Start, fmt.Sprintf("%v to %v", s.Start, s.End))
	}
	dx, dy := out.End.X-out.Start.X, out.End.Y-out.Start.Y
	if dx*dx+dy*dy < least*least {
		return b.fail(RuleShort, i, s.Start, fmt.Sprintf("%.3g", s.Chord()))
	}
	switch s.Kind {
	case fit.Line:
	case fit.Arc:
		if !(math.Abs(s.Bulge) < 1) { // NaN too
			return b.fail(RuleTurn, i, s.Start, fmt.Sprintf("bulge %g", s.Bulge))
		}
		out.Bulge = fixed.Round(s.Bulge)
		if math.Abs(out.Bulge) >= 1 {
			return b.fail(RuleTurn, i, s.Start, "180 degrees after rounding")
		}
	case fit.Cubic:
		var ok1, ok2 bool
		out.C1, ok1 = b.round(s.C1)
		out.C2, ok2 = b.round(s.C2)
		if !ok1 || !ok2 {
			return b.fail(RuleFinite, i, s.Start, fmt.Sprintf("handles %v, %v", s.C1, s.C2))
		}
	default:
		return b.fail(RuleKind, i, s.Start, fmt.Sprint(uint8(s.Kind)))
	}
	return nil
}

// round scales and rounds a point; ok is false if it cannot be a coordinate.
func (b *builder) round(v r2.Vec) (r2.Vec, bool) {
	p := r2.Vec{X: fixed.Round(v.X * b.scale), Y: fixed.Round(v.Y * b.scale)}
	return p, fixed.InRange(p.X) && fixed.InRange(p.Y)
}

// ValidLayer reports whether the name may stand in a file.
func ValidLayer(l export.Layer) bool {
	if len(l) == 0 || len(l) > maxLayerName {
		return false
	}
	for i := range len(l) {
		c := l[i]
		if !('A' <= c && c <= 'Z' || '0' <= c && c <= '9' || c == '_' || c == '-') {
			return false
		}
	}
	return true
}

// Straight reports whether s is drawn best as a line: a line, or an arc whose
// sagitta |b| c / 2 is below half a step of the last decimal, so that no digit
// of the file could tell the two apart.
func Straight(s fit.Segment) bool {
	return s.Kind == fit.Line || s.Kind == fit.Arc && Flat(s.Bulge, s.Chord())
}

// Flat says the same of an arc by its bulge and chord.
func Flat(bulge, chord float64) bool { return math.Abs(bulge)*chord < fixed.Step }

// Has reports whether the path holds a segment of kind k.
func Has(p *fit.Path, k fit.Kind) bool {
	for i := range p.Segments {
		if p.Segments[i].Kind == k {
			return true
		}
	}
	return false
}
