package gauge_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// worn is a gear made up by chance, measured without error.
type worn struct {
	spec profile.Spec
	made gauge.Measurements
	both bool // thinned and shortened, which no measurement of the tip tells apart
}

// madeUp solves a gear of a preferred size and one of the pressure angles, plain, thinned,
// with a shortened tip, or both, and measures two spans, the tip and, sometimes, over
// pins. Not every draw can be made.
func madeUp(r *rand.Rand, pins bool) (worn, bool) {
	modules := profile.PreferredModules()
	for _, p := range profile.PreferredPitches() {
		modules = append(modules, inch/p)
	}
	m := modules[r.IntN(len(modules))]
	if m < 0.5 || m > 12 { // what calipers are held to
		return worn{}, false
	}
	alpha := []float64{14.5, 15, 17.5, 20, 20, 20, 20, 22.5, 25, 30}[r.IntN(10)] * degree
	rack, _ := profile.LookupRack("iso53-c", m)
	s := profile.Spec{Module: m, Teeth: 12 + r.IntN(70), Rack: rack.For(m, profile.RackChange{PressureAngle: &alpha})}
	if r.IntN(2) == 0 {
		s.ProfileShift = -0.3 + r.Float64()
	}
	var w worn
	kind := r.IntN(4)
	if kind&1 != 0 {
		s.Thinning = 0.08 * m * r.Float64()
	}
	if kind&2 != 0 {
		s.TipShortening = 0.15 * m * r.Float64()
	}
	w.both = kind == 3
	solved, err := profile.Solve(s)
	if err != nil {
		return worn{}, false
	}
	g, err := gauge.New(gauge.OfTooth(solved, 0))
	if err != nil {
		return worn{}, false
	}
	spans, err := g.Spans()
	if err != nil || len(spans) < 2 {
		return worn{}, false
	}
	w.spec = s
	w.made = gauge.Measurements{Teeth: s.Teeth, TipDiameter: solved.Dimensions.TipDiameter}
	for _, span := range spans[:2] {
		w.made.Spans = append(w.made.Spans, gauge.SpanReading{TeethSpanned: span.TeethSpanned, Value: span.Value})
	}
	if pins {
		d, err := g.StockPin(gauge.Metric)
		if err != nil {
			return worn{}, false
		}
		over, err := g.Pin(d)
		if err != nil {
			return worn{}, false
		}
		w.made.Pins = []gauge.PinReading{{PinDiameter: d, Value: over.Value}}
	}
	return w, true
}

// TestIdentifyFindsMadeUpGears measures 500 gears made up by chance with caliper noise
// and has them found again.
func TestIdentifyFindsMadeUpGears(t *testing.T) {
	const gears = 500
	for name, tc := range map[string]struct {
		noise       func(*rand.Rand) float64 // mm
		uncertainty float64                  // mm, what the noise stays within
		pins        bool
	}{
		"uniform 0.02":             {func(r *rand.Rand) float64 { return 0.02 * (2*r.Float64() - 1) }, 0.02, false},
		"uniform 0.02, pins":       {func(r *rand.Rand) float64 { return 0.02 * (2*r.Float64() - 1) }, 0.02, true},
		"normal, 3 sigma 0.02":     {func(r *rand.Rand) float64 { return 0.02 / 3 * r.NormFloat64() }, 0.02, false},
		"normal, sigma 0.02, 0.06": {func(r *rand.Rand) float64 { return 0.02 * r.NormFloat64() }, 0.06, false},
	} {
		t.Run(name, func(t *testing.T) {
			r := rand.New(rand.NewPCG(1, uint64(len(name))))
			found, first, unique, uniqueFirst, results := 0, 0, 0, 0, 0
			worst := 0.0
			for n := 0; n < gears; {
				w, ok := madeUp(r, tc.pins)
				if !ok {
					continue
				}
				n++
				made := w.made
				made.Uncertainty = tc.uncertainty
				largest := 0.0
				noise := func() float64 {
					e := tc.noise(r)
					largest = math.Max(largest, math.Abs(e))
					return e
				}
				made.TipDiameter += noise()
				for i := range made.Spans {
					made.Spans[i].Value += noise()
				}
				for i := range made.Pins {
					made.Pins[i].Value += noise()
				}
				id, err := gauge.Identify(made)
				if err != nil {
					if largest <= tc.uncertainty {
						t.Errorf("%+v, made as %+v: %v", made, w.spec, err)
					}
					continue
				}
				results += len(id.Results)
				if id.Unique {
					unique++
				}
				right := -1
				for i, res := range id.Results {
					if math.Abs(res.Module-w.spec.Module) < 1e-9 && res.PressureAngle == w.spec.Rack.PressureAngle {
						right = i
					}
				}
				if right < 0 {
					if largest <= tc.uncertainty {
						t.Errorf("%+v, made as %+v, is not among %+v", made, w.spec, id.Results)
					}
					continue
				}
				found++
				if right == 0 {
					first++
					if id.Unique {
						uniqueFirst++
					}
				}
				// A span that is off by u moves the shift by u/(2 m sin alpha); the tip moves it less.
				res := id.Results[right]
				off := math.Abs(res.Shift-w.spec.ProfileShift) * 2 * w.spec.Module * math.Sin(w.spec.Rack.PressureAngle) / math.Max(largest, 1e-9)
				if res.Addendum == 1 { // else the same gear is told as a stub
					if !w.both {
						worst = math.Max(worst, off)
					}
					inside := res.ShiftMin <= w.spec.ProfileShift && w.spec.ProfileShift <= res.ShiftMax
					if !inside && largest <= tc.uncertainty {
						t.Errorf("shift %v of %+v outside %+v", w.spec.ProfileShift, w.spec, res)
					}
				}
			}
			t.Logf("of %d gears %d were found, %d of them first; %d answers were unique, %d of those right, %d not unique; %.1f results on average",
				gears, found, first, unique, uniqueFirst, gears-unique, float64(results)/gears)
			t.Logf("shift off by at most %.2f of what the largest noise on a span means", worst)
			if float64(found) < 0.98*gears {
				t.Errorf("only %d of %d were found", found, gears)
			}
			if float64(uniqueFirst) < 0.98*float64(unique) {
				t.Errorf("only %d of %d unique answers are right", uniqueFirst, unique)
			}
			if worst > 1.001 {
				t.Errorf("shift off by %.2f of what the noise means", worst)
			}
		})
	}
}
