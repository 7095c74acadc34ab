package profile

import (
	"fmt"
	"math"
)

// ThinningBy says how the tooth is made thinner.
type ThinningBy uint8

// The ways to thin a tooth.
const (
	// ThinByFlank widens the generating rack's tooth: the root circle stays.
	ThinByFlank ThinningBy = iota
	// ThinByInfeed moves the generating rack in: the root gets deeper by
	// E/(2 tan alpha), as when a hob is fed deeper.
	ThinByInfeed
)

// Form says which kind of teeth a Spec asks for.
type Form uint8

// The forms.
const (
	FormGear Form = iota // external gear
	FormRing             // internal gear
	FormRack             // straight rack
)

// Spec is what a gear is asked to be. Lengths are mm, angles rad; profile shift
// is in modules and counts positive where it thickens the tooth (ISO 21771).
type Spec struct {
	Form         Form
	Module       float64 // mm
	Teeth        int
	Rack         BasicRack
	Rounding     Rounding
	ProfileShift float64

	// CutterTeeth has a ring's root cut by a pinion-type cutter of so many teeth, whose
	// tip is that of the basic rack, and CutterShift its profile shift in modules. 0
	// rounds the root by arcs.
	CutterTeeth int
	CutterShift float64

	Thinning   float64 // mm on the reference circle, >= 0
	ThinningBy ThinningBy

	TipDiameter     float64 // mm; 0 takes it from the rack, shift and shortening
	TipShortening   float64 // mm off the tip radius
	TipRadius       float64 // mm; 0 leaves the tip corner sharp
	TipChamfer      float64 // mm along flank and tip circle; 0 for none
	MinTipThickness float64 // mm; where set, a default tip is lowered to keep it
}

// The limits within which the routines are tested to hold.
const (
	MinModule, MaxModule               = 0.05, 100 // mm
	MinTeeth, MaxTeeth                 = 3, 2000
	MinPressureAngle, MaxPressureAngle = 10 * math.Pi / 180, 35 * math.Pi / 180 // rad
	MaxProfileShift                    = 2.0                                    // modules, either sign
	MaxAddendum                        = 3.0                                    // modules; beyond any rack in use
)

// limit is one parameter's allowed range.
type limit struct {
	param     Param
	value     float64
	low, high float64
	dimension Dimension
	open      bool // low itself is not allowed
}

// checkLimits lists every value of s that is not finite or out of range.
func (s Spec) checkLimits() Violations {
	var found Violations
	m := s.Module
	if !(m >= MinModule && m <= MaxModule) {
		// The other ranges scale with the module: judge them on a valid one.
		m = 1
	}
	depth := MaxAddendum * m
	full := 2 * MaxAddendum * m
	diameter := 2.0 * MaxTeeth * MaxModule
	rounding := s.Rack.RootRadius
	if s.Rounding == RoundingFull {
		rounding = 0 // ignored
	}
	teeth := limit{param: ParamTeeth, value: float64(s.Teeth), low: MinTeeth, high: MaxTeeth}
	if s.Form == FormRack {
		teeth.low = math.Inf(-1) // checkForm speaks of pitches
	}
	for _, l := range []limit{
		teeth,
		{param: ParamModule, value: s.Module, low: MinModule, high: MaxModule, dimension: Length},
		{param: ParamPressureAngle, value: s.Rack.PressureAngle, low: MinPressureAngle, high: MaxPressureAngle, dimension: Angle},
		{param: ParamAddendum, value: s.Rack.Addendum, low: 0, high: depth, dimension: Length, open: true},
		{param: ParamDedendum, value: s.Rack.Dedendum, low: 0, high: depth, dimension: Length, open: true},
		{param: ParamRootRadius, value: rounding, low: 0, high: depth, dimension: Length},
		{param: ParamProfileShift, value: s.ProfileShift, low: -MaxProfileShift, high: MaxProfileShift},
		{param: ParamCutterTeeth, value: float64(s.CutterTeeth), low: 0, high: MaxTeeth},
		{param: ParamCutterShift, value: s.CutterShift, low: -MaxProfileShift, high: MaxProfileShift},
		{param: ParamThinning, value: s.Thinning, low: 0, high: full, dimension: Length},
		{param: ParamTipDiameter, value: s.TipDiameter, low: 0, high: diameter, dimension: Length},
		{param: ParamTipShortening, value: s.TipShortening, low: -depth, high: depth, dimension: Length},
		{param: ParamTipRadius, value: s.TipRadius, low: 0, high: depth, dimension: Length},
		{param: ParamTipChamfer, value: s.TipChamfer, low: 0, high: depth, dimension: Length},
		{param: ParamMinTipThickness, value: s.MinTipThickness, low: 0, high: depth, dimension: Length},
	} {
		if f, bad := l.check(); bad {
			found = append(found, f)
		}
	}
	if s.TipRadius != 0 && s.TipChamfer != 0 {
		found = append(found, Finding{Rule: RuleConflicting, Param: ParamTipChamfer, Value: LengthOf(s.TipChamfer),
			Text: "a tip has either a radius or a chamfer, not both",
			Hint: "give --tip-radius or --tip-chamfer"})
	}
	if s.TipDiameter != 0 && s.TipShortening != 0 {
		found = append(found, Finding{Rule: RuleConflicting, Param: ParamTipShortening, Value: LengthOf(s.TipShortening),
			Text: "the tip diameter is given, so it cannot be shortened as well",
			Hint: "give --tip-diameter or --tip-shortening"})
	}
	return append(found, s.checkForm()...)
}

// checkForm lists what the form does not have.
func (s Spec) checkForm() Violations {
	var found Violations
	if s.Form != FormRing && s.CutterTeeth != 0 {
		found = append(found, Finding{Rule: RuleConflicting, Param: ParamCutterTeeth, Value: NumberOf(float64(s.CutterTeeth)),
			Text: "only a ring is cut by a pinion-type cutter", Hint: "leave --cutter-teeth out"})
	}
	if s.CutterShift != 0 && s.CutterTeeth == 0 {
		found = append(found, Finding{Rule: RuleConflicting, Param: ParamCutterShift, Value: NumberOf(s.CutterShift),
			Text: "there is no cutter to shift", Hint: "give --cutter-teeth as well"})
	}
	if s.CutterTeeth != 0 && s.CutterTeeth < MinTeeth {
		found = append(found, Finding{Rule: RuleOutOfRange, Param: ParamCutterTeeth, Value: NumberOf(float64(s.CutterTeeth)), Bound: NumberOf(MinTeeth),
			Text: "cutter-teeth {value} is too small", Hint: "it must be at least {bound}"})
	}
	if s.Form == FormRack && s.Teeth < 1 {
		found = append(found, Finding{Rule: RuleFewPitches, Param: ParamTeeth, Value: NumberOf(float64(s.Teeth)), Bound: NumberOf(1),
			Text: "a rack of {value} pitches has no teeth", Hint: "give {bound} pitch or more"})
	}
	if s.Form == FormRack && s.TipDiameter != 0 {
		found = append(found, Finding{Rule: RuleConflicting, Param: ParamTipDiameter, Value: LengthOf(s.TipDiameter),
			Text: "a rack has no diameters", Hint: "give --tip-shortening"})
	}
	return found
}

// check is false when the value is finite and within the range.
func (l limit) check() (Finding, bool) {
	value := Quantity{Value: l.value, Dimension: l.dimension}
	switch {
	case math.IsNaN(l.value) || math.IsInf(l.value, 0):
		return Finding{Rule: RuleNotFinite, Param: l.param, Value: value,
			Text: fmt.Sprintf("%s must be a finite number", l.param), Hint: "give a plain decimal number"}, true
	case l.value < l.low || (l.open && l.value == l.low):
		least := "at least"
		if l.open {
			least = "above"
		}
		return Finding{Rule: RuleOutOfRange, Param: l.param, Value: value, Bound: Quantity{Value: l.low, Dimension: l.dimension},
			Text: fmt.Sprintf("%s {value} is too small", l.param),
			Hint: fmt.Sprintf("it must be %s {bound}", least)}, true
	case l.value > l.high:
		return Finding{Rule: RuleOutOfRange, Param: l.param, Value: value, Bound: Quantity{Value: l.high, Dimension: l.dimension},
			Text: fmt.Sprintf("%s {value} is too large", l.param), Hint: "it must be at most {bound}"}, true
	}
	return Finding{}, false
}
