package profile

import "math"

// Dimensions are the sizes of a solved part in mm, named as in ISO 21771:2007.
// Circles are given by their diameters; thicknesses are measured along the arc. A rack
// has no circles and its diameters are 0; its thickness is on the datum line, and the
// ends of its flank are given by their heights over it.
type Dimensions struct {
	Module            float64
	Teeth             int
	ReferenceDiameter float64 // d = m z
	BaseDiameter      float64 // d_b = d cos alpha
	TipDiameter       float64 // d_a
	RootDiameter      float64 // d_f
	FormDiameter      float64 // d_Ff, where the flank ends at the root
	TipFormDiameter   float64 // d_Fa, where rounding or chamfer ends it at the tip
	CircularPitch     float64 // p = pi m
	BasePitch         float64 // p_b = p cos alpha
	ToothThickness    float64 // s, on the reference circle
	SpaceWidth        float64 // e = p - s
	TipThickness      float64 // s_a, between the flanks on the tip circle
	TipLand           float64 // what rounding or chamfer leaves of it
	Addendum          float64 // h_a, from the reference to the tip circle
	Dedendum          float64 // h_f, from the reference to the root circle
	WholeDepth        float64 // h = h_a + h_f
	WorkingDepth      float64 // whole depth less clearance
	Clearance         float64 // c, under the tip of a mate of the same rack, infeed included
	MinFilletRadius   float64 // least radius of curvature of the fillet

	FormHeight, TipFormHeight float64 // of a rack only
}

// DiametralPitch is teeth per inch of reference diameter, 25.4/m.
func (d Dimensions) DiametralPitch() float64 { return millimetresPerInch / d.Module }

// dimensions collects the sizes.
func (g generation) dimensions(s Spec, t tip, r root) Dimensions {
	pitch := math.Pi * g.m
	thick := thickness(s)
	rf := g.rootRadius()
	clearance := s.Rack.Dedendum - s.Rack.Addendum + s.ProfileShift*g.m - g.shift
	whole := t.radius - rf
	tipForm := t.radius
	if t.edge != nil {
		tipForm = g.rb * math.Hypot(1, t.flankRoll)
	}
	return Dimensions{
		Module:            g.m,
		Teeth:             s.Teeth,
		ReferenceDiameter: 2 * g.r,
		BaseDiameter:      2 * g.rb,
		TipDiameter:       2 * t.radius,
		RootDiameter:      2 * rf,
		FormDiameter:      2 * r.formRadius,
		TipFormDiameter:   2 * tipForm,
		CircularPitch:     pitch,
		BasePitch:         pitch * math.Cos(g.alpha),
		ToothThickness:    thick,
		SpaceWidth:        pitch - thick,
		TipThickness:      2 * t.radius * g.halfAngle(t.radius),
		TipLand:           2 * t.radius * t.landHalf,
		Addendum:          t.radius - g.r,
		Dedendum:          g.r - rf,
		WholeDepth:        whole,
		WorkingDepth:      whole - clearance,
		Clearance:         clearance,
		MinFilletRadius:   r.fillet.LeastRadius(),
	}
}

// Circle is a circle about the gear axis, for reference.
type Circle struct {
	Name   string
	Radius float64 // mm
}

// ReferenceCircles are the circles a drawing of the gear shows for reference, from
// the outside inwards. Tip and root circle are not among them: they would lie upon
// the outline's own arcs.
func (t *Tooth) ReferenceCircles() []Circle {
	d := t.Dimensions
	circles := []Circle{{"reference", d.ReferenceDiameter / 2}, {"base", d.BaseDiameter / 2}, {"form", d.FormDiameter / 2}}
	if d.TipFormDiameter < d.TipDiameter {
		circles = append([]Circle{{"tip form", d.TipFormDiameter / 2}}, circles...)
	}
	return circles
}
