package main

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"flankwright/export/readertest"
	"flankwright/export/svg"
)

// TestReadersTakeRealGears writes gears as the command does and has every outside
// reader compare loops, closure, area, unit and layers.
func TestReadersTakeRealGears(t *testing.T) {
	if raceDetector {
		t.Skip("asked without the race detector")
	}
	for name, args := range map[string][]string{
		"metric":   {"--module", "2", "--teeth", "24", "--bore", "10"},
		"inch":     {"--diametral-pitch", "16", "--teeth", "30", "--profile-shift", "0.2", "--thinning", "0.003", "--reference"},
		"undercut": {"--module", "1.5", "--teeth", "9", "--tip-radius", "0.1", "--turn", "12.5"},
		"lines":    {"--module", "1", "--teeth", "17", "--curves", "lines", "--bore", "5", "--tolerance", "5um"},

		// no O or 0 in the label: readers that chain segments take those for loops
		"keyed":   {"--module", "2", "--teeth", "40", "--bore", "20", "--keyway", "iso", "--hole-circle", "5x6@55", "--kerf", "0.25", "--label", "Z41 M2", "--lead-in", "2"},
		"windows": {"--diametral-pitch", "10", "--teeth", "60", "--bore", "0.75", "--keyway", "ansi", "--windows", "5"},

		// every combination of curves, version and extent that a request can have
		"arcs-tooth":      {"--module", "2", "--teeth", "24", "--extent", "tooth"},
		"arcs-space":      {"--module", "2", "--teeth", "24", "--extent", "space"},
		"arcs-loose":      {"--module", "2", "--teeth", "24", "--bore", "10", "--loose"},
		"arcs-r12":        {"--module", "2", "--teeth", "24", "--bore", "10", "--dxf", "r12"},
		"arcs-r12-loose":  {"--module", "2", "--teeth", "24", "--bore", "10", "--dxf", "r12", "--loose"},
		"arcs-r12-3":      {"--module", "2", "--teeth", "24", "--dxf", "r12", "--extent", "3"},
		"cubics":          {"--module", "2", "--teeth", "24", "--bore", "10", "--curves", "cubics", "--tip-radius", "0.2"},
		"cubics-tooth":    {"--module", "2", "--teeth", "24", "--curves", "cubics", "--extent", "tooth"},
		"cubics-3":        {"--module", "2", "--teeth", "24", "--curves", "cubics", "--extent", "3"},
		"lines-tooth":     {"--module", "2", "--teeth", "24", "--curves", "lines", "--extent", "tooth"},
		"lines-loose":     {"--module", "2", "--teeth", "12", "--curves", "lines", "--loose", "--tolerance", "10um"},
		"lines-r12":       {"--module", "2", "--teeth", "24", "--curves", "lines", "--dxf", "r12"},
		"ring":            {"ring", "--module", "2", "--teeth", "48", "--rim-diameter", "125", "--hole-circle", "4x5@114", "--label", "M2", "--reference"},
		"ring-cut-inch":   {"ring", "--diametral-pitch", "12", "--teeth", "60", "--cutter-teeth", "28", "--rim-diameter", "6", "--tip-radius", "0.01"},
		"ring-cubics":     {"ring", "--module", "2", "--teeth", "48", "--rim-diameter", "125", "--curves", "cubics"},
		"ring-lines-r12":  {"ring", "--module", "1", "--teeth", "60", "--rim-diameter", "80", "--curves", "lines", "--dxf", "r12", "--tolerance", "5um"},
		"ring-loose":      {"ring", "--module", "2", "--teeth", "48", "--rim-diameter", "125", "--loose", "--kerf", "0.3", "--lead-in", "2"},
		"ring-tooth":      {"ring", "--module", "2", "--teeth", "48", "--extent", "tooth"},
		"rack":            {"rack", "--diametral-pitch", "8", "--teeth", "12", "--height", "0.75in", "--reference", "--label", "M1"},
		"rack-kerf":       {"rack", "--module", "2", "--teeth", "5", "--rack-ends", "tooth", "--kerf", "0.3", "--lead-in", "1", "--turn", "20"},
		"rack-r12-loose":  {"rack", "--module", "2", "--teeth", "5", "--tip-chamfer", "0.2", "--dxf", "r12", "--loose"},
		"rack-lines":      {"rack", "--module", "2", "--teeth", "5", "--tip-radius", "0.3", "--curves", "lines", "--kerf", "0.2"},
		"rack-cubics":     {"rack", "--module", "2", "--teeth", "5", "--curves", "cubics", "--extent", "2"},
		"lines-r12-space": {"--module", "2", "--teeth", "24", "--curves", "lines", "--dxf", "r12", "--extent", "space", "--loose"},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			dir := t.TempDir()
			for _, format := range []string{"dxf", "svg"} {
				path := filepath.Join(dir, "gear."+format)
				form, args := formOf(args)
				code, _, stderr := call(t, append([]string{form, "-o", path}, args...)...)
				if code != exitDone {
					t.Fatalf("exit %d: %s", code, stderr)
				}
				made := makeFor(t, append([]string{form}, args...))
				want := readertest.DXFExpect(made.drawing, made.dxf)
				if format == "dxf" {
					readertest.DXF(t, path, want)
				} else {
					readertest.SVG(t, path, want, svg.DefaultStrokeWidth*made.drawing.Unit.Scale())
				}
			}
		})
	}
}

// formOf takes the form off a list of arguments; a gear's needs not be named.
func formOf(args []string) (form string, rest []string) {
	if strings.HasPrefix(args[0], "-") {
		return "gear", args
	}
	return args[0], args[1:]
}

// makeFor makes the part a command line asks for, in this process.
func makeFor(t *testing.T, args []string) *partMade {
	t.Helper()
	form, args := formOf(args)
	cmd := newPart(streams{}, form)
	flags := map[string]*text{}
	for _, p := range partParameters(form) {
		flags[p.name] = cmd.Flags().Lookup(p.name).Value.(*text)
	}
	if err := cmd.ParseFlags(args); err != nil {
		t.Fatal(err)
	}
	job, err := resolvePart(newRequest(form, flags))
	if err != nil {
		t.Fatal(err)
	}
	made, err := makePart(job)
	if err != nil {
		t.Fatal(err)
	}
	return made
}

// TestBothUnitSystems: 16 P and module 1.5875 with the same rack are one outline to
// 1e-12 m, and --unit scales numbers and header together.
func TestBothUnitSystems(t *testing.T) {
	inch := makeFor(t, []string{"--diametral-pitch", "16", "--teeth", "30", "--profile-shift", "0.2"})
	metric := makeFor(t, []string{"--module", "1.5875", "--basic-rack", "full-depth-20", "--teeth", "30", "--profile-shift", "0.2"})
	a, b := inch.drawing.Items[0].Path.Segments, metric.drawing.Items[0].Path.Segments
	if len(a) != len(b) {
		t.Fatalf("%d and %d segments", len(a), len(b))
	}
	const same = 1e-9 // mm, 1e-12 m
	for i := range a {
		if off := math.Hypot(a[i].Start.X-b[i].Start.X, a[i].Start.Y-b[i].Start.Y); off > same {
			t.Fatalf("segment %d starts %g mm apart", i, off)
		}
	}

	dir := t.TempDir()
	for unit, want := range map[string]float64{"mm": 25.4, "in": 1} {
		path := filepath.Join(dir, unit+".dxf")
		if code, _, stderr := call(t, "gear", "--diametral-pitch", "16", "--teeth", "30", "--unit", unit, "-o", path); code != exitDone {
			t.Fatal(stderr)
		}
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		// Tip diameter (30 + 2)/16 inch.
		insunits := map[string]string{"mm": "4", "in": "1"}[unit]
		if !strings.Contains(string(data), "$INSUNITS\n70\n"+insunits+"\n") {
			t.Errorf("%s: $INSUNITS is not %s", unit, insunits)
		}
		var doc struct {
			Dimensions struct {
				TipDiameter struct{ Value float64 } `json:"tip_diameter"`
			} `json:"dimensions"`
		}
		sidecar, err := os.ReadFile(filepath.Join(dir, unit+".json"))
		if err != nil {
			t.Fatal(err)
		}
		if err := json.Unmarshal(sidecar, &doc); err != nil {
			t.Fatal(err)
		}
		const digits = 1e-9
		if got := doc.Dimensions.TipDiameter.Value; math.Abs(got-2*want) > digits {
			t.Errorf("%s: tip diameter %g, want %g", unit, got, 2*want)
		}
	}
}
