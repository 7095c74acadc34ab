// Package readertest shows drawing files to programs that are not ours and
// compares what they saw with what was drawn. It is for tests: of the writers
// with the samples here, and of the command with real gears.
//
// A program that is missing skips the test with a line that names it; with
// CI=true in the environment it fails instead. The scripts that run inside
// those programs' languages are in .ci/readers.
package readertest

import (
	"maps"
	"math"
	"slices"
	"testing"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/dxf/dxftest"
	"flankwright/export/sheet"
	"flankwright/profile/fit"
)

// Expect is what a reader should find, in the unit of the file.
type Expect struct {
	Unit     export.Unit
	Version  dxf.Version
	Kinds    map[string]int // entities by kind
	Layers   map[string]dxftest.Layer
	Span     [4]float64 // least x, least y, greatest x, greatest y
	PartArea float64    // closed outer loops less holes
	Gross    float64    // closed outer loops and holes, which errors of readers go by
	PartLen  float64    // all outer loops and holes, open ones too
}

// DXFExpect is what a reader should find in the file that dxf.Marshal makes of
// the drawing. It is computed from the geometry of package fit.
func DXFExpect(d export.Drawing, opt dxf.Options) Expect {
	w := Expect{Unit: d.Unit, Version: opt.Version, Kinds: map[string]int{}, Layers: map[string]dxftest.Layer{}}
	f := d.Unit.Scale()
	box := d.Bounds()
	w.Span = [4]float64{box.Min.X * f, box.Min.Y * f, box.Max.X * f, box.Max.Y * f}
	for _, it := range d.Items {
		l := w.Layers[string(it.Layer)]
		l.Name = string(it.Layer)
		var area, length float64
		closed, n := true, 1
		if c := it.Circle; c != nil {
			w.Kinds["CIRCLE"]++
			area, length = math.Pi*c.Radius*c.Radius, 2*math.Pi*c.Radius
		} else {
			area, length, closed = math.Abs(it.Path.Area()), it.Path.Length(), it.Path.Closed
			n = w.path(it.Path, opt)
		}
		l.Entities += n
		l.Length += length * f
		if it.Role != export.Marker {
			w.PartLen += length * f
		}
		if closed {
			l.Closed++
			l.Area += area * f * f
			if it.Role != export.Marker {
				w.Gross += area * f * f
			}
			switch it.Role {
			case export.Outer:
				w.PartArea += area * f * f
			case export.Hole:
				w.PartArea -= area * f * f
			}
		} else {
			l.Open++
		}
		w.Layers[string(it.Layer)] = l
	}
	return w
}

// path counts the entities of a path.
func (w *Expect) path(p *fit.Path, opt dxf.Options) int {
	if !opt.Loose && !sheet.Has(p, fit.Cubic) {
		if opt.Version == dxf.R12 {
			w.Kinds["POLYLINE"]++
		} else {
			w.Kinds["LWPOLYLINE"]++
		}
		return 1
	}
	for _, s := range p.Segments {
		switch {
		case s.Kind == fit.Cubic:
			w.Kinds["SPLINE"]++
		case sheet.Straight(s):
			w.Kinds["LINE"]++
		default:
			w.Kinds["ARC"]++
		}
	}
	return len(p.Segments)
}

// Tolerance is how near a reader comes.
type Tolerance struct {
	Area   float64 // of each layer, relative
	Length float64 // of each layer, relative
	Span   float64 // of the whole, relative to its size
	Gap    float64 // between ends that meet, in the unit of the file
	Kinds  bool    // entities and their kinds are those of the file
}

// Exact is for readers that keep arcs: what is left are nine decimals, and for
// splines the sampling of package dxftest.
func Exact() Tolerance {
	return Tolerance{Area: 1e-6, Length: 1e-6, Span: 1e-6, Gap: dxftest.MaxGap, Kinds: true}
}

// Compare reports where the entities that a reader found differ from want.
func Compare(t testing.TB, got []dxftest.Entity, want Expect, tol Tolerance) {
	t.Helper()
	if tol.Kinds {
		kinds := map[string]int{}
		for _, e := range got {
			kinds[e.Kind]++
		}
		if !maps.Equal(kinds, want.Kinds) {
			t.Errorf("entities %v, want %v", kinds, want.Kinds)
		}
	}
	layers, err := dxftest.Measure(got, tol.Gap)
	if err != nil {
		t.Error(err)
		return
	}
	var names []string
	for _, l := range layers {
		names = append(names, l.Name)
		w, ok := want.Layers[l.Name]
		if !ok {
			continue // reported below
		}
		if tol.Kinds && l.Entities != w.Entities || l.Closed != w.Closed || l.Open != w.Open {
			t.Errorf("layer %s: %d entities in %d closed and %d open chains, want %d in %d and %d",
				l.Name, l.Entities, l.Closed, l.Open, w.Entities, w.Closed, w.Open)
		}
		if !near(l.Area, w.Area, tol.Area*w.Area) {
			t.Errorf("layer %s: area %.12g, want %.12g", l.Name, l.Area, w.Area)
		}
		if !near(l.Length, w.Length, tol.Length*w.Length) {
			t.Errorf("layer %s: length %.12g, want %.12g", l.Name, l.Length, w.Length)
		}
	}
	if expected := slices.Sorted(maps.Keys(want.Layers)); !slices.Equal(names, expected) {
		t.Errorf("layers %v, want %v", names, expected)
	}
	span, err := dxftest.Span(got)
	if err != nil {
		t.Error(err)
		return
	}
	compareSpan(t, span, want, tol.Span)
}

func compareSpan(t testing.TB, got [4]float64, want Expect, tol float64) {
	t.Helper()
	size := math.Hypot(want.Span[2]-want.Span[0], want.Span[3]-want.Span[1])
	for i := range got {
		if !near(got[i], want.Span[i], tol*size) {
			t.Errorf("extents %v, want %v", got, want.Span)
			return
		}
	}
}

func near(a, b, tol float64) bool { return math.Abs(a-b) <= tol }
