package readertest

import (
	"bufio"
	"bytes"
	"encoding/json"
	"maps"
	"os"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/dxf/dxftest"
)

// DXF shows the file to every reader, one subtest each: the strict one of this
// module, ezdxf, GDAL, dxflib, dxf-parser, and OpenSCAD if it is a loose file of
// lines, arcs and circles.
func DXF(t *testing.T, path string, want Expect) {
	t.Run("strict", func(t *testing.T) { strictDXF(t, path, want) })
	t.Run("ezdxf", func(t *testing.T) { ezdxf(t, path, want) })
	t.Run("ogrinfo", func(t *testing.T) { ogr(t, path, want) })
	t.Run("dxflib", func(t *testing.T) { dxflib(t, path, want) })
	t.Run("dxf-parser", func(t *testing.T) { dxfParser(t, path, want) })
	if want.onlyKinds("LINE", "ARC", "CIRCLE") && want.closed() {
		t.Run("openscad", func(t *testing.T) { openscadDXF(t, path, want) })
	}
}

// onlyKinds reports whether all entities are of these kinds.
func (w Expect) onlyKinds(kinds ...string) bool {
	for k := range w.Kinds {
		if !slices.Contains(kinds, k) {
			return false
		}
	}
	return true
}

// closed reports whether there are no open chains.
func (w Expect) closed() bool {
	for _, l := range w.Layers {
		if l.Open > 0 {
			return false
		}
	}
	return true
}

func strictDXF(t *testing.T, path string, want Expect) {
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if err := dxftest.Check(data); err != nil {
		t.Fatal(err)
	}
	f, err := dxftest.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	Compare(t, f.Entities, want, Exact())
	twice, err := dxftest.Coincident(f.Entities)
	if err != nil || len(twice) > 0 {
		t.Errorf("drawn twice: %v %v", twice, err)
	}
}

// report is what the scripts for ezdxf and dxf-parser print.
type report struct {
	Version     string             `json:"version"`
	Insunits    int                `json:"insunits"`
	Measurement int                `json:"measurement"`
	Extmin      [2]float64         `json:"extmin"`
	Extmax      [2]float64         `json:"extmax"`
	Errors      []string           `json:"errors"`
	Fixes       []string           `json:"fixes"`
	Layers      []string           `json:"layers"`
	Entities    []dxftest.Entity   `json:"entities"`
	Parts       [][]dxftest.Entity `json:"parts"` // of each entity, lines and arcs
}

func (r *report) compare(t *testing.T, want Expect) {
	t.Helper()
	version, units, metric := "AC1015", 4, 1
	if want.Unit == export.Inch {
		units, metric = 1, 0
	}
	if want.Version == dxf.R12 {
		version, units, metric = "AC1009", -1, -1 // the format has no unit
	}
	if r.Version != version || r.Insunits != units || r.Measurement != metric {
		t.Errorf("%s with units %d, %d, want %s with %d, %d", r.Version, r.Insunits, r.Measurement, version, units, metric)
	}
	if len(r.Errors)+len(r.Fixes) > 0 {
		t.Errorf("errors %q, fixes %q", r.Errors, r.Fixes)
	}
	// ezdxf adds a layer of its own to every document.
	layers := slices.DeleteFunc(r.Layers, func(l string) bool { return l == "Defpoints" })
	expected := append([]string{"0"}, slices.Sorted(maps.Keys(want.Layers))...)
	slices.Sort(layers)
	if !slices.Equal(layers, expected) {
		t.Errorf("layers %v, want %v", layers, expected)
	}
	compareSpan(t, [4]float64{r.Extmin[0], r.Extmin[1], r.Extmax[0], r.Extmax[1]}, want, 1e-8)
	Compare(t, r.Entities, want, Exact())
}

func ezdxf(t *testing.T, path string, want Expect) {
	py := python(t, "ezdxf", "python3-ezdxf")
	var r report
	if err := json.Unmarshal(run(t, nil, py, script(t, "ezdxf_read.py"), path), &r); err != nil {
		t.Fatal(err)
	}
	r.compare(t, want)
	// And once more with the arcs that ezdxf itself makes of bulges.
	tol := Exact()
	tol.Kinds = false
	Compare(t, slices.Concat(r.Parts...), want, tol)
}

func dxfParser(t *testing.T, path string, want Expect) {
	node := program(t, "node", "nodejs")
	modules := nodeModules(t, "dxf-parser")
	out := run(t, []string{"NODE_PATH=" + modules}, node, script(t, "dxfparser_read.js"), path)
	var r report
	if err := json.Unmarshal(out, &r); err != nil {
		t.Fatal(err)
	}
	r.compare(t, want)
}

// dxflib reads the line format that dxflib_read.cpp explains.
func dxflib(t *testing.T, path string, want Expect) {
	exe := compiled(t, "dxflib_read.cpp", "dxflib", "libdxflib-dev")
	out := run(t, nil, exe, path)
	var es []dxftest.Entity
	s := bufio.NewScanner(bytes.NewReader(out))
	s.Buffer(nil, len(out)+1) // a polyline is one line
	for s.Scan() {
		f := strings.Fields(s.Text())
		e := dxftest.Entity{Layer: f[1]}
		var x []float64
		for _, w := range f[2:] {
			v, err := strconv.ParseFloat(w, 64)
			if err != nil {
				t.Fatal(err)
			}
			x = append(x, v)
		}
		switch f[0] {
		case "P":
			e.Kind, e.Closed = "LWPOLYLINE", x[0] == 1
			if want.Version == dxf.R12 {
				e.Kind = "POLYLINE" // the library makes no difference
			}
			for v := x[2:]; len(v) >= 3; v = v[3:] {
				e.Vertices = append(e.Vertices, dxftest.Vertex{X: v[0], Y: v[1], Bulge: v[2]})
			}
			if n := int(x[1]); want.Version != dxf.R12 && n != len(e.Vertices) {
				t.Errorf("polyline of %d vertices declares %d", len(e.Vertices), n)
			}
		case "S":
			e.Kind = "SPLINE"
			if x[0] != 3 || x[1] != 8 || x[2] != 4 {
				t.Errorf("spline of degree %v with %v knots and %v points", x[0], x[1], x[2])
			}
			for v := x[3:]; len(v) >= 2; v = v[2:] {
				e.Vertices = append(e.Vertices, dxftest.Vertex{X: v[0], Y: v[1]})
			}
		case "L":
			e.Kind, e.Vertices = "LINE", []dxftest.Vertex{{X: x[0], Y: x[1]}, {X: x[2], Y: x[3]}}
		case "A", "C":
			e.Kind, e.Center, e.Radius = "CIRCLE", dxftest.Vertex{X: x[0], Y: x[1]}, x[2]
			if f[0] == "A" {
				e.Kind, e.From, e.To = "ARC", x[3], x[4]
			}
		}
		es = append(es, e)
	}
	Compare(t, es, want, Exact())
}

var (
	ogrLayer = regexp.MustCompile(`^  Layer \(String\) = (\S+)$`)
	ogrShape = regexp.MustCompile(`^  LINESTRING (?:Z )?\((.*)\)$`)
	ogrOther = regexp.MustCompile(`^  [A-Z]{4,} (?:Z )?\(`)
)

// ogr reads the chords that GDAL makes of everything, ten to a degree.
func ogr(t *testing.T, path string, want Expect) {
	exe := program(t, "ogrinfo", "gdal-bin")
	out := run(t, nil, exe, "-q", "-al", "--config", "OGR_ARC_STEPSIZE", "0.1", path)
	var es []dxftest.Entity
	layer := ""
	s := bufio.NewScanner(bytes.NewReader(out))
	s.Buffer(nil, len(out)+1)
	for s.Scan() {
		line := s.Text()
		if m := ogrLayer.FindStringSubmatch(line); m != nil {
			layer = m[1]
			continue
		}
		m := ogrShape.FindStringSubmatch(line)
		if m == nil {
			if ogrOther.MatchString(line) {
				t.Errorf("unexpected geometry %.60s", line)
			}
			continue
		}
		e := dxftest.Entity{Kind: dxftest.Run, Layer: layer}
		for p := range strings.SplitSeq(m[1], ",") {
			f := strings.Fields(p)
			x, err1 := strconv.ParseFloat(f[0], 64)
			y, err2 := strconv.ParseFloat(f[1], 64)
			if err1 != nil || err2 != nil {
				t.Fatalf("point %q", p)
			}
			e.Vertices = append(e.Vertices, dxftest.Vertex{X: x, Y: y})
		}
		es = append(es, e)
	}
	n := 0
	for _, k := range want.Kinds {
		n += k
	}
	if len(es) != n {
		t.Errorf("%d features, want %d", len(es), n)
	}
	// Chords of 0.1 degrees lie within 4e-7 radii of the arc; a spline gets
	// chords of GDAL's own choice, so few that only gross errors would show.
	tol := Tolerance{Area: 5e-6, Length: 5e-6, Span: 1e-6, Gap: 1e-8}
	if want.Kinds["SPLINE"] > 0 {
		tol.Area, tol.Length, tol.Span = 1e-3, 1e-3, 1e-3
	}
	Compare(t, es, want, tol)
}
