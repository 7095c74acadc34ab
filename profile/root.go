package profile

import "math"

// root is the solved root of a tooth: its left fillet and where the flank ends.
type root struct {
	fillet     Fillet
	formRoll   float64 // roll angle of the flank at the form circle
	formRadius float64 // mm
	undercut   bool
}

// solveRoot finds the fillet and its joint with the flank.
//
// Without undercut, h - rho (1 - sin alpha) - x_e m <= r sin^2 alpha, the two
// meet tangentially where the rack's straight flank ends (Litvin and Fuentes, 2nd
// ed., 6.3):
//
//	rb t_F = r sin alpha - (h - rho (1 - sin alpha) - x_e m)/sin alpha
//
// With undercut the fillet cuts the flank in a corner above the base circle.
func (g generation) solveRoot() root {
	f := Fillet{Reference: g.r, HalfWidth: g.w, Height: g.vc, Rounding: g.rho,
		SpaceMiddle: g.space, From: g.alpha, To: math.Pi / 2}
	depth := g.h - g.rho*(1-g.sin) - g.shift
	if roll := (g.r*g.sin - depth/g.sin) / g.rb; roll >= 0 {
		return root{fillet: f, formRoll: roll, formRadius: g.rb * math.Hypot(1, roll)}
	}
	f.From = g.undercutJunction(f)
	radius := math.Max(f.radius(f.From), g.rb)
	return root{fillet: f, formRoll: rollAt(radius, g.rb), formRadius: radius, undercut: true}
}

// undercutJunction is the contact normal angle at which the fillet crosses the
// flank. The fillet's radius grows steadily from the root to p = alpha (its rate
// by -p is r cos p/R), so position is solved in one unknown: at equal radius the
// two must have equal half angles. The fillet is inside the flank on the base
// circle and outside it at p = alpha, where it touches the involute's other branch.
//
// Close to the onset of undercut the angles agree to rounding over a whole range
// of p; any p of it leaves no gap, since the flank's parameter is taken at the
// fillet's own radius.
func (g generation) undercutJunction(f Fillet) float64 {
	onBase := bracketedRoot(func(p float64) float64 { return f.radius(p) - g.rb }, g.alpha, math.Pi/2)
	return bracketedRoot(func(p float64) float64 {
		radius := math.Max(f.radius(p), g.rb)
		return f.halfAngle(p) - g.halfAngle(radius)
	}, onBase, g.alpha)
}

// waist is the least half angle of the tooth between its fillets up to the tip
// radius, in rad; below zero they cut the tooth off. It lies where the fillet runs
// radially,
//
//	r sin^2 p - rho sin p + vc = 0
//
// or, if that is not on the fillet, at one of its ends. +Inf where the whole
// fillet lies above the tip.
func (r root) waist(tip float64) float64 {
	f := r.fillet
	from := f.From
	if f.radius(f.To) >= tip {
		return math.Inf(1)
	}
	if f.radius(from) > tip {
		from = bracketedRoot(func(p float64) float64 { return f.radius(p) - tip }, from, f.To)
	}
	least := math.Min(f.halfAngle(from), f.halfAngle(f.To))
	if disc := f.Rounding*f.Rounding - 4*f.Reference*f.Height; disc >= 0 {
		if sin := (f.Rounding + math.Sqrt(disc)) / (2 * f.Reference); sin > math.Sin(from) && sin < 1 {
			least = math.Min(least, f.halfAngle(math.Asin(sin)))
		}
	}
	return least
}

// checkRoot lists what keeps the root from being made. tip is the tip radius in
// mm; s is the spec, for the words.
func (g generation) checkRoot(s Spec, r root, tip float64) Violations {
	clear := NumberOf(s.Rack.ShiftWithoutUndercut(g.m, s.Teeth) + (s.ProfileShift*g.m-g.shift)/g.m).AtLeast()
	if waist := r.waist(tip); waist <= 0 {
		return Violations{{Rule: RuleToothSevered, Param: ParamProfileShift, Value: NumberOf(s.ProfileShift), Bound: clear,
			Text: "undercut cuts the tooth off at its root at a profile shift of {value}: its two fillets cross",
			Hint: "a profile shift of {bound} or more avoids undercut; a smaller --dedendum or more teeth lessen it"}}
	}
	if tip-r.formRadius > leastEdge*g.m {
		return nil
	}
	if r.undercut {
		return Violations{{Rule: RuleNoFlank, Param: ParamProfileShift, Value: NumberOf(s.ProfileShift), Bound: clear,
			Also: []Quantity{LengthOf(2 * r.formRadius), LengthOf(2 * tip)},
			Text: "undercut at a profile shift of {value} leaves no flank: it reaches to diameter {0}, and the tip diameter is {1}",
			Hint: "a profile shift of {bound} or more avoids undercut"}}
	}
	return Violations{{Rule: RuleTipBelowRoot, Param: ParamTipDiameter, Value: LengthOf(2 * tip), Bound: LengthOf(2 * r.formRadius).AtLeast(),
		Text: "the tip diameter {value} lies at or below the end of the flank at {bound}",
		Hint: "the tip diameter must be above {bound}"}}
}

// warnUndercut tells how far the flank still reaches, and which shift would keep
// it whole.
func (g generation) warnUndercut(s Spec, r root) Finding {
	clear := s.Rack.ShiftWithoutUndercut(g.m, s.Teeth) + (s.ProfileShift*g.m-g.shift)/g.m
	return Finding{Rule: RuleUndercut, Param: ParamProfileShift, Value: NumberOf(s.ProfileShift), Bound: NumberOf(clear).AtLeast(),
		Also: []Quantity{LengthOf(2 * r.formRadius), LengthOf(2 * g.rb)},
		Text: "the tooth is undercut: its flank ends at form diameter {0} (base diameter {1}); a profile shift of {bound} or more avoids it"}
}
