package body_test

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

// rounding is the relative difference allowed to lengths and areas found in another way:
// a few dozen roundings of a double.
const rounding = 1e-13

// near fails unless got is want within tolerance.
func near(t testing.TB, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s is %v, want %v within %v", what, got, want, tolerance)
	}
}

// failer is what helpers need of a test.
type failer interface {
	Helper()
	Fatalf(string, ...any)
}

// solve makes a body that can be made.
func solve(t failer, s body.Spec, around body.Around) *body.Body {
	t.Helper()
	b, err := body.Solve(s, around)
	if err != nil {
		t.Fatalf("%+v in %+v: %v", s, around, err)
	}
	return b
}

// refusal are the findings of a body that cannot be made.
func refusal(t failer, s body.Spec, around body.Around) profile.Violations {
	t.Helper()
	b, err := body.Solve(s, around)
	var found profile.Violations
	if b != nil || !errors.As(err, &found) || len(found) == 0 {
		t.Fatalf("%+v in %+v is not refused: %v", s, around, err)
	}
	return found
}

// plate is a root circle with teeth of module 2.
func plate(rootDiameter float64) body.Around {
	return body.Around{RootDiameter: rootDiameter, WholeDepth: 4.5}
}

// wheel is a plate with everything in it.
func wheel() (body.Spec, body.Around) {
	return body.Spec{
		Bore:        20,
		Keyway:      body.Keyway{Standard: body.KeyISO},
		HoleCircles: []body.HoleCircle{{N: 6, Diameter: 4, Circle: 36}, {N: 12, Diameter: 3, Circle: 106}},
		Windows:     body.Windows{N: 5, RimWidth: 10, HubDiameter: 44, ArmWidth: 12},
	}, plate(120)
}

// choice is the value of the first choice for a parameter.
func choice(t testing.TB, b *body.Body, p profile.Param) float64 {
	t.Helper()
	for _, c := range b.Choices {
		if c.Param == p {
			return c.Value.Value
		}
	}
	t.Fatalf("no choice of %s in %v", p, b.Choices)
	return 0
}

// points are n+1 points spread evenly over each piece of a loop, joints twice.
func points(l body.Loop, n int) []r2.Vec {
	var out []r2.Vec
	for _, p := range l.Pieces {
		from, to := p.Curve.Domain()
		for i := range n + 1 {
			out = append(out, p.Curve.At(from+(to-from)*float64(i)/float64(n)))
		}
	}
	return out
}

// polygonArea is the area of a polygon, positive counter-clockwise.
func polygonArea(ps []r2.Vec) float64 {
	sum := 0.0
	for i, p := range ps {
		sum += r2.Cross(p, ps[(i+1)%len(ps)]) / 2
	}
	return sum
}

// inPolygon counts the edges a ray towards +X crosses.
func inPolygon(ps []r2.Vec, p r2.Vec) bool {
	in := false
	for i, a := range ps {
		b := ps[(i+1)%len(ps)]
		if (a.Y > p.Y) != (b.Y > p.Y) && p.X < a.X+(p.Y-a.Y)/(b.Y-a.Y)*(b.X-a.X) {
			in = !in
		}
	}
	return in
}

// away is the distance from p to the nearest of many points.
func away(ps []r2.Vec, p r2.Vec) float64 {
	least := math.Inf(1)
	for _, q := range ps {
		least = math.Min(least, (q.X-p.X)*(q.X-p.X)+(q.Y-p.Y)*(q.Y-p.Y))
	}
	return math.Sqrt(least)
}

// pick is the first finding of a rule.
func pick(all []profile.Finding, rule profile.Rule) (profile.Finding, bool) {
	for _, f := range all {
		if f.Rule == rule {
			return f, true
		}
	}
	return profile.Finding{}, false
}

// simple is "" for a loop that is closed, clockwise, free of crossings, smooth where it
// says so and has a corner where it does not.
func simple(l body.Loop) string {
	size := 0.0
	for _, p := range points(l, 8) {
		size = math.Max(size, r2.Norm(p))
	}
	for i, p := range l.Pieces {
		next := l.Pieces[(i+1)%len(l.Pieces)]
		if gap := r2.Norm(r2.Sub(profile.End(p.Curve), profile.Start(next.Curve))); !(gap <= 100*rounding*size) {
			return "gap"
		}
		from, to := p.Curve.Domain()
		if !(p.Curve.Speed(from)*math.Abs(to-from) > 0) {
			return "piece of no length"
		}
		start, _ := next.Curve.Domain()
		turn := math.Abs(math.Remainder(next.Curve.Heading(start)-p.Curve.Heading(to), 2*math.Pi))
		const bend = 1e-6 // rad; a heading of a short piece has the rounding of its ends
		if p.SmoothEnd && !(turn < bend) {
			return "bend in a smooth joint"
		}
	}
	const steps = 20
	ps := points(l, steps)
	if !(polygonArea(ps) < 0) {
		return "not clockwise"
	}
	if len(l.Pieces) == 1 {
		return ""
	}
	var once []r2.Vec // without the second of the two points at a joint
	for i, p := range ps {
		if i%(steps+1) != steps {
			once = append(once, p)
		}
	}
	ps = once
	for i := range ps {
		for j := i + 2; j < len(ps) && j-i < len(ps)-1; j++ {
			a, b, c, d := ps[i], ps[(i+1)%len(ps)], ps[j], ps[(j+1)%len(ps)]
			u, v := r2.Sub(b, a), r2.Sub(d, c)
			// Points of one straight piece are on neither side.
			side := func(along, p r2.Vec) float64 {
				if s := r2.Cross(along, p); math.Abs(s) > 100*rounding*size*r2.Norm(along) {
					return s
				}
				return 0
			}
			if side(u, r2.Sub(c, a))*side(u, r2.Sub(d, a)) < 0 && side(v, r2.Sub(a, c))*side(v, r2.Sub(b, c)) < 0 {
				return "crossing"
			}
		}
	}
	return ""
}
