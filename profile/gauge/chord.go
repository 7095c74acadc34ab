package gauge

import (
	"math"

	"flankwright/profile"
	"flankwright/profile/internal/bisect"
)

// Chord is a tooth's thickness along a straight line, as a gear-tooth caliper takes
// it: its tongue rests on the tip circle, its jaws touch at the height below it.
type Chord struct {
	Thickness float64 // mm, along the chord
	Height    float64 // mm, from the tip circle
	Contact   float64 // mm, the diameter where the jaws touch; for a rack the height over the datum line
}

// Chord is the measurement at the reference circle,
//
//	external  chord d sin(s/d), height ra - r cos(s/d)
//	ring      chord d sin(s/d), height r cos(s/d) - ra
//	rack      chord s, height from tip to datum line
//
// (DIN 3960:1987, 4.4, from memory; it is a triangle). Where the reference circle is
// not on the usable flank it is refused, and ChordAt has to do.
func (g Gear) Chord() (Chord, error) {
	low, high := g.flank()
	at := g.along(g.r)
	if at < low || at > high {
		least, most := g.heights()
		return Chord{}, profile.Violations{{Rule: RuleOffFlank, Param: ParamMeasuredChord, Value: g.size(g.r), Bound: g.size(g.spec.Form),
			Also: []profile.Quantity{g.size(g.spec.TipForm), profile.LengthOf(least).AtLeast(), profile.LengthOf(most).AtMost()},
			Text: "the reference circle {value} is not on the usable flank from {bound} to {0}",
			Hint: "set the caliper to a height from {1} to {2}"}}
	}
	if g.spec.Kind == Rack {
		return Chord{Thickness: g.thickness, Height: g.spec.Tip}, nil
	}
	sin, cos := math.Sincos(g.thickness / (2 * g.r))
	return Chord{Thickness: 2 * g.r * sin, Height: g.sign() * (g.spec.Tip - g.r*cos), Contact: 2 * g.r}, nil
}

// ChordAt is the measurement with the caliper set to a height in mm. The jaws touch
// where the flank is so far below the middle of the tip,
//
//	R cos(psi) = ra -+ height
//
// with the half angle psi of the tooth at the radius R (- external, + ring). A height
// at which they miss the usable flank is refused with the heights at which they do
// not.
func (g Gear) ChordAt(height float64) (Chord, error) {
	if found := positive(ParamMeasuredChord, height); found != nil {
		return Chord{}, found
	}
	least, most := g.heights()
	if height < least || height > most {
		return Chord{}, profile.Violations{{Rule: RuleOffFlank, Param: ParamMeasuredChord, Value: profile.LengthOf(height), Bound: profile.LengthOf(least).AtLeast(),
			Also: []profile.Quantity{profile.LengthOf(most).AtMost()},
			Text: "a caliper set to a height of {value} does not touch the usable flank",
			Hint: "set it to a height from {bound} to {0}"}}
	}
	low, high := g.flank()
	at := bisect.Root(func(at float64) float64 { return g.heightOf(at) - height }, low, high)
	return Chord{Thickness: g.chordOf(at), Height: height, Contact: g.contact(at)}, nil
}

// heightOf is the height below the tip at which the flank reaches a roll angle or a
// height over the datum line.
func (g Gear) heightOf(at float64) float64 {
	if g.spec.Kind == Rack {
		return g.spec.Tip - at
	}
	return g.sign() * (g.spec.Tip - g.radius(at)*math.Cos(g.halfTooth(at)))
}

// chordOf is the chord there.
func (g Gear) chordOf(at float64) float64 {
	if g.spec.Kind == Rack {
		return 2 * g.halfTooth(at)
	}
	return 2 * g.radius(at) * math.Sin(g.halfTooth(at))
}

// heights are the least and the largest height at which the jaws touch the usable
// flank.
func (g Gear) heights() (least, most float64) {
	low, high := g.flank()
	a, b := g.heightOf(low), g.heightOf(high)
	return math.Min(a, b), math.Max(a, b)
}
