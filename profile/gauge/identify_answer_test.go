package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// wornPart is a gear as read on a part: 28 teeth, with a caliper good to 0.03 mm.
func wornPart() gauge.Measurements {
	return gauge.Measurements{Teeth: 28, TipDiameter: 59.9, Uncertainty: 0.03,
		Spans: []gauge.SpanReading{{TeethSpanned: 4, Value: 21.32}, {TeethSpanned: 5, Value: 27.22}}}
}

// identified is an answer that must be there.
func identified(t testing.TB, m gauge.Measurements) gauge.Identification {
	t.Helper()
	id, err := gauge.Identify(m)
	if err != nil {
		t.Fatalf("%+v: %v", m, err)
	}
	return id
}

// TestIdentifyAmbiguous reads a gear that two sizes explain, as a hand calculation shows:
// the base pitch of 5.90 +- 0.06 mm is that of a module of 2 at 20 degrees, 5.904, of 12.5
// P at 22.5 degrees, 5.898, and of 13 P at 15 degrees, 5.929.
func TestIdentifyAmbiguous(t *testing.T) {
	id := identified(t, wornPart())
	if id.Unique || id.Next == nil {
		t.Errorf("unique: %+v", id)
	}
	first := id.Results[0]
	if first.Module != 2 || first.DiametralPitch != 0 || first.PressureAngle != 20*degree || !first.Preferred || len(first.Racks) == 0 {
		t.Errorf("first %+v", first)
	}
	pitches := map[float64]bool{}
	for _, r := range id.Results {
		pitches[r.DiametralPitch] = true
		for i, e := range r.Residuals {
			if math.Abs(e) > 0.03 {
				t.Errorf("%+v contradicts reading %d", r, i)
			}
		}
		if r.Shift < r.ShiftMin-1e-12 || r.Shift > r.ShiftMax+1e-12 {
			t.Errorf("shift outside its range: %+v", r)
		}
	}
	if !pitches[12.5] || !pitches[13] {
		t.Errorf("pitches %v", pitches)
	}
}

// TestNextMeasurementDecides makes the measurement that is proposed, on each of the two
// gears in turn, with a finer instrument: the other must be ruled out.
func TestNextMeasurementDecides(t *testing.T) {
	m := wornPart()
	id := identified(t, m)
	for i := range 2 {
		more := m
		value := id.Next.Predicted[i]
		switch id.Next.Param {
		case gauge.ParamMeasuredSpan:
			more.Spans = append(more.Spans[:2:2], gauge.SpanReading{TeethSpanned: id.Next.TeethSpanned, Value: value})
		case gauge.ParamMeasuredOverPins:
			more.Pins = append(more.Pins, gauge.PinReading{PinDiameter: id.Next.PinDiameter, Value: value})
		default:
			t.Fatalf("%+v", id.Next)
		}
		more.Uncertainty = 0.005
		answer, err := gauge.Identify(more)
		if err != nil {
			// The readings made before may be too coarse for the finer instrument: those it
			// replaces are predicted too.
			t.Logf("gear %d: %v", i, err)
			continue
		}
		for _, r := range answer.Results {
			if other := id.Results[1-i]; r.Module == other.Module && r.PressureAngle == other.PressureAngle {
				t.Errorf("gear %d is still taken for the other: %+v", i, r)
			}
		}
	}
}

// TestIdentifyTellsWhenNothingExplains changes one span so that no base pitch fits.
func TestIdentifyTellsWhenNothingExplains(t *testing.T) {
	m := wornPart()
	m.Spans[1].Value = 27.5
	_, err := gauge.Identify(m)
	f := finding(t, err, gauge.RuleNothingExplains)
	if f.Bound.Value <= m.Uncertainty {
		t.Errorf("%+v", f)
	}
	// The bound is what it says: within it the nearest explains the measurements.
	m.Uncertainty = f.Bound.Value * (1 + 1e-9)
	id := identified(t, m)
	if len(id.Results) != 1 || math.Abs(id.Results[0].Module-f.Also[0].Value) > 1e-12 || id.Results[0].PressureAngle != f.Also[1].Value {
		t.Errorf("%+v, told %+v", id, f)
	}
}

// TestIdentifyOneReadingContradicts takes a module 3 gear and spoils each reading in turn
// far beyond the uncertainty: the true gear must not be an answer.
func TestIdentifyOneReadingContradicts(t *testing.T) {
	solved := tooth(t, "iso53-a", 3, 30, 0.2, 0.05)
	g := must(t, gauge.OfTooth(solved, 0))
	spans, err := g.Spans()
	if err != nil {
		t.Fatal(err)
	}
	over, err := g.Pin(5.4)
	if err != nil {
		t.Fatal(err)
	}
	read := func() gauge.Measurements {
		return gauge.Measurements{Teeth: 30, TipDiameter: solved.Dimensions.TipDiameter, Uncertainty: 0.01,
			Spans: []gauge.SpanReading{{spans[0].TeethSpanned, spans[0].Value}, {spans[1].TeethSpanned, spans[1].Value}},
			Pins:  []gauge.PinReading{{5.4, over.Value}}}
	}
	isTrue := func(r gauge.Result) bool { return r.Module == 3 && r.PressureAngle == 20*degree }
	id := identified(t, read())
	if !id.Unique || !isTrue(id.Results[0]) || math.Abs(id.Results[0].Shift-0.2) > 1e-9 || math.Abs(id.Results[0].Thinning-0.05) > 1e-9 {
		t.Errorf("%+v", id)
	}
	for name, spoil := range map[string]func(*gauge.Measurements){
		"first span":  func(m *gauge.Measurements) { m.Spans[0].Value += 0.1 },
		"second span": func(m *gauge.Measurements) { m.Spans[1].Value -= 0.1 },
		"pins":        func(m *gauge.Measurements) { m.Pins[0].Value += 0.2 },
		"tip":         func(m *gauge.Measurements) { m.TipDiameter += 1.5 },
		"teeth":       func(m *gauge.Measurements) { m.Teeth++ },
	} {
		m := read()
		spoil(&m)
		id, err := gauge.Identify(m)
		if err != nil {
			finding(t, err, gauge.RuleNothingExplains)
			continue
		}
		for _, r := range id.Results {
			if isTrue(r) {
				t.Errorf("%s spoiled, still taken for %+v", name, r)
			}
		}
	}
}

// TestIdentifyRefusals asks for the impossible.
func TestIdentifyRefusals(t *testing.T) {
	for name, tc := range map[string]struct {
		change func(*gauge.Measurements)
		rule   profile.Rule
	}{
		"no teeth":         {func(m *gauge.Measurements) { m.Teeth = 0 }, profile.RuleOutOfRange},
		"one reading":      {func(m *gauge.Measurements) { m.Spans, m.Pins = m.Spans[:1], nil; m.TipDiameter = 0 }, gauge.RuleTooFewReadings},
		"no uncertainty":   {func(m *gauge.Measurements) { m.Uncertainty = 0 }, profile.RuleOutOfRange},
		"NaN":              {func(m *gauge.Measurements) { m.Spans[0].Value = math.NaN() }, profile.RuleNotFinite},
		"tip infinite":     {func(m *gauge.Measurements) { m.TipDiameter = math.Inf(1) }, profile.RuleNotFinite},
		"too many spanned": {func(m *gauge.Measurements) { m.Spans[0].TeethSpanned = 28 }, profile.RuleOutOfRange},
		"no pin":           {func(m *gauge.Measurements) { m.Pins = []gauge.PinReading{{0, 60}} }, profile.RuleOutOfRange},
	} {
		m := wornPart()
		tc.change(&m)
		if _, err := gauge.Identify(m); reason(err) != tc.rule {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// TestIdentifyWithoutTip leaves the tip out: the next measurement is looked for there too.
func TestIdentifyWithoutTip(t *testing.T) {
	m := wornPart()
	m.TipDiameter = 0
	id := identified(t, m)
	if id.Unique || id.Next.Param != gauge.ParamMeasuredTip || !id.Next.Enough {
		t.Errorf("%+v", id.Next)
	}
}

// FuzzIdentify asks that every answer holds its promises, whatever is read.
func FuzzIdentify(f *testing.F) {
	f.Add(28, 59.9, 4, 21.32, 5, 27.22, 0.0, 0.0, 0.03)
	f.Add(28, 0.0, 4, 21.32, 4, 21.30, 3.5, 61.0, 0.03)
	f.Add(3, 1e-9, 1, 1e300, 2, 5e-324, 1e-300, 1e9, 1e-12)
	// Found by fuzzing: shifts beyond their limit.
	f.Add(28, float64(74), 4, float64(2.368888888888889), 4, float64(64.80000000000001), float64(7), float64(47), float64(91.03))
	f.Add(88, float64(218.66666666666666), 4, float64(58.36888888888889), 22, float64(120.3), float64(0.175), float64(7), float64(144.03))
	f.Fuzz(func(t *testing.T, teeth int, tip float64, k1 int, w1 float64, k2 int, w2 float64, pin, over, u float64) {
		m := gauge.Measurements{Teeth: teeth, TipDiameter: tip, Uncertainty: u, Spans: []gauge.SpanReading{{k1, w1}, {k2, w2}}}
		if pin != 0 {
			m.Pins = []gauge.PinReading{{pin, over}}
		}
		id, err := gauge.Identify(m)
		if err != nil {
			described(t, err)
			return
		}
		if id.Unique != (len(id.Results) == 1) || id.Unique != (id.Next == nil) {
			t.Errorf("%+v", id)
		}
		for _, r := range id.Results {
			if !(r.Misfit >= 0) || math.IsInf(r.Misfit, 0) || !(math.Abs(r.Shift) <= profile.MaxProfileShift+1e-9) || !(r.Thinning >= 0) || !(r.Shortening >= 0) || !(r.ShiftMin <= r.ShiftMax+1e-9) || !(r.Shift <= r.ShiftMax+1e-9) {
				t.Errorf("%+v", r)
			}
			for _, e := range r.Residuals {
				if !(math.Abs(e) <= u*(1+1e-9)+1e-9*math.Max(math.Abs(w1), math.Max(math.Abs(w2), math.Max(tip, over)))) {
					t.Errorf("%+v contradicts a reading of %+v", r, m)
				}
			}
		}
	})
}
