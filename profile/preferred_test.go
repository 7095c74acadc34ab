package profile_test

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"flankwright/profile"
)

// sizes is a list of numbers in a row.
func sizes(t *testing.T, r *reference, key string) []float64 {
	t.Helper()
	list, ok := r.Outputs[key].([]any)
	if !ok {
		t.Fatalf("%s: no list %q", r.ID, key)
	}
	out := make([]float64, len(list))
	for i, v := range list {
		out[i] = v.(float64)
	}
	return out
}

// TestPreferredModules checks the list against ISO 54:1996 series I and II less
// the avoided 6.5, and DIN 780-1:1977 below 1 mm (P01 to P03, from memory).
func TestPreferredModules(t *testing.T) {
	rows := references(t)
	want := slices.Concat(sizes(t, rows["P01"], "modules"), sizes(t, rows["P02"], "modules"), sizes(t, rows["P03"], "modules"))
	avoid := number(t, "P02", rows["P02"].Outputs, "avoid")
	want = slices.DeleteFunc(want, func(m float64) bool { return m == avoid })
	slices.Sort(want)
	if got := profile.PreferredModules(); !slices.Equal(got, want) {
		t.Errorf("got  %v\nwant %v", got, want)
	}
}

// TestPreferredPitches checks the list against Shigley, table 13-2 (P04, from
// memory).
func TestPreferredPitches(t *testing.T) {
	row := references(t)["P04"]
	want := slices.Concat(sizes(t, row, "coarse"), sizes(t, row, "fine"))
	if got := profile.PreferredPitches(); !slices.Equal(got, want) {
		t.Errorf("got  %v\nwant %v", got, want)
	}
}

// TestPitchConversion checks pitch and module of one gear against Machinery's
// Handbook, 31st ed., p. 2299 (P05 to P07, found). P05 prints 0.7937 for 32 P,
// which is 0.79375 exactly, and 0.7470 for 34 P where 0.7471 is nearer: both are
// tested against the recomputed value.
func TestPitchConversion(t *testing.T) {
	rows := references(t)
	for key := range rows["P05"].Outputs {
		var pitch float64
		if _, err := fmt.Sscan(key, &pitch); err != nil {
			t.Fatal(err)
		}
		d := solve(t, gear("full-depth-20", inch/pitch, 30, 0)).Dimensions
		rows["P05"].checkRecomputed(t, key, d.Module)
		if key != "32" && key != "34" {
			rows["P05"].check(t, key, d.Module)
		}
		rows["P06"].check(t, key, d.CircularPitch/inch)
		near(t, key+" P", d.DiametralPitch(), pitch, exact*pitch)
	}
	for key := range rows["P07"].Outputs {
		var module float64
		if _, err := fmt.Sscan(key, &module); err != nil {
			t.Fatal(err)
		}
		rows["P07"].check(t, key, solve(t, gear("iso53-a", module, 30, 0)).Dimensions.DiametralPitch())
	}
	// P08: manufacturer's technical handbook, 80 P (found).
	for angle, key := range map[string]string{"full-depth-14.5": "pb14.5", "full-depth-20": "pb20"} {
		d := solve(t, gear(angle, inch/80, 60, 0)).Dimensions
		rows["P08"].check(t, "m", d.Module)
		rows["P08"].check(t, "p", d.CircularPitch)
		rows["P08"].check(t, "S", d.ToothThickness)
		rows["P08"].check(t, key, d.BasePitch)
	}
}

// TestNearestPreferred checks ratio, ties of the unit conversion, and the ends.
func TestNearestPreferred(t *testing.T) {
	modules, pitches := profile.PreferredModules(), profile.PreferredPitches()
	for _, tc := range []struct {
		v     float64
		sizes []float64
		want  float64
		same  bool
	}{
		{2, modules, 2, true},
		{2.04, modules, 2, false},
		{2.2, modules, 2.25, false},
		{0.001, modules, 0.05, false},
		{1e6, modules, 50, false},
		{2.0000000001, modules, 2, true}, // five hundred times rounding, yet no other size
		{2.000001, modules, 2, false},
		// By ratio sqrt(28 * 32) = 29.93 parts them.
		{29.9, modules, 28, false},
		{29.95, modules, 32, false},
		{inch / (inch / 48), pitches, 48, true},
		{math.Nextafter(48, 49), pitches, 48, true},
		{17, pitches, 16, false},
	} {
		if got, same := profile.NearestPreferred(tc.v, tc.sizes); got != tc.want || same != tc.same {
			t.Errorf("nearest to %v is %v (%v), want %v (%v)", tc.v, got, same, tc.want, tc.same)
		}
	}
}
