package profile_test

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// teethOfRows are the tooth numbers of the rows calc-U: no 9, no 13.
func teethOfRows() []int {
	return []int{7, 8, 10, 11, 12, 14, 15, 16, 17, 18, 19, 20, 21, 22, 23, 24, 25}
}

// TestPointedShift checks tip thicknesses at 20 degrees with da = m (z + 2 + 2x)
// against values computed by us (calc-U), and the pointed limit on both sides.
// U40 recalls the limit for 8 to 11 teeth with two digits, cut rather than
// rounded, so it is tested against the recomputed value.
func TestPointedShift(t *testing.T) {
	rows := references(t)
	for _, z := range teethOfRows() {
		row := rows[fmt.Sprintf("calc-U-%d", z)]
		near(t, fmt.Sprintf("z = %d, sa at x = 0", z), solve(t, gear("iso53-a", 1, z, 0)).Dimensions.TipThickness, row.value(t, "sa at x=0"), 10*exact)
		for key, thickness := range map[string]float64{"x(sa=0.2)": 0.2, "x(sa=0.25)": 0.25, "x(sa=0.4)": 0.4} {
			got := solve(t, gear("iso53-a", 1, z, row.value(t, key))).Dimensions.TipThickness
			// The thickness falls by up to 1.5 modules for each unit of x.
			near(t, fmt.Sprintf("z = %d, %s", z, key), got, thickness, 10*exact)
		}
		pointed(t, z, row.value(t, "x(sa=0)"))
	}
	for _, z := range []int{8, 9, 10, 11} {
		pointed(t, z, rows["U40"].value(t, fmt.Sprint(z)))
	}
}

// pointed checks that the shift x is where the tooth becomes pointed: accepted a
// little below, refused from there on. A land of a billionth of the module counts
// as none (leastEdge); it is reached about as far below the limit.
func pointed(t *testing.T, z int, x float64) {
	t.Helper()
	for _, step := range []float64{0, 1e-13, 1e-12, 1e-9, 1e-6, 1e-3} {
		const edge = 2e-9
		below := solve(t, gear("iso53-a", 1, z, x-step-edge))
		if sa := below.Dimensions.TipThickness; !(sa > 0 && sa < 5*(step+edge)) {
			t.Errorf("z = %d: tip %v thick %v below the limit", z, sa, step)
		}
		s := gear("iso53-a", 1, z, x+step)
		f := refused(t, s, profile.RulePointedTip)
		tip := float64(z) + 2 + 2*(x+step)
		near(t, "value", f.Value.Value, tip, exact*tip)
		if !(f.Bound.Value < tip+exact*tip && f.Bound.Value > tip-20*step-exact*tip) || f.Bound.Toward != profile.Downward {
			t.Errorf("z = %d: pointed at %v, tip %v, %v above the limit", z, f.Bound.Value, tip, step)
		}
	}
}

// TestMinTipThickness checks that a default tip is lowered to keep a thickness,
// only where it must be, and that the lowered tip has exactly it.
func TestMinTipThickness(t *testing.T) {
	rows := references(t)
	for _, z := range teethOfRows() {
		limit := rows[fmt.Sprintf("calc-U-%d", z)].value(t, "x(sa=0.2)")
		for _, step := range []float64{-0.1, -1e-9, 1e-9, 0.1, 0.5} {
			for _, m := range []float64{1, 0.1, 50} {
				s := gear("iso53-a", m, z, limit+step)
				s.MinTipThickness = 0.2 * m
				tooth := solve(t, s)
				w, lowered := pick(tooth.Warnings, profile.RuleTipLowered)
				if lowered != (step > 0) {
					t.Errorf("z = %d, x = limit %+v: lowered %v", z, step, lowered)
				}
				d := tooth.Dimensions
				if lowered {
					near(t, "thickness", d.TipThickness, 0.2*m, 30*exact*m)
					near(t, "bound", w.Bound.Value, d.TipDiameter, 0)
				} else if !(d.TipThickness >= 0.2*m) {
					t.Errorf("tip %v is thinner than asked", d.TipThickness)
				}
				near(t, "tip as made", tooth.Spec.Module*(float64(z)+2+2*s.ProfileShift)/2-d.TipDiameter/2, 0, 2*m)
				if full := m * (float64(z) + 2 + 2*s.ProfileShift); lowered != (d.TipDiameter < full*(1-exact)) {
					t.Errorf("tip %v, default %v, lowered %v", d.TipDiameter, full, lowered)
				}
			}
		}
	}
	// A given tip is judged, not lowered.
	s := gear("iso53-a", 1, 12, 0.5)
	s.TipDiameter, s.MinTipThickness = 15, 0.9
	f := refused(t, s, profile.RuleTipThickness)
	near(t, "value", f.Value.Value, 0.9, 0)
	s.MinTipThickness = f.Bound.Value
	solve(t, s)
	s.MinTipThickness = math.Nextafter(f.Bound.Value, 1)
	refused(t, s, profile.RuleTipThickness)
	// A tooth that is nowhere so thick cannot be lowered to it.
	s = gear("iso53-a", 1, 12, 0.5)
	s.MinTipThickness = 3
	refused(t, s, profile.RuleTipThickness)
}

// TestTipRounding checks the rounding's arc: its radius, tangent to the tip circle
// and to the flank, everywhere inside both.
func TestTipRounding(t *testing.T) {
	for _, q := range []float64{1e-6, 0.01, 0.1, 0.25} {
		for _, z := range []int{9, 17, 40, 400} {
			s := gear("iso53-a", 1, z, 0.1)
			s.TipRadius = q
			tooth := solve(t, s)
			arc, ok := tooth.Side[0].Curve.(profile.CircleArc)
			if !ok || tooth.Side[0].Part != profile.PartTipRounding || !tooth.Side[0].SmoothEnd || !tooth.LandSmooth || arc.Radius != q {
				t.Fatalf("z = %d: %+v", z, tooth.Side[0])
			}
			slack := rounding * tooth.Dimensions.TipDiameter
			near(t, "center below the tip circle", norm(arc.Center), tooth.Dimensions.TipDiameter/2-q, slack)
			flank := flankOf(t, tooth)
			flank.From *= 1.5 // the flank as if it went on
			_, off := nearest(flank, arc.Center)
			near(t, "center to the flank", off, q, slack)
			plain := gear("iso53-a", 1, z, 0.1)
			sharp := solve(t, plain).Dimensions
			if d := tooth.Dimensions; !(d.TipLand < sharp.TipThickness && d.TipFormDiameter < d.TipDiameter) || d.TipThickness != sharp.TipThickness {
				t.Errorf("land %v, tip form diameter %v of %v", d.TipLand, d.TipFormDiameter, d.TipDiameter)
			}
		}
	}
}

// TestTipChamfer checks the chamfer's ends: at its length along the tip circle and
// along the flank from the corner, both measured on the sharp tooth's curves.
func TestTipChamfer(t *testing.T) {
	for _, c := range []float64{1e-6, 0.01, 0.1, 0.2} {
		for _, z := range []int{9, 17, 40, 400} {
			sharp := solve(t, gear("iso53-a", 1, z, 0.1))
			s := gear("iso53-a", 1, z, 0.1)
			s.TipChamfer = c
			tooth := solve(t, s)
			line, ok := tooth.Side[0].Curve.(profile.StraightLine)
			if !ok || tooth.Side[0].Part != profile.PartTipChamfer || tooth.Side[0].SmoothEnd || tooth.LandSmooth {
				t.Fatalf("z = %d: %+v", z, tooth.Side[0])
			}
			slack := rounding * tooth.Dimensions.TipDiameter
			near(t, "along the tip circle", (sharp.Land.(profile.CircleArc).To-tooth.Land.(profile.CircleArc).To)*tooth.Land.(profile.CircleArc).Radius, c, slack)
			near(t, "start", norm(line.A), tooth.Dimensions.TipDiameter/2, slack)
			// The flank's length from the corner, by many short chords.
			flank := flankOf(t, sharp)
			flank.To = flankOf(t, tooth).From
			const chords = 2000 // each falls short by (length/chords)^3/24 R^2
			near(t, "along the flank", length(flank, chords), c, 1e-6*c+slack)
			near(t, "end", norm(r2.Sub(line.B, profile.End(flank))), 0, slack)
		}
	}
}

// length is the length of a curve as n chords.
func length(c profile.Curve, n int) float64 {
	sum := 0.0
	us := along(c, n)
	for i := range n {
		sum += norm(r2.Sub(c.At(us[i+1]), c.At(us[i])))
	}
	return sum
}
