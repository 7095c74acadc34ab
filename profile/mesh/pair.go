// Package mesh puts two members into mesh: center distance, profile shifts, thinning,
// tips, and what follows from them; what keeps a pair from working; and the proof on the
// drawn curves, rolled through a pitch of contact.
//
// Member 1 is an external gear, member 2 an external gear, a ring or a rack. Lengths are
// millimetres, angles radians, shifts modules and positive where they thicken the member's
// own tooth (ISO 21771:2007), a ring's too. Symbols, used as locals beside formulas:
//
//	symbol   meaning                                           unit
//	a, a0    center distance, and without shifts               mm
//	aw       operating pressure angle                          rad
//	S        sum of the profile shifts, x1 + x2
//	L        distance along the line of action from the point
//	         where it touches the member's base circle         mm
//	j        backlash on the operating pitch circles           mm
//
// A rack's center distance is from the pinion's axis to the rack's datum line.
package mesh

import (
	"math"

	"flankwright/profile"
)

// Members are two sizes of teeth that may mesh.
type Members struct {
	Module        float64 // mm
	PressureAngle float64 // rad
	Teeth         [2]int  // of a rack not used
	Second        profile.Form
}

// z are the tooth numbers.
func (m Members) z() (z1, z2 float64) { return float64(m.Teeth[0]), float64(m.Teeth[1]) }

// sign is +1 for external teeth, -1 for a ring.
func (m Members) sign() float64 {
	if m.Second == profile.FormRing {
		return -1
	}
	return 1
}

// total is z2 + z1, of a ring z2 - z1.
func (m Members) total() float64 {
	z1, z2 := m.z()
	return z2 + m.sign()*z1
}

// Reference is the center distance without shifts, a0 = m (z2 +- z1)/2, of a rack the
// pinion's reference radius.
func (m Members) Reference() float64 {
	if m.Second == profile.FormRack {
		return m.Module * float64(m.Teeth[0]) / 2
	}
	return m.Module * m.total() / 2
}

// OperatingAngle is aw at a center distance, cos aw = a0 cos alpha/a; NaN below a0 cos
// alpha. Of a rack it is alpha.
func (m Members) OperatingAngle(a float64) float64 {
	if m.Second == profile.FormRack {
		return m.PressureAngle
	}
	return math.Acos(m.Reference() * math.Cos(m.PressureAngle) / a)
}

// ShiftSum is the sum of shifts without backlash at a center distance,
//
//	external  S = (z1 + z2) (inv aw - inv alpha)/(2 tan alpha)
//	ring      S = -(z2 - z1) (inv aw - inv alpha)/(2 tan alpha)
//	rack      S = (a - r)/m
//
// (ISO 21771:2007, 5.6, with its sign of a ring's shift turned round); NaN where there is
// no operating angle.
func (m Members) ShiftSum(a float64) float64 {
	if m.Second == profile.FormRack {
		return (a - m.Reference()) / m.Module
	}
	return m.sign() * m.total() * (profile.Inv(m.OperatingAngle(a)) - profile.Inv(m.PressureAngle)) / (2 * math.Tan(m.PressureAngle))
}

// CenterDistance is the inverse of ShiftSum; NaN where the teeth would have to overlap at
// any distance, inv aw < 0.
func (m Members) CenterDistance(shiftSum float64) float64 {
	if m.Second == profile.FormRack {
		return m.Reference() + shiftSum*m.Module
	}
	inv := profile.Inv(m.PressureAngle) + m.sign()*2*shiftSum*math.Tan(m.PressureAngle)/m.total()
	if !(inv >= 0) {
		return math.NaN()
	}
	return m.Reference() * math.Cos(m.PressureAngle) / math.Cos(profile.InverseInv(inv))
}

// Range are the least and the largest center distance that shifts within their limits
// give.
func (m Members) Range() (least, largest float64) {
	const most = 2 * profile.MaxProfileShift
	a, b := m.CenterDistance(-most), m.CenterDistance(most)
	closest := m.Reference() * math.Cos(m.PressureAngle) // aw = 0
	if math.IsNaN(a) {
		a = closest
	}
	if math.IsNaN(b) {
		b = closest
	}
	return math.Min(a, b), math.Max(a, b)
}

// PitchRadii are the operating pitch radii in mm; a rack's is 0.
func (m Members) PitchRadii(a float64) [2]float64 {
	z1, z2 := m.z()
	switch m.Second {
	case profile.FormRack:
		return [2]float64{m.Reference(), 0}
	case profile.FormRing:
		return [2]float64{a * z1 / (z2 - z1), a * z2 / (z2 - z1)}
	}
	return [2]float64{a * z1 / (z1 + z2), a * z2 / (z1 + z2)}
}

// thickness is s on the reference circle or datum line.
func (m Members) thickness(shift, thinning float64) float64 {
	return m.Module*(math.Pi/2+2*shift*math.Tan(m.PressureAngle)) - thinning
}

// Backlash is the play on the operating pitch circles (a rack's pitch line),
//
//	j = p_w - s_w1 - s_w2,   p_w = 2 pi r_w1/z1
//	s_w = 2 r_w (s/d + inv alpha - inv aw),   of a ring with the other sign of both inv
//
// (ISO 21771:2007, 5.6); negative where the teeth jam.
func (m Members) Backlash(a float64, shift, thinning [2]float64) float64 {
	s := [2]float64{m.thickness(shift[0], thinning[0]), m.thickness(shift[1], thinning[1])}
	if m.Second == profile.FormRack {
		return math.Pi*m.Module - s[0] - (s[1] - 2*(a-m.Reference())*math.Tan(m.PressureAngle))
	}
	rw := m.PitchRadii(a)
	z1, z2 := m.z()
	turn := profile.Inv(m.PressureAngle) - profile.Inv(m.OperatingAngle(a))
	s1 := 2 * rw[0] * (s[0]/(m.Module*z1) + turn)
	s2 := 2 * rw[1] * (s[1]/(m.Module*z2) + m.sign()*turn)
	return 2*math.Pi*rw[0]/z1 - s1 - s2
}

// ThinningFor is the sum of thinnings that adds so much backlash at a center distance,
// j a0/a, since thickness grows with the radius; of a rack j itself.
func (m Members) ThinningFor(backlash, a float64) float64 {
	if m.Second == profile.FormRack {
		return backlash
	}
	return backlash * m.Reference() / a
}
