package gauge

import (
	"math"

	"flankwright/profile"
)

// Reading is what a measured value says of the tooth.
type Reading struct {
	Thickness float64 // mm on the reference circle
	Deviation float64 // mm, from the gear's own thickness
	Shift     float64 // modules: the shift that gives this thickness with the gear's thinning
	Thinning  float64 // mm: the thinning that gives it with the gear's shift; negative for a thicker tooth
}

// reading evaluates a thickness.
func (g Gear) reading(thickness float64) Reading {
	s := g.spec
	return Reading{
		Thickness: thickness,
		Deviation: thickness - g.thickness,
		Shift:     (thickness + s.Thinning - g.pitch()/2) / (2 * s.Module * g.tan),
		Thinning:  s.Thinning + g.thickness - thickness,
	}
}

// FromSpan evaluates a span in mm over k teeth,
//
//	s = (W - db inv alpha)/cos alpha - p (k - 1)
//
// the span's formula solved for s. A value whose contacts would not lie on the usable
// flank is refused.
func (g Gear) FromSpan(k int, value float64) (Reading, error) {
	if found := positive(ParamMeasuredSpan, value); found != nil {
		return Reading{}, found
	}
	thickness := (value-2*g.rb*g.inv)/g.cos - g.pitch()*float64(k-1)
	if g.spec.Kind == External {
		if found := g.checkReading(ParamMeasuredSpan, value, thickness); found != nil {
			return Reading{}, found
		}
	}
	if _, err := g.withThickness(thickness).Span(k); err != nil {
		return Reading{}, err
	}
	return g.reading(thickness), nil
}

// FromPins evaluates a value in mm over or between pins of a diameter in mm by the
// formulas of Pin solved for s. A value at which the pin would not touch the usable
// flank is refused.
func (g Gear) FromPins(diameter, value float64) (Reading, error) {
	found := append(positive(ParamPinDiameter, diameter), positive(ParamMeasuredOverPins, value)...)
	if found != nil {
		return Reading{}, found
	}
	thickness := g.thicknessOverPins(diameter, value)
	if found := g.checkReading(ParamMeasuredOverPins, value, thickness); found != nil {
		return Reading{}, found
	}
	if _, err := g.withThickness(thickness).Pin(diameter); err != nil {
		return Reading{}, err
	}
	return g.reading(thickness), nil
}

// thicknessOverPins is the thickness at which the pin's center lies where the value
// says; NaN where that is inside the base circle.
func (g Gear) thicknessOverPins(diameter, value float64) float64 {
	if g.spec.Kind == Rack {
		center := value - g.spec.Back - diameter/2
		return g.pitch() - 2*g.tan*(diameter/(2*g.sin)-center)
	}
	center := g.roll((value - g.sign()*diameter) / (2 * g.opposite()))
	if g.spec.Kind == Ring {
		return 2 * g.r * (math.Pi/g.z() - diameter/(2*g.rb) + g.inv - rollInv(center))
	}
	return 2 * g.r * (math.Pi/g.z() - diameter/(2*g.rb) - g.inv + rollInv(center))
}

// FromChord evaluates a chord in mm taken with the caliper set to a height in mm: the
// jaws touch half a chord from the middle, at the height from the tip, which is a
// point of the flank. One off the usable flank is refused.
func (g Gear) FromChord(height, chord float64) (Reading, error) {
	found := append(positive(ParamMeasuredChord, height), positive(ParamMeasuredChord, chord)...)
	if found != nil {
		return Reading{}, found
	}
	thickness := g.thicknessOfChord(height, chord)
	if found := g.checkReading(ParamMeasuredChord, chord, thickness); found != nil {
		return Reading{}, found
	}
	if _, err := g.withThickness(thickness).ChordAt(height); err != nil {
		return Reading{}, err
	}
	return g.reading(thickness), nil
}

// thicknessOfChord is the thickness of the tooth whose flank passes through the
// chord's end; NaN where that is inside the base circle.
func (g Gear) thicknessOfChord(height, chord float64) float64 {
	middle := g.spec.Tip - g.sign()*height
	if g.spec.Kind == Rack {
		return chord + 2*middle*g.tan
	}
	roll := g.roll(math.Hypot(chord/2, middle))
	half := math.Atan2(chord/2, middle)
	return 2 * g.r * (half - g.sign()*(g.inv-rollInv(roll)))
}

// checkReading refuses a value no tooth of the gear can give.
func (g Gear) checkReading(param profile.Param, value, thickness float64) profile.Violations {
	// Not the thickness itself counts, which a large negative shift takes below zero,
	// but what is left where the usable flank ends.
	measured := g.withThickness(thickness)
	low, high := g.flank()
	if measured.halfTooth(g.along(g.spec.TipForm)) >= 0 && measured.halfSpace(low) > 0 && measured.halfSpace(high) > 0 {
		return nil
	}
	return profile.Violations{{Rule: RuleUnreachable, Param: param, Value: profile.LengthOf(value), Bound: profile.LengthOf(g.thickness),
		Text: "a measured value of {value} leaves no tooth or no space: the nominal thickness is {bound}",
		Hint: "check the number of teeth, the teeth spanned, the pin diameter and the module"}}
}
