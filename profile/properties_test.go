package profile_test

import (
	"math"
	"reflect"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
	"pgregory.net/rapid"

	"flankwright/profile"
)

// The properties of a solution, each with its test:
//
//	1  What the verdict of the rolling rack allows is made and what it forbids is
//	   refused, over the whole range of every parameter; what is made is sound (see
//	   sound) and what the rack leaves (see swept).
//	2  A gear of k times the module, all lengths with it, is k times as large.
//	3  The outline is made of what was asked for: tip and rack in Tooth.Spec are the
//	   ones of the curves, and solving that Spec again gives the same tooth.
//	4  More profile shift makes the tooth thicker at every radius both have.
//	5  Flanks do not depend on the rack's dedendum and rounding.
//	6  With ever more teeth the flank goes over into the rack's straight one.
//	7  A tip rounding or chamfer only takes material off, and the largest that fits
//	   is the bound it is refused with.

// anySpec draws a spec from the whole range, mostly near what gears are like.
func anySpec() *rapid.Generator[profile.Spec] {
	return rapid.Custom(func(t *rapid.T) profile.Spec {
		mostly := func(name string, usual *rapid.Generator[float64], low, high float64) float64 {
			return rapid.OneOf(usual, usual, rapid.Float64Range(low, high)).Draw(t, name)
		}
		fixed := func(v ...float64) *rapid.Generator[float64] { return rapid.SampledFrom(v) }
		m := math.Exp(rapid.Float64Range(math.Log(profile.MinModule*1.001), math.Log(profile.MaxModule*0.999)).Draw(t, "log module"))
		s := profile.Spec{
			Module:       m,
			Teeth:        rapid.OneOf(rapid.IntRange(3, 12), rapid.IntRange(5, 40), rapid.IntRange(3, 2000)).Draw(t, "teeth"),
			ProfileShift: mostly("shift", rapid.Float64Range(-0.6, 0.9), -2, 2),
			Rack: profile.BasicRack{
				PressureAngle: degree * mostly("pressure angle", fixed(14.5, 20, 25, 30), 10, 35),
				Addendum:      m * mostly("addendum", fixed(1, 0.8), 0.05, 2),
				Dedendum:      m * mostly("dedendum", fixed(1.25, 1.4, 1.157), 0.05, 2.5),
				RootRadius:    m * mostly("root radius", fixed(0, 0.25, 0.38), 0, 1),
			},
			Rounding:   rapid.SampledFrom([]profile.Rounding{profile.RoundingDefault, profile.RoundingExplicit, profile.RoundingFull}).Draw(t, "rounding"),
			Thinning:   m * mostly("thinning", fixed(0, 0, 0.1), 0, 1),
			ThinningBy: rapid.SampledFrom([]profile.ThinningBy{profile.ThinByFlank, profile.ThinByInfeed}).Draw(t, "by"),
		}
		if rapid.Bool().Draw(t, "own tip") {
			s.TipDiameter = m * (float64(s.Teeth) + rapid.Float64Range(-3, 6).Draw(t, "tip"))
			s.TipDiameter = math.Max(s.TipDiameter, m/10)
		}
		return s
	})
}

func TestProperty1Verdict(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		const points = 16
		if err := compare(anySpec().Draw(t, "spec"), points); err != nil {
			t.Fatal(err)
		}
	})
}

// scaled is the spec with every length k times as large.
func scaled(s profile.Spec, k float64) profile.Spec {
	for _, v := range []*float64{&s.Module, &s.Rack.Addendum, &s.Rack.Dedendum, &s.Rack.RootRadius, &s.Thinning,
		&s.TipDiameter, &s.TipShortening, &s.TipRadius, &s.TipChamfer, &s.MinTipThickness} {
		*v *= k
	}
	return s
}

// TestProperty2Scaling scales by powers of two, which changes no rounding, so the
// results must be equal to the last bit.
func TestProperty2Scaling(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		s := anySpec().Draw(t, "spec")
		k := math.Ldexp(1, rapid.IntRange(-10, 10).Draw(t, "power of two"))
		big := scaled(s, k)
		if big.Module < profile.MinModule || big.Module > profile.MaxModule {
			t.Skip("outside the range")
		}
		a, errA := profile.Solve(s)
		b, errB := profile.Solve(big)
		if (errA == nil) != (errB == nil) {
			t.Fatalf("%v, but %v at %v times the size", errA, errB, k)
		}
		if errA != nil {
			return
		}
		for i := range a.Side {
			for _, share := range []float64{0, 0.3, 1} {
				p, q := pointAt(a.Side[i].Curve, share), pointAt(b.Side[i].Curve, share)
				if q.X != p.X*k || q.Y != p.Y*k {
					t.Fatalf("part %d at %v: %v, %v times as large %v", a.Side[i].Part, share, p, k, q)
				}
			}
		}
		da, db := a.Dimensions, b.Dimensions
		if da.TipThickness*k != db.TipThickness || da.RootDiameter*k != db.RootDiameter || da.FormDiameter*k != db.FormDiameter ||
			da.MinFilletRadius*k != db.MinFilletRadius || len(a.Warnings) != len(b.Warnings) {
			t.Fatalf("%+v\n%v times as large\n%+v", da, k, db)
		}
	})
}

// pointAt is the point at a share of the curve's domain.
func pointAt(c profile.Curve, share float64) r2.Vec {
	from, to := c.Domain()
	return c.At(from + (to-from)*share)
}

func TestProperty3Idempotent(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		a, err := profile.Solve(anySpec().Draw(t, "spec"))
		if err != nil {
			return
		}
		b, err := profile.Solve(a.Spec)
		if err != nil {
			t.Fatal(err)
		}
		if !reflect.DeepEqual(a.Side, b.Side) || a.Land != b.Land || a.Dimensions != b.Dimensions || !reflect.DeepEqual(a.Root, b.Root) {
			t.Fatalf("%+v\nsolved again is\n%+v", a, b)
		}
		if _, again := pick(b.Warnings, profile.RuleRoundingLowered); again {
			t.Fatal("the lowered rounding is lowered again")
		}
		if d := a.Dimensions; a.Spec.TipDiameter != 0 && math.Abs(d.TipDiameter-a.Spec.TipDiameter) > rounding*d.TipDiameter {
			t.Fatalf("tip %v for %v", d.TipDiameter, a.Spec.TipDiameter)
		}
	})
}

// thicknessAt is the tooth's half angle at a radius, from the points of its side;
// false where no flank is.
func thicknessAt(flank profile.Involute, radius float64) (float64, bool) {
	roll := math.Sqrt(math.Max(0, math.Pow(radius/flank.BaseRadius, 2)-1))
	if roll > flank.From || roll < flank.To {
		return 0, false
	}
	p := flank.At(roll)
	return math.Atan2(-p.X, p.Y), true
}

func TestProperty4Shift(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		s := anySpec().Draw(t, "spec")
		a, err := profile.Solve(s)
		more := rapid.Float64Range(1e-6, 0.5).Draw(t, "more shift")
		s.ProfileShift += more
		b, errB := profile.Solve(s)
		if err != nil || errB != nil {
			return
		}
		thin, thick := flankOf(t, a), flankOf(t, b)
		for _, share := range []float64{0, 0.25, 0.5, 0.75, 1} {
			radius := norm(pointAt(thin, share))
			p, ok := thicknessAt(thin, radius)
			q, both := thicknessAt(thick, radius)
			// s grows by 2 x m tan alpha (ISO 21771:2007, 5.4.2).
			want := p + 2*more*math.Tan(s.Rack.PressureAngle)/float64(s.Teeth)
			if ok && both && math.Abs(q-want) > tangent {
				t.Fatalf("half angle at %v is %v with %v more shift than at %v, want %v", radius, q, more, p, want)
			}
		}
	})
}

func TestProperty5FlankAlone(t *testing.T) {
	t.Parallel()
	rapid.Check(t, func(t *rapid.T) {
		s := anySpec().Draw(t, "spec")
		other := s
		other.Rack.Dedendum = s.Module * rapid.Float64Range(0.8, 1.6).Draw(t, "dedendum")
		other.Rack.RootRadius = s.Module * rapid.Float64Range(0, 0.4).Draw(t, "root radius")
		other.Rounding = profile.RoundingDefault
		other.ThinningBy = profile.ThinByInfeed
		a, err := profile.Solve(s)
		b, errB := profile.Solve(other)
		if err != nil || errB != nil {
			return
		}
		p, q := flankOf(t, a), flankOf(t, b)
		if p.BaseRadius != q.BaseRadius || p.BaseHalfAngle != q.BaseHalfAngle || p.From != q.From || a.Land != b.Land {
			t.Fatalf("flanks %+v and %+v", p, q)
		}
	})
}

// TestProperty6RackLimit compares the flank of ever more teeth with the straight
// flank of the rack: the half thickness at the height y is pi m/4 + (x m - y) tan
// alpha but for the curvature of circle and flank, which is of the order y^2/r.
func TestProperty6RackLimit(t *testing.T) {
	for _, z := range []int{50, 200, 1000, 2000} {
		s := gear("iso53-a", 2, z, 0.2)
		tooth := solve(t, s)
		flank := flankOf(t, tooth)
		r := tooth.Dimensions.ReferenceDiameter / 2
		for _, u := range along(flank, 10) {
			p := flank.At(u)
			y := p.Y - r
			straight := math.Pi/2 + (0.4-y)*math.Tan(20*degree)
			const depth = 2.6 // mm, the largest |y|
			// Sagitta of the circle and of the flank, whose radius is r sin alpha.
			near(t, "half thickness", -p.X, straight, depth*depth/r/math.Sin(20*degree))
		}
	}
}
