package readertest

import (
	"bufio"
	"bytes"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// openscadDXF extrudes each layer of a loose file by one unit and compares
// volumes. OpenSCAD drops bulges and splines without a word, so it is of use for
// such files only.
func openscadDXF(t *testing.T, path string, want Expect) {
	for name, l := range want.Layers {
		if l.Closed != 1 {
			continue // nested loops would cancel
		}
		model := fmt.Sprintf("$fn = 1440;\nlinear_extrude(height = 1) import(%q, layer = %q);\n", abs(t, path), name)
		// A chord for each quarter degree of a full turn.
		if got := volume(t, model); !near(got, l.Area, 2e-4*l.Area) {
			t.Errorf("layer %s: volume %v, want %v", name, got, l.Area)
		}
	}
}

// openscadSVG extrudes the part by a millimetre. At 25.4 dpi a user unit of a
// millimetre file is a millimetre.
func openscadSVG(t *testing.T, path string, want Expect) {
	in, _ := filled(t, path, "evenodd")
	model := fmt.Sprintf("$fn = 1440;\nlinear_extrude(height = 1) import(%q, dpi = 25.4);\n", in)
	mm := 1 / want.Unit.Scale()
	area := want.PartArea * mm * mm
	// It cuts the arcs of a path into few chords whatever $fn says: a wheel with windows
	// comes out 0.53 % too large, the same wheel drawn with chords to 6e-7.
	tolerance := 1e-5
	if hasArcs(t, path) {
		tolerance = 1e-2
	}
	if got := volume(t, model); !near(got, area, tolerance*want.Gross*mm*mm) {
		t.Errorf("volume %v, want %v", got, area)
	}
}

// hasArcs says whether any path of an SVG file has an arc command.
func hasArcs(t *testing.T, path string) bool {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return strings.Contains(string(data), " A ")
}

func abs(t *testing.T, path string) string {
	t.Helper()
	p, err := filepath.Abs(path)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// volume renders a model and returns the volume of the solid.
func volume(t *testing.T, model string) float64 {
	t.Helper()
	exe := program(t, "openscad", "--no-install-recommends openscad")
	dir := t.TempDir()
	in, out := filepath.Join(dir, "model.scad"), filepath.Join(dir, "model.stl")
	if err := os.WriteFile(in, []byte(model), 0o666); err != nil {
		t.Fatal(err)
	}
	run(t, nil, exe, "-o", out, in)
	data, err := os.ReadFile(out)
	if err != nil {
		t.Fatal(err)
	}
	// The divergence theorem: a sixth of the triple product of each facet.
	var v [3][3]float64
	n, sum := 0, 0.0
	for s := bufio.NewScanner(bytes.NewReader(data)); s.Scan(); {
		p := &v[n%3]
		if k, _ := fmt.Sscanf(s.Text(), " vertex %g %g %g", &p[0], &p[1], &p[2]); k != 3 {
			continue
		}
		if n++; n%3 == 0 {
			a, b, c := v[0], v[1], v[2]
			sum += a[0]*(b[1]*c[2]-b[2]*c[1]) + a[1]*(b[2]*c[0]-b[0]*c[2]) + a[2]*(b[0]*c[1]-b[1]*c[0])
		}
	}
	if n == 0 {
		t.Fatalf("no facets in %.200s", data)
	}
	return math.Abs(sum) / 6
}
