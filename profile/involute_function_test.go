package profile_test

import (
	"math"
	"testing"

	"flankwright/profile"
)

// TestInvTable checks the involute function against printed tables (E10 to E13:
// Machinery's Handbook, Gearing section; from memory, each recomputed).
func TestInvTable(t *testing.T) {
	rows := references(t)
	for _, id := range []string{"E10", "E11", "E12", "E13"} {
		angle := number(t, id, rows[id].Inputs, "involute function of")
		rows[id].check(t, "inv", profile.Inv(angle*degree))
		near(t, id+" inverse", profile.InverseInv(rows[id].value(t, "inv")), angle*degree, exact)
	}
}

// TestInvSmall checks the series: inv a = a^3/3 (1 + 2 a^2/5 + 17 a^4/105 + ...),
// the power series of tan a - a (Abramowitz and Stegun, 4.3.67).
func TestInvSmall(t *testing.T) {
	const relative = 4e-16 // two roundings
	for _, a := range []float64{1e-100, 1e-50, 1e-20, 1e-8, 1e-6, 1e-4, 1e-3} {
		q := a * a
		want := a * q / 3 * (1 + q*(2.0/5+q*17.0/105))
		near(t, "inv", profile.Inv(a), want, relative*want)
	}
	if got := profile.Inv(0); got != 0 {
		t.Errorf("inv 0 = %v", got)
	}
}

// roundTrip is the relative difference allowed after inv and back. A relative
// error of inv comes back at a third or less (its condition a inv'/inv is at
// least 3), so what is left are the roundings of tan, atan and the last Newton
// step.
const roundTrip = 1e-15

// tanError is what math.Tan adds below 1e-7, where it returns its argument and so
// leaves out a^2/3 of it.
const tanError = 3.4e-15

// TestInverseInvRoundTrip goes from 1e-100 rad to a billionth of the right angle.
func TestInverseInvRoundTrip(t *testing.T) {
	check := func(a float64) {
		t.Helper()
		allowed := roundTrip
		if a < 1e-7 {
			allowed += tanError
		}
		if back := profile.InverseInv(profile.Inv(a)); !(math.Abs(back-a) <= allowed*a) {
			t.Errorf("%v came back as %v, off by %.2g of it", a, back, (back-a)/a)
		}
	}
	for a := 1e-100; a < 1.5; a *= 1.0137 {
		check(a)
	}
	for gap := 0.1; gap > 1e-9; gap /= 1.7 {
		check(math.Pi/2 - gap)
	}
	// The other way round, over every size of y a double can have above the
	// underflow of its cube root's cube.
	for y := 1e-300; y < 1e300; y *= 7.3 {
		a := profile.InverseInv(y)
		if !(a > 0 && a <= math.Pi/2) {
			t.Fatalf("inverse of %v is %v", y, a)
		}
		const conditioned = 0.5  // beyond, tan of the rounded angle says more about rounding than about us
		allowed := 4 * roundTrip // inv has the condition 3 for small angles
		if a < 1e-7 {
			allowed += 3 * tanError
		}
		if y < conditioned {
			near(t, "inv of inverse", profile.Inv(a), y, allowed*y)
		}
	}
}

// TestInverseInvOutside checks what comes back outside the domain.
func TestInverseInvOutside(t *testing.T) {
	for _, y := range []float64{-1, -1e-300, math.Inf(1), math.Inf(-1), math.NaN()} {
		if got := profile.InverseInv(y); !math.IsNaN(got) {
			t.Errorf("inverse of %v is %v, want NaN", y, got)
		}
	}
	if got := profile.InverseInv(0); got != 0 {
		t.Errorf("inverse of 0 is %v", got)
	}
}
