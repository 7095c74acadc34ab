package profile_test

import (
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

// rackOf is a rack of module 1 with no rounding.
func rackOf(pressureAngle, addendum, dedendum float64) profile.BasicRack {
	return profile.BasicRack{PressureAngle: pressureAngle * degree, Addendum: addendum, Dedendum: dedendum}
}

// TestFullRadius checks the full-radius limit against published racks.
func TestFullRadius(t *testing.T) {
	rows := references(t)
	// ISO 53:1998 type D prints 0.39, a rounding of its limit cut short.
	rows["R04"].checkRecomputed(t, "rho_fP", rackOf(20, 1, 1.4).FullRadius(1, 0))
	near(t, "R04, as printed", rackOf(20, 1, 1.4).FullRadius(1, 0), 0.39, 0.005)
	// AGMA 201.02, 25 degrees.
	rows["R10"].check(t, "rf_full_round_limit", rackOf(25, 1, 1.25).FullRadius(1, 0))
	// ANSI/AGMA 1006-A97 type PT-1 has the full radius.
	pt1 := rackOf(20, 1, 1.33)
	pt1.RootRadius = pt1.FullRadius(1, 0)
	rows["R14"].check(t, "rho", pt1.RootRadius)
	rows["R14"].check(t, "form_dedendum", pt1.StraightDepth())
	// ISO 53:1998: up to this clearance the flank can stay straight down to the
	// addendum depth, since c/(1 - sin alpha) is the full radius there.
	limit := rows["R05"].value(t, "cP_limit")
	near(t, "R05", limit/(1-math.Sin(20*degree)), rackOf(20, 1, 1+limit).FullRadius(1, 0), exact)
	near(t, "R05, as printed", limit, 0.295, 0.0005)
	// R01, R08: printed radii are c/(1 - sin alpha), rounded.
	rows["R01"].check(t, "rho_fP", rows["R01"].value(t, "rho_fP"))
	near(t, "R01", 0.25/(1-math.Sin(20*degree)), rows["R01"].value(t, "rho_fP"), exact)
	near(t, "R08", 0.157/(1-math.Sin(14.5*degree)), rows["R08"].value(t, "rf"), exact)
}

// TestFullRadiusShape rebuilds the full radius from the rack's triangle: a circle
// that touches both flanks and the tip line.
func TestFullRadiusShape(t *testing.T) {
	for _, angle := range []float64{10, 14.5, 20, 25, 30, 35} {
		for _, widening := range []float64{0, 0.1, 0.5} {
			for _, module := range []float64{0.1, 2, 50} {
				b := rackOf(angle, module, 1.1*module)
				full := b.FullRadius(module, widening*module)
				// The circle is centered on the rack tooth, full above the tip; the
				// flank's line passes half a space from there on the datum line.
				half := (math.Pi/4+widening/2)*module + (full-b.Dedendum)*math.Tan(angle*degree)
				near(t, fmt.Sprintf("distance to the flank at %v degrees", angle), half*math.Cos(angle*degree), full, exact*module)
			}
		}
	}
}

// TestUndercutLimits checks least tooth numbers and shifts without undercut.
func TestUndercutLimits(t *testing.T) {
	rows := references(t)
	// A rack that is sharp at the depth of the addendum, without credit for a
	// rounding: 14.5 degrees (manufacturer's handbook; Mott, p. 320), 20 degrees,
	// 25 degrees (Mott, table 8-6; Norton), 20 degree stub (Machinery's Handbook).
	for id, tc := range map[string]struct{ angle, depth float64 }{
		"U00": {14.5, 1}, "U01": {20, 1}, "U02": {25, 1}, "U03": {20, 0.8},
	} {
		b := rackOf(tc.angle, 1, tc.depth)
		sin := math.Sin(tc.angle * degree)
		limit := b.ShiftWithoutUndercut(1, 0) / (sin * sin / 2) // teeth at which no shift is needed
		rows[id].checkRecomputed(t, "real", limit)
		rows[id].check(t, "z_min", math.Ceil(limit))
		teeth := int(math.Ceil(limit))
		if b.ShiftWithoutUndercut(1, teeth) > 0 || b.ShiftWithoutUndercut(1, teeth-1) <= 0 {
			t.Errorf("%s: %d teeth are not the least", id, teeth)
		}
	}
	// ISO 53:1998 types with their rounding (computed by us).
	for id, name := range map[string]string{"calc-Z-A": "iso53-a", "calc-Z-B": "iso53-b", "calc-Z-C": "iso53-c", "calc-Z-D": "iso53-d"} {
		b := gear(name, 1, 20, 0).Rack
		rows[id].checkRecomputed(t, "flank_end_depth", b.StraightDepth())
		limit := b.ShiftWithoutUndercut(1, 0) / (math.Pow(math.Sin(20*degree), 2) / 2)
		rows[id].checkRecomputed(t, "z_limit", limit)
		rows[id].checkRecomputed(t, "z_min", math.Ceil(limit))
		for teeth := 10; teeth < 25; teeth++ {
			if got := solve(t, gear(name, 2, teeth, 0)).Undercut; got != (float64(teeth) < limit) {
				t.Errorf("%s with %d teeth: undercut %v", name, teeth, got)
			}
		}
	}
	// Least shifts of the 1.0 m deep rack; U31's exact column likewise (the short
	// forms of the textbooks there are not ours).
	for z := 7; z <= 25; z++ {
		if z == 9 || z == 13 {
			continue // no such row
		}
		row := rows[fmt.Sprintf("calc-U-%d", z)]
		row.checkRecomputed(t, "x_min(rack depth 1.0m)", rackOf(20, 1, 1).ShiftWithoutUndercut(1, z))
	}
	for _, z := range []int{10, 12, 14} {
		rows["U31"].checkRecomputed(t, fmt.Sprintf("z=%d exact", z), rackOf(20, 1, 1).ShiftWithoutUndercut(1, z))
	}
	// In mm the coefficient is the same.
	near(t, "module 7", gear("iso53-c", 7, 11, 0).Rack.ShiftWithoutUndercut(7, 11), gear("iso53-c", 1, 11, 0).Rack.ShiftWithoutUndercut(1, 11), exact)
}
