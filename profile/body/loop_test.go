package body_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
	"pgregory.net/rapid"

	"flankwright/profile"
	"flankwright/profile/body"
)

// samples are one loop of each form.
func samples(t failer) []body.Loop {
	custom := body.Keyway{Standard: body.KeyCustom, Width: 6, Depth: 2}
	var out []body.Loop
	for _, s := range []body.Spec{
		{Bore: 20},
		{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO}},
		{Bore: 20, Keyway: custom},
		{Bore: 20, BoreFlat: 17},
		{BoreHex: 18},
		{HoleCircles: []body.HoleCircle{{N: 1, Diameter: 7, Circle: 50}}},
		{Windows: body.Windows{N: 2, HubDiameter: 30, ArmWidth: 9, CornerRadius: 6}},
		{Windows: body.Windows{N: 5, HubDiameter: 30, ArmWidth: 9, CornerRadius: 2}},
		{Windows: body.Windows{N: 3, HubDiameter: 30, ArmWidth: 9, CornerRadius: 0.05}},
	} {
		out = append(out, solve(t, s, plate(100)).Loops[0])
	}
	return out
}

// TestLoop compares area, length and inside with a polygon of many points.
func TestLoop(t *testing.T) {
	for _, l := range samples(t) {
		const n = 4000
		ps := points(l, n)
		// The polygon misses segments of the angle step: area by less than r^2 s^3/12 each.
		near(t, l.Name+" area", l.Area(), -polygonArea(ps), 1e-5*l.Area())
		sum := 0.0
		for i, p := range ps {
			sum += r2.Norm(r2.Sub(ps[(i+1)%len(ps)], p))
		}
		near(t, l.Name+" length", l.Length(), sum, 1e-6*sum)
		rapid.Check(t, func(t *rapid.T) {
			p := r2.Vec{X: rapid.Float64Range(-55, 55).Draw(t, "x"), Y: rapid.Float64Range(-55, 55).Draw(t, "y")}
			edge := l.Clearance(p)
			const chord = 1e-4 // mm between the loop and the polygon, at most
			if math.Abs(edge) < chord {
				t.Skip("on the edge")
			}
			if in := inPolygon(ps, p); in != l.Contains(p) || in != (edge < 0) {
				t.Fatalf("%s: %v inside %v, polygon %v, clearance %v", l.Name, p, l.Contains(p), in, edge)
			}
		})
	}
}

// TestClearance compares the web's clearance with many points of all edges.
func TestClearance(t *testing.T) {
	s, around := wheel()
	b := solve(t, s, around)
	var edges []r2.Vec
	const n, step = 400, 0.5 // mm, longer than any step
	for _, l := range b.Loops {
		edges = append(edges, points(l, n)...)
	}
	edges = append(edges, points(body.Loop{Pieces: []profile.Piece{{Curve: profile.CircleArc{Radius: 60, To: 2 * math.Pi}}}}, 8*n)...)
	rapid.Check(t, func(t *rapid.T) {
		p := r2.Vec{X: rapid.Float64Range(-65, 65).Draw(t, "x"), Y: rapid.Float64Range(-65, 65).Draw(t, "y")}
		c := b.Clearance(p)
		off := r2.Norm(p) > 60
		for _, l := range b.Loops {
			off = off || l.Contains(p)
		}
		if off != (c < 0) {
			t.Fatalf("%v has the clearance %v", p, c)
		}
		if far := away(edges, p); c > far || !off && c < far-step {
			t.Fatalf("%v has the clearance %v, by points %v", p, c, far)
		}
	})
}
