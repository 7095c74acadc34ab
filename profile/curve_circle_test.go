package profile_test

import (
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

func TestCircleArc(t *testing.T) {
	for name, c := range map[string]profile.CircleArc{
		"counter-clockwise": {Center: r2.Vec{X: 3, Y: -2}, Radius: 5, From: 0.3, To: 1.7},
		"clockwise":         {Center: r2.Vec{X: 3, Y: -2}, Radius: 5, From: 1.7, To: 0.3},
		"over the seam":     {Radius: 0.5, From: 3, To: 4.5},
	} {
		checkCurve(t, name, c)
		checkParallel(t, name, c, 0.3)
		checkParallel(t, name, c, -0.3)
	}
}

func TestStraightLine(t *testing.T) {
	for name, c := range map[string]profile.StraightLine{
		"up":   {A: r2.Vec{X: 1, Y: 2}, B: r2.Vec{X: 1.5, Y: 7}},
		"left": {A: r2.Vec{X: 1, Y: 2}, B: r2.Vec{X: -4, Y: 2}},
	} {
		checkCurve(t, name, c)
		checkParallel(t, name, c, 0.3)
		checkParallel(t, name, c, -0.3)
		if profile.End(c) != c.B || profile.Start(c) != c.A {
			t.Errorf("%s: from %v to %v", name, profile.Start(c), profile.End(c))
		}
	}
}
