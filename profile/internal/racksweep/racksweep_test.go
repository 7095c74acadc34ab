package racksweep

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
)

const degree = math.Pi / 180

// rack is ISO 53:1998 type A on a gear of so many teeth, module 1.
func rack(teeth int, shift float64) Tool {
	return Tool{Module: 1, Teeth: teeth, PressureAngle: 20 * degree, Dedendum: 1.25, Rounding: 0.38, Shift: shift}
}

// TestDistance compares the signed distance with a polygon of the rack tooth's
// edge, built corner by corner.
func TestDistance(t *testing.T) {
	// The chords of an arc of 0.38 in steps of 70/1000 degrees lie
	// rho step^2/8 = 7e-8 inside it.
	const steps, chordError = 1000, 1e-7
	s := New(rack(20, 0.25))
	half := math.Pi/4 + (-1.0-0.25)*s.tan // at the tip, datum line at 0.25
	// From the left flank's far end down, over the flat, and up the right flank.
	var chain []r2.Vec
	for _, side := range []float64{-1, 1} {
		// Roundings end a quarter turn less the pressure angle after the flat.
		center := r2.Vec{X: side * (half - 0.38*math.Tan((90-20)/2*degree)), Y: -1 + 0.38}
		var arc []r2.Vec
		for i := range steps + 1 {
			sin, cos := math.Sincos(float64(i) / steps * 70 * degree)
			arc = append(arc, r2.Vec{X: center.X + side*0.38*sin, Y: center.Y - 0.38*cos})
		}
		last := arc[len(arc)-1]
		arc = append(arc, r2.Vec{X: last.X + side*10*s.tan, Y: last.Y + 10})
		if side < 0 {
			slices.Reverse(arc)
		}
		chain = append(chain, arc...)
	}
	rng := rand.New(rand.NewPCG(1, 2))
	for range 500 {
		p := r2.Vec{X: rng.Float64()*3 - 1.5, Y: rng.Float64()*4 - 2}
		want := math.Inf(1)
		for i := range chain[1:] {
			want = math.Min(want, toSegment(p, chain[i], chain[i+1]))
		}
		got, _, _ := s.distance(p.X, p.Y)
		if math.Abs(math.Abs(got)-want) > chordError {
			t.Errorf("distance at %v is %.9f, from the polygon %.9f", p, got, want)
		}
		inside := p.Y > -1 && math.Abs(p.X) < half+(p.Y+1)*s.tan && want > 0.2
		if inside && got > 0 {
			t.Errorf("%v is inside, distance %v", p, got)
		}
	}
}

func toSegment(p, a, b r2.Vec) float64 {
	ab, ap := r2.Sub(b, a), r2.Sub(p, a)
	u := math.Max(0, math.Min(1, r2.Dot(ap, ab)/r2.Norm2(ab)))
	return r2.Norm(r2.Sub(ap, r2.Scale(u, ab)))
}

// TestLeastAgainstDenseSweep rolls the rack in small steps over a whole turn, all
// its teeth at once, and compares.
func TestLeastAgainstDenseSweep(t *testing.T) {
	t.Parallel()
	rng := rand.New(rand.NewPCG(3, 4))
	for _, tool := range []Tool{rack(3, 0.5), rack(5, -0.5), rack(8, 0), rack(12, 0.8), rack(40, -1), rack(200, 0)} {
		s := New(tool)
		const steps = 20000
		for range 40 {
			radius := s.r + s.tip + rng.Float64()*3 - 0.5
			angle := (rng.Float64() - 0.5) * 2 * s.pitch
			sin, cos := math.Sincos(angle)
			p := r2.Vec{X: radius * sin, Y: radius * cos}
			dense := math.Inf(1)
			for i := range steps {
				// The rack moves by u, the gear turns with it, and rack teeth stand
				// at every pitch; those out of reach of the point are left out.
				turn := (float64(i)/steps - 0.5) * 2 * math.Pi
				u := turn * s.r
				psin, pcos := math.Sincos(angle + turn + s.pitch/2)
				a, b := radius*psin-u, radius*pcos-s.r
				a = math.Remainder(a, math.Pi*tool.Module)
				d, _, _ := s.distance(a, b)
				dense = math.Min(dense, d)
			}
			// A step moves the point by at most (1 + R/r) 2 pi r/steps.
			stepError := (1 + radius/s.r) * 2 * math.Pi * s.r / steps
			if got := s.Clearance(p); got > dense+s.slack || got < dense-stepError {
				t.Errorf("%+v at R %.4f, angle %.4f: %.9f, dense %.9f", tool, radius, angle, got, dense)
			}
		}
	}
}

// TestRootAndSpace checks points whose clearance is plain: on the root circle in
// the middle of a space it is zero, above and below it the distance to it.
func TestRootAndSpace(t *testing.T) {
	t.Parallel()
	s := New(rack(20, 0))
	const rounding = 1e-14 // of coordinates near 10
	for _, d := range []float64{-0.3, 0, 0.3} {
		sin, cos := math.Sincos(s.pitch / 2)
		r := 8.75 - d
		for _, side := range []float64{1, -1} {
			if got := s.Clearance(r2.Vec{X: side * r * sin, Y: r * cos}); math.Abs(got-d) > rounding {
				t.Errorf("%v under the root circle: %v", d, got)
			}
		}
	}
	if got := s.Clearance(r2.Vec{}); got != 8.75 {
		t.Errorf("the axis is %v from the rack, want 8.75", got)
	}
}

func BenchmarkClearance(b *testing.B) {
	for _, tool := range []Tool{rack(8, 0), rack(24, 0), rack(400, 0)} {
		s := New(tool)
		sin, cos := math.Sincos(s.pitch / 4)
		p := r2.Vec{X: -s.r * sin, Y: s.r * cos}
		b.Run("", func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				s.Clearance(p)
			}
		})
	}
}
