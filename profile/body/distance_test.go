package body

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
	"pgregory.net/rapid"

	"flankwright/profile"
)

// anyPiece draws a line or an arc of a few mm about the origin.
func anyPiece(t *rapid.T, name string) profile.Curve {
	point := func(name string) r2.Vec {
		return r2.Vec{X: rapid.Float64Range(-5, 5).Draw(t, name+" x"), Y: rapid.Float64Range(-5, 5).Draw(t, name+" y")}
	}
	if rapid.Bool().Draw(t, name+" is a line") {
		line := profile.StraightLine{A: point(name), B: point(name + " end")}
		if r2.Norm(r2.Sub(line.A, line.B)) < 1e-3 {
			line.B.X++
		}
		return line
	}
	from := rapid.Float64Range(-7, 7).Draw(t, name+" from")
	sweep := rapid.Float64Range(1e-3, 2*math.Pi).Draw(t, name+" sweep")
	if rapid.Bool().Draw(t, name+" clockwise") {
		sweep = -sweep
	}
	return profile.CircleArc{Center: point(name + " center"), Radius: rapid.Float64Range(1e-2, 4).Draw(t, name+" radius"), From: from, To: from + sweep}
}

// sampled are n+1 points spread evenly over a piece.
func sampled(c profile.Curve, n int) []r2.Vec {
	from, to := c.Domain()
	out := make([]r2.Vec, n+1)
	for i := range out {
		out[i] = c.At(from + (to-from)*float64(i)/float64(n))
	}
	return out
}

// TestBetween compares with the nearest of many pairs of points, which are at most half
// a step of either piece too far apart.
func TestBetween(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		a, b := anyPiece(t, "a"), anyPiece(t, "b")
		const n = 128
		found := math.Inf(1)
		for _, p := range sampled(a, n) {
			for _, q := range sampled(b, n) {
				found = math.Min(found, math.Hypot(p.X-q.X, p.Y-q.Y))
			}
		}
		s := between(a, b)
		const noise = 1e-9 // mm; a crossing is where sampling finds no more than rounding
		slack := (length(a) + length(b)) / (2 * n)
		if s.length > found+noise || s.length < found-slack-noise {
			t.Fatalf("%v, by points %v", s.length, found)
		}
		if math.Abs(r2.Norm(r2.Sub(s.from, s.to))-s.length) > noise {
			t.Fatalf("points %v and %v are not %v apart", s.from, s.to, s.length)
		}
		for i, p := range [2]r2.Vec{s.from, s.to} {
			if c := [2]profile.Curve{a, b}[i]; r2.Norm(r2.Sub(nearestOn(c, p), p)) > noise {
				t.Fatalf("%v is not on %+v", p, c)
			}
		}
		if back := between(b, a); math.Abs(back.length-s.length) > noise {
			t.Fatalf("%v, but %v the other way", s.length, back.length)
		}
	})
}

// TestNearestAndFarthest compares with many points.
func TestNearestAndFarthest(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		c := anyPiece(t, "piece")
		p := r2.Vec{X: rapid.Float64Range(-5, 5).Draw(t, "x"), Y: rapid.Float64Range(-5, 5).Draw(t, "y")}
		const n = 512
		least, most := math.Inf(1), 0.0
		for _, q := range sampled(c, n) {
			least, most = math.Min(least, r2.Norm(r2.Sub(q, p))), math.Max(most, r2.Norm(r2.Sub(q, p)))
		}
		const noise = 1e-12
		slack := length(c)/(2*n) + noise
		near, far := r2.Norm(r2.Sub(nearestOn(c, p), p)), r2.Norm(r2.Sub(farthestOn(c, p), p))
		if near > least+noise || near < least-slack || far < most-noise || far > most+slack {
			t.Fatalf("from %v to %v, by points from %v to %v", near, far, least, most)
		}
	})
}

// TestCrossings puts the crossings into both equations.
func TestCrossings(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		a, b := anyPiece(t, "a"), anyPiece(t, "b")
		for _, p := range crossings(a, b) {
			for _, c := range [2]profile.Curve{a, b} {
				const loose = 1e-9 // mm; lines nearly parallel cross far away
				scale := 1 + r2.Norm(p)
				off := 0.0
				switch c := c.(type) {
				case profile.StraightLine:
					off = r2.Cross(r2.Unit(r2.Sub(c.B, c.A)), r2.Sub(p, c.A))
				case profile.CircleArc:
					off = r2.Norm(r2.Sub(p, c.Center)) - c.Radius
				}
				if math.Abs(off) > loose*scale {
					t.Fatalf("%v is %v off %+v", p, off, c)
				}
			}
		}
	})
	circle := profile.CircleArc{Radius: 2, To: 1}
	if got := crossings(circle, circle); got != nil {
		t.Errorf("a circle crosses itself at %v", got)
	}
	line := profile.StraightLine{A: r2.Vec{Y: 2}, B: r2.Vec{X: 1, Y: 2}}
	if got := crossings(line, circle); len(got) != 2 || got[0] != (r2.Vec{Y: 2}) {
		t.Errorf("a tangent touches at %v", got)
	}
	if got := crossings(line, profile.StraightLine{A: r2.Vec{Y: 1}, B: r2.Vec{X: 1, Y: 1}}); got != nil {
		t.Errorf("parallels cross at %v", got)
	}
}
