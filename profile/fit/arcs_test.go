package fit

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// eachPiece calls visit for every flank, fillet and tip rounding of a tooth with the
// ends at which its tangent is prescribed.
func eachPiece(tooth *profile.Tooth, visit func(p profile.Piece, e ends)) {
	smooth := tooth.LandSmooth
	for _, p := range tooth.Side {
		visit(p, ends{start: smooth, end: p.SmoothEnd})
		smooth = p.SmoothEnd
	}
}

// benchmarkSet is the set of teeth the number of arcs is judged on.
func benchmarkSet(visit func(tooth *profile.Tooth)) {
	for _, z := range []int{8, 12, 17, 24, 43, 120, 400} {
		for _, m := range []float64{0.5, 2, 20} {
			for _, x := range []float64{-0.4, 0, 0.3, 0.8} {
				rack, _ := profile.LookupRack("iso53-a", m)
				tooth, err := profile.Solve(profile.Spec{Module: m, Teeth: z, Rack: rack.For(m, profile.RackChange{}), ProfileShift: x})
				if err == nil { // 8 teeth at 0.8 are pointed
					visit(tooth)
				}
			}
		}
	}
}

// TestArcsAreFew: on the benchmark set no piece takes more than one arc above
// ceil(N + 0.625), with N the least number for free tangents, and all together at most
// 1.10 times the sum of that.
//
// N comes from the error of the best arc, k' L^3/(72 sqrt 3), and 0.3125 for each
// prescribed tangent; derived in doc comments, no published table.
func TestArcsAreFew(t *testing.T) {
	const bothEnds, mostInAll = 0.625, 1.10
	used, bound := 0, 0.0
	benchmarkSet(func(tooth *profile.Tooth) {
		for _, tolerance := range []float64{1e-2, 1e-3, 1e-4, 1e-5} {
			eachPiece(tooth, func(p profile.Piece, e ends) {
				chain, worst := fitArcs(p.Curve, tolerance, e)
				limit := math.Ceil(arcSpread(p.Curve).total/(arcShare*math.Cbrt(tolerance)) + bothEnds)
				used += len(chain)
				bound += limit
				if float64(len(chain)) > limit+1 {
					t.Errorf("z %d m %g x %g tolerance %g part %d: %d arcs, limit %g",
						tooth.Spec.Teeth, tooth.Spec.Module, tooth.Spec.ProfileShift, tolerance, p.Part, len(chain), limit)
				}
				if worst > tolerance {
					t.Errorf("deviation %g above %g", worst, tolerance)
				}
			})
		}
	})
	t.Logf("%d arcs, theoretical least %g, ratio %.4f", used, bound, float64(used)/bound)
	if float64(used) > mostInAll*bound {
		t.Errorf("%d arcs in all, more than %g times %g", used, mostInAll, bound)
	}
}

// TestArcsWasteNoTolerance: a chain of several arcs uses its tolerance, as far as one
// arc less would not do: with n arcs counted without what prescribed tangents cost, the
// deviation is at least 0.9 ((n-1)/n)^3 of it somewhere. Where two tangents are
// prescribed, two arcs are the least there is, however little they deviate.
func TestArcsWasteNoTolerance(t *testing.T) {
	judged := 0
	benchmarkSet(func(tooth *profile.Tooth) {
		for _, tolerance := range []float64{1e-2, 1e-3, 1e-4, 1e-5} {
			eachPiece(tooth, func(p profile.Piece, e ends) {
				chain, worst := fitArcs(p.Curve, tolerance, e)
				n := float64(len(chain))
				if e.start {
					n -= 1 - fixedShare
				}
				if e.end {
					n -= 1 - fixedShare
				}
				if len(chain) < 2 || len(chain) == 2 && e.start && e.end {
					return
				}
				judged++
				if least := 0.9 * math.Pow((n-1)/n, 3) * tolerance; worst < least {
					t.Errorf("z %d m %g x %g tolerance %g part %d: %d arcs deviate by %g only, at least %g expected",
						tooth.Spec.Teeth, tooth.Spec.Module, tooth.Spec.ProfileShift, tolerance, p.Part, len(chain), worst, least)
				}
			})
		}
	})
	const atLeast = 300 // chains of the set
	if judged < atLeast {
		t.Errorf("only %d chains judged", judged)
	}
}

// TestDeviationIsTheLargestDistance measures every chain again at 100 times as many
// places, as the distance from the exact point to the nearest point of any segment of
// the chain, and compares to 1 %.
func TestDeviationIsTheLargestDistance(t *testing.T) {
	for name, tooth := range variety(t) {
		for _, tolerance := range []float64{1e-2, 1e-4} {
			eachPiece(tooth, func(p profile.Piece, e ends) {
				for _, kind := range []Kind{Arc, Cubic, Line} {
					chain, claimed := fitArcs(p.Curve, tolerance, e)
					switch kind {
					case Cubic:
						chain, claimed = fitCubics(p.Curve, tolerance)
					case Line:
						chain, claimed = fitChords(p.Curve, tolerance)
					}
					found := searchDeviation(p.Curve, chain)
					if kind == Line {
						// Joints lie off the curve, farther from it than any point of it is from
						// the chords there.
						for _, s := range chain[:len(chain)-1] {
							found = math.Max(found, distanceTo(p.Curve, s.End))
						}
					}
					const agree, resolved = 0.01, 5e-9 // the search's own step along a cubic, mm
					if claimed > tolerance || found > claimed*(1+agree)+resolved || found < claimed*(1-agree)-resolved {
						t.Errorf("%s part %d kind %d: claims %g of %g, a finer search finds %g", name, p.Part, kind, claimed, tolerance, found)
					}
				}
			})
		}
	}
}

// searchDeviation is the largest distance from points of the curve to the chain.
func searchDeviation(c profile.Curve, chain []Segment) float64 {
	from, to := c.Domain()
	n := 100 * deviationSamples * len(chain)
	if chain[0].Kind == Cubic {
		n = 400 * len(chain) // each of its distances is a search of its own
	}
	worst := 0.0
	for i := range n + 1 {
		p := c.At(from + float64(i)/float64(n)*(to-from))
		nearest := math.Inf(1)
		// The nearest segment is about where the point is along the chain.
		for j := range chain {
			nearest = math.Min(nearest, distance(chain[j], p))
		}
		worst = math.Max(worst, nearest)
	}
	return worst
}

// distanceTo is the distance from p to the nearest point of the curve, by search.
func distanceTo(c profile.Curve, p r2.Vec) float64 {
	from, to := c.Domain()
	best, at := math.Inf(1), from
	step := (to - from) / 500
	for range 6 {
		for i := -500; i <= 500; i++ {
			u := at + float64(i)*step
			if (u-from)*(u-to) > 0 {
				continue
			}
			if d := r2.Norm(r2.Sub(p, c.At(u))); d < best {
				best, at = d, u
			}
		}
		step /= 100
	}
	return best
}

// distance is from p to the nearest point of the segment itself. The nearest place of a
// cubic is found by sections of its parameter.
func distance(s Segment, p r2.Vec) float64 {
	if s.Kind == Cubic {
		best, at := math.Inf(1), 0.5
		for step := 0.02; step > 1e-9; step /= 10 {
			near := at
			for i := -25; i <= 25; i++ {
				u := math.Min(1, math.Max(0, near+float64(i)*step))
				if d := r2.Norm(r2.Sub(p, s.cubicAt(u))); d < best {
					best, at = d, u
				}
			}
		}
		return best
	}
	ends := math.Min(r2.Norm(r2.Sub(p, s.Start)), r2.Norm(r2.Sub(p, s.End)))
	if s.Kind == Arc && s.Bulge != 0 {
		c := s.Center()
		a, b, q := r2.Sub(s.Start, c), r2.Sub(s.End, c), r2.Sub(p, c)
		sense := math.Copysign(1, s.Bulge)
		if r2.Cross(a, q)*sense >= 0 && r2.Cross(q, b)*sense >= 0 {
			return math.Min(ends, math.Abs(s.offset(p)))
		}
		return ends
	}
	d := r2.Sub(s.End, s.Start)
	if along := r2.Dot(r2.Sub(p, s.Start), d) / r2.Dot(d, d); along >= 0 && along <= 1 {
		return math.Min(ends, math.Abs(s.offset(p)))
	}
	return ends
}

// TestToleranceBounds: what is refused, with the bound, and what just is not.
func TestToleranceBounds(t *testing.T) {
	tooth := solved(t, 2, 24, nil)
	for _, tolerance := range []float64{0, -1, math.NaN(), LeastTolerance / 2, 0.451, math.Inf(1)} {
		_, err := NewTooth(tooth.Outline, Options{Curves: Arc, Tolerance: tolerance})
		var f profile.Finding
		if !errors.As(err, &f) || f.Rule != profile.RuleOutOfRange || f.Param != profile.ParamTolerance {
			t.Errorf("tolerance %g: %v", tolerance, err)
		}
	}
	for _, tolerance := range []float64{LeastTolerance, 1e-6, 0.45} {
		f := drawn(t, tooth, Arc, tolerance)
		if f.Deviation > tolerance {
			t.Errorf("tolerance %g: deviation %g", tolerance, f.Deviation)
		}
	}
}

// BenchmarkFit draws one tooth and reports the arcs used against the least possible.
func BenchmarkFit(b *testing.B) {
	for name, teeth := range map[string]int{"z24": 24, "z200": 200} {
		b.Run(name, func(b *testing.B) {
			tooth := solved(b, 2, teeth, nil)
			b.ReportAllocs()
			var f *Tooth
			for b.Loop() {
				f = drawn(b, tooth, Arc, 1e-3)
			}
			limit := 0.0
			eachPiece(tooth, func(p profile.Piece, e ends) { limit += math.Ceil(arcLimit(arcSpread(p.Curve), 1e-3, e)) })
			b.ReportMetric(float64(len(f.Side))/limit, "arcs/least")
		})
	}
}
