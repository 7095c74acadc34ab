package gauge_test

import (
	"math"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// TestToleranceRounding checks the standard's steps and range.
func TestToleranceRounding(t *testing.T) {
	const um = 1e-3
	got := gauge.Tolerances{SinglePitch: 4.949 * um, CumulativePitch: 4.951 * um, ProfileSlope: 5.24 * um, ProfileForm: 9.76 * um, ProfileTotal: 10.4 * um, Runout: 10.51 * um}.Rounded()
	want := gauge.Tolerances{SinglePitch: 4.9 * um, CumulativePitch: 5 * um, ProfileSlope: 5 * um, ProfileForm: 10 * um, ProfileTotal: 10 * um, Runout: 11 * um}
	for name, pair := range map[string][2]float64{"0.1 below": {got.SinglePitch, want.SinglePitch}, "0.1 above": {got.CumulativePitch, want.CumulativePitch},
		"0.5": {got.ProfileSlope, want.ProfileSlope}, "0.5 up": {got.ProfileForm, want.ProfileForm}, "1 down": {got.ProfileTotal, want.ProfileTotal}, "1 up": {got.Runout, want.Runout}} {
		near(t, name, pair[0], pair[1], 1e-15)
	}
	if _, err := gauge.FlankTolerances(1, 1000, 15000, 15); err != nil {
		t.Error(err)
	}
	if _, err := gauge.FlankTolerances(11, 10, 5, 0.5); err != nil {
		t.Error(err)
	}
	var all profile.Violations
	if _, err := gauge.FlankTolerances(12, 4, 4.9, 71); !asViolations(err, &all) || len(all) != 4 {
		t.Errorf("not all four are named: %v", err)
	}
	if _, err := gauge.FlankTolerances(0, 1001, math.NaN(), 0.4); !asViolations(err, &all) || len(all) != 4 {
		t.Errorf("not all four are named: %v", err)
	}
	// A class is a factor of the square root of two.
	one, _ := gauge.FlankTolerances(6, 20, 60, 3)
	two, _ := gauge.FlankTolerances(8, 20, 60, 3)
	near(t, "two classes", two.Runout, 2*one.Runout, 1e-15)
}
