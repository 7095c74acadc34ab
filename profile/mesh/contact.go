package mesh

import (
	"math"

	"flankwright/profile"
)

// Contact is the path of contact of two solved members. Lengths are mm.
type Contact struct {
	Ratio        float64    // transverse contact ratio
	ActiveTip    [2]float64 // diameters, or a rack's height, between which the flanks touch
	ActiveRoot   [2]float64
	TipClearance [2]float64 // from the tip of each to the root of the other
	Sliding      [2]float64 // largest specific sliding of each, its sign kept
	// Reach is how far each tip reaches past the end of the other's flank, measured along
	// the line of action; above zero it meets the fillet.
	Reach [2]float64
}

// action is the line of action: where a contact lies on either member, counted from where
// the line touches member 1's base circle.
type action struct {
	Members
	rb1, rb2 float64
	offset   float64 // L2 = offset -+ L1; of a rack the pinion's r sin alpha
	pitch    float64 // mm, a - r of a rack: the pitch line's height over the datum line
}

func (m Members) action(a float64) action {
	cos, sin := math.Cos(m.PressureAngle), math.Sin(m.PressureAngle)
	z1, z2 := m.z()
	c := action{Members: m, rb1: m.Module * z1 / 2 * cos, rb2: m.Module * z2 / 2 * cos}
	if m.Second == profile.FormRack {
		c.offset, c.pitch = m.Reference()*sin, a-m.Reference()
		return c
	}
	c.offset = a * math.Sin(m.OperatingAngle(a))
	return c
}

// length is L at a radius, sqrt(R^2 - rb^2).
func length(radius, base float64) float64 {
	return math.Sqrt(math.Max(0, (radius-base)*(radius+base)))
}

// onFirst is L1 of the contact at a point of member 2's flank: its radius, or a rack's
// height over the datum line.
func (c action) onFirst(second float64) float64 {
	switch c.Second {
	case profile.FormRack:
		return c.offset - (second-c.pitch)/math.Sin(c.PressureAngle)
	case profile.FormRing:
		return length(second, c.rb2) - c.offset
	}
	return c.offset - length(second, c.rb2)
}

// onSecond is the inverse: member 2's radius or height at L1.
func (c action) onSecond(l1 float64) float64 {
	switch c.Second {
	case profile.FormRack:
		return c.pitch + (c.offset-l1)*math.Sin(c.PressureAngle)
	case profile.FormRing:
		return math.Hypot(c.rb2, c.offset+l1)
	}
	return math.Hypot(c.rb2, c.offset-l1)
}

// sliding is the specific sliding of both where L1 is so long,
//
//	1 - z1 rho2/(z2 rho1)   and   1 - z2 rho1/(z1 rho2)
//
// with the radii of curvature rho (ISO 21771:2007, 6.4; of a rack the limit of many teeth).
func (c action) sliding(l1 float64) (first, second float64) {
	z1, z2 := c.z()
	l2 := c.offset - c.sign()*l1
	if c.Second == profile.FormRing {
		l2 = c.offset + l1
	}
	ratio := z1 * l2 / (z2 * l1)
	if c.Second == profile.FormRack {
		ratio = c.offset / l1
	}
	return 1 - ratio, 1 - 1/ratio
}

// larger is the value of the larger magnitude.
func larger(a, b float64) float64 {
	if math.Abs(b) > math.Abs(a) {
		return b
	}
	return a
}

// edges are the ends of a member's flank and its tip and root: radii, or a rack's heights.
type edges struct{ tip, tipForm, form, root float64 }

func edgesOf(t *profile.Tooth) edges {
	d := t.Dimensions
	if t.Form == profile.FormRack {
		return edges{d.Addendum, d.TipFormHeight, d.FormHeight, -d.Dedendum}
	}
	return edges{d.TipDiameter / 2, d.TipFormDiameter / 2, d.FormDiameter / 2, d.RootDiameter / 2}
}

// contact follows the flanks of two members along the line of action. Form circles end
// it as tips do.
func (m Members) contact(a float64, one, two edges) Contact {
	c := m.action(a)
	form1, tip1 := length(one.form, c.rb1), length(one.tipForm, c.rb1)
	start, end := c.onFirst(two.tipForm), tip1
	var out Contact
	out.Reach[1] = form1 - start
	out.Reach[0] = end - c.onFirst(two.form)
	start, end = math.Max(start, form1), math.Min(end, c.onFirst(two.form))
	pb := math.Pi * m.Module * math.Cos(m.PressureAngle)
	out.Ratio = (end - start) / pb
	double := 2.0
	if m.Second == profile.FormRack {
		double = 1
	}
	out.ActiveRoot = [2]float64{2 * math.Hypot(c.rb1, start), double * c.onSecond(end)}
	out.ActiveTip = [2]float64{2 * math.Hypot(c.rb1, end), double * c.onSecond(start)}
	out.TipClearance = m.clearances(a, one, two)
	s1, s2 := c.sliding(start)
	e1, e2 := c.sliding(end)
	out.Sliding = [2]float64{larger(s1, e1), larger(s2, e2)}
	return out
}

// clearances are the gaps between each tip and the other's root on the line of centers.
func (m Members) clearances(a float64, one, two edges) [2]float64 {
	switch m.Second {
	case profile.FormRing:
		return [2]float64{two.root - a - one.tip, two.tip - a - one.root}
	case profile.FormRack:
		return [2]float64{a - two.root - one.tip, a - two.tip - one.root}
	}
	return [2]float64{a - two.root - one.tip, a - two.tip - one.root}
}
