package main

import (
	"math"
	"math/rand"
	"path/filepath"
	"strconv"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/readertest"
	"flankwright/export/svg"
)

// TestKerfMovedBack writes part and path, and has a general geometry library move the
// path back by half the kerf: it must come out on the part.
func TestKerfMovedBack(t *testing.T) {
	if raceDetector {
		t.Skip("asked without the race detector")
	}
	for name, c := range map[string]struct {
		kerf float64 // in the unit of the drawing
		args []string
	}{
		"metric":   {0.25, []string{"--module", "2", "--teeth", "40", "--bore", "20", "--keyway", "iso", "--hole-circle", "5x6@55"}},
		"windows":  {0.3, []string{"--module", "2", "--teeth", "60", "--windows", "4", "--bore", "20", "--hub-diameter", "36"}},
		"undercut": {0.2, []string{"--module", "1.5", "--teeth", "9", "--bore", "4"}},
		"ring":     {0.3, []string{"ring", "--module", "2", "--teeth", "48", "--rim-diameter", "125", "--hole-circle", "4x5@114", "--tip-chamfer", "0.2"}},
		"cut ring": {0.3, []string{"ring", "--module", "2", "--teeth", "48", "--cutter-teeth", "28", "--rim-diameter", "125"}},
		"rack":     {0.3, []string{"rack", "--module", "2", "--teeth", "6", "--height", "12"}},
		"inch":     {0.008, []string{"--diametral-pitch", "10", "--teeth", "21", "--bore", "0.5", "--tip-chamfer", "0.01"}},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			dir := t.TempDir()
			part, path := filepath.Join(dir, "part.dxf"), filepath.Join(dir, "path.dxf")
			kerf := strconv.FormatFloat(c.kerf, 'f', -1, 64)
			for _, args := range [][]string{{"-o", part}, {"-o", path, "--kerf", kerf}} {
				form, rest := formOf(c.args)
				if code, _, stderr := call(t, append(append([]string{form}, rest...), args...)...); code != exitDone {
					t.Fatal(stderr)
				}
			}
			unit := 1.0
			if name == "inch" {
				unit = 25.4
			}
			// Part and path are each within 1 um; the script takes arcs apart to 5e-5 of the
			// drawing's unit, in both, and its discs are polygons of 256 sides.
			limit := 2e-3/unit + 2*5e-5 + c.kerf/2*(1-math.Cos(math.Pi/256))
			for i, off := range readertest.OffsetBack(t, part, path, c.kerf) {
				if off > limit {
					t.Errorf("loop %d is %g off", i, off)
				}
			}
		})
	}
}

// TestBrowserFillsThePart: a browser's point-in-fill agrees with the exact loops on 1000
// points.
func TestBrowserFillsThePart(t *testing.T) {
	if raceDetector {
		t.Skip("asked without the race detector")
	}
	args := []string{"--module", "2", "--teeth", "60", "--bore", "20", "--keyway", "iso", "--hole-circle", "6x4@40", "--windows", "6",
		"--hub-diameter", "52", "--turn", "5"}
	dir := t.TempDir()
	path := filepath.Join(dir, "part.svg")
	if code, _, stderr := call(t, append([]string{"gear", "-o", path}, args...)...); code != exitDone {
		t.Fatal(stderr)
	}
	d := makeFor(t, args).drawing
	box := d.Bounds()
	margin := svg.DefaultStrokeWidth
	rng := rand.New(rand.NewSource(1))
	var asked []r2.Vec
	var want []bool
	for len(asked) < 1000 {
		p := r2.Vec{X: box.Min.X + rng.Float64()*box.Size().X, Y: box.Min.Y + rng.Float64()*box.Size().Y}
		inside, near := inPart(d, p)
		const tooNear = 0.01 // mm; a browser computes in single precision
		if near < tooNear {
			continue
		}
		asked = append(asked, r2.Vec{X: p.X - box.Min.X + margin, Y: box.Max.Y - p.Y + margin})
		want = append(want, inside)
	}
	for i, got := range readertest.PointsInFill(t, path, asked) {
		if got != want[i] {
			t.Errorf("point %v: in fill %v, in part %v", asked[i], got, want[i])
		}
	}
}

// inPart says whether a point lies in the part, by crossings of a ray with finely
// flattened loops, and how near an edge it is.
func inPart(d export.Drawing, p r2.Vec) (inside bool, near float64) {
	near = 1e9
	for _, it := range d.Items {
		if it.Role == export.Marker {
			continue
		}
		points := flattened(it)
		for i, a := range points {
			b := points[(i+1)%len(points)]
			near = min(near, toSegment(a, b, p))
			if (a.Y > p.Y) != (b.Y > p.Y) && p.X < a.X+(p.Y-a.Y)/(b.Y-a.Y)*(b.X-a.X) {
				inside = !inside
			}
		}
	}
	return inside, near
}

// flattened is a loop as many points.
func flattened(it export.Item) []r2.Vec {
	const perArc = 16
	var points []r2.Vec
	if c := it.Circle; c != nil {
		for i := range 40 * perArc {
			points = append(points, r2.Rotate(r2.Vec{X: c.Center.X + c.Radius, Y: c.Center.Y}, float64(i)/(40*perArc)*6.283185307179586, c.Center))
		}
		return points
	}
	for _, s := range it.Path.Segments {
		points = append(points, s.Start)
		if s.Bulge == 0 {
			continue
		}
		for i := 1; i < perArc; i++ {
			points = append(points, r2.Rotate(s.Start, float64(i)/perArc*s.Included(), s.Center()))
		}
	}
	return points
}

// toSegment is the distance from p to the segment from a to b.
func toSegment(a, b, p r2.Vec) float64 {
	d := r2.Sub(b, a)
	u := 0.0
	if l := r2.Norm2(d); l > 0 {
		u = max(0, min(1, r2.Dot(r2.Sub(p, a), d)/l))
	}
	return r2.Norm(r2.Sub(p, r2.Add(a, r2.Scale(u, d))))
}
