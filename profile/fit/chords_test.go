package fit

import (
	"math"
	"testing"

	"flankwright/profile"
)

// TestBalancedChords: on a long curve balanced chords are 0.71 of those whose ends lie
// on the curve, and both sides of the curve are used to the same depth.
func TestBalancedChords(t *testing.T) {
	const tolerance = 1e-5
	for _, p := range solved(t, 2, 24, nil).Side {
		chain, worst := fitChords(p.Curve, tolerance)
		s := chordSpread(p.Curve)
		onCurve := math.Ceil(s.total / math.Sqrt(8*tolerance))
		const least, most = 0.70, 0.75 // sqrt(1/2), and what whole numbers and the ends cost
		if ratio := float64(len(chain)) / onCurve; ratio < least || ratio > most {
			t.Errorf("part %d: %d chords, %g with ends on the curve, ratio %.3f", p.Part, len(chain), onCurve, ratio)
		}
		if worst < 0.9*tolerance {
			t.Errorf("part %d: deviation %g wastes tolerance %g", p.Part, worst, tolerance)
		}
		// The middle of an inner chord lies as far inside as its ends outside.
		middle := len(chain) / 2
		mid := distanceTo(p.Curve, pointAt(chain[middle], 0.5))
		end := distanceTo(p.Curve, chain[middle].End)
		if math.Abs(mid-end) > 0.1*end {
			t.Errorf("part %d: chord is %g inside, joint %g outside", p.Part, mid, end)
		}
	}
}

// TestChordsOfCircle compares with the exact count: a chord over the angle a of a circle
// of radius R, its ends outside by e, sags by (R + e)(1 - cos(a/2)) = 2e at most.
func TestChordsOfCircle(t *testing.T) {
	const radius, tolerance = 10, 1e-3
	chain, worst := fitChords(profile.CircleArc{Radius: radius, To: math.Pi}, tolerance)
	angle := 2 * math.Acos(1-2*tolerance/(radius+tolerance))
	if least := math.Pi / angle; float64(len(chain)) > math.Ceil(least+2*(1-endChord)) || worst > tolerance {
		t.Errorf("%d chords, %.2f the least, deviation %g", len(chain), least, worst)
	}
}
