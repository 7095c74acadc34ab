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

// offset is a path that can be followed.
func offset(t failer, l body.Loop, d float64) (body.Loop, []profile.Leftover) {
	t.Helper()
	path, left, err := l.Parallel(d)
	if err != nil {
		t.Fatalf("%s at %v: %v", l.Name, d, err)
	}
	return path, left
}

// widest is the largest distance at which a path can be followed, from the refusal.
func widest(t failer, l body.Loop) float64 {
	t.Helper()
	const beyond = 1000 // mm
	_, _, err := l.Parallel(beyond)
	var f profile.Finding
	if !errors.As(err, &f) || f.Rule != profile.RuleKerfTooWide || f.Param != profile.ParamKerf || f.Value.Value != 2*beyond {
		t.Fatalf("%s: %v", l.Name, err)
	}
	return f.Bound.Value / 2
}

// TestParallelDistance measures every path against many points of the edge: d from all,
// the edge nowhere farther than the material left says, and as many such places.
func TestParallelDistance(t *testing.T) {
	for _, l := range samples(t) {
		largest := widest(t, l)
		for _, d := range []float64{0.001, 0.05, 0.1, 0.25 + 1e-9, 1, 0.5 * largest, 0.9 * largest, 0.9999 * largest} {
			if d > largest {
				continue
			}
			path, left := offset(t, l, d)
			if fault := simple(path); fault != "" || path.Name != l.Name || path.Kind != l.Kind {
				t.Errorf("%s at %v: %s", l.Name, d, fault)
			}
			// The nearest of points a step apart is up to sqrt(d^2 + step^2/4) away.
			const n = 600
			edge := points(l, n)
			step := 2 * math.Pi * 50 / n
			for _, p := range points(path, 12) {
				if a := away(edge, p); a < d-2e-6 || a > math.Hypot(d, step/2)+2e-6 {
					t.Fatalf("%s at %v: %v is %v away", l.Name, d, p, a)
				}
			}
			track := points(path, n)
			deepest := 0.0
			for i, p := range left {
				deepest = math.Max(deepest, p.Depth)
				if a := away(edge, p.At); a > step {
					t.Errorf("%s at %v: %v is not on the edge", l.Name, d, p.At)
				}
				if a := away(track, p.At); math.Abs(a-d-p.Depth) > step {
					t.Errorf("%s at %v: %v left at %v, by points %v", l.Name, d, p.Depth, p.At, a-d)
				}
				if p.Depth <= 0 {
					t.Errorf("%s at %v: nothing left at %v", l.Name, d, p.At)
				}
				for _, q := range left[:i] {
					if r2.Norm(r2.Sub(p.At, q.At)) < 1e-6 {
						t.Errorf("%s at %v: %v twice", l.Name, d, p.At)
					}
				}
			}
			for _, p := range points(l, 12) {
				if a := away(track, p); a-d > deepest+step/2 {
					t.Errorf("%s at %v: %v left at %v, reported at most %v", l.Name, d, a-d, p, deepest)
				}
			}
		}
	}
}

// TestParallelRegion compares which points are inside the path with which are more than
// d inside the edge: no part of the hole is lost.
func TestParallelRegion(t *testing.T) {
	for _, l := range samples(t) {
		for _, share := range []float64{0.1, 0.5, 0.95} {
			d := share * widest(t, l)
			path, _ := offset(t, l, d)
			edge, track := points(l, 200), points(path, 200)
			const grid, doubtful = 20, 0.3
			for i := range grid {
				for j := range grid {
					p := r2.Vec{X: 100*float64(i)/grid - 50 + 0.123, Y: 100*float64(j)/grid - 50 + 0.321}
					a := away(edge, p)
					if math.Abs(a-d) < doubtful {
						continue
					}
					if want := inPolygon(edge, p) && a > d; want != inPolygon(track, p) || want != path.Contains(p) {
						t.Fatalf("%s at %v: %v inside: %v, want %v", l.Name, d, p, !want, want)
					}
				}
			}
		}
	}
}

// TestParallelBounds are known widths: the least radius of a round hole, half a keyway,
// the flats of a hexagon.
func TestParallelBounds(t *testing.T) {
	one := func(s body.Spec) body.Loop { return solve(t, s, plate(100)).Loops[0] }
	for _, tc := range []struct {
		loop body.Loop
		want float64
	}{
		{one(body.Spec{Bore: 20}), 10},
		{one(body.Spec{BoreHex: 18}), 9},
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}}), 3},
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 2, Depth: 8}}), 1},
		// A shallow keyway: the bottom's path comes to the height of the edges' chord, where
		// it would not follow the sides any more.
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 8, Depth: 0.5}}), 10.5 - math.Sqrt(100-16)},
	} {
		near(t, tc.loop.Name, widest(t, tc.loop), tc.want, 1e-4)
		offset(t, tc.loop, tc.want-1e-4)
		if _, _, err := tc.loop.Parallel(tc.want + 1e-4); err == nil {
			t.Errorf("%s: followed beyond %v", tc.loop.Name, tc.want)
		}
	}
	for _, d := range []float64{0, -1, math.NaN(), math.Inf(1), math.Inf(-1), 1e300} {
		_, _, err := one(body.Spec{Bore: 20}).Parallel(d)
		var f profile.Finding
		if !errors.As(err, &f) || f.Param != profile.ParamKerf || !f.Rule.Malformed() {
			t.Errorf("distance %v: %v", d, err)
		}
	}
}

// TestLeftover are depths known in closed form: in a corner of the angle c between its
// sides d/sin(c/2) - d, in one rounded by r < d the same less r/sin(c/2) - r.
func TestLeftover(t *testing.T) {
	const d = 0.4
	right := math.Sqrt2 - 1
	one := func(s body.Spec) body.Loop { return solve(t, s, plate(100)).Loops[0] }
	for _, tc := range []struct {
		loop  body.Loop
		d     float64
		n     int
		depth float64
	}{
		{one(body.Spec{Bore: 20}), d, 0, 0},
		{one(body.Spec{BoreHex: 18}), d, 6, d * (2/math.Sqrt(3) - 1)},
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyCustom, Width: 6, Depth: 3}}), d, 2, d * right},
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}}), d, 2, (d - 0.25) * right},
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}}), 0.25, 0, 0},
		{one(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}}), 0.2, 0, 0},
	} {
		path, left := offset(t, tc.loop, tc.d)
		if len(left) != tc.n {
			t.Errorf("%s: %v", tc.loop.Name, left)
		}
		for _, l := range left {
			near(t, tc.loop.Name, l.Depth, tc.depth, 1e-12)
		}
		if tc.d == 0.25 && len(path.Pieces) != 4+2 {
			t.Errorf("%s: corners of the beam's radius become sharp, got %d pieces", tc.loop.Name, len(path.Pieces))
		}
	}
}

// TestParallelCircle says that round holes stay round.
func TestParallelCircle(t *testing.T) {
	l := samples(t)[5]
	path, _ := offset(t, l, 0.5)
	center, radius, ok := path.Circle()
	if was, _, _ := l.Circle(); !ok || center != was || radius != 3 {
		t.Errorf("%+v", path)
	}
}

// TestParallelAny follows the loops of any body at any distance below the widest: there
// is a path all the way, and it keeps the distance.
func TestParallelAny(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		_, b := anyMade(t)
		if len(b.Loops) == 0 {
			t.Skip("nothing to follow")
		}
		l := rapid.SampledFrom(b.Loops).Draw(t, "loop")
		d := widest(t, l) * rapid.Float64Range(1e-3, 1).Draw(t, "share")
		path, left := offset(t, l, d)
		if fault := simple(path); fault != "" {
			t.Fatalf("%s at %v: %s in %+v", l.Name, d, fault, path)
		}
		for _, p := range points(path, 8) {
			if c := -l.Clearance(p); math.Abs(c-d) > 2e-6 {
				t.Fatalf("%s at %v: %v is %v away", l.Name, d, p, c)
			}
		}
		deepest := 0.0
		for _, p := range left {
			deepest = math.Max(deepest, p.Depth)
		}
		for _, p := range points(l, 8) {
			if far := math.Abs(path.Clearance(p)) - d; far > deepest+1e-6 {
				t.Fatalf("%s at %v: %v left at %v, reported at most %v", l.Name, d, far, p, deepest)
			}
		}
	})
}
