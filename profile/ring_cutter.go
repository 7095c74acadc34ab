package profile

import (
	"fmt"
	"math"
)

// cutter is a pinion-type cutter in a ring, the basic rack's tip on its own.
type cutter struct {
	teeth         int
	rb            float64 // mm, its base circle
	tipRadius     float64 // mm, r_a0
	centerRadius  float64 // mm, R_c = r_a0 - rho
	centerAngle   float64 // rad, psi_c; negative where the rounding does not fit
	operating     float64 // rad, alpha_w; NaN where there is none
	distance      float64 // mm, A
	rounding      float64 // mm, rho
	halfThickness float64 // rad, psi_0: half angle of its tooth on its base circle
}

// newCutter puts a cutter of so many teeth into the ring,
//
//	psi_0 = (pi/2 + 2 x_0 tan alpha + E_f/m)/z_0 + inv alpha,   r_a0 = r_0 + m (h_fP + x_0)
//	inv alpha_w = (z psi_2 - z_0 psi_0)/(z - z_0),   A = m (z - z_0) cos alpha/(2 cos alpha_w)
//	psi_c = psi_0 - rho/r_b0 - inv acos(r_b0/R_c)
//
// (its teeth fill the ring's spaces on the operating pitch circles; ISO 21771:2007, 5.6, for
// an internal pair).
func (g ringSpace) newCutter(s Spec, teeth int, rho float64) cutter {
	z, z0 := float64(s.Teeth), float64(teeth)
	widening := 0.0
	if s.ThinningBy == ThinByFlank {
		widening = s.Thinning
	}
	r := g.m * z0 / 2
	c := cutter{teeth: teeth, rb: r * math.Cos(g.alpha), tipRadius: r + s.Rack.Dedendum + s.CutterShift*g.m, rounding: rho}
	c.halfThickness = (math.Pi/2+2*s.CutterShift*g.tan+widening/g.m)/z0 + Inv(g.alpha)
	c.centerRadius = c.tipRadius - rho
	c.centerAngle = math.Inf(-1)
	if c.centerRadius > c.rb {
		c.centerAngle = c.halfThickness - rho/c.rb - rollInv(rollAt(c.centerRadius, c.rb))
	}
	c.operating = math.NaN()
	if inv := (z*g.psiBase - z0*c.halfThickness) / (z - z0); inv > 0 {
		c.operating = InverseInv(inv)
		c.distance = g.m * (z - z0) * math.Cos(g.alpha) / (2 * math.Cos(c.operating))
	}
	return c
}

// centerRoll is sqrt(R_c^2 - r_b0^2), the length from the base circle to the rounding's
// center along its normal.
func (c cutter) centerRoll() float64 { return c.rb * rollAt(c.centerRadius, c.rb) }

// gouges says whether the cutter's flank reaches past the end of the path of contact at
// its own base circle and cuts into the ring's flank at the tip, by how the tip circle
// compares with it: sqrt(r_a^2 - r_b^2) >= A sin alpha_w keeps it whole.
func (g ringSpace) gouges(c cutter) bool {
	return g.rb*rollAt(g.tipRadius, g.rb) < c.distance*math.Sin(c.operating)
}

// trims says whether the cutter, fed in radially, cuts corners off the ring's teeth.
func (g ringSpace) trims(c cutter, teeth int) bool {
	return !InRing{Teeth: [2]int{c.teeth, teeth}, Base: [2]float64{c.rb, g.rb}, Tip: [2]float64{c.tipRadius, g.tipRadius}, Angle: c.operating}.PassesRadially()
}

// fault is what keeps a cutter from the ring; "" if nothing does.
func (g ringSpace) fault(c cutter) Rule {
	switch {
	case math.IsNaN(c.operating):
		return RuleNoCutterPosition
	case !(c.centerAngle >= 0):
		return RuleRoundingTooLarge
	case g.gouges(c):
		return RuleCutterGouges
	}
	return ""
}

// cutRoot has the root cut. The root circle is A + r_a0; the fillet ends on the flank at
// the form circle r_F^2 = r_b^2 + (A sin alpha_w + L_c + rho)^2.
func (g ringSpace) cutRoot(s Spec) (root ringRoot, warnings []Finding, found Violations) {
	value := NumberOf(float64(s.CutterTeeth))
	if s.CutterTeeth >= s.Teeth {
		return root, nil, Violations{{Rule: RuleCutterTooLarge, Param: ParamCutterTeeth, Value: value, Bound: NumberOf(float64(s.Teeth - 1)),
			Text: fmt.Sprintf("a cutter of {value} teeth does not go into a ring of %d", s.Teeth), Hint: "it can have at most {bound}, and fewer to cut cleanly"}}
	}
	rho := s.Rack.RootRadius
	c := g.newCutter(s, s.CutterTeeth, rho)
	if math.IsNaN(c.operating) {
		return root, nil, Violations{{Rule: RuleNoCutterPosition, Param: ParamCutterShift, Value: NumberOf(s.CutterShift),
			Text: "the cutter's teeth are too thick for the ring's spaces at any distance", Hint: "lower --cutter-shift or --profile-shift, or raise --thinning" + g.wouldDo(s, rho)}}
	}
	if !(g.newCutter(s, s.CutterTeeth, 0).centerAngle > 0) {
		return root, nil, Violations{{Rule: RuleCutterPointed, Param: ParamCutterTeeth, Value: value, Also: []Quantity{LengthOf(2 * c.tipRadius)},
			Text: "the teeth of a cutter of {value} come to a point before its tip diameter {0}",
			Hint: "lower --cutter-shift or --dedendum" + g.wouldDo(s, rho)}}
	}
	largest := largestBelow(func(q float64) float64 { return g.newCutter(s, s.CutterTeeth, q).centerAngle }, c.tipRadius-c.rb)
	switch {
	case s.Rounding == RoundingFull:
		rho = largest
	case rho <= largest:
	default:
		return root, nil, Violations{{Rule: RuleRoundingTooLarge, Param: ParamRootRadius, Value: LengthOf(rho), Bound: LengthOf(math.Max(largest, 0)).AtMost(),
			Text: "the tip of a cutter of so few teeth takes no rounding of {value}", Hint: "the largest is {bound}" + g.wouldDo(s, rho)}}
	}
	c = g.newCutter(s, s.CutterTeeth, rho)
	if s.Rounding == RoundingFull || rho == largest {
		c.centerAngle = 0 // but for rounding
	}
	if g.gouges(c) {
		return root, nil, Violations{{Rule: RuleCutterGouges, Param: ParamCutterTeeth, Value: value, Also: []Quantity{LengthOf(2 * g.tipRadius)},
			Bound: LengthOf(2 * math.Hypot(g.rb, c.distance*math.Sin(c.operating))).AtLeast(),
			Text:  "a cutter of {value} teeth gouges the ring's flanks at the tip diameter {0}",
			Hint:  "make the tip diameter at least {bound}" + g.wouldDo(s, rho)}}
	}
	if g.trims(c, s.Teeth) {
		warnings = append(warnings, g.warnTrimming(s, rho))
	}
	k := float64(s.CutterTeeth) / float64(s.Teeth)
	pitch := c.distance * k / (1 - k) // the cutter's operating pitch radius
	sense := math.Copysign(1, c.centerRadius-pitch)
	f := CutterFillet{CenterDistance: c.distance, CenterRadius: c.centerRadius, CenterAngle: c.centerAngle, Ratio: k,
		Offset: sense * rho, Sense: sense, From: -c.centerAngle, To: -c.centerAngle + math.Atan(c.centerRoll()/c.rb) - c.operating}
	root = ringRoot{radius: c.distance + c.tipRadius, landHalf: c.centerAngle * k,
		formRoll: (c.distance*math.Sin(c.operating) + c.centerRoll() + rho) / g.rb, fillet: f, least: math.Abs(1 / f.Curvature(f.From))}
	return root, warnings, nil
}

// wouldDo names the numbers of cutter teeth that would cut the ring with that rounding.
func (g ringSpace) wouldDo(s Spec, rho float64) string {
	first, last := 0, 0
	for z0 := MinTeeth; z0 < s.Teeth; z0++ {
		if c := g.newCutter(s, z0, rho); g.fault(c) == "" {
			if first == 0 {
				first = z0
			}
			if !g.trims(c, s.Teeth) {
				last = z0
			}
		}
	}
	switch {
	case first == 0:
		return ""
	case last < first:
		return fmt.Sprintf("; a cutter of %d teeth or more would do, but trims when it is fed in", first)
	}
	return fmt.Sprintf("; cutters of %d to %d teeth would do", first, last)
}

// warnTrimming tells that feeding the cutter in trims the teeth.
func (g ringSpace) warnTrimming(s Spec, rho float64) Finding {
	return Finding{Rule: RuleCutterTrims, Param: ParamCutterTeeth, Value: NumberOf(float64(s.CutterTeeth)),
		Text: "a cutter of {value} teeth that is fed in radially trims the corners of the ring's teeth" + g.wouldDo(s, rho)}
}
