package profile_test

import (
	"errors"
	"math"
	"testing"

	"flankwright/profile"
)

// field is one number of a spec, with its allowed range for module 2.
type field struct {
	param     profile.Param
	at        func(*profile.Spec) *float64
	low, high float64
	open      bool // low itself is not allowed
}

func fields() []field {
	const m = 2
	return []field{
		{profile.ParamModule, func(s *profile.Spec) *float64 { return &s.Module }, profile.MinModule, profile.MaxModule, false},
		{profile.ParamPressureAngle, func(s *profile.Spec) *float64 { return &s.Rack.PressureAngle }, 10 * degree, 35 * degree, false},
		{profile.ParamAddendum, func(s *profile.Spec) *float64 { return &s.Rack.Addendum }, 0, 3 * m, true},
		{profile.ParamDedendum, func(s *profile.Spec) *float64 { return &s.Rack.Dedendum }, 0, 3 * m, true},
		{profile.ParamRootRadius, func(s *profile.Spec) *float64 { return &s.Rack.RootRadius }, 0, 3 * m, false},
		{profile.ParamProfileShift, func(s *profile.Spec) *float64 { return &s.ProfileShift }, -2, 2, false},
		{profile.ParamThinning, func(s *profile.Spec) *float64 { return &s.Thinning }, 0, 6 * m, false},
		{profile.ParamTipDiameter, func(s *profile.Spec) *float64 { return &s.TipDiameter }, 0, 2 * 2000 * 100, false},
		{profile.ParamTipShortening, func(s *profile.Spec) *float64 { return &s.TipShortening }, -3 * m, 3 * m, false},
		{profile.ParamTipRadius, func(s *profile.Spec) *float64 { return &s.TipRadius }, 0, 3 * m, false},
		{profile.ParamTipChamfer, func(s *profile.Spec) *float64 { return &s.TipChamfer }, 0, 3 * m, false},
		{profile.ParamMinTipThickness, func(s *profile.Spec) *float64 { return &s.MinTipThickness }, 0, 3 * m, false},
	}
}

// about says whether an error has a finding of that rule on that parameter.
func about(err error, rule profile.Rule, param profile.Param) (profile.Finding, bool) {
	var all profile.Violations
	if errors.As(err, &all) {
		for _, f := range all {
			if f.Rule == rule && f.Param == param {
				return f, true
			}
		}
	}
	return profile.Finding{}, false
}

// TestLimits checks each field at, within and beyond both ends of its range.
func TestLimits(t *testing.T) {
	for _, f := range fields() {
		for _, tc := range []struct {
			value, bound float64
			bad          bool
		}{
			{f.low, f.low, f.open},
			{math.Nextafter(f.low, math.Inf(1)), f.low, false},
			{math.Nextafter(f.low, math.Inf(-1)), f.low, true},
			{f.high, f.high, false},
			{math.Nextafter(f.high, math.Inf(1)), f.high, true},
			{-1e300, f.low, true},
			{1e300, f.high, true},
		} {
			s := gear("iso53-a", 2, 20, 0)
			*f.at(&s) = tc.value
			_, err := profile.Solve(s)
			got, bad := about(err, profile.RuleOutOfRange, f.param)
			if bad != tc.bad {
				t.Errorf("%s = %v: out of range %v: %v", f.param, tc.value, bad, err)
			}
			if bad && (got.Value.Value != tc.value || got.Bound.Value != tc.bound || got.Text == "" || got.Hint == "" || !got.Rule.Malformed()) {
				t.Errorf("%s = %v: %+v", f.param, tc.value, got)
			}
		}
	}
	for teeth, bad := range map[int]bool{2: true, 3: false, 2000: false, 2001: true, 0: true, -5: true, math.MaxInt: true, math.MinInt: true} {
		s := gear("iso53-a", 2, 20, 0)
		s.Teeth = teeth
		_, err := profile.Solve(s)
		if _, got := about(err, profile.RuleOutOfRange, profile.ParamTeeth); got != bad {
			t.Errorf("%d teeth: %v", teeth, err)
		}
	}
}

// TestNotFinite puts NaN and the infinities into each field.
func TestNotFinite(t *testing.T) {
	for _, f := range fields() {
		for _, v := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
			s := gear("iso53-a", 2, 20, 0)
			*f.at(&s) = v
			_, err := profile.Solve(s)
			if got, ok := about(err, profile.RuleNotFinite, f.param); !ok || !got.Rule.Malformed() {
				t.Errorf("%s = %v: %v", f.param, v, err)
			}
		}
	}
}

// TestAllViolations puts every field out of range at once.
func TestAllViolations(t *testing.T) {
	var s profile.Spec
	for _, f := range fields() {
		*f.at(&s) = -1e9
	}
	_, err := profile.Solve(s)
	for _, f := range fields() {
		if _, ok := about(err, profile.RuleOutOfRange, f.param); !ok {
			t.Errorf("%s is not reported", f.param)
		}
	}
	if _, ok := about(err, profile.RuleOutOfRange, profile.ParamTeeth); !ok {
		t.Error("teeth are not reported")
	}
	var one profile.Finding
	if !errors.As(err, &one) {
		t.Error("errors.As finds no Finding")
	}
	if _, err := profile.Solve(profile.Spec{}); err == nil {
		t.Error("the zero Spec is accepted")
	}
}

// TestConflicts checks pairs that exclude each other.
func TestConflicts(t *testing.T) {
	s := gear("iso53-a", 2, 20, 0)
	s.TipRadius, s.TipChamfer = 0.1, 0.1
	_, err := profile.Solve(s)
	if f, ok := about(err, profile.RuleConflicting, profile.ParamTipChamfer); !ok || !f.Rule.Malformed() {
		t.Errorf("radius and chamfer: %v", err)
	}
	s = gear("iso53-a", 2, 20, 0)
	s.TipDiameter, s.TipShortening = 43, 0.1
	_, err = profile.Solve(s)
	if _, ok := about(err, profile.RuleConflicting, profile.ParamTipShortening); !ok {
		t.Errorf("tip diameter and shortening: %v", err)
	}
	// RoundingFull ignores the root radius, whatever it is.
	s = gear("iso53-a", 2, 20, 0)
	s.Rounding, s.Rack.RootRadius = profile.RoundingFull, math.NaN()
	solve(t, s)
}

// TestGeometryIsNotMalformed checks that no rule of the geometry counts as a
// malformed request.
func TestGeometryIsNotMalformed(t *testing.T) {
	for _, r := range refusals() {
		if r.rule.Malformed() {
			t.Errorf("%s", r.rule)
		}
	}
}
