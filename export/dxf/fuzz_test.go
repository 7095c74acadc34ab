package dxf_test

import (
	"encoding/binary"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/dxf/dxftest"
	"flankwright/profile/fit"
)

// tape hands out the fuzzer's bytes.
type tape []byte

func (t *tape) byte() byte {
	if len(*t) == 0 {
		return 0
	}
	b := (*t)[0]
	*t = (*t)[1:]
	return b
}

// number is now and then any double at all, else a coordinate of some part.
func (t *tape) number() float64 {
	switch k := t.byte(); {
	case k < 4:
		var b [8]byte
		for i := range b {
			b[i] = t.byte()
		}
		return math.Float64frombits(binary.LittleEndian.Uint64(b[:]))
	case k < 20:
		return float64(int8(t.byte())) * 1e-9
	}
	return float64(int16(uint16(t.byte())<<8|uint16(t.byte()))) / 64
}

func (t *tape) point() r2.Vec { return r2.Vec{X: t.number(), Y: t.number()} }

// drawing makes a drawing of the bytes: chains joined as they should be, with
// whatever else is wrong.
func (t *tape) drawing() export.Drawing {
	layers := []export.Layer{export.LayerOutline, export.LayerBore, export.LayerReference, "OUTLINE-2", "bad layer", ""}
	d := export.Drawing{Unit: export.Unit(t.byte() % 2)}
	for range t.byte() % 5 {
		it := export.Item{Layer: layers[int(t.byte())*len(layers)/300], Role: export.Role(t.byte() % 3)}
		if t.byte()%4 == 0 {
			it.Circle = &export.Circle{Center: t.point(), Radius: t.number()}
		} else {
			p := &fit.Path{Closed: t.byte()%2 == 0}
			cur := t.point()
			first := cur
			n := int(t.byte() % 8)
			for i := range n {
				next := t.point()
				if p.Closed && i == n-1 {
					next = first
				}
				seg := fit.LineTo(cur, next)
				switch t.byte() % 4 {
				case 1, 2:
					seg = fit.ArcTo(cur, next, float64(int8(t.byte()))/127)
				case 3:
					seg = fit.CubicTo(cur, t.point(), t.point(), next)
				}
				p.Segments = append(p.Segments, seg)
				cur = next
			}
			it.Path = p
		}
		d.Items = append(d.Items, it)
	}
	return d
}

// Whatever the drawing, Marshal refuses it or writes a file without a fault.
func FuzzMarshal(f *testing.F) {
	f.Add([]byte{0, 1, 0, 0, 0, 50, 1, 2, 60, 3, 4, 70, 5, 6})
	f.Add([]byte("0123456789abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ"))
	for seed := range 60 {
		b := make([]byte, 160)
		x := uint32(seed)*2654435761 + 12345
		for i := range b {
			x = x*1664525 + 1013904223
			b[i] = byte(x >> 24)
		}
		f.Add(b)
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		in := tape(data)
		opt := dxf.Options{Version: dxf.Version(in.byte() % 2), Loose: in.byte()%2 == 0}
		d := in.drawing()
		out, err := dxf.Marshal(d, opt)
		if err != nil {
			if len(out) != 0 {
				t.Fatalf("%d bytes with the error %v", len(out), err)
			}
			return
		}
		if err := dxftest.Check(out); err != nil {
			t.Fatalf("%v\n%+v\n%s", err, d, out)
		}
	})
}
