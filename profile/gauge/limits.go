package gauge

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// Allowance are the upper and lower deviations in mm of the tooth thickness on the
// reference circle from the gear's own; both are normally <= 0, Upper the larger.
// AllowanceSeries knows those of DIN 3967.
type Allowance struct{ Upper, Lower float64 }

// Limits are the smallest and largest value in mm a measurement may take. Between
// the pins of a ring the smallest belongs to the thickest tooth.
type Limits struct{ Smallest, Largest float64 }

// SpanLimits are the limits of the span over k teeth.
func (g Gear) SpanLimits(k int, a Allowance) (Limits, error) {
	return g.limits(a, func(g Gear) (float64, error) { s, err := g.Span(k); return s.Value, err })
}

// PinLimits are the limits of the dimension over or between pins of a diameter in mm.
func (g Gear) PinLimits(diameter float64, a Allowance) (Limits, error) {
	return g.limits(a, func(g Gear) (float64, error) { p, err := g.Pin(diameter); return p.Value, err })
}

// ChordLimits are the limits of the chord with the caliper set to a height in mm.
func (g Gear) ChordLimits(height float64, a Allowance) (Limits, error) {
	return g.limits(a, func(g Gear) (float64, error) { c, err := g.ChordAt(height); return c.Thickness, err })
}

// limits measures the thickest and the thinnest tooth allowed.
func (g Gear) limits(a Allowance, measure func(Gear) (float64, error)) (Limits, error) {
	if found := g.checkAllowance(a); found != nil {
		return Limits{}, found
	}
	var ends [2]float64
	for i, deviation := range []float64{a.Upper, a.Lower} {
		made, err := g.WithThickness(g.thickness + deviation)
		if err != nil {
			return Limits{}, err
		}
		if ends[i], err = measure(made); err != nil {
			return Limits{}, err
		}
	}
	return Limits{math.Min(ends[0], ends[1]), math.Max(ends[0], ends[1])}, nil
}

// checkAllowance refuses deviations in the wrong order or that leave no tooth.
func (g Gear) checkAllowance(a Allowance) profile.Violations {
	upper, lower := profile.LengthOf(a.Upper), profile.LengthOf(a.Lower)
	for _, q := range []profile.Quantity{upper, lower} {
		if math.IsNaN(q.Value) || math.IsInf(q.Value, 0) {
			return profile.Violations{notFinite(ParamAllowance, q)}
		}
	}
	switch largest := g.pitch() / 2; {
	case a.Lower > a.Upper:
		return profile.Violations{{Rule: profile.RuleConflicting, Param: ParamAllowance, Value: upper, Bound: lower,
			Text: "the upper deviation {value} lies below the lower one {bound}", Hint: "give UPPER,LOWER with the larger value first"}}
	case math.Max(math.Abs(a.Upper), math.Abs(a.Lower)) > largest:
		return profile.Violations{{Rule: profile.RuleOutOfRange, Param: ParamAllowance, Value: lower, Bound: profile.LengthOf(largest).AtMost(),
			Text: fmt.Sprintf("%s {value} is more than a tooth", ParamAllowance), Hint: "keep both deviations within {bound}"}}
	}
	return nil
}
