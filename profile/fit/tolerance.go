package fit

import (
	"math"

	"flankwright/profile"
)

// TolerancePerDepth is the largest tolerance that still draws a tooth: a tenth of
// its depth.
const TolerancePerDepth = 0.1

// pointRounding is how far in mm a point moves when a file rounds it to nine decimals
// of an inch, sqrt 2 times half a step. Curves are fitted to what it leaves of the
// tolerance, so that the file keeps it.
const pointRounding = math.Sqrt2 / 2 * 25.4e-9

// LeastTolerance is the smallest tolerance in mm that nine decimals carry.
const LeastTolerance = 5e-8

// MostSegments is how many segments an outline may have. Readers give up long before;
// it keeps a careless tolerance from filling the memory.
const MostSegments = 250_000

func checkTolerance(t profile.Outline, tolerance float64) error {
	value := profile.LengthOf(tolerance)
	if !(tolerance >= LeastTolerance) {
		return profile.Violations{{Rule: profile.RuleOutOfRange, Param: profile.ParamTolerance,
			Value: value, Bound: profile.LengthOf(LeastTolerance),
			Text: "the tolerance {value} is below what nine decimals carry",
			Hint: "it must be at least {bound}"}}
	}
	if largest := TolerancePerDepth * t.Depth(); tolerance > largest {
		return profile.Violations{{Rule: profile.RuleOutOfRange, Param: profile.ParamTolerance,
			Value: value, Bound: profile.LengthOf(largest).AtMost(),
			Text: "the tolerance {value} is larger than a tenth of the tooth's depth",
			Hint: "it must be at most {bound}"}}
	}
	return nil
}

// checkCount refuses outlines of more than MostSegments, from the least number the
// curves need. Chords grow in number with the square root of the tolerance, arcs with
// its cube root, which gives the tolerance that would do.
func checkCount(t profile.Outline, o Options) error {
	if o.Curves == Cubic {
		return nil // a few a tooth at any tolerance
	}
	need, power := 0.0, 3.0
	count := func(c profile.Curve) float64 { return math.Ceil(arcLimit(arcSpread(c), o.Tolerance, ends{})) }
	if o.Curves == Line {
		power = 2
		count = func(c profile.Curve) float64 { return float64(chordCount(chordSpread(c), o.Tolerance)) }
	}
	need = count(t.Land)
	for _, p := range t.Side {
		need += 2 * count(p.Curve)
	}
	if t.Root != nil {
		need += count(t.Root)
	}
	need *= float64(t.Teeth)
	if need <= MostSegments {
		return nil
	}
	enough := o.Tolerance * math.Pow(need/MostSegments, power)
	return profile.Violations{{Rule: profile.RuleTooManySegments, Param: profile.ParamTolerance,
		Value: profile.LengthOf(o.Tolerance), Bound: profile.LengthOf(enough).AtLeast(),
		Also: []profile.Quantity{profile.NumberOf(math.Ceil(need)), profile.NumberOf(MostSegments)},
		Text: "the outline would need {0} segments at a tolerance of {value}, more than {1}",
		Hint: "a tolerance of about {bound} would do; arcs need fewer segments than lines"}}
}
