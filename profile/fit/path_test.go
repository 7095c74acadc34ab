package fit

import (
	"math"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
)

// randomLoop is a closed path of few segments of all kinds, often crossing itself, so
// that arcs and handles reach far past the polygon of the points and turns are mixed.
func randomLoop(rng *rand.Rand, kinds int) Path {
	point := func() r2.Vec { return r2.Vec{X: 20*rng.Float64() - 10, Y: 20*rng.Float64() - 10} }
	n := 2 + rng.IntN(8)
	points := make([]r2.Vec, n+1)
	for i := range points {
		points[i] = point()
	}
	points[n] = points[0]
	p := Path{Closed: true}
	for i := range n {
		a, b := points[i], points[i+1]
		switch rng.IntN(kinds) {
		case 0:
			p.Segments = append(p.Segments, ArcTo(a, b, math.Pow(2*rng.Float64()-1, 3)))
		case 1:
			p.Segments = append(p.Segments, LineTo(a, b))
		default:
			p.Segments = append(p.Segments, CubicTo(a, point(), point(), b))
		}
	}
	return p
}

// TestMeasure: what is measured at once is what the segments measure one by one.
func TestMeasure(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for range 2000 {
		p := randomLoop(rng, 3)
		shortest := math.Inf(1)
		box := p.Segments[0].Bounds()
		var count [Cubic + 1]int
		for _, s := range p.Segments {
			shortest = min(shortest, s.Length())
			b := s.Bounds()
			box.Min = r2.Vec{X: min(box.Min.X, b.Min.X), Y: min(box.Min.Y, b.Min.Y)}
			box.Max = r2.Vec{X: max(box.Max.X, b.Max.X), Y: max(box.Max.Y, b.Max.Y)}
			count[s.Kind]++
		}
		want := Measure{Length: p.Length(), Area: p.Area(), Shortest: shortest, Bounds: box, Count: count}
		if got := p.Measure(); got != want {
			t.Fatalf("%+v, want %+v", got, want)
		}
		if p.Shortest() != shortest {
			t.Fatalf("shortest %g, want %g", p.Shortest(), shortest)
		}
	}
}

// TestCounterClockwise: the turn is the sign of the area, also where the arcs' caps
// outweigh the polygon, as in a lens of two arcs.
func TestCounterClockwise(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	loops := []Path{{Closed: true, Segments: []Segment{
		ArcTo(r2.Vec{X: -1}, r2.Vec{X: 1}, 0.3), ArcTo(r2.Vec{X: 1}, r2.Vec{X: -1}, 0.3)}}}
	for i := range 4000 {
		loops = append(loops, randomLoop(rng, 1+i%3))
	}
	for _, p := range loops {
		if math.Abs(p.Area()) < 1e-9 { // mm^2, nothing but rounding
			continue
		}
		if got := p.CounterClockwise(); got != (p.Area() > 0) {
			t.Fatalf("%v with the area %g: %+v", got, p.Area(), p)
		}
		if p.Reversed().CounterClockwise() == p.CounterClockwise() {
			t.Fatalf("the same both ways: %+v", p)
		}
	}
}
