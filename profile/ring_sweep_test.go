package profile_test

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// cutterShape is a cutter's tooth as a polygon about its axis, centered on +Y.
type cutterShape []r2.Vec

// newCutterShape samples the solved external gear that the cutter is: the rack's dedendum
// is its addendum and the rack's rounding that of its tips. Thinning by flank of the ring
// makes its teeth as much thicker: a shift with a shorter addendum.
func newCutterShape(t *testing.T, s profile.Spec) cutterShape {
	t.Helper()
	thicker := 0.0
	if s.ThinningBy == profile.ThinByFlank {
		thicker = s.Thinning / (2 * s.Module * math.Tan(s.Rack.PressureAngle))
	}
	tool := profile.Spec{Module: s.Module, Teeth: s.CutterTeeth, ProfileShift: s.CutterShift + thicker, TipRadius: s.Rack.RootRadius,
		Rack: profile.BasicRack{PressureAngle: s.Rack.PressureAngle, Addendum: s.Rack.Dedendum - thicker*s.Module, Dedendum: 1.6 * s.Module, RootRadius: 0.2 * s.Module}}
	tooth := solve(t, tool)
	var left cutterShape
	for _, p := range append([]profile.Piece{{Curve: tooth.Land}}, tooth.Side...) {
		const points = 600 // chords within 0.05 um of the curves
		for _, u := range along(p.Curve, points) {
			if at := p.Curve.At(u); at.X <= 0 && (len(left) == 0 || at != left[len(left)-1]) {
				left = append(left, at)
			}
		}
	}
	shape := cutterShape{}
	for i := len(left) - 1; i >= 0; i-- {
		shape = append(shape, r2.Vec{X: -left[i].X, Y: left[i].Y})
	}
	return append(shape, left...)
}

// clearance is the signed distance from the tooth's edge to a point, negative inside.
func (c cutterShape) clearance(p r2.Vec) float64 {
	least := math.Inf(1)
	inside := false
	for i := range c {
		a, b := c[i], c[(i+1)%len(c)]
		ab, ap := r2.Sub(b, a), r2.Sub(p, a)
		if i+1 < len(c) && a != b {
			share := math.Max(0, math.Min(1, r2.Dot(ab, ap)/r2.Norm2(ab)))
			least = math.Min(least, r2.Norm2(r2.Sub(ap, r2.Scale(share, ab))))
		}
		if (a.Y > p.Y) != (b.Y > p.Y) && p.X < a.X+ab.X*(p.Y-a.Y)/ab.Y {
			inside = !inside
		}
	}
	if inside {
		return -math.Sqrt(least)
	}
	return math.Sqrt(least)
}

// swept is the least clearance of a point of the ring over a tooth's way through the space
// centered on +Y: the cutter's axis stands A from the ring's, and the ring turns by z0/z
// of what the cutter turns.
func (c cutterShape) swept(p r2.Vec, distance, ratio float64) float64 {
	at := func(f float64) float64 {
		// Clockwise turns: the ring's point by f k in the fixed frame, the cutter by f.
		q := r2.Rotate(p, -f*ratio, r2.Vec{})
		return c.clearance(r2.Rotate(r2.Sub(q, r2.Vec{Y: distance}), f, r2.Vec{}))
	}
	const reach, steps = 1.0, 200 // rad either way
	best, where := math.Inf(1), 0.0
	for i := range steps + 1 {
		f := reach * (2*float64(i)/steps - 1)
		if d := at(f); d < best {
			best, where = d, f
		}
	}
	for step := reach / steps; step > 1e-9; step /= 2 {
		for _, f := range [2]float64{where - step, where + step} {
			if d := at(f); d < best {
				best, where = d, f
			}
		}
	}
	return best
}

// TestCutRingAgainstSweptCutter: every point of a cut ring's land, fillet and flank lies
// on the envelope of the cutter, and nothing of the cutter reaches past it.
func TestCutRingAgainstSweptCutter(t *testing.T) {
	cases := []profile.Spec{}
	for _, name := range []string{"cut", "cut thin", "cut shift"} {
		cases = append(cases, rings()[name])
	}
	infed := rings()["cut thin"]
	infed.ThinningBy = profile.ThinByInfeed
	few := ring("iso53-c", 1, 90, 0.3)
	few.CutterTeeth, few.CutterShift = 24, -0.1
	cases = append(cases, infed, few)
	for _, s := range cases {
		tooth := solve(t, s)
		shape := newCutterShape(t, tooth.Spec)
		fillet := tooth.Side[0].Curve.(profile.CutterFillet)
		const polygon = 5e-5 // mm, half of which its chords miss the cutter
		points := 0
		for _, c := range []profile.Curve{tooth.Land, fillet, tooth.Side[1].Curve} {
			for _, u := range along(c, 12) {
				p := c.At(u)
				if gap := shape.swept(p, fillet.CenterDistance, fillet.Ratio); math.Abs(gap) > polygon {
					t.Errorf("z %d, cutter %d: point %v at radius %v is %v mm off the swept cutter", s.Teeth, s.CutterTeeth, p, norm(p), gap)
				}
				points++
			}
		}
		if points < 30 {
			t.Errorf("only %d points", points)
		}
	}
}
