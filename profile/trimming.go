package profile

import "math"

// InRing is an external gear, or a cutter, in a ring of more teeth. Radii are mm.
type InRing struct {
	Teeth     [2]int     // of the gear and the ring
	Base, Tip [2]float64 // their base and tip radii
	Angle     float64    // rad, operating pressure angle
}

// PassesRadially says whether the gear can be moved in and out of the ring across its
// axis (SDP/SI, Elements of Metric Gear Technology, equations 5-8 and 5-9, trimming
// interference):
//
//	theta_1 + inv a_a1 - inv a_w >= (z_2/z_1) (theta_2 + inv a_a2 - inv a_w)
//	theta_1 = asin sqrt((1 - (cos a_a1/cos a_a2)^2)/(1 - (z_1/z_2)^2))
//	theta_2 = asin sqrt(((cos a_a2/cos a_a1)^2 - 1)/((z_2/z_1)^2 - 1))
//
// It is false where these are not defined: there the two are too near each other in size.
func (r InRing) PassesRadially() bool {
	z1, z2 := float64(r.Teeth[0]), float64(r.Teeth[1])
	cos1, cos2 := r.Base[0]/r.Tip[0], r.Base[1]/r.Tip[1]
	square := func(v float64) float64 { return v * v }
	sin1 := (1 - square(cos1/cos2)) / (1 - square(z1/z2))
	sin2 := (square(cos2/cos1) - 1) / (square(z2/z1) - 1)
	if !(sin1 >= 0 && sin1 <= 1 && sin2 >= 0 && sin2 <= 1) {
		return false
	}
	inv := Inv(r.Angle)
	one := math.Asin(math.Sqrt(sin1)) + Inv(math.Acos(cos1)) - inv
	two := math.Asin(math.Sqrt(sin2)) + Inv(math.Acos(cos2)) - inv
	return one >= z2/z1*two
}
