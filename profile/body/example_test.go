package body_test

import (
	"fmt"

	"flankwright/profile"
	"flankwright/profile/body"
)

// A gear of module 2 with 40 teeth, whose roots are at 75 mm, gets a bore with a keyway
// and five holes. A beam 0.6 mm wide leaves a little in the keyway's corners.
func ExampleSolve() {
	b, err := body.Solve(body.Spec{
		Bore:        20,
		Keyway:      body.Keyway{Standard: body.KeyISO},
		HoleCircles: []body.HoleCircle{{N: 5, Diameter: 6, Circle: 55}},
	}, body.Around{RootDiameter: 75, WholeDepth: 4.5})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, c := range b.Choices {
		fmt.Printf("--%s: %s, %s\n", c.Param, c.Value, c.Why)
	}
	for _, f := range b.Features {
		fmt.Printf("smallest %s: %s, %s\n", f.Name, profile.LengthOf(f.Value), f.Place)
	}
	_, left, _ := b.Loops[0].Parallel(0.3)
	for _, l := range left {
		fmt.Printf("left: %s\n", profile.LengthOf(l.Depth))
	}
	// Output:
	// --keyway: 6 mm, width of the keyway by ISO 773 (DIN 6885-1) for the bore
	// --keyway: 2.8 mm, depth t2 of the keyway from the bore's crown by ISO 773 (DIN 6885-1) for the bore
	// --keyway: 0.25 mm, corner radius r2 of the keyway, the largest allowed by ISO 773 (DIN 6885-1) for the bore
	// smallest inner radius: 0.25 mm, of the bore and keyway
	// smallest web: 7 mm, between root circle and hole
	// smallest gap: 6 mm, keyway
	// left: 0.0207 mm
	// left: 0.0207 mm
}
