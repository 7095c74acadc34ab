package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// TestBacklashOnTheCurves measures the teeth of both gears on the operating pitch
// circles, along their exact curves, and takes them off the pitch.
func TestBacklashOnTheCurves(t *testing.T) {
	one, two := tooth(t, "iso53-a", 2, 24, 0.2, 0.05), tooth(t, "iso53-a", 2, 61, 0.1, 0.08)
	g, mate := must(t, gauge.OfTooth(one, 0)), must(t, gauge.OfTooth(two, 0))
	for _, center := range []float64{85.5, 85.7, 86} {
		got, err := g.Backlash(mate, center)
		if err != nil {
			t.Fatal(err)
		}
		play := 2 * math.Pi * center / 85
		for _, solved := range []*profile.Tooth{one, two} {
			rw := center * float64(solved.Teeth) / 85
			flank := flankOf(t, solved)
			from, to := flank.Domain()
			radius := func(u float64) float64 { p := flank.At(u); return math.Hypot(p.X, p.Y) }
			sign := math.Copysign(1, radius(to)-radius(from))
			p := flank.At(stops(func(u float64) float64 { return sign * (radius(u) - rw) }, from, to))
			play -= 2 * rw * math.Atan2(-p.X, p.Y)
		}
		near(t, "backlash", got.Circumferential, play, 1e-10)
		near(t, "normal", got.Normal, play*math.Cos(got.OperatingPressureAngle), 1e-10)
		near(t, "operating angle", math.Cos(got.OperatingPressureAngle), 85*math.Cos(20*degree)/center, 1e-12)
	}
}

// TestBacklashOfThinning uses that at the reference center distance the backlash of
// unshifted gears is what their teeth are thinned by.
func TestBacklashOfThinning(t *testing.T) {
	g, mate := must(t, gauge.OfTooth(tooth(t, "iso53-a", 2, 24, 0, 0), 0)), must(t, gauge.OfTooth(tooth(t, "iso53-a", 2, 61, 0, 0), 0))
	got, err := thicker(t, g, g.Thickness()-0.07).Backlash(mate, 85)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "backlash", got.Circumferential, 0.07, 1e-12)
}

// TestBacklashRefusals asks for what cannot mesh.
func TestBacklashRefusals(t *testing.T) {
	g, finer := must(t, gauge.OfTooth(tooth(t, "iso53-a", 2, 24, 0, 0), 0)), must(t, gauge.OfTooth(tooth(t, "iso53-a", 1.5, 24, 0, 0), 0))
	ring := must(t, gauge.Spec{Kind: gauge.Ring, Module: 2, Teeth: 80, PressureAngle: 20 * degree, Tip: 78, TipForm: 78, Form: 82})
	for name, tc := range map[string]struct {
		err  error
		rule profile.Rule
	}{
		"too near":    {second(g.Backlash(g, 45)), gauge.RuleNoMesh},
		"finer mate":  {second(g.Backlash(finer, 48)), gauge.RuleMateDiffers},
		"ring":        {second(g.Backlash(ring, 56)), gauge.RuleMateDiffers},
		"no distance": {second(g.Backlash(g, math.NaN())), profile.RuleNotFinite},
	} {
		if reason(tc.err) != tc.rule {
			t.Errorf("%s: %v, want %s", name, tc.err, tc.rule)
		}
	}
	least := finding(t, second(g.Backlash(g, 45)), gauge.RuleNoMesh).Bound.Value
	if _, err := g.Backlash(g, least); err != nil {
		t.Errorf("the bound itself is refused: %v", err)
	}
}
