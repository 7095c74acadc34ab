package profile_test

import (
	"errors"
	"fmt"
	"math"
	"slices"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/internal/racksweep"
)

// touching is how far from a position of the rack a point of the outline may be,
// in modules: the sweep's own 1e-11 and the rounding of coordinates.
const touching = 5e-11

// doubtful is how near to a limit, in modules, either verdict is accepted: far
// above the rounding of both sides.
const doubtful = 1e-7

// verdict is what must become of a spec, found without the solver: the rules that
// forbid it, none if it can be made. near says that a limit is so close that
// either answer will do.
//
// The rack's triangle, the root circle and the tooth thickness of ISO 21771:2007,
// 5.4 decide what they can; whether undercut leaves a tooth and a flank is for
// the rolling rack to say.
func verdict(s profile.Spec) (rules []profile.Rule, sure bool) {
	m := s.Module
	alpha := s.Rack.PressureAngle
	tool := racksweep.For(s)
	margin := func(v float64) bool { // v > 0 is allowed
		sure = sure && math.Abs(v) > doubtful*m
		return v > 0
	}
	sure = true
	// The rack tooth's half width at its tip, and the rounding that fits there: the
	// center of a circle touching tip and flank must not pass the middle.
	atTip := math.Pi*m/4 + tool.Widening/2 - s.Rack.Dedendum*math.Tan(alpha)
	full := atTip / math.Tan((math.Pi/2-alpha)/2)
	if !margin(atTip) {
		rules = append(rules, profile.RuleRackPointed)
	} else if s.Rounding == profile.RoundingExplicit && !margin(full-s.Rack.RootRadius) {
		rules = append(rules, profile.RuleRoundingTooLarge)
	}
	if s.Rounding == profile.RoundingFull {
		tool.Rounding = full
	}
	tool.Rounding = math.Min(tool.Rounding, full)
	r := m * float64(s.Teeth) / 2
	root := r + tool.Shift - tool.Dedendum
	// A root circle of a millionth of the module is as good as none.
	sure = sure && math.Abs(root) > 2e-6*m
	if !margin(root) {
		rules = append(rules, profile.RuleRootCircle)
	}
	tip := s.TipDiameter / 2
	if tip == 0 {
		tip = r + s.Rack.Addendum + s.ProfileShift*m - s.TipShortening
	}
	base := r * math.Cos(alpha)
	half, atTipPressure := 0.0, 0.0 // half angle of the tooth and pressure angle at the tip
	if !margin(tip - base) {
		rules = append(rules, profile.RuleBaseAboveTip)
	} else {
		thickness := m*(math.Pi/2+2*s.ProfileShift*math.Tan(alpha)) - s.Thinning
		atTipPressure = math.Acos(base / tip)
		half = thickness/(2*r) + math.Tan(alpha) - alpha - (math.Tan(atTipPressure) - atTipPressure)
		if !margin(half * tip) {
			if s.Thinning > 0 && margin(half*r+s.Thinning/2) {
				rules = append(rules, profile.RuleThinningEatsTooth)
			} else {
				rules = append(rules, profile.RulePointedTip)
			}
		}
	}
	if rules != nil {
		return rules, sure
	}
	sweep := racksweep.New(tool)
	// Up the middle of the tooth as far as there is clearance: the rack is nowhere
	// nearer than that, so no step jumps over a cut.
	least := m / 1000
	for at := root; at < tip; {
		clear := sweep.Clearance(r2.Vec{Y: at})
		if at > root && !margin(clear) && clear < -touching*m {
			return []profile.Rule{profile.RuleToothSevered}, sure
		}
		at += math.Max(clear, least)
	}
	// The corner of tip circle and involute touches the rack, or is cut off, or the
	// rack's straight flank does not reach up to it. The last comes on as the square
	// of the height, so it is asked a little above and below as well.
	corner := func(radius float64) profile.Rule {
		atPressure := math.Acos(math.Min(base/radius, 1))
		sin, cos := math.Sincos(half + math.Tan(atTipPressure) - atTipPressure - (math.Tan(atPressure) - atPressure))
		switch clear := sweep.Clearance(r2.Vec{X: -radius * sin, Y: radius * cos}); {
		case clear < -touching*m:
			margin(clear)
			return profile.RuleNoFlank
		case clear > touching*m:
			return profile.RuleTipBelowRoot
		}
		return ""
	}
	const little = 1e-4 // modules
	rule := corner(tip)
	sure = sure && corner(tip-little*m) == rule && corner(tip+little*m) == rule
	if rule != "" {
		rules = append(rules, rule)
	}
	return rules, sure
}

// compare solves a spec and says how the outcome differs from the verdict and the
// outline from what the rack leaves; nil if they agree.
func compare(s profile.Spec, points int) error {
	tooth, err := profile.Solve(s)
	want, sure := verdict(s)
	var all profile.Violations
	if err != nil && !errors.As(err, &all) {
		return fmt.Errorf("%+v: not Violations: %w", s, err)
	}
	var got []profile.Rule
	for _, f := range all {
		got = append(got, f.Rule)
	}
	if sure && !slices.Equal(got, want) {
		return fmt.Errorf("%+v: refused for %v, must be for %v: %w", s, got, want, err)
	}
	if tooth == nil {
		return nil
	}
	if err := sound(tooth); err != nil {
		return fmt.Errorf("%+v: %w", s, err)
	}
	if err := swept(tooth, points); err != nil {
		return fmt.Errorf("%+v: %w", s, err)
	}
	return nil
}

// swept says where the outline is not what the rack leaves: every point of flank,
// fillet and root touches some position of the rack, and no point of the tip
// reaches into one.
func swept(tooth *profile.Tooth, points int) error {
	m := tooth.Spec.Module
	sweep := racksweep.New(racksweep.For(tooth.Spec))
	judge := func(part string, c profile.Curve, touches bool) error {
		for _, u := range along(c, points) {
			p := c.At(u)
			off := sweep.Clearance(p)
			if !(off >= -touching*m) || touches && !(off <= touching*m) {
				return fmt.Errorf("%s at parameter %v, %v: %.3g modules from the rack", part, u, p, off/m)
			}
		}
		return nil
	}
	if err := judge("land", tooth.Land, false); err != nil {
		return err
	}
	for _, p := range tooth.Side {
		tip := p.Part == profile.PartTipRounding || p.Part == profile.PartTipChamfer
		if err := judge(fmt.Sprintf("part %d", p.Part), p.Curve, !tip); err != nil {
			return err
		}
	}
	if tooth.Root != nil {
		return judge("root", tooth.Root, true)
	}
	return nil
}
