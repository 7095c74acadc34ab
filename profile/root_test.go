package profile_test

import (
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

// TestUndercutJunction checks where fillet and flank cross, against values
// computed by us (calc-C), in modules of any size.
func TestUndercutJunction(t *testing.T) {
	rows := references(t)
	for _, z := range []int{8, 10, 14} {
		for _, m := range []float64{1, 0.1, 50} {
			tooth := solve(t, gear("iso53-a", m, z, 0))
			row := rows[fmt.Sprintf("calc-C-%d", z)]
			row.checkRecomputed(t, "base_radius", tooth.Dimensions.BaseDiameter/2/m)
			// These are written with nine to twelve digits.
			const written = 1e-8
			near(t, row.ID, tooth.Dimensions.FormDiameter/2/m, row.value(t, "R_junction"), written)
			corner := profile.End(flankOf(t, tooth))
			near(t, row.ID+" width", -2*corner.X/m, row.value(t, "chordal width there"), written)
			if !tooth.Undercut {
				t.Errorf("%d teeth are not undercut", z)
			}
		}
	}
}

// criticalRows are the rows calc-F.
func criticalRows() []struct {
	id, rack string
	z        int
	x        float64
} {
	type row = struct {
		id, rack string
		z        int
		x        float64
	}
	var rows []row
	for _, kind := range []string{"A", "C"} {
		rack := map[string]string{"A": "iso53-a", "C": "iso53-c"}[kind]
		for _, r := range []struct {
			z int
			x float64
		}{{12, 0.3}, {17, 0}, {20, 0}, {20, 0.5}, {30, 0}, {60, 0}, {100, 0}} {
			rows = append(rows, row{fmt.Sprintf("calc-F-%s-z%d-x%v", kind, r.z, r.x), rack, r.z, r.x})
		}
	}
	return rows
}

// TestCriticalSection finds the 30 degree tangent of ISO 6336-3:2006 on the fillet
// itself and compares chord, radius of curvature and rack angle there with the
// standard's closed form (calc-F, computed by us).
func TestCriticalSection(t *testing.T) {
	rows := references(t)
	for _, r := range criticalRows() {
		row := rows[r.id]
		fillet := filletOf(t, solve(t, gear(r.rack, 1, r.z, r.x)))
		// The tangent leans 30 degrees outwards from the tooth's center line, by the
		// direction between two near points, not by the curve's own heading.
		const h = 1e-4
		lean := func(p float64) float64 {
			dx := difference(func(p float64) float64 { return fillet.At(p).X }, p, h)
			dy := difference(func(p float64) float64 { return fillet.At(p).Y }, p, h)
			return math.Atan2(-dx, -dy)
		}
		low, high := fillet.From, fillet.To
		const halvings = 50
		for range halvings {
			if mid := (low + high) / 2; lean(mid) < 30*degree {
				low = mid
			} else {
				high = mid
			}
		}
		// Rounding of points near 50, 1e-14, over the step 12 h; errors of p come
		// back in the chord and radius at the rate of 1 module for each rad.
		const differences = 1e-9
		near(t, r.id+" theta", math.Pi/2-low, row.value(t, "theta"), differences)
		near(t, r.id+" sFn", -2*fillet.At(low).X, row.value(t, "sFn"), differences)
		near(t, r.id+" rhoF", -1/fillet.Curvature(low), row.value(t, "rhoF"), 2*differences)
	}
}

// TestRootCircleAndForm checks root radius, form radius and least fillet radius
// (calc-F, computed by us; the latter is the formula of Mitchiner and Mabie 1982
// and AGMA 908-B89, F01, from memory, confirmed on the trochoid's own curvature).
// The form radius of undercut rows has no closed form: TestUndercutJunction.
func TestRootCircleAndForm(t *testing.T) {
	rows := references(t)
	for _, r := range criticalRows() {
		row := rows[r.id]
		tooth := solve(t, gear(r.rack, 1, r.z, r.x))
		d := tooth.Dimensions
		row.checkRecomputed(t, "root_radius", d.RootDiameter/2)
		row.checkRecomputed(t, "rho_f_at_root", d.MinFilletRadius)
		if !tooth.Undercut {
			row.checkRecomputed(t, "root_form_radius", d.FormDiameter/2)
		} else if s, ok := row.Recomputed["root_form_radius"].(string); !ok || s[0] != 'u' {
			t.Errorf("%s is undercut, the row has %v", r.id, s)
		}
	}
	rows["F01"].checkRecomputed(t, "closed form z=20,ISO A", solve(t, gear("iso53-a", 1, 20, 0)).Dimensions.MinFilletRadius)
}
