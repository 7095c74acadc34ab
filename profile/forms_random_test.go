package profile_test

import (
	"errors"
	"math"
	"math/rand"
	"testing"

	"flankwright/profile"
)

// TestRandomRingsAndRacks: over the whole range of the routines a ring or rack is either
// sound or refused, with rule, text and hint; its beam likewise.
func TestRandomRingsAndRacks(t *testing.T) {
	count := 40_000
	if testing.Short() {
		count = 4_000
	}
	// The full rounding of a cutter is found to rounding only, which shows at the root of
	// 2000 teeth.
	const slack = 10
	rng := rand.New(rand.NewSource(5))
	between := func(a, b float64) float64 { return a + (b-a)*rng.Float64() }
	some := func(p, v float64) float64 {
		if rng.Float64() < p {
			return v
		}
		return 0
	}
	made := map[bool]int{} // by whether a cutter was asked for
	refusedAll, beams := 0, 0
	for range count {
		m := math.Exp(between(math.Log(profile.MinModule), math.Log(profile.MaxModule)))
		standards := profile.StandardRacks()
		standard := standards[rng.Intn(len(standards))]
		angle := between(profile.MinPressureAngle, profile.MaxPressureAngle)
		s := profile.Spec{Form: profile.Form(1 + rng.Intn(2)), Module: m, Teeth: 3 + int(math.Exp(between(0, math.Log(1997)))),
			Rack:         standard.For(m, profile.RackChange{}),
			ProfileShift: some(0.7, between(-2, 2)), Thinning: some(0.3, between(0, 0.3)*m), ThinningBy: profile.ThinningBy(rng.Intn(2)),
			TipShortening: some(0.4, between(-0.3, 1)*m), MinTipThickness: some(0.2, between(0, 0.5)*m)}
		if rng.Float64() < 0.4 {
			s.Rack.PressureAngle = angle
		}
		switch rng.Intn(4) {
		case 0:
			s.TipRadius = between(0, 0.5) * m
		case 1:
			s.TipChamfer = between(0, 0.5) * m
		}
		switch rng.Intn(4) {
		case 0:
			s.Rounding = profile.RoundingFull
		case 1:
			s.Rounding, s.Rack.RootRadius = profile.RoundingExplicit, some(0.8, between(0, 0.6)*m)
		}
		if s.Form == profile.FormRing && rng.Float64() < 0.4 {
			s.CutterTeeth, s.CutterShift = 3+rng.Intn(max(1, s.Teeth)), some(0.5, between(-0.5, 0.5))
		}
		tooth, err := profile.Solve(s)
		var refused profile.Violations
		if err != nil {
			if !errors.As(err, &refused) {
				t.Fatalf("%+v: %v", s, err)
			}
			for _, f := range refused {
				if f.Rule == "" || f.Text == "" || math.IsNaN(f.Value.Value) || math.IsNaN(f.Bound.Value) {
					t.Fatalf("%+v: %+v", s, f)
				}
			}
			refusedAll++
			continue
		}
		made[s.CutterTeeth != 0]++
		if err := soundOutline(tooth.Outline, slack*m); err != nil {
			t.Errorf("%+v: %v", s, err)
		}
		last := math.Inf(1)
		for _, p := range tooth.Side {
			for _, u := range along(p.Curve, 12) {
				h := tooth.Outline.Height(p.Curve.At(u))
				if h > last+10*joint*m {
					t.Errorf("%+v: part %d rises by %g", s, p.Part, h-last)
				}
				last = h
			}
		}
		if b, err := tooth.Beam(between(0.01, 1) * m); err == nil {
			beams++
			if err := soundOutline(b.Outline, slack*m); err != nil {
				t.Errorf("%+v, width %g: %v", s, b.Width, err)
			}
		} else if !errors.As(err, &refused) {
			t.Fatalf("%+v: %v", s, err)
		}
	}
	t.Logf("%d made, %d by cutters, %d refused, %d beams", made[false], made[true], refusedAll, beams)
	if made[false] < count/10 || made[true] < count/100 || beams < count/20 {
		t.Error("too few could be made for the test to say much")
	}
}
