package profile_test

import (
	"errors"
	"math"
	"testing"

	"flankwright/profile"
)

// FuzzSolve asks for anything at all: it is refused with findings that say
// something, or made soundly and as the rack leaves it, and nothing panics.
func FuzzSolve(f *testing.F) {
	add := func(s profile.Spec) {
		f.Add(s.Module, s.Teeth, s.Rack.PressureAngle, s.Rack.Addendum, s.Rack.Dedendum, s.Rack.RootRadius, uint8(s.Rounding),
			s.ProfileShift, s.Thinning, s.ThinningBy == profile.ThinByInfeed, s.TipDiameter, s.TipShortening, s.TipRadius, s.TipChamfer, s.MinTipThickness)
	}
	add(gear("iso53-a", 2, 24, 0))
	add(gear("iso53-c", 2, 9, 0))
	add(gear("stub-20", 100, 2000, -2))
	add(gear("full-depth-14.5", 0.05, 3, 2))
	add(gear("full-depth-20", inch/64, 40, 0.1))
	add(with(gear("iso53-a", 1, 17, 0.9), func(s *profile.Spec) { s.MinTipThickness, s.TipRadius = 0.2, 0.05 }))
	add(with(gear("iso53-a", 1, 40, 0.1), func(s *profile.Spec) { s.TipChamfer, s.Rounding = 0.2, profile.RoundingFull }))
	for _, r := range refusals() {
		add(r.spec)
	}
	add(with(gear("iso53-a", 1, 40, 0.1), func(s *profile.Spec) { s.Thinning = math.NaN() }))
	add(profile.Spec{})
	// Found by fuzzing: a chamfer that left a land of 1e-15 modules.
	add(profile.Spec{Module: 100, Teeth: 2000, Rack: profile.BasicRack{PressureAngle: 20 * degree, Addendum: 640.0 / 3, Dedendum: 100, RootRadius: 105},
		ProfileShift: -0.2, Thinning: 318, ThinningBy: profile.ThinByInfeed, TipShortening: 132, TipChamfer: 22, MinTipThickness: 44})
	f.Fuzz(func(t *testing.T, module float64, teeth int, angle, addendum, dedendum, radius float64, rounding uint8,
		shift, thinning float64, infeed bool, tip, shortening, tipRadius, chamfer, thickness float64) {
		s := profile.Spec{Module: module, Teeth: teeth,
			Rack:     profile.BasicRack{PressureAngle: angle, Addendum: addendum, Dedendum: dedendum, RootRadius: radius},
			Rounding: profile.Rounding(rounding % 3), ProfileShift: shift, Thinning: thinning,
			TipDiameter: tip, TipShortening: shortening, TipRadius: tipRadius, TipChamfer: chamfer, MinTipThickness: thickness}
		if infeed {
			s.ThinningBy = profile.ThinByInfeed
		}
		tooth, err := profile.Solve(s)
		if err != nil {
			var all profile.Violations
			if tooth != nil || !errors.As(err, &all) || len(all) == 0 {
				t.Fatalf("%+v: %v with %v", s, err, tooth)
			}
			for _, f := range all {
				message, hint := f.Describe(profile.Quantity.String)
				if f.Rule == "" || f.Param == "" || message == "" || hint == "" || math.IsNaN(f.Bound.Value) {
					t.Fatalf("%+v: %+v", s, f)
				}
			}
			return
		}
		if err := sound(tooth); err != nil {
			t.Fatalf("%+v: %v", s, err)
		}
		const points = 4
		if err := swept(tooth, points); err != nil {
			t.Fatalf("%+v: %v", s, err)
		}
	})
}
