package mesh_test

import (
	"fmt"

	"flankwright/profile"
	"flankwright/profile/fit"
	"flankwright/profile/mesh"
)

// Two gears for a housing that dictates the center distance.
func ExampleSolve() {
	rack, _ := profile.LookupRack("iso53-a", 2)
	member := func(teeth int) profile.Spec {
		return profile.Spec{Module: 2, Teeth: teeth, Rack: rack.For(2, profile.RackChange{})}
	}
	p, err := mesh.Solve(mesh.Request{Specs: [2]profile.Spec{member(17), member(43)}, CenterDistance: 61,
		Backlash: 0.1, BacklashGiven: true, Split: 0.5})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("shifts %.4f and %.4f, contact ratio %.3f, backlash %.3f mm\n", p.Shift[0], p.Shift[1], p.Ratio, p.Backlash.Circumferential)
	// Output: shifts 0.4233 and 0.1064, contact ratio 1.447, backlash 0.100 mm
}

// The proof that the drawn outlines mesh.
func ExampleMembers_Roll() {
	rack, _ := profile.LookupRack("iso53-a", 2)
	member := func(teeth int) profile.Spec {
		return profile.Spec{Module: 2, Teeth: teeth, Rack: rack.For(2, profile.RackChange{})}
	}
	p, err := mesh.Solve(mesh.Request{Specs: [2]profile.Spec{member(17), member(43)}, CenterDistance: 61,
		Backlash: 0.1, BacklashGiven: true, Split: 0.5})
	if err != nil {
		fmt.Println(err)
		return
	}
	var curves [2]mesh.Curves
	for i, t := range p.Teeth {
		drawn, err := fit.NewTooth(t.Outline, fit.Options{Curves: fit.Arc, Tolerance: 1e-5})
		if err != nil {
			fmt.Println(err)
			return
		}
		curves[i] = mesh.CurvesOf(t.Outline, drawn)
	}
	d := p.Roll(p.CenterDistance, curves[0], curves[1])
	fmt.Printf("backlash %.3f mm, transmission error below 0.1 um: %v, gap %.2f mm\n", d.Backlash, d.Error < 1e-4, d.Gap)
	// Output: backlash 0.100 mm, transmission error below 0.1 um: true, gap 0.50 mm
}
