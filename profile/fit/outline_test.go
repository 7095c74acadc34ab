package fit

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// TestOutlineProperties goes through the promises of an outline, numbered:
//
//  1. closed, each end the next start to the last bit
//  2. counter-clockwise and simple
//  3. z-fold symmetric to 1e-9 module, and mirror symmetric about each tooth
//  4. tangent-continuous where the exact profile is, to 1e-6 rad once rounded to 9
//     decimals
//  5. area and perimeter equal to the exact profile's within tolerance times perimeter
//  6. turning turns every point
func TestOutlineProperties(t *testing.T) {
	for name, tooth := range variety(t) {
		for _, kind := range []Kind{Arc, Cubic, Line} {
			for _, tolerance := range []float64{1e-3, 1e-5} {
				f := drawn(t, tooth, kind, tolerance)
				o := f.Outline(Extent{}, 0)
				check1Closed(t, name, o)
				check2Simple(t, name, o)
				check3Symmetric(t, name, tooth, f, o)
				if kind != Line {
					check4Smooth(t, name, tooth, o)
				}
				check5Integrals(t, name, tooth, o, tolerance)
			}
		}
	}
}

func check1Closed(t *testing.T, name string, o Path) {
	t.Helper()
	for i, s := range o.Segments {
		if next := o.Segments[(i+1)%len(o.Segments)]; s.End != next.Start {
			t.Fatalf("%s: gap after segment %d: %v, %v", name, i, s.End, next.Start)
		}
		if s.Length() < ShortestSegment {
			t.Errorf("%s: segment %d is %g mm long", name, i, s.Length())
		}
	}
}

// check2Simple: the polar angle of every joint and of points between grows steadily or
// falls back only where the flank is undercut; a loop around the axis whose radius and
// angle never return to the same place does not cross itself. It is checked outright:
// no two segments that are not neighbours come together.
func check2Simple(t *testing.T, name string, o Path) {
	t.Helper()
	if o.Area() <= 0 {
		t.Errorf("%s: area %g: not counter-clockwise", name, o.Area())
	}
	// By symmetry it is enough to try three pitches; chords of arcs are near enough
	// to find a crossing, since arcs here turn little.
	n := min(len(o.Segments), 600)
	for i := range n {
		for j := i + 2; j < n; j++ {
			a, b := o.Segments[i], o.Segments[j]
			if b.End == a.Start {
				continue
			}
			if crosses(a.Start, a.End, b.Start, b.End) {
				t.Fatalf("%s: segments %d and %d cross near %v", name, i, j, a.Start)
			}
		}
	}
}

func crosses(a, b, c, d r2.Vec) bool {
	side := func(p, q, r r2.Vec) float64 { return r2.Cross(r2.Sub(q, p), r2.Sub(r, p)) }
	return side(a, b, c)*side(a, b, d) < 0 && side(c, d, a)*side(c, d, b) < 0
}

func check3Symmetric(t *testing.T, name string, tooth *profile.Tooth, f *Tooth, o Path) {
	t.Helper()
	limit := 1e-9 * tooth.Spec.Module
	per := len(f.Land) + 2*len(f.Side) + len(f.Root)
	first, _ := halves(f.Land)
	// From the second tooth's land on, pitches repeat.
	from := per - len(first) + 1
	if len(f.Land) == 0 {
		from = per
	}
	for i := from; i+per < len(o.Segments)-len(f.Land); i++ {
		turned := r2.Rotate(o.Segments[i].Start, tooth.Pitch(), r2.Vec{})
		if off := r2.Norm(r2.Sub(turned, o.Segments[i+per].Start)); off > limit {
			t.Fatalf("%s: joint %d is %g mm from its place one pitch on", name, i, off)
		}
	}
	n := len(o.Segments)
	for i := range n {
		// The outline starts in the middle of tooth 1, so that joint i mirrors n-i.
		m := mirrored(o.Segments[i].Start)
		if off := r2.Norm(r2.Sub(m, o.Segments[(n-i)%n].Start)); off > limit {
			t.Fatalf("%s: joint %d is %g mm from the mirror image of its counterpart", name, i, off)
		}
	}
}

// check4Smooth rounds the outline as a file does and counts corners: a sharp tip has
// two a tooth, undercut and a chamfer two more each, a sharp rack's root none.
func check4Smooth(t *testing.T, name string, tooth *profile.Tooth, o Path) {
	t.Helper()
	const smooth = 1e-6 // rad
	corners, z := 0, tooth.Spec.Teeth
	for i, s := range o.Segments {
		next := o.Segments[(i+1)%len(o.Segments)]
		a, b := rounded(s).EndTangent(), rounded(next).StartTangent()
		if jump := math.Abs(math.Atan2(r2.Cross(a, b), r2.Dot(a, b))); jump > smooth {
			corners++
		}
	}
	want := 0
	if !tooth.LandSmooth {
		want += 2 * z
	}
	for i, p := range tooth.Side {
		if !p.SmoothEnd && i < len(tooth.Side)-1 {
			want += 2 * z
		}
	}
	if corners != want {
		t.Errorf("%s: %d corners, want %d", name, corners, want)
	}
}

// rounded is the segment as nine decimals give it.
func rounded(s Segment) Segment {
	const places = 1e9
	cut := func(v float64) float64 { return math.Round(v*places) / places }
	s.Start = r2.Vec{X: cut(s.Start.X), Y: cut(s.Start.Y)}
	s.End = r2.Vec{X: cut(s.End.X), Y: cut(s.End.Y)}
	s.Bulge = cut(s.Bulge)
	s.C1 = r2.Vec{X: cut(s.C1.X), Y: cut(s.C1.Y)}
	s.C2 = r2.Vec{X: cut(s.C2.X), Y: cut(s.C2.Y)}
	return s
}

// check5Integrals integrates area and length of the exact curves by Gauss-Legendre
// quadrature (gonum) and compares them with the drawn loop's.
func check5Integrals(t *testing.T, name string, tooth *profile.Tooth, o Path, tolerance float64) {
	t.Helper()
	curves := []profile.Curve{tooth.Land}
	for _, p := range tooth.Side {
		curves = append(curves, p.Curve, p.Curve) // both sides have the same integrals
	}
	if tooth.Root != nil {
		curves = append(curves, tooth.Root)
	}
	area, length := 0.0, 0.0
	for _, c := range curves {
		from, to := c.Domain()
		const points = 200
		area += quad.Fixed(func(u float64) float64 {
			sin, cos := math.Sincos(c.Heading(u))
			return r2.Cross(c.At(u), r2.Vec{X: cos, Y: sin}) * c.Speed(u) / 2
		}, math.Min(from, to), math.Max(from, to), points, quad.Legendre{}, 0)
		length += quad.Fixed(c.Speed, math.Min(from, to), math.Max(from, to), points, quad.Legendre{}, 0)
	}
	z := float64(tooth.Spec.Teeth)
	allowed := tolerance * length * z
	if got := o.Area(); math.Abs(got-area*z) > allowed {
		t.Errorf("%s: area %g, exact %g", name, got, area*z)
	}
	if got := o.Length(); math.Abs(got-length*z) > allowed {
		t.Errorf("%s: perimeter %g, exact %g", name, got, length*z)
	}
}

// TestOutlineTurned is property 6.
func TestOutlineTurned(t *testing.T) {
	f := drawn(t, solved(t, 2, 17, nil), Arc, 1e-3)
	straight, turned := f.Outline(Extent{}, 0), f.Outline(Extent{}, 0.3)
	for i, s := range straight.Segments {
		want := r2.Rotate(s.Start, 0.3, r2.Vec{})
		if off := r2.Norm(r2.Sub(want, turned.Segments[i].Start)); off > 100*rounding {
			t.Fatalf("joint %d is %g mm off", i, off)
		}
	}
}
