package gauge_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// TestMeasuringRings uses that the space of a ring is the tooth of an external gear with
// the opposite shift: a circle within that tooth touches both its flanks.
func TestMeasuringRings(t *testing.T) {
	r := rand.New(rand.NewPCG(6, 7))
	for range 60 {
		rack, _ := profile.LookupRack("iso53-a", 2)
		x := -0.3 + 0.6*r.Float64()
		shape, err := profile.Solve(profile.Spec{Module: 2, Teeth: 30 + r.IntN(50), ProfileShift: -x, Rack: rack.For(2, profile.RackChange{})})
		if err != nil {
			continue
		}
		d := shape.Dimensions
		g := must(t, gauge.Spec{Kind: gauge.Ring, Module: 2, Teeth: shape.Teeth, PressureAngle: 20 * degree, ProfileShift: x,
			Tip: d.FormDiameter / 2, TipForm: d.FormDiameter / 2, Form: d.TipFormDiameter / 2})
		fits, err := g.PinRange()
		if err != nil {
			t.Fatal(err)
		}
		flank := flankOf(t, shape)
		for _, share := range []float64{0.01, 0.3, 0.7, 0.99} {
			pin := fits.Smallest + share*(fits.Largest-fits.Smallest)
			p, err := g.Pin(pin)
			if err != nil {
				t.Fatal(err)
			}
			// The pin moves outwards, where the space narrows, until it touches.
			distance := func(y float64) float64 {
				_, off := least(flank, func(q r2.Vec) float64 { return math.Hypot(q.X, q.Y-y) })
				return off
			}
			y := stops(func(y float64) float64 { return pin/2 - distance(y) }, d.FormDiameter/2-pin/2, d.TipDiameter/2)
			second := about(r2.Vec{Y: y}, 2*math.Pi/float64(shape.Teeth)*float64(shape.Teeth/2))
			near(t, "between pins", p.Value, math.Hypot(second.X, second.Y-y)-pin, measured*d.TipDiameter)
		}
		// The tooth of the ring is what is left of the pitch.
		c, err := g.Chord()
		if err != nil {
			t.Fatal(err)
		}
		from, to := flank.Domain()
		radius := func(u float64) float64 { p := flank.At(u); return math.Hypot(p.X, p.Y) }
		sign := math.Copysign(1, radius(to)-radius(from))
		u := stops(func(u float64) float64 { return sign * (radius(u) - d.ReferenceDiameter/2) }, from, to)
		p := about(flank.At(u), -math.Pi/float64(shape.Teeth))
		near(t, "chord of a ring", c.Thickness, 2*p.X, measured*d.TipDiameter)
		near(t, "its height", c.Height, p.Y-d.FormDiameter/2, measured*d.TipDiameter)
	}
}

// TestMeasuringRacks lays a circle between two straight lines.
func TestMeasuringRacks(t *testing.T) {
	for _, alpha := range []float64{14.5, 20, 25} {
		for _, x := range []float64{0, 0.25} {
			s := gauge.Spec{Kind: gauge.Rack, Module: 3, PressureAngle: alpha * degree, ProfileShift: x, Thinning: 0.05, Tip: 3, TipForm: 2.9, Form: -2.8, Back: 20}
			g := must(t, s)
			d, err := g.IdealPin()
			if err != nil {
				t.Fatal(err)
			}
			p, err := g.Pin(d)
			if err != nil {
				t.Fatal(err)
			}
			// The flank through (e/2, 0), leaning outwards.
			e := math.Pi*3 - g.Thickness()
			sin, cos := math.Sincos(s.PressureAngle)
			distance := func(y float64) float64 { return (e/2)*cos + y*sin }
			y := stops(func(y float64) float64 { return distance(y) - d/2 }, -10, 10)
			near(t, "over one pin", p.Value, 20+y+d/2, 1e-12)
			near(t, "contact", p.Contact, y-d/2*sin, 1e-12)
			near(t, "contact of the ideal pin", p.Contact, 3*x, 1e-12)
			c, err := g.Chord()
			if err != nil {
				t.Fatal(err)
			}
			near(t, "chord", c.Thickness, g.Thickness(), 0)
			near(t, "height", c.Height, 3, 0)
		}
	}
}
