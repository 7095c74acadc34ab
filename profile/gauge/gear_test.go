package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// plain is an ordinary gear's numbers.
func plain(t testing.TB) gauge.Spec {
	t.Helper()
	return gauge.OfTooth(tooth(t, "iso53-a", 2, 28, 0, 0), 0)
}

// TestNewRefusals breaks one number after the other.
func TestNewRefusals(t *testing.T) {
	for name, tc := range map[string]struct {
		change func(*gauge.Spec)
		rule   profile.Rule
	}{
		"module NaN":        {func(s *gauge.Spec) { s.Module = math.NaN() }, profile.RuleNotFinite},
		"no module":         {func(s *gauge.Spec) { s.Module = 0 }, profile.RuleOutOfRange},
		"huge module":       {func(s *gauge.Spec) { s.Module = 101 }, profile.RuleOutOfRange},
		"two teeth":         {func(s *gauge.Spec) { s.Teeth = 2 }, profile.RuleOutOfRange},
		"flat angle":        {func(s *gauge.Spec) { s.PressureAngle = 0.1 }, profile.RuleOutOfRange},
		"shift":             {func(s *gauge.Spec) { s.ProfileShift = -2.1 }, profile.RuleOutOfRange},
		"thinning infinite": {func(s *gauge.Spec) { s.Thinning = math.Inf(1) }, profile.RuleNotFinite},
		"tip infinite":      {func(s *gauge.Spec) { s.Tip = math.Inf(1) }, profile.RuleNotFinite},
		"back NaN":          {func(s *gauge.Spec) { s.Back = math.NaN() }, profile.RuleNotFinite},
		"no circles":        {func(s *gauge.Spec) { s.Tip, s.TipForm, s.Form = 0, 0, 0 }, gauge.RuleInsideBase},
		"inside the base":   {func(s *gauge.Spec) { s.Form = 26.3 }, gauge.RuleInsideBase},
		"tip below":         {func(s *gauge.Spec) { s.Tip = 29 }, gauge.RuleCircleOrder},
		"no flank":          {func(s *gauge.Spec) { s.Form = s.TipForm }, gauge.RuleCircleOrder},
		"root above":        {func(s *gauge.Spec) { s.Root = 28 }, gauge.RuleCircleOrder},
		"pointed":           {func(s *gauge.Spec) { s.Tip, s.TipForm = 33, 33 }, profile.RulePointedTip},
		"no space":          {func(s *gauge.Spec) { s.ProfileShift = 2 }, gauge.RuleNoSpace},
	} {
		s := plain(t)
		tc.change(&s)
		_, err := gauge.New(s)
		finding(t, err, tc.rule)
		if err.Error() == "" {
			t.Error(name)
		}
	}
	s := plain(t)
	s.Module, s.Teeth, s.Thinning = math.NaN(), 0, math.Inf(-1)
	var all profile.Violations
	if _, err := gauge.New(s); !asViolations(err, &all) || len(all) != 3 {
		t.Errorf("not all three are named: %v", err)
	}
}

// asViolations is errors.As for tests that count findings.
func asViolations(err error, all *profile.Violations) bool {
	v, ok := err.(profile.Violations)
	*all = v
	return ok
}

// TestSpanRefusals spans past both ends of the flank, and what has no parallel flanks.
func TestSpanRefusals(t *testing.T) {
	g := must(t, plain(t))
	f := finding(t, second(g.Span(1)), gauge.RuleOffFlank)
	fewest, most := int(f.Also[1].Value), int(f.Also[2].Value)
	for k := fewest; k <= most; k++ {
		s, err := g.Span(k)
		if err != nil || s.ContactDiameter < 2*plain(t).Form || s.ContactDiameter > 2*plain(t).TipForm {
			t.Errorf("%d teeth: %+v, %v", k, s, err)
		}
	}
	for _, k := range []int{math.MinInt32, 0, fewest - 1, most + 1, 28, math.MaxInt32} {
		finding(t, second(g.Span(k)), gauge.RuleOffFlank)
	}
	spans, err := g.Spans()
	if err != nil || len(spans) != 3 || spans[0].TeethSpanned != 4 || spans[1].TeethSpanned != 3 || spans[2].TeethSpanned != 5 {
		t.Errorf("%+v, %v", spans, err)
	}
	ring := must(t, gauge.Spec{Kind: gauge.Ring, Module: 2, Teeth: 80, PressureAngle: 20 * degree, Tip: 78, TipForm: 78, Form: 82})
	finding(t, second(ring.Spans()), gauge.RuleNoSpan)
	finding(t, second(ring.Span(5)), gauge.RuleNoSpan)
	finding(t, second(ring.FromSpan(5, 30)), gauge.RuleNoSpan)
	short := plain(t)
	short.TipForm, short.Form = 27.9, 27.85
	finding(t, second(must(t, short).Spans()), gauge.RuleNoSpan)
}

// TestScaling makes the same gear twice, once in another size: every length of it scales.
func TestScaling(t *testing.T) {
	const factor = inch // so that it is also that of inches and millimetres
	for _, s := range someGears(t) {
		large := s
		for _, length := range []*float64{&large.Module, &large.Thinning, &large.Tip, &large.TipForm, &large.Form, &large.Root, &large.Back} {
			*length *= factor
		}
		g, h := must(t, s), must(t, large)
		same := func(what string, a, b float64) {
			t.Helper()
			near(t, what, b, a*factor, 1e-12*math.Max(math.Abs(b), large.Module))
		}
		if a, err := g.Spans(); err == nil {
			b, err := h.Spans()
			if err != nil || len(a) != len(b) {
				t.Fatal(a, b, err)
			}
			same("span", a[0].Value, b[0].Value)
		}
		if fits, err := g.PinRange(); err == nil {
			d := (fits.Smallest + fits.Largest) / 2
			a, _ := g.Pin(d)
			b, err := h.Pin(d * factor)
			if err != nil {
				t.Fatal(err)
			}
			same("pins", a.Value, b.Value)
			same("contact", a.Contact, b.Contact)
		}
		if a, err := g.Chord(); err == nil {
			b, _ := h.Chord()
			same("chord", a.Thickness, b.Thickness)
			same("height", a.Height, b.Height)
		}
	}
}

// TestChordRefusals puts the reference circle off the flank.
func TestChordRefusals(t *testing.T) {
	s := plain(t)
	s.Form = 28.1
	g := must(t, s)
	f := finding(t, second(g.Chord()), gauge.RuleOffFlank)
	least, most := f.Also[1].Value, f.Also[2].Value
	for _, h := range []float64{least, (least + most) / 2, most} {
		if _, err := g.ChordAt(h); err != nil {
			t.Errorf("height %v: %v", h, err)
		}
	}
	for _, h := range []float64{least - 1e-9, most + 1e-9, 0, math.NaN()} {
		if _, err := g.ChordAt(h); err == nil {
			t.Errorf("height %v is taken", h)
		}
	}
}

// TestWithThicknessRefusals leaves no tooth, no space, or no number.
func TestWithThicknessRefusals(t *testing.T) {
	g := must(t, plain(t))
	for name, tc := range map[string]struct {
		thickness float64
		rule      profile.Rule
	}{
		"pointed":  {1, profile.RulePointedTip},
		"no space": {6, gauge.RuleNoSpace},
		"NaN":      {math.NaN(), profile.RuleNotFinite},
	} {
		if _, err := g.WithThickness(tc.thickness); reason(err) != tc.rule {
			t.Errorf("%s: %v", name, err)
		}
	}
	if _, err := g.SpanLimits(4, gauge.Allowance{Lower: -2.5}); reason(err) != profile.RulePointedTip {
		t.Errorf("limits of no tooth: %v", err)
	}
}
