package gauge

import (
	"math"

	"flankwright/profile"
)

// Kind says which way the teeth stand.
type Kind uint8

// The kinds of toothed members.
const (
	External Kind = iota
	Ring          // internal gear
	Rack
)

// Spec are the numbers a toothed member is measured by. The four circles are given
// by their radii in mm; for a rack they are heights above its datum line in mm.
type Spec struct {
	Kind          Kind
	Module        float64 // mm
	Teeth         int     // not used for a rack
	PressureAngle float64 // rad
	ProfileShift  float64 // modules, positive thickens the tooth
	Thinning      float64 // mm on the reference circle; negative thickens

	Tip     float64 // tip circle
	TipForm float64 // where the usable flank ends at the tip
	Form    float64 // where it ends at the root
	Root    float64 // root circle; 0 where not known, pins are then not kept off it

	Back float64 // mm, from a rack's datum line to its back; 0 measures from the datum line
}

// OfTooth are the numbers of a solved gear, ring or rack; back is how far a rack's back
// lies below its datum line in mm.
func OfTooth(t *profile.Tooth, back float64) Spec {
	d := t.Dimensions
	if t.Form == profile.FormRack {
		return Spec{Kind: Rack, Module: d.Module, PressureAngle: t.Spec.Rack.PressureAngle, ProfileShift: t.Spec.ProfileShift, Thinning: t.Spec.Thinning,
			Tip: d.Addendum, TipForm: d.TipFormHeight, Form: d.FormHeight, Root: -d.Dedendum, Back: back}
	}
	kind := External
	if t.Form == profile.FormRing {
		kind = Ring
	}
	return Spec{Kind: kind, Module: d.Module, Teeth: d.Teeth,
		PressureAngle: t.Spec.Rack.PressureAngle, ProfileShift: t.Spec.ProfileShift, Thinning: t.Spec.Thinning,
		Tip: d.TipDiameter / 2, TipForm: d.TipFormDiameter / 2, Form: d.FormDiameter / 2, Root: d.RootDiameter / 2}
}

// Gear is a toothed member that can be measured.
type Gear struct {
	spec          Spec
	r, rb         float64 // mm; 0 for a rack
	sin, cos, tan float64 // of the pressure angle
	inv           float64 // its involute function
	thickness     float64 // mm, s
}

// New checks the numbers. The error is of type profile.Violations and holds all
// that was found: values that are not finite or outside the ranges of package
// profile, circles in the wrong order or inside the base circle, flanks that cross.
func New(s Spec) (Gear, error) {
	if found := s.checkRanges(); found != nil {
		return Gear{}, found
	}
	g := Gear{spec: s, tan: math.Tan(s.PressureAngle), inv: profile.Inv(s.PressureAngle)}
	g.sin, g.cos = math.Sincos(s.PressureAngle)
	if s.Kind != Rack {
		g.r = s.Module * float64(s.Teeth) / 2
		g.rb = g.r * g.cos
	}
	g.thickness = Thickness(s.Module, s.PressureAngle, s.ProfileShift, s.Thinning)
	if found := g.checkFlank(); found != nil {
		return Gear{}, found
	}
	return g, nil
}

// Thickness is the tooth thickness in mm on the reference circle (a rack's datum
// line), along the arc,
//
//	s = m (pi/2 + 2 x tan alpha) - E
//
// (ISO 21771:2007, 5.4.2, less the thinning), for a ring's own tooth too.
func Thickness(module, pressureAngle, shift, thinning float64) float64 {
	return module*(math.Pi/2+2*shift*math.Tan(pressureAngle)) - thinning
}

// Thickness is the gear's tooth thickness in mm on the reference circle.
func (g Gear) Thickness() float64 { return g.thickness }

// WithThickness is the gear with teeth of another thickness in mm and the same
// circles, as measuring finds it; refused like the numbers of New.
func (g Gear) WithThickness(thickness float64) (Gear, error) {
	made := g.withThickness(thickness)
	if _, err := New(made.spec); err != nil {
		return Gear{}, err
	}
	return made, nil
}

// withThickness is the same without the checks.
func (g Gear) withThickness(thickness float64) Gear {
	g.spec.Thinning += g.thickness - thickness
	g.thickness = thickness
	return g
}

// pitch is the circular pitch in mm.
func (g Gear) pitch() float64 { return math.Pi * g.spec.Module }

// z is the number of teeth.
func (g Gear) z() float64 { return float64(g.spec.Teeth) }

// roll is the roll angle at a radius of at least rb: t = sqrt(R^2 - rb^2)/rb.
func (g Gear) roll(radius float64) float64 {
	return math.Sqrt((radius-g.rb)*(radius+g.rb)) / g.rb
}

// radius is where the roll angle is t: rb sqrt(1 + t^2).
func (g Gear) radius(roll float64) float64 { return g.rb * math.Hypot(1, roll) }

// rollInv is t - atan t, the involute function by the roll angle.
func rollInv(roll float64) float64 { return profile.Inv(math.Atan(roll)) }

// baseSpace is half the angle of an external tooth space on the base circle,
// negative where neighbouring involutes would cross there,
//
//	pi/z - s/d - inv alpha
//
// or of a ring's space, pi/z - s/d + inv alpha.
func (g Gear) baseSpace() float64 {
	half := math.Pi/g.z() - g.thickness/(2*g.r)
	if g.spec.Kind == Ring {
		return half + g.inv
	}
	return half - g.inv
}

// halfSpace is half the width of the space: the angle in rad at a roll angle, for a
// rack the length in mm at a height above the datum line.
func (g Gear) halfSpace(at float64) float64 {
	switch g.spec.Kind {
	case Ring:
		return g.baseSpace() - rollInv(at)
	case Rack:
		return (g.pitch()-g.thickness)/2 + at*g.tan
	}
	return g.baseSpace() + rollInv(at)
}

// halfTooth is half the tooth in the same terms.
func (g Gear) halfTooth(at float64) float64 {
	if g.spec.Kind == Rack {
		return g.pitch()/2 - g.halfSpace(at)
	}
	return math.Pi/g.z() - g.halfSpace(at)
}

// along is a circle in the terms of halfSpace: its roll angle, or the height.
func (g Gear) along(circle float64) float64 {
	if g.spec.Kind == Rack {
		return circle
	}
	return g.roll(circle)
}

// contact is the inverse of along, as it is reported: the diameter, or the height.
func (g Gear) contact(at float64) float64 {
	if g.spec.Kind == Rack {
		return at
	}
	return 2 * g.radius(at)
}

// flank are the ends of the usable flank in those terms, lower first.
func (g Gear) flank() (low, high float64) {
	a, b := g.along(g.spec.Form), g.along(g.spec.TipForm)
	return math.Min(a, b), math.Max(a, b)
}

// size is a circle as it is reported: its diameter, or a rack's height.
func (g Gear) size(circle float64) profile.Quantity {
	if g.spec.Kind == Rack {
		return profile.LengthOf(circle)
	}
	return profile.LengthOf(2 * circle)
}
