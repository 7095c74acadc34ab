package profile

import (
	"strings"
)

// Param names a parameter of a Spec or Body; it is the name of the flag that
// sets it.
type Param string

// The parameters findings speak of.
const (
	ParamModule          Param = "module"
	ParamTeeth           Param = "teeth"
	ParamPressureAngle   Param = "pressure-angle"
	ParamAddendum        Param = "addendum"
	ParamDedendum        Param = "dedendum"
	ParamRootRadius      Param = "root-radius"
	ParamProfileShift    Param = "profile-shift"
	ParamThinning        Param = "thinning"
	ParamTipDiameter     Param = "tip-diameter"
	ParamTipShortening   Param = "tip-shortening"
	ParamTipRadius       Param = "tip-radius"
	ParamTipChamfer      Param = "tip-chamfer"
	ParamMinTipThickness Param = "min-tip-thickness"
	ParamBore            Param = "bore"
	ParamTolerance       Param = "tolerance"
	ParamCutterTeeth     Param = "cutter-teeth"
	ParamCutterShift     Param = "cutter-shift"
	ParamHeight          Param = "height"
	ParamRimDiameter     Param = "rim-diameter"
	ParamKerf            Param = "kerf"
)

// Rule identifies what a finding is about.
type Rule string

// Rules that a malformed request breaks, before any geometry.
const (
	RuleNotFinite   Rule = "not-finite"
	RuleOutOfRange  Rule = "out-of-range"
	RuleConflicting Rule = "conflicting"
)

// Rules that geometry breaks.
const (
	RuleRoundingTooLarge   Rule = "rounding-too-large"
	RuleRackPointed        Rule = "rack-pointed"
	RuleRootCircle         Rule = "root-circle"
	RuleBaseAboveTip       Rule = "base-above-tip"
	RuleNoFlank            Rule = "no-flank"
	RuleToothSevered       Rule = "tooth-severed"
	RulePointedTip         Rule = "pointed-tip"
	RuleTipThickness       Rule = "tip-thickness"
	RuleTipBelowRoot       Rule = "tip-below-root"
	RuleTipRadiusTooLarge  Rule = "tip-radius-too-large"
	RuleTipChamferTooLarge Rule = "tip-chamfer-too-large"
	RuleThinningEatsTooth  Rule = "thinning-eats-tooth"
	RuleBoreIntoRoots      Rule = "bore-into-roots"
	RuleTooManySegments    Rule = "too-many-segments"
	RuleKerfTooWide        Rule = "kerf-too-wide"
	RuleTipInsideBase      Rule = "tip-inside-base"
	RuleFewPitches         Rule = "few-pitches"
	RuleSpaceCloses        Rule = "space-closes"
	RuleCutterTooLarge     Rule = "cutter-too-large"
	RuleCutterPointed      Rule = "cutter-pointed"
	RuleCutterGouges       Rule = "cutter-gouges"
	RuleNoCutterPosition   Rule = "no-cutter-position"
)

// Rules of warnings.
const (
	RuleUndercut        Rule = "undercut"
	RuleRoundingLowered Rule = "rounding-lowered"
	RuleTipLowered      Rule = "tip-lowered"
	RuleThinRim         Rule = "thin-rim"
	RuleKerfLeaves      Rule = "kerf-leaves-material"
	RuleCutterTrims     Rule = "cutter-trims"
)

// Malformed says that the request itself is wrong, rather than the gear it
// asks for.
func (r Rule) Malformed() bool {
	return r == RuleNotFinite || r == RuleOutOfRange || r == RuleConflicting
}

// Finding is one thing wrong, or worth a warning, with a request: the rule, the
// parameter, its value, the bound it meets, and a sentence on what would work.
type Finding struct {
	Rule  Rule
	Param Param
	Value Quantity
	Bound Quantity
	Also  []Quantity // further values the sentences name, as {0}, {1}, ...
	Text  string     // with {value}, {bound}, {0} as placeholders
	Hint  string     // likewise
}

// Describe fills the sentences of the finding with its values, each printed by
// show, which decides the unit.
func (f Finding) Describe(show func(Quantity) string) (message, hint string) {
	pairs := []string{"{value}", show(f.Value), "{bound}", show(f.Bound)}
	for i, q := range f.Also {
		pairs = append(pairs, "{"+string(rune('0'+i))+"}", show(q))
	}
	fill := strings.NewReplacer(pairs...)
	return fill.Replace(f.Text), fill.Replace(f.Hint)
}

// Error is the message with lengths in mm.
func (f Finding) Error() string {
	message, _ := f.Describe(Quantity.String)
	return string(f.Param) + ": " + message
}

// Violations are all the rules a request breaks, reported together.
type Violations []Finding

// Error joins the messages with semicolons.
func (v Violations) Error() string {
	parts := make([]string, len(v))
	for i, f := range v {
		parts[i] = f.Error()
	}
	return strings.Join(parts, "; ")
}

// Unwrap lets errors.As find each Finding.
func (v Violations) Unwrap() []error {
	out := make([]error, len(v))
	for i, f := range v {
		out[i] = f
	}
	return out
}
