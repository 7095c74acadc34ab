package body_test

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
	"pgregory.net/rapid"

	"flankwright/profile"
	"flankwright/profile/body"
)

// anySpec draws a body that is mostly near what gears have.
func anySpec() *rapid.Generator[body.Spec] {
	return rapid.Custom(func(t *rapid.T) body.Spec {
		length := func(name string, low, high float64) float64 { return rapid.Float64Range(low, high).Draw(t, name) }
		var s body.Spec
		switch rapid.IntRange(0, 5).Draw(t, "form of the bore") {
		case 1:
			s.Bore = length("bore", 0.1, 90)
		case 2:
			s.Bore = length("bore", 5, 60)
			s.Keyway.Standard = rapid.SampledFrom([]body.KeyStandard{body.KeyISO, body.KeyANSI}).Draw(t, "standard")
		case 3:
			s.Bore = length("bore", 5, 60)
			s.Keyway = body.Keyway{Standard: body.KeyCustom, Width: s.Bore * length("width", 0.01, 1.05), Depth: length("depth", 1e-3, 10)}
		case 4:
			s.Bore = length("bore", 5, 60)
			s.BoreFlat = s.Bore * length("flat", 0.45, 1.01)
		case 5:
			s.BoreHex = length("hexagon", 1, 90)
		}
		for range rapid.IntRange(0, 2).Draw(t, "hole circles") {
			s.HoleCircles = append(s.HoleCircles, body.HoleCircle{N: rapid.IntRange(1, 12).Draw(t, "holes"), Diameter: length("hole", 0.1, 20), Circle: length("circle", 1, 110)})
		}
		maybe := func(name string, low, high float64) float64 {
			if rapid.Bool().Draw(t, name+" given") {
				return length(name, low, high)
			}
			return 0
		}
		if rapid.Bool().Draw(t, "has windows") {
			s.Windows = body.Windows{N: rapid.IntRange(2, 12).Draw(t, "windows"), RimWidth: maybe("rim", 0.1, 30), HubDiameter: maybe("hub", 5, 80),
				ArmWidth: maybe("arm", 0.1, 30), CornerRadius: maybe("corner", 1e-3, 15)}
		}
		return s
	})
}

// anyMade draws a body that can be made.
func anyMade(t *rapid.T) (body.Spec, *body.Body) {
	s := anySpec().Draw(t, "spec")
	b, err := body.Solve(s, plate(100))
	if err != nil {
		t.Skip("refused")
	}
	return s, b
}

func TestProperty1Simple(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		_, b := anyMade(t)
		for i, l := range b.Loops {
			if i > 1 && i < len(b.Loops)-1 {
				continue // alike: property 4
			}
			if fault := simple(l); fault != "" {
				t.Fatalf("%s in %+v", fault, l)
			}
		}
	})
}

func TestProperty2Apart(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		_, b := anyMade(t)
		for i, l := range b.Loops {
			for _, p := range points(l, 6) {
				if !(r2.Norm(p) < 50) {
					t.Fatalf("%s reaches into the roots at %v", l.Name, p)
				}
				for j, o := range b.Loops {
					if i != j && o.Contains(p) {
						t.Fatalf("%v of the %s is inside the %s", p, l.Name, o.Name)
					}
				}
			}
		}
	})
}

func TestProperty3Scaling(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		s, b := anyMade(t)
		if s.Keyway.Standard == body.KeyISO || s.Keyway.Standard == body.KeyANSI {
			t.Skip("standards do not scale")
		}
		const k = 4 // a power of two changes no rounding
		s.HoleCircles = append([]body.HoleCircle(nil), s.HoleCircles...)
		for _, v := range []*float64{&s.Bore, &s.BoreFlat, &s.BoreHex, &s.Keyway.Width, &s.Keyway.Depth,
			&s.Windows.RimWidth, &s.Windows.HubDiameter, &s.Windows.ArmWidth, &s.Windows.CornerRadius} {
			*v *= k
		}
		for i := range s.HoleCircles {
			s.HoleCircles[i].Diameter *= k
			s.HoleCircles[i].Circle *= k
		}
		large := solve(t, s, body.Around{RootDiameter: 100 * k, WholeDepth: 4.5 * k})
		for i, l := range b.Loops {
			ps, qs := points(l, 5), points(large.Loops[i], 5)
			for j, p := range ps {
				// The largest corner that fits in front of the hub leaves 1e-5 mm of it at
				// any scale, and a chosen corner depends on that.
				chosen := s.Windows.N != 0 && s.Windows.CornerRadius == 0 && l.Name == "window" && r2.Norm(r2.Sub(r2.Scale(k, p), qs[j])) < 1e-3
				if r2.Scale(k, p) != qs[j] && !chosen {
					t.Fatalf("%v and %v", p, qs[j])
				}
			}
		}
	})
}

func TestProperty4Symmetry(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		_, b := anyMade(t)
		for i, l := range b.Loops {
			// A point of the edge has its mirror image on an edge, and so has the same
			// loop turned to the next of its kind.
			for _, p := range points(l, 2) {
				m := r2.Vec{X: -p.X, Y: p.Y}
				least := math.Inf(1)
				for _, o := range b.Loops {
					least = math.Min(least, math.Abs(o.Clearance(m)))
				}
				if least > 1e-11 {
					t.Fatalf("loop %d: the mirror image of %v is %v off", i, p, least)
				}
			}
			if i > 0 && b.Loops[i-1].Name == l.Name && math.Abs(b.Loops[i-1].Area()-l.Area()) > 1e-9 {
				t.Fatalf("%s differ", l.Name)
			}
		}
	})
}

// TestProperty5Bounds moves each value to its bound, a printed digit inside.
func TestProperty5Bounds(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		s := anySpec().Draw(t, "spec")
		_, err := body.Solve(s, plate(100))
		var found profile.Violations
		if !errors.As(err, &found) {
			t.Skip("made")
		}
		f := found[0]
		message, hint := f.Describe(profile.Quantity.String)
		if message == "" || hint == "" || f.Rule == "" || f.Param == "" {
			t.Fatalf("%+v", f)
		}
		const digit = 1e-4
		to := f.Bound.Value
		switch f.Bound.Toward {
		case profile.Downward:
			to -= digit
		case profile.Upward:
			to += digit
		default:
			return
		}
		if to <= 0 || f.Bound.Dimension != profile.Length {
			return
		}
		moved := false
		s.HoleCircles = append([]body.HoleCircle(nil), s.HoleCircles...)
		values := []*float64{&s.Bore, &s.BoreFlat, &s.BoreHex, &s.Keyway.Width, &s.Keyway.Depth,
			&s.Windows.RimWidth, &s.Windows.HubDiameter, &s.Windows.ArmWidth, &s.Windows.CornerRadius}
		for i := range s.HoleCircles {
			values = append(values, &s.HoleCircles[i].Diameter, &s.HoleCircles[i].Circle)
		}
		for _, v := range values {
			if *v == f.Value.Value && !moved {
				*v, moved = to, true
			}
		}
		// Values chosen for us cannot be moved, and a rim that reached past the axis leaves
		// no room yet just short of it. Two circles of holes may each break the same rule.
		if !moved || f.Param == body.ParamRimWidth && to > 49 || len(s.HoleCircles) > 1 {
			return
		}
		_, err = body.Solve(s, plate(100))
		var after profile.Violations
		errors.As(err, &after)
		for _, g := range after {
			if g.Rule == f.Rule && g.Param == f.Param && g.Value.Value == to {
				t.Fatalf("%s\nand with %v: %s", message, to, g.Error())
			}
		}
	})
}
