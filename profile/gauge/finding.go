package gauge

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// The parameters findings of this package speak of, besides those of package
// profile.
const (
	ParamTipForm           profile.Param = "tip-form-diameter"
	ParamForm              profile.Param = "form-diameter"
	ParamRoot              profile.Param = "root-diameter"
	ParamHeight            profile.Param = "height"
	ParamPinDiameter       profile.Param = "pin-diameter"
	ParamMeasuredSpan      profile.Param = "measured-span"
	ParamMeasuredOverPins  profile.Param = "measured-over-pins"
	ParamMeasuredChord     profile.Param = "measured-chord"
	ParamMeasuredTip       profile.Param = "measured-tip-diameter"
	ParamAllowance         profile.Param = "thickness-allowance"
	ParamFlankClass        profile.Param = "flank-class"
	ParamReferenceDiameter profile.Param = "reference-diameter"
	ParamUncertainty       profile.Param = "uncertainty"
)

// The rules of this package.
const (
	RuleInsideBase      profile.Rule = "inside-base-circle"
	RuleCircleOrder     profile.Rule = "circle-order"
	RuleNoSpace         profile.Rule = "no-tooth-space"
	RuleNoSpan          profile.Rule = "no-span"
	RuleOffFlank        profile.Rule = "contact-off-flank"
	RulePinTooSmall     profile.Rule = "pin-too-small"
	RulePinTooLarge     profile.Rule = "pin-too-large"
	RuleNoPin           profile.Rule = "no-pin"
	RuleUnreachable     profile.Rule = "reading-unreachable"
	RuleUnknownSeries   profile.Rule = "unknown-series"
	RuleTooFewReadings  profile.Rule = "too-few-readings"
	RuleNothingExplains profile.Rule = "nothing-explains"
)

// notFinite is the finding for NaN and infinities.
func notFinite(param profile.Param, q profile.Quantity) profile.Finding {
	return profile.Finding{Rule: profile.RuleNotFinite, Param: param, Value: q,
		Text: fmt.Sprintf("%s must be a finite number", param), Hint: "give a plain decimal number"}
}

// positive says what is wrong with a length that must be finite and positive.
func positive(param profile.Param, mm float64) profile.Violations {
	q := profile.LengthOf(mm)
	switch {
	case math.IsNaN(mm) || math.IsInf(mm, 0):
		return profile.Violations{notFinite(param, q)}
	case mm <= 0:
		return profile.Violations{{Rule: profile.RuleOutOfRange, Param: param, Value: q, Bound: profile.LengthOf(0),
			Text: fmt.Sprintf("%s {value} is too small", param), Hint: "it must be above {bound}"}}
	}
	return nil
}
