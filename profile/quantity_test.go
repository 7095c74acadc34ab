package profile_test

import (
	"math"
	"strconv"
	"testing"

	"pgregory.net/rapid"

	"flankwright/profile"
)

func TestQuantityString(t *testing.T) {
	for _, tc := range []struct {
		q    profile.Quantity
		want string
	}{
		{profile.LengthOf(12), "12 mm"},
		{profile.LengthOf(1.23456), "1.2346 mm"},
		{profile.LengthOf(1.23456).AtMost(), "1.2345 mm"},
		{profile.LengthOf(1.23454).AtLeast(), "1.2346 mm"},
		{profile.LengthOf(-1.23456).AtMost(), "-1.2346 mm"},
		{profile.LengthOf(-1.23456).AtLeast(), "-1.2345 mm"},
		// Rounding noise beside a printable value is not a reason to move on.
		{profile.LengthOf(math.Nextafter(0.3, 0)).AtMost(), "0.3 mm"},
		{profile.LengthOf(math.Nextafter(0.3, 1)).AtLeast(), "0.3 mm"},
		{profile.LengthOf(0.1 + 0.2).AtLeast(), "0.3 mm"},
		{profile.LengthOf(0), "0 mm"},
		{profile.LengthOf(math.Copysign(0, -1)), "0 mm"},
		{profile.LengthOf(1e-9), "0.000000001 mm"},
		{profile.LengthOf(-1e-9), "-0.000000001 mm"},
		{profile.AngleOf(20 * degree), "20 deg"},
		{profile.AngleOf(14.5 * degree), "14.5 deg"},
		{profile.NumberOf(17), "17"},
		{profile.NumberOf(0.38), "0.38"},
		{profile.LengthOf(1e300), "1" + zeros(300) + " mm"},
	} {
		if got := tc.q.String(); got != tc.want {
			t.Errorf("%+v is printed as %q, want %q", tc.q, got, tc.want)
		}
	}
	if got := profile.LengthOf(inch).Decimal(1/inch, 5); got != "1" {
		t.Errorf("an inch is printed as %q", got)
	}
}

func zeros(n int) string {
	s := make([]byte, n)
	for i := range s {
		s[i] = '0'
	}
	return string(s)
}

// TestBoundsStayBounds checks that a bound, printed, is on its safe side but for
// the noise that counts as being on the printed value.
func TestBoundsStayBounds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.OneOf(rapid.Float64Range(-1e4, 1e4), rapid.Float64Range(-1e-3, 1e-3), rapid.Float64Range(-1e-7, 1e-7)).Draw(t, "value")
		if v != 0 && math.Abs(v) < 1e-11 {
			t.Skip("below anything a bound is printed for")
		}
		decimals := rapid.IntRange(1, 9).Draw(t, "decimals")
		slack := 2e-6 * math.Pow10(-decimals) // twice printNoise
		printed := func(q profile.Quantity) float64 {
			text := q.Decimal(1, decimals)
			p, err := strconv.ParseFloat(text, 64)
			if err != nil {
				t.Fatal(err)
			}
			if unit := math.Pow10(-decimals); math.Abs(p-v) > unit && math.Abs(v) > unit {
				t.Fatalf("%v is printed as %s with %d decimals", v, text, decimals)
			}
			if (p == 0) != (v == 0) {
				t.Fatalf("%v is printed as %s", v, text)
			}
			return p
		}
		if p := printed(profile.NumberOf(v).AtMost()); p > v+slack {
			t.Fatalf("at most %v is printed as %v", v, p)
		}
		if p := printed(profile.NumberOf(v).AtLeast()); p < v-slack {
			t.Fatalf("at least %v is printed as %v", v, p)
		}
		printed(profile.NumberOf(v))
	})
}
