package profile_test

import (
	"maps"
	"math"
	"testing"

	"flankwright/profile"
)

// TestStandardPair checks a pair without shift, module 3, 12 and 24 teeth (E01:
// manufacturer's printed handbook, standard spur gear table; from memory,
// recomputed).
func TestStandardPair(t *testing.T) {
	row := references(t)["E01"]
	for n, teeth := range map[string]int{"1": 12, "2": 24} {
		d := solve(t, gear("iso53-a", 3, teeth, 0)).Dimensions
		row.check(t, "d"+n, d.ReferenceDiameter)
		row.check(t, "db"+n, d.BaseDiameter)
		row.check(t, "ha"+n, d.Addendum)
		row.check(t, "h", d.WholeDepth)
		row.check(t, "da"+n, d.TipDiameter)
		row.check(t, "df"+n, d.RootDiameter)
		near(t, "working depth", d.WorkingDepth, 6, exact*6)
		near(t, "clearance", d.Clearance, 0.75, exact)
		near(t, "dedendum", d.Dedendum, 3.75, exact*4)
	}
}

// TestShiftedPair checks a shifted pair whose tips are shortened to keep the
// clearance, by k = x1 + x2 - y modules (E02: the same handbook, profile-shifted
// spur gear table; from memory, recomputed).
func TestShiftedPair(t *testing.T) {
	row := references(t)["E02"]
	x := map[string]float64{"1": number(t, "E02", row.Inputs, "x1"), "2": number(t, "E02", row.Inputs, "x2")}
	y := row.value(t, "y")
	for n, teeth := range map[string]int{"1": 12, "2": 24} {
		s := gear("iso53-a", 3, teeth, x[n])
		s.TipShortening = 3 * (x["1"] + x["2"] - y)
		d := solve(t, s).Dimensions
		row.check(t, "d"+n, d.ReferenceDiameter)
		row.check(t, "db"+n, d.BaseDiameter)
		row.check(t, "ha"+n, d.Addendum)
		row.check(t, "h", d.WholeDepth)
		row.check(t, "da"+n, d.TipDiameter)
		row.check(t, "df"+n, d.RootDiameter)
		// The same tip by its diameter is the same gear.
		s.TipDiameter, s.TipShortening = d.TipDiameter, 0
		if again := solve(t, s).Dimensions; again != d {
			t.Errorf("by tip diameter %+v\nby shortening   %+v", again, d)
		}
	}
}

// TestInchGears checks textbook gears given by diametral pitch, in inch.
func TestInchGears(t *testing.T) {
	rows := references(t)
	// E05: Norton, Machine Design, spur gear example, 6 P (from memory, recomputed).
	for n, teeth := range map[string]int{"p": 19, "g": 37} {
		d := solve(t, gear("full-depth-20", inch/6, teeth, 0)).Dimensions
		row := rows["E05"]
		row.check(t, "pc", d.CircularPitch/inch)
		row.check(t, "pb", d.BasePitch/inch)
		row.check(t, "d"+n, d.ReferenceDiameter/inch)
		row.check(t, "a", d.Addendum/inch)
		row.check(t, "b", d.Dedendum/inch)
		row.check(t, "ht", d.WholeDepth/inch)
		row.check(t, "c", d.Clearance/inch)
		row.check(t, "Do"+n, d.TipDiameter/inch)
	}
	// E06: Shigley, example 13-1, 2 P (from memory, recomputed). The row is marked
	// as contradicted for its operating pressure angle, which is not tested here.
	for n, teeth := range map[string]int{"rb_p": 16, "rb_g": 40} {
		d := solve(t, gear("full-depth-20", inch/2, teeth, 0)).Dimensions
		row := rows["E06"]
		row.check(t, "p", d.CircularPitch/inch)
		row.check(t, "pb", d.BasePitch/inch)
		row.check(t, n, d.BaseDiameter/2/inch)
	}
	// E07: Mott, Machine Elements, 4th ed., p. 320, 12 P (found). The pinion of 11
	// teeth is undercut, of which the book says nothing.
	for n, teeth := range map[string]int{"dbp": 11, "dbg": 18} {
		tooth := solve(t, gear("full-depth-20", inch/12, teeth, 0))
		row := rows["E07"]
		row.check(t, "t", tooth.Dimensions.ToothThickness/inch)
		row.check(t, n, tooth.Dimensions.BaseDiameter/inch)
		if teeth == 11 && !tooth.Undercut {
			t.Error("11 teeth at 20 degrees are not undercut")
		}
	}
}

// TestRackPinion checks the pinion of a rack and pinion, module 3, 12 teeth,
// x = 0.6 (K01: the handbook of E01, rack and spur gear table; from memory,
// recomputed).
func TestRackPinion(t *testing.T) {
	row := references(t)["K01"]
	d := solve(t, gear("iso53-a", 3, 12, 0.6)).Dimensions
	row.check(t, "d", d.ReferenceDiameter)
	row.check(t, "db", d.BaseDiameter)
	row.check(t, "ha1", d.Addendum)
	row.check(t, "h", d.WholeDepth)
	row.check(t, "da", d.TipDiameter)
	row.check(t, "travel_per_rev", math.Pi*d.ReferenceDiameter)
}

// TestDimensionsMatchCurves checks every circle and thickness against the curves
// themselves: where they start and end, and how far apart the two flanks are.
func TestDimensionsMatchCurves(t *testing.T) {
	for name, s := range map[string]profile.Spec{
		"plain":            gear("iso53-a", 2, 24, 0),
		"undercut":         gear("iso53-c", 2, 9, 0),
		"shifted":          gear("iso53-b", 2, 12, 0.5),
		"thinned":          {Module: 2, Teeth: 20, Rack: gear("iso53-a", 2, 20, 0).Rack, Thinning: 0.2},
		"thinned infeed":   {Module: 2, Teeth: 20, Rack: gear("iso53-a", 2, 20, 0).Rack, Thinning: 0.2, ThinningBy: profile.ThinByInfeed},
		"rounded tip":      {Module: 2, Teeth: 20, Rack: gear("iso53-a", 2, 20, 0).Rack, TipRadius: 0.3},
		"chamfered tip":    {Module: 2, Teeth: 20, Rack: gear("iso53-a", 2, 20, 0).Rack, TipChamfer: 0.3},
		"full root radius": {Module: 2, Teeth: 20, Rack: gear("iso53-a", 2, 20, 0).Rack, Rounding: profile.RoundingFull},
	} {
		tooth := solve(t, s)
		d := tooth.Dimensions
		const slack = 1e-13 * 50 // mm, rounding at diameters near 50
		flank, fillet := flankOf(t, tooth), filletOf(t, tooth)
		check := func(what string, got, want float64) {
			t.Helper()
			near(t, name+": "+what, got, want, slack)
		}
		check("tip form diameter", 2*norm(profile.Start(flank)), d.TipFormDiameter)
		check("form diameter", 2*norm(profile.End(flank)), d.FormDiameter)
		check("form diameter of the fillet", 2*norm(profile.Start(fillet)), d.FormDiameter)
		check("root diameter", 2*norm(profile.End(fillet)), d.RootDiameter)
		land := tooth.Land.(profile.CircleArc)
		check("tip diameter", 2*norm(profile.Start(tooth.Land)), d.TipDiameter)
		check("land", land.Radius*(land.To-land.From), d.TipLand)
		if tooth.Root != nil {
			check("root circle", 2*tooth.Root.(profile.CircleArc).Radius, d.RootDiameter)
		}
		// The thickness is the arc between the flanks, found on the exact curve.
		on := func(diameter float64) float64 {
			roll := math.Sqrt(math.Pow(diameter/d.BaseDiameter, 2) - 1)
			p := flank.At(roll)
			return diameter * math.Atan2(-p.X, p.Y)
		}
		check("thickness", on(d.ReferenceDiameter), d.ToothThickness)
		check("tip thickness", on(d.TipDiameter), d.TipThickness)
		check("space", d.ToothThickness+d.SpaceWidth, math.Pi*2)
		check("pitch", d.CircularPitch, math.Pi*2)
		check("depth", d.Addendum+d.Dedendum, d.WholeDepth)
		check("working depth", d.WorkingDepth+d.Clearance, d.WholeDepth)
		// A mate of the same rack reaches in by its addendum.
		check("clearance", d.ReferenceDiameter/2+s.ProfileShift*2-s.Rack.Addendum-d.RootDiameter/2, d.Clearance)
		check("base pitch", d.BasePitch, math.Pi*2*math.Cos(s.Rack.PressureAngle))
		if d.Teeth != s.Teeth || d.Module != s.Module {
			t.Errorf("%s: %d teeth, module %v", name, d.Teeth, d.Module)
		}
		circles := map[string]float64{}
		for _, c := range tooth.ReferenceCircles() {
			circles[c.Name] = 2 * c.Radius
		}
		want := map[string]float64{"reference": d.ReferenceDiameter, "base": d.BaseDiameter, "form": d.FormDiameter}
		if s.TipRadius != 0 || s.TipChamfer != 0 {
			want["tip form"] = d.TipFormDiameter
		}
		if !maps.Equal(circles, want) {
			t.Errorf("%s: reference circles %v, want %v", name, circles, want)
		}
	}
}
