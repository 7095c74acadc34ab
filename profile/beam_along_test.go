package profile_test

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// distanceToEdge is how far a point lies from the part's edge, found by looking at points of all
// curves of the repetition about +Y and its neighbours.
func distanceToEdge(o profile.Outline, p r2.Vec) float64 {
	least := math.Inf(1)
	for _, c := range chainOf(o) {
		for _, mirror := range []float64{1, -1} {
			for _, n := range []float64{-1, 0, 1} {
				place := o.Step(n, 0)
				at := func(u float64) float64 {
					q := c.Curve.At(u)
					return norm(r2.Sub(p, place(r2.Vec{X: mirror * q.X, Y: q.Y})))
				}
				from, to := c.Curve.Domain()
				best, where := math.Inf(1), from
				const coarse = 40
				for i := range coarse + 1 {
					u := from + (to-from)*float64(i)/coarse
					if d := at(u); d < best {
						best, where = d, u
					}
				}
				for step := math.Abs(to-from) / coarse; step > 1e-12; step /= 2 {
					for _, u := range [2]float64{where - step, where + step} {
						if u < math.Min(from, to) || u > math.Max(from, to) {
							continue
						}
						if d := at(u); d < best {
							best, where = d, u
						}
					}
				}
				least = math.Min(least, best)
			}
		}
	}
	return least
}

// TestBeamAlongKeepsItsDistance: every point of a beam's path along rings and racks is
// half its width from the part's edge.
func TestBeamAlongKeepsItsDistance(t *testing.T) {
	left := 0
	for _, list := range []map[string]profile.Spec{rings(), racks()} {
		for name, s := range list {
			tooth := solve(t, s)
			for _, share := range []float64{0.3, 0.9} {
				width := 2 * share * tooth.Dimensions.MinFilletRadius
				if width == 0 {
					continue // a sharp root takes no beam
				}
				b, err := tooth.Beam(width)
				if err != nil {
					t.Errorf("%s: %v", name, err)
					continue
				}
				checkBeam(t, fmt.Sprintf("%s, width %g", name, width), tooth, b)
			}
			// Wider than the root's radius: refused where that is an arc, trimmed where a
			// cutter has left more room.
			b, err := tooth.Beam(2.2*tooth.Dimensions.MinFilletRadius + 1e-3)
			var f profile.Finding
			switch {
			case err == nil && s.CutterTeeth != 0:
				left += len(b.Leftovers)
				checkBeam(t, name+", trimmed", tooth, b)
			case !errors.As(err, &f) || f.Rule != profile.RuleKerfTooWide:
				t.Errorf("%s: a beam wider than the root: %v", name, err)
			case f.Bound.Value > 0:
				if _, err := tooth.Beam(f.Bound.Value * (1 - 1e-9)); err != nil {
					t.Errorf("%s: the bound is refused as well: %v", name, err)
				}
			}
		}
	}
	if left == 0 {
		t.Error("no beam was trimmed")
	}
}

// checkBeam judges a path by itself and by its distance from the part.
func checkBeam(t *testing.T, name string, tooth *profile.Tooth, b *profile.Beam) {
	t.Helper()
	if err := soundOutline(b.Outline, tooth.Spec.Module); err != nil {
		t.Errorf("%s: %v", name, err)
	}
	for _, p := range chainOf(b.Outline) {
		for _, u := range along(p.Curve, 6) {
			at := p.Curve.At(u)
			if off := distanceToEdge(tooth.Outline, at) - b.Width/2; math.Abs(off) > 1e-9 {
				t.Errorf("%s: part %d at %v is %g mm too far from the edge", name, p.Part, at, off)
			}
		}
	}
}
