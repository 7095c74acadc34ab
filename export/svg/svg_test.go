package svg_test

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"strings"
	"sync"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/readertest"
	"flankwright/export/sheet"
	"flankwright/export/svg"
	"flankwright/export/svg/svgtest"
	"flankwright/profile/fit"
)

func samples() map[string]readertest.Sample {
	return map[string]readertest.Sample{
		"arcs":      {Lobes: 12, Size: 40, Reference: true},
		"inch":      {Lobes: 12, Size: 40, Unit: export.Inch, Reference: true},
		"cubics":    {Lobes: 9, Size: 40, Style: readertest.Cubics},
		"lines":     {Lobes: 9, Size: 40, Style: readertest.Lines},
		"open":      {Lobes: 9, Size: 40, Open: true, Reference: true},
		"few lobes": {Lobes: 2, Size: 40},
	}
}

// Every sample passes the strict reader and has the area and size it was given.
func TestMarshal(t *testing.T) {
	for name, s := range samples() {
		t.Run(name, func(t *testing.T) {
			d := s.Drawing()
			data, err := svg.Marshal(d, svg.Options{})
			if err != nil {
				t.Fatal(err)
			}
			f, err := svgtest.Read(data)
			if err != nil {
				t.Fatalf("%v\n%s", err, data)
			}
			if f.Unit != d.Unit.String() {
				t.Errorf("unit %s", f.Unit)
			}
			scale := d.Unit.Scale()
			box := r2.Sub(d.Bounds().Max, d.Bounds().Min)
			margin := 2 * svg.DefaultStrokeWidth
			// Half a step of a bulge moves the crown of its arc by a quarter of that
			// times the chord.
			tol := 1e-9 + 0.25e-9*box.X
			if math.Abs(f.Width-(box.X+margin)*scale) > tol || math.Abs(f.Height-(box.Y+margin)*scale) > tol {
				t.Errorf("page %v by %v for %v", f.Width, f.Height, box)
			}
			want := readertest.DXFExpect(d, dxf.Options{})
			part := f.Part()
			if part == nil {
				t.Fatal("no part")
			}
			// A cubic is sampled by the reader; arcs have nine decimals.
			if got := part.Area(); math.Abs(got-want.PartArea) > 1e-6*math.Abs(want.PartArea) {
				t.Errorf("area %.12g, want %.12g", got, want.PartArea)
			}
			if s.Reference && strings.Count(string(data), "<circle") != 2 {
				t.Error("markers are missing")
			}
		})
	}
}

// The outer loop comes first and runs against the holes, whichever way the
// drawing has them.
func TestWinding(t *testing.T) {
	for _, turn := range []bool{false, true} {
		d := readertest.Sample{Lobes: 5, Size: 10}.Drawing()
		if turn {
			p := d.Items[1].Path.Reversed()
			d.Items[1].Path = &p
		}
		data, err := svg.Marshal(d, svg.Options{})
		if err != nil {
			t.Fatal(err)
		}
		f, err := svgtest.Read(data)
		if err != nil {
			t.Fatal(err)
		}
		sub := f.Part().Subpaths
		if len(sub) != 2 || sub[0].Area <= 0 || sub[1].Area >= 0 || sub[0].Area < -sub[1].Area {
			t.Errorf("turned %v: subpaths %+v", turn, sub)
		}
		if sub[1].Commands != "MAAAAZ" {
			t.Errorf("the bore is %s", sub[1].Commands)
		}
	}
}

// An arc near the half circle is written in two, and its area shows no trace of
// the rounded radius.
func TestWideArcIsSplit(t *testing.T) {
	b := math.Tan(179.9 / 4 * math.Pi / 180)
	p := fit.Path{Closed: true, Segments: []fit.Segment{
		fit.ArcTo(r2.Vec{X: 7}, r2.Vec{X: -6.1234567891, Y: 1}, b),
		fit.LineTo(r2.Vec{X: -6.1234567891, Y: 1}, r2.Vec{X: 7}),
	}}
	data, err := svg.Marshal(export.Drawing{Items: []export.Item{{Layer: "OUTLINE", Path: &p}}}, svg.Options{})
	if err != nil {
		t.Fatal(err)
	}
	f, err := svgtest.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	sub := f.Part().Subpaths[0]
	if sub.Commands != "MAALZ" || math.Abs(sub.Area-p.Area()) > 1e-7 {
		t.Errorf("%s with area %.12g, want %.12g", sub.Commands, sub.Area, p.Area())
	}
}

func TestAssembly(t *testing.T) {
	d := export.Drawing{}
	for i, layer := range []export.Layer{"OUTLINE-1", "OUTLINE-2"} {
		c := export.Circle{Center: r2.Vec{X: 50 * float64(i)}, Radius: 20}
		h := export.Circle{Center: c.Center, Radius: 5}
		d.Items = append(d.Items,
			export.Item{Layer: "BORE-" + layer[8:], Role: export.Hole, Circle: &h},
			export.Item{Layer: layer, Role: export.Outer, Circle: &c})
	}
	data, err := svg.Marshal(d, svg.Options{})
	if err != nil {
		t.Fatal(err)
	}
	f, err := svgtest.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	if len(f.Shapes) != 2 || f.Shapes[0].ID != "part-1" || f.Shapes[1].ID != "part-2" {
		t.Fatalf("shapes %+v", f.Shapes)
	}
	for _, s := range f.Shapes {
		if want := math.Pi * (400 - 25); math.Abs(s.Area()-want) > 1e-6 {
			t.Errorf("%s: area %v, want %v", s.ID, s.Area(), want)
		}
	}
}

func TestOptions(t *testing.T) {
	d := readertest.Sample{Lobes: 5, Size: 10, Unit: export.Inch}.Drawing()
	data, err := svg.Marshal(d, svg.Options{StrokeWidth: 0.254, Filled: true})
	if err != nil {
		t.Fatal(err)
	}
	if _, err := svgtest.Read(data); err != nil {
		t.Error(err)
	}
	for _, want := range []string{`stroke-width="0.01"`, `fill="#c0c0c0"`} {
		if !strings.Contains(string(data), want) {
			t.Errorf("no %s", want)
		}
	}
	for _, bad := range []float64{-1, math.NaN(), math.Inf(1), 1e-12} {
		out, err := svg.Marshal(d, svg.Options{StrokeWidth: bad})
		var e *sheet.Error
		if !errors.As(err, &e) || e.Rule != sheet.RuleOptions || out != nil {
			t.Errorf("stroke %v: %v", bad, err)
		}
	}
	if out, err := svg.Marshal(export.Drawing{}, svg.Options{}); err == nil || out != nil {
		t.Error("an empty drawing passed")
	}
}

// Many goroutines get the bytes that one gets.
func TestConcurrent(t *testing.T) {
	var wg sync.WaitGroup
	for name, s := range samples() {
		d := s.Drawing()
		want, err := svg.Marshal(d, svg.Options{})
		if err != nil {
			t.Fatal(err)
		}
		for range 4 {
			wg.Go(func() {
				for range 10 {
					if got, err := svg.Marshal(d, svg.Options{}); err != nil || !bytes.Equal(got, want) {
						t.Errorf("%s differs from the serial file (%v)", name, err)
						return
					}
				}
			})
		}
	}
	wg.Wait()
}

func BenchmarkMarshal2000(b *testing.B) {
	d := readertest.Sample{Lobes: 400, Size: 100}.Drawing()
	var n int
	b.ReportAllocs()
	for b.Loop() {
		data, err := svg.Marshal(d, svg.Options{})
		if err != nil {
			b.Fatal(err)
		}
		n = len(data)
	}
	b.SetBytes(int64(n))
}

func ExampleMarshal() {
	circle := export.Circle{Radius: 10}
	data, err := svg.Marshal(export.Drawing{
		Items: []export.Item{{Layer: export.LayerOutline, Role: export.Outer, Circle: &circle}},
	}, svg.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	_, path, _ := strings.Cut(string(data), "<path ")
	fmt.Println(strings.Fields(path)[:12])
	// Output: [d="M 20.1 10.1 A 10.0 10.0 0 0 0 10.1 0.1 A]
}
