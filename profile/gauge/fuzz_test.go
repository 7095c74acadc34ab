package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// described asks that every finding of an error has words, and numbers in them.
func described(t *testing.T, err error) {
	t.Helper()
	all, ok := err.(profile.Violations)
	if !ok || len(all) == 0 {
		t.Fatalf("%v is no list of findings", err)
	}
	for _, f := range all {
		message, hint := f.Describe(profile.Quantity.String)
		if f.Rule == "" || f.Param == "" || message == "" || hint == "" || math.IsNaN(f.Bound.Value) {
			t.Fatalf("%+v", f)
		}
		for _, q := range f.Also {
			if math.IsNaN(q.Value) {
				t.Fatalf("%+v", f)
			}
		}
	}
}

// FuzzMeasure measures anything at all: it is refused with findings that say something,
// or comes out in finite numbers that evaluate to the thickness again.
func FuzzMeasure(f *testing.F) {
	add := func(s gauge.Spec, pin, allowance float64) {
		f.Add(uint8(s.Kind), s.Module, s.Teeth, s.PressureAngle, s.ProfileShift, s.Thinning, s.Tip, s.TipForm, s.Form, s.Root, s.Back, pin, allowance)
	}
	for _, s := range someGears(f)[:12] {
		add(s, 1.7*s.Module, -0.05)
	}
	add(gauge.Spec{}, 0, 0)
	f.Fuzz(func(t *testing.T, kind uint8, module float64, teeth int, angle, shift, thinning, tip, tipForm, form, root, back, pin, allowance float64) {
		s := gauge.Spec{Kind: gauge.Kind(kind % 3), Module: module, Teeth: teeth, PressureAngle: angle, ProfileShift: shift, Thinning: thinning,
			Tip: tip, TipForm: tipForm, Form: form, Root: root, Back: back}
		g, err := gauge.New(s)
		if err != nil {
			described(t, err)
			return
		}
		scale := math.Max(module, math.Max(math.Abs(tip), math.Max(math.Abs(form), math.Abs(back))))
		// evaluates says whether a value is finite and what is read off it the thickness.
		evaluates := func(what string, value float64, err error, read func() (gauge.Reading, error)) {
			t.Helper()
			if err != nil {
				described(t, err)
				return
			}
			if math.IsNaN(value) || math.IsInf(value, 0) {
				t.Fatalf("%s of %+v is %v", what, s, value)
			}
			r, err := read()
			if err != nil {
				described(t, err) // a bound missed by rounding
				return
			}
			const amplified = 1e-6 // near its bounds a measurement hardly moves with the thickness
			if !(math.Abs(r.Thickness-g.Thickness()) <= amplified*scale) {
				t.Errorf("%s of %+v: %v reads as %+v, thickness %v", what, s, value, r, g.Thickness())
			}
		}
		spans, err := g.Spans()
		if err == nil {
			for _, w := range spans {
				evaluates("span", w.Value, nil, func() (gauge.Reading, error) { return g.FromSpan(w.TeethSpanned, w.Value) })
			}
		} else {
			described(t, err)
		}
		pins := []float64{pin}
		if d, err := g.IdealPin(); err == nil {
			pins = append(pins, d)
		} else {
			described(t, err)
		}
		if d, err := g.StockPin(gauge.Inch); err == nil {
			pins = append(pins, d)
		}
		for _, d := range pins {
			p, err := g.Pin(d)
			evaluates("pins", p.Value+p.Contact, err, func() (gauge.Reading, error) { return g.FromPins(d, p.Value) })
		}
		c, err := g.Chord()
		evaluates("chord", c.Thickness+c.Height, err, func() (gauge.Reading, error) { return g.FromChord(c.Height, c.Thickness) })
		l, err := g.ChordLimits(pin, gauge.Allowance{Lower: allowance})
		if err != nil {
			described(t, err)
		} else if !(l.Smallest <= l.Largest) {
			t.Errorf("limits %+v", l)
		}
	})
}
