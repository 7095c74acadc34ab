package gauge

import (
	"math"

	"flankwright/profile"
)

// Backlash is the play of two external gears at a center distance.
type Backlash struct {
	Circumferential        float64 // mm on the operating pitch circles, j_t; negative where the teeth jam
	Normal                 float64 // mm, j_n = j_t cos(alpha_w)
	OperatingPressureAngle float64 // rad, alpha_w
}

// Backlash is the play with a mate at a center distance a in mm,
//
//	cos alpha_w = (db1 + db2)/(2 a)
//	j_t = p_w - s_w1 - s_w2
//	p_w = 2 pi a/(z1 + z2),   s_w = 2 r_w (s/d + inv alpha - inv alpha_w)
//
// (ISO 21771:2007, 5.6, from memory). Take WithThickness for a measured gear. Both
// must be external, of one module and pressure angle; the distance must be at least
// the sum of the base radii. Otherwise it is refused.
func (g Gear) Backlash(mate Gear, centerDistance float64) (Backlash, error) {
	found := positive(ParamCenterDistance, centerDistance)
	if g.spec.Kind != External || mate.spec.Kind != External {
		found = append(found, profile.Finding{Rule: RuleMateDiffers, Param: ParamMateTeeth, Value: profile.NumberOf(mate.z()),
			Text: "backlash is known for two external gears only", Hint: "leave the mate out"})
	} else if g.spec.Module != mate.spec.Module || g.spec.PressureAngle != mate.spec.PressureAngle {
		found = append(found, profile.Finding{Rule: RuleMateDiffers, Param: ParamMateTeeth, Value: profile.LengthOf(mate.spec.Module), Bound: profile.LengthOf(g.spec.Module),
			Text: "the mate's module {value} or its pressure angle is not the gear's, {bound}", Hint: "give the mate of the same basic rack"})
	}
	if found != nil {
		return Backlash{}, found
	}
	least := g.rb + mate.rb
	if centerDistance < least {
		return Backlash{}, profile.Violations{{Rule: RuleNoMesh, Param: ParamCenterDistance, Value: profile.LengthOf(centerDistance), Bound: profile.LengthOf(least).AtLeast(),
			Text: "at a center distance of {value} the base circles overlap", Hint: "it must be at least {bound}"}}
	}
	angle := math.Acos(least / centerDistance)
	teeth := g.z() + mate.z()
	play := 2 * math.Pi * centerDistance / teeth
	for _, member := range []Gear{g, mate} {
		rw := centerDistance * member.z() / teeth
		play -= 2 * rw * (member.thickness/(2*member.r) + g.inv - profile.Inv(angle))
	}
	return Backlash{Circumferential: play, Normal: play * math.Cos(angle), OperatingPressureAngle: angle}, nil
}
