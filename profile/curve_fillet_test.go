package profile_test

import (
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

func TestFillet(t *testing.T) {
	for name, s := range map[string]profile.Spec{
		"undercut":            gear("iso53-c", 1, 9, 0),
		"plain":               gear("iso53-a", 2, 24, 0.3),
		"center above pitch":  {Module: 1, Teeth: 30, ProfileShift: 1.2, Rack: gear("iso53-a", 1, 30, 0).Rack},
		"sharp rack":          {Module: 1, Teeth: 24, Rack: profile.BasicRack{PressureAngle: 20 * degree, Addendum: 1, Dedendum: 1.25}},
		"an arc in the rack":  {Module: 1, Teeth: 40, ProfileShift: 1.25 - 0.38, Rack: gear("iso53-a", 1, 40, 0).Rack},
		"many teeth":          gear("iso53-a", 0.5, 400, -0.5),
		"few, high shift":     {Module: 1, Teeth: 10, ProfileShift: 1.1, MinTipThickness: 0.1, Rack: gear("iso53-a", 1, 10, 0).Rack},
		"full radius, 14.5 P": {Module: 1, Teeth: 24, Rounding: profile.RoundingFull, Rack: gear("full-depth-14.5", 1, 40, 0).Rack},
	} {
		fillet := filletOf(t, solve(t, s))
		checkCurve(t, name, fillet)
		checkParallel(t, name, fillet, 0.7*math.Min(fillet.LeastRadius(), 0.5))
		checkParallel(t, name, fillet, -0.1)
	}
}

// TestFilletPoints checks points of the fillet of 20 teeth, ISO 53 A, against
// values computed by us and confirmed by sweeping a rack (calc-P).
func TestFilletPoints(t *testing.T) {
	rows := references(t)
	fillet := filletOf(t, solve(t, gear("iso53-a", 1, 20, 0)))
	for _, p := range []int{22, 30, 45, 60, 75, 88, 90} {
		row := rows[fmt.Sprintf("calc-P-z20-x0-%d", p)]
		at := fillet.At(float64(p) * degree)
		row.checkRecomputed(t, "half_width", -at.X)
		row.checkRecomputed(t, "y", at.Y)
		row.checkRecomputed(t, "R", norm(at))
	}
}

// TestMinFilletRadius checks that no point of any fillet is curved more sharply
// than the least radius says.
func TestMinFilletRadius(t *testing.T) {
	for _, name := range []string{"iso53-a", "iso53-c", "stub-20"} {
		for _, z := range []int{6, 8, 12, 20, 60, 400} {
			for _, x := range []float64{-0.4, 0, 0.4, 0.8} {
				s := gear(name, 2, z, x)
				s.MinTipThickness = 0.1
				tooth, err := profile.Solve(s)
				if err != nil {
					continue
				}
				fillet := filletOf(t, tooth)
				least := math.Inf(1)
				for _, p := range along(fillet, 200) {
					if k := fillet.Curvature(p); k < 0 {
						least = math.Min(least, -1/k)
					}
				}
				near(t, fmt.Sprintf("%s z = %d, x = %v", name, z, x), tooth.Dimensions.MinFilletRadius, least, exact*math.Max(least, 1)*10)
			}
		}
	}
}
