package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// straight is a straight rack: the gear of infinitely many teeth. Its flanks, land and
// root are lines and its fillets arcs, all exact. Heights are over the datum line, in mm.
//
// The tooth's half thickness at the height y is s/2 - y tan alpha, with s on the datum
// line as of a gear; the root lies where the generating rack's tip does, with the flat
// and the rounding of generation.place.
type straight struct {
	generation
	half float64 // mm, half thickness on the datum line
	tip  float64 // mm, height of the land
}

// root is the height of the root line, x_e m - h.
func (g straight) root() float64 { return g.shift - g.h }

// flank is the point of the left flank at the height y.
func (g straight) flank(y float64) r2.Vec { return r2.Vec{X: y*g.tan - g.half, Y: y} }

// solveRack makes the tooth of a rack.
func solveRack(s Spec) (*Tooth, error) {
	g := straight{generation: newGeneration(s), half: thickness(s) / 2}
	rounding, harmless := g.roundRackTip(s)
	var warnings []Finding
	var found Violations
	if harmless {
		warnings = rounding
	} else {
		found = rounding
	}
	s.Rack.RootRadius = g.rho
	g.tip = s.Rack.Addendum + s.ProfileShift*g.m - s.TipShortening
	form := g.root() + g.rho*(1-g.sin)
	if found == nil && g.tip-form < leastEdge*g.m {
		found = append(found, Finding{Rule: RuleTipBelowRoot, Param: ParamTipShortening, Value: LengthOf(s.TipShortening), Bound: LengthOf(s.TipShortening + g.tip - form).AtMost(),
			Text: "with a tip shortening of {value} the rack has no flank", Hint: "shorten by less than {bound}"})
	}
	lowered, more := g.settleTip(s)
	warnings = append(warnings, lowered...)
	if found = append(found, more...); found != nil {
		return nil, found
	}
	land, top, edge, part, more := g.tipEdge(s, form)
	if more != nil {
		return nil, more
	}
	t := &Tooth{Spec: s, Warnings: warnings}
	t.Form, t.Teeth, t.Advance, t.LandSmooth = FormRack, s.Teeth, math.Pi*g.m, part == PartTipRounding
	t.Land = StraightLine{r2.Vec{X: land, Y: g.tip}, r2.Vec{X: -land, Y: g.tip}}
	if edge != nil {
		t.Side = append(t.Side, Piece{Part: part, Curve: edge, SmoothEnd: part == PartTipRounding})
	}
	t.Side = append(t.Side, Piece{Part: PartFlank, Curve: StraightLine{g.flank(top), g.flank(form)}, SmoothEnd: g.rho > 0})
	corner := g.flank(form)
	if g.rho > 0 {
		center := r2.Vec{X: g.flank(g.root()+g.rho).X - g.rho/math.Cos(g.alpha), Y: g.root() + g.rho}
		arc := CircleArc{Center: center, Radius: g.rho, From: -g.alpha, To: -math.Pi / 2}
		t.Side = append(t.Side, Piece{Part: PartFillet, Curve: arc, SmoothEnd: true})
		corner = r2.Vec{X: center.X, Y: g.root()}
	}
	if g.w > 0 {
		t.Root = StraightLine{corner, r2.Vec{X: -t.Advance - corner.X, Y: g.root()}}
	}
	t.Dimensions = g.dimensions(s, land, top, form)
	return t, nil
}

// settleTip lowers the land where a least thickness asks for it, and refuses a pointed
// tooth. The two flanks meet at the height s/(2 tan alpha).
func (g *straight) settleTip(s Spec) (warnings []Finding, found Violations) {
	least := math.Max(s.MinTipThickness, leastEdge*g.m)
	at := (g.half - least/2) / g.tan
	if g.tip <= at {
		return nil, nil
	}
	if s.MinTipThickness == 0 {
		return nil, Violations{{Rule: RulePointedTip, Param: ParamTipShortening, Value: LengthOf(s.TipShortening), Bound: LengthOf(s.TipShortening + g.tip - at).AtLeast(),
			Text: "the rack's tooth is pointed below its tip",
			Hint: "shorten the tip by at least {bound}, lower --profile-shift or --thinning, or set --min-tip-thickness"}}
	}
	asked := g.tip
	g.tip = at
	return []Finding{{Rule: RuleTipLowered, Param: ParamMinTipThickness, Value: LengthOf(least), Bound: LengthOf(asked - at),
		Text: "the rack's tip is lowered by {bound} to keep a tip thickness of {value}"}}, nil
}

// tipEdge shapes the tip corner: half the land, the height where the flank begins, and
// the rounding or chamfer, if any.
func (g straight) tipEdge(s Spec, form float64) (land, top float64, edge Curve, part Part, found Violations) {
	land, top = -g.flank(g.tip).X, g.tip
	cos := math.Cos(g.alpha)
	switch {
	case s.TipRadius > leastEdge*g.m:
		q := s.TipRadius
		// The center is q/cos alpha beside the flank and q below the land.
		place := func(q float64) (land, top float64) {
			return -g.flank(g.tip-q).X - q/cos, g.tip - q*(1-g.sin)
		}
		room := func(q float64) float64 {
			land, top := place(q)
			return math.Min(land, top-form) - leastEdge*g.m
		}
		if !(room(q) > 0) {
			return 0, 0, nil, 0, Violations{{Rule: RuleTipRadiusTooLarge, Param: ParamTipRadius, Value: LengthOf(q), Bound: LengthOf(largestBelow(room, q)).AtMost(),
				Text: "a tip radius of {value} leaves no tip land or no flank", Hint: "keep --tip-radius below {bound}"}}
		}
		land, top = place(q)
		return land, top, CircleArc{Center: r2.Vec{X: -land, Y: g.tip - q}, Radius: q, From: math.Pi / 2, To: math.Pi - g.alpha}, PartTipRounding, nil
	case s.TipChamfer > leastEdge*g.m:
		c := s.TipChamfer
		if room := math.Min(land, (g.tip-form)/cos) - leastEdge*g.m; c >= room {
			return 0, 0, nil, 0, Violations{{Rule: RuleTipChamferTooLarge, Param: ParamTipChamfer, Value: LengthOf(c), Bound: LengthOf(math.Max(room, 0)).AtMost(),
				Text: "a tip chamfer of {value} leaves no tip land or no flank", Hint: "keep --tip-chamfer below {bound}"}}
		}
		land -= c
		top -= c * cos
		return land, top, StraightLine{r2.Vec{X: -land, Y: g.tip}, g.flank(top)}, PartTipChamfer, nil
	}
	return land, top, nil, 0, nil
}

// dimensions collects the sizes of a rack, which has no diameters.
func (g straight) dimensions(s Spec, land, top, form float64) Dimensions {
	pitch := math.Pi * g.m
	clearance := s.Rack.Dedendum - s.Rack.Addendum + s.ProfileShift*g.m - g.shift
	whole := g.tip - g.root()
	return Dimensions{
		Module:          g.m,
		Teeth:           s.Teeth,
		CircularPitch:   pitch,
		BasePitch:       pitch * math.Cos(g.alpha),
		ToothThickness:  2 * g.half,
		SpaceWidth:      pitch - 2*g.half,
		TipThickness:    -2 * g.flank(g.tip).X,
		TipLand:         2 * land,
		Addendum:        g.tip,
		Dedendum:        -g.root(),
		WholeDepth:      whole,
		WorkingDepth:    whole - clearance,
		Clearance:       clearance,
		MinFilletRadius: g.rho,
		FormHeight:      form,
		TipFormHeight:   top,
	}
}
