package label

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/fit"
)

// Heights that a label may have, in mm.
const (
	MinHeight = 0.5  // finer than that no one reads without a glass
	MaxHeight = 1000 // beyond any lettering of a part
)

// PreferredHeights are the heights in mm a label is fitted with, the lettering heights of
// ISO 3098-1, in falling order.
func PreferredHeights() []float64 {
	return []float64{20, 14, 10, 7, 5, 3.5, 2.5, 1.8}
}

// Margin is the least distance in mm from the strokes of a label of the given height to
// any edge: a fifth of the height, as between two characters, and no less than half a
// millimetre, so that the mark stays off the burr and the chamfer of a cut edge.
func Margin(height float64) float64 {
	const least, share = 0.5, 0.2 // mm; cap heights
	return math.Max(least, share*height)
}

// Placement is a label in its place. Lengths are mm, in the part's frame.
type Placement struct {
	Paths     []fit.Path // one open path a stroke
	Height    float64    // of capitals and digits
	Origin    r2.Vec     // where the baseline starts
	Clearance float64    // that every stroke keeps from every edge, at least Margin(Height)
	Chosen    bool       // the height was fitted, not given
}

// Place draws text upright and in one line on the web, with capitals of the given height
// in mm, or with the largest of PreferredHeights that fits if height is 0.
//
// Its middle comes to lie below the axis at x = 0 where that leaves Margin all around,
// else above, left, right of it, or in a direction between these, and on that ray where
// the clearance is largest, to 1/50 of the height. Only the strokes need the room, not the
// box around them. That all of them keep the margin is proven, not sampled; that no place
// was missed holds for the rays tried.
//
// A text that cannot be drawn, a height out of range and a label for which there is no
// room are refused with profile.Violations; the last names the largest height that has
// room, rounded down to 0.01 mm, as the bound.
func Place(text string, height float64, region Region) (Placement, error) {
	paths, width, err := Strokes(text)
	found, _ := err.(profile.Violations)
	found = append(found, checkHeight(height)...)
	if len(found) > 0 {
		return Placement{}, found
	}
	p := newPlacer(paths, width, region)
	sizes := []float64{height}
	if height == 0 {
		sizes = PreferredHeights()
	}
	for _, size := range sizes {
		if s, clearance, ok := p.fit(size); ok {
			return Placement{Paths: s.drawn(), Height: size, Origin: s.origin, Clearance: clearance, Chosen: height == 0}, nil
		}
	}
	return Placement{}, profile.Violations{p.noRoom(sizes[len(sizes)-1], height == 0)}
}

// checkHeight refuses a height out of range; 0 stands for none given.
func checkHeight(height float64) profile.Violations {
	value := profile.LengthOf(height)
	switch {
	case height == 0 || height >= MinHeight && height <= MaxHeight:
		return nil
	case math.IsNaN(height) || math.IsInf(height, 0):
		return profile.Violations{{Rule: profile.RuleNotFinite, Param: ParamHeight, Value: value,
			Text: "the height must be a finite number", Hint: "give a plain decimal number"}}
	case height < MinHeight:
		return profile.Violations{{Rule: profile.RuleOutOfRange, Param: ParamHeight, Value: value, Bound: profile.LengthOf(MinHeight).AtLeast(),
			Text: "the label height {value} is too small", Hint: "it must be at least {bound}"}}
	}
	return profile.Violations{{Rule: profile.RuleOutOfRange, Param: ParamHeight, Value: value, Bound: profile.LengthOf(MaxHeight).AtMost(),
		Text: "the label height {value} is too large", Hint: "it must be at most {bound}"}}
}

// placer looks for a place for one text on one region.
type placer struct {
	region  Region
	paths   []fit.Path // in cap heights
	middle  r2.Vec     // of the box around them
	rays    []r2.Vec
	reaches []float64 // mm, a ray each
}

// newPlacer prepares the search for a drawing of Strokes.
func newPlacer(paths []fit.Path, width float64, region Region) placer {
	box := r2.Box{Min: r2.Vec{Y: math.Inf(1)}, Max: r2.Vec{X: width, Y: math.Inf(-1)}}
	for _, p := range paths {
		b := p.Bounds()
		box.Min.Y, box.Max.Y = math.Min(box.Min.Y, b.Min.Y), math.Max(box.Max.Y, b.Max.Y)
	}
	p := placer{region: region, paths: paths, middle: r2.Scale(0.5, r2.Add(box.Min, box.Max)), rays: directions()}
	for _, d := range p.rays {
		p.reaches = append(p.reaches, reach(region, d))
	}
	return p
}

// fit finds a place for the text at one height in mm, and the clearance it keeps there.
func (p placer) fit(height float64) (s setting, clearance float64, ok bool) {
	margin := Margin(height)
	for i, d := range p.rays {
		at := func(t float64) setting {
			return setting{region: p.region, paths: p.paths, height: height,
				origin: r2.Sub(r2.Scale(t, d), r2.Scale(height, p.middle))}
		}
		t, best := bestAlong(p.reaches[i], margin, centring*height, func(t, matters float64) float64 {
			return at(t).least(matters, slack*height)
		})
		if best < margin {
			continue
		}
		if s := at(t); s.clear(margin) {
			return s, math.Max(margin, best-slack*height), true
		}
	}
	return setting{}, 0, false
}

// drawn is the text in its place, in mm.
func (s setting) drawn() []fit.Path {
	place := func(p r2.Vec) r2.Vec { return r2.Add(s.origin, r2.Scale(s.height, p)) }
	out := make([]fit.Path, len(s.paths))
	for i, p := range s.paths {
		out[i].Segments = make([]fit.Segment, len(p.Segments))
		for k, piece := range p.Segments {
			piece.Start, piece.End = place(piece.Start), place(piece.End)
			out[i].Segments[k] = piece
		}
	}
	return out
}
