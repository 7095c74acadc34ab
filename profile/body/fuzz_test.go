package body_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

// FuzzSolve asks for anything at all: it is refused with findings that say something, or
// made of simple loops, and so is the path of any beam along them; nothing panics.
func FuzzSolve(f *testing.F) {
	add := func(s body.Spec, around body.Around, d float64) {
		h := append(s.HoleCircles, body.HoleCircle{N: 1, Diameter: 1, Circle: 1})[0]
		w := s.Windows
		f.Add(s.Bore, uint8(s.Keyway.Standard), s.Keyway.Width, s.Keyway.Depth, s.BoreFlat, s.BoreHex, h.N, h.Diameter, h.Circle,
			w.N, w.RimWidth, w.HubDiameter, w.ArmWidth, w.CornerRadius, s.MinFeature, around.RootDiameter, around.WholeDepth, d)
	}
	s, around := wheel()
	add(s, around, 0.1)
	add(body.Spec{Bore: 20, BoreFlat: 18}, plate(100), 3)
	add(body.Spec{BoreHex: 20}, plate(100), 1)
	add(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyANSI}}, plate(50), 1)
	add(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 19.999, Depth: 1e-5}}, plate(50), 1e-9)
	add(body.Spec{Windows: body.Windows{N: 2000}}, plate(4e5), 1e-3)
	add(body.Spec{}, body.Around{}, math.NaN())
	f.Fuzz(func(t *testing.T, bore float64, standard uint8, width, depth, flat, hex float64, n int, diameter, circle float64,
		windows int, rim, hub, arm, corner, feature, root, whole, d float64) {
		s := body.Spec{Bore: bore, Keyway: body.Keyway{Standard: body.KeyStandard(standard), Width: width, Depth: depth}, BoreFlat: flat, BoreHex: hex,
			Windows: body.Windows{N: windows, RimWidth: rim, HubDiameter: hub, ArmWidth: arm, CornerRadius: corner}, MinFeature: feature}
		if n != 0 {
			s.HoleCircles = []body.HoleCircle{{N: n, Diameter: diameter, Circle: circle}}
		}
		around := body.Around{RootDiameter: root, WholeDepth: whole}
		b, err := body.Solve(s, around)
		if err != nil {
			for _, f := range refusal(t, s, around) {
				if message, hint := f.Describe(profile.Quantity.String); f.Rule == "" || f.Param == "" || message == "" || hint == "" || math.IsNaN(f.Bound.Value) {
					t.Fatalf("%+v: %+v", s, f)
				}
			}
			return
		}
		for i, l := range b.Loops {
			if i > 3 && i < len(b.Loops)-3 {
				continue // alike
			}
			if fault := simple(l); fault != "" {
				t.Fatalf("%+v: %s in %+v", s, fault, l)
			}
			path, left, err := l.Parallel(d)
			if err != nil {
				continue
			}
			if fault := simple(path); fault != "" {
				t.Fatalf("%+v at %v: %s in %+v", s, d, fault, path)
			}
			for _, p := range left {
				if !(p.Depth > 0) || !(math.Abs(l.Clearance(p.At)) < 1e-9*(1+r2.Norm(p.At))) {
					t.Fatalf("%+v at %v: %+v", s, d, p)
				}
			}
		}
		for _, f := range b.Features {
			if math.IsNaN(f.Value) || math.IsNaN(f.At.X) || f.Value < 0 {
				t.Fatalf("%+v: %+v", s, f)
			}
		}
	})
}
