package gauge

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// checkRanges lists every value that is not finite or out of range.
func (s Spec) checkRanges() profile.Violations {
	var found profile.Violations
	add := func(param profile.Param, q profile.Quantity, low, high float64) {
		switch {
		case math.IsNaN(q.Value) || math.IsInf(q.Value, 0):
			found = append(found, notFinite(param, q))
		case q.Value < low:
			bound := profile.Quantity{Value: low, Dimension: q.Dimension}
			found = append(found, profile.Finding{Rule: profile.RuleOutOfRange, Param: param, Value: q, Bound: bound,
				Text: fmt.Sprintf("%s {value} is too small", param), Hint: "it must be at least {bound}"})
		case q.Value > high:
			bound := profile.Quantity{Value: high, Dimension: q.Dimension}
			found = append(found, profile.Finding{Rule: profile.RuleOutOfRange, Param: param, Value: q, Bound: bound,
				Text: fmt.Sprintf("%s {value} is too large", param), Hint: "it must be at most {bound}"})
		}
	}
	m := s.Module
	if !(m >= profile.MinModule && m <= profile.MaxModule) {
		m = 1 // the other ranges scale with it
	}
	largest := float64(profile.MaxTeeth * profile.MaxModule) // mm, twice the largest radius in reach
	add(profile.ParamModule, profile.LengthOf(s.Module), profile.MinModule, profile.MaxModule)
	if s.Kind != Rack {
		add(profile.ParamTeeth, profile.NumberOf(float64(s.Teeth)), profile.MinTeeth, profile.MaxTeeth)
	}
	add(profile.ParamPressureAngle, profile.AngleOf(s.PressureAngle), profile.MinPressureAngle, profile.MaxPressureAngle)
	add(profile.ParamProfileShift, profile.NumberOf(s.ProfileShift), -profile.MaxProfileShift, profile.MaxProfileShift)
	thinnest := 2 * profile.MaxAddendum * m
	add(profile.ParamThinning, profile.LengthOf(s.Thinning), -thinnest, thinnest)
	for _, circle := range []struct {
		param profile.Param
		value float64
	}{{profile.ParamTipDiameter, s.Tip}, {ParamTipForm, s.TipForm}, {ParamForm, s.Form}, {ParamRoot, s.Root}, {ParamHeight, s.Back}} {
		add(circle.param, profile.LengthOf(circle.value), -largest, largest)
	}
	return found
}

// checkFlank finds circles in the wrong order and flanks that cross.
func (g Gear) checkFlank() profile.Violations {
	var found profile.Violations
	s := g.spec
	sign := 1.0
	if s.Kind == Ring {
		sign = -1
	}
	if inner := math.Min(s.Form, s.Tip); s.Kind != Rack && inner < g.rb {
		return profile.Violations{{Rule: RuleInsideBase, Param: ParamForm, Value: profile.LengthOf(2 * inner), Bound: profile.LengthOf(2 * g.rb).AtLeast(),
			Text: "a flank from diameter {value} would begin inside the base circle {bound}",
			Hint: "an involute flank lies outside {bound}"}}
	}
	if sign*(s.TipForm-s.Form) <= 0 || sign*(s.Tip-s.TipForm) < 0 || (s.Root != 0 && sign*(s.Form-s.Root) < 0) {
		return profile.Violations{{Rule: RuleCircleOrder, Param: ParamTipForm, Value: g.size(s.TipForm), Bound: g.size(s.Form),
			Also: []profile.Quantity{g.size(s.Tip), g.size(s.Root)},
			Text: "tip {0}, end of the flank at the tip {value} and at the root {bound}, and root {1} are not in this order",
			Hint: "give the circles in the order of the tooth"}}
	}
	low, high := g.flank()
	if g.halfTooth(g.along(s.TipForm)) < 0 {
		found = append(found, profile.Finding{Rule: profile.RulePointedTip, Param: profile.ParamTipDiameter, Value: g.size(s.TipForm),
			Text: "the flanks of a tooth cross below {value}", Hint: "lower the tip or the shift"})
	}
	if math.Min(g.halfSpace(low), g.halfSpace(high)) <= 0 {
		found = append(found, profile.Finding{Rule: RuleNoSpace, Param: profile.ParamProfileShift, Value: profile.NumberOf(s.ProfileShift),
			Text: "with a shift of {value} no space is left between the flanks of neighbouring teeth",
			Hint: "lower --profile-shift, or end the flank further from the root"})
	}
	return found
}
