package mesh

import (
	"fmt"
	"math"

	"flankwright/profile"
	"flankwright/profile/internal/bisect"
)

// The parameters findings of this package speak of, besides those of package profile.
const (
	ParamCenterDistance profile.Param = "center-distance"
	ParamBacklash       profile.Param = "backlash"
	ParamAllowShort     profile.Param = "allow-short-contact"
)

// The rules of this package.
const (
	RuleRingTooSmall  profile.Rule = "ring-too-small"
	RuleNoDistance    profile.Rule = "no-center-distance"
	RuleTooClose      profile.Rule = "center-distance-too-small"
	RuleTooFar        profile.Rule = "center-distance-too-large"
	RuleThinnedAway   profile.Rule = "thinned-away"
	RuleJammed        profile.Rule = "negative-backlash"
	RuleTooLoose      profile.Rule = "backlash-too-large"
	RuleTipMeetsRoot  profile.Rule = "tip-meets-root"
	RuleTipInFillet   profile.Rule = "tip-in-fillet"
	RuleShortContact  profile.Rule = "short-contact"
	RuleTipsCross     profile.Rule = "tips-cross"
	RuleContactShort  profile.Rule = "contact-shortened" // a warning
	RuleLowContact    profile.Rule = "low-contact"       // a warning
	RuleNotRadial     profile.Rule = "not-radial"        // a warning
	RulePartedByLimit profile.Rule = "parted-by-limit"   // a warning
)

// LowContact is the contact ratio below which common practice warns; no source.
const LowContact = 1.2

// jammed says that the teeth lack so much backlash, and which center distance and shift
// would give it: of a ring a smaller one, of others a larger.
func (p *Pair) jammed(missing float64) profile.Violations {
	thinning := [2]float64{}
	if p.Teeth[0] != nil {
		thinning = [2]float64{p.Teeth[0].Spec.Thinning, p.Teeth[1].Spec.Thinning}
	}
	enough := p.Members.Backlash(p.CenterDistance, p.Shift, thinning) + missing
	lack := func(a float64) float64 { return enough - p.Members.Backlash(a, p.Shift, thinning) }
	apart, far := p.CenterDistance, p.CenterDistance+p.sign()*2*p.Module
	if p.Second == profile.FormRing {
		far = math.Max(far, p.Reference()*math.Cos(p.PressureAngle))
	}
	if lack(far) <= 0 {
		apart = bisect.Root(lack, p.CenterDistance, far)
	}
	// Shift thickens each tooth by 2 m tan alpha for one.
	lower := p.ThinningFor(missing, p.CenterDistance) / (2 * p.Module * math.Tan(p.PressureAngle))
	return profile.Violations{{Rule: RuleJammed, Param: ParamCenterDistance, Value: profile.LengthOf(p.CenterDistance), Bound: profile.LengthOf(apart),
		Also: []profile.Quantity{profile.LengthOf(missing), profile.NumberOf(tidy(p.ShiftSum - lower)).AtMost()},
		Text: "at the center distance {value}, or at an end of its tolerance, the teeth lack {0} of backlash",
		Hint: "a center distance of {bound} or a sum of shifts of {1} gives it"}}
}

// judge lists what keeps the pair from working, and what to know of it.
func (p *Pair) judge(r Request) (warnings []profile.Finding, found profile.Violations) {
	if p.Note != "" {
		warnings = append(warnings, profile.Finding{Rule: RulePartedByLimit, Param: profile.ParamProfileShift, Value: profile.NumberOf(p.ShiftSum), Text: "parting the sum of shifts {value}: " + p.Note})
	}
	if p.Least.Circumferential < -roundingOf*p.Module {
		found = append(found, p.jammed(-p.Least.Circumferential)...)
	}
	for i := range p.TipClearance {
		if c := p.TipClearance[i]; c <= 0 {
			found = append(found, profile.Finding{Rule: RuleTipMeetsRoot, Param: profile.ParamTipShortening, Value: profile.LengthOf(c), Bound: profile.LengthOf(-c).AtLeast(),
				Text: fmt.Sprintf("the tip of member %d reaches %s into the root of the other", i+1, "{bound}"),
				Hint: fmt.Sprintf("shorten the tip of member %d by more than {bound}", i+1)})
		}
	}
	w, f := p.judgeReach(r)
	warnings, found = append(warnings, w...), append(found, f...)
	ratio := profile.NumberOf(p.Ratio)
	switch {
	case p.Ratio < 1 && !r.AllowShort:
		f := profile.Finding{Rule: RuleShortContact, Param: ParamAllowShort, Value: ratio, Bound: profile.NumberOf(1),
			Text: "the contact ratio is {value}: before one pair of teeth takes over the other has parted",
			Hint: "take longer tips, a smaller sum of shifts, more teeth or a smaller pressure angle; or give --allow-short-contact"}
		for i, t := range p.Teeth {
			if t.Undercut {
				least := profile.NumberOf(t.Spec.Rack.ShiftWithoutUndercut(p.Module, t.Spec.Teeth)).AtLeast()
				f.Also = append(f.Also, least)
				f.Hint = fmt.Sprintf("member %d is undercut: a profile shift of {%d} frees it; or ", i+1, len(f.Also)-1) + f.Hint
			}
		}
		found = append(found, f)
	case p.Ratio < LowContact:
		warnings = append(warnings, profile.Finding{Rule: RuleLowContact, Param: ParamAllowShort, Value: ratio, Bound: profile.NumberOf(LowContact),
			Text: "the contact ratio {value} is below {bound} (common practice)"})
	}
	if p.Second == profile.FormRing {
		w, f := p.judgeRing()
		warnings, found = append(warnings, w...), append(found, f...)
	}
	return warnings, found
}

// judgeReach looks at each tip against the other's fillet. A tip that reaches past the end
// of an undercut flank meets nothing: the rack's tip has been there, and deeper.
func (p *Pair) judgeReach(r Request) (warnings []profile.Finding, found profile.Violations) {
	c := p.action(p.CenterDistance)
	for tip, reach := range p.Reach {
		root := 1 - tip
		slack := r.Slack
		if reach <= slack {
			continue
		}
		if p.Teeth[root].Undercut && p.Second != profile.FormRing { // a ring's tip reaches round further
			warnings = append(warnings, profile.Finding{Rule: RuleContactShort, Param: profile.ParamProfileShift, Value: profile.LengthOf(reach),
				Text: fmt.Sprintf("undercut of member %d takes {value} of the path of contact", root+1)})
			continue
		}
		// How much shorter the tip must be to end where the other's flank does.
		mine, other := edgesOf(p.Teeth[tip]), edgesOf(p.Teeth[root])
		var shorter float64
		if tip == 1 {
			shorter = math.Abs(mine.tipForm - c.onSecond(length(other.form, c.rb1)))
		} else {
			shorter = mine.tipForm - math.Hypot(c.rb1, math.Max(0, c.onFirst(other.form)))
		}
		found = append(found, profile.Finding{Rule: RuleTipInFillet, Param: profile.ParamTipShortening, Value: profile.LengthOf(reach), Bound: profile.LengthOf(shorter).AtLeast(),
			Also: []profile.Quantity{profile.LengthOf(p.ActiveRoot[root])},
			Text: fmt.Sprintf("the tip of member %d reaches {value} past the end of member %d's flank at {0}, into its fillet", tip+1, root+1),
			Hint: fmt.Sprintf("shorten the tip of member %d by {bound}, or give member %d more profile shift", tip+1, root+1)})
	}
	return warnings, found
}

// judgeRing looks for what only rings suffer: tips that cross on their way out of mesh
// (trochoid interference),
//
//	t1 = acos((r_a2^2 - r_a1^2 - a^2)/(2 a r_a1)) + inv a_a1 - inv aw
//	t2 = acos((a^2 + r_a2^2 - r_a1^2)/(2 a r_a2)),   t1 z1/z2 + inv aw - inv a_a2 >= t2
//
// (SDP/SI, Elements of Metric Gear Technology, equations 5-6 and 5-7), and a pinion that
// cannot be put in radially.
func (p *Pair) judgeRing() (warnings []profile.Finding, found profile.Violations) {
	a := p.CenterDistance
	z1, z2 := p.z()
	ra1, ra2 := edgesOf(p.Teeth[0]).tip, edgesOf(p.Teeth[1]).tip
	c := p.action(a)
	inv := func(base, radius float64) float64 { return profile.Inv(math.Acos(base / radius)) }
	aw := profile.Inv(p.OperatingAngle(a))
	cos1 := (ra2*ra2 - ra1*ra1 - a*a) / (2 * a * ra1)
	cos2 := (a*a + ra2*ra2 - ra1*ra1) / (2 * a * ra2)
	if math.Abs(cos1) <= 1 && math.Abs(cos2) <= 1 {
		t1 := math.Acos(cos1) + inv(c.rb1, ra1) - aw
		t2 := math.Acos(cos2)
		if room := t1*z1/z2 + aw - inv(c.rb2, ra2) - t2; room < 0 {
			found = append(found, profile.Finding{Rule: RuleTipsCross, Param: profile.ParamTeeth, Value: profile.NumberOf(z2 - z1), Bound: profile.LengthOf(-room * ra2),
				Text: "with {value} teeth between ring and gear their tips cross by {bound} outside the mesh (trochoid interference)",
				Hint: "take fewer teeth in the gear, or shorten both tips"})
		}
	}
	radial := profile.InRing{Teeth: p.Members.Teeth, Base: [2]float64{c.rb1, c.rb2}, Tip: [2]float64{ra1, ra2}, Angle: p.OperatingAngle(a)}.PassesRadially()
	if !radial {
		warnings = append(warnings, profile.Finding{Rule: RuleNotRadial, Param: profile.ParamTeeth, Value: profile.NumberOf(z2 - z1),
			Text: "with {value} teeth between ring and gear the gear cannot be put in radially, only along its axis"})
	}
	return warnings, found
}
