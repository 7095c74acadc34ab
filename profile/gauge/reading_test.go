package gauge_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// someGears are gears of each kind and many sizes.
func someGears(t testing.TB) []gauge.Spec {
	t.Helper()
	r := rand.New(rand.NewPCG(8, 9))
	var all []gauge.Spec
	for range 40 {
		all = append(all, gauge.OfTooth(randomTooth(r), 0))
		alpha := (17 + 8*r.Float64()) * degree
		all = append(all, gauge.Spec{Kind: gauge.Rack, Module: 3, PressureAngle: alpha, ProfileShift: 0.2 * r.Float64(), Thinning: 0.1 * r.Float64(),
			Tip: 3, TipForm: 2.9, Form: -3, Root: -3.75, Back: 30 * r.Float64()})
		z := 40 + r.IntN(60)
		radius := 2.5 * float64(z) / 2
		all = append(all, gauge.Spec{Kind: gauge.Ring, Module: 2.5, Teeth: z, PressureAngle: 25 * degree, ProfileShift: 0.4*r.Float64() - 0.2, Thinning: 0.1 * r.Float64(),
			Tip: radius - 2.5, TipForm: radius - 2.4, Form: radius + 2.5, Root: radius + 3.1})
	}
	return all
}

// inverse is the relative difference allowed to what comes back: some tens of roundings
// of diameters.
const inverse = 1e-12

// TestReadingsInvertMeasurements measures gears that are thicker or thinner than nominal
// and evaluates the values with the nominal gear.
func TestReadingsInvertMeasurements(t *testing.T) {
	spans, pins, chords := 0, 0, 0
	for _, s := range someGears(t) {
		g := must(t, s)
		for _, deviation := range []float64{0, -0.08, 0.05} {
			made := thicker(t, g, g.Thickness()+deviation)
			scale := math.Max(1, math.Abs(s.Tip))
			check := func(what string, r gauge.Reading, err error) {
				t.Helper()
				if err != nil {
					t.Errorf("%s of %+v: %v", what, s, err)
					return
				}
				near(t, what, r.Thickness, made.Thickness(), inverse*scale)
				near(t, what+", deviation", r.Deviation, deviation, inverse*scale)
				near(t, what+", thinning", r.Thinning, s.Thinning-deviation, inverse*scale)
				near(t, what+", shift", gauge.Thickness(s.Module, s.PressureAngle, r.Shift, s.Thinning), made.Thickness(), inverse*scale)
			}
			if all, err := made.Spans(); err == nil {
				for _, span := range all {
					r, err := g.FromSpan(span.TeethSpanned, span.Value)
					check("span", r, err)
					spans++
				}
			}
			if d, err := made.StockPin(gauge.Metric); err == nil {
				p, err := made.Pin(d)
				if err != nil {
					t.Fatal(err)
				}
				r, err := g.FromPins(d, p.Value)
				check("pins", r, err)
				pins++
			}
			if c, err := g.Chord(); err == nil {
				set, err := made.ChordAt(c.Height)
				if err != nil {
					t.Fatal(err)
				}
				r, err := g.FromChord(c.Height, set.Thickness)
				check("chord", r, err)
				chords++
			}
		}
	}
	if spans < 100 || pins < 300 || chords < 300 {
		t.Errorf("only %d spans, %d pins and %d chords were evaluated", spans, pins, chords)
	}
}

// TestReadingsRefuseNonsense reads values that no such gear can give.
func TestReadingsRefuseNonsense(t *testing.T) {
	g := must(t, gauge.OfTooth(tooth(t, "iso53-a", 2, 28, 0, 0), 0))
	large := must(t, gauge.OfTooth(tooth(t, "iso53-a", 2, 60, 0, 0), 0))
	for name, tc := range map[string]struct {
		err  error
		rule profile.Rule
	}{
		"span of another gear":    {second(g.FromSpan(4, 30)), gauge.RuleUnreachable},
		"span near the tip":       {second(g.FromSpan(6, 33.12)), gauge.RuleOffFlank},
		"no span":                 {second(g.FromSpan(4, 0)), profile.RuleOutOfRange},
		"span NaN":                {second(g.FromSpan(4, math.NaN())), profile.RuleNotFinite},
		"pin inside the base":     {second(g.FromPins(3.5, 50)), gauge.RuleUnreachable},
		"pin far outside":         {second(g.FromPins(3.5, 70)), gauge.RuleUnreachable},
		"pin too small":           {second(g.FromPins(2, 57)), gauge.RulePinTooSmall},
		"chord through the axis":  {second(g.FromChord(30, 1)), gauge.RuleUnreachable},
		"chord of another module": {second(g.FromChord(2, 10)), gauge.RuleUnreachable},
		"chord infinite":          {second(g.FromChord(2, math.Inf(1))), profile.RuleNotFinite},
		"caliper too low":         {second(large.FromChord(4.4, 4.77)), gauge.RuleOffFlank},
	} {
		if reason(tc.err) != tc.rule {
			t.Errorf("%s: %v, want %s", name, tc.err, tc.rule)
		}
	}
	two := second(g.FromPins(-1, math.Inf(1)))
	if finding(t, two, profile.RuleNotFinite).Param != gauge.ParamMeasuredOverPins || finding(t, two, profile.RuleOutOfRange).Param != gauge.ParamPinDiameter {
		t.Errorf("not both named: %v", two)
	}
}

// second drops a result.
func second[T any](_ T, err error) error { return err }

// TestLimits compares the limits with gears made to them.
func TestLimits(t *testing.T) {
	a := gauge.Allowance{Upper: -0.04, Lower: -0.09}
	for _, s := range someGears(t) {
		g := must(t, s)
		upper, lower := thicker(t, g, g.Thickness()+a.Upper), thicker(t, g, g.Thickness()+a.Lower)
		if spans, err := g.Spans(); err == nil {
			k := spans[0].TeethSpanned
			if l, err := g.SpanLimits(k, a); err == nil {
				one, _ := lower.Span(k)
				two, _ := upper.Span(k)
				near(t, "lower span", l.Smallest, one.Value, 0)
				near(t, "upper span", l.Largest, two.Value, 0)
				// A span moves by cos alpha of what the thickness does.
				near(t, "span allowance", l.Largest-l.Smallest, 0.05*math.Cos(s.PressureAngle), 1e-12)
			}
		}
		if d, err := g.StockPin(gauge.Metric); err == nil {
			if l, err := g.PinLimits(d, a); err == nil {
				one, _ := lower.Pin(d)
				two, _ := upper.Pin(d)
				if s.Kind == gauge.Ring { // a thinner tooth lets the pins further out
					one, two = two, one
				}
				near(t, "lower pins", l.Smallest, one.Value, 0)
				near(t, "upper pins", l.Largest, two.Value, 0)
			}
		}
		if c, err := g.Chord(); err == nil {
			l, err := g.ChordLimits(c.Height, a)
			if err != nil {
				t.Fatal(err)
			}
			if !(l.Smallest < l.Largest && l.Largest < c.Thickness) {
				t.Errorf("chord %v within %v?", c, l)
			}
			near(t, "chord allowance", l.Largest-l.Smallest, 0.05, 0.005)
		}
	}
	g := must(t, gauge.OfTooth(tooth(t, "iso53-a", 2, 28, 0, 0), 0))
	for name, tc := range map[string]struct {
		a    gauge.Allowance
		rule profile.Rule
	}{
		"wrong order": {gauge.Allowance{Upper: -0.1, Lower: 0}, profile.RuleConflicting},
		"NaN":         {gauge.Allowance{Upper: math.NaN()}, profile.RuleNotFinite},
		"a tooth":     {gauge.Allowance{Lower: -4}, profile.RuleOutOfRange},
	} {
		if err := second(g.SpanLimits(4, tc.a)); reason(err) != tc.rule {
			t.Errorf("%s: %v", name, err)
		}
	}
}
