package sheet

import (
	"errors"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/fixed"
	"flankwright/profile/fit"
)

func v(x, y float64) r2.Vec { return r2.Vec{X: x, Y: y} }

func pathItem(closed bool, segs ...fit.Segment) export.Item {
	return export.Item{Layer: export.LayerOutline, Path: &fit.Path{Segments: segs, Closed: closed}}
}

func circleItem(x, y, r float64) export.Item {
	return export.Item{Layer: export.LayerBore, Role: export.Hole, Circle: &export.Circle{Center: v(x, y), Radius: r}}
}

func TestRules(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	line := fit.LineTo(v(0, 0), v(1, 0))
	layer := func(l export.Layer) export.Item {
		it := pathItem(false, line)
		it.Layer = l
		return it
	}
	both := circleItem(0, 0, 1)
	both.Path = &fit.Path{Segments: []fit.Segment{line}}
	role := pathItem(false, line)
	role.Role = 3
	for _, tc := range []struct {
		name string
		rule Rule
		item export.Item
	}{
		{"lower case layer", RuleLayer, layer("outline")},
		{"empty layer", RuleLayer, layer("")},
		{"long layer", RuleLayer, layer(export.Layer(strings.Repeat("A", 32)))},
		{"layer with newline", RuleLayer, layer("A\n0")},
		{"role", RuleRole, role},
		{"neither", RuleShape, export.Item{Layer: "A"}},
		{"both", RuleShape, both},
		{"zero radius", RuleRadius, circleItem(0, 0, 0)},
		{"negative radius", RuleRadius, circleItem(0, 0, -1)},
		{"NaN radius", RuleFinite, circleItem(0, 0, nan)},
		{"infinite center", RuleFinite, circleItem(inf, 0, 1)},
		{"circle out of range", RuleFinite, circleItem(999999, 0, 10)},
		{"no segments", RuleSegments, pathItem(false)},
		{"closed line", RuleSegments, pathItem(true, line)},
		{"NaN point", RuleFinite, pathItem(false, fit.LineTo(v(nan, 0), v(1, 0)))},
		{"far point", RuleFinite, pathItem(false, fit.LineTo(v(0, 0), v(2e6, 0)))},
		{"NaN handle", RuleFinite, pathItem(false, fit.CubicTo(v(0, 0), v(nan, 0), v(1, 1), v(2, 0)))},
		{"short", RuleShort, pathItem(false, fit.LineTo(v(0, 0), v(9e-7, 0)))},
		{"coincident", RuleShort, pathItem(false, fit.ArcTo(v(1, 1), v(1, 1), 0.5))},
		{"half circle", RuleTurn, pathItem(false, fit.ArcTo(v(0, 0), v(1, 0), 1))},
		{"nearly half", RuleTurn, pathItem(false, fit.ArcTo(v(0, 0), v(1, 0), -0.9999999999))},
		{"NaN bulge", RuleTurn, pathItem(false, fit.ArcTo(v(0, 0), v(1, 0), nan))},
		{"gap", RuleGap, pathItem(false, line, fit.LineTo(v(1, 2e-9), v(2, 0)))},
		{"open loop", RuleGap, pathItem(true, line, fit.LineTo(v(1, 0), v(1, 1)))},
		{"back and forth", RuleFlat, pathItem(true, line, fit.LineTo(v(1, 0), v(0, 0)))},
		{"arc back", RuleFlat, pathItem(true, fit.ArcTo(v(0, 0), v(1, 0), 0.3), fit.ArcTo(v(1, 0), v(0, 0), -0.3))},
		{"kind", RuleKind, pathItem(false, fit.Segment{Kind: 9, End: v(1, 0)})},
	} {
		s, err := New(export.Drawing{Items: []export.Item{circleItem(0, 0, 1), tc.item}})
		var e *Error
		if !errors.As(err, &e) || e.Rule != tc.rule || s != nil {
			t.Errorf("%s: %v, want %q", tc.name, err, tc.rule)
			continue
		}
		if e.Item != 1 && tc.name != "circle out of range" {
			t.Errorf("%s: item %d", tc.name, e.Item)
		}
		if strings.Contains(e.Error(), "\n") {
			t.Errorf("%s: several lines: %q", tc.name, e.Error())
		}
	}
	for rule, d := range map[Rule]export.Drawing{
		RuleEmpty: {}, RuleUnit: {Unit: 7, Items: []export.Item{circleItem(0, 0, 1)}},
	} {
		var e *Error
		if _, err := New(d); !errors.As(err, &e) || e.Rule != rule {
			t.Errorf("%v, want %q", err, rule)
		}
	}
}

// The drawing is left alone, its points are scaled and rounded once, and shared
// points stay shared.
func TestRounding(t *testing.T) {
	a, b, c := v(1.0/3, 2.0/3), v(25.4, 1e-12), v(-math.Pi, 7)
	d := export.Drawing{Unit: export.Inch, Items: []export.Item{
		pathItem(true, fit.LineTo(a, b), fit.ArcTo(b, c, 0.123456789123), fit.CubicTo(c, v(1, 1), v(2, 2), a)),
	}}
	s, err := New(d)
	if err != nil {
		t.Fatal(err)
	}
	if d.Items[0].Path.Segments[0].Start != a {
		t.Error("the drawing was changed")
	}
	segs := s.Items[0].Path.Segments
	for i, seg := range segs {
		if next := segs[(i+1)%3]; seg.End != next.Start {
			t.Errorf("segment %d does not meet the next", i)
		}
	}
	if got := segs[0].End; got != v(1, 0) || math.Signbit(got.Y) {
		t.Errorf("25.4 mm is %v in", got)
	}
	if segs[1].Bulge != 0.123456789 {
		t.Errorf("bulge %v", segs[1].Bulge)
	}
}

// The box found by the short cut is the box of all segments.
func TestBounds(t *testing.T) {
	for i := range 200 {
		f := func(k int) float64 { return 10 * math.Sin(float64(i*31+k*17)) }
		items := []export.Item{pathItem(false,
			fit.ArcTo(v(f(1), f(2)), v(f(3), f(4)), f(5)/11),
			fit.CubicTo(v(f(3), f(4)), v(2*f(6), f(7)), v(f(8), 2*f(9)), v(f(10), f(11))),
			fit.LineTo(v(f(10), f(11)), v(f(12), f(13))),
		), circleItem(f(14), f(15), 3)}
		want := export.Drawing{Items: items}.Bounds()
		got := bounds(items)
		for _, p := range [][2]float64{
			{got.Min.X, want.Min.X}, {got.Min.Y, want.Min.Y}, {got.Max.X, want.Max.X}, {got.Max.Y, want.Max.Y},
		} {
			if math.Abs(p[0]-p[1]) > fixed.Step {
				t.Fatalf("case %d: box %v, want %v", i, got, want)
			}
		}
	}
}

func TestStraight(t *testing.T) {
	for _, tc := range []struct {
		seg  fit.Segment
		want bool
	}{
		{fit.LineTo(v(0, 0), v(1, 0)), true},
		{fit.ArcTo(v(0, 0), v(1, 0), 0), true},
		{fit.ArcTo(v(0, 0), v(0.5, 0), 1e-9), true},
		{fit.ArcTo(v(0, 0), v(2, 0), 1e-9), false},
		{fit.CubicTo(v(0, 0), v(1, 0), v(2, 0), v(3, 0)), false},
	} {
		if got := Straight(tc.seg); got != tc.want {
			t.Errorf("Straight(%+v) = %v", tc.seg, got)
		}
	}
}
