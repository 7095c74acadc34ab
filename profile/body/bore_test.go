package body_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

func TestRoundBore(t *testing.T) {
	b := solve(t, body.Spec{Bore: 10}, plate(35))
	center, radius, ok := b.Loops[0].Circle()
	if !ok || center != (r2.Vec{}) || radius != 5 || b.Loops[0].Kind != body.Bore || len(b.Choices) != 0 || len(b.Warnings) != 0 {
		t.Errorf("%+v", b)
	}
	if b := solve(t, body.Spec{}, plate(35)); len(b.Loops) != 0 || len(b.Features) != 0 || b.HoleArea() != 0 {
		t.Errorf("nothing asked for gives %+v", b)
	}
}

// TestFlatBore measures across the flat, and compares the area with that of the disc
// less the segment.
func TestFlatBore(t *testing.T) {
	for _, across := range []float64{10.5, 15, 18, 19.9999} {
		l := solve(t, body.Spec{Bore: 20, BoreFlat: across}, plate(60)).Loops[0]
		low, high := math.Inf(1), math.Inf(-1)
		for _, p := range points(l, 720) {
			low, high = math.Min(low, p.Y), math.Max(high, p.Y)
		}
		near(t, "across the flat", high-low, across, 20*rounding)
		half := math.Acos((across - 10) / 10)
		want := 100*math.Pi - 100*(half-math.Sin(2*half)/2)
		near(t, "area", l.Area(), want, rounding*want)
		if fault := simple(l); fault != "" || len(l.Pieces) != 2 {
			t.Errorf("%s in %+v", fault, l)
		}
	}
}

// TestHexagonBore measures across flats in three directions, and the area
// sqrt(3)/2 F^2.
func TestHexagonBore(t *testing.T) {
	l := solve(t, body.Spec{BoreHex: 12}, plate(60)).Loops[0]
	for i := range 3 {
		sin, cos := math.Sincos(math.Pi/2 + float64(i)*math.Pi/3)
		low, high := math.Inf(1), math.Inf(-1)
		for _, p := range points(l, 1) {
			v := p.X*cos + p.Y*sin
			low, high = math.Min(low, v), math.Max(high, v)
		}
		near(t, "across flats", high-low, 12, 100*rounding)
	}
	near(t, "area", l.Area(), math.Sqrt(3)/2*144, 1000*rounding)
	if fault := simple(l); fault != "" || len(l.Pieces) != 6 {
		t.Errorf("%s in %+v", fault, l)
	}
}

func TestBoreRefusals(t *testing.T) {
	const digit = 1e-4
	for _, tc := range []struct {
		name   string
		spec   body.Spec
		rule   profile.Rule
		param  profile.Param
		bound  float64
		inside float64 // the way back to what works
		value  func(*body.Spec) *float64
	}{
		{"bore", body.Spec{Bore: 35}, profile.RuleBoreIntoRoots, profile.ParamBore, 35, -digit, func(s *body.Spec) *float64 { return &s.Bore }},
		{"bore with a keyway", body.Spec{Bore: 40, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 1, Depth: 0.001}}, profile.RuleBoreIntoRoots, profile.ParamBore, 35, -0.1, func(s *body.Spec) *float64 { return &s.Bore }},
		{"hexagon", body.Spec{BoreHex: 30.5}, profile.RuleBoreIntoRoots, body.ParamBoreHex, 35 * math.Sqrt(3) / 2, -digit, func(s *body.Spec) *float64 { return &s.BoreHex }},
		{"tiny hexagon", body.Spec{BoreHex: 1e-7}, profile.RuleOutOfRange, body.ParamBoreHex, 1e-5 * math.Sqrt(3), 0, func(s *body.Spec) *float64 { return &s.BoreHex }},
		{"flat above the bore", body.Spec{Bore: 10, BoreFlat: 10}, body.RuleFlatMissesBore, body.ParamBoreFlat, 10, -digit, func(s *body.Spec) *float64 { return &s.BoreFlat }},
		{"flat past the axis", body.Spec{Bore: 10, BoreFlat: 4}, body.RuleFlatMissesBore, body.ParamBoreFlat, 5, digit, func(s *body.Spec) *float64 { return &s.BoreFlat }},
	} {
		found := refusal(t, tc.spec, plate(35))
		if f := found[0]; len(found) != 1 || f.Rule != tc.rule || f.Param != tc.param || math.Abs(f.Bound.Value-tc.bound) > 100*rounding || f.Value.Value != *tc.value(&tc.spec) {
			t.Errorf("%s: %+v", tc.name, found)
		}
		s := tc.spec
		*tc.value(&s) = found[0].Bound.Value + tc.inside
		solve(t, s, plate(35))
	}
}

func TestMalformed(t *testing.T) {
	custom := func(w, d float64) body.Keyway { return body.Keyway{Standard: body.KeyCustom, Width: w, Depth: d} }
	nan, inf := math.NaN(), math.Inf(1)
	for _, tc := range []struct {
		spec  body.Spec
		rule  profile.Rule
		param profile.Param
	}{
		{body.Spec{Bore: nan}, profile.RuleNotFinite, profile.ParamBore},
		{body.Spec{Bore: inf}, profile.RuleNotFinite, profile.ParamBore},
		{body.Spec{Bore: -1}, profile.RuleOutOfRange, profile.ParamBore},
		{body.Spec{Bore: 1e300}, profile.RuleOutOfRange, profile.ParamBore},
		{body.Spec{BoreHex: nan}, profile.RuleNotFinite, body.ParamBoreHex},
		{body.Spec{Bore: 10, BoreFlat: -1}, profile.RuleOutOfRange, body.ParamBoreFlat},
		{body.Spec{MinFeature: inf}, profile.RuleNotFinite, body.ParamMinFeature},
		{body.Spec{Bore: 10, Keyway: custom(0, 1)}, profile.RuleOutOfRange, body.ParamKeyway},
		{body.Spec{Bore: 10, Keyway: custom(1, nan)}, profile.RuleNotFinite, body.ParamKeyway},
		{body.Spec{Bore: 10, Keyway: body.Keyway{Standard: 9}}, profile.RuleConflicting, body.ParamKeyway},
		{body.Spec{Bore: 10, BoreHex: 10}, profile.RuleConflicting, body.ParamBoreHex},
		{body.Spec{BoreHex: 10, Keyway: custom(1, 1)}, profile.RuleConflicting, body.ParamKeyway},
		{body.Spec{BoreHex: 10, BoreFlat: 8}, profile.RuleConflicting, body.ParamBoreFlat},
		{body.Spec{Bore: 10, BoreFlat: 8, Keyway: custom(1, 1)}, profile.RuleConflicting, body.ParamBoreFlat},
		{body.Spec{Keyway: custom(1, 1)}, profile.RuleConflicting, body.ParamKeyway},
		{body.Spec{BoreFlat: 8}, profile.RuleConflicting, body.ParamBoreFlat},
		{body.Spec{HoleCircles: []body.HoleCircle{{N: 0, Diameter: 1, Circle: 20}}}, profile.RuleOutOfRange, body.ParamHoleCircle},
		{body.Spec{HoleCircles: []body.HoleCircle{{N: 4, Diameter: 0, Circle: 20}}}, profile.RuleOutOfRange, body.ParamHoleCircle},
		{body.Spec{HoleCircles: []body.HoleCircle{{N: 4, Diameter: 1, Circle: -20}}}, profile.RuleOutOfRange, body.ParamHoleCircle},
		{body.Spec{HoleCircles: []body.HoleCircle{{N: math.MaxInt, Diameter: 1, Circle: 20}}}, profile.RuleOutOfRange, body.ParamHoleCircle},
		{body.Spec{HoleCircles: []body.HoleCircle{{N: 1500, Diameter: 1e-4, Circle: 20}, {N: 1500, Diameter: 1e-4, Circle: 21}}}, profile.RuleOutOfRange, body.ParamHoleCircle},
		{body.Spec{Windows: body.Windows{N: 1}}, profile.RuleOutOfRange, body.ParamWindows},
		{body.Spec{Windows: body.Windows{N: -3}}, profile.RuleOutOfRange, body.ParamWindows},
		{body.Spec{Windows: body.Windows{N: 3, ArmWidth: nan}}, profile.RuleNotFinite, body.ParamArmWidth},
		{body.Spec{Windows: body.Windows{RimWidth: 3}}, profile.RuleConflicting, body.ParamRimWidth},
		{body.Spec{Windows: body.Windows{CornerRadius: 3}}, profile.RuleConflicting, body.ParamWindowRadius},
	} {
		found := refusal(t, tc.spec, plate(35))
		if f := found[0]; len(found) != 1 || f.Rule != tc.rule || f.Param != tc.param || f.Text == "" || f.Hint == "" || !f.Rule.Malformed() {
			t.Errorf("%+v: %+v", tc.spec, found)
		}
	}
	for _, around := range []body.Around{{}, {RootDiameter: -3, WholeDepth: 2}, {RootDiameter: nan}, {RootDiameter: 20, WholeDepth: inf}, {RootDiameter: 20, WholeDepth: -1}} {
		refusal(t, body.Spec{Bore: 10}, around)
	}
	// All at once.
	if found := refusal(t, body.Spec{Bore: -1, BoreFlat: nan, BoreHex: 3, MinFeature: -2}, plate(35)); len(found) < 5 {
		t.Errorf("%v", found)
	}
}
