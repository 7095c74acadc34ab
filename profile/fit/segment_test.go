package fit

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
)

// rounding is what a few operations on numbers of order one leave.
const rounding = 1e-14

// TestArcMeasures checks an arc against the circle it was cut from: radius, center,
// length, swept area, bounds and tangents, from a hair to almost a half turn.
func TestArcMeasures(t *testing.T) {
	center, radius := r2.Vec{X: 0.3, Y: -0.7}, 2.5
	at := func(a float64) r2.Vec {
		return r2.Vec{X: center.X + radius*math.Cos(a), Y: center.Y + radius*math.Sin(a)}
	}
	for _, turn := range []float64{1e-4, 0.05, 0.0999, 0.1001, 1, 3.1, -0.05, -2} {
		from := 0.4
		s := ArcTo(at(from), at(from+turn), math.Tan(turn/4))
		loose := rounding / math.Abs(turn) // a center found from a short chord
		if got := s.Radius(); math.Abs(got-radius) > 10*loose {
			t.Errorf("turn %g: radius %g, want %g", turn, got, radius)
		}
		if got := r2.Norm(r2.Sub(s.Center(), center)); got > 10*loose/math.Abs(turn) {
			t.Errorf("turn %g: center is %g off", turn, got)
		}
		if got, want := s.Length(), radius*math.Abs(turn); math.Abs(got-want) > 10*rounding {
			t.Errorf("turn %g: length %g, want %g", turn, got, want)
		}
		// 1/2 integral of x dy - y dx along the circle, integrated by hand.
		want := radius*radius*turn/2 + radius*(center.X*(math.Sin(from+turn)-math.Sin(from))-center.Y*(math.Cos(from+turn)-math.Cos(from)))/2
		if got := s.SweptArea(); math.Abs(got-want) > 10*rounding {
			t.Errorf("turn %g: swept area %.17g, want %.17g", turn, got, want)
		}
		sense := math.Copysign(1, turn)
		for _, tangent := range []struct {
			got r2.Vec
			a   float64
		}{{s.StartTangent(), from}, {s.EndTangent(), from + turn}} {
			want := r2.Vec{X: -sense * math.Sin(tangent.a), Y: sense * math.Cos(tangent.a)}
			if off := r2.Norm(r2.Sub(tangent.got, want)); off > loose {
				t.Errorf("turn %g: tangent %v, want %v", turn, tangent.got, want)
			}
		}
	}
}

// TestBoundsAgainstSamples compares the box with that of many points.
func TestBoundsAgainstSamples(t *testing.T) {
	a, b := r2.Vec{X: 1, Y: 0}, r2.Vec{X: -0.2, Y: 0.9}
	for name, s := range map[string]Segment{
		"arc left": ArcTo(a, b, 0.7), "arc right": ArcTo(a, b, -0.9), "line": LineTo(a, b),
		"cubic": CubicTo(a, r2.Vec{X: 3, Y: 1}, r2.Vec{X: -2, Y: -1}, b),
	} {
		box := s.Bounds()
		min, max := r2.Vec{X: 9, Y: 9}, r2.Vec{X: -9, Y: -9}
		const samples = 20000
		for i := range samples + 1 {
			p := pointAt(s, float64(i)/samples)
			min = r2.Vec{X: math.Min(min.X, p.X), Y: math.Min(min.Y, p.Y)}
			max = r2.Vec{X: math.Max(max.X, p.X), Y: math.Max(max.Y, p.Y)}
		}
		const coarse = 1e-7 // an extreme between two of the samples
		if off := r2.Norm(r2.Sub(box.Min, min)) + r2.Norm(r2.Sub(box.Max, max)); off > coarse {
			t.Errorf("%s: box %v, sampled %v to %v", name, box, min, max)
		}
	}
}

// pointAt is the point at the share u of a segment.
func pointAt(s Segment, u float64) r2.Vec {
	switch {
	case s.Kind == Cubic:
		return s.cubicAt(u)
	case s.Bulge == 0:
		return r2.Add(r2.Scale(1-u, s.Start), r2.Scale(u, s.End))
	}
	return r2.Rotate(s.Start, u*s.Included(), s.Center())
}

// TestCubicMeasures checks length and area of a cubic against sums over many chords.
func TestCubicMeasures(t *testing.T) {
	s := CubicTo(r2.Vec{X: 1}, r2.Vec{X: 1.2, Y: 0.5}, r2.Vec{X: 0.7, Y: 0.8}, r2.Vec{Y: 1})
	const chords = 100000
	length, area := 0.0, 0.0
	for i := range chords {
		p, q := s.cubicAt(float64(i)/chords), s.cubicAt(float64(i+1)/chords)
		length += r2.Norm(r2.Sub(q, p))
		area += r2.Cross(p, q) / 2
	}
	const coarse = 1e-9 // chords of a hundred-thousandth
	if got := s.Length(); math.Abs(got-length) > coarse {
		t.Errorf("length %g, chords give %g", got, length)
	}
	if got := s.SweptArea(); math.Abs(got-area) > coarse {
		t.Errorf("area %g, chords give %g", got, area)
	}
}

// TestReversedAndMapped: a piece reversed twice, or mirrored twice, is itself, and
// both turn the sign of the area.
func TestReversedAndMapped(t *testing.T) {
	for _, s := range []Segment{
		ArcTo(r2.Vec{X: 1}, r2.Vec{Y: 1}, 0.3),
		LineTo(r2.Vec{X: 1}, r2.Vec{Y: 1}),
		CubicTo(r2.Vec{X: 1}, r2.Vec{X: 1, Y: 0.5}, r2.Vec{X: 0.5, Y: 1}, r2.Vec{Y: 1}),
	} {
		if got := s.Reversed().Reversed(); got != s {
			t.Errorf("reversed twice: %v, want %v", got, s)
		}
		if got := s.Mapped(mirrored, true).Mapped(mirrored, true); got != s {
			t.Errorf("mirrored twice: %v, want %v", got, s)
		}
		if got := s.SweptArea() + s.Reversed().SweptArea(); math.Abs(got) > rounding {
			t.Errorf("areas there and back sum to %g", got)
		}
	}
}

// TestOffset compares the distance to an arc's circle with the plain formula where
// that is well conditioned, and with a line where the arc is flat.
func TestOffset(t *testing.T) {
	p := r2.Vec{X: 0.4, Y: 0.9}
	for _, bulge := range []float64{0.5, -0.5, 0.01, -0.9} {
		s := ArcTo(r2.Vec{X: 1}, r2.Vec{Y: 1}, bulge)
		left := s.Radius() - r2.Norm(r2.Sub(p, s.Center())) // inside is left when turning left
		if bulge < 0 {
			left = -left
		}
		if got := s.offset(p); math.Abs(got-left) > 100*rounding {
			t.Errorf("bulge %g: offset %.17g, want %.17g", bulge, got, left)
		}
	}
	line := LineTo(r2.Vec{X: 1}, r2.Vec{Y: 1}).offset(p)
	flat := ArcTo(r2.Vec{X: 1}, r2.Vec{Y: 1}, 1e-12).offset(p)
	if math.Abs(line-flat) > 1e-11 || math.Abs(line-(-0.3/math.Sqrt2)) > rounding {
		t.Errorf("line %.17g, flat arc %.17g, want %.17g", line, flat, -0.3/math.Sqrt2)
	}
}
