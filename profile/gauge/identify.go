package gauge

import (
	"math"
	"slices"

	"flankwright/profile"
	"flankwright/profile/internal/bisect"
)

// SpanReading is a span in mm measured over so many teeth.
type SpanReading struct {
	TeethSpanned int
	Value        float64 // mm
}

// PinReading is a dimension in mm measured over two pins of a diameter in mm.
type PinReading struct{ PinDiameter, Value float64 }

// Measurements are what is known of an external gear of unknown size.
type Measurements struct {
	Teeth       int
	TipDiameter float64 // mm; 0 where not measured
	Spans       []SpanReading
	Pins        []PinReading
	Uncertainty float64 // mm, the most by which any reading is off
}

// The fits a result may need besides its shift. They are assumptions of ours about
// gears as they are made; a gear outside them is not found.
const (
	// MaxUnknownThinning is the largest thinning in modules: backlash and wear of one
	// member take a few hundredths, in small modules up to a tenth.
	MaxUnknownThinning = 0.1
	// MaxUnknownShortening is the largest shortening of the tip radius in modules. The
	// shortening that keeps the clearance of a pair with a shift sum of 1 is below 0.2,
	// which is also what a stub tooth lacks.
	MaxUnknownShortening = 0.2
)

// Result is one gear that explains every measurement.
type Result struct {
	Module         float64 // mm
	DiametralPitch float64 // 1/inch, 0 where the gear is one of a module
	Preferred      bool    // the size is one of profile.PreferredModules or PreferredPitches
	PressureAngle  float64 // rad
	Addendum       float64 // modules
	Racks          []string

	Shift              float64 // modules, most plausible
	ShiftMin, ShiftMax float64 // modules, what the readings leave open
	Thinning           float64 // mm, most plausible
	Shortening         float64 // mm off the tip radius, most plausible

	// Residuals are measured less predicted values in mm: spans, pins, then the tip.
	Residuals []float64
	// Misfit is what results are ranked by, the least first: the root of the sum of the
	// squares of the residuals over the uncertainty, of thinning and shortening over their
	// largest, and of 1 each for a size that is not preferred and an angle that no
	// standard rack has.
	Misfit float64

	teeth     int
	tip       float64 // mm, predicted radius
	thickness float64 // mm on the reference circle
}

// Identification is what the measurements say.
type Identification struct {
	Results []Result // best first, at least one

	// Unique says that there is one size and pressure angle only; racks of other
	// dedendum or shortening may still share it.
	Unique bool

	// Next is the further measurement that tells the first two results apart best; nil
	// where the answer is unique.
	Next *Distinction
}

// Identify finds the external gears that explain every measurement within the
// uncertainty: modules and diametral pitches, preferred ones first but also the less
// common, with pressure angles of 14.5, 15, 17.5, 20, 22.5, 25 and 30 degrees and the
// addenda of the standard racks (1 where there is none of that angle).
//
// The model: spans and pins say how thick the tooth is on the reference circle,
//
//	s = pi m/2 + delta,   delta = 2 x m tan(alpha) - E
//
// and spans over different numbers of teeth say what the base pitch is. The tip
// circle ties the shift down,
//
//	da = m z + 2 (haP + x m - K)
//
// but for the thinning E, which may be from 0 to MaxUnknownThinning, and the
// shortening K, from 0 to MaxUnknownShortening, so that each reading leaves an
// interval for delta. A candidate whose intervals have no common point contradicts a
// reading and is not a result. So does one whose spans would touch beyond the tip,
// or whose tooth would be pointed below it. Of thinning and shortening one is then
// zero and the other the least that the tip asks for, at the delta that fits spans
// and pins best.
//
// The error is of type profile.Violations. Where nothing explains the measurements it
// names the nearest candidate and the uncertainty at which that would.
func Identify(m Measurements) (Identification, error) {
	if found := m.check(); found != nil {
		return Identification{}, found
	}
	var id Identification
	for _, size := range sizes() {
		for _, angle := range pressureAngles() {
			if best, ok := m.explain(size, angle); ok {
				id.Results = append(id.Results, best)
			}
		}
	}
	if len(id.Results) == 0 {
		return Identification{}, m.nothingExplains()
	}
	slices.SortStableFunc(id.Results, func(a, b Result) int {
		switch {
		case a.Misfit < b.Misfit:
			return -1
		case a.Misfit > b.Misfit:
			return 1
		}
		return 0
	})
	id.Unique = len(id.Results) == 1
	if !id.Unique {
		next := Distinguish(id.Results[0], id.Results[1], m)
		id.Next = &next
	}
	return id, nil
}

// check lists what is wrong with the measurements themselves.
func (m Measurements) check() profile.Violations {
	found := positive(ParamUncertainty, m.Uncertainty)
	count := profile.NumberOf(float64(m.Teeth))
	if m.Teeth < profile.MinTeeth || m.Teeth > profile.MaxTeeth {
		found = append(found, profile.Finding{Rule: profile.RuleOutOfRange, Param: profile.ParamTeeth, Value: count, Bound: profile.NumberOf(profile.MinTeeth),
			Also: []profile.Quantity{profile.NumberOf(profile.MaxTeeth)},
			Text: "a gear of {value} teeth is out of range", Hint: "give {bound} to {0} teeth"})
	}
	readings := len(m.Spans) + len(m.Pins)
	for _, s := range m.Spans {
		found = append(found, positive(ParamMeasuredSpan, s.Value)...)
		if s.TeethSpanned < 1 || s.TeethSpanned >= m.Teeth {
			found = append(found, profile.Finding{Rule: profile.RuleOutOfRange, Param: ParamMeasuredSpan, Value: profile.NumberOf(float64(s.TeethSpanned)), Bound: count,
				Text: "a span over {value} of {bound} teeth is out of range", Hint: "span at least one tooth and less than all"})
		}
	}
	for _, p := range m.Pins {
		found = append(found, positive(ParamPinDiameter, p.PinDiameter)...)
		found = append(found, positive(ParamMeasuredOverPins, p.Value)...)
	}
	if m.TipDiameter != 0 {
		readings++
		found = append(found, positive(ParamMeasuredTip, m.TipDiameter)...)
	}
	const least = 2
	if readings < least {
		found = append(found, profile.Finding{Rule: RuleTooFewReadings, Param: ParamMeasuredSpan, Value: profile.NumberOf(float64(readings)), Bound: profile.NumberOf(least),
			Text: "{value} readings do not say what the gear is", Hint: "measure the spans over two numbers of teeth, and the tip diameter"})
	}
	return found
}

// nothingExplains names the candidate that needs the least uncertainty.
func (m Measurements) nothingExplains() profile.Violations {
	nearest, least := candidate{}, math.Inf(1)
	for _, size := range sizes() {
		for _, angle := range pressureAngles() {
			for _, addendum := range addenda(angle) {
				c := candidate{size, angle, addendum}
				if u := m.uncertaintyFor(c, least); u < least {
					nearest, least = c, u
				}
			}
		}
	}
	f := profile.Finding{Rule: RuleNothingExplains, Param: ParamUncertainty, Value: profile.LengthOf(m.Uncertainty),
		Text: "no gear of a known size and pressure angle explains the measurements within {value}",
		Hint: "count the teeth and the teeth spanned again, and measure again"}
	if !math.IsInf(least, 1) {
		f.Bound = profile.LengthOf(least).AtLeast()
		f.Also = []profile.Quantity{profile.LengthOf(nearest.module), profile.AngleOf(nearest.angle), profile.NumberOf(millimetresPerInch / nearest.module)}
		f.Text += "; nearest is a module of {0} ({2} P) at {1}, which asks for {bound}"
	}
	return profile.Violations{f}
}

// uncertaintyFor is the least uncertainty at which a candidate explains the
// measurements, or +Inf where that is not below limit.
func (m Measurements) uncertaintyFor(c candidate, limit float64) float64 {
	explains := func(u float64) float64 {
		low, high := m.interval(c, u)
		if low <= high {
			return 1
		}
		return -1
	}
	// No reading can be off by more than itself.
	most := m.TipDiameter
	for _, s := range m.Spans {
		most = math.Max(most, s.Value)
	}
	for _, p := range m.Pins {
		most = math.Max(most, p.Value)
	}
	most = math.Min(most, limit)
	if explains(most) < 0 {
		return math.Inf(1)
	}
	return bisect.Root(explains, m.Uncertainty, most)
}
