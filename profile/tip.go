package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// tip is the solved tip of a tooth.
type tip struct {
	radius    float64 // mm, r_a
	landHalf  float64 // rad, half angle of the land left by rounding or chamfer
	flankRoll float64 // roll angle where the flank begins
	edge      Curve   // rounding or chamfer; nil for a sharp corner
	part      Part
}

// leastEdge is the shortest tip land and flank in modules that is left standing,
// and the smallest rounding or chamfer that is made: a millionth of a micrometre for
// each millimetre of module. At 2000 teeth a double resolves 1e-12 modules along the tip circle.
const leastEdge = 1e-9

// tipRadius is the tip circle as asked,
//
//	r_a = r + m (h_aP + x - k)
//
// (ISO 21771:2007, 5.3.3), or lowered where a least tip thickness is asked for.
func (g generation) tipRadius(s Spec) (radius float64, warnings []Finding, found Violations) {
	given := s.TipDiameter != 0
	radius = s.TipDiameter / 2
	if !given {
		radius = g.r + s.Rack.Addendum + s.ProfileShift*g.m - s.TipShortening
	}
	if radius <= g.rb {
		form := g.rb
		if g.w >= 0 && g.rootRadius() > 0 { // else that is refused as well
			form = math.Max(form, g.solveRoot().formRadius)
		}
		return radius, nil, Violations{{Rule: RuleBaseAboveTip, Param: ParamTipDiameter,
			Value: LengthOf(2 * radius), Bound: LengthOf(2 * form).AtLeast(), Also: []Quantity{LengthOf(2 * g.rb)},
			Text: "the tip diameter {value} lies at or below the base circle {0}, so there is no involute flank",
			Hint: "the tip must lie above {bound}, where the flank would end: raise --profile-shift, --addendum or --tip-diameter, or lower --pressure-angle"}}
	}
	least := math.Max(s.MinTipThickness, leastEdge*g.m)
	if 2*radius*g.halfAngle(radius) >= least {
		return radius, nil, nil
	}
	if s.MinTipThickness == 0 || given {
		return radius, nil, g.refuseTip(s, radius)
	}
	lowered, ok := g.radiusOfThickness(least, radius)
	if !ok {
		return radius, nil, g.refuseTip(s, radius)
	}
	return lowered, []Finding{{Rule: RuleTipLowered, Param: ParamMinTipThickness, Value: LengthOf(least), Bound: LengthOf(2 * lowered),
		Also: []Quantity{LengthOf(2 * radius)},
		Text: "the tip diameter is lowered from {0} to {bound} to keep a tip thickness of {value}"}}, nil
}

// radiusOfThickness is the largest radius up to limit at which the tooth is so
// thick, measured along its circle; false where it is thinner everywhere. The
// thickness 2 R psi(R) grows up to where the roll angle t equals psi, and falls
// from there on.
func (g generation) radiusOfThickness(thick, limit float64) (float64, bool) {
	if g.psiBase <= 0 {
		return 0, false
	}
	widest := bracketedRoot(func(t float64) float64 { return t + rollInv(t) - g.psiBase }, 0, g.psiBase)
	low := math.Min(g.rb*math.Hypot(1, widest), limit)
	excess := func(radius float64) float64 { return 2*radius*g.halfAngle(radius) - thick }
	if excess(low) < 0 {
		return 0, false
	}
	return bracketedRoot(excess, low, limit), true
}

// refuseTip says why a tip at that radius cannot be left as it is.
func (g generation) refuseTip(s Spec, radius float64) Violations {
	atTip := g.halfAngle(radius)
	none := leastEdge * g.m / (2 * radius) // half angle of a tip that counts as none
	if largest := s.Thinning + 2*g.r*(atTip-none); atTip < none && s.Thinning > 0 && largest > 0 {
		return Violations{{Rule: RuleThinningEatsTooth, Param: ParamThinning, Value: LengthOf(s.Thinning), Bound: LengthOf(largest).AtMost(),
			Text: "thinning by {value} leaves no tooth at the tip diameter",
			Hint: "thin by less than {bound}, or lower the tip with --tip-diameter"}}
	}
	pointed := g.pointedRadius()
	if atTip >= none {
		return Violations{{Rule: RuleTipThickness, Param: ParamMinTipThickness,
			Value: LengthOf(s.MinTipThickness), Bound: LengthOf(2 * radius * atTip).AtMost(),
			Also: []Quantity{LengthOf(2 * radius)},
			Text: "the tooth is only {bound} thick at the tip diameter {0}, not {value}",
			Hint: "lower the tip diameter or --min-tip-thickness"}}
	}
	if pointed == 0 {
		return Violations{{Rule: RulePointedTip, Param: ParamProfileShift, Value: NumberOf(s.ProfileShift),
			Text: "the tooth has no thickness anywhere above its base circle at a profile shift of {value}",
			Hint: "raise --profile-shift, or lower --thinning or --pressure-angle"}}
	}
	return Violations{{Rule: RulePointedTip, Param: ParamTipDiameter, Value: LengthOf(2 * radius), Bound: LengthOf(2 * pointed).AtMost(),
		Text: "the tooth is pointed: its flanks meet at diameter {bound}, below the tip diameter {value}",
		Hint: "keep the tip diameter below {bound}, lower --profile-shift, or set --min-tip-thickness to have the tip lowered"}}
}

// solveTip shapes the tip corner. flankEnd is the roll angle at the form circle,
// which neither a rounding nor a chamfer may reach.
func (g generation) solveTip(s Spec, radius, flankEnd float64) (tip, Violations) {
	t := tip{radius: radius, landHalf: g.halfAngle(radius), flankRoll: rollAt(radius, g.rb)}
	switch {
	case s.TipRadius > leastEdge*g.m:
		return g.roundTip(t, s.TipRadius, flankEnd)
	case s.TipChamfer > leastEdge*g.m:
		return g.chamferTip(t, s.TipChamfer, flankEnd)
	}
	return t, nil
}

// tipRounding places an arc of radius q tangent to the flank and the tip circle.
// Its center lies on the circle r_a - q and on the flank's parallel, an involute
// of half angle psi_b - q/rb; the roll angle there is shorter than the flank's at
// the point of contact by q/rb.
func (g generation) tipRounding(radius, q float64) (centerRoll, landHalf float64) {
	centerRoll = rollAt(radius-q, g.rb) // NaN inside the base circle
	return centerRoll, g.psiBase - q/g.rb - rollInv(centerRoll)
}

// roundTip is the tip with a rounding of radius q.
func (g generation) roundTip(t tip, q, flankEnd float64) (tip, Violations) {
	// room is positive while the rounding leaves land and flank.
	room := func(q float64) float64 {
		if t.radius-q <= g.rb {
			return math.Inf(-1)
		}
		roll, land := g.tipRounding(t.radius, q)
		return math.Min(land*t.radius, (roll+q/g.rb-flankEnd)*g.rb) - leastEdge*g.m
	}
	if !(room(q) > 0) {
		largest := largestBelow(room, q)
		return t, Violations{{Rule: RuleTipRadiusTooLarge, Param: ParamTipRadius, Value: LengthOf(q), Bound: LengthOf(largest).AtMost(),
			Text: "a tip radius of {value} leaves no tip land or no flank",
			Hint: "keep --tip-radius below {bound}"}}
	}
	roll, land := g.tipRounding(t.radius, q)
	t.landHalf, t.flankRoll, t.part = land, roll+q/g.rb, PartTipRounding
	sin, cos := math.Sincos(math.Pi/2 + land)
	t.edge = CircleArc{Center: r2.Vec{X: (t.radius - q) * cos, Y: (t.radius - q) * sin}, Radius: q,
		From: math.Pi/2 + land, To: math.Pi + g.psiBase - t.flankRoll}
	return t, nil
}

// chamferTip is the tip with a chamfer of leg c: from the point at the arc length
// c along the tip circle, whose angle is c/r_a, to the point at the arc length c
// along the flank, rb (t_a^2 - t^2)/2 = c.
func (g generation) chamferTip(t tip, c, flankEnd float64) (tip, Violations) {
	room := func(c float64) float64 {
		land := t.landHalf*t.radius - c
		flank := g.rb*(t.flankRoll*t.flankRoll-flankEnd*flankEnd)/2 - c
		return math.Min(land, flank) - leastEdge*g.m
	}
	if !(room(c) > 0) {
		return t, Violations{{Rule: RuleTipChamferTooLarge, Param: ParamTipChamfer, Value: LengthOf(c), Bound: LengthOf(math.Max(room(0), 0)).AtMost(),
			Text: "a tip chamfer of {value} leaves no tip land or no flank",
			Hint: "keep --tip-chamfer below {bound}"}}
	}
	t.landHalf -= c / t.radius
	t.flankRoll = math.Sqrt(t.flankRoll*t.flankRoll - 2*c/g.rb)
	t.part = PartTipChamfer
	sin, cos := math.Sincos(math.Pi/2 + t.landHalf)
	flank := Involute{BaseRadius: g.rb, BaseHalfAngle: g.psiBase}
	t.edge = StraightLine{A: r2.Vec{X: t.radius * cos, Y: t.radius * sin}, B: flank.At(t.flankRoll)}
	return t, nil
}

// largestBelow is where room, positive at zero and falling, reaches zero below
// high.
func largestBelow(room func(float64) float64, high float64) float64 {
	low := 0.0
	for {
		mid := low + (high-low)/2
		if mid == low || mid == high {
			return low
		}
		if room(mid) > 0 {
			low = mid
		} else {
			high = mid
		}
	}
}
