package gauge

import (
	"math"

	"flankwright/profile"
	"flankwright/profile/internal/bisect"
)

// Pins is a measurement over two pins or balls in opposite spaces of an external
// gear, between two in those of a ring, or over one in a rack's space.
type Pins struct {
	PinDiameter float64 // mm, D
	Value       float64 // mm, M; for a rack from its back
	Contact     float64 // mm, the diameter where the pin touches; for a rack the height over the datum line
}

// PinRange are the smallest and the largest pin that do, in mm.
type PinRange struct{ Smallest, Largest float64 }

// Pin is the measurement with a pin of a diameter in mm,
//
//	external  inv aM = s/d + D/db + inv alpha - pi/z   M = db/cos aM + D
//	ring      inv aM = pi/z - s/d - D/db + inv alpha   M = db/cos aM - D
//	rack      M = back + D/2 + D/(2 sin alpha) - e/(2 tan alpha)
//
// (ISO 21771:2007, 8.3; the rack's from the wedge of its space). With an odd number
// of teeth two pins stand 180 deg (1 - 1/z) apart and db/cos aM is multiplied by
// cos(pi/(2z)). A pin that falls through, rests on the root circle, does not stand
// proud of the tip circle or touches past the usable flank is refused with the
// smallest or largest pin that does.
func (g Gear) Pin(diameter float64) (Pins, error) {
	if found := positive(ParamPinDiameter, diameter); found != nil {
		return Pins{}, found
	}
	if g.does(diameter) {
		return g.pins(diameter), nil
	}
	fits, found := g.pinRange()
	if found != nil {
		return Pins{}, found
	}
	if found := g.checkPin(diameter, fits); found != nil {
		return Pins{}, found
	}
	return g.pins(diameter), nil
}

// PinRange finds the smallest and the largest pin that do. Circles of contact move
// one way with the diameter, so everything between does too.
func (g Gear) PinRange() (PinRange, error) {
	fits, found := g.pinRange()
	if found != nil {
		return PinRange{}, found
	}
	return fits, nil
}

// IdealPin is the diameter in mm of the pin that touches at the circle d + 2 x m, of
// a ring d - 2 x m, of a rack at the height x m, where a mate with as much shift the
// other way would roll,
//
//	external  D = db (tan(t + eta) - t)   eta = pi/z - s/d - inv alpha
//	ring      D = db (t - tan(t - eta))   eta = pi/z - s/d + inv alpha
//	rack      D = (e + 2 y tan alpha)/cos alpha
//
// for contact at the roll angle t or the height y (Elements of Metric Gear
// Technology, table 10-13, from memory, with eta of the thinned tooth). Where no
// such pin does, it is the nearest that does.
func (g Gear) IdealPin() (float64, error) {
	ideal := g.pinAt(g.working())
	if g.does(ideal) {
		return ideal, nil
	}
	fits, found := g.pinRange()
	if found != nil {
		return 0, found
	}
	return math.Min(math.Max(ideal, fits.Smallest), fits.Largest), nil
}

// working is the circle of contact of the ideal pin, kept on the usable flank.
func (g Gear) working() float64 {
	low, high := g.flank()
	at := g.spec.ProfileShift * g.spec.Module
	switch g.spec.Kind {
	case External:
		at = g.roll(math.Max(g.rb, g.r+at))
	case Ring:
		at = g.roll(math.Max(g.rb, g.r-at))
	}
	return math.Min(math.Max(at, low), high)
}

// pinAt is the diameter of the pin that touches both flanks of a space there: at a
// roll angle, or a height. Where an external gear's flanks face each other it is
// infinite; where a ring's pin would outgrow the curvature of the flank it is the
// largest that does not.
func (g Gear) pinAt(at float64) float64 {
	switch g.spec.Kind {
	case Ring:
		eta := g.baseSpace()
		at = math.Max(at, eta)
		return 2 * g.rb * (at - math.Tan(at-eta))
	case Rack:
		return 2 * g.halfSpace(at) / g.cos
	}
	eta := g.baseSpace()
	if at+eta >= math.Pi/2 {
		return math.Inf(1)
	}
	return 2 * g.rb * (math.Tan(at+eta) - at)
}

// center is the roll angle or height of the center of a pin that touches both
// flanks. A pin that falls through an external gear's space, or outgrows a ring's, is
// held at the base circle: the range of pins excludes it.
func (g Gear) center(diameter float64) float64 {
	switch g.spec.Kind {
	case Ring:
		return math.Tan(profile.InverseInv(math.Max(0, g.baseSpace()-diameter/(2*g.rb))))
	case Rack:
		return diameter/(2*g.sin) - (g.pitch()-g.thickness)/(2*g.tan)
	}
	return math.Tan(profile.InverseInv(math.Max(0, diameter/(2*g.rb)-g.baseSpace())))
}

// centerRadius is the same as a radius or height in mm.
func (g Gear) centerRadius(diameter float64) float64 {
	c := g.center(diameter)
	if g.spec.Kind == Rack {
		return c
	}
	return g.radius(c)
}

// opposite is what an odd number of teeth takes off the distance of the two pins.
func (g Gear) opposite() float64 {
	if g.spec.Teeth%2 == 1 {
		return math.Cos(math.Pi / (2 * g.z()))
	}
	return 1
}

// pins is the measurement, wherever the pin touches.
func (g Gear) pins(diameter float64) Pins {
	c, radius := g.center(diameter), g.centerRadius(diameter)
	p := Pins{PinDiameter: diameter}
	switch g.spec.Kind {
	case Ring:
		p.Value = 2*radius*g.opposite() - diameter
		p.Contact = g.contact(c + diameter/(2*g.rb))
	case Rack:
		p.Value = g.spec.Back + radius + diameter/2
		p.Contact = c - diameter/2*g.sin
	default:
		p.Value = 2*radius*g.opposite() + diameter
		p.Contact = g.contact(c - diameter/(2*g.rb))
	}
	return p
}

// sign is the direction from root to tip.
func (g Gear) sign() float64 {
	if g.spec.Kind == Ring {
		return -1
	}
	return 1
}

// proud is how far a pin stands out over the tip circle, and clear how far it stays
// off the root circle; both grow with the diameter.
func (g Gear) proud(diameter float64) float64 {
	return g.sign()*(g.centerRadius(diameter)-g.spec.Tip) + diameter/2
}

func (g Gear) clear(diameter float64) float64 {
	if g.spec.Root == 0 {
		return math.Inf(1)
	}
	return g.sign()*(g.centerRadius(diameter)-g.spec.Root) - diameter/2
}

// does says whether a pin does, without looking for the smallest and largest that do.
func (g Gear) does(diameter float64) bool {
	smallest, largest := g.flankPins()
	return diameter >= smallest && diameter <= largest && g.proud(diameter) > 0 && g.clear(diameter) > 0
}

// flankPins are the pins that touch at the ends of the usable flank.
func (g Gear) flankPins() (smallest, largest float64) {
	smallest, largest = g.pinAt(g.along(g.spec.Form)), g.pinAt(g.along(g.spec.TipForm))
	if g.spec.Kind == External {
		largest = math.Min(largest, 2*g.spec.Tip) // no pin is thicker than the gear
	}
	return smallest, largest
}

// pinRange is PinRange with the kind of error a caller can add to.
func (g Gear) pinRange() (PinRange, profile.Violations) {
	smallest, largest := g.flankPins()
	none := profile.Violations{{Rule: RuleNoPin, Param: ParamPinDiameter, Value: profile.LengthOf(largest), Bound: g.size(g.spec.Tip),
		Text: "no pin touches the usable flank and stands proud of the tip circle at {bound}: even one of {value} does not",
		Hint: "measure a span or a chord"}}
	if !(smallest <= largest) {
		return PinRange{}, none
	}
	for _, room := range []func(float64) float64{g.proud, g.clear} {
		if !(room(largest) > 0) {
			return PinRange{}, none
		}
		if !(room(smallest) > 0) {
			smallest = bisect.Root(room, smallest, largest)
		}
	}
	return PinRange{smallest, largest}, nil
}

// checkPin says what is wrong with a pin.
func (g Gear) checkPin(diameter float64, fits PinRange) profile.Violations {
	f := profile.Finding{Param: ParamPinDiameter, Value: profile.LengthOf(diameter),
		Also: []profile.Quantity{profile.LengthOf(fits.Smallest).AtLeast(), profile.LengthOf(fits.Largest).AtMost(), g.size(g.spec.Form), g.size(g.spec.TipForm), g.size(g.spec.Tip)},
		Hint: "pins from {0} to {1} do"}
	switch {
	case diameter > fits.Largest:
		f.Rule, f.Bound = RulePinTooLarge, f.Also[1]
		f.Text = "a pin of {value} touches past the end of the usable flank at {3}"
	case diameter >= fits.Smallest:
		return nil
	default:
		f.Rule, f.Bound = RulePinTooSmall, f.Also[0]
		switch at := g.along(g.spec.Form); {
		case diameter < g.pinAt(at):
			f.Text = "a pin of {value} falls through the usable flank, which ends at {2}"
		case !(g.clear(diameter) > 0):
			f.Text = "a pin of {value} rests on the root before it touches the flanks"
		default:
			f.Text = "a pin of {value} does not stand proud of the tip at {4}"
		}
	}
	return profile.Violations{f}
}
