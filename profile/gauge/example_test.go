package gauge_test

import (
	"fmt"
	"math"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// exampleGear has a module of 2 mm, 28 teeth and a thinning of 0.05 mm.
func exampleGear() gauge.Gear {
	rack, _ := profile.LookupRack("iso53-a", 2)
	tooth, err := profile.Solve(profile.Spec{Module: 2, Teeth: 28, Thinning: 0.05, Rack: rack.For(2, profile.RackChange{})})
	if err != nil {
		panic(err)
	}
	g, err := gauge.New(gauge.OfTooth(tooth, 0))
	if err != nil {
		panic(err)
	}
	return g
}

// What to measure on a gear, and the limits of its spans for DIN 3967 cd25.
func Example() {
	g := exampleGear()
	spans, _ := g.Spans()
	allowance, _ := gauge.AllowanceSeries("cd25", 56)
	for _, s := range spans {
		l, err := g.SpanLimits(s.TeethSpanned, allowance)
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Printf("over %d teeth %.3f, made %.3f to %.3f, contact at %.2f\n", s.TeethSpanned, s.Value, l.Smallest, l.Largest, s.ContactDiameter)
	}
	pin, _ := g.StockPin(gauge.Metric)
	over, _ := g.Pin(pin)
	fmt.Printf("over pins of %.2f %.3f, contact at %.2f\n", pin, over.Value, over.Contact)
	chord, _ := g.Chord()
	fmt.Printf("chord %.3f at a height of %.3f\n", chord.Thickness, chord.Height)
	// Output:
	// over 4 teeth 21.402, made 21.299 to 21.336, contact at 56.81
	// over 3 teeth 15.498, made 15.395 to 15.432, contact at 54.86
	// over 5 teeth 27.307, made 27.203 to 27.241, contact at 59.29
	// over pins of 3.50 60.851, contact at 56.05
	// chord 3.090 at a height of 2.043
}

// A pin that is too small is refused with the pins that do.
func ExampleGear_Pin_refused() {
	_, err := exampleGear().Pin(2)
	fmt.Println(err)
	// Output:
	// pin-diameter: a pin of 2 mm falls through the usable flank, which ends at 53.1487 mm
}

// What a measured span says.
func ExampleGear_FromSpan() {
	g := exampleGear()
	r, err := g.FromSpan(4, 21.34)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("thickness %.4f, off by %.4f; a thinning of %.4f\n", r.Thickness, r.Deviation, r.Thinning)
	// Output:
	// thickness 3.0254, off by -0.0662; a thinning of 0.1162
}

// The tolerances of class 7.
func ExampleFlankTolerances() {
	t, _ := gauge.FlankTolerances(7, 28, 56, 2)
	r := t.Rounded()
	fmt.Printf("single pitch %.4f, cumulative pitch %.4f, profile %.4f, runout %.4f\n", r.SinglePitch, r.CumulativePitch, r.ProfileTotal, r.Runout)
	// Output:
	// single pitch 0.0120, cumulative pitch 0.0350, profile 0.0160, runout 0.0320
}

// A worn part of 28 teeth: two spans and the tip, by a caliper good to 0.03 mm.
func ExampleIdentify() {
	measured := gauge.Measurements{Teeth: 28, TipDiameter: 59.9, Uncertainty: 0.03,
		Spans: []gauge.SpanReading{{TeethSpanned: 4, Value: 21.32}, {TeethSpanned: 5, Value: 27.22}}}
	id, err := gauge.Identify(measured)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println("unique:", id.Unique)
	for _, r := range id.Results {
		name := fmt.Sprintf("module %g", r.Module)
		if r.DiametralPitch != 0 {
			name = fmt.Sprintf("%g P", r.DiametralPitch)
		}
		fmt.Printf("%s, %.1f deg, shift %.3f, thinning %.3f\n", name, r.PressureAngle*180/math.Pi, r.Shift, r.Thinning)
	}
	next := gauge.Distinguish(id.Results[0], id.Results[2], measured)
	fmt.Printf("%s with %.1f mm: %.2f or %.2f\n", next.Param, next.PinDiameter, next.Predicted[0], next.Predicted[1])
	// Output:
	// unique: false
	// module 2, 20.0 deg, shift -0.025, thinning 0.103
	// 12.5 P, 22.5 deg, shift -0.261, thinning 0.050
	// 13 P, 14.5 deg, shift 0.329, thinning 0.120
	// 13 P, 15.0 deg, shift 0.329, thinning 0.107
	// 13 P, 17.5 deg, shift 0.329, thinning 0.050
	// measured-over-pins with 3.4 mm: 60.28 or 60.16
}
