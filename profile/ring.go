package profile

import "math"

// ringSpace is a ring's space between two teeth, in the terms of the external tooth it
// is: its flanks are those of the gear with the opposite shift, thicker by what the ring's
// teeth are thinner,
//
//	e = m (pi/2 - 2 x tan alpha) + E
//	psi_2 = e/(2 r) + inv alpha
//
// on the reference and the base circle (ISO 21771:2007, 5.4, with the sign of shift there).
// The material is on the other side: its tip lies where a gear's root would, and the rack
// that would cut it does not exist, so its root is rounded by an arc or cut by a cutter.
type ringSpace struct {
	generation         // of the space as a tooth; its rack is not used
	tipRadius  float64 // mm, r_a
}

// ringRoot is the solved root of a ring's space.
type ringRoot struct {
	radius   float64 // mm, r_f
	landHalf float64 // rad, half angle of the root land
	fillet   Curve   // from the land to the flank; nil for a sharp corner
	formRoll float64 // roll angle of the flank's end at the root
	least    float64 // mm, least radius of curvature of the fillet
}

// newRingSpace sets a spec within its limits up.
func newRingSpace(s Spec) ringSpace {
	opposite := s
	opposite.ProfileShift, opposite.Thinning = -s.ProfileShift, -s.Thinning
	g := generation{m: s.Module, alpha: s.Rack.PressureAngle, h: s.Rack.Dedendum, rho: s.Rack.RootRadius}
	g.sin, g.tan = math.Sin(g.alpha), math.Tan(g.alpha)
	g.r = g.m * float64(s.Teeth) / 2
	g.rb = g.r * math.Cos(g.alpha)
	g.space = math.Pi / float64(s.Teeth)
	g.psiBase = thickness(opposite)/(2*g.r) + Inv(g.alpha)
	return ringSpace{generation: g}
}

// solveRing makes the tooth of a ring.
func solveRing(s Spec) (*Tooth, error) {
	g := newRingSpace(s)
	warnings, found := g.settleTip(s)
	if found != nil {
		return nil, found
	}
	var root ringRoot
	var more []Finding
	if s.CutterTeeth == 0 {
		root, more, found = g.roundRoot(s)
	} else {
		root, more, found = g.cutRoot(s)
	}
	warnings = append(warnings, more...)
	if found == nil && root.formRoll-rollAt(g.tipRadius, g.rb) <= leastEdge*g.m/g.rb {
		found = Violations{{Rule: RuleNoFlank, Param: ParamTipDiameter, Value: LengthOf(2 * g.tipRadius), Bound: LengthOf(2 * g.rb * math.Hypot(1, root.formRoll)).AtMost(),
			Text: "the tip diameter {value} lies at or above the end of the flank at {bound}", Hint: "the tip diameter must be below {bound}"}}
	}
	if found != nil {
		return nil, found
	}
	tp, found := g.ringTip(s, root.formRoll)
	if found != nil {
		return nil, found
	}
	if arc, ok := root.fillet.(CircleArc); ok {
		s.Rack.RootRadius = arc.Radius
	}
	t := &Tooth{Spec: s, Warnings: warnings}
	t.Form, t.Teeth, t.LandSmooth = FormRing, s.Teeth, root.fillet != nil
	t.Land = CircleArc{Radius: root.radius, From: math.Pi/2 - root.landHalf, To: math.Pi/2 + root.landHalf}
	if root.fillet != nil {
		t.Side = append(t.Side, Piece{Part: PartFillet, Curve: root.fillet, SmoothEnd: true})
	}
	t.Side = append(t.Side, Piece{Part: PartFlank, SmoothEnd: tp.part == PartTipRounding,
		Curve: Involute{BaseRadius: g.rb, BaseHalfAngle: g.psiBase, From: root.formRoll, To: tp.flankRoll}})
	if tp.edge != nil {
		t.Side = append(t.Side, Piece{Part: tp.part, Curve: tp.edge, SmoothEnd: tp.part == PartTipRounding})
	}
	t.Root = CircleArc{Radius: g.tipRadius, From: math.Pi/2 + g.space - tp.landHalf, To: math.Pi/2 + g.space + tp.landHalf}
	t.Dimensions = g.dimensions(s, tp, root)
	return t, nil
}

// toothHalf is the half angle of the ring's tooth at the radius R >= rb, pi/z less that
// of the space.
func (g ringSpace) toothHalf(radius float64) float64 { return g.space - g.halfAngle(radius) }

// settleTip finds the tip circle, as asked or
//
//	r_a = r - m (h_aP + x - k)
//
// or further out where a least tip thickness is asked for; a ring's tooth grows thinner
// towards the axis.
func (g *ringSpace) settleTip(s Spec) (warnings []Finding, found Violations) {
	given := s.TipDiameter != 0
	g.tipRadius = s.TipDiameter / 2
	depth := s.Rack.Addendum + s.ProfileShift*g.m - s.TipShortening
	if !given {
		g.tipRadius = g.r - depth
	}
	if g.tipRadius-g.rb < leastEdge*g.m {
		// r - depth >= rb asks for m z (1 - cos alpha)/2 >= depth.
		least := math.Ceil(2*depth/(g.m*(1-math.Cos(g.alpha))) + 2*leastEdge)
		f := Finding{Rule: RuleTipInsideBase, Param: ParamTeeth, Value: NumberOf(float64(s.Teeth)), Bound: NumberOf(least),
			Also: []Quantity{LengthOf(2 * g.tipRadius), LengthOf(2 * g.rb)},
			Text: "with {value} teeth the ring's tip circle {0} would lie inside its base circle {1}, where there is no involute",
			Hint: "take {bound} teeth or more, a smaller --addendum or --profile-shift, or more --tip-shortening"}
		if given {
			f.Param, f.Value, f.Bound = ParamTipDiameter, f.Also[0], f.Also[1].AtLeast()
			f.Text, f.Hint = "the ring's tip circle {value} would lie inside its base circle {bound}, where there is no involute", "make the tip diameter larger than {bound}"
		}
		return nil, Violations{f}
	}
	least := math.Max(s.MinTipThickness, leastEdge*g.m)
	thick := func(radius float64) float64 { return 2*radius*g.toothHalf(radius) - least }
	if thick(g.tipRadius) >= 0 {
		return nil, nil
	}
	outer := g.r + s.Rack.Dedendum + math.Abs(s.ProfileShift)*g.m
	if given || s.MinTipThickness == 0 || thick(outer) < 0 {
		f := Finding{Rule: RulePointedTip, Param: ParamTipDiameter, Value: LengthOf(2 * g.tipRadius),
			Text: "the ring's tooth comes to a point before the tip diameter {value}",
			Hint: "raise --tip-diameter or --tip-shortening, or lower --thinning"}
		if thick(outer) >= 0 {
			f.Bound = LengthOf(2 * bracketedRoot(thick, g.tipRadius, outer)).AtLeast()
			f.Hint = "the tip diameter must be at least {bound}; or set --min-tip-thickness to have it raised"
		}
		return nil, Violations{f}
	}
	asked := g.tipRadius
	g.tipRadius = bracketedRoot(thick, asked, outer)
	return []Finding{{Rule: RuleTipLowered, Param: ParamMinTipThickness, Value: LengthOf(least), Bound: LengthOf(2 * g.tipRadius),
		Also: []Quantity{LengthOf(2 * asked)},
		Text: "the ring's tip diameter is raised from {0} to {bound} to keep a tip thickness of {value}"}}, nil
}

// roundRoot rounds the root by arcs tangent to the flanks and the root circle
//
//	r_f = r + m (h_fP - x),   by infeed + E/(2 tan alpha)
//
// as the tip of an external tooth is rounded. The largest radius leaves no root land.
func (g ringSpace) roundRoot(s Spec) (root ringRoot, warnings []Finding, found Violations) {
	radius := g.r + s.Rack.Dedendum - s.ProfileShift*g.m
	if s.ThinningBy == ThinByInfeed {
		radius += s.Thinning / (2 * g.tan)
	}
	if radius-g.tipRadius < leastEdge*g.m {
		return root, nil, Violations{{Rule: RuleNoFlank, Param: ParamTipDiameter, Value: LengthOf(2 * g.tipRadius), Bound: LengthOf(2 * radius).AtMost(),
			Text: "the tip diameter {value} lies at or above the root circle {bound}", Hint: "the tip diameter must be below {bound}"}}
	}
	if g.halfAngle(radius)*radius < leastEdge*g.m {
		return root, nil, Violations{{Rule: RuleSpaceCloses, Param: ParamProfileShift, Value: NumberOf(s.ProfileShift), Also: []Quantity{LengthOf(2 * radius)},
			Text: "the space between the ring's teeth closes before its root circle {0} at a profile shift of {value}",
			Hint: "lower --profile-shift or --dedendum"}}
	}
	root = ringRoot{radius: radius, landHalf: g.halfAngle(radius), formRoll: rollAt(radius, g.rb)}
	tipRoll := rollAt(g.tipRadius, g.rb)
	room := func(q float64) float64 {
		if radius-q <= g.rb {
			return math.Inf(-1)
		}
		roll, land := g.tipRounding(radius, q)
		return math.Min(land*radius, (roll+q/g.rb-tipRoll)*g.rb-leastEdge*g.m)
	}
	full := largestBelow(room, radius-g.rb)
	q := s.Rack.RootRadius
	switch {
	case s.Rounding == RoundingFull || math.Abs(q-full) <= noise*g.m:
		q = full
	case q <= full:
	case s.Rounding == RoundingExplicit:
		return root, nil, Violations{{Rule: RuleRoundingTooLarge, Param: ParamRootRadius, Value: LengthOf(q), Bound: LengthOf(full).AtMost(),
			Text: "the ring's root takes no rounding of {value}", Hint: "the largest is {bound}; ask for that or for --root-radius full"}}
	default:
		warnings = append(warnings, Finding{Rule: RuleRoundingLowered, Param: ParamRootRadius, Value: LengthOf(q), Bound: LengthOf(full),
			Text: "the rack's root radius {value} does not fit the ring's root and is lowered to {bound}"})
		q = full
	}
	if q < leastEdge*g.m {
		return root, warnings, nil
	}
	roll, land := g.tipRounding(radius, q)
	if land*radius < leastEdge*g.m {
		land = 0 // what is left is nothing but rounding
	}
	root.landHalf, root.formRoll, root.least = land, roll+q/g.rb, q
	center := CircleArc{Radius: radius - q}.At(math.Pi/2 + land)
	root.fillet = CircleArc{Center: center, Radius: q, From: math.Pi/2 + land, To: math.Pi + g.psiBase - root.formRoll}
	return root, warnings, nil
}
