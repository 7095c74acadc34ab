package sheet

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/fixed"
	"flankwright/profile/fit"
)

// bounds is the least box around the items, rounded. Few segments of an outline
// reach the box, so the exact extremes are found only for those that may: an
// arc stays within its sagitta of the box of its ends, a cubic within the box of
// its handles.
func bounds(items []export.Item) r2.Box {
	inf := math.Inf(1)
	box := r2.Box{Min: r2.Vec{X: inf, Y: inf}, Max: r2.Vec{X: -inf, Y: -inf}}
	for _, it := range items {
		if it.Circle != nil {
			grow(&box, it.Bounds())
			continue
		}
		for i := range it.Path.Segments {
			growPoint(&box, it.Path.Segments[i].Start)
		}
		growPoint(&box, it.Path.Segments[len(it.Path.Segments)-1].End)
	}
	for _, it := range items {
		if it.Circle != nil {
			continue
		}
		for i := range it.Path.Segments {
			s := &it.Path.Segments[i]
			if s.Kind != fit.Line && !inside(box, s) {
				grow(&box, s.Bounds())
			}
		}
	}
	return r2.Box{
		Min: r2.Vec{X: fixed.Round(box.Min.X), Y: fixed.Round(box.Min.Y)},
		Max: r2.Vec{X: fixed.Round(box.Max.X), Y: fixed.Round(box.Max.Y)},
	}
}

// inside reports whether s certainly lies in the box.
func inside(box r2.Box, s *fit.Segment) bool {
	if s.Kind == fit.Cubic {
		return contains(box, s.C1, 0) && contains(box, s.C2, 0)
	}
	// The sum of the legs stands for the chord: more than it, and no root.
	legs := math.Abs(s.End.X-s.Start.X) + math.Abs(s.End.Y-s.Start.Y)
	sagitta := math.Abs(s.Bulge) * legs / 2
	return contains(box, s.Start, sagitta) && contains(box, s.End, sagitta)
}

func contains(box r2.Box, p r2.Vec, margin float64) bool {
	return p.X-margin >= box.Min.X && p.X+margin <= box.Max.X &&
		p.Y-margin >= box.Min.Y && p.Y+margin <= box.Max.Y
}

func grow(box *r2.Box, b r2.Box) {
	growPoint(box, b.Min)
	growPoint(box, b.Max)
}

// growPoint takes finite points only, so plain comparisons will do.
func growPoint(box *r2.Box, p r2.Vec) {
	if p.X < box.Min.X {
		box.Min.X = p.X
	}
	if p.X > box.Max.X {
		box.Max.X = p.X
	}
	if p.Y < box.Min.Y {
		box.Min.Y = p.Y
	}
	if p.Y > box.Max.Y {
		box.Max.Y = p.Y
	}
}
