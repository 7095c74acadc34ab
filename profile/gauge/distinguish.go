package gauge

import (
	"math"

	"flankwright/profile"
)

// Distinction is a measurement that would tell two gears apart.
type Distinction struct {
	Param        profile.Param // ParamMeasuredSpan, ParamMeasuredOverPins or ParamMeasuredTip
	TeethSpanned int           // of a span
	PinDiameter  float64       // mm, of a measurement over pins
	Predicted    [2]float64    // mm, for the first and the second gear

	// Enough says that the two differ by more than what two readings can be off.
	Enough bool
}

// Difference is how far the two predictions lie apart, in mm.
func (d Distinction) Difference() float64 { return math.Abs(d.Predicted[0] - d.Predicted[1]) }

// Distinguish finds the measurement not yet made, whose predictions for two results
// differ most: a span over any number of teeth or a dimension over pins, with every
// contact on the flanks of both down to the working depth, or the tip diameter. Shift
// and thickness of each are held at their fit.
func Distinguish(a, b Result, made Measurements) Distinction {
	var best Distinction
	consider := func(d Distinction) {
		if d.Difference() > best.Difference() || best.Param == "" {
			best = d
		}
	}
	if made.TipDiameter == 0 {
		consider(Distinction{Param: ParamMeasuredTip, Predicted: [2]float64{2 * a.tip, 2 * b.tip}})
	}
	one, two := a.gear(), b.gear()
	for k := 1; k < a.teeth; k++ {
		if one.spans(k) && two.spans(k) && !made.spanned(k) {
			consider(Distinction{Param: ParamMeasuredSpan, TeethSpanned: k, Predicted: [2]float64{one.span(float64(k)), two.span(float64(k))}})
		}
	}
	fits, found := one.pinRange()
	other, more := two.pinRange()
	if found == nil && more == nil {
		least, most := math.Max(fits.Smallest, other.Smallest), math.Min(fits.Largest, other.Largest)
		per := pinsPerUnit(most, Metric)
		for _, d := range []float64{math.Ceil(least*per) / per, math.Floor(most*per) / per} {
			if d >= least && d <= most && !made.pinned(d) {
				consider(Distinction{Param: ParamMeasuredOverPins, PinDiameter: d, Predicted: [2]float64{one.pins(d).Value, two.pins(d).Value}})
			}
		}
	}
	best.Enough = best.Difference() > 2*made.Uncertainty
	return best
}

// gear is the result as a gear whose flank reaches from the tip down to where the tip of
// the rack's counterpart works, or the base circle:
//
//	rF^2 = rb^2 + (r sin alpha - (haP - x) m/sin alpha)^2
func (r Result) gear() Gear {
	c := candidate{size{module: r.Module}, r.PressureAngle, r.Addendum}
	g := c.gear(r.teeth, r.thickness-math.Pi*r.Module/2)
	reach := math.Max(0, g.r*g.sin-(r.Addendum-r.Shift)*r.Module/g.sin)
	g.spec.Form, g.spec.TipForm, g.spec.Tip = math.Hypot(g.rb, reach), r.tip, r.tip
	return g
}

// spans says whether a span over k teeth touches within the flank.
func (g Gear) spans(k int) bool {
	fewest, most := g.spannedRange()
	return k >= fewest && k <= most
}

// spanned and pinned say whether a measurement has been made.
func (m Measurements) spanned(k int) bool {
	for _, s := range m.Spans {
		if s.TeethSpanned == k {
			return true
		}
	}
	return false
}

func (m Measurements) pinned(diameter float64) bool {
	for _, p := range m.Pins {
		if p.PinDiameter == diameter {
			return true
		}
	}
	return false
}
