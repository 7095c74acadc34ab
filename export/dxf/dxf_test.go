package dxf_test

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
	"flankwright/export/dxf/dxftest"
	"flankwright/export/readertest"
	"flankwright/export/sheet"
	"flankwright/profile/fit"
)

// variants are the ways a sample is written in these tests.
func variants() map[string]struct {
	sample readertest.Sample
	opt    dxf.Options
} {
	type v = struct {
		sample readertest.Sample
		opt    dxf.Options
	}
	base := readertest.Sample{Lobes: 12, Size: 40, Reference: true}
	with := func(f func(*v)) v {
		x := v{sample: base}
		f(&x)
		return x
	}
	return map[string]v{
		"arcs":       with(func(*v) {}),
		"inch":       with(func(x *v) { x.sample.Unit = export.Inch }),
		"lines":      with(func(x *v) { x.sample.Style = readertest.Lines }),
		"cubics":     with(func(x *v) { x.sample.Style = readertest.Cubics }),
		"cubics-in":  with(func(x *v) { x.sample.Style = readertest.Cubics; x.sample.Unit = export.Inch }),
		"loose":      with(func(x *v) { x.opt.Loose = true }),
		"loose-line": with(func(x *v) { x.opt.Loose = true; x.sample.Style = readertest.Lines }),
		"loose-inch": with(func(x *v) { x.opt.Loose = true; x.sample.Unit = export.Inch }),
		"open":       with(func(x *v) { x.sample.Open = true }),
		"open-loose": with(func(x *v) { x.sample.Open = true; x.opt.Loose = true }),
		"r12":        with(func(x *v) { x.opt.Version = dxf.R12 }),
		"r12-loose":  with(func(x *v) { x.opt.Version = dxf.R12; x.opt.Loose = true }),
		"r12-open":   with(func(x *v) { x.opt.Version = dxf.R12; x.sample.Open = true }),
		"large":      with(func(x *v) { x.sample.Size = 40000; x.opt.Loose = true }),
	}
}

// Every variant passes the strict reader and holds the geometry it was given.
func TestMarshal(t *testing.T) {
	for name, v := range variants() {
		t.Run(name, func(t *testing.T) {
			d := v.sample.Drawing()
			data, err := dxf.Marshal(d, v.opt)
			if err != nil {
				t.Fatal(err)
			}
			if err := dxftest.Check(data); err != nil {
				t.Fatalf("%v\n%s", err, data)
			}
			f, err := dxftest.Read(data)
			if err != nil {
				t.Fatal(err)
			}
			readertest.Compare(t, f.Entities, readertest.DXFExpect(d, v.opt), readertest.Exact())
			if twice, err := dxftest.Coincident(f.Entities); err != nil || len(twice) != 0 {
				t.Errorf("coincident pieces: %v %v", twice, err)
			}
			if !bytes.HasSuffix(data, []byte("0\nEOF\n")) {
				t.Error("does not end in 0 EOF")
			}
			again, err := dxf.Marshal(d, v.opt)
			if err != nil || !bytes.Equal(again, data) {
				t.Errorf("a second run differs (%v)", err)
			}
		})
	}
}

// Ends of loose arcs that meet agree to 2e-9, wherever their centers fall.
func TestLooseEndsMeet(t *testing.T) {
	worst := 0.0
	for i := range 400 {
		s := readertest.Sample{Lobes: 3 + i%37, Size: 0.5 + math.Pow(1.02, float64(i)), Unit: export.Unit(i % 2)}
		data, err := dxf.Marshal(s.Drawing(), dxf.Options{Loose: true})
		if err != nil {
			t.Fatal(err)
		}
		f, err := dxftest.Read(data)
		if err != nil {
			t.Fatal(err)
		}
		layers, err := dxftest.Measure(f.Entities, 1e-6)
		if err != nil {
			t.Fatal(err)
		}
		for _, l := range layers {
			worst = max(worst, l.Gap)
		}
	}
	t.Logf("widest gap %.3g", worst)
	if worst > dxftest.MaxGap {
		t.Errorf("widest gap %.3g", worst)
	}
}

func TestHeader(t *testing.T) {
	for _, unit := range []export.Unit{export.Millimetre, export.Inch} {
		d := readertest.Sample{Lobes: 5, Size: 25.4, Unit: unit}.Drawing()
		data, err := dxf.Marshal(d, dxf.Options{})
		if err != nil {
			t.Fatal(err)
		}
		f, err := dxftest.Read(data)
		if err != nil {
			t.Fatal(err)
		}
		box := d.Bounds()
		x0, y0 := f.Point("$EXTMIN")
		x1, y1 := f.Point("$EXTMAX")
		s := unit.Scale()
		for _, p := range [][2]float64{{x0, box.Min.X}, {y0, box.Min.Y}, {x1, box.Max.X}, {y1, box.Max.Y}} {
			if math.Abs(p[0]-p[1]*s) > 1e-9 {
				t.Errorf("%v: extent %v, want %v", unit, p[0], p[1]*s)
			}
		}
	}
}

func TestLayerColors(t *testing.T) {
	square := square(0, 0, 10)
	circle := export.Circle{Radius: 1}
	d := export.Drawing{Items: []export.Item{
		{Layer: "HOLES", Role: export.Hole, Circle: &circle},
		{Layer: "OUTLINE-2", Path: &square},
		{Layer: "REFERENCE", Role: export.Marker, Circle: &circle},
	}}
	data, err := dxf.Marshal(d, dxf.Options{})
	if err != nil {
		t.Fatal(err)
	}
	f, err := dxftest.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	got := ""
	for _, tab := range f.Tables {
		if tab.Name == "LAYER" {
			for _, r := range tab.Records {
				n, _ := r.First(2)
				c, _ := r.First(62)
				got += n.Value + "=" + c.Value + " "
			}
		}
	}
	if want := "0=7 HOLES=4 OUTLINE-2=7 REFERENCE=3 "; got != want {
		t.Errorf("layers %q, want %q", got, want)
	}
}

// square runs counter-clockwise from (x, y).
func square(x, y, size float64) fit.Path {
	p := []r2.Vec{{X: x, Y: y}, {X: x + size, Y: y}, {X: x + size, Y: y + size}, {X: x, Y: y + size}}
	path := fit.Path{Closed: true}
	for i := range p {
		path.Segments = append(path.Segments, fit.LineTo(p[i], p[(i+1)%4]))
	}
	return path
}

func TestRefused(t *testing.T) {
	cubic := readertest.Sample{Lobes: 4, Size: 10, Style: readertest.Cubics}.Drawing()
	flat := export.Drawing{Items: []export.Item{{Layer: "OUTLINE", Path: &fit.Path{Segments: []fit.Segment{
		fit.ArcTo(r2.Vec{}, r2.Vec{X: 300}, 1e-4),
	}}}}}
	for _, tc := range []struct {
		name string
		d    export.Drawing
		opt  dxf.Options
		rule sheet.Rule
	}{
		{"cubics in R12", cubic, dxf.Options{Version: dxf.R12}, sheet.RuleVersion},
		{"empty", export.Drawing{}, dxf.Options{}, sheet.RuleEmpty},
		{"version", cubic, dxf.Options{Version: 9}, sheet.RuleOptions},
		{"flat arc", flat, dxf.Options{Loose: true}, sheet.RulePrecision},
	} {
		data, err := dxf.Marshal(tc.d, tc.opt)
		var e *sheet.Error
		if !errors.As(err, &e) || e.Rule != tc.rule || len(data) != 0 {
			t.Errorf("%s: %v with %d bytes, want rule %q", tc.name, err, len(data), tc.rule)
		}
	}
	if _, err := dxf.Marshal(flat, dxf.Options{}); err != nil {
		t.Errorf("a flat arc in a polyline: %v", err)
	}
}

func TestAppendKeepsPrefix(t *testing.T) {
	d := readertest.Sample{Lobes: 4, Size: 10}.Drawing()
	want, err := dxf.Marshal(d, dxf.Options{})
	if err != nil {
		t.Fatal(err)
	}
	got, err := dxf.Append([]byte("x"), d, dxf.Options{})
	if err != nil || string(got) != "x"+string(want) {
		t.Errorf("prefix lost: %v", err)
	}
	got, err = dxf.Append([]byte("x"), export.Drawing{}, dxf.Options{})
	if err == nil || string(got) != "x" {
		t.Errorf("after an error the buffer is %q", got)
	}
}

// Many goroutines get the bytes that one gets.
func TestConcurrent(t *testing.T) {
	type job struct {
		d    export.Drawing
		opt  dxf.Options
		want []byte
	}
	var jobs []job
	for _, v := range variants() {
		d := v.sample.Drawing()
		want, err := dxf.Marshal(d, v.opt)
		if err != nil {
			t.Fatal(err)
		}
		jobs = append(jobs, job{d, v.opt, want})
	}
	var wg sync.WaitGroup
	for g := range 16 {
		wg.Go(func() {
			var buf []byte
			for i := range 4 * len(jobs) {
				j := jobs[(i+g)%len(jobs)]
				var err error
				if buf, err = dxf.Append(buf[:0], j.d, j.opt); err != nil || !bytes.Equal(buf, j.want) {
					t.Errorf("goroutine %d: differs from the serial file (%v)", g, err)
					return
				}
			}
		})
	}
	wg.Wait()
}

func ExampleMarshal() {
	circle := export.Circle{Center: r2.Vec{X: 1, Y: 2}, Radius: 25.4}
	data, err := dxf.Marshal(export.Drawing{
		Unit:  export.Inch,
		Items: []export.Item{{Layer: export.LayerOutline, Role: export.Outer, Circle: &circle}},
	}, dxf.Options{Version: dxf.R12})
	if err != nil {
		fmt.Println(err)
		return
	}
	_, entities, _ := strings.Cut(string(data), "ENTITIES\n")
	fmt.Print(strings.ReplaceAll(entities, "\n", " "))
	// Output: 0 CIRCLE 8 OUTLINE 10 0.039370079 20 0.078740157 30 0.0 40 1.0 210 0.0 220 0.0 230 1.0 0 ENDSEC 0 EOF
}
