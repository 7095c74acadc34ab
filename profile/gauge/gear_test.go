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
	return gauge.OfTooth(tooth(t, "iso53-a", 2, 28, 0, 0))
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

// TestPinRefusals tries pins at both sides of both bounds, for every kind and reason.
func TestPinRefusals(t *testing.T) {
	for _, s := range someGears(t) {
		g := must(t, s)
		fits, err := g.PinRange()
		if err != nil {
			finding(t, err, gauge.RuleNoPin)
			continue
		}
		const off = 1e-9 // relative
		for _, d := range []float64{fits.Smallest, fits.Largest} {
			if _, err := g.Pin(d); err != nil {
				t.Errorf("%+v: bound %v: %v", s, d, err)
			}
		}
		small := finding(t, second(g.Pin(fits.Smallest*(1-off))), gauge.RulePinTooSmall)
		large := finding(t, second(g.Pin(fits.Largest*(1+off))), gauge.RulePinTooLarge)
		if small.Bound.Value != fits.Smallest || large.Bound.Value != fits.Largest {
			t.Errorf("bounds %v and %v of %v", small.Bound, large.Bound, fits)
		}
		p, err := g.Pin((fits.Smallest + fits.Largest) / 2)
		if err != nil {
			t.Fatal(err)
		}
		lower, upper := s.Form, s.TipForm
		contact := p.Contact
		if s.Kind != gauge.Rack {
			contact /= 2
		}
		if contact < math.Min(lower, upper) || contact > math.Max(lower, upper) {
			t.Errorf("%+v touches at %v", s, contact)
		}
	}
	// The three reasons for which a pin is too small.
	reasons := map[string]bool{}
	for _, s := range append(someGears(t), plain(t), must2(t, 0.1)) {
		g := must(t, s)
		for share := 0.3; share < 1; share += 0.05 {
			fits, err := g.PinRange()
			if err != nil {
				continue
			}
			f := finding(t, second(g.Pin(fits.Smallest*share)), gauge.RulePinTooSmall)
			reasons[f.Text] = true
		}
	}
	if len(reasons) != 3 {
		t.Errorf("reasons: %v", reasons)
	}
	for _, d := range []float64{math.NaN(), math.Inf(1), 0, -1} {
		if err := second(must(t, plain(t)).Pin(d)); err == nil {
			t.Errorf("a pin of %v does", d)
		}
	}
}

// must2 is a gear whose flank reaches down nearly to a root that is not deep.
func must2(t testing.TB, gap float64) gauge.Spec {
	s := plain(t)
	s.Root = s.Form - gap
	return s
}

// TestStockPins compares with what handbooks take.
func TestStockPins(t *testing.T) {
	stock := func(g gauge.Gear, system gauge.System) float64 {
		t.Helper()
		d, err := g.StockPin(system)
		if err != nil {
			t.Fatal(err)
		}
		return d
	}
	near(t, "module 1, 20 teeth", stock(full(t, gauge.External, 1, 20, 20*degree, 0), gauge.Metric), 1.7, 0)
	near(t, "4 P, 32 teeth", stock(full(t, gauge.External, inch/4, 32, 20*degree, 0), gauge.Inch), 0.432*inch, 1e-12)
	long := gauge.OfTooth(tooth(t, "full-depth-20", inch/4, 12, 0.5, 0))
	near(t, "long addendum pinion", stock(must(t, long), gauge.Inch), 0.48*inch, 1e-12) // 1.92/P
	near(t, "4 P ring", stock(full(t, gauge.Ring, inch/4, 60, 20*degree, 0), gauge.Inch), 0.42*inch, 1e-12)
	for _, s := range someGears(t) {
		g := must(t, s)
		for _, system := range []gauge.System{gauge.Metric, gauge.Inch} {
			d, err := g.StockPin(system)
			if err != nil {
				finding(t, err, gauge.RuleNoPin)
				continue
			}
			if _, err := g.Pin(d); err != nil {
				t.Errorf("stock pin: %v", err)
			}
		}
	}
}

// TestToleranceRounding checks the standard's steps and range.
func TestToleranceRounding(t *testing.T) {
	const um = 1e-3
	got := gauge.Tolerances{SinglePitch: 4.949 * um, CumulativePitch: 4.951 * um, ProfileSlope: 5.24 * um, ProfileForm: 9.76 * um, ProfileTotal: 10.4 * um, Runout: 10.51 * um}.Rounded()
	want := gauge.Tolerances{SinglePitch: 4.9 * um, CumulativePitch: 5 * um, ProfileSlope: 5 * um, ProfileForm: 10 * um, ProfileTotal: 10 * um, Runout: 11 * um}
	for name, pair := range map[string][2]float64{"0.1 below": {got.SinglePitch, want.SinglePitch}, "0.1 above": {got.CumulativePitch, want.CumulativePitch},
		"0.5": {got.ProfileSlope, want.ProfileSlope}, "0.5 up": {got.ProfileForm, want.ProfileForm}, "1 down": {got.ProfileTotal, want.ProfileTotal}, "1 up": {got.Runout, want.Runout}} {
		near(t, name, pair[0], pair[1], 1e-15)
	}
	if _, err := gauge.FlankTolerances(1, 1000, 15000, 15); err != nil {
		t.Error(err)
	}
	if _, err := gauge.FlankTolerances(11, 10, 5, 0.5); err != nil {
		t.Error(err)
	}
	var all profile.Violations
	if _, err := gauge.FlankTolerances(12, 4, 4.9, 71); !asViolations(err, &all) || len(all) != 4 {
		t.Errorf("not all four are named: %v", err)
	}
	if _, err := gauge.FlankTolerances(0, 1001, math.NaN(), 0.4); !asViolations(err, &all) || len(all) != 4 {
		t.Errorf("not all four are named: %v", err)
	}
	// A class is a factor of the square root of two.
	one, _ := gauge.FlankTolerances(6, 20, 60, 3)
	two, _ := gauge.FlankTolerances(8, 20, 60, 3)
	near(t, "two classes", two.Runout, 2*one.Runout, 1e-15)
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
