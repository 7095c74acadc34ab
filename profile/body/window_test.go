package body_test

import (
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

// TestWindowShape measures the windows on their points: rim, hub, arms, and that the
// corners touch both neighbours.
func TestWindowShape(t *testing.T) {
	for _, w := range []body.Windows{
		{N: 2, RimWidth: 8, HubDiameter: 40, ArmWidth: 10, CornerRadius: 5},
		{N: 3, RimWidth: 8, HubDiameter: 40, ArmWidth: 10, CornerRadius: 12},
		{N: 5, RimWidth: 8, HubDiameter: 40, ArmWidth: 10, CornerRadius: 0.01},
		{N: 9, RimWidth: 1, HubDiameter: 70, ArmWidth: 10, CornerRadius: 4},
	} {
		b := solve(t, body.Spec{Windows: w}, plate(120))
		if len(b.Loops) != w.N {
			t.Fatalf("%d loops", len(b.Loops))
		}
		inner, outer := math.Inf(1), 0.0
		nearArm := math.Inf(1)
		for k, l := range b.Loops {
			if fault := simple(l); fault != "" || l.Kind != body.Hole || len(l.Pieces) != 8 {
				t.Errorf("%+v: %s", w, fault)
			}
			for _, p := range points(l, 60) {
				inner, outer = math.Min(inner, r2.Norm(p)), math.Max(outer, r2.Norm(p))
				for j := range w.N {
					// Distance from the middle line of arm j, where the point is on its side.
					sin, cos := math.Sincos(math.Pi/2 + 2*math.Pi*float64(j)/float64(w.N))
					if p.X*cos+p.Y*sin > 0 {
						nearArm = math.Min(nearArm, math.Abs(p.Y*cos-p.X*sin))
					}
				}
			}
			middle := math.Pi/2 + 2*math.Pi*(float64(k)+0.5)/float64(w.N)
			sin, cos := math.Sincos(middle)
			between := r2.Scale(60-w.RimWidth-0.5*(60-w.RimWidth-w.HubDiameter/2), r2.Vec{X: cos, Y: sin})
			if !l.Contains(between) || l.Contains(r2.Scale(-1, between)) && w.N%2 == 1 {
				t.Errorf("%+v: window %d is not where it should be", w, k)
			}
		}
		near(t, "hub", 2*inner, w.HubDiameter, 1000*rounding)
		near(t, "rim", 60-outer, w.RimWidth, 1000*rounding)
		near(t, "arm", 2*nearArm, w.ArmWidth, 1000*rounding)
	}
}

// TestWindowArea compares with the ring sector between two arms, whose area with sharp
// corners is n times the integral over the radius of what the arms leave of a circle:
//
//	2 R (pi/n - asin(a/(2 R)))
func TestWindowArea(t *testing.T) {
	w := body.Windows{N: 5, RimWidth: 8, HubDiameter: 40, ArmWidth: 10, CornerRadius: 1e-3}
	const steps = 20000
	want := 0.0
	for i := range steps {
		r := 20 + (52-20)*(float64(i)+0.5)/steps
		want += 2 * r * (math.Pi/5 - math.Asin(5/r)) * (52 - 20) / steps
	}
	// Each corner keeps less than its radius squared; the sum is off by the square of a step.
	near(t, "area", solve(t, body.Spec{Windows: w}, plate(120)).Loops[0].Area(), want, 4e-6+1e-5)
}

// TestWindowChoices says what was chosen, and that choosing it by hand gives the same.
func TestWindowChoices(t *testing.T) {
	s := body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}, Windows: body.Windows{N: 5}}
	b := solve(t, s, plate(110))
	if len(b.Warnings) != 0 {
		t.Errorf("own choices are warned of: %v", b.Warnings)
	}
	near(t, "rim", choice(t, b, body.ParamRimWidth), 1.2*4.5, rounding)
	// 1.8 bores are 36, but over the keyway's rounded corners a quarter bore is to stay.
	hub := 2 * (math.Hypot(3-0.25, 12.8-0.25) + 0.25 + 5)
	near(t, "hub", choice(t, b, body.ParamHubDiameter), hub, rounding*hub)
	near(t, "arms", choice(t, b, body.ParamArmWidth), math.Pi*hub/15, rounding*hub)
	near(t, "hub over a plain bore", choice(t, solve(t, body.Spec{Bore: 20, Windows: body.Windows{N: 4}}, plate(110)), body.ParamHubDiameter), 36, rounding*36)
	given := s
	given.Windows = body.Windows{N: 5, RimWidth: choice(t, b, body.ParamRimWidth), HubDiameter: choice(t, b, body.ParamHubDiameter),
		ArmWidth: choice(t, b, body.ParamArmWidth), CornerRadius: choice(t, b, body.ParamWindowRadius)}
	again := solve(t, given, plate(110))
	for i, l := range b.Loops {
		for j, p := range l.Pieces {
			if again.Loops[i].Pieces[j] != p {
				t.Fatalf("loop %d differs", i)
			}
		}
	}
	// A deep keyway wants a larger hub; without a bore there is a rule too.
	s.Keyway = body.Keyway{Standard: body.KeyCustom, Width: 6, Depth: 8}
	near(t, "hub over a deep keyway", choice(t, solve(t, s, plate(150)), body.ParamHubDiameter), 2*(math.Hypot(3, 18)+5), 100*rounding)
	near(t, "hub without bore", choice(t, solve(t, body.Spec{Windows: body.Windows{N: 4}}, plate(110)), body.ParamHubDiameter), (110-2*1.2*4.5)/3, 100*rounding)
	near(t, "hub over a hexagon", choice(t, solve(t, body.Spec{BoreHex: 20, Windows: body.Windows{N: 4}}, plate(110)), body.ParamHubDiameter), 1.8*40/math.Sqrt(3), 100*rounding)
	for n := 2; n < 40; n++ {
		if fault := simple(solve(t, body.Spec{Bore: 20, Windows: body.Windows{N: n}}, plate(110)).Loops[1]); fault != "" {
			t.Errorf("%d windows: %s", n, fault)
		}
	}
}

// TestWindowRefusals uses the bound of each.
func TestWindowRefusals(t *testing.T) {
	const digit = 1e-4
	rim := func(s *body.Spec) *float64 { return &s.Windows.RimWidth }
	hub := func(s *body.Spec) *float64 { return &s.Windows.HubDiameter }
	arm := func(s *body.Spec) *float64 { return &s.Windows.ArmWidth }
	corner := func(s *body.Spec) *float64 { return &s.Windows.CornerRadius }
	for _, tc := range []struct {
		name  string
		spec  body.Spec
		rule  profile.Rule
		param profile.Param
		bound float64
		least bool
		value func(*body.Spec) *float64
	}{
		{"rim to the hub", body.Spec{Windows: body.Windows{N: 4, RimWidth: 30, HubDiameter: 40}}, body.RuleNoRoomForWindows, body.ParamRimWidth, 30, false, rim},
		{"hub to the rim", body.Spec{Windows: body.Windows{N: 4, HubDiameter: 95}}, body.RuleNoRoomForWindows, body.ParamHubDiameter, 100 - 2*5.4, false, hub},
		{"rim past the axis", body.Spec{Windows: body.Windows{N: 4, RimWidth: 51}}, body.RuleNoRoomForWindows, body.ParamRimWidth, 50, false, rim},
		{"arms meet", body.Spec{Windows: body.Windows{N: 6, HubDiameter: 40, ArmWidth: 20}}, body.RuleArmsMeet, body.ParamArmWidth, 20, false, arm},
		{"two arms meet", body.Spec{Windows: body.Windows{N: 2, HubDiameter: 40, ArmWidth: 50}}, body.RuleArmsMeet, body.ParamArmWidth, 40, false, arm},
		{"corner, depth", body.Spec{Windows: body.Windows{N: 2, RimWidth: 10, HubDiameter: 40, ArmWidth: 10, CornerRadius: 11}}, body.RuleWindowRadiusLarge, body.ParamWindowRadius, 10, false, corner},
		{"corner, small hub", body.Spec{Windows: body.Windows{N: 6, RimWidth: 10, HubDiameter: 16, ArmWidth: 1, CornerRadius: 15}}, body.RuleWindowRadiusLarge, body.ParamWindowRadius, 7, false, corner},
		{"corner, hub", body.Spec{Windows: body.Windows{N: 6, RimWidth: 10, HubDiameter: 20, ArmWidth: 8, CornerRadius: 3}}, body.RuleWindowRadiusLarge, body.ParamWindowRadius, 2, false, corner},
		{"hub into bore", body.Spec{Bore: 30, Windows: body.Windows{N: 4, HubDiameter: 25, ArmWidth: 4}}, body.RuleHubIntoBore, body.ParamHubDiameter, 30, true, hub},
		{"hub into keyway", body.Spec{Bore: 30, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 10, Depth: 5}, Windows: body.Windows{N: 4, HubDiameter: 35, ArmWidth: 4}},
			body.RuleHubIntoBore, body.ParamHubDiameter, 2 * math.Hypot(5, 20), true, hub},
	} {
		found := refusal(t, tc.spec, plate(100))
		f := found[0]
		back, tolerance := -digit, 100*rounding
		if strings.HasSuffix(tc.name, "hub") && tc.param == body.ParamWindowRadius {
			tolerance = 1e-4 // what is left of the hub's edge
		}
		if tc.least {
			back = digit
		}
		if len(found) != 1 || f.Rule != tc.rule || f.Param != tc.param || f.Value.Value != *tc.value(&tc.spec) || math.Abs(f.Bound.Value-tc.bound) > tolerance {
			t.Errorf("%s: %+v", tc.name, found)
			continue
		}
		s := tc.spec
		*tc.value(&s) = f.Bound.Value + back
		if tc.name == "rim past the axis" {
			s.Windows.RimWidth = f.Bound.Value - 1
		}
		solve(t, s, plate(100))
	}
	found := refusal(t, body.Spec{Bore: 60, Windows: body.Windows{N: 4}}, plate(100))
	if f := found[0]; f.Rule != body.RuleNoRoomForWindows || f.Param != body.ParamWindows {
		t.Errorf("%+v", f)
	}
	// A keyway wider than the hub's rest may run into an arm.
	solve(t, body.Spec{Bore: 30, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 4, Depth: 5}, Windows: body.Windows{N: 4, HubDiameter: 35, ArmWidth: 8}}, plate(100))
}

// TestFineWindows are too fine to draw, but only just make sense.
func TestFineWindows(t *testing.T) {
	w := body.Windows{N: 3, RimWidth: 5, HubDiameter: 90 - 8.2e-5, ArmWidth: 0.9999 * 90 * math.Sin(math.Pi/3)}
	if f := refusal(t, body.Spec{Windows: w}, plate(100))[0]; f.Rule != body.RuleNoRoomForWindows || f.Hint == "" {
		t.Errorf("%+v", f)
	}
	w.CornerRadius = 1e-6
	if f := refusal(t, body.Spec{Windows: w}, plate(100))[0]; f.Rule != profile.RuleOutOfRange || f.Param != body.ParamWindowRadius || f.Bound.Value <= 1e-6 {
		t.Errorf("%+v", f)
	}
}
