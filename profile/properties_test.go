package profile_test

import (
	"math"
	"testing"

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
