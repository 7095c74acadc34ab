package dxf_test

import (
	"io"
	"testing"

	yofu "github.com/yofu/dxf"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/readertest"
)

// outline2000 is one closed path of 2,000 arcs.
func outline2000() export.Drawing {
	d := readertest.Sample{Lobes: 400, Size: 100}.Drawing()
	d.Items = d.Items[1:]
	return d
}

func benchmark(b *testing.B, opt dxf.Options, reuse bool) {
	d := outline2000()
	var buf []byte
	b.ReportAllocs()
	for b.Loop() {
		if !reuse {
			buf = nil
		}
		var err error
		if buf, err = dxf.Append(buf[:0], d, opt); err != nil {
			b.Fatal(err)
		}
	}
	b.SetBytes(int64(len(buf)))
}

func BenchmarkMarshal2000(b *testing.B)     { benchmark(b, dxf.Options{}, false) }
func BenchmarkAppend2000(b *testing.B)      { benchmark(b, dxf.Options{}, true) }
func BenchmarkAppend2000Loose(b *testing.B) { benchmark(b, dxf.Options{Loose: true}, true) }
func BenchmarkAppend2000R12(b *testing.B)   { benchmark(b, dxf.Options{Version: dxf.R12}, true) }
func BenchmarkStockWriter2000(b *testing.B) { // what the module's own document does
	segs := outline2000().Items[0].Path.Segments
	var n int64
	b.ReportAllocs()
	for b.Loop() {
		d := yofu.NewDrawing()
		vs := make([][]float64, len(segs))
		for i, s := range segs {
			vs[i] = []float64{s.Start.X, s.Start.Y, 0}
		}
		p, err := d.LwPolyline(true, vs...)
		if err != nil {
			b.Fatal(err)
		}
		for i, s := range segs {
			p.Bulges[i] = s.Bulge
		}
		if n, err = d.WriteTo(io.Discard); err != nil {
			b.Fatal(err)
		}
	}
	b.SetBytes(n)
}
