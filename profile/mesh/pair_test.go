package mesh_test

import (
	"errors"
	"fmt"
	"math"
	"math/rand"
	"testing"

	"flankwright/profile"
	"flankwright/profile/mesh"
)

const deg = math.Pi / 180

// spec is a member of the rack with no rounding of a standard.
func spec(form profile.Form, m float64, z int, alpha float64) profile.Spec {
	rack, _ := profile.LookupRack("iso53-a", m)
	s := profile.Spec{Form: form, Module: m, Teeth: z, Rack: rack.For(m, profile.RackChange{})}
	s.Rack.PressureAngle = alpha * deg
	return s
}

// pairOf is a request for two members of module m and 20 degrees.
func pairOf(second profile.Form, m float64, z1, z2 int) mesh.Request {
	return mesh.Request{Specs: [2]profile.Spec{spec(profile.FormGear, m, z1, 20), spec(second, m, z2, 20)}, Split: 0.5}
}

// close fails unless got is want within half a unit of the printed digits.
func printed(t *testing.T, what string, got, want float64, decimals int) {
	t.Helper()
	if half := 0.5 * math.Pow(10, -float64(decimals)); math.Abs(got-want) > half*(1+1e-9) {
		t.Errorf("%s is %.*f, published %.*f", what, decimals+2, got, decimals, want)
	}
}

// TestPublishedPairs: SDP/SI, Elements of Metric Gear Technology (the same tables in the
// KHK Gear Technical Reference): tables 4-1, 4-3, 4-4 and the contact ratio example (from
// memory), table 5-1 (from memory) and table 5-4 (found), table 4-6 (from memory).
func TestPublishedPairs(t *testing.T) {
	m := mesh.Members{Module: 3, PressureAngle: 20 * deg, Teeth: [2]int{12, 24}}
	printed(t, "standard center distance", m.CenterDistance(0), 54, 3)
	a := m.CenterDistance(0.96)
	printed(t, "shifted center distance", a, 56.4999, 4)
	printed(t, "operating angle", m.OperatingAngle(a)/deg, 26.0886, 4)
	rw := m.PitchRadii(a)
	printed(t, "operating pitch diameter 1", 2*rw[0], 37.667, 3)
	printed(t, "operating pitch diameter 2", 2*rw[1], 75.333, 3)
	printed(t, "sum of shifts", m.ShiftSum(56.4999), 0.96, 4)

	r := pairOf(profile.FormGear, 3, 12, 24)
	r.Specs[0].ProfileShift, r.Specs[1].ProfileShift, r.ShiftGiven = 0.6, 0.36, true
	p, err := mesh.Solve(r)
	if err != nil {
		t.Fatal(err)
	}
	printed(t, "tip diameter 1", p.Teeth[0].Dimensions.TipDiameter, 44.840, 3)
	printed(t, "tip diameter 2", p.Teeth[1].Dimensions.TipDiameter, 79.400, 3)
	printed(t, "root diameter 1", p.Teeth[0].Dimensions.RootDiameter, 32.100, 3)
	printed(t, "contact ratio", p.Ratio, 1.202, 3)

	ring := mesh.Members{Module: 3, PressureAngle: 20 * deg, Teeth: [2]int{16, 24}, Second: profile.FormRing}
	// The published shift is x2 = 0.5 in the other sign convention.
	a = ring.CenterDistance(-0.5)
	printed(t, "center distance of a ring", a, 13.1683, 4)
	printed(t, "operating angle of a ring", ring.OperatingAngle(a)/deg, 31.0937, 3) // 31.09362 recomputed
	printed(t, "center distance of a ring, later edition", ring.CenterDistance(-0.516), 13.2, 1)
	rw = ring.PitchRadii(a)
	printed(t, "operating pitch diameter 1", 2*rw[0], 52.673, 3)
	printed(t, "operating pitch diameter 2", 2*rw[1], 79.010, 3)
	for _, row := range []struct {
		z1        int
		x2, aw, a float64
	}{{48, 0.6, 46.0324, 1.354}, {47, 0.4, 37.4155, 1.775}, {45, 0.2, 28.2019, 2.666}, {44, 0.11, 24.5356, 3.099}, {42, 0.01, 20.3854, 4.010}} {
		m := mesh.Members{Module: 1, PressureAngle: 20 * deg, Teeth: [2]int{row.z1, 50}, Second: profile.FormRing}
		a := m.CenterDistance(-row.x2)
		printed(t, fmt.Sprintf("center distance of %d in 50", row.z1), a, row.a, 3)
		printed(t, fmt.Sprintf("operating angle of %d in 50", row.z1), m.OperatingAngle(a)/deg, row.aw, 4)
	}

	rack := mesh.Members{Module: 3, PressureAngle: 20 * deg, Teeth: [2]int{12, 0}, Second: profile.FormRack}
	// Published is 51.800 to the back of a rack 32.000 high to its pitch line.
	printed(t, "mounting distance of a rack", rack.CenterDistance(0.6)+32, 51.8, 3)
}

// TestContactRatio: Norton, Machine Design, spur gear example 1 (from memory): 6 P, 20
// degrees, 19 and 37 teeth have the contact ratio 1.62 and length of action 0.798 in.
func TestContactRatio(t *testing.T) {
	r := pairOf(profile.FormGear, 25.4/6, 19, 37)
	p, err := mesh.Solve(r)
	if err != nil {
		t.Fatal(err)
	}
	printed(t, "contact ratio", p.Ratio, 1.62, 2)
	printed(t, "operating angle 2 % further apart", p.OperatingAngle(1.02*p.CenterDistance)/deg, 22.89, 2)
	printed(t, "length of action", p.Ratio*p.Teeth[0].Dimensions.BasePitch/25.4, 0.798, 3)
}

// TestLeastBacklash: ANSI/AGMA 2002-B88, appendix (Mott, tables 8-5 A and B), and ISO/TR
// 10064-2:1996, table A.1 (from memory), which rounds up to 0.01.
func TestLeastBacklash(t *testing.T) {
	type row struct{ size, a, least float64 } // module and mm, or teeth per inch and inches
	for _, r := range []row{
		{1.5, 50, 0.13}, {1.5, 100, 0.16}, {2, 50, 0.14}, {2, 100, 0.17}, {2, 200, 0.22}, {3, 50, 0.18}, {3, 100, 0.20}, {3, 200, 0.25}, {3, 400, 0.35}, {5, 100, 0.26}, {5, 200, 0.31}, {5, 400, 0.41}, {8, 100, 0.35}, {8, 200, 0.40}, {8, 400, 0.50}, {8, 800, 0.70}, {12, 200, 0.52}, {12, 400, 0.62}, {12, 800, 0.82}, {18, 400, 0.80}, {18, 800, 1.00},
	} {
		// Of halves the table rounds two down to even; hence half a digit either way.
		printed(t, fmt.Sprintf("AGMA backlash, module %g at %g", r.size, r.a), mesh.LeastBacklash(mesh.RuleAGMA, r.a, r.size), r.least, 2)
	}
	for _, r := range []row{
		{18, 2, 0.005}, {18, 4, 0.006}, {12, 2, 0.006}, {12, 4, 0.007}, {12, 8, 0.009}, {8, 2, 0.007}, {8, 4, 0.008}, {8, 8, 0.010}, {8, 16, 0.014}, {5, 4, 0.010}, {5, 8, 0.012}, {5, 16, 0.016}, {3, 4, 0.014}, {3, 8, 0.016}, {3, 16, 0.020}, {3, 32, 0.028}, {2, 8, 0.021}, {2, 16, 0.025}, {2, 32, 0.033}, {1.25, 16, 0.034}, {1.25, 32, 0.042},
	} {
		printed(t, fmt.Sprintf("AGMA backlash in inches, %g P at %g", r.size, r.a), mesh.LeastBacklash(mesh.RuleAGMA, r.a*25.4, 25.4/r.size)/25.4, r.least, 3)
	}
	for _, r := range []row{
		{1.5, 50, 0.09}, {1.5, 100, 0.11}, {2, 50, 0.10}, {2, 100, 0.12}, {2, 200, 0.15}, {3, 50, 0.12}, {3, 100, 0.14}, {3, 200, 0.17}, {3, 400, 0.24}, {5, 100, 0.18}, {5, 200, 0.21}, {5, 400, 0.28}, {8, 100, 0.24}, {8, 200, 0.27}, {8, 400, 0.34}, {8, 800, 0.47}, {12, 200, 0.35}, {12, 400, 0.42}, {12, 800, 0.55}, {18, 400, 0.54}, {18, 800, 0.67}, {18, 1600, 0.94},
	} {
		if got := mesh.LeastBacklash(mesh.RuleISO, r.a, r.size); got > r.least+1e-12 || got <= r.least-0.01 {
			t.Errorf("ISO backlash, module %g at %g is %g, the table says %g", r.size, r.a, got, r.least)
		}
	}
	// SDP/SI, section 14 (found): the center distance changes by 1/(2 tan alpha) of the
	// backlash, 1.374 at 20 degrees and 1.933 at 14.5.
	for alpha, rate := range map[float64]float64{20: 1.374, 14.5: 1.933} {
		m := mesh.Members{Module: 2, PressureAngle: alpha * deg, Teeth: [2]int{30, 50}}
		const step = 1e-6
		zero := [2]float64{}
		printed(t, "center distance for backlash", step/(m.Backlash(m.Reference()+step, zero, zero)-m.Backlash(m.Reference(), zero, zero)), rate, 3)
	}
}

// TestRoundTrips: center distance to shift sum and back, and thinning to backlash.
func TestRoundTrips(t *testing.T) {
	rng := rand.New(rand.NewSource(7))
	for range 2000 {
		m := mesh.Members{Module: math.Exp(rng.Float64()*4 - 1), PressureAngle: (14.5 + 10*rng.Float64()) * deg, Teeth: [2]int{10 + rng.Intn(60), 0}}
		m.Second = profile.Form(rng.Intn(3))
		m.Teeth[1] = m.Teeth[0] + 12 + rng.Intn(80)
		sum := 1.6*rng.Float64() - 0.8
		a := m.CenterDistance(sum)
		if math.IsNaN(a) {
			continue
		}
		if back := m.CenterDistance(m.ShiftSum(a)); math.Abs(back-a) > 1e-13*a {
			t.Errorf("%+v: %v comes back as %v", m, a, back)
		}
		split := rng.Float64()
		shift := [2]float64{split * sum, sum - split*sum}
		if j := m.Backlash(a, shift, [2]float64{}); math.Abs(j) > 1e-11*m.Module*float64(m.Teeth[1]) {
			t.Errorf("%+v: backlash %g without thinning", m, j)
		}
		const j = 0.1
		e := m.ThinningFor(j*m.Module, a)
		if got := m.Backlash(a, shift, [2]float64{0.3 * e, 0.7 * e}); math.Abs(got-j*m.Module) > 1e-11*m.Module*float64(m.Teeth[1]) {
			t.Errorf("%+v: backlash %g, asked for %g", m, got, j*m.Module)
		}
	}
}

// TestShiftBalance: what each way of parting promises.
func TestShiftBalance(t *testing.T) {
	r := pairOf(profile.FormGear, 2, 17, 43)
	r.CenterDistance = 61
	p, err := mesh.Solve(r)
	if err != nil {
		t.Fatal(err)
	}
	if math.Abs(math.Abs(p.Sliding[0])-math.Abs(p.Sliding[1])) > 1e-9 || p.Note != "" {
		t.Errorf("sliding %v, note %q", p.Sliding, p.Note)
	}
	r.Balance = mesh.BalanceEqual
	if p, err = mesh.Solve(r); err != nil || p.Shift[0] != p.Shift[1] {
		t.Errorf("equal shifts %v, %v", p.Shift, err)
	}
	few := pairOf(profile.FormGear, 2, 10, 43)
	few.CenterDistance, few.Balance = 53, mesh.BalanceFirst
	if p, err = mesh.Solve(few); err != nil {
		t.Fatal(err)
	}
	// Few teeth that both lack: equal members stay equal, and it is said.
	both := pairOf(profile.FormGear, 2, 9, 9)
	both.CenterDistance, both.AllowShort = 18, true
	if p, err := mesh.Solve(both); err != nil || math.Abs(p.Shift[0]-p.Shift[1]) > 1e-12 || p.Note == "" {
		t.Errorf("two of 9 teeth: %+v, %v", p, err)
	}
	lean := pairOf(profile.FormGear, 2, 8, 100)
	lean.CenterDistance, lean.AllowShort = 108, true
	if p, err := mesh.Solve(lean); err != nil || p.Teeth[0].Dimensions.TipThickness <= 0 || p.Note == "" {
		t.Errorf("8 teeth and 100: %+v, %v", p, err)
	}
	if least := few.Specs[0].Rack.ShiftWithoutUndercut(2, 10); math.Abs(p.Shift[0]-least) > 1e-12 || p.Teeth[0].Undercut {
		t.Errorf("member 1 has the shift %g, free of undercut from %g on", p.Shift[0], least)
	}
}

// TestRefusals: rule, and that what the hint says works.
func TestRefusals(t *testing.T) {
	for name, c := range map[string]struct {
		request mesh.Request
		change  func(*mesh.Request)
		rule    profile.Rule
		mend    func(*mesh.Request, profile.Finding) // nil where no value is offered
	}{
		"too close": {pairOf(profile.FormGear, 2, 17, 43), func(r *mesh.Request) { r.CenterDistance = 50 }, mesh.RuleTooClose, nil},
		"too far":   {pairOf(profile.FormGear, 2, 17, 43), func(r *mesh.Request) { r.CenterDistance = 80 }, mesh.RuleTooFar, nil},
		"jammed": {pairOf(profile.FormGear, 2, 17, 43), func(r *mesh.Request) {
			r.CenterDistance, r.ShiftGiven = 60, true
			r.Specs[0].ProfileShift = 0.2
		}, mesh.RuleJammed, func(r *mesh.Request, f profile.Finding) { r.CenterDistance = f.Bound.Value + 1e-9 }},
		"jammed ring": {pairOf(profile.FormRing, 2, 17, 60), func(r *mesh.Request) {
			r.CenterDistance, r.ShiftGiven = 43, true
			r.Specs[1].ProfileShift = 0.2
		}, mesh.RuleJammed, func(r *mesh.Request, f profile.Finding) { r.CenterDistance = f.Bound.Value - 1e-9 }},
		"jammed within tolerance": {pairOf(profile.FormRing, 2, 20, 60), func(r *mesh.Request) {
			r.CenterDistance, r.Tolerance, r.ShiftGiven = 40, 0.05, true
		}, mesh.RuleJammed, func(r *mesh.Request, f profile.Finding) { r.CenterDistance = f.Bound.Value - 1e-9 }},
		"tolerance": {pairOf(profile.FormGear, 2, 20, 30), func(r *mesh.Request) {
			r.CenterDistance, r.Tolerance, r.ShiftGiven = 50, 5, true
			r.Specs[0].Thinning = 0.1
		}, mesh.RuleTooClose, nil},
		"loose": {pairOf(profile.FormGear, 2, 20, 30), func(r *mesh.Request) {
			r.CenterDistance, r.ShiftGiven, r.Backlash, r.BacklashGiven = 50.5, true, 0.1, true
		}, mesh.RuleTooLoose, func(r *mesh.Request, f profile.Finding) { r.Backlash = f.Bound.Value }},
		"small ring": {pairOf(profile.FormRing, 2, 60, 60), func(*mesh.Request) {}, mesh.RuleRingTooSmall, nil},
		"tips cross": {pairOf(profile.FormRing, 2, 45, 50), func(*mesh.Request) {}, mesh.RuleTipsCross, nil},
		"fillet": {pairOf(profile.FormRing, 2, 20, 60), func(r *mesh.Request) { r.TipGiven[1] = true }, mesh.RuleTipInFillet,
			func(r *mesh.Request, f profile.Finding) { r.Specs[1].TipShortening = f.Bound.Value + 1e-9 }},
		"thinned away": {pairOf(profile.FormGear, 2, 30, 43), func(r *mesh.Request) { r.Backlash, r.BacklashGiven = 8, true }, mesh.RuleThinnedAway, nil},
		"short": {pairOf(profile.FormGear, 2, 30, 43), func(r *mesh.Request) {
			r.Specs[0].TipShortening, r.Specs[1].TipShortening, r.TipGiven = 1.2, 1.2, [2]bool{true, true}
		}, mesh.RuleShortContact, func(r *mesh.Request, _ profile.Finding) { r.AllowShort = true }},
		"tip to root": {pairOf(profile.FormGear, 2, 30, 43), func(r *mesh.Request) {
			r.Specs[0].TipShortening, r.TipGiven = -0.6, [2]bool{true, false}
		}, mesh.RuleTipMeetsRoot, nil},
	} {
		c.change(&c.request)
		_, err := mesh.Solve(c.request)
		var all profile.Violations
		if !errors.As(err, &all) {
			t.Errorf("%s: %v", name, err)
			continue
		}
		var f profile.Finding
		for _, v := range all {
			if v.Rule == c.rule {
				f = v
			}
		}
		if f.Rule == "" || f.Hint == "" {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if c.mend == nil {
			continue
		}
		c.mend(&c.request, f)
		if _, err := mesh.Solve(c.request); errors.As(err, &all) {
			for _, v := range all {
				if v.Rule == c.rule {
					t.Errorf("%s, mended as it says: %v", name, v)
				}
			}
		}
	}
}
