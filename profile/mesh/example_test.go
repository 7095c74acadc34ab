package mesh_test

import (
	"fmt"
	"math"

	"flankwright/profile"
	"flankwright/profile/fit"
	"flankwright/profile/mesh"
)

// Two gears with given shifts, of a published table (SDP/SI, Elements of Metric Gear
// Technology, 4-3 and the contact ratio example, from memory).
func ExampleSolve() {
	rack, _ := profile.LookupRack("iso53-a", 3)
	member := func(teeth int, shift float64) profile.Spec {
		return profile.Spec{Module: 3, Teeth: teeth, ProfileShift: shift, Rack: rack.For(3, profile.RackChange{})}
	}
	p, err := mesh.Solve(mesh.Request{Specs: [2]profile.Spec{member(12, 0.6), member(24, 0.36)}, ShiftGiven: true, Split: 0.5})
	if err != nil {
		fmt.Println(err)
		return
	}
	angle := p.OperatingAngle(p.CenterDistance) * 180 / math.Pi
	fmt.Printf("center distance %.4f mm, operating angle %.4f deg, contact ratio %.3f\n", p.CenterDistance, angle, p.Ratio)
	// Output: center distance 56.4999 mm, operating angle 26.0886 deg, contact ratio 1.202
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
