package label_test

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
	"pgregory.net/rapid"

	"flankwright/profile"
	"flankwright/profile/label"
)

// rounding of sums of lengths of up to some 1e3 mm.
const roundingError = 1e-11

// keeps checks a placement against its region at points a 200th of the height apart.
func keeps(p label.Placement, region label.Region) (least float64, ok bool) {
	least = math.Inf(1)
	for _, q := range cloud(p.Paths, p.Height/200) {
		least = math.Min(least, region.Clearance(q))
	}
	return least, least >= label.Margin(p.Height)-roundingError && least >= p.Clearance-roundingError
}

func TestPlaceInAnnulus(t *testing.T) {
	region := annulus(10, 38, 0)
	p, err := label.Place("Z40 M2", 5, region)
	if err != nil {
		t.Fatal(err)
	}
	if least, ok := keeps(p, region); !ok || p.Height != 5 || p.Chosen {
		t.Errorf("%g from the edge: %+v", least, p)
	}
	_, width := drawn(t, "Z40 M2")
	if math.Abs(p.Origin.X+5*width/2) > roundingError || p.Origin.Y+5 > 0 {
		t.Errorf("origin %v, want below the axis and centered", p.Origin)
	}
	// The best place by trying all, every 1/100 mm.
	best := 0.0
	for y := -40.0; y < 0; y += 0.01 {
		least := math.Inf(1)
		for _, q := range cloud(p.Paths, 0.5) {
			least = math.Min(least, region.Clearance(r2.Add(q, r2.Vec{Y: y - p.Origin.Y})))
		}
		best = math.Max(best, least)
	}
	if p.Clearance < best-5.0/50-5.0/200-0.01 || p.Clearance > best+0.01 {
		t.Errorf("clearance %g, but %g is possible", p.Clearance, best)
	}
}

// TestPlaceOrder: below, above, left, right, between, whichever is free of holes first.
func TestPlaceOrder(t *testing.T) {
	const mid = 24 // between bore and edge
	below, above, left, right := r2.Vec{Y: -mid}, r2.Vec{Y: mid}, r2.Vec{X: -mid}, r2.Vec{X: mid}
	for _, c := range []struct {
		holes []r2.Vec
		want  func(r2.Vec) bool
	}{
		{nil, func(c r2.Vec) bool { return c.Y < 0 && math.Abs(c.X) < roundingError }},
		{[]r2.Vec{below}, func(c r2.Vec) bool { return c.Y > 0 && math.Abs(c.X) < roundingError }},
		{[]r2.Vec{below, above}, func(c r2.Vec) bool { return c.X < 0 && math.Abs(c.Y) < roundingError }},
		{[]r2.Vec{below, above, left}, func(c r2.Vec) bool { return c.X > 0 && math.Abs(c.Y) < roundingError }},
		{[]r2.Vec{below, above, left, right}, func(c r2.Vec) bool { return c.X < -8 && c.Y < -8 }},
	} {
		region := annulus(10, 38, 8, c.holes...)
		p, err := label.Place("Z40", 5, region)
		if err != nil {
			t.Errorf("holes at %v: %v", c.holes, err)
			continue
		}
		least, ok := keeps(p, region)
		_, width := drawn(t, "Z40")
		if center := r2.Add(p.Origin, r2.Vec{X: 5 * width / 2, Y: 2.5}); !ok || !c.want(center) {
			t.Errorf("holes at %v: center %v, %g from the edge", c.holes, center, least)
		}
	}
}

// TestOnlyStrokesNeedRoom: a hole may lie between the strokes of a word.
func TestOnlyStrokesNeedRoom(t *testing.T) {
	region := web{{radius: 100}, {center: r2.Vec{X: 2}, radius: 1, hole: true}, {center: r2.Vec{Y: -400}, radius: 399.5, hole: true},
		{center: r2.Vec{Y: 412.6}, radius: 400.5, hole: true}}
	p, err := label.Place("C", 10, region)
	if err != nil {
		t.Fatal(err)
	}
	if least, ok := keeps(p, region); !ok {
		t.Errorf("%g from the edge", least)
	}
}

// TestFittedHeight: the largest of the series that can be given as a height.
func TestFittedHeight(t *testing.T) {
	series := label.PreferredHeights()
	seen := map[float64]bool{}
	for outer := 8.5; outer < 150; outer *= 1.2 {
		region := annulus(outer/3, outer, 0)
		p, err := label.Place("6x5", 0, region)
		if err != nil {
			t.Fatalf("%g: %v", outer, err)
		}
		if least, ok := keeps(p, region); !ok || !p.Chosen {
			t.Errorf("%g: %g from the edge", outer, least)
		}
		seen[p.Height] = true
		for _, h := range series {
			_, err := label.Place("6x5", h, region)
			if fits := err == nil; fits != (h <= p.Height) {
				t.Errorf("outer radius %g: fitted %g, but %g fits: %v", outer, p.Height, h, fits)
			}
		}
	}
	if len(seen) < 6 {
		t.Errorf("only the heights %v were seen", seen)
	}
}

func TestRefusedHeights(t *testing.T) {
	for _, h := range []float64{-1, 0.49, 1001, math.NaN(), math.Inf(1), math.Inf(-1), math.SmallestNonzeroFloat64} {
		_, err := label.Place("?", h, annulus(1, 10, 0))
		var all profile.Violations
		if !errors.As(err, &all) || len(all) != 2 || all[0].Rule != label.RuleCharacters || all[1].Param != label.ParamHeight || !all[1].Rule.Malformed() {
			t.Errorf("%g: %v", h, err)
		}
	}
}

// strange is a region that keeps no promise.
type strange float64

// Clearance is the same everywhere.
func (s strange) Clearance(r2.Vec) float64 { return float64(s) }

func TestStrangeRegions(t *testing.T) {
	for _, v := range []float64{math.NaN(), math.Inf(-1), -1, 0} {
		if _, err := label.Place("Z40", 0, strange(v)); err == nil {
			t.Errorf("%g: placed", v)
		}
	}
	for _, v := range []float64{math.Inf(1), 100} {
		if p, err := label.Place("Z40", 0, strange(v)); err != nil || p.Height != 20 {
			t.Errorf("%g: %v, %g high", v, err, p.Height)
		}
	}
}

// TestPlaceProperty: on any web a label keeps its margin, or is refused with a bound that
// works; it is the text as drawn by Strokes, and a mirrored web takes the same heights.
func TestPlaceProperty(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		outer := rapid.Float64Range(5, 120).Draw(t, "outer")
		region := annulus(outer*rapid.Float64Range(0, 0.7).Draw(t, "bore"), outer, outer*rapid.Float64Range(0.02, 0.2).Draw(t, "hole"),
			ring(rapid.IntRange(0, 8).Draw(t, "holes"), outer*rapid.Float64Range(0.4, 0.9).Draw(t, "on"))...)
		text := rapid.StringOfN(rapid.SampledFrom([]rune(letters())), 1, 12, -1).Draw(t, "text")
		height := rapid.OneOf(rapid.Just(0.0), rapid.Float64Range(0.5, 20)).Draw(t, "height")
		p, err := label.Place(text, height, region)
		if err != nil {
			f := refusal(t, err)
			if f.Bound.Value == 0 {
				return
			}
			if p, err = label.Place(text, f.Bound.Value, region); err != nil {
				t.Fatalf("the bound %g: %v", f.Bound.Value, err)
			}
			if height > 0 && p.Height >= height || height == 0 && p.Height >= 1.8 {
				t.Fatalf("the bound %g is not below %g", p.Height, height)
			}
		}
		if least, ok := keeps(p, region); !ok {
			t.Fatalf("%g from the edge: %+v", least, p)
		}
		paths, _, _ := label.Strokes(text)
		for i, stroke := range paths {
			for k, s := range stroke.Segments {
				got := p.Paths[i].Segments[k]
				want := r2.Add(p.Origin, r2.Scale(p.Height, s.End))
				if r2.Norm(r2.Sub(got.End, want)) > roundingError || got.Bulge != s.Bulge || k > 0 && got.Start != p.Paths[i].Segments[k-1].End {
					t.Fatalf("%+v, want %v", got, want)
				}
			}
		}
	})
}
