package fit

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// TestTabs: the chains and gaps make up the whole outline, gaps lie in the middle of
// lands and never on tooth 1.
func TestTabs(t *testing.T) {
	for name, tooth := range variety(t) {
		for _, kind := range []Kind{Arc, Line} {
			f := drawn(t, tooth, kind, 1e-3)
			whole := f.Outline(Extent{}, 0)
			gap := 0.4 * f.LandWidth()
			for _, tabs := range []int{1, 3, 7} {
				if tabs >= tooth.Spec.Teeth {
					continue
				}
				paths := f.TabbedOutline(tabs, gap, 0)
				length := 0.0
				for i, p := range paths {
					length += p.Length()
					end, start := p.Segments[len(p.Segments)-1].End, paths[(i+1)%len(paths)].Segments[0].Start
					tip := tooth.Land.(profile.CircleArc).Radius
					const drawnTo = 2e-3 // of the tip circle, with chords
					if math.Abs(r2.Norm(end)-tip) > drawnTo || math.Abs(r2.Norm(start)-tip) > drawnTo {
						t.Errorf("%s: a gap is not on a land", name)
					}
					if wide := r2.Norm(r2.Sub(end, start)); math.Abs(wide-gap) > 0.01*gap {
						t.Errorf("%s: gap of %g, want %g", name, wide, gap)
					}
					middle := r2.Add(end, start)
					if a := math.Abs(math.Remainder(math.Atan2(-middle.X, middle.Y), 2*math.Pi)); a < 0.5*tooth.Pitch() {
						t.Errorf("%s: a gap on tooth 1", name)
					}
				}
				if want := whole.Length() - float64(tabs)*gap; math.Abs(length-want) > 1e-9*want {
					t.Errorf("%s: %d chains are %g long, want %g", name, tabs, length, want)
				}
			}
		}
	}
}

// TestTabTeeth: as many teeth as asked for, all different, none of them tooth 1.
func TestTabTeeth(t *testing.T) {
	for teeth := 3; teeth < 60; teeth++ {
		for tabs := 1; tabs < teeth; tabs++ {
			at := tabTeeth(teeth, tabs)
			for i, k := range at {
				if k < 1 || k >= teeth || i > 0 && k <= at[i-1] {
					t.Fatalf("%d tabs on %d teeth: %v", tabs, teeth, at)
				}
			}
		}
	}
}
