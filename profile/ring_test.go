package profile_test

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// ring is a spec of a ring of the rack.
func ring(rack string, m float64, z int, x float64) profile.Spec {
	standard, _ := profile.LookupRack(rack, m)
	return profile.Spec{Form: profile.FormRing, Module: m, Teeth: z, Rack: standard.For(m, profile.RackChange{}), ProfileShift: x}
}

// chainOf are the curves of half a repetition in the direction of travel.
func chainOf(o profile.Outline) []profile.Piece {
	chain := append([]profile.Piece{{Part: profile.PartLand, Curve: o.Land, SmoothEnd: o.LandSmooth}}, o.Side...)
	if o.Root != nil {
		chain = append(chain, profile.Piece{Part: profile.PartRoot, Curve: o.Root})
	}
	return chain
}

// soundOutline says what is wrong with an outline by itself: numbers that are not finite,
// joints that gape or bend, an asymmetric land, a root that does not reach the mirror
// image of its start in the next repetition.
func soundOutline(o profile.Outline, module float64) error {
	chain := chainOf(o)
	for i, p := range chain {
		for _, u := range along(p.Curve, 12) {
			at := p.Curve.At(u)
			for _, v := range []float64{at.X, at.Y, p.Curve.Heading(u), p.Curve.Speed(u), p.Curve.Curvature(u), p.Curve.CurvatureRate(u)} {
				if math.IsNaN(v) || math.IsInf(v, 0) {
					return fmt.Errorf("part %d at %v is not finite", p.Part, u)
				}
			}
		}
		if i+1 == len(chain) {
			break
		}
		next := chain[i+1].Curve
		if gap := norm(r2.Sub(profile.Start(next), profile.End(p.Curve))); !(gap <= joint*module) {
			return fmt.Errorf("gap of %.3g modules after part %d", gap/module, p.Part)
		}
		_, to := p.Curve.Domain()
		from, _ := next.Domain()
		bend := math.Remainder(next.Heading(from)-p.Curve.Heading(to), 2*math.Pi)
		if p.SmoothEnd && !(math.Abs(bend) <= tangent) {
			return fmt.Errorf("bend of %.3g rad after part %d", bend, p.Part)
		}
	}
	start, end := profile.Start(o.Land), profile.End(o.Land)
	if !(math.Abs(start.X+end.X) <= joint*module && math.Abs(start.Y-end.Y) <= joint*module) {
		return fmt.Errorf("land from %v to %v is not centered", start, end)
	}
	last := profile.End(o.Side[len(o.Side)-1].Curve)
	mirror := o.Step(1, 0)(r2.Vec{X: -last.X, Y: last.Y})
	target := last
	if o.Root != nil {
		target = profile.End(o.Root)
	}
	if gap := norm(r2.Sub(mirror, target)); !(gap <= 2*joint*module) {
		return fmt.Errorf("the root ends %.3g modules from the next repetition", gap/module)
	}
	return nil
}

// rings are specs of all kinds that can be made.
func rings() map[string]profile.Spec {
	list := map[string]profile.Spec{
		"plain":     ring("iso53-a", 2, 48, 0),
		"shifted":   ring("iso53-a", 2, 60, 0.4),
		"negative":  ring("full-depth-25", 3, 40, -0.3),
		"many":      ring("iso53-b", 0.5, 400, 0.1),
		"sharp":     ring("iso53-a", 2, 48, 0),
		"full":      ring("iso53-a", 2, 48, 0),
		"rounded":   ring("iso53-a", 2, 48, 0),
		"chamfered": ring("iso53-a", 2, 48, 0),
		"thinned":   ring("iso53-a", 2, 48, 0.2),
		"infed":     ring("iso53-a", 2, 48, 0.2),
		"cut":       ring("iso53-a", 2, 60, 0),
		"cut thin":  ring("iso53-a", 2, 60, 0.2),
		"cut shift": ring("full-depth-20", 4, 80, -0.2),
	}
	change := func(name string, f func(*profile.Spec)) {
		s := list[name]
		f(&s)
		list[name] = s
	}
	change("sharp", func(s *profile.Spec) { s.Rack.RootRadius, s.Rounding = 0, profile.RoundingExplicit })
	change("full", func(s *profile.Spec) { s.Rounding = profile.RoundingFull })
	change("rounded", func(s *profile.Spec) { s.TipRadius = 0.3 })
	change("chamfered", func(s *profile.Spec) { s.TipChamfer = 0.3 })
	change("thinned", func(s *profile.Spec) { s.Thinning = 0.1 })
	change("infed", func(s *profile.Spec) { s.Thinning, s.ThinningBy = 0.1, profile.ThinByInfeed })
	change("cut", func(s *profile.Spec) { s.CutterTeeth = 28 })
	change("cut thin", func(s *profile.Spec) { s.CutterTeeth, s.Thinning, s.TipRadius = 30, 0.1, 0.2 })
	change("cut shift", func(s *profile.Spec) { s.CutterTeeth, s.CutterShift = 35, 0.2 })
	return list
}

func TestRingsAreSound(t *testing.T) {
	for name, s := range rings() {
		tooth := solve(t, s)
		if err := soundOutline(tooth.Outline, s.Module); err != nil {
			t.Errorf("%s: %v", name, err)
		}
		for _, p := range chainOf(tooth.Outline) {
			if from, to := p.Curve.Domain(); from == to {
				continue // the land of a full radius
			}
			checkCurve(t, fmt.Sprintf("%s, part %d", name, p.Part), p.Curve)
		}
		d := tooth.Dimensions
		if !(d.BaseDiameter < d.TipDiameter && d.TipDiameter <= d.TipFormDiameter && d.TipFormDiameter < d.FormDiameter && d.FormDiameter <= d.RootDiameter) {
			t.Errorf("%s: diameters of base, tip, tip form, form and root do not rise: %+v", name, d)
		}
	}
}

// TestRingSpaceIsTheOppositeGear: without thinning, the flank of a ring's space is that of
// the external gear with the opposite shift.
func TestRingSpaceIsTheOppositeGear(t *testing.T) {
	for _, x := range []float64{-0.3, 0, 0.4} {
		s := ring("iso53-a", 2, 48, x)
		g := s
		g.Form, g.ProfileShift = profile.FormGear, -x
		space, tooth := flankOf(t, solve(t, s)), flankOf(t, solve(t, g))
		for i := range 20 {
			roll := space.To + (space.From-space.To)*float64(i)/19
			if off := norm(r2.Sub(space.At(roll), tooth.At(roll))); off > 1e-12*s.Module {
				t.Errorf("x = %g, roll angle %g: %g mm apart", x, roll, off)
			}
		}
	}
}

// TestRingLeastTeeth: a standard ring of 20 degrees needs 34 teeth to keep its tip outside
// its base circle, of 14.5 degrees 63, of 25 degrees 22 (z >= 2/(1 - cos alpha); SDP/SI,
// Elements of Metric Gear Technology, 5.2(a), prints z > 34 for 20 degrees; from memory).
func TestRingLeastTeeth(t *testing.T) {
	for degrees, least := range map[float64]int{20: 34, 14.5: 63, 25: 22} {
		angle := degrees * math.Pi / 180
		at := func(z int) error {
			s := ring("iso53-a", 1, z, 0)
			s.Rack.PressureAngle = angle
			_, err := profile.Solve(s)
			return err
		}
		if err := at(least); err != nil {
			t.Errorf("%d teeth of %g degrees: %v", least, degrees, err)
		}
		var f profile.Finding
		if err := at(least - 1); !errors.As(err, &f) || f.Rule != profile.RuleTipInsideBase || f.Bound.Value != float64(least) {
			t.Errorf("%d teeth of %g degrees: %v", least-1, degrees, err)
		}
	}
}

// TestRingRefusals: rule, and that the bound does.
func TestRingRefusals(t *testing.T) {
	for name, c := range map[string]struct {
		change func(*profile.Spec)
		rule   profile.Rule
		bound  func(*profile.Spec, float64) // puts the bound into the spec; nil for none
	}{
		"rounding": {func(s *profile.Spec) { s.Rack.RootRadius, s.Rounding = 2, profile.RoundingExplicit }, profile.RuleRoundingTooLarge,
			func(s *profile.Spec, v float64) { s.Rack.RootRadius = v }},
		"tip radius":   {func(s *profile.Spec) { s.TipRadius = 3 }, profile.RuleTipRadiusTooLarge, func(s *profile.Spec, v float64) { s.TipRadius = 0.999 * v }},
		"tip chamfer":  {func(s *profile.Spec) { s.TipChamfer = 3 }, profile.RuleTipChamferTooLarge, func(s *profile.Spec, v float64) { s.TipChamfer = 0.999 * v }},
		"given tip":    {func(s *profile.Spec) { s.TipDiameter = 88 }, profile.RuleTipInsideBase, func(s *profile.Spec, v float64) { s.TipDiameter = v + 0.01 }},
		"tip above":    {func(s *profile.Spec) { s.TipDiameter = 110 }, profile.RuleNoFlank, func(s *profile.Spec, v float64) { s.TipDiameter = v - 0.01 }},
		"closed":       {func(s *profile.Spec) { s.ProfileShift, s.TipShortening, s.Rack.Dedendum = 1.2, 3, 5 }, profile.RuleSpaceCloses, nil},
		"pointed":      {func(s *profile.Spec) { s.ProfileShift, s.TipShortening = -1.4, -3 }, profile.RulePointedTip, nil},
		"large cutter": {func(s *profile.Spec) { s.CutterTeeth = 48 }, profile.RuleCutterTooLarge, nil},
		"few teeth":    {func(s *profile.Spec) { s.CutterTeeth = 20 }, profile.RuleRoundingTooLarge, nil},
		"gouging": {func(s *profile.Spec) {
			s.CutterTeeth = 18
			s.Rack.RootRadius, s.Rounding = 0.1, profile.RoundingExplicit
		}, profile.RuleCutterGouges, func(s *profile.Spec, v float64) { s.TipDiameter = v }},
		"no cutter": {func(s *profile.Spec) { s.CutterShift = 0.5 }, profile.RuleConflicting, nil},
	} {
		s := ring("iso53-a", 2, 48, 0)
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
}
