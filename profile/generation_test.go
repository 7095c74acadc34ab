package profile_test

import (
	"math"
	"testing"

	"flankwright/profile"
)

// TestRoundingKinds checks the three ways a root radius can be meant, on a rack
// whose default radius does not fit at 30 degrees.
func TestRoundingKinds(t *testing.T) {
	s := angled("iso53-a", 2, 20, 0.2, 30)
	full := s.Rack.FullRadius(2, 0)
	if full >= s.Rack.RootRadius {
		t.Fatal("the default fits")
	}
	tooth := solve(t, s)
	w, ok := pick(tooth.Warnings, profile.RuleRoundingLowered)
	if !ok || w.Value != profile.LengthOf(0.38*2) || w.Bound != profile.LengthOf(full) {
		t.Errorf("warnings %v", tooth.Warnings)
	}
	if tooth.Spec.Rack.RootRadius != full || tooth.Root != nil {
		t.Errorf("rounding %v, root %v, want the full radius %v", tooth.Spec.Rack.RootRadius, tooth.Root, full)
	}

	s.Rounding = profile.RoundingExplicit
	f := refused(t, s, profile.RuleRoundingTooLarge)
	if f.Param != profile.ParamRootRadius || f.Value.Value != 0.38*2 || f.Bound.Value != full || f.Bound.Toward != profile.Downward {
		t.Errorf("refused with %+v", f)
	}
	s.Rack.RootRadius = f.Bound.Value
	if tooth := solve(t, s); len(tooth.Warnings) != 0 {
		t.Errorf("the bound itself warns: %v", tooth.Warnings)
	}
	s.Rack.RootRadius = math.Nextafter(f.Bound.Value, 0)
	solve(t, s)

	s.Rounding, s.Rack.RootRadius = profile.RoundingFull, 99
	if got := solve(t, s); got.Spec.Rack.RootRadius != full || got.Root != nil || len(got.Warnings) != 0 {
		t.Errorf("full: %+v", got.Spec.Rack)
	}
}

// TestLoweredRoundingIsWarnedOnly goes over all racks and angles: whatever is
// lowered is lowered to the full radius and said, whatever fits is left alone.
func TestLoweredRoundingIsWarnedOnly(t *testing.T) {
	for _, r := range profile.StandardRacks() {
		for _, angle := range []float64{14.5, 20, 25, 30} {
			module := 2.0
			if r.Pitch == "20 P and finer" {
				module = 0.5
			}
			s := angled(r.Name, module, 30, 0.2, angle)
			full := s.Rack.FullRadius(module, 0)
			if full < 0 {
				continue // TestRefusals
			}
			tooth := solve(t, s)
			_, lowered := pick(tooth.Warnings, profile.RuleRoundingLowered)
			want := math.Min(s.Rack.RootRadius, full)
			if tooth.Spec.Rack.RootRadius != want || lowered != (full < s.Rack.RootRadius) {
				t.Errorf("%s at %v degrees: %v, want %v, lowered %v", r.Name, angle, tooth.Spec.Rack.RootRadius, want, lowered)
			}
		}
	}
}

// TestFullRadiusLeavesNoSliver checks that a rounding that is the full radius but
// for its rounding as a double leaves no root arc, whichever way it was asked for:
// a flat of 1e-17 mm is no curve to draw.
func TestFullRadiusLeavesNoSliver(t *testing.T) {
	least := 1e-13 // modules; see noise
	slivers := func(s profile.Spec) {
		t.Helper()
		tooth := solve(t, s)
		if tooth.Root == nil {
			return
		}
		if length := arcLength(tooth.Root); length < least*s.Module {
			t.Errorf("%+v: root arc of %v mm", s, length)
		}
	}
	for pitch := 20.0; pitch <= 200; pitch++ {
		slivers(gear("full-depth-20", inch/pitch, 30, 0))
	}
	for _, module := range []float64{0.05, 0.3, 1, 2.54, 7, 100} {
		for angle := 10.0; angle < 31; angle++ {
			s := angled("iso53-a", module, 30, 0.2, angle)
			s.Rounding = profile.RoundingExplicit
			full := s.Rack.FullRadius(module, 0)
			for _, r := range []float64{full, math.Nextafter(full, 0), full * (1 - 1e-15), full * (1 - 1e-13), full * (1 - 1e-9)} {
				s.Rack.RootRadius = r
				slivers(s)
			}
		}
	}
}

// TestThinning checks what the two ways of thinning do: the same thickness, the
// root circle only by infeed deeper, by E/(2 tan alpha), the tip never.
func TestThinning(t *testing.T) {
	const thinning = 0.15
	s := gear("iso53-a", 2, 24, 0.1)
	plain := solve(t, s).Dimensions
	s.Thinning = thinning
	flank := solve(t, s).Dimensions
	s.ThinningBy = profile.ThinByInfeed
	infeed := solve(t, s).Dimensions
	const slack = 1e-13 // mm, rounding at diameters near 50
	for name, d := range map[string]profile.Dimensions{"flank": flank, "infeed": infeed} {
		near(t, name+" thickness", d.ToothThickness, plain.ToothThickness-thinning, slack)
		near(t, name+" tip", d.TipDiameter, plain.TipDiameter, 0)
		near(t, name+" space", d.SpaceWidth, plain.SpaceWidth+thinning, slack)
	}
	near(t, "root by flank", flank.RootDiameter, plain.RootDiameter, 0)
	deeper := thinning / (2 * math.Tan(20*degree))
	near(t, "root by infeed", infeed.RootDiameter, plain.RootDiameter-2*deeper, slack)
	near(t, "clearance by infeed", infeed.Clearance, plain.Clearance+deeper, slack)
	near(t, "working depth by infeed", infeed.WorkingDepth, plain.WorkingDepth, slack)
	if flank.FormDiameter >= plain.FormDiameter+slack || infeed.FormDiameter >= plain.FormDiameter {
		t.Errorf("form diameters: plain %v, flank %v, infeed %v", plain.FormDiameter, flank.FormDiameter, infeed.FormDiameter)
	}
	// Thinning by infeed is, below the tip, the gear of the smaller shift.
	s = gear("iso53-a", 2, 24, 0.1-deeper/2)
	s.TipDiameter = plain.TipDiameter
	shifted := solve(t, s).Dimensions
	near(t, "same root", shifted.RootDiameter, infeed.RootDiameter, slack)
	near(t, "same form", shifted.FormDiameter, infeed.FormDiameter, slack)
	near(t, "same thickness", shifted.ToothThickness, infeed.ToothThickness, slack)
}

// TestUndercutByInfeed checks that infeed counts as shift for undercut, and that
// the warning names the shift that clears it.
func TestUndercutByInfeed(t *testing.T) {
	s := gear("iso53-a", 1, 18, 0)
	if solve(t, s).Undercut {
		t.Fatal("18 teeth are undercut")
	}
	s.Thinning, s.ThinningBy = 0.1, profile.ThinByInfeed
	tooth := solve(t, s)
	w, ok := pick(tooth.Warnings, profile.RuleUndercut)
	if !tooth.Undercut || !ok {
		t.Fatalf("not undercut: %v", tooth.Warnings)
	}
	const step = 1e-9 // modules
	s.ProfileShift = w.Bound.Value + step
	if solve(t, s).Undercut {
		t.Errorf("shift %v leaves undercut", s.ProfileShift)
	}
	s.ProfileShift = w.Bound.Value - step
	if !solve(t, s).Undercut {
		t.Errorf("shift %v leaves no undercut", s.ProfileShift)
	}
}

// arcLength is the length in mm of an arc.
func arcLength(c profile.Curve) float64 {
	arc := c.(profile.CircleArc)
	return arc.Radius * (arc.To - arc.From)
}
