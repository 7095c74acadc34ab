package profile

import "math"

// BasicRack is the basic rack tooth profile in transverse section (ISO 53:1998).
// The generating rack is its counterpart: Dedendum is how deep the generating
// rack's tip reaches below the datum line, and RootRadius its tip rounding.
type BasicRack struct {
	PressureAngle float64 // rad
	Addendum      float64 // mm
	Dedendum      float64 // mm
	RootRadius    float64 // mm
}

// Rounding says how the root radius of a Spec's rack is meant.
type Rounding uint8

// The ways a root radius can be meant.
const (
	RoundingDefault  Rounding = iota // the standard's; lowered with a warning where it does not fit
	RoundingExplicit                 // asked for; refused where it does not fit
	RoundingFull                     // the largest that fits, RootRadius is ignored
)

// FullRadius is the largest tip rounding the generating rack takes, where the
// two roundings of its tooth meet and no flat is left:
//
//	rho_full = (pi m/4 + E_f/2 - h tan alpha) / tan((pi/2 - alpha)/2)
//
// for the module m in mm and a rack tooth widened by widening = E_f in mm. It is
// negative when the rack's own flanks meet before its tip. It follows from the
// rack's triangle; ISO 53:1998 gives the same limit for E_f = 0.
func (b BasicRack) FullRadius(module, widening float64) float64 {
	alpha, h := b.PressureAngle, b.Dedendum
	return (math.Pi*module/4 + widening/2 - h*math.Tan(alpha)) / math.Tan((math.Pi/2-alpha)/2)
}

// StraightDepth is how far below the datum line the generating rack's flank
// stays straight, h - rho (1 - sin alpha), in mm.
func (b BasicRack) StraightDepth() float64 {
	return b.Dedendum - b.RootRadius*(1-math.Sin(b.PressureAngle))
}

// ShiftWithoutUndercut is the least profile shift coefficient at which the rack
// leaves a gear of so many teeth without undercut, for the module in mm:
//
//	x_min = (h - rho (1 - sin alpha))/m - z sin^2(alpha)/2
//
// (ISO 21771:2007, 5.5, with the depth of the straight flank of the rounded
// rack). Thinning by infeed counts as shift here.
func (b BasicRack) ShiftWithoutUndercut(module float64, teeth int) float64 {
	sin := math.Sin(b.PressureAngle)
	return b.StraightDepth()/module - float64(teeth)*sin*sin/2
}
