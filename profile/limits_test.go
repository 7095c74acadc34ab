package profile_test

import (
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

// steps are distances from a limit, in modules or as a share, down to the last bit
// that a coefficient near 1 has, and zero: the limit itself.
func steps() []float64 {
	var out []float64
	for _, d := range []float64{1e-3, 1e-6, 1e-9, 1e-10, 1e-11, 1e-12, 1e-13, 1e-14, 1e-15, 2.3e-16} {
		out = append(out, d, -d)
	}
	return append(out, 0)
}

// bothSides solves a spec at every step from a limit and holds it against the
// rolling rack.
func bothSides(t *testing.T, name string, make func(step float64) profile.Spec) {
	t.Helper()
	for _, step := range steps() {
		const points = 16
		s := make(step)
		if err := compare(s, points); err != nil {
			t.Errorf("%s %+v: %v", name, step, err)
		}
		if _, err := profile.Solve(s); err != nil {
			t.Errorf("%s %+v: %v", name, step, err)
		}
	}
}

// TestUndercutOnset goes over the border at which undercut begins: flag and
// warning change there, and the form circle goes down to the base circle and
// stays near it.
func TestUndercutOnset(t *testing.T) {
	t.Parallel()
	for _, name := range []string{"iso53-a", "iso53-c", "full-depth-14.5", "full-depth-25", "stub-20"} {
		for _, z := range []int{7, 12, 17, 40, 200, 2000} {
			for _, m := range []float64{0.05, 2, 100} {
				limit := gear(name, m, z, 0).Rack.ShiftWithoutUndercut(m, z)
				if math.Abs(limit) > 1.9 {
					continue // beyond the range of the shift
				}
				at := func(step float64) profile.Spec {
					s := gear(name, m, z, limit+step)
					// Kept short of where few teeth come to a point.
					s.TipDiameter = m * (float64(z)*math.Cos(s.Rack.PressureAngle) + 1)
					return s
				}
				if _, err := profile.Solve(at(0)); err != nil {
					t.Errorf("%s z = %d: %v", name, z, err)
					continue
				}
				bothSides(t, fmt.Sprintf("%s z = %d m = %v, onset", name, z, m), at)
				for _, step := range steps() {
					tooth := solve(t, at(step))
					if sure := math.Abs(step) > 1e-11; sure && tooth.Undercut != (step < 0) {
						t.Errorf("%s z = %d at onset %+v: undercut %v", name, z, step, tooth.Undercut)
					}
					d := tooth.Dimensions
					// Without undercut rF^2 = rb^2 + (step m/sin alpha)^2; with it, the
					// corner lies higher by the same order.
					sin := math.Sin(tooth.Spec.Rack.PressureAngle)
					off := (d.FormDiameter - d.BaseDiameter) * (d.FormDiameter + d.BaseDiameter) / 4
					if bound := 9*math.Pow(step*m/sin, 2) + rounding*d.BaseDiameter*d.BaseDiameter; !(off >= 0 && off <= bound) {
						t.Errorf("%s z = %d at onset %+v: form diameter %v, base diameter %v", name, z, step, d.FormDiameter, d.BaseDiameter)
					}
				}
			}
		}
	}
}

// TestFilletLimits goes over the limits of the rack's tip: the full radius, a
// sharp corner, a rounding centered on the pitch line, and both at once.
func TestFilletLimits(t *testing.T) {
	t.Parallel()
	for _, z := range []int{12, 24, 300, 2000} {
		for _, m := range []float64{0.05, 0.3, 3, 100} {
			base := gear("iso53-a", m, z, 0)
			base.MinTipThickness = 0.05 * m
			full := base.Rack.FullRadius(m, 0)
			bothSides(t, fmt.Sprintf("z = %d m = %v, full radius", z, m), func(step float64) profile.Spec {
				s := base
				s.Rack.RootRadius = full * (1 + step) // as a default it is lowered where it must be
				return s
			})
			bothSides(t, fmt.Sprintf("z = %d m = %v, sharp corner", z, m), func(step float64) profile.Spec {
				s := base
				s.Rack.RootRadius = math.Abs(step) * m
				return s
			})
			bothSides(t, fmt.Sprintf("z = %d m = %v, center on the pitch line", z, m), func(step float64) profile.Spec {
				s := base
				s.TipDiameter, s.MinTipThickness = m*(float64(z)+2.2), 0
				s.ProfileShift = 1.25 - 0.38 + step
				return s
			})
			bothSides(t, fmt.Sprintf("z = %d m = %v, sharp corner on the pitch line", z, m), func(step float64) profile.Spec {
				s := base
				s.Rack.RootRadius = 0
				s.TipDiameter, s.MinTipThickness = m*(float64(z)+2.2), 0
				s.ProfileShift = 1.25 + step
				return s
			})
		}
	}
}

// TestNoFilletLeft checks the sharp corner on the pitch line itself: it stands
// still where it enters, so the flank runs into the root and there is no fillet,
// at whatever module and shift the sum comes out a rounding beside zero.
func TestNoFilletLeft(t *testing.T) {
	for m := 0.05; m < 100; m *= 1.37 {
		for x := 0.3; x < 1.6; x += 0.1 {
			s := gear("iso53-a", m, 40, x)
			s.Rack.Dedendum, s.Rack.RootRadius, s.MinTipThickness = x*m, 0, 0.05*m
			tooth := solve(t, s)
			if last := tooth.Side[len(tooth.Side)-1]; last.Part != profile.PartFlank || last.SmoothEnd {
				t.Errorf("m = %v, x = %v: side ends with %+v", m, x, last)
			}
			if err := sound(tooth); err != nil {
				t.Error(err)
			}
		}
	}
}

// TestExtremes holds the corners of the allowed ranges against the rolling rack:
// right or refused, and refused for the right reason.
func TestExtremes(t *testing.T) {
	t.Parallel()
	made := 0
	for _, z := range []int{3, 4, 5, 2000} {
		for _, m := range []float64{0.05, 100} {
			for _, angle := range []float64{10, 20, 35} {
				for _, x := range []float64{-2, -1, 0, 1, 2} {
					for _, name := range []string{"iso53-a", "iso53-d", "stub-20"} {
						for _, thinning := range []float64{0, 0.3} {
							for _, least := range []float64{0, 0.1} {
								s := angled(name, m, z, x, angle)
								s.Thinning = thinning * m
								if least > 0 {
									// A tip that is lowered has no verdict of its own: give it as
									// a diameter.
									s.MinTipThickness = least * m
									tooth, err := profile.Solve(s)
									if err != nil {
										continue
									}
									s.MinTipThickness, s.TipDiameter = 0, tooth.Dimensions.TipDiameter
								}
								const points = 16
								if err := compare(s, points); err != nil {
									t.Error(err)
								}
								if _, err := profile.Solve(s); err == nil {
									made++
								}
							}
						}
					}
				}
			}
		}
	}
	const least = 100
	if made < least {
		t.Errorf("only %d could be made", made)
	}
}
