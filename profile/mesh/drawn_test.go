package mesh_test

import (
	"math"
	"math/rand"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/fit"
	"flankwright/profile/mesh"
)

// drawn are the curves of a pair's members within a tolerance.
func drawn(tb testing.TB, p *mesh.Pair, kind fit.Kind, tolerance float64) [2]mesh.Curves {
	tb.Helper()
	var c [2]mesh.Curves
	for i, tooth := range p.Teeth {
		f, err := fit.NewTooth(tooth.Outline, fit.Options{Curves: kind, Tolerance: tolerance})
		if err != nil {
			tb.Fatal(err)
		}
		c[i] = mesh.CurvesOf(tooth.Outline, f)
	}
	return c
}

// randomPair is a valid pair of the kind with some backlash; nil where the numbers drawn
// do not work together.
func randomPair(rng *rand.Rand, second profile.Form) *mesh.Pair {
	r := pairOf(second, 1, 14+rng.Intn(30), 0)
	z2 := r.Specs[0].Teeth + 15 + rng.Intn(60)
	if second == profile.FormRack {
		z2 = 5
	}
	r.Specs[1].Teeth = z2
	r.ShiftGiven = true
	r.Specs[0].ProfileShift = 0.6*rng.Float64() - 0.1
	r.Specs[1].ProfileShift = 0.6*rng.Float64() - 0.3
	r.Backlash, r.BacklashGiven = 0.1*rng.Float64(), true
	p, err := mesh.Solve(r)
	if err != nil {
		return nil
	}
	return p
}

// TestDrawnMesh: on curves as exact as files carry, pairs of every kind run with a
// transmission error of at most 10 nm and the backlash of the formula within that; on
// curves within a micrometre the error stays within the bound that follows from the
// tolerance: each flank may stand off by e along its normal, either way, on both members,
//
//	peak to peak 4 e/cos aw, and 2 e/cos aw of backlash on either flank.
func TestDrawnMesh(t *testing.T) {
	pairs := 200
	if testing.Short() {
		pairs = 15
	}
	for _, second := range []profile.Form{profile.FormGear, profile.FormRing, profile.FormRack} {
		rng := rand.New(rand.NewSource(11))
		worst, coarse, share := 0.0, 0.0, 0.0
		for done := 0; done < pairs; {
			p := randomPair(rng, second)
			if p == nil {
				continue
			}
			done++
			c := drawn(t, p, fit.Arc, 1e-6) // the deviation found is far less where arcs are few
			if done%4 == 0 {
				c = drawn(t, p, fit.Arc, fit.LeastTolerance)
			}
			limit := 1e-5 // mm, 10 nm
			d := p.Roll(p.CenterDistance, c[0], c[1])
			off := math.Max(d.Error, math.Abs(d.Backlash-p.Backlash.Circumferential))
			worst = math.Max(worst, off)
			if off > limit {
				t.Errorf("form %d, teeth %v, shifts %v: error %g, backlash %g for %g", second, p.Members.Teeth, p.Shift, d.Error, d.Backlash, p.Backlash.Circumferential)
			}
			if d.Overlap > 0 || d.Gap <= 0 {
				t.Errorf("form %d, teeth %v: overlap %g, gap %g", second, p.Members.Teeth, d.Overlap, d.Gap)
			}
			const e = 1e-3
			kind := []fit.Kind{fit.Arc, fit.Cubic, fit.Line}[done%3]
			c = drawn(t, p, kind, e)
			d = p.Roll(p.CenterDistance, c[0], c[1])
			bound := 4 * e / math.Cos(p.OperatingAngle(p.CenterDistance))
			coarse, share = math.Max(coarse, d.Error), math.Max(share, d.Error/bound)
			if d.Error > bound || math.Abs(d.Backlash-p.Backlash.Circumferential) > bound {
				t.Errorf("form %d, kind %d, teeth %v: error %g, backlash %g for %g; bound %g", second, kind, p.Members.Teeth, d.Error, d.Backlash, p.Backlash.Circumferential, bound)
			}
		}
		t.Logf("form %d: worst %.2g nm with exact curves, %.2g um within 1 um, %.2f of the bound", second, worst*1e6, coarse*1e3, share)
		if share < 0.1 {
			t.Errorf("form %d: the bound is never used by more than %g", second, share)
		}
	}
}

// TestDrawnMeshCatches: pairs that are wrong.
func TestDrawnMeshCatches(t *testing.T) {
	for _, second := range []profile.Form{profile.FormGear, profile.FormRing, profile.FormRack} {
		rng := rand.New(rand.NewSource(3))
		var p *mesh.Pair
		for p == nil {
			p = randomPair(rng, second)
		}
		const tolerance, limit = 1e-5, 1e-4 // mm
		good := drawn(t, p, fit.Arc, tolerance)
		wrong := func(c mesh.Curves) bool {
			d := p.Roll(p.CenterDistance, good[0], c)
			return d.Error > limit || math.Abs(d.Backlash-p.Backlash.Circumferential) > limit
		}
		if wrong(good[1]) {
			t.Fatalf("form %d: the right pair is not", second)
		}
		// The shift sum off by 0.01.
		s := p.Teeth[1].Spec
		s.ProfileShift += 0.01
		tooth, err := profile.Solve(s)
		if err != nil {
			t.Fatal(err)
		}
		other := *p
		other.Teeth[1] = tooth
		if !wrong(drawn(t, &other, fit.Arc, tolerance)[1]) {
			t.Errorf("form %d: a shift sum off by 0.01 passes", second)
		}
		// A scale of 1 %.
		scaled := good[1]
		scaled.Left, scaled.Right = mapped(good[1].Left, 1.01), mapped(good[1].Right, 1.01)
		if !wrong(scaled) {
			t.Errorf("form %d: a scale of 1 %% passes", second)
		}
		// One flank moved: the other flank of a tooth that is not symmetric.
		moved := good[1]
		moved.Right = nil
		for _, seg := range good[1].Left {
			moved.Right = append(moved.Right, seg.Mapped(func(q r2.Vec) r2.Vec {
				if second == profile.FormRack {
					return r2.Add(q, r2.Vec{X: 0.01})
				}
				return r2.Rotate(q, 0.01/norm(q), r2.Vec{})
			}, false))
		}
		if !wrong(moved) {
			t.Errorf("form %d: one flank out of place passes", second)
		}
	}
}

func norm(v r2.Vec) float64 { return math.Hypot(v.X, v.Y) }

// mapped is a side enlarged about the axis.
func mapped(side mesh.Side, scale float64) mesh.Side {
	var out mesh.Side
	for _, s := range side {
		m := s.Mapped(func(p r2.Vec) r2.Vec { return r2.Scale(scale, p) }, false)
		out = append(out, m)
	}
	return out
}

// BenchmarkRoll rolls a pair drawn within a micrometre.
func BenchmarkRoll(b *testing.B) {
	r := pairOf(profile.FormGear, 2, 17, 43)
	r.CenterDistance, r.Rule = 61, mesh.RuleISO
	p, err := mesh.Solve(r)
	if err != nil {
		b.Fatal(err)
	}
	c := drawn(b, p, fit.Arc, 1e-3)
	b.ReportAllocs()
	for b.Loop() {
		p.Roll(p.CenterDistance, c[0], c[1])
	}
}

// BenchmarkSolve solves a pair.
func BenchmarkSolve(b *testing.B) {
	r := pairOf(profile.FormGear, 2, 17, 43)
	r.CenterDistance, r.Rule = 61, mesh.RuleISO
	b.ReportAllocs()
	for b.Loop() {
		if _, err := mesh.Solve(r); err != nil {
			b.Fatal(err)
		}
	}
}
