package dxf_test

import (
	"io"
	"testing"
	"time"

	yofu "github.com/yofu/dxf"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/readertest"
	"flankwright/profile/fit"
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
func BenchmarkStockWriter2000(b *testing.B) {
	segs := outline2000().Items[0].Path.Segments
	var n int64
	b.ReportAllocs()
	for b.Loop() {
		n = stock(b, segs)
	}
	b.SetBytes(n)
}

// stock writes a closed polyline as the document of yofu/dxf does, and says how many
// bytes that takes.
func stock(b *testing.B, segs []fit.Segment) int64 {
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
	n, err := d.WriteTo(io.Discard)
	if err != nil {
		b.Fatal(err)
	}
	return n
}

// BenchmarkAgainstStockWriter writes the same outline by turns with this package, into
// fresh memory each time, and with the document of yofu/dxf. The aim is to be five times
// as fast with a fifth of the allocations.
func BenchmarkAgainstStockWriter(b *testing.B) {
	d := outline2000()
	ours := func() {
		if _, err := dxf.Marshal(d, dxf.Options{}); err != nil {
			b.Fatal(err)
		}
	}
	theirs := func() { stock(b, d.Items[0].Path.Segments) }
	var took, stockTook time.Duration
	for b.Loop() {
		start := time.Now()
		ours()
		between := time.Now()
		theirs()
		took += between.Sub(start)
		stockTook += time.Since(between)
	}
	b.ReportMetric(float64(stockTook)/float64(took), "x-faster")
	const runs = 10
	b.ReportMetric(testing.AllocsPerRun(runs, theirs)/testing.AllocsPerRun(runs, ours), "x-fewer-allocs")
}
