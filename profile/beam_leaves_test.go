package profile_test

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// TestBeamLeaves: what a beam leaves is the part where it could reach, and elsewhere half
// its width from its path; never inside the part.
func TestBeamLeaves(t *testing.T) {
	list := map[string]profile.Spec{}
	for name, s := range rings() {
		list["ring "+name] = s
	}
	for name, s := range racks() {
		list["rack "+name] = s
	}
	for _, z := range []int{12, 24, 60} {
		s := ring("iso53-a", 2, z, 0.2)
		s.Form = profile.FormGear
		list[fmt.Sprintf("gear %d", z)] = s
	}
	trimmed := 0
	for name, s := range list {
		tooth := solve(t, s)
		for _, factor := range []float64{0.5, 1.2, 1.5} {
			width := 2 * factor * tooth.Dimensions.MinFilletRadius
			b, err := tooth.Beam(width)
			if width == 0 || err != nil {
				continue
			}
			trimmed += len(b.Leftovers)
			left := b.Leaves()
			chain := chainOf(left)
			for i, p := range chain {
				if i+1 < len(chain) {
					if gap := norm(r2.Sub(profile.Start(chain[i+1].Curve), profile.End(p.Curve))); gap > 1e-9 {
						t.Errorf("%s, width %g: gap of %g after piece %d", name, width, gap, i)
					}
				}
				for _, u := range along(p.Curve, 6) {
					at := p.Curve.At(u)
					off := distanceToEdge(tooth.Outline, at)
					deepest := 1e-9
					for _, l := range b.Leftovers {
						deepest = math.Max(deepest, l.Depth*(1+1e-6))
					}
					if off > deepest {
						t.Errorf("%s, width %g: piece %d at %v is %g off the part, more than the %g left", name, width, i, at, off, deepest)
					}
				}
			}
		}
	}
	if trimmed == 0 {
		t.Error("no beam was trimmed")
	}
}
