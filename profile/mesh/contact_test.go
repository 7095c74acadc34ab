package mesh

import (
	"math"
	"testing"

	"flankwright/profile"
)

const deg = math.Pi / 180

// TestLargestGear: the largest gear whose tips stay off the base circle of a pinion, full
// depth (Norton, Machine Design, tables 12-4 and 12-5; Mott, table 8-6; from memory). The
// flanks are taken down to the base circle, as the tables do.
func TestLargestGear(t *testing.T) {
	for _, row := range []struct {
		angle        float64
		pinion, gear int
	}{{20, 13, 16}, {20, 14, 26}, {20, 15, 45}, {20, 16, 101}, {20, 17, 1309}, {25, 9, 13}, {25, 10, 32}, {25, 11, 249}} {
		clear := func(z2 int) bool {
			m := Members{Module: 1, PressureAngle: row.angle * deg, Teeth: [2]int{row.pinion, z2}}
			return m.action(m.Reference()).onFirst(float64(z2)/2+1) >= 0
		}
		if !clear(row.gear) || clear(row.gear+1) {
			t.Errorf("%g degrees, pinion of %d: %d clears %v, one more %v", row.angle, row.pinion, row.gear, clear(row.gear), clear(row.gear+1))
		}
	}
	// A rack: 18 teeth of 20 degrees (SDP/SI, T-36), 12 of 25 (Norton), 14 of a stub.
	for _, row := range []struct {
		angle, addendum float64
		least           int
	}{{20, 1, 18}, {25, 1, 12}, {20, 0.8, 14}, {14.5, 1, 32}} {
		clear := func(z int) bool {
			m := Members{Module: 1, PressureAngle: row.angle * deg, Teeth: [2]int{z, 0}, Second: profile.FormRack}
			return m.action(m.Reference()).onFirst(row.addendum) >= 0
		}
		if !clear(row.least) || clear(row.least-1) {
			t.Errorf("%g degrees: %d teeth with a rack clear %v, one less %v", row.angle, row.least, clear(row.least), clear(row.least-1))
		}
	}
}

// TestInternalContactRatio: SDP/SI, Elements of Metric Gear Technology, table 5-4 (found):
// d_a1 = z1 + 2, d_a2 = z2 - 2 (1 - x2) with the table's sign of x2, flanks down to the base
// circle.
func TestInternalContactRatio(t *testing.T) {
	for _, row := range []struct {
		z1        int
		x2, ratio float64
	}{{48, 0.6, 1.512}, {47, 0.4, 1.726}, {45, 0.2, 1.933}, {44, 0.11, 2.014}, {42, 0.01, 2.088}} {
		m := Members{Module: 1, PressureAngle: 20 * deg, Teeth: [2]int{row.z1, 50}, Second: profile.FormRing}
		a := m.CenterDistance(-row.x2)
		tip1, tip2 := float64(row.z1)/2+1, 25-(1-row.x2)
		c := m.contact(a, edges{tip: tip1, tipForm: tip1, form: float64(row.z1) / 2 * math.Cos(20*deg)}, edges{tip: tip2, tipForm: tip2, form: 40, root: 40})
		if math.Abs(c.Ratio-row.ratio) > 0.0005*(1+1e-9) {
			t.Errorf("%d in 50: contact ratio %.4f, published %.3f", row.z1, c.Ratio, row.ratio)
		}
	}
}

// TestTrochoidDifference: standard internal pairs of 20 degrees are free of crossing tips
// with more than 9 teeth between them (SDP/SI, T-45, found; 9 itself passes by its own
// formulas).
func TestTrochoidDifference(t *testing.T) {
	for _, z2 := range []int{40, 60, 100, 200} {
		crosses := func(difference int) bool {
			rack, _ := profile.LookupRack("iso53-a", 1)
			spec := func(form profile.Form, z int) profile.Spec {
				return profile.Spec{Form: form, Module: 1, Teeth: z, Rack: rack.For(1, profile.RackChange{})}
			}
			r := Request{Specs: [2]profile.Spec{spec(profile.FormGear, z2-difference), spec(profile.FormRing, z2)}, Split: 0.5, TipGiven: [2]bool{true, true}}
			_, err := Solve(r)
			found, _ := err.(profile.Violations)
			for _, f := range found {
				if f.Rule == RuleTipsCross {
					return true
				}
			}
			return false
		}
		if crosses(10) || !crosses(7) {
			t.Errorf("ring of %d teeth: tips cross with 10 less %v, with 7 less %v", z2, crosses(10), crosses(7))
		}
	}
}
