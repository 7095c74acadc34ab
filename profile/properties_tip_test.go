package profile_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"flankwright/profile"
)

// TestProperty7TipShape puts roundings and chamfers on teeth that can be made
// without: what is too large is refused with the largest, which can be made; what
// is made lies inside the tooth without.
func TestProperty7TipShape(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		s := anySpec().Draw(t, "spec")
		plain, err := profile.Solve(s)
		if err != nil {
			return
		}
		size := plain.Dimensions.TipThickness * rapid.Float64Range(0, 1.5).Draw(t, "size")
		rule, at := profile.RuleTipRadiusTooLarge, &s.TipRadius
		if rapid.Bool().Draw(t, "chamfer") {
			rule, at = profile.RuleTipChamferTooLarge, &s.TipChamfer
		}
		*at = math.Min(size, 3*s.Module)
		tooth, err := profile.Solve(s)
		if err != nil {
			f, ok := finding(err, rule)
			if !ok || !(f.Bound.Value <= *at) {
				t.Fatal(err)
			}
			// Where doubles are too coarse for the share, there is nothing to make.
			*at = f.Bound.Value * (1 - 1e-6)
			if tooth, err = profile.Solve(s); err != nil {
				if f.Bound.Value < 1e-6*s.Module {
					return
				}
				t.Fatalf("the bound of %v: %v", f, err)
			}
		}
		if err := sound(tooth); err != nil {
			t.Fatal(err)
		}
		if err := swept(tooth, 6); err != nil {
			t.Fatal(err)
		}
		// Inside the flank: at every radius nearer to the tooth's middle.
		flank := flankOf(t, plain)
		flank.From, flank.To = flank.From*2, 0
		for _, u := range along(tooth.Side[0].Curve, 8) {
			p := tooth.Side[0].Curve.At(u)
			if limit, ok := thicknessAt(flank, norm(p)); ok && math.Atan2(-p.X, p.Y) > limit+tangent {
				t.Fatalf("%v lies outside the flank", p)
			}
			if norm(p) > plain.Dimensions.TipDiameter/2*(1+rounding) {
				t.Fatalf("%v lies outside the tip circle", p)
			}
		}
	})
}
