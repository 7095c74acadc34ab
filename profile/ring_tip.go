package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// ringTip shapes the tip corner of a ring's tooth. The tip circle is the inner end of the
// flank; what landHalf of the result measures is the ring's tooth. flankEnd is the roll
// angle at the root form circle, which neither a rounding nor a chamfer may reach.
func (g ringSpace) ringTip(s Spec, flankEnd float64) (tip, Violations) {
	t := tip{radius: g.tipRadius, landHalf: g.toothHalf(g.tipRadius), flankRoll: rollAt(g.tipRadius, g.rb)}
	switch {
	case s.TipRadius > leastEdge*g.m:
		return g.roundRingTip(t, s.TipRadius, flankEnd)
	case s.TipChamfer > leastEdge*g.m:
		return g.chamferRingTip(t, s.TipChamfer, flankEnd)
	}
	return t, nil
}

// ringTipRounding places an arc of radius q tangent to the flank and the tip circle, on
// the ring's side of both. Its center lies on the circle r_a + q and on the flank's
// parallel, of half angle psi_b + q/rb; the flank's roll angle at the point of contact is
// shorter than the center's by q/rb.
func (g ringSpace) ringTipRounding(q float64) (flankRoll, landHalf float64) {
	centerRoll := rollAt(g.tipRadius+q, g.rb)
	return centerRoll - q/g.rb, g.space - (g.psiBase + q/g.rb - rollInv(centerRoll))
}

// roundRingTip is the tip with a rounding of radius q.
func (g ringSpace) roundRingTip(t tip, q, flankEnd float64) (tip, Violations) {
	room := func(q float64) float64 {
		roll, land := g.ringTipRounding(q)
		return math.Min(land*t.radius, (flankEnd-roll)*g.rb) - leastEdge*g.m
	}
	if !(room(q) > 0) {
		return t, Violations{{Rule: RuleTipRadiusTooLarge, Param: ParamTipRadius, Value: LengthOf(q), Bound: LengthOf(largestBelow(room, q)).AtMost(),
			Text: "a tip radius of {value} leaves no tip land or no flank", Hint: "keep --tip-radius below {bound}"}}
	}
	t.flankRoll, t.landHalf = g.ringTipRounding(q)
	t.part = PartTipRounding
	center := CircleArc{Radius: t.radius + q}.At(math.Pi/2 + g.space - t.landHalf)
	// The contact lies to the right of inward travel from the flank, and the way round
	// the center is clockwise, to the point below it.
	heading := Involute{BaseRadius: g.rb, BaseHalfAngle: g.psiBase}.Heading(t.flankRoll)
	to := math.Pi/2 + g.space - t.landHalf + math.Pi
	from := heading + math.Pi/2
	from = to + math.Abs(math.Remainder(from-to, 2*math.Pi))
	t.edge = CircleArc{Center: center, Radius: q, From: from, To: to}
	return t, nil
}

// chamferRingTip is the tip with a chamfer of leg c: from the point at the arc length c
// along the flank, rb (t^2 - t_a^2)/2 = c, to the point at c along the tip circle.
func (g ringSpace) chamferRingTip(t tip, c, flankEnd float64) (tip, Violations) {
	room := func(c float64) float64 {
		land := t.landHalf*t.radius - c
		flank := g.rb*(flankEnd*flankEnd-t.flankRoll*t.flankRoll)/2 - c
		return math.Min(land, flank) - leastEdge*g.m
	}
	if !(room(c) > 0) {
		return t, Violations{{Rule: RuleTipChamferTooLarge, Param: ParamTipChamfer, Value: LengthOf(c), Bound: LengthOf(math.Max(room(0), 0)).AtMost(),
			Text: "a tip chamfer of {value} leaves no tip land or no flank", Hint: "keep --tip-chamfer below {bound}"}}
	}
	t.landHalf -= c / t.radius
	t.flankRoll = math.Sqrt(t.flankRoll*t.flankRoll + 2*c/g.rb)
	t.part = PartTipChamfer
	flank := Involute{BaseRadius: g.rb, BaseHalfAngle: g.psiBase}
	sin, cos := math.Sincos(math.Pi/2 + g.space - t.landHalf)
	t.edge = StraightLine{A: flank.At(t.flankRoll), B: r2.Vec{X: t.radius * cos, Y: t.radius * sin}}
	return t, nil
}

// dimensions collects the sizes of a ring. Its addendum reaches inwards from the
// reference circle.
func (g ringSpace) dimensions(s Spec, t tip, root ringRoot) Dimensions {
	pitch := math.Pi * g.m
	thick := thickness(s)
	clearance := root.radius - g.r - s.Rack.Addendum + s.ProfileShift*g.m
	tipForm := t.radius
	if t.edge != nil {
		tipForm = g.rb * math.Hypot(1, t.flankRoll)
	}
	whole := root.radius - t.radius
	return Dimensions{
		Module:            g.m,
		Teeth:             s.Teeth,
		ReferenceDiameter: 2 * g.r,
		BaseDiameter:      2 * g.rb,
		TipDiameter:       2 * t.radius,
		RootDiameter:      2 * root.radius,
		FormDiameter:      2 * g.rb * math.Hypot(1, root.formRoll),
		TipFormDiameter:   2 * tipForm,
		CircularPitch:     pitch,
		BasePitch:         pitch * math.Cos(g.alpha),
		ToothThickness:    thick,
		SpaceWidth:        pitch - thick,
		TipThickness:      2 * t.radius * g.toothHalf(t.radius),
		TipLand:           2 * t.radius * t.landHalf,
		Addendum:          g.r - t.radius,
		Dedendum:          root.radius - g.r,
		WholeDepth:        whole,
		WorkingDepth:      whole - clearance,
		Clearance:         clearance,
		MinFilletRadius:   root.least,
	}
}
