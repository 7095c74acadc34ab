package svg_test

import (
	"flag"
	"testing"

	"flankwright/export"
	"flankwright/export/readertest"
	"flankwright/export/svg"
)

var update = flag.Bool("update", false, "write the golden files anew")

// The files in testdata are output of this package that all readers of
// TestReaders in package export took.
func TestGolden(t *testing.T) {
	small := readertest.Sample{Lobes: 2, Size: 10, Reference: true}
	inch, cubics, open := small, small, small
	inch.Unit, cubics.Style, open.Open = export.Inch, readertest.Cubics, true
	var names []string
	for _, tc := range []struct {
		name   string
		sample readertest.Sample
		opt    svg.Options
	}{
		{"arcs.svg", small, svg.Options{}},
		{"inch.svg", inch, svg.Options{}},
		{"cubics-filled.svg", cubics, svg.Options{Filled: true}},
		{"open.svg", open, svg.Options{StrokeWidth: 0.05}},
	} {
		data, err := svg.Marshal(tc.sample.Drawing(), tc.opt)
		if err != nil {
			t.Fatal(err)
		}
		readertest.Golden(t, tc.name, data, *update)
		names = append(names, tc.name)
	}
	readertest.GoldenNames(t, names)
}
