package profile_test

import (
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

func TestInvolute(t *testing.T) {
	for _, s := range []profile.Spec{gear("iso53-a", 1, 9, 0), gear("iso53-a", 2, 24, 0.3), gear("iso53-a", 0.5, 400, 0)} {
		flank := flankOf(t, solve(t, s))
		name := fmt.Sprintf("flank of %d teeth", s.Teeth)
		checkCurve(t, name, flank)
		for _, d := range []float64{0.01, 0.2, -0.05} {
			checkParallel(t, name, flank, d)
		}
	}
	// On the base circle the involute starts with a cusp.
	c := profile.Involute{BaseRadius: 10, BaseHalfAngle: 0.1, From: 0.5, To: 0}
	if c.Speed(0) != 0 || !math.IsInf(c.Curvature(0), 1) || !math.IsInf(c.CurvatureRate(0), 1) {
		t.Error("no cusp on the base circle")
	}
	near(t, "radius on the base circle", norm(profile.End(c)), 10, 10*rounding)
}
