package profile

import "math"

// generation is the rack rolling on the gear's reference circle: the numbers
// every curve of the tooth is made of, in the package's notation.
type generation struct {
	m, alpha, sin, tan float64
	r, rb              float64 // mm
	h, rho             float64 // mm, rack tip depth and rounding
	shift              float64 // mm, x_e m: the shift the root is cut with
	widening           float64 // mm, E_f: by how much the rack's tooth is wider
	psiBase            float64 // rad, half angle of the tooth on the base circle
	space              float64 // rad, pi/z: from a tooth's middle to its space's
	w, vc              float64 // mm, the rounding's center in the rack
}

// newGeneration sets the rack up for a spec within its limits.
//
// The tooth thickness on the reference circle is
//
//	s = m (pi/2 + 2 x tan alpha) - E
//
// (ISO 21771:2007, 5.4.2, less the thinning). By infeed, the rack moves in by
// E/(2 tan alpha); by flank, its tooth is wider by E.
func newGeneration(s Spec) generation {
	g := generation{m: s.Module, alpha: s.Rack.PressureAngle, h: s.Rack.Dedendum, rho: s.Rack.RootRadius}
	g.sin, g.tan = math.Sin(g.alpha), math.Tan(g.alpha)
	g.r = g.m * float64(s.Teeth) / 2
	g.rb = g.r * math.Cos(g.alpha)
	g.space = math.Pi / float64(s.Teeth)
	g.shift, g.widening = s.ProfileShift*g.m, s.Thinning
	if s.ThinningBy == ThinByInfeed {
		g.shift -= s.Thinning / (2 * g.tan)
		g.widening = 0
	}
	g.psiBase = thickness(s)/(2*g.r) + Inv(g.alpha)
	if g.rho < noise*g.m {
		g.rho = 0
	}
	g.place()
	return g
}

// thickness is the tooth thickness on the reference circle in mm.
func thickness(s Spec) float64 {
	return s.Module*(math.Pi/2+2*s.ProfileShift*math.Tan(s.Rack.PressureAngle)) - s.Thinning
}

// place puts the rounding's center:
//
//	w  = pi m/4 + E_f/2 - (h - rho) tan alpha - rho/cos alpha
//	vc = x_e m - h + rho
//
// A sharp corner that misses the pitch line by rounding noise lies on it, so that
// no fillet of such a length is drawn.
func (g *generation) place() {
	g.w = math.Pi*g.m/4 + g.widening/2 - (g.h-g.rho)*g.tan - g.rho/math.Cos(g.alpha)
	g.vc = g.shift - g.h + g.rho
	if g.rho == 0 && math.Abs(g.vc) < noise*g.m {
		g.vc = 0
	}
}

// roundRackTip settles the rounding of the rack's tip: as asked, the full radius,
// or a default lowered to it. The findings are violations unless warning is set.
func (g *generation) roundRackTip(s Spec) (found []Finding, warning bool) {
	full := s.Rack.FullRadius(g.m, g.widening)
	if full < 0 {
		deepest := (math.Pi*g.m/4 + g.widening/2) / g.tan
		return []Finding{{Rule: RuleRackPointed, Param: ParamDedendum, Value: LengthOf(g.h), Bound: LengthOf(deepest).AtMost(),
			Text: "the generating rack's tooth comes to a point before the dedendum {value}",
			Hint: "the dedendum can be at most {bound}; lower --dedendum or --pressure-angle"}}, false
	}
	switch {
	case s.Rounding == RoundingFull || math.Abs(g.rho-full) <= noise*g.m:
		g.fullRound(full)
	case g.rho < full:
	case s.Rounding == RoundingExplicit:
		return []Finding{{Rule: RuleRoundingTooLarge, Param: ParamRootRadius, Value: LengthOf(g.rho), Bound: LengthOf(full).AtMost(),
			Text: "the rack's tip takes no rounding of {value}",
			Hint: "the largest is {bound}; ask for that or for --root-radius full"}}, false
	default:
		found = []Finding{{Rule: RuleRoundingLowered, Param: ParamRootRadius, Value: LengthOf(g.rho), Bound: LengthOf(full),
			Text: "the rack's default root radius {value} does not fit and is lowered to the full radius {bound}"}}
		g.fullRound(full)
	}
	return found, true
}

// noise is the length in modules below which a part of the rack counts as nothing:
// far above what rounding leaves of sums of a few modules, 1e-15, far below what
// anyone could mean.
const noise = 1e-13

// fullRound takes the full radius, at which the flat of the rack's tip vanishes:
// w is set to exactly zero, where place would leave rounding noise of either sign.
func (g *generation) fullRound(full float64) {
	g.rho = full
	g.place()
	g.w = 0
}

// rootRadius is r_f = r + x_e m - h in mm.
func (g generation) rootRadius() float64 { return g.r + g.shift - g.h }

// halfAngle is the half angle of the tooth at the radius R >= rb:
//
//	psi = s/(2r) + inv alpha - inv alpha_R,   cos alpha_R = rb/R
func (g generation) halfAngle(radius float64) float64 {
	return g.psiBase - rollInv(rollAt(radius, g.rb))
}

// pointedRadius is where the two flanks of a tooth meet; 0 if they have done so
// before the base circle.
func (g generation) pointedRadius() float64 {
	if g.psiBase <= 0 {
		return 0
	}
	return g.rb * math.Hypot(1, inverseRollInv(g.psiBase))
}
