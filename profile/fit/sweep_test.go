package fit

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/internal/racksweep"
)

// TestDrawnOutlineAgainstSweptRack measures drawn points against the rack itself,
// rolled over the reference circle: no formula of flank or fillet is involved. Every
// point must lie within the tolerance of the nearest rack position, or on the tip
// circle and outside all of them. Gears that cannot be made are judged in package
// profile, which knows which and why.
func TestDrawnOutlineAgainstSweptRack(t *testing.T) {
	racks := profile.StandardRacks()
	teeth := []int{5, 8, 12, 17, 18, 24, 43, 120, 400}
	shifts := []float64{-0.5, 0, 0.3, 0.8}
	angles := []float64{14.5, 20, 25, 30}
	modules := []float64{0.1, 2, 50}
	if testing.Short() {
		teeth = []int{5, 17, 43, 400}
		shifts = []float64{-0.5, 0.3}
	}
	for ri, standard := range racks {
		t.Run(standard.Name, func(t *testing.T) {
			t.Parallel()
			made := 0
			for zi, z := range teeth {
				for xi, x := range shifts {
					for ai, alpha := range angles {
						for thin := range 3 {
							for _, m := range modules {
								if testing.Short() && m != modules[(ri+zi+xi+ai+thin)%len(modules)] {
									continue // each still meets every value of the others
								}
								if sweepOne(t, standard, m, z, x, alpha*math.Pi/180, thin) {
									made++
								}
							}
						}
					}
				}
			}
			const atLeast = 20 // so that a wrong grid cannot pass unseen
			if made < atLeast {
				t.Errorf("only %d gears of the grid could be made", made)
			}
		})
	}
}

// sweepOne compares one gear of the grid, in arcs and in lines at both tolerances; false
// where it cannot be made.
func sweepOne(t *testing.T, standard profile.StandardRack, m float64, z int, x, alpha float64, thin int) bool {
	t.Helper()
	s := profile.Spec{Module: m, Teeth: z, Rack: standard.For(m, profile.RackChange{PressureAngle: ptr(alpha)}), ProfileShift: x}
	if thin > 0 {
		s.Thinning, s.ThinningBy = 0.05*m, profile.ThinningBy(thin-1)
	}
	tooth, err := profile.Solve(s)
	if err != nil {
		return false
	}
	for _, kind := range []Kind{Arc, Line} {
		for _, tolerance := range []float64{1e-3, 1e-5} {
			f, err := NewTooth(tooth.Outline, Options{Curves: kind, Tolerance: tolerance})
			var refused profile.Finding
			if errors.As(err, &refused) && refused.Rule == profile.RuleTooManySegments && kind == Line {
				continue // 400 teeth of 50 mm in chords within 0.01 um
			}
			if err != nil {
				t.Fatal(err)
			}
			compareWithSweep(t, tooth, f, tolerance)
		}
	}
	return true
}

func ptr(v float64) *float64 { return &v }

// compareWithSweep checks points of one pitch of the drawn outline.
func compareWithSweep(t *testing.T, tooth *profile.Tooth, f *Tooth, tolerance float64) {
	t.Helper()
	rack := racksweep.New(racksweep.For(tooth.Spec))
	tip := tooth.Dimensions.TipDiameter / 2
	limit := tolerance + 1e-10*tooth.Spec.Module // what the sweep itself resolves
	for _, list := range [][]Segment{f.Land, f.Side, f.Root} {
		// Of many segments some, spread evenly from the first to the last.
		const most = 24
		n := min(len(list), most)
		for i := range n {
			s := list[i*(len(list)-1)/max(1, n-1)]
			for _, u := range []float64{0, 0.21, 0.5, 0.79} {
				p := pointAt(s, u)
				clear := rack.Clearance(p)
				onTip := math.Abs(r2.Norm(p)-tip) <= limit
				if math.Abs(clear) <= limit || onTip && clear >= -limit {
					continue
				}
				spec := tooth.Spec
				t.Fatalf("z %d m %g x %g alpha %.1f thinning %g by %d, tolerance %g: point %v is %g mm from the nearest rack position",
					spec.Teeth, spec.Module, spec.ProfileShift, spec.Rack.PressureAngle*180/math.Pi, spec.Thinning, spec.ThinningBy,
					tolerance, p, clear)
			}
		}
	}
}
