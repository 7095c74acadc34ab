package export_test

import (
	"os"
	"path/filepath"
	"testing"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/readertest"
	"flankwright/export/svg"
)

// Programs that are not ours read every kind of file we write, and see what was
// drawn. Package readertest says which, and how to install them.
func TestReaders(t *testing.T) {
	sample := readertest.Sample{Lobes: 12, Size: 40}
	with := func(f func(*readertest.Sample)) readertest.Sample {
		s := sample
		f(&s)
		return s
	}
	for _, tc := range []struct {
		name   string
		sample readertest.Sample
		opt    dxf.Options
		svg    bool
	}{
		{"arcs", with(func(s *readertest.Sample) { s.Reference = true }), dxf.Options{}, true},
		{"inch", with(func(s *readertest.Sample) { s.Unit = export.Inch }), dxf.Options{}, true},
		{"lines", with(func(s *readertest.Sample) { s.Style = readertest.Lines }), dxf.Options{}, true},
		{"cubics", with(func(s *readertest.Sample) { s.Style = readertest.Cubics }), dxf.Options{}, true},
		{"open", with(func(s *readertest.Sample) { s.Open = true; s.Reference = true }), dxf.Options{}, false},
		{"loose", sample, dxf.Options{Loose: true}, false},
		{"loose-inch", with(func(s *readertest.Sample) { s.Unit = export.Inch }), dxf.Options{Loose: true}, false},
		{"r12", sample, dxf.Options{Version: dxf.R12}, false},
		{"r12-loose", sample, dxf.Options{Version: dxf.R12, Loose: true}, false},
		{"r12-open", with(func(s *readertest.Sample) { s.Open = true }), dxf.Options{Version: dxf.R12}, false},
	} {
		t.Run(tc.name, func(t *testing.T) {
			t.Parallel()
			d := tc.sample.Drawing()
			want := readertest.DXFExpect(d, tc.opt)
			data, err := dxf.Marshal(d, tc.opt)
			if err != nil {
				t.Fatal(err)
			}
			readertest.DXF(t, write(t, "part.dxf", data), want)
			if !tc.svg {
				return
			}
			data, err = svg.Marshal(d, svg.Options{})
			if err != nil {
				t.Fatal(err)
			}
			readertest.SVG(t, write(t, "part.svg", data), want, svg.DefaultStrokeWidth*d.Unit.Scale())
		})
	}
}

func write(t *testing.T, name string, data []byte) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	if err := os.WriteFile(path, data, 0o666); err != nil {
		t.Fatal(err)
	}
	return path
}
