package fit

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// slot is a closed loop, clockwise: two half circles of radius 1 joined by straight lines
// of length 2.
func slot() []profile.Piece {
	return []profile.Piece{
		{Curve: profile.StraightLine{A: r2.Vec{X: -1, Y: 1}, B: r2.Vec{X: 1, Y: 1}}, SmoothEnd: true},
		{Curve: profile.CircleArc{Center: r2.Vec{X: 1}, Radius: 1, From: math.Pi / 2, To: -math.Pi / 2}, SmoothEnd: true},
		{Curve: profile.StraightLine{A: r2.Vec{X: 1, Y: -1}, B: r2.Vec{X: -1, Y: -1}}, SmoothEnd: true},
		{Curve: profile.CircleArc{Center: r2.Vec{X: -1}, Radius: 1, From: -math.Pi / 2, To: -3 * math.Pi / 2}, SmoothEnd: true},
	}
}

// TestLoop: closed to the last bit, of the exact area and length, wherever it starts.
func TestLoop(t *testing.T) {
	area, length := -(math.Pi + 4), 2*math.Pi+4
	for _, kind := range []Kind{Arc, Cubic, Line} {
		const tolerance = 1e-4
		whole, worst := Loop(slot(), Options{Curves: kind, Tolerance: tolerance}, 0.3)
		allowed := 1e-12
		if kind == Line {
			allowed = tolerance * length
		}
		if worst > tolerance {
			t.Errorf("kind %d: deviation %g", kind, worst)
		}
		for i := range whole.Segments {
			for _, share := range []float64{0, 0.5} {
				p := whole.StartAt(i, share)
				for j, s := range p.Segments {
					if next := p.Segments[(j+1)%len(p.Segments)]; s.End != next.Start {
						t.Fatalf("kind %d started at %d: gap after segment %d", kind, i, j)
					}
				}
				if math.Abs(p.Area()-area) > allowed || math.Abs(p.Length()-length) > allowed {
					t.Errorf("kind %d started at %d: area %g, length %g, want %g and %g", kind, i, p.Area(), p.Length(), area, length)
				}
			}
		}
		i, share := whole.BestStart(func(p r2.Vec) float64 { return r2.Dot(p, r2.Rotate(r2.Vec{Y: 1}, 0.3, r2.Vec{})) })
		start := r2.Rotate(whole.StartAt(i, share).Segments[0].Start, -0.3, r2.Vec{})
		if math.Abs(start.Y-1) > 2*tolerance {
			t.Errorf("kind %d: the highest start is %v", kind, start)
		}
	}
}

// TestLoopNeedsATolerance: without one it would never end.
func TestLoopNeedsATolerance(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("no panic")
		}
	}()
	Loop(slot(), Options{}, 0)
}
