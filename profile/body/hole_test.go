package body_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

// TestHoleCircle looks where the holes are.
func TestHoleCircle(t *testing.T) {
	b := solve(t, body.Spec{Bore: 10, HoleCircles: []body.HoleCircle{{N: 4, Diameter: 5, Circle: 30}, {N: 1, Diameter: 2, Circle: 44}}}, plate(60))
	want := []r2.Vec{{}, {Y: 15}, {X: -15}, {Y: -15}, {X: 15}, {Y: 22}}
	if len(b.Loops) != len(want) {
		t.Fatalf("%d loops", len(b.Loops))
	}
	for i, l := range b.Loops {
		center, radius, ok := l.Circle()
		if !ok || r2.Norm(r2.Sub(center, want[i])) > 100*rounding || radius != []float64{5, 2.5, 2.5, 2.5, 2.5, 1}[i] || (l.Kind == body.Bore) != (i == 0) {
			t.Errorf("loop %d: %v %v %v", i, center, radius, l.Kind)
		}
	}
	if b.Loops[1].Name == b.Loops[5].Name || b.Loops[1].Name != b.Loops[4].Name {
		t.Errorf("names %q, %q", b.Loops[1].Name, b.Loops[5].Name)
	}
}

// TestHoleRefusals uses the bound of each, which is on the diameter of the holes or of
// their circle, and sees that twice a digit beyond it is refused again.
func TestHoleRefusals(t *testing.T) {
	const digit = 1e-4
	windows := body.Windows{N: 4, RimWidth: 10, HubDiameter: 50, ArmWidth: 12, CornerRadius: 3}
	one := func(n int, d, c float64) []body.HoleCircle { return []body.HoleCircle{{N: n, Diameter: d, Circle: c}} }
	for _, tc := range []struct {
		name   string
		spec   body.Spec
		rule   profile.Rule
		circle bool // the bound is on the circle
		bound  float64
		least  bool
	}{
		{"into the roots", body.Spec{HoleCircles: one(5, 20, 85)}, body.RuleHoleIntoRoots, false, 15, false},
		{"in the teeth", body.Spec{HoleCircles: one(5, 20, 101)}, body.RuleHoleIntoRoots, true, 80, false},
		{"each other", body.Spec{HoleCircles: one(6, 30, 60)}, body.RuleHolesTouch, false, 30, false},
		{"two of them", body.Spec{HoleCircles: one(2, 31, 30)}, body.RuleHolesTouch, false, 30, false},
		{"bore", body.Spec{Bore: 30, HoleCircles: one(3, 11, 40)}, body.RuleHoleIntoBore, false, 10, false},
		{"in the bore", body.Spec{Bore: 30, HoleCircles: one(3, 11, 20)}, body.RuleHoleIntoBore, true, 41, true},
		{"keyway", body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 6, Depth: 4}, HoleCircles: one(3, 4.5, 32)}, body.RuleHoleIntoBore, false, 4, false},
		{"hexagon's flat", body.Spec{BoreHex: 20, HoleCircles: one(1, 8, 26)}, body.RuleHoleIntoBore, false, 6, false},
		{"arm", body.Spec{Windows: windows, HoleCircles: one(4, 12, 60)}, body.RuleHoleIntoWindow, false, 12, false},
		{"in a window", body.Spec{Windows: windows, HoleCircles: one(8, 8, 66)}, body.RuleHoleIntoWindow, true, 88, true},
		{"hub", body.Spec{Windows: windows, HoleCircles: one(8, 13, 38)}, body.RuleHoleIntoWindow, false, 12, false},
	} {
		found := refusal(t, tc.spec, plate(100))
		f := found[0]
		h := &tc.spec.HoleCircles[0]
		value, back := &h.Diameter, -digit
		if tc.circle {
			value = &h.Circle
		}
		if tc.least {
			back = digit
		}
		if len(found) != 1 || f.Rule != tc.rule || f.Param != body.ParamHoleCircle || f.Value.Value != *value || math.Abs(f.Bound.Value-tc.bound) > 1000*rounding {
			t.Errorf("%s: %+v", tc.name, found)
			continue
		}
		*value = f.Bound.Value + back
		solve(t, tc.spec, plate(100))
		*value = f.Bound.Value - back
		refusal(t, tc.spec, plate(100))
	}
}

// TestHoleCirclesApart uses the bounds between two circles.
func TestHoleCirclesApart(t *testing.T) {
	const digit = 1e-4
	s := body.Spec{HoleCircles: []body.HoleCircle{{N: 3, Diameter: 6, Circle: 40}, {N: 7, Diameter: 6, Circle: 50}}}
	f := refusal(t, s, plate(100))[0]
	if f.Rule != body.RuleHolesTouch || f.Value.Value != 6 || f.Bound.Value != 4 {
		t.Errorf("%+v", f)
	}
	s.HoleCircles[1].Diameter = 4 - digit
	solve(t, s, plate(100))
	s.HoleCircles[1] = body.HoleCircle{N: 7, Diameter: 6, Circle: 44}
	f = refusal(t, s, plate(100))[0]
	if f.Rule != body.RuleHolesTouch || f.Value.Value != 44 || f.Bound.Value != 52 {
		t.Errorf("%+v", f)
	}
	s.HoleCircles[1].Circle = 52 + digit
	solve(t, s, plate(100))
}

// TestManyHoles makes as many loops as are allowed, which must not take long.
func TestManyHoles(t *testing.T) {
	s := body.Spec{Bore: 10, HoleCircles: []body.HoleCircle{{N: 1000, Diameter: 0.1, Circle: 190}},
		Windows: body.Windows{N: 1000, RimWidth: 10, HubDiameter: 100, ArmWidth: 0.2}}
	if b := solve(t, s, plate(200)); len(b.Loops) != 2001 {
		t.Errorf("%d loops", len(b.Loops))
	}
}

// TestSeveralViolations are reported together.
func TestSeveralViolations(t *testing.T) {
	s := body.Spec{Bore: 30, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 40, Depth: 1},
		HoleCircles: []body.HoleCircle{{N: 3, Diameter: 8, Circle: 95}, {N: 20, Diameter: 8, Circle: 40}},
		Windows:     body.Windows{N: 3, ArmWidth: 90}}
	found := refusal(t, s, plate(100))
	for _, rule := range []profile.Rule{body.RuleKeywayTooWide, body.RuleHoleIntoRoots, body.RuleHolesTouch, body.RuleArmsMeet} {
		if _, ok := pick(found, rule); !ok {
			t.Errorf("no %s in %v", rule, found)
		}
	}
}
