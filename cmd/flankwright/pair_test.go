package main

import (
	"bytes"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"

	"flankwright/export/readertest"
	"flankwright/export/sidecar"
)

// pairSidecar makes a pair in a folder and reads its sidecar.
func pairSidecar(t *testing.T, args ...string) (dir string, doc *sidecar.Document) {
	t.Helper()
	dir = t.TempDir()
	if code, _, stderr := call(t, append([]string{"pair", "-o", dir, "--quiet"}, args...)...); code != exitDone {
		t.Fatalf("exits %d: %s", code, stderr)
	}
	text, err := os.ReadFile(filepath.Join(dir, "pair.json"))
	if err != nil {
		t.Fatal(err)
	}
	if doc, err = sidecar.Read(text); err != nil {
		t.Fatal(err)
	}
	return dir, doc
}

// TestAssemblyTouches: an outside geometry library finds that members placed as the
// assembly says touch without overlap, are free when turned by half of the backlash, touch
// again at all of it, and overlap beyond.
func TestAssemblyTouches(t *testing.T) {
	if raceDetector {
		t.Skip("asked without the race detector")
	}
	for name, args := range map[string][]string{
		"gears":    {"--module", "2", "--teeth", "17,43", "--center-distance", "61", "--backlash", "0.1"},
		"gears cw": {"--module", "2", "--teeth", "17,43", "--profile-shift", "0.3,-0.1", "--backlash", "0.1", "--drive", "cw"},
		"ring":     {"--module", "1", "--teeth", "18,60", "--internal", "--backlash", "0.05", "--rim-diameter", ",72"},
		"ring cw":  {"--module", "1", "--teeth", "19,61", "--internal", "--backlash", "0.05", "--drive", "cw"},
		"rack":     {"--module", "2", "--teeth", "20,rack", "--backlash", "0.1"},
		"rack cw":  {"--module", "2", "--teeth", "21,rack", "--backlash", "0.1", "--drive", "cw", "--rack-ends", ",tooth"},
		"kerf":     {"--module", "2", "--teeth", "24,40", "--backlash", "0.1", "--kerf", "0.2"},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			dir, doc := pairSidecar(t, args...)
			m := doc.Mesh
			center := [2]float64{float64(m.Placement.X.Value), float64(m.Placement.Y.Value)}
			degrees, move := 0.0, [2]float64{}
			backlash := float64(m.DrawnMesh.Backlash.Value)
			sign := -1.0 // away from the driving flank, which ccw is the left one
			if m.Placement.Drive == "cw" {
				sign = 1
			}
			switch {
			case m.BacklashAngle[1] == nil: // a rack: its own x is along +Y
				move[1] = -sign * backlash
			case doc.Members[1].Form == "ring":
				degrees = -sign * float64(m.BacklashAngle[1].Value) * backlash / float64(m.BacklashCircumferential.Value)
			default:
				degrees = sign * float64(m.BacklashAngle[1].Value) * backlash / float64(m.BacklashCircumferential.Value)
			}
			got := readertest.Assembly(t, filepath.Join(dir, "assembly.dxf"), center, degrees, move)
			// Both outlines are within 1 um, and the contact found on the drawn curves themselves.
			const touch, wholeDepth = 0.004, 2 * 2.25 // mm; the overlap is an area along flanks in contact
			for _, i := range []int{0, 2} {
				if got[i].Gap > touch || got[i].Overlap > touch*wholeDepth {
					t.Errorf("position %d: gap %g, overlap %g", i, got[i].Gap, got[i].Overlap)
				}
			}
			if got[1].Gap < 0.3*backlash || got[1].Overlap != 0 {
				t.Errorf("half way: gap %g of a backlash of %g, overlap %g", got[1].Gap, backlash, got[1].Overlap)
			}
			if got[3].Overlap < backlash*0.1 {
				t.Errorf("past the backlash the members overlap by %g only", got[3].Overlap)
			}
			if off := math.Abs(backlash - float64(m.BacklashCircumferential.Value)); off > float64(m.DrawnMesh.Bound.Value) {
				t.Errorf("drawn backlash %g, in numbers %g", backlash, float64(m.BacklashCircumferential.Value))
			}
		})
	}
}

// TestPairSidecarIsComplete: it satisfies the schema, and its input makes the same files.
func TestPairSidecarIsComplete(t *testing.T) {
	for _, args := range [][]string{
		{"--module", "2", "--teeth", "17,43", "--center-distance", "61", "--backlash-rule", "iso", "--center-distance-tolerance", "0.05", "--bore", "8,20", "--keyway", ",iso", "--hole-circle", ",4x6@50"},
		{"--diametral-pitch", "10", "--teeth", "20,62", "--internal", "--thinning", "0.002", "--rim-diameter", ",7"},
		{"--module", "2", "--teeth", "20,rack", "--height", ",12", "--tip-radius", "0.2"},
	} {
		dir, _ := pairSidecar(t, args...)
		again := t.TempDir()
		if code, _, stderr := call(t, "pair", "--from", filepath.Join(dir, "pair.json"), "-o", again, "--quiet"); code != exitDone {
			t.Fatal(stderr)
		}
		compareTrees(t, args[3], tree(t, again), tree(t, dir))
		text, err := os.ReadFile(filepath.Join(dir, "pair.json"))
		if err != nil {
			t.Fatal(err)
		}
		validateSidecar(t, text)
	}
}

// validateSidecar judges a document by its schema.
func validateSidecar(t *testing.T, text []byte) {
	t.Helper()
	schema, err := jsonschema.UnmarshalJSON(strings.NewReader(sidecar.Schema))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource("sidecar.json", schema); err != nil {
		t.Fatal(err)
	}
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	if err := c.MustCompile("sidecar.json").Validate(doc); err != nil {
		t.Error(err)
	}
}
