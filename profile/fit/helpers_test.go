package fit

import (
	"testing"

	"flankwright/profile"
)

// solved is a gear for tests; it must be one that can be made.
func solved(t testing.TB, module float64, teeth int, change func(*profile.Spec)) *profile.Tooth {
	t.Helper()
	rack, _ := profile.LookupRack("iso53-a", module)
	s := profile.Spec{Module: module, Teeth: teeth, Rack: rack.For(module, profile.RackChange{})}
	if change != nil {
		change(&s)
	}
	tooth, err := profile.Solve(s)
	if err != nil {
		t.Fatal(err)
	}
	return tooth
}

// drawn is a tooth drawn in the kind of curve.
func drawn(t testing.TB, tooth *profile.Tooth, kind Kind, tolerance float64) *Tooth {
	t.Helper()
	f, err := NewTooth(tooth.Outline, Options{Curves: kind, Tolerance: tolerance})
	if err != nil {
		t.Fatal(err)
	}
	return f
}

// variety is a set of gears that has every kind of piece and joint: undercut or not,
// rounded, chamfered and sharp tips, full-radius and sharp roots, thinning both ways.
func variety(t testing.TB) map[string]*profile.Tooth {
	return map[string]*profile.Tooth{
		"plain":      solved(t, 2, 24, nil),
		"undercut":   solved(t, 2, 9, nil),
		"shifted":    solved(t, 2, 12, func(s *profile.Spec) { s.ProfileShift = 0.4 }),
		"at limit":   solved(t, 2, 12, func(s *profile.Spec) { s.ProfileShift = 0.3 }),
		"rounded":    solved(t, 2, 30, func(s *profile.Spec) { s.TipRadius = 0.3 }),
		"chamfered":  solved(t, 2, 30, func(s *profile.Spec) { s.TipChamfer = 0.3 }),
		"full root":  solved(t, 2, 40, func(s *profile.Spec) { s.Rounding = profile.RoundingFull }),
		"sharp rack": solved(t, 2, 40, func(s *profile.Spec) { s.Rack.RootRadius, s.Rounding = 0, profile.RoundingExplicit }),
		"thin":       solved(t, 2, 33, func(s *profile.Spec) { s.Thinning = 0.2 }),
		"infeed":     solved(t, 2, 33, func(s *profile.Spec) { s.Thinning, s.ThinningBy = 0.2, profile.ThinByInfeed }),
		"many":       solved(t, 0.5, 400, func(s *profile.Spec) { s.ProfileShift = -0.4 }),
	}
}
