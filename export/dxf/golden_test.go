package dxf_test

import (
	"flag"
	"testing"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/readertest"
)

var update = flag.Bool("update", false, "write the golden files anew")

// The files in testdata are output of this package that all readers of
// TestReaders in package export took; a change of them is a change that users
// see.
func TestGolden(t *testing.T) {
	small := readertest.Sample{Lobes: 2, Size: 10, Reference: true}
	inch, cubics, open := small, small, small
	inch.Unit, cubics.Style, open.Open = export.Inch, readertest.Cubics, true
	var names []string
	for _, tc := range []struct {
		name   string
		sample readertest.Sample
		opt    dxf.Options
	}{
		{"arcs.dxf", small, dxf.Options{}},
		{"inch.dxf", inch, dxf.Options{}},
		{"cubics.dxf", cubics, dxf.Options{}},
		{"open-loose.dxf", open, dxf.Options{Loose: true}},
		{"r12.dxf", small, dxf.Options{Version: dxf.R12}},
	} {
		data, err := dxf.Marshal(tc.sample.Drawing(), tc.opt)
		if err != nil {
			t.Fatal(err)
		}
		readertest.Golden(t, tc.name, data, *update)
		names = append(names, tc.name)
	}
	readertest.GoldenNames(t, names)
}
