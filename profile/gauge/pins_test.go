package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile/gauge"
)

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
	long := gauge.OfTooth(tooth(t, "full-depth-20", inch/4, 12, 0.5, 0), 0)
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

// TestPinRangeOfSteepFlanks takes a ring whose flank begins at the base circle, where no
// pin fits its curvature, and a pinion whose flanks face each other at the tip.
func TestPinRangeOfSteepFlanks(t *testing.T) {
	rb := 30 * math.Cos(20*degree)
	ring := must(t, gauge.Spec{Kind: gauge.Ring, Module: 2, Teeth: 30, PressureAngle: 20 * degree, Tip: rb, TipForm: rb, Form: 31.5})
	fits, err := ring.PinRange()
	if err != nil {
		t.Fatal(err)
	}
	d := fits.Largest * (1 - 1e-9)
	p, err := ring.Pin(d)
	if err != nil {
		t.Fatal(err)
	}
	r, err := ring.FromPins(d, p.Value)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "thickness", r.Thickness, ring.Thickness(), 1e-12)
	// At the contact of the largest pin the flank's radius of curvature is the pin's; it falls short by
	// the cube root of what the diameter does.
	contact := math.Sqrt(p.Contact*p.Contact/4 - rb*rb)
	near(t, "curvature", contact, d/2, 1e-1)

	pinion := must(t, gauge.Spec{Module: 1, Teeth: 3, PressureAngle: 20 * degree, ProfileShift: 0.8, Tip: 2.8, TipForm: 2.8, Form: 1.45})
	if fits, err := pinion.PinRange(); err != nil || fits.Largest != 5.6 {
		t.Errorf("%+v, %v", fits, err)
	}
}
