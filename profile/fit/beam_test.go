package fit

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/internal/racksweep"
)

// inPart says how deep in the part a point lies, from the swept rack and the tip circle
// alone; negative outside, where it need not be a distance.
func inPart(rack racksweep.Sweep, tip float64, p r2.Vec) float64 {
	return math.Min(rack.Clearance(p), tip-r2.Norm(p))
}

// deepest is how deep the disc of radius d about the point c reaches into the part.
func deepest(rack racksweep.Sweep, tip float64, c r2.Vec, d float64) float64 {
	at := func(a float64) float64 {
		sin, cos := math.Sincos(a)
		return inPart(rack, tip, r2.Add(c, r2.Vec{X: d * cos, Y: d * sin}))
	}
	const coarse = 360 // a corner of the part makes a narrow peak
	best, a := math.Inf(-1), 0.0
	for i := range coarse {
		if v := at(2 * math.Pi * float64(i) / coarse); v > best {
			best, a = v, 2*math.Pi*float64(i)/coarse
		}
	}
	for step := math.Pi / coarse; step > 1e-7; step /= 2 {
		for _, b := range [2]float64{a - step, a + step} {
			if v := at(b); v > best {
				best, a = v, b
			}
		}
	}
	return best
}

// TestBeamTouchesThePart: about every drawn point of the path the beam's disc touches the
// part's edge, which the swept rack and the tip circle tell, and does not cut into it.
func TestBeamTouchesThePart(t *testing.T) {
	const tolerance = 1e-3
	type kind struct {
		name   string
		module float64
		teeth  int
		change func(*profile.Spec)
	}
	for _, k := range []kind{
		{"plain", 2, 24, nil},
		{"small", 0.5, 17, nil},
		{"large", 5, 40, func(s *profile.Spec) { s.ProfileShift = 0.3 }},
		{"undercut", 1.5, 9, nil},
		{"deep undercut", 3, 7, func(s *profile.Spec) { s.ProfileShift = -0.1 }},
		{"full root", 2, 30, func(s *profile.Spec) { s.Rounding = profile.RoundingFull }},
		{"sharp rack", 2, 30, func(s *profile.Spec) { s.Rack.RootRadius, s.Rounding = 0, profile.RoundingExplicit }},
		{"chamfered", 2, 30, func(s *profile.Spec) { s.TipChamfer = 0.2 }},
		{"rounded", 2, 30, func(s *profile.Spec) { s.TipRadius = 0.2 }},
	} {
		t.Run(k.name, func(t *testing.T) {
			t.Parallel()
			tooth := solved(t, k.module, k.teeth, k.change)
			rack := racksweep.New(racksweep.For(tooth.Spec))
			tip := tooth.Dimensions.TipDiameter / 2
			largest := largestKerf(t, tooth)
			for _, width := range []float64{0.05, 0.3 * largest, 0.7 * largest, 0.999 * largest} {
				beam, err := tooth.Beam(width)
				if err != nil {
					t.Fatalf("width %g of %g: %v", width, largest, err)
				}
				f, err := NewTooth(beam.Outline, Options{Curves: Arc, Tolerance: tolerance})
				if err != nil {
					t.Fatal(err)
				}
				for _, list := range [][]Segment{f.Land, f.Side, f.Root} {
					for _, s := range list {
						for _, u := range []float64{0.01, 0.5, 0.8} {
							p := pointAt(s, u)
							if tooth.Side[0].Part != profile.PartFlank && r2.Norm(p) > tooth.Dimensions.TipFormDiameter/2 {
								continue // the sweep knows no tip forms; see TestBeamAboutTipForms
							}
							if into := deepest(rack, tip, p, width/2); math.Abs(into) > tolerance {
								t.Errorf("width %g of %g: the beam at %v reaches %g into the part", width, largest, p, into)
							}
						}
					}
				}
				check2Simple(t, k.name, f.Outline(Extent{}, 0))
				for _, l := range beam.Leftovers {
					// The place lies on the part's edge, and no beam position comes nearer than
					// half its width and the depth.
					if off := math.Abs(rack.Clearance(l.At)); off > tolerance {
						t.Errorf("width %g: material left at %v, %g off the edge", width, l.At, off)
					}
					if l.Depth <= 0 || l.Depth > tooth.Dimensions.WholeDepth {
						t.Errorf("width %g: depth %g", width, l.Depth)
					}
				}
			}
		})
	}
}

// TestBeamAboutTipForms: on rounding and chamfer the distance to the exact piece is
// measured by search.
func TestBeamAboutTipForms(t *testing.T) {
	for _, tooth := range []*profile.Tooth{
		solved(t, 2, 30, func(s *profile.Spec) { s.TipChamfer = 0.2 }),
		solved(t, 2, 30, func(s *profile.Spec) { s.TipRadius = 0.2 }),
	} {
		const width = 0.3
		beam, err := tooth.Beam(width)
		if err != nil {
			t.Fatal(err)
		}
		pieces := append([]profile.Piece{{Curve: tooth.Land}}, tooth.Side...)
		for i, p := range append([]profile.Piece{{Curve: beam.Land}}, beam.Side...) {
			from, to := p.Curve.Domain()
			for _, u := range []float64{0, 0.3, 0.9, 1} {
				at := p.Curve.At(from + u*(to-from))
				nearest := math.Inf(1)
				for _, q := range pieces {
					nearest = math.Min(nearest, distanceTo(q.Curve, at))
				}
				const searched = 1e-6 // mm, what the search resolves
				if math.Abs(nearest-width/2) > searched {
					t.Errorf("piece %d: %g from the part, want %g", i, nearest, width/2)
				}
			}
			if i > 0 && i < len(beam.Side) {
				if gap := r2.Norm(r2.Sub(profile.End(p.Curve), profile.Start(beam.Side[i].Curve))); gap > 1e-12 {
					t.Errorf("gap of %g after piece %d", gap, i)
				}
			}
		}
	}
}

// largestKerf is the bound of the refusal of a beam as wide as the tooth is deep.
func largestKerf(t *testing.T, tooth *profile.Tooth) float64 {
	t.Helper()
	_, err := tooth.Beam(2 * tooth.Dimensions.CircularPitch)
	var f profile.Finding
	if !errors.As(err, &f) || f.Rule != profile.RuleKerfTooWide {
		t.Fatalf("a beam two pitches wide: %v", err)
	}
	return f.Bound.Value
}

// TestBeamLeavesNothingWhereItFits: below twice the least fillet radius the path keeps
// all of the root, above it material stays, and the more the wider the beam.
func TestBeamLeavesNothingWhereItFits(t *testing.T) {
	tooth := solved(t, 2, 24, nil)
	limit := 2 * tooth.Dimensions.MinFilletRadius
	depth := 0.0
	for _, width := range []float64{0.5 * limit, 0.999 * limit, 1.001 * limit, 1.05 * limit, 1.1 * limit} {
		beam, err := tooth.Beam(width)
		if err != nil {
			t.Fatal(err)
		}
		if width < limit {
			if len(beam.Leftovers) != 0 {
				t.Errorf("width %g of %g: material left %v", width, limit, beam.Leftovers)
			}
			continue
		}
		if len(beam.Leftovers) == 0 || beam.Leftovers[0].Depth <= depth {
			t.Fatalf("width %g of %g: material left %v, before %g", width, limit, beam.Leftovers, depth)
		}
		depth = beam.Leftovers[0].Depth
	}
}

// TestBeamArea: without corners cut away, the area between part and path is that of a
// band of half the width: length times d plus a disc's worth of turning (Steiner's
// formula for parallel curves).
func TestBeamArea(t *testing.T) {
	tooth := solved(t, 2, 24, nil)
	part := drawn(t, tooth, Arc, 1e-6).Outline(Extent{}, 0)
	beam, err := tooth.Beam(0.2)
	if err != nil {
		t.Fatal(err)
	}
	f, err := NewTooth(beam.Outline, Options{Curves: Arc, Tolerance: 1e-6})
	if err != nil {
		t.Fatal(err)
	}
	path := f.Outline(Extent{}, 0)
	const d = 0.1
	want := part.Area() + part.Length()*d + math.Pi*d*d
	if got := path.Area(); math.Abs(got-want) > 1e-6*part.Length() {
		t.Errorf("the path encloses %.9g, want %.9g", got, want)
	}
	if got, want := path.Length(), part.Length()+2*math.Pi*d; math.Abs(got-want) > 1e-6*part.Length() {
		t.Errorf("the path is %.9g long, want %.9g", got, want)
	}
}
