package label

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// directions are the ways from the axis in which a place is looked for, unit vectors in
// the order of preference: below, so that a keyway on +Y is out of the way, above, left,
// right, then in between, where arms or holes may have left room, every 15 degrees and
// the lower ones first.
func directions() []r2.Vec {
	const right, step = math.Pi / 2, math.Pi / 12 // rad
	below := -right
	list := []r2.Vec{{Y: -1}, {Y: 1}, {X: -1}, {X: 1}}
	for _, k := range []float64{3, 9, 2, 4, 1, 5, 8, 10, 7, 11} { // steps from below; 6 is on the x axis
		for _, side := range []float64{-1, 1} {
			angle := below + side*k*step
			list = append(list, r2.Vec{X: math.Cos(angle), Y: math.Sin(angle)})
		}
	}
	return list
}

// farAway is a distance in mm from the axis beyond any part: ten times the tip radius of
// the largest gear.
const farAway = 10 * profile.MaxModule * profile.MaxTeeth / 2

// reach is a distance in mm from the axis beyond which no point of the ray is on the web.
// The ball around a point far off, up to the nearest edge, holds none of it.
func reach(region Region, direction r2.Vec) float64 {
	off := region.Clearance(r2.Scale(farAway, direction))
	if off < 0 {
		return math.Max(0, farAway+off)
	}
	return farAway
}

// Search along a ray: the clearance of a text at distance t from the axis, F(t), is
// 1-Lipschitz because the region's is. Between a and b it is therefore at most
//
//	(F(a) + F(b) + b - a)/2   at   t = (a + b)/2 + (F(b) - F(a))/2
//
// and the span with the highest such bound is the one to look into next (Piyavskii 1972,
// doi:10.1016/0041-5553(72)90115-2). Radially, F rises and falls with slope near 1, so
// that a few steps reach the top.
const (
	// centring is how far, in cap heights, the place found may fall short of the best
	// clearance on its ray: no more than shows.
	centring = 1.0 / 50
	// slack is the allowance for F itself in cap heights, well within centring.
	slack = 1.0 / 200
	// mostSteps bounds the search where F is level, as between two straight edges along
	// the ray: spans no longer than 1/64 of the ray are left by then.
	mostSteps = 64
)

// span is a piece of a ray with the clearance at its ends, all in mm.
type span struct{ a, b, fa, fb float64 }

// bound is the most that the clearance can be within the span.
func (s span) bound() float64 { return (s.fa + s.fb + s.b - s.a) / 2 }

// top is where it can be that, kept inside the span against rounding.
func (s span) top() float64 {
	return math.Min(math.Max((s.a+s.b+s.fb-s.fa)/2, s.a), s.b)
}

// bestAlong finds the t in 0..end with the largest F(t), if that can be margin or more.
// It returns the best it has when F reaches the margin nowhere. f is told the clearance
// that matters; where F is below that, f may overstate it.
func bestAlong(end, margin, tolerance float64, f func(t, matters float64) float64) (t, best float64) {
	first, last := f(0, margin), f(end, margin)
	t, best = 0, first
	if last > best {
		t, best = end, last
	}
	spans := make([]span, 1, mostSteps+1)
	spans[0] = span{a: 0, b: end, fa: first, fb: last}
	for range mostSteps {
		highest := 0
		for i, s := range spans {
			if s.bound() > spans[highest].bound() {
				highest = i
			}
		}
		s := spans[highest]
		if !(s.bound() > math.Max(margin, best+tolerance)) {
			break
		}
		mid := s.top()
		v := f(mid, math.Max(margin, best))
		if v > best {
			t, best = mid, v
		}
		spans[highest] = span{a: s.a, b: mid, fa: s.fa, fb: v}
		spans = append(spans, span{a: mid, b: s.b, fa: v, fb: s.fb})
	}
	return t, best
}
