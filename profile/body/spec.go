package body

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// Spec is what is asked for inside the teeth. Lengths are mm; zero means that nothing is
// asked for, or that it is ours to choose.
type Spec struct {
	Bore        float64 // diameter of a round bore
	Keyway      Keyway  // in a round bore
	BoreFlat    float64 // of a round bore: depth from the flat across to the other side
	BoreHex     float64 // hexagon instead of a round bore, across flats
	HoleCircles []HoleCircle
	Windows     Windows
	MinFeature  float64 // warns of features finer than this
}

// KeyStandard says where the size of a keyway comes from.
type KeyStandard uint8

// The sources of key sizes.
const (
	KeyNone   KeyStandard = iota
	KeyISO                // ISO 773 = DIN 6885-1, by the bore
	KeyANSI               // ANSI B17.1, by the bore
	KeyCustom             // Keyway.Width and Keyway.Depth
)

// Keyway is the keyway of a hub. Width and depth are given only with KeyCustom; the
// depth is measured from the bore's crown, as ISO measures t2.
type Keyway struct {
	Standard     KeyStandard
	Width, Depth float64 // mm
}

// HoleCircle is a circle of equal round holes, the first on +Y.
type HoleCircle struct {
	N        int
	Diameter float64 // mm, of a hole
	Circle   float64 // mm, diameter of the circle through their centers
}

// Windows are equal lightening windows between parallel-sided arms, one arm on +Y.
type Windows struct {
	N            int
	RimWidth     float64 // mm, between windows and root circle
	HubDiameter  float64 // mm
	ArmWidth     float64 // mm
	CornerRadius float64 // mm
}

// The parameters only a body has.
const (
	ParamKeyway       profile.Param = "keyway"
	ParamBoreFlat     profile.Param = "bore-flat"
	ParamBoreHex      profile.Param = "bore-hex"
	ParamHoleCircle   profile.Param = "hole-circle"
	ParamWindows      profile.Param = "windows"
	ParamRimWidth     profile.Param = "rim-width"
	ParamHubDiameter  profile.Param = "hub-diameter"
	ParamArmWidth     profile.Param = "arm-width"
	ParamWindowRadius profile.Param = "window-radius"
	ParamMinFeature   profile.Param = "min-feature"
	paramRootDiameter profile.Param = "root-diameter" // of Around; no flag sets it
	paramWholeDepth   profile.Param = "whole-depth"   // likewise
)

// The limits of counts and lengths.
const (
	// maxLength is the largest gear's diameter in mm, and as much again.
	maxLength = 2 * profile.MaxTeeth * profile.MaxModule
	// maxLoops is the largest number of holes and windows: each is compared with every
	// other one, which stays below a tenth of a second.
	maxLoops = 2000
	// leastPiece is the shortest piece of a loop, and the thinnest wall between two, in
	// mm: above what drawn segments need (2e-6) and the rounding of the largest gear,
	// and below half of the last digit messages print (1e-4), so that a diameter below a
	// printed bound keeps it.
	leastPiece = 1e-5
	// leastCorner is the smallest radius in mm of a window's corner, whose arcs are a
	// fraction of it long.
	leastCorner = 10 * leastPiece
)

// checkLimits lists what is not finite, out of range, or contradicts something else.
func (s Spec) checkLimits(around Around) profile.Violations {
	var found profile.Violations
	limits := []limit{
		{param: paramRootDiameter, value: around.RootDiameter, low: leastPiece, high: maxLength},
		{param: profile.ParamRimDiameter, value: around.RimDiameter, high: maxLength},
		{param: paramWholeDepth, value: around.WholeDepth, high: maxLength},
		{param: profile.ParamBore, value: s.Bore, high: maxLength},
		{param: ParamBoreFlat, value: s.BoreFlat, high: maxLength},
		{param: ParamBoreHex, value: s.BoreHex, high: maxLength},
		{param: ParamRimWidth, value: s.Windows.RimWidth, high: maxLength},
		{param: ParamHubDiameter, value: s.Windows.HubDiameter, high: maxLength},
		{param: ParamArmWidth, value: s.Windows.ArmWidth, high: maxLength},
		{param: ParamMinFeature, value: s.MinFeature, high: maxLength},
	}
	if s.Keyway.Standard == KeyCustom {
		limits = append(limits,
			limit{param: ParamKeyway, value: s.Keyway.Width, low: leastPiece, high: maxLength},
			limit{param: ParamKeyway, value: s.Keyway.Depth, low: leastPiece, high: maxLength})
	}
	if r := s.Windows.CornerRadius; r != 0 {
		limits = append(limits, limit{param: ParamWindowRadius, value: r, low: leastCorner, high: maxLength})
	}
	loops := 0
	for _, h := range s.HoleCircles {
		limits = append(limits,
			limit{param: ParamHoleCircle, value: float64(h.N), low: 1, high: maxLoops, count: true},
			limit{param: ParamHoleCircle, value: h.Diameter, low: leastPiece, high: maxLength},
			limit{param: ParamHoleCircle, value: h.Circle, low: leastPiece, high: maxLength})
		loops = min(loops, maxLoops) + min(max(h.N, 0), maxLoops)
	}
	if s.Windows.N != 0 {
		limits = append(limits, limit{param: ParamWindows, value: float64(s.Windows.N), low: 2, high: maxLoops, count: true})
		loops += min(max(s.Windows.N, 0), maxLoops)
	}
	for _, l := range limits {
		if f, bad := l.check(); bad {
			found = append(found, f)
		}
	}
	if loops > maxLoops && found == nil {
		found = append(found, profile.Finding{Rule: profile.RuleOutOfRange, Param: ParamHoleCircle,
			Value: profile.NumberOf(float64(loops)), Bound: profile.NumberOf(maxLoops),
			Text: "{value} holes and windows are too many", Hint: "ask for at most {bound}"})
	}
	return append(found, s.conflicts()...)
}

// conflicts lists what cannot be asked for together.
func (s Spec) conflicts() profile.Violations {
	var found profile.Violations
	conflict := func(bad bool, param profile.Param, value float64, text, hint string) {
		if bad {
			found = append(found, profile.Finding{Rule: profile.RuleConflicting, Param: param, Value: profile.LengthOf(value), Text: text, Hint: hint})
		}
	}
	keyed, flat, hex := s.Keyway.Standard != KeyNone, s.BoreFlat != 0, s.BoreHex != 0
	conflict(s.Keyway.Standard > KeyCustom, ParamKeyway, 0, "there is no such standard of keys", "give iso, ansi or a size")
	conflict(hex && s.Bore != 0, ParamBoreHex, s.BoreHex, "a bore is either round or a hexagon, not both", "give --bore or --bore-hex")
	conflict(hex && keyed, ParamKeyway, s.Keyway.Width, "a hexagon bore has no keyway", "give --keyway with a round --bore, or leave it out")
	conflict(hex && flat, ParamBoreFlat, s.BoreFlat, "a hexagon bore has no further flat", "give --bore-flat with a round --bore, or leave it out")
	conflict(keyed && flat, ParamBoreFlat, s.BoreFlat, "a bore has either a keyway or a flat, not both", "give --keyway or --bore-flat")
	conflict(keyed && !hex && s.Bore == 0, ParamKeyway, s.Keyway.Width, "there is no bore to put a keyway in", "give --bore as well")
	conflict(flat && !hex && s.Bore == 0, ParamBoreFlat, s.BoreFlat, "there is no bore to put a flat in", "give --bore as well")
	if w := s.Windows; w.N == 0 {
		for _, of := range []struct {
			param profile.Param
			value float64
		}{{ParamRimWidth, w.RimWidth}, {ParamHubDiameter, w.HubDiameter}, {ParamArmWidth, w.ArmWidth}, {ParamWindowRadius, w.CornerRadius}} {
			conflict(of.value != 0, of.param, of.value, "there are no windows to shape", "give --windows as well")
		}
	}
	return found
}

// limit is one parameter's allowed range, a length in mm unless it is a count.
type limit struct {
	param     profile.Param
	value     float64
	low, high float64
	count     bool
	open      bool // low itself is not allowed
}

// check is true, with what to say, when the value is not finite or out of range.
func (l limit) check() (profile.Finding, bool) {
	of := profile.LengthOf
	if l.count {
		of = profile.NumberOf
	}
	f := profile.Finding{Rule: profile.RuleOutOfRange, Param: l.param, Value: of(l.value)}
	switch {
	case math.IsNaN(l.value) || math.IsInf(l.value, 0):
		f.Rule = profile.RuleNotFinite
		f.Text, f.Hint = fmt.Sprintf("%s must be a finite number", l.param), "give a plain decimal number"
	case l.value < l.low || l.open && l.value == l.low:
		f.Bound = of(l.low).AtLeast()
		f.Text, f.Hint = fmt.Sprintf("%s {value} is too small", l.param), "it must be at least {bound}"
		if l.open {
			f.Hint = "it must be above {bound}"
		}
	case l.value > l.high:
		f.Bound = of(l.high).AtMost()
		f.Text, f.Hint = fmt.Sprintf("%s {value} is too large", l.param), "it must be at most {bound}"
	default:
		return profile.Finding{}, false
	}
	return f, true
}
