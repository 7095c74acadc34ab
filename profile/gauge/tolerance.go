package gauge

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// Tolerances are the flank tolerances of a class in mm.
type Tolerances struct {
	SinglePitch     float64 // f_pT
	CumulativePitch float64 // F_pT, total
	ProfileSlope    float64 // f_HalphaT
	ProfileForm     float64 // f_falphaT
	ProfileTotal    float64 // F_alphaT
	Runout          float64 // F_rT
}

// The range in which the formulas of ISO 1328-1:2013 hold.
const (
	MinClass, MaxClass                         = 1, 11
	MinClassTeeth, MaxClassTeeth               = 5, 1000
	MinClassDiameter, MaxClassDiameter         = 5, 15000 // mm
	MinClassModule, MaxClassModule             = 0.5, 70  // mm
	classStep                                  = math.Sqrt2
	classOfFormulas                            = 5
	millimetresPerMicrometre           float64 = 1e-3
)

// FlankTolerances are those of ISO 1328-1:2013 for a flank tolerance class A and a
// spur gear, in micrometres for d and m in mm,
//
//	f_pT      = (0.001 d + 0.4 m + 5) sqrt(2)^(A-5)
//	F_pT      = (0.002 d + 0.55 sqrt(d) + 0.7 m + 12) sqrt(2)^(A-5)
//	f_HalphaT = (0.4 m + 0.001 d + 4) sqrt(2)^(A-5)
//	f_falphaT = (0.55 m + 5) sqrt(2)^(A-5)
//	F_alphaT  = sqrt(f_HalphaT^2 + f_falphaT^2)
//	F_rT      = 0.9 F_pT
//
// (clause 5, the runout from its annex; from memory), not rounded. The error is of type
// profile.Violations and names what is outside the standard's range: classes 1 to 11, 5
// to 1000 teeth, d from 5 to 15000 mm, m from 0.5 to 70 mm.
func FlankTolerances(class, teeth int, referenceDiameter, module float64) (Tolerances, error) {
	var found profile.Violations
	add := func(param profile.Param, q profile.Quantity, low, high float64) {
		switch {
		case math.IsNaN(q.Value) || math.IsInf(q.Value, 0):
			found = append(found, notFinite(param, q))
		case q.Value < low || q.Value > high:
			bound := profile.Quantity{Value: math.Min(math.Max(q.Value, low), high), Dimension: q.Dimension}
			found = append(found, profile.Finding{Rule: profile.RuleOutOfRange, Param: param, Value: q, Bound: bound,
				Also: []profile.Quantity{{Value: low, Dimension: q.Dimension}, {Value: high, Dimension: q.Dimension}},
				Text: fmt.Sprintf("%s {value} is outside the range of ISO 1328-1:2013", param), Hint: "it holds from {0} to {1}"})
		}
	}
	add(ParamFlankClass, profile.NumberOf(float64(class)), MinClass, MaxClass)
	add(profile.ParamTeeth, profile.NumberOf(float64(teeth)), MinClassTeeth, MaxClassTeeth)
	add(ParamReferenceDiameter, profile.LengthOf(referenceDiameter), MinClassDiameter, MaxClassDiameter)
	add(profile.ParamModule, profile.LengthOf(module), MinClassModule, MaxClassModule)
	if found != nil {
		return Tolerances{}, found
	}
	d, m := referenceDiameter, module
	scale := math.Pow(classStep, float64(class-classOfFormulas)) * millimetresPerMicrometre
	t := Tolerances{
		SinglePitch:     (0.001*d + 0.4*m + 5) * scale,
		CumulativePitch: (0.002*d + 0.55*math.Sqrt(d) + 0.7*m + 12) * scale,
		ProfileSlope:    (0.4*m + 0.001*d + 4) * scale,
		ProfileForm:     (0.55*m + 5) * scale,
	}
	t.ProfileTotal = math.Hypot(t.ProfileSlope, t.ProfileForm)
	t.Runout = 0.9 * t.CumulativePitch
	return t, nil
}

// Rounded are the tolerances as the standard prints them: above 10 um to 1 um, from
// 5 um to 10 um to 0.5 um, below to 0.1 um (ISO 1328-1:2013, clause 5, from memory).
func (t Tolerances) Rounded() Tolerances {
	return Tolerances{
		SinglePitch:     roundTolerance(t.SinglePitch),
		CumulativePitch: roundTolerance(t.CumulativePitch),
		ProfileSlope:    roundTolerance(t.ProfileSlope),
		ProfileForm:     roundTolerance(t.ProfileForm),
		ProfileTotal:    roundTolerance(t.ProfileTotal),
		Runout:          roundTolerance(t.Runout),
	}
}

// roundTolerance rounds a tolerance in mm by the standard's steps.
func roundTolerance(mm float64) float64 {
	um := mm / millimetresPerMicrometre
	perStep := 10.0 // steps in 1 um
	switch {
	case um > 10:
		perStep = 1
	case um >= 5:
		perStep = 2
	}
	return math.Round(um*perStep) / (perStep * 1000)
}
