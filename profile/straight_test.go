package profile_test

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

// rackSpec is a rack of the standard basic rack.
func rackSpec(rack string, m float64, x float64) profile.Spec {
	standard, _ := profile.LookupRack(rack, m)
	return profile.Spec{Form: profile.FormRack, Module: m, Teeth: 6, Rack: standard.For(m, profile.RackChange{}), ProfileShift: x}
}

// racks are racks of all kinds that can be made.
func racks() map[string]profile.Spec {
	list := map[string]profile.Spec{}
	for name, change := range map[string]func(*profile.Spec){
		"plain":     func(*profile.Spec) {},
		"shifted":   func(s *profile.Spec) { s.ProfileShift = 0.4 },
		"negative":  func(s *profile.Spec) { s.ProfileShift = -0.4 },
		"sharp":     func(s *profile.Spec) { s.Rack.RootRadius, s.Rounding = 0, profile.RoundingExplicit },
		"full":      func(s *profile.Spec) { s.Rounding = profile.RoundingFull },
		"rounded":   func(s *profile.Spec) { s.TipRadius = 0.4 },
		"chamfered": func(s *profile.Spec) { s.TipChamfer = 0.4 },
		"thinned":   func(s *profile.Spec) { s.Thinning = 0.2 },
		"infed":     func(s *profile.Spec) { s.Thinning, s.ThinningBy, s.ProfileShift = 0.2, profile.ThinByInfeed, 0.1 },
		"short":     func(s *profile.Spec) { s.TipShortening = 0.5 },
	} {
		s := rackSpec("iso53-a", 2, 0)
		change(&s)
		list[name] = s
	}
	return list
}

// spaceOf is the signed distance from a rack's space to a point, negative in the space:
// the basic rack's counterpart as what a disk of the rounding's radius covers when its
// center runs over a sharp wedge.
func spaceOf(s profile.Spec, x, y float64) float64 {
	m, sin, cos := s.Module, math.Sin(s.Rack.PressureAngle), math.Cos(s.Rack.PressureAngle)
	shift, widening := s.ProfileShift*m, s.Thinning
	if s.ThinningBy == profile.ThinByInfeed {
		shift, widening = shift-s.Thinning*cos/(2*sin), 0
	}
	rho := s.Rack.RootRadius
	bottom := shift - s.Rack.Dedendum + rho                                     // of the wedge
	width := math.Pi*m/4 + widening/2 - (s.Rack.Dedendum-rho)*sin/cos - rho/cos // its half width there
	x = math.Abs(math.Remainder(x-math.Pi*m/2, math.Pi*m)) - width              // from its corner
	y -= bottom
	switch {
	case x*sin+y*cos < 0 && x > 0:
		return math.Hypot(x, y) - rho
	default:
		return math.Max(x*cos-y*sin, -y) - rho
	}
}

func TestRacks(t *testing.T) {
	for name, s := range racks() {
		tooth := solve(t, s)
		if err := soundOutline(tooth.Outline, s.Module); err != nil {
			t.Errorf("%s: %v", name, err)
		}
		d := tooth.Dimensions
		for _, p := range chainOf(tooth.Outline) {
			checkCurve(t, fmt.Sprintf("%s, part %d", name, p.Part), p.Curve)
			if p.Part != profile.PartFlank && p.Part != profile.PartFillet && p.Part != profile.PartRoot {
				continue
			}
			for _, u := range along(p.Curve, 12) {
				at := p.Curve.At(u)
				near(t, fmt.Sprintf("%s: part %d on the space", name, p.Part), spaceOf(tooth.Spec, at.X, at.Y), 0, 1e-13*s.Module)
			}
		}
		near(t, name+": land", profile.Start(tooth.Land).X*2, d.TipLand, 1e-13)
		near(t, name+": height of the land", profile.Start(tooth.Land).Y, d.Addendum, 1e-13)
		near(t, name+": pitch", d.ToothThickness+d.SpaceWidth, math.Pi*s.Module, 1e-13)
	}
}

// TestRackThickness: SDP/SI, Elements of Metric Gear Technology, table 10-2 (found): a rack
// of module 3 and 20 degrees has the thickness 4.7124 at the height 3.0000 below its tip.
func TestRackThickness(t *testing.T) {
	d := solve(t, rackSpec("iso53-a", 3, 0)).Dimensions
	const digit = 0.00005
	near(t, "thickness", d.ToothThickness, 4.7124, digit)
	near(t, "addendum", d.Addendum, 3, digit)
}

func TestRackRefusals(t *testing.T) {
	for name, c := range map[string]struct {
		change func(*profile.Spec)
		rule   profile.Rule
		bound  func(*profile.Spec, float64)
	}{
		"rounding":   {func(s *profile.Spec) { s.Rack.RootRadius, s.Rounding = 2, profile.RoundingExplicit }, profile.RuleRoundingTooLarge, func(s *profile.Spec, v float64) { s.Rack.RootRadius = v }},
		"pointed":    {func(s *profile.Spec) { s.Rack.Addendum = 5 }, profile.RulePointedTip, func(s *profile.Spec, v float64) { s.TipShortening = v }},
		"no flank":   {func(s *profile.Spec) { s.TipShortening = 5 }, profile.RuleTipBelowRoot, func(s *profile.Spec, v float64) { s.TipShortening = 0.999 * v }},
		"tip radius": {func(s *profile.Spec) { s.TipRadius = 4 }, profile.RuleTipRadiusTooLarge, func(s *profile.Spec, v float64) { s.TipRadius = 0.999 * v }},
		"chamfer":    {func(s *profile.Spec) { s.TipChamfer = 4 }, profile.RuleTipChamferTooLarge, func(s *profile.Spec, v float64) { s.TipChamfer = 0.999 * v }},
		"diameter":   {func(s *profile.Spec) { s.TipDiameter = 4 }, profile.RuleConflicting, nil},
		"no pitch":   {func(s *profile.Spec) { s.Teeth = 0 }, profile.RuleFewPitches, nil},
		"cutter":     {func(s *profile.Spec) { s.CutterTeeth = 20 }, profile.RuleConflicting, nil},
	} {
		s := rackSpec("iso53-a", 2, 0)
		c.change(&s)
		_, err := profile.Solve(s)
		var f profile.Finding
		if !errors.As(err, &f) || f.Rule != c.rule || f.Hint == "" {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if c.bound == nil {
			continue
		}
		c.bound(&s, f.Bound.Value)
		if _, err := profile.Solve(s); errors.As(err, &f) && f.Rule == c.rule {
			t.Errorf("%s: the bound is refused as well: %v", name, err)
		}
	}
	s := rackSpec("iso53-a", 2, 0)
	s.Rack.Addendum, s.MinTipThickness = 5, 0.4
	if d := solve(t, s).Dimensions; math.Abs(d.TipThickness-0.4) > 1e-12 {
		t.Errorf("lowered to a tip thickness of %v", d.TipThickness)
	}
}
