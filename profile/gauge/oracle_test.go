package gauge_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// The oracles below know no formula of inspection: they move a circle into the exact
// curves of a solved tooth, or set jaws to them, and read off where they stop.

// measured is the relative difference allowed to a measurement on curves: distances are
// stationary at a contact, so they are good to rounding, and the search for the place
// stops at rounding too.
const measured = 1e-11

// flankOf is the left flank of the tooth on +Y.
func flankOf(t testing.TB, solved *profile.Tooth) profile.Involute {
	t.Helper()
	for _, p := range solved.Side {
		if c, ok := p.Curve.(profile.Involute); ok {
			return c
		}
	}
	t.Fatal("no flank")
	return profile.Involute{}
}

// least is the least of f over a curve: the best of many points, then golden sections.
func least(c profile.Curve, f func(r2.Vec) float64) (u, value float64) {
	const steps = 200
	from, to := c.Domain()
	at := func(i int) float64 { return from + (to-from)*float64(min(max(i, 0), steps))/steps }
	best := 0
	for i := range steps + 1 {
		if f(c.At(at(i))) < f(c.At(at(best))) {
			best = i
		}
	}
	a, b := at(best-1), at(best+1)
	const golden = 0.6180339887498949
	for range 80 { // golden^80 = 2e-17
		l, r := b-golden*(b-a), a+golden*(b-a)
		if f(c.At(l)) < f(c.At(r)) {
			b = r
		} else {
			a = l
		}
	}
	return (a + b) / 2, f(c.At((a + b) / 2))
}

// about turns a point about the origin.
func about(p r2.Vec, angle float64) r2.Vec {
	sin, cos := math.Sincos(angle)
	return r2.Vec{X: p.X*cos - p.Y*sin, Y: p.X*sin + p.Y*cos}
}

// stops is where a value that rises with u reaches zero.
func stops(f func(float64) float64, low, high float64) float64 {
	for range 200 {
		mid := (low + high) / 2
		if f(mid) < 0 {
			low = mid
		} else {
			high = mid
		}
	}
	return (low + high) / 2
}

// pinCenter lowers a pin into the space to the left of the tooth on +Y until its
// distance from the flank is its radius: the distance of its center from the axis, and
// of the contact.
func pinCenter(t testing.TB, solved *profile.Tooth, diameter float64) (center, contact float64) {
	t.Helper()
	flank := flankOf(t, solved)
	turn := math.Pi / float64(solved.Teeth) // to the middle of the space
	at := func(radius float64) r2.Vec { return about(r2.Vec{Y: radius}, turn) }
	distance := func(radius float64) (float64, float64) {
		c := at(radius)
		return least(flank, func(p r2.Vec) float64 { return math.Hypot(p.X-c.X, p.Y-c.Y) })
	}
	d := solved.Dimensions
	center = stops(func(radius float64) float64 { _, off := distance(radius); return off - diameter/2 }, d.RootDiameter/2, d.TipDiameter/2+diameter)
	u, _ := distance(center)
	p := flank.At(u)
	return center, math.Hypot(p.X, p.Y)
}

// randomTooth solves a gear of a module of 2 made up by chance.
func randomTooth(r *rand.Rand) *profile.Tooth {
	for {
		rack, _ := profile.LookupRack([]string{"iso53-a", "full-depth-14.5", "full-depth-25", "stub-20"}[r.IntN(4)], 2)
		s := profile.Spec{Module: 2, Teeth: 8 + r.IntN(60), ProfileShift: -0.4 + r.Float64(), Thinning: 0.1 * r.Float64(), Rack: rack.For(2, profile.RackChange{})}
		if solved, err := profile.Solve(s); err == nil {
			return solved
		}
	}
}

// TestMeasuringTheCurves compares pins, spans and chords with measurements on the exact
// curves of solved teeth.
func TestMeasuringTheCurves(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 3))
	for range 60 {
		solved := randomTooth(r)
		g := must(t, gauge.OfTooth(solved, 0))
		z := float64(solved.Teeth)
		scale := solved.Dimensions.TipDiameter
		if fits, err := g.PinRange(); err == nil {
			d := fits.Smallest + (0.01+0.98*r.Float64())*(fits.Largest-fits.Smallest)
			p, err := g.Pin(d)
			if err != nil {
				t.Fatal(err)
			}
			center, contact := pinCenter(t, solved, d)
			// The second pin sits in the space nearest to the opposite one.
			one := about(r2.Vec{Y: center}, math.Pi/z)
			two := about(one, 2*math.Pi/z*float64(solved.Teeth/2))
			near(t, "over pins", p.Value, math.Hypot(one.X-two.X, one.Y-two.Y)+d, measured*scale)
			near(t, "pin contact", p.Contact/2, contact, 1e-6*scale) // a place, not a distance
		}
		flank := flankOf(t, solved)
		if spans, err := g.Spans(); err == nil {
			for _, s := range spans {
				// Turn the outermost of k teeth's left flanks to where the group is even about +Y, and
				// set a jaw parallel to +Y to it.
				turn := math.Pi / z * float64(s.TeethSpanned-1)
				u, x := least(flank, func(p r2.Vec) float64 { return about(p, turn).X })
				near(t, "span", s.Value, -2*x, measured*scale)
				p := flank.At(u)
				near(t, "span contact", s.ContactDiameter/2, math.Hypot(p.X, p.Y), 1e-6*scale)
			}
		}
		if c, err := g.Chord(); err == nil {
			from, to := flank.Domain()
			radius := func(u float64) float64 { p := flank.At(u); return math.Hypot(p.X, p.Y) }
			sign := math.Copysign(1, radius(to)-radius(from))
			u := stops(func(u float64) float64 { return sign * (radius(u) - solved.Dimensions.ReferenceDiameter/2) }, from, to)
			p := flank.At(u)
			near(t, "chord", c.Thickness, -2*p.X, measured*scale)
			near(t, "chordal height", c.Height, solved.Dimensions.TipDiameter/2-p.Y, measured*scale)
			// Set lower, the caliper touches where the flank is so low.
			height := c.Height + 0.1
			if c, err := g.ChordAt(height); err == nil {
				u := stops(func(u float64) float64 { return sign * (flank.At(u).Y - solved.Dimensions.TipDiameter/2 + height) }, from, to)
				near(t, "chord at a height", c.Thickness, -2*flank.At(u).X, measured*scale)
			}
		}
	}
}

// TestPinsKeepOffTheRoot moves every pin of the range into the whole space, fillets and
// root included: none may reach into the material.
func TestPinsKeepOffTheRoot(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 5))
	for range 60 {
		solved := randomTooth(r)
		g := must(t, gauge.OfTooth(solved, 0))
		fits, err := g.PinRange()
		if err != nil {
			continue
		}
		for _, d := range []float64{fits.Smallest, fits.Smallest + 0.1*(fits.Largest-fits.Smallest), (fits.Smallest + fits.Largest) / 2, fits.Largest} {
			p, err := g.Pin(d)
			if err != nil {
				t.Fatal(err)
			}
			opposite := 1.0
			if solved.Teeth%2 == 1 {
				opposite = math.Cos(math.Pi / 2 / float64(solved.Teeth))
			}
			c := about(r2.Vec{Y: (p.Value - d) / 2 / opposite}, math.Pi/float64(solved.Teeth))
			for _, piece := range solved.Side {
				_, off := least(piece.Curve, func(q r2.Vec) float64 { return math.Hypot(q.X-c.X, q.Y-c.Y) })
				if off < d/2-1e-9 {
					t.Errorf("%+v: a pin of %v from %+v reaches %.3g mm into the %v", solved.Spec, d, fits, d/2-off, piece.Part)
				}
			}
			if off := math.Hypot(c.X, c.Y) - solved.Dimensions.RootDiameter/2; off < d/2-1e-9 {
				t.Errorf("a pin of %v reaches into the root", d)
			}
		}
	}
}
