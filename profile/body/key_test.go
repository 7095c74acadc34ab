package body_test

import (
	"math"
	"testing"

	"flankwright/profile"
	"flankwright/profile/body"
)

// TestKeywayArea compares the loop's area with circle and keyway taken apart: the disc,
// less the segment beyond the chord between the keyway's edges, plus the rectangle on
// it, less what the rounded corners keep.
func TestKeywayArea(t *testing.T) {
	for _, tc := range []struct {
		key          body.Keyway
		bore         float64
		depth, r, w  float64 // depth from the crown
		sharpCorners bool
	}{
		{body.Keyway{Standard: body.KeyISO}, 20, 2.8, 0.25, 6, false},
		{body.Keyway{Standard: body.KeyISO}, 100, 6.4, 0.6, 28, false},
		{body.Keyway{Standard: body.KeyCustom, Width: 5, Depth: 2}, 12, 2, 0, 5, true},
		{body.Keyway{Standard: body.KeyCustom, Width: 11.99, Depth: 0.01}, 12, 0.01, 0, 11.99, true},
		{body.Keyway{Standard: body.KeyCustom, Width: 0.01, Depth: 20}, 12, 20, 0, 0.01, true},
	} {
		b := solve(t, body.Spec{Bore: tc.bore, Keyway: tc.key}, plate(300))
		l := b.Loops[0]
		radius := tc.bore / 2
		half := math.Asin(tc.w / tc.bore)
		segment := radius * radius * (half - math.Sin(2*half)/2)
		bottom := radius + tc.depth
		want := math.Pi*radius*radius - segment + tc.w*(bottom-radius*math.Cos(half)) - 2*tc.r*tc.r*(1-math.Pi/4)
		near(t, "area", l.Area(), want, 100*rounding*want)
		near(t, "area of all", b.HoleArea(), want, 100*rounding*want)
		pieces := 6
		if tc.sharpCorners {
			pieces = 4
		}
		if len(l.Pieces) != pieces || l.Kind != body.Bore || simple(l) != "" {
			t.Errorf("%d pieces, %s", len(l.Pieces), simple(l))
		}
	}
}

// TestKeywayChoices says that the size is told where it was looked up.
func TestKeywayChoices(t *testing.T) {
	b := solve(t, body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}}, plate(70))
	if len(b.Choices) != 3 || b.Choices[0].Value != profile.LengthOf(6) || b.Choices[1].Value != profile.LengthOf(2.8) || b.Choices[2].Value != profile.LengthOf(0.25) {
		t.Errorf("%+v", b.Choices)
	}
	b = solve(t, body.Spec{Bore: inch, Keyway: body.Keyway{Standard: body.KeyANSI}}, plate(70))
	if len(b.Choices) != 3 || b.Choices[0].Value.Value != inch/4 {
		t.Errorf("%+v", b.Choices)
	}
	near(t, "T of a bore of 1 in", b.Choices[1].Value.Value/inch, 1.114, 0.0005)
}

// TestKeywayRefusals uses each bound, a printed digit inside it.
func TestKeywayRefusals(t *testing.T) {
	const digit = 1e-4
	custom := func(w, d float64) body.Keyway { return body.Keyway{Standard: body.KeyCustom, Width: w, Depth: d} }
	for _, tc := range []struct {
		name  string
		spec  body.Spec
		root  float64
		rule  profile.Rule
		value func(*body.Spec) *float64
	}{
		{"custom too deep", body.Spec{Bore: 20, Keyway: custom(6, 9)}, 34, body.RuleKeywayIntoRoots, func(s *body.Spec) *float64 { return &s.Keyway.Depth }},
		{"custom too wide", body.Spec{Bore: 20, Keyway: custom(21, 1)}, 50, body.RuleKeywayTooWide, func(s *body.Spec) *float64 { return &s.Keyway.Width }},
		{"custom wide near the roots", body.Spec{Bore: 33, Keyway: custom(12, 1)}, 34, body.RuleKeywayIntoRoots, func(s *body.Spec) *float64 { return &s.Bore }},
		{"iso", body.Spec{Bore: 30, Keyway: body.Keyway{Standard: body.KeyISO}}, 36, body.RuleKeywayIntoRoots, func(s *body.Spec) *float64 { return &s.Bore }},
		{"iso, a smaller row", body.Spec{Bore: 17.5, Keyway: body.Keyway{Standard: body.KeyISO}}, 22, body.RuleKeywayIntoRoots, func(s *body.Spec) *float64 { return &s.Bore }},
		{"ansi", body.Spec{Bore: 1.2 * inch, Keyway: body.Keyway{Standard: body.KeyANSI}}, 1.3 * inch, body.RuleKeywayIntoRoots, func(s *body.Spec) *float64 { return &s.Bore }},
	} {
		found := refusal(t, tc.spec, plate(tc.root))
		f := found[0]
		if len(found) != 1 || f.Rule != tc.rule || f.Value.Value != *tc.value(&tc.spec) {
			t.Errorf("%s: %+v", tc.name, found)
		}
		s := tc.spec
		*tc.value(&s) = f.Bound.Value - digit
		solve(t, s, plate(tc.root))
		*tc.value(&s) = f.Bound.Value + digit
		if _, err := body.Solve(s, plate(tc.root)); err == nil {
			t.Errorf("%s: made beyond the bound %v", tc.name, f.Bound)
		}
	}
	// Where nothing would help, the hint names no number.
	found := refusal(t, body.Spec{Bore: 30, Keyway: custom(29.9, 16)}, plate(31))
	if f := found[0]; f.Rule != body.RuleKeywayIntoRoots || f.Bound.Value != 0 || f.Hint != "take a smaller keyway, or none" {
		t.Errorf("%+v", f)
	}
}
