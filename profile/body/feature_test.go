package body_test

import (
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

// feature is the feature of a name.
func feature(t *testing.T, b *body.Body, name string) body.Feature {
	t.Helper()
	for _, f := range b.Features {
		if f.Name == name {
			return f
		}
	}
	t.Fatalf("no %s in %+v", name, b.Features)
	return body.Feature{}
}

func TestFeatures(t *testing.T) {
	iso := body.Keyway{Standard: body.KeyISO}
	one := func(n int, d, c float64) []body.HoleCircle { return []body.HoleCircle{{N: n, Diameter: d, Circle: c}} }
	for _, tc := range []struct {
		name             string
		spec             body.Spec
		radius, web, gap float64
		place            string // of the web
	}{
		{"bore", body.Spec{Bore: 20}, 10, 40, 20, "root circle and bore"},
		{"keyway", body.Spec{Bore: 20, Keyway: iso}, 0.25, 50 - math.Hypot(2.75, 12.55) - 0.25, 6, "root circle and bore and keyway"},
		{"sharp keyway", body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 3, Depth: 2}}, 0, 50 - math.Hypot(1.5, 12), 3, "root circle"},
		{"flat", body.Spec{Bore: 20, BoreFlat: 15}, 0, 40, 15, "root circle"},
		{"hexagon", body.Spec{BoreHex: 12}, 0, 50 - 12/math.Sqrt(3), 12, "root circle"},
		{"holes", body.Spec{HoleCircles: one(6, 4, 30)}, 2, 11, 4, "one hole and the next"},
		{"holes near the keyway", body.Spec{Bore: 20, Keyway: iso, HoleCircles: one(4, 4, 34)}, 0.25, 15 - 12.8, 4, "bore and keyway and hole"},
		{"two circles", body.Spec{HoleCircles: append(one(6, 4, 60), one(5, 4, 70)...)}, 2, 1, 4, "hole of circle 1 and hole of circle 2"},
		{"windows", body.Spec{Bore: 20, Windows: body.Windows{N: 4, RimWidth: 8, HubDiameter: 40, ArmWidth: 7, CornerRadius: 3}}, 3, 7, 20, "one window and the next"},
		{"narrow windows", body.Spec{Bore: 20, Windows: body.Windows{N: 4, RimWidth: 8, HubDiameter: 40, ArmWidth: 21, CornerRadius: 2}}, 2, 8, 2 * (math.Sqrt(22*22-12.5*12.5) - 10.5) / math.Sqrt2, "root circle and window"},
		{"hole in an arm", body.Spec{Windows: body.Windows{N: 4, RimWidth: 8, HubDiameter: 40, ArmWidth: 7, CornerRadius: 3}, HoleCircles: one(2, 5, 60)}, 2.5, 1, 5, "hole and window"},
	} {
		b := solve(t, tc.spec, plate(100))
		near(t, tc.name+" radius", feature(t, b, "inner radius").Value, tc.radius, 1e-12)
		near(t, tc.name+" web", feature(t, b, "web").Value, tc.web, 1e-12)
		near(t, tc.name+" gap", feature(t, b, "gap").Value, tc.gap, 1e-12)
		if place := feature(t, b, "web").Place; !strings.Contains(place, tc.place) {
			t.Errorf("%s: web %s, want %s", tc.name, place, tc.place)
		}
	}
}

// TestWebsByPoints compares the web of a full wheel with points of all loops.
func TestWebsByPoints(t *testing.T) {
	s, around := wheel()
	b := solve(t, s, around)
	const n, step = 60, 0.5 // mm, longer than any step
	least := math.Inf(1)
	all := make([][]r2.Vec, len(b.Loops))
	for i, l := range b.Loops {
		all[i] = points(l, n)
		for _, p := range all[i] {
			least = math.Min(least, around.RootDiameter/2-r2.Norm(p))
			for _, o := range all[:i] {
				least = math.Min(least, away(o, p))
			}
		}
	}
	web := feature(t, b, "web")
	if web.Value > least || web.Value < least-step {
		t.Errorf("web %+v, by points %v", web, least)
	}
	near(t, "clearance in the middle of the web", b.Clearance(web.At), web.Value/2, 1e-12)
}

// TestMinFeature is warned of with the place, from the least feature on.
func TestMinFeature(t *testing.T) {
	s := body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}, MinFeature: 0.25}
	if b := solve(t, s, plate(100)); len(b.Warnings) != 0 {
		t.Errorf("%v", b.Warnings)
	}
	s.MinFeature = 7
	b := solve(t, s, plate(100))
	if len(b.Warnings) != 2 {
		t.Fatalf("%v", b.Warnings)
	}
	w, _ := pick(b.Warnings, body.RuleSmallFeature)
	message, hint := w.Describe(profile.Quantity.String)
	if want := "the smallest inner radius, of the bore and keyway near (-2.9268 mm, 12.7268 mm), is 0.25 mm, below the least feature 7 mm"; message != want || hint == "" || w.Param != body.ParamMinFeature {
		t.Errorf("%s", message)
	}
}

// TestThinRim warns below 1.2 whole depths, which AGMA 2001-D04 asks for, from memory.
func TestThinRim(t *testing.T) {
	const beside = 1e-9
	least := 1.2 * 4.5
	for _, tc := range []struct {
		spec  body.Spec
		param profile.Param
		rim   float64
	}{
		{body.Spec{Bore: 100 - 2*least - beside}, "", 0},
		{body.Spec{Bore: 100 - 2*least + beside}, profile.ParamBore, least},
		{body.Spec{Bore: 80, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 4, Depth: 6}}, body.ParamKeyway, 50 - math.Hypot(2, 46)},
		{body.Spec{HoleCircles: []body.HoleCircle{{N: 6, Diameter: 4, Circle: 86}}}, body.ParamHoleCircle, 5},
		{body.Spec{Windows: body.Windows{N: 3, RimWidth: 5}}, body.ParamRimWidth, 5},
		{body.Spec{Windows: body.Windows{N: 3}}, "", 0},
	} {
		b := solve(t, tc.spec, plate(100))
		w, warned := pick(b.Warnings, profile.RuleThinRim)
		if warned != (tc.param != "") || w.Param != tc.param || len(b.Warnings) > 1 {
			t.Errorf("%+v: %v", tc.spec, b.Warnings)
		}
		near(t, "rim", w.Value.Value, tc.rim, 1e-8)
	}
}
