package profile_test

import (
	"fmt"
	"math"
	"testing"

	"flankwright/profile"
)

// TestToothParts checks which curves a tooth has and in what order.
func TestToothParts(t *testing.T) {
	type parts = []profile.Part
	for name, tc := range map[string]struct {
		spec     profile.Spec
		side     parts
		smooth   []bool
		root     bool
		undercut bool
	}{
		"plain":     {gear("iso53-a", 2, 24, 0), parts{profile.PartFlank, profile.PartFillet}, []bool{true, true}, true, false},
		"undercut":  {gear("iso53-a", 2, 9, 0), parts{profile.PartFlank, profile.PartFillet}, []bool{false, true}, true, true},
		"full root": {with(gear("iso53-a", 2, 24, 0), func(s *profile.Spec) { s.Rounding = profile.RoundingFull }), parts{profile.PartFlank, profile.PartFillet}, []bool{true, true}, false, false},
		"rounded":   {with(gear("iso53-a", 2, 24, 0), func(s *profile.Spec) { s.TipRadius = 0.2 }), parts{profile.PartTipRounding, profile.PartFlank, profile.PartFillet}, []bool{true, true, true}, true, false},
		"chamfered": {with(gear("iso53-a", 2, 24, 0), func(s *profile.Spec) { s.TipChamfer = 0.2 }), parts{profile.PartTipChamfer, profile.PartFlank, profile.PartFillet}, []bool{false, true, true}, true, false},
	} {
		tooth := solve(t, tc.spec)
		var side parts
		var smooth []bool
		for _, p := range tooth.Side {
			side, smooth = append(side, p.Part), append(smooth, p.SmoothEnd)
		}
		if fmt.Sprint(side, smooth) != fmt.Sprint(tc.side, tc.smooth) || (tooth.Root != nil) != tc.root || tooth.Undercut != tc.undercut {
			t.Errorf("%s: parts %v %v, root %v, undercut %v", name, side, smooth, tooth.Root, tooth.Undercut)
		}
		if tooth.LandSmooth != (side[0] == profile.PartTipRounding) {
			t.Errorf("%s: land smooth %v", name, tooth.LandSmooth)
		}
		if got := tooth.Pitch() * float64(tc.spec.Teeth); math.Abs(got-2*math.Pi) > exact*7 {
			t.Errorf("%s: %v in all pitches", name, got)
		}
		if err := sound(tooth); err != nil {
			t.Errorf("%s: %v", name, err)
		}
		if last := side[len(side)-1]; last == profile.PartFillet {
			// The fillet's end and the root arc's start head along the root circle.
			c := tooth.Side[len(side)-1].Curve
			_, to := c.Domain()
			end := profile.End(c)
			along := math.Remainder(c.Heading(to)-math.Atan2(end.X, -end.Y), 2*math.Pi)
			near(t, name+": end along the root circle", along, 0, tangent)
		}
	}
}

// The tooth of a gear of 9 teeth, undercut.
func ExampleSolve() {
	rack, _ := profile.LookupRack("iso53-a", 2)
	tooth, err := profile.Solve(profile.Spec{Module: 2, Teeth: 9, Rack: rack.For(2, profile.RackChange{})})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("tip %.3f mm, root %.3f mm\n", tooth.Dimensions.TipDiameter, tooth.Dimensions.RootDiameter)
	for _, piece := range tooth.Side {
		start, end := profile.Start(piece.Curve), profile.End(piece.Curve)
		fmt.Printf("%T from (%.3f, %.3f) to (%.3f, %.3f)\n", piece.Curve, start.X, start.Y, end.X, end.Y)
	}
	for _, w := range tooth.Warnings {
		fmt.Println(w)
	}
	// Output:
	// tip 22.000 mm, root 13.000 mm
	// profile.Involute from (-0.566, 10.985) to (-1.600, 8.379)
	// profile.Fillet from (-1.600, 8.379) to (-2.136, 6.139)
	// profile-shift: the tooth is undercut: its flank ends at form diameter 17.0608 mm (base diameter 16.9145 mm); a profile shift of 0.4736 or more avoids it
}

// What cannot be made is refused with the bound that would do.
func ExampleSolve_refused() {
	rack, _ := profile.LookupRack("iso53-a", 1)
	_, err := profile.Solve(profile.Spec{Module: 1, Teeth: 12, ProfileShift: 1, Rack: rack.For(1, profile.RackChange{})})
	fmt.Println(err)
	// Output:
	// tip-diameter: the tooth is pointed: its flanks meet at diameter 15.8168 mm, below the tip diameter 16 mm
}

// The largest tip rounding a rack takes.
func ExampleBasicRack_FullRadius() {
	rack, _ := profile.LookupRack("iso53-d", 1)
	fmt.Printf("%.3f modules\n", rack.For(1, profile.RackChange{}).FullRadius(1, 0))
	// Output: 0.394 modules
}

func ExampleInverseInv() {
	fmt.Printf("%.4f degrees\n", profile.InverseInv(0.014904)/degree)
	// Output: 19.9998 degrees
}

func BenchmarkSolve(b *testing.B) {
	for _, teeth := range []int{9, 24, 200} {
		s := gear("iso53-a", 2, teeth, 0)
		b.Run(fmt.Sprintf("%d teeth", teeth), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := profile.Solve(s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
