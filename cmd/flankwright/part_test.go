package main

import (
	"strconv"
	"testing"
)

// BenchmarkGear takes a request through solve, fit and the bytes of DXF, SVG and
// sidecar, gear after gear in the same memory.
func BenchmarkGear(b *testing.B) {
	for _, teeth := range []int{24, 66, 200} {
		b.Run("z"+strconv.Itoa(teeth), func(b *testing.B) {
			req := request{command: "gear", values: map[string][]string{"module": {"2"}, "teeth": {strconv.Itoa(teeth)}, "bore": {"10"}}}
			o := output{paths: []string{"gear.dxf", "gear.svg"}}
			var memory pages
			b.ReportAllocs()
			for b.Loop() {
				job, err := resolvePart(req)
				if err != nil {
					b.Fatal(err)
				}
				made, err := makePart(job)
				if err != nil {
					b.Fatal(err)
				}
				set, err := o.render(made, &memory)
				if err != nil {
					b.Fatal(err)
				}
				if memory.sidecar, err = made.doc.Append(memory.sidecar[:0]); err != nil {
					b.Fatal(err)
				}
				bytes := len(memory.sidecar)
				for _, f := range set {
					bytes += len(f.Data)
				}
				b.SetBytes(int64(bytes))
			}
		})
	}
}
