package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Around is what the teeth leave for the body. Lengths are mm.
type Around struct {
	Form         profile.Form
	RootDiameter float64 // of a gear inside of which, of a ring outside of which the body is
	WholeDepth   float64
	Module       float64 // of a ring, for the least rim

	// RimDiameter is the outer edge of a ring; 0 where it is not known.
	RimDiameter float64
	// Bar is the body of a rack.
	Bar Bar
}

// Bar is the body of a rack below its teeth: a rectangle, in mm.
type Bar struct{ Left, Right, Back, Root float64 }

// clearance is the distance from p to the nearest edge of what the teeth leave.
func (a Around) clearance(p r2.Vec) float64 {
	switch a.Form {
	case profile.FormRing:
		return math.Min(r2.Norm(p)-a.RootDiameter/2, a.RimDiameter/2-r2.Norm(p))
	case profile.FormRack:
		return math.Min(math.Min(p.X-a.Bar.Left, a.Bar.Right-p.X), math.Min(p.Y-a.Bar.Back, a.Bar.Root-p.Y))
	}
	return a.RootDiameter/2 - r2.Norm(p)
}

// LeastRim is the thinnest rim of a ring in modules: thinner ones are no part but a
// spring (ours; common practice asks for much more, of which rim warns).
const LeastRim = 0.5

// rim judges a ring's outer edge.
func (b *builder) rim() {
	a := b.around
	if a.Form != profile.FormRing {
		return
	}
	if a.RimDiameter == 0 {
		if len(b.spec.HoleCircles) > 0 {
			b.refuse(profile.Finding{Rule: RuleHoleThroughRim, Param: ParamHoleCircle, Value: profile.LengthOf(b.spec.HoleCircles[0].Diameter),
				Text: "holes {value} have no rim to lie in", Hint: "give --rim-diameter as well"})
		}
		return
	}
	thick, least := (a.RimDiameter-a.RootDiameter)/2, LeastRim*a.Module
	if thick < least {
		b.refuse(profile.Finding{Rule: RuleRimTooThin, Param: profile.ParamRimDiameter, Value: profile.LengthOf(a.RimDiameter),
			Bound: profile.LengthOf(a.RootDiameter + 2*least).AtLeast(), Also: []profile.Quantity{profile.LengthOf(a.RootDiameter)},
			Text: "a rim of outer diameter {value} is nothing around the root diameter {0}", Hint: "make the rim diameter at least {bound}"})
		return
	}
	if backup := backupRatio * b.depth; thick < backup {
		b.body.Warnings = append(b.body.Warnings, profile.Finding{Rule: profile.RuleThinRim, Param: profile.ParamRimDiameter,
			Value: profile.LengthOf(thick), Bound: profile.LengthOf(backup).AtLeast(),
			Text: "the rim around the roots is only {value} thick; AGMA 2001-D04 reduces the load below {bound} (1.2 whole depths)"})
	}
}

// holesInRim checks holes against both edges of a ring's rim.
func (b *builder) holesInRim(h HoleCircle) {
	rim := b.around.RimDiameter
	if rim == 0 {
		return // refused by rim
	}
	inner, outer := h.Circle-2*b.root, rim-h.Circle // what a hole's diameter may be
	largest := math.Min(inner, outer)
	if (largest-h.Diameter)/2 >= leastPiece {
		return
	}
	rule, text := RuleHoleIntoRoots, "holes {value} on circle {0} cut into the roots at diameter {1}"
	if outer < inner {
		rule, text = RuleHoleThroughRim, "holes {value} on circle {0} cut through the outer edge at diameter {2}"
	}
	f := h.violation(rule, largest, text, "make the holes smaller than {bound}, on a circle half way between {1} and {2}", 2*b.root, rim)
	if largest <= 2*leastPiece {
		f.Value, f.Bound = profile.LengthOf(h.Circle), profile.LengthOf((2*b.root+rim)/2)
		f.Text, f.Hint = "a hole circle {value} lies outside the rim, which is from {1} to {2}", "make it about {bound}"
	}
	b.refuse(f)
}
