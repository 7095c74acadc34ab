package label

import (
	"math"

	"flankwright/profile"
)

// noRoom is the refusal of a label that does not fit at a height in mm, with the largest
// height that does.
func (p placer) noRoom(height float64, chosen bool) profile.Finding {
	f := profile.Finding{Rule: RuleNoRoom, Param: ParamLabel, Value: profile.LengthOf(height)}
	margin := profile.LengthOf(Margin(height)).AtLeast()
	f.Also = []profile.Quantity{margin}
	f.Text = "the web has no room for the label {value} high with {0} to every edge"
	if chosen {
		f.Text = "the web has no room for the label even {value} high with {0} to every edge"
	} else {
		f.Param = ParamHeight
	}
	largest, ok := p.largest(height)
	if !ok {
		f.Bound = profile.LengthOf(0)
		f.Hint = "shorten --label, or leave it out"
		return f
	}
	f.Bound = profile.LengthOf(largest).AtMost()
	f.Hint = "keep --label-height at or below {bound}, or shorten --label"
	if chosen {
		f.Hint = "shorten --label, or give --label-height at or below {bound}"
	}
	return f
}

// grains is how many steps of the largest height named there are in a mm.
const grains = 100

// trialHeights are the heights in mm from which the search for the largest starts, in
// falling order: the preferred ones and, in their ratio, those down to MinHeight.
func trialHeights() []float64 { return append(PreferredHeights(), 1.25, 0.9, 0.7, MinHeight) }

// largest finds the largest height in mm below one that does not fit, by bisection, as a
// multiple of 1/grains that does fit.
//
// A smaller text need not fit wherever a larger one does, since its strokes lie elsewhere:
// a hole may be between the strokes of the larger. So the bisection starts from the
// largest trial height that fits, and what it returns was tried.
func (p placer) largest(height float64) (float64, bool) {
	fits := func(h float64) bool { _, _, ok := p.fit(h); return ok }
	low, high := 0.0, height
	for _, h := range trialHeights() {
		if h >= height {
			continue
		}
		if fits(h) {
			low = h
			break
		}
		high = h
	}
	if low == 0 {
		return 0, false
	}
	tried := low
	for high-low > 0.5/grains {
		if middle := (low + high) / 2; fits(middle) {
			low = middle
		} else {
			high = middle
		}
	}
	if rounded := math.Floor(low*grains) / grains; rounded > tried && fits(rounded) {
		return rounded, true
	}
	return tried, true
}
