package profile

import "math"

// Tooth is one solved tooth: exact curves and dimensions. The whole outline is its left
// half, the mirror image of it, and their repetitions.
type Tooth struct {
	Spec       Spec // with the rounding as made
	Dimensions Dimensions
	Warnings   []Finding

	// Undercut says that flank and fillet meet in a corner.
	Undercut bool

	// Outline is the part's edge.
	Outline
}

// axisSlack is the smallest root radius in modules at which the tooth's thickness
// over its fillets still has digits. Long before, such a root has no strength, and
// the two fillets of a tooth cross.
const axisSlack = 1e-6

// Solve makes the tooth a Spec asks for, or says why it cannot be made: the error
// is of type Violations and holds all that was found.
func Solve(s Spec) (*Tooth, error) {
	if found := s.checkLimits(); found != nil {
		return nil, found
	}
	switch s.Form {
	case FormRing:
		return solveRing(s)
	case FormRack:
		return solveRack(s)
	}
	return solveGear(s)
}

// solveGear makes the tooth of an external gear.
func solveGear(s Spec) (*Tooth, error) {
	g := newGeneration(s)
	var warnings []Finding
	rounding, harmless := g.roundRackTip(s)
	var found Violations
	if harmless {
		warnings = append(warnings, rounding...)
	} else {
		found = append(found, rounding...)
	}
	s.Rack.RootRadius = g.rho
	if rf := g.rootRadius(); rf <= axisSlack*g.m {
		least := s.ProfileShift - rf/g.m + axisSlack
		found = append(found, Finding{Rule: RuleRootCircle, Param: ParamTeeth, Value: NumberOf(float64(s.Teeth)), Bound: NumberOf(least).AtLeast(),
			Also: []Quantity{LengthOf(rf)},
			Text: "the root circle vanishes: the cut reaches the gear axis with {value} teeth",
			Hint: "take more teeth, a smaller --dedendum, or a --profile-shift above {bound}"})
	}
	radius, lowered, refused := g.tipRadius(s)
	warnings = append(warnings, lowered...)
	if found = append(found, refused...); found != nil {
		return nil, found
	}
	r := g.solveRoot()
	if found := g.checkRoot(s, r, radius); found != nil {
		return nil, found
	}
	if r.undercut {
		warnings = append(warnings, g.warnUndercut(s, r))
	}
	tp, refused := g.solveTip(s, radius, r.formRoll)
	if refused != nil {
		return nil, refused
	}
	t := &Tooth{Spec: s, Warnings: warnings, Undercut: r.undercut}
	t.Teeth, t.LandSmooth = s.Teeth, tp.part == PartTipRounding
	t.assemble(g, tp, r)
	t.Dimensions = g.dimensions(s, tp, r)
	return t, nil
}

// assemble lines the curves up in the direction of travel.
func (t *Tooth) assemble(g generation, tp tip, r root) {
	t.Land = CircleArc{Radius: tp.radius, From: math.Pi/2 - tp.landHalf, To: math.Pi/2 + tp.landHalf}
	if tp.edge != nil {
		t.Side = append(t.Side, Piece{Part: tp.part, Curve: tp.edge, SmoothEnd: tp.part == PartTipRounding})
	}
	// A sharp rack tip whose corner lies on the pitch line leaves no fillet.
	hasFillet := g.rho > 0 || g.vc != 0
	t.Side = append(t.Side, Piece{Part: PartFlank, SmoothEnd: hasFillet && !r.undercut,
		Curve: Involute{BaseRadius: g.rb, BaseHalfAngle: g.psiBase, From: tp.flankRoll, To: r.formRoll}})
	if hasFillet {
		t.Side = append(t.Side, Piece{Part: PartFillet, Curve: r.fillet, SmoothEnd: true})
	}
	if g.w > 0 {
		half := g.w / g.r
		middle := math.Pi/2 + g.space
		t.Root = CircleArc{Radius: g.rootRadius(), From: middle - half, To: middle + half}
	}
}
