package dxf

import (
	"github.com/yofu/dxf/format"
	"github.com/yofu/dxf/table"

	"flankwright/profile/fit"
)

// polyline is an LWPOLYLINE: the type of yofu/dxf allocates every vertex and
// leaves zero bulges out. Here either every vertex has a bulge or none has,
// since importers exist that take a bulge for the wrong vertex otherwise.
type polyline struct {
	node
	layer *table.Layer
	path  *fit.Path
}

// set fills the record for another path.
func (p *polyline) set(w *entityWriter, l *table.Layer, path *fit.Path) {
	p.SetHandle(&w.next)
	p.layer, p.path = l, path
}

// closed is the value of group 70.
func (p *polyline) closed() int {
	if p.path.Closed {
		return 1
	}
	return 0
}

// vertices calls f for each vertex with the bulge of the segment it starts. A
// closed path does not repeat its first vertex; an open one ends in a vertex
// that starts nothing.
func (p *polyline) vertices(f func(x, y, bulge float64)) {
	for i := range p.path.Segments {
		s := &p.path.Segments[i]
		f(s.Start.X, s.Start.Y, s.Bulge)
	}
	if !p.path.Closed {
		end := p.path.Segments[len(p.path.Segments)-1].End
		f(end.X, end.Y, 0)
	}
}

// count is the number of vertices.
func (p *polyline) count() int {
	return len(p.path.Segments) + 1 - p.closed()
}

// curved reports whether bulges are written.
func (p *polyline) curved() bool {
	for i := range p.path.Segments {
		if p.path.Segments[i].Bulge != 0 {
			return true
		}
	}
	return false
}

// Format writes the polyline for R2000.
func (p *polyline) Format(f format.Formatter) {
	f.WriteString(0, "LWPOLYLINE")
	p.node.Format(f)
	f.WriteString(100, "AcDbEntity")
	f.WriteString(8, p.layer.Name())
	f.WriteString(100, "AcDbPolyline")
	f.WriteInt(90, p.count())
	f.WriteInt(70, p.closed())
	curved := p.curved()
	p.vertices(func(x, y, bulge float64) {
		f.WriteFloat(10, x)
		f.WriteFloat(20, y)
		if curved {
			f.WriteFloat(42, bulge)
		}
	})
}

// polylineR12 writes the same as POLYLINE, VERTEX and SEQEND.
type polylineR12 struct{ *polyline }

// Format writes the polyline for R12.
func (p polylineR12) Format(f format.Formatter) {
	f.WriteString(0, "POLYLINE")
	f.WriteString(8, p.layer.Name())
	f.WriteInt(66, 1) // vertices follow
	point(f, 0, 0)    // elevation; x and y must be zero
	f.WriteInt(70, p.closed())
	curved := p.curved()
	p.vertices(func(x, y, bulge float64) {
		f.WriteString(0, "VERTEX")
		f.WriteString(8, p.layer.Name())
		point(f, x, y)
		if curved {
			f.WriteFloat(42, bulge)
		}
	})
	f.WriteString(0, "SEQEND")
	f.WriteString(8, p.layer.Name())
}

func point(f format.Formatter, x, y float64) {
	f.WriteFloat(10, x)
	f.WriteFloat(20, y)
	f.WriteFloat(30, 0)
}
