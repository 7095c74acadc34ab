package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile/gauge"
)

// TestIdentifyRangeOfShift compares with the intervals worked by hand for a module of 2
// at 20 degrees, W4 = 21.4492 and W5 = 27.3534 without shift: the tip, 29.95 -+ 0.015,
// says x m >= -0.065, the spans say delta from -0.1694 to -0.1100, and a thinning of up
// to 0.2 on top.
func TestIdentifyRangeOfShift(t *testing.T) {
	const hand = 1e-3
	r := identified(t, wornPart()).Results[0]
	near(t, "least shift", r.ShiftMin, -0.0325, hand)
	near(t, "largest shift", r.ShiftMax, 0.0617, hand)
	m := wornPart()
	m.TipDiameter = 0
	for _, r := range identified(t, m).Results {
		if r.Module == 2 && r.PressureAngle == 20*degree {
			near(t, "least shift by the spans", r.ShiftMin, -0.1164, hand)
			near(t, "largest shift by the spans", r.ShiftMax, 0.0617, hand)
		}
	}
}

// TestIdentifyWeighsTheUncommon checks what an uncommon size and angle cost.
func TestIdentifyWeighsTheUncommon(t *testing.T) {
	for _, r := range identified(t, wornPart()).Results {
		least := 0.0
		if !r.Preferred {
			least++
		}
		if len(r.Racks) == 0 {
			least++
		}
		if r.Misfit < math.Sqrt(least) {
			t.Errorf("%+v", r)
		}
	}
}

// TestIdentifyKnowsPointedTeeth reads a tooth that would be pointed below the tip read.
func TestIdentifyKnowsPointedTeeth(t *testing.T) {
	// 10 teeth with a shift of 0.9: pointed at a radius of 13.6, while the standard tip
	// would be at 13.8.
	lower := must(t, gauge.Spec{Module: 2, Teeth: 10, PressureAngle: 20 * degree, ProfileShift: 0.9, Tip: 13.4, TipForm: 13.4, Form: 9.7})
	spans, err := lower.Spans()
	if err != nil || len(spans) < 2 {
		t.Fatal(spans, err)
	}
	for tip, possible := range map[float64]bool{26.8: true, 27.6: false} {
		m := gauge.Measurements{Teeth: 10, TipDiameter: tip, Uncertainty: 0.01}
		for _, s := range spans[:2] {
			m.Spans = append(m.Spans, gauge.SpanReading{TeethSpanned: s.TeethSpanned, Value: s.Value})
		}
		found := false
		id, err := gauge.Identify(m)
		if err != nil {
			finding(t, err, gauge.RuleNothingExplains)
		}
		for _, r := range id.Results {
			found = found || r.Module == 2 && r.PressureAngle == 20*degree
		}
		if found != possible {
			t.Errorf("tip %v: found %v in %+v", tip, found, id.Results)
		}
	}
}

// TestDistinctionSaysWhatIsEnough has instruments a little better and worse than half the
// difference.
func TestDistinctionSaysWhatIsEnough(t *testing.T) {
	m := wornPart()
	id := identified(t, m)
	difference := gauge.Distinguish(id.Results[0], id.Results[1], m).Difference()
	for uncertainty, enough := range map[float64]bool{0.49 * difference: true, 0.51 * difference: false} {
		m.Uncertainty = uncertainty
		if got := gauge.Distinguish(id.Results[0], id.Results[1], m); got.Enough != enough || got.Difference() != difference {
			t.Errorf("%v: %+v", uncertainty, got)
		}
	}
}
