package profile_test

import (
	"errors"
	"math"
	"strconv"
	"strings"
	"testing"

	"flankwright/profile"
)

// refusal is a spec that cannot be made, and what its bound is good for.
type refusal struct {
	rule  profile.Rule
	param profile.Param
	spec  profile.Spec
	// use applies the bound as a person would who reads the hint.
	use func(*profile.Spec, float64)
}

// with changes a spec.
func with(s profile.Spec, change func(*profile.Spec)) profile.Spec {
	change(&s)
	return s
}

// refusals are one or more specs for each rule of the geometry.
func refusals() []refusal {
	shift := func(s *profile.Spec, x float64) { s.ProfileShift = x }
	tip := func(s *profile.Spec, d float64) { s.TipDiameter, s.TipShortening = d, 0 }
	return []refusal{
		{profile.RuleRackPointed, profile.ParamDedendum, angled("iso53-d", 1, 40, 0, 30),
			func(s *profile.Spec, h float64) { s.Rack.Dedendum = h }},
		{profile.RuleRoundingTooLarge, profile.ParamRootRadius,
			with(gear("iso53-a", 3, 40, 0), func(s *profile.Spec) { s.Rounding, s.Rack.RootRadius = profile.RoundingExplicit, 2 }),
			func(s *profile.Spec, r float64) { s.Rack.RootRadius = r }},
		// A shift that brings the root circle out of the axis leaves three undercut
		// teeth, so the tip is lowered and the teeth widened with it.
		{profile.RuleRootCircle, profile.ParamTeeth, gear("iso53-a", 1, 3, -0.6), nil},
		{profile.RuleBaseAboveTip, profile.ParamTipDiameter,
			with(gear("iso53-a", 1, 40, 1), func(s *profile.Spec) { s.TipDiameter = 37 }), tip},
		{profile.RuleBaseAboveTip, profile.ParamTipDiameter,
			with(gear("iso53-a", 1, 40, 1), func(s *profile.Spec) { s.TipDiameter = 40 * math.Cos(20*degree) }), tip},
		{profile.RuleNoFlank, profile.ParamProfileShift, with(gear("iso53-a", 1, 9, -0.3), func(s *profile.Spec) { s.TipDiameter = 8.6 }), shift},
		{profile.RuleToothSevered, profile.ParamProfileShift, gear("iso53-d", 1, 10, -1.2), shift},
		{profile.RulePointedTip, profile.ParamTipDiameter, gear("iso53-a", 1, 12, 1), tip},
		{profile.RulePointedTip, profile.ParamProfileShift,
			with(angled("iso53-a", 1, 10, -2, 30), func(s *profile.Spec) { s.Rack.Addendum = 2 }), nil},
		{profile.RuleTipThickness, profile.ParamMinTipThickness,
			with(gear("iso53-a", 1, 12, 0.5), func(s *profile.Spec) { s.TipDiameter, s.MinTipThickness = 15, 0.9 }),
			func(s *profile.Spec, v float64) { s.MinTipThickness = v }},
		{profile.RuleTipBelowRoot, profile.ParamTipDiameter,
			with(gear("iso53-a", 1, 40, 0.5), func(s *profile.Spec) { s.TipDiameter = 38.5 }), tip},
		{profile.RuleTipBelowRoot, profile.ParamTipDiameter, // below the root circle even
			with(gear("iso53-a", 1, 40, 1.5), func(s *profile.Spec) { s.TipDiameter = 40.2 }), tip},
		{profile.RuleTipRadiusTooLarge, profile.ParamTipRadius,
			with(gear("iso53-a", 1, 20, 0.2), func(s *profile.Spec) { s.TipRadius = 0.7 }),
			func(s *profile.Spec, v float64) { s.TipRadius = v }},
		{profile.RuleTipRadiusTooLarge, profile.ParamTipRadius, // the flank is what ends
			with(gear("iso53-a", 1, 20, 0.2), func(s *profile.Spec) { s.TipDiameter, s.TipRadius = 19.3, 1.4 }),
			func(s *profile.Spec, v float64) { s.TipRadius = v }},
		{profile.RuleTipChamferTooLarge, profile.ParamTipChamfer,
			with(gear("iso53-a", 1, 20, 0.2), func(s *profile.Spec) { s.TipChamfer = 0.7 }),
			func(s *profile.Spec, v float64) { s.TipChamfer = v }},
		{profile.RuleTipChamferTooLarge, profile.ParamTipChamfer,
			with(gear("iso53-a", 1, 20, 0.2), func(s *profile.Spec) { s.TipDiameter, s.TipChamfer = 19.3, 1.4 }),
			func(s *profile.Spec, v float64) { s.TipChamfer = v }},
		{profile.RuleThinningEatsTooth, profile.ParamThinning,
			with(gear("iso53-a", 1, 20, 0.2), func(s *profile.Spec) { s.Thinning = 0.8 }),
			func(s *profile.Spec, v float64) { s.Thinning = v }},
		{profile.RuleThinningEatsTooth, profile.ParamThinning,
			with(gear("iso53-a", 1, 20, 0.2), func(s *profile.Spec) { s.Thinning, s.ThinningBy = 0.8, profile.ThinByInfeed }),
			func(s *profile.Spec, v float64) { s.Thinning = v }},
	}
}

// beside is how far, as a share, from a bound the refused side is tried: above the
// rounding of the bound, below the digits it is printed with.
const beside = 1e-9

// TestRefusals checks that each refusal names its rule, parameter and value, and
// that its bound, printed with four decimals as a person reads it, can be made,
// while a hair beyond the bound itself cannot.
func TestRefusals(t *testing.T) {
	for _, r := range refusals() {
		f := refused(t, r.spec, r.rule)
		if f.Param != r.param {
			t.Errorf("%s: parameter %s, want %s", r.rule, f.Param, r.param)
		}
		message, hint := f.Describe(profile.Quantity.String)
		if message == "" || hint == "" || strings.ContainsAny(message+hint, "{}") {
			t.Errorf("%s: %q, hint %q", r.rule, message, hint)
		}
		if !strings.Contains(message+hint, f.Value.String()) {
			t.Errorf("%s: the value %v is not in %q", r.rule, f.Value, message)
		}
		if r.use == nil {
			continue
		}
		if !strings.Contains(message+hint, f.Bound.String()) || f.Bound.Toward == profile.ToNearest {
			t.Errorf("%s: the bound %v is not in %q or not rounded to stay one", r.rule, f.Bound, message+hint)
		}
		printed, err := strconv.ParseFloat(f.Bound.Decimal(1, 4), 64)
		if err != nil {
			t.Fatal(err)
		}
		s := r.spec
		r.use(&s, printed)
		if _, err := profile.Solve(s); err != nil {
			t.Errorf("%s: refused at the printed bound %v: %v", r.rule, printed, err)
		}
		if r.rule == profile.RuleNoFlank || r.rule == profile.RuleToothSevered {
			continue // the bound clears undercut altogether; less would do
		}
		share := 1 + beside
		if f.Bound.Toward == profile.Upward {
			share = 1 - beside
		}
		s = r.spec
		r.use(&s, f.Bound.Value*share)
		if _, err := profile.Solve(s); err == nil {
			t.Errorf("%s: accepted beyond its bound", r.rule)
		} else if _, same := finding(err, r.rule); !same && r.rule != profile.RuleBaseAboveTip {
			t.Errorf("%s: beyond its bound %v", r.rule, err) // a tip over the base circle may still be below the flank's end
		}
		s = r.spec
		r.use(&s, f.Bound.Value*(2-share))
		if _, err := profile.Solve(s); err != nil {
			t.Errorf("%s: refused within its bound: %v", r.rule, err)
		}
	}
}

// TestRootCircleBound checks the shift that brings the root circle out of the axis.
func TestRootCircleBound(t *testing.T) {
	s := gear("iso53-a", 1, 3, -0.6)
	f := refused(t, s, profile.RuleRootCircle)
	for step, want := range map[float64]bool{-1e-9: true, 1e-9: false} {
		s.ProfileShift = f.Bound.Value + step
		_, err := profile.Solve(s)
		if _, got := finding(err, profile.RuleRootCircle); got != want {
			t.Errorf("shift %+v beside the bound: %v", step, err)
		}
	}
}

// TestUndercutWarningBound checks that the shift in the warning clears undercut.
func TestUndercutWarningBound(t *testing.T) {
	for _, z := range []int{8, 12, 16} {
		tooth := solve(t, gear("iso53-a", 2, z, 0))
		w, ok := pick(tooth.Warnings, profile.RuleUndercut)
		if !ok {
			t.Fatalf("%d teeth: no warning", z)
		}
		for share, want := range map[float64]bool{1 - beside: true, 1 + beside: false} {
			s := gear("iso53-a", 2, z, w.Bound.Value*share)
			if got := solve(t, s).Undercut; got != want {
				t.Errorf("%d teeth: undercut %v at %v of the bound", z, got, share)
			}
		}
		message, _ := w.Describe(profile.Quantity.String)
		if strings.ContainsAny(message, "{}") {
			t.Errorf("warning %q", message)
		}
	}
}

// TestSeveralRefusals checks that what can be judged independently is reported
// together.
func TestSeveralRefusals(t *testing.T) {
	s := gear("iso53-a", 1, 12, 1.2)
	s.Rounding, s.Rack.RootRadius = profile.RoundingExplicit, 0.6
	_, err := profile.Solve(s)
	for _, rule := range []profile.Rule{profile.RuleRoundingTooLarge, profile.RulePointedTip} {
		if _, ok := finding(err, rule); !ok {
			t.Errorf("no %s in %v", rule, err)
		}
	}
	s = gear("iso53-a", 1, 3, -1.2)
	s.Rack.Dedendum = 2.5
	_, err = profile.Solve(s)
	for _, rule := range []profile.Rule{profile.RuleRackPointed, profile.RuleRootCircle, profile.RuleBaseAboveTip} {
		if _, ok := finding(err, rule); !ok {
			t.Errorf("no %s in %v", rule, err)
		}
	}
	if n := strings.Count(err.Error(), "; "); n != 2 {
		t.Errorf("three violations joined as %q", err)
	}
	var f profile.Finding
	if !errors.As(err, &f) || f.Rule != profile.RuleRackPointed {
		t.Errorf("errors.As finds %+v", f)
	}
}
