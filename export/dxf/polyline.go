package dxf

import (
	"github.com/yofu/dxf/table"
	"gonum.org/v1/gonum/spatial/r2"

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

// format writes the polyline for R2000: each vertex with the bulge of the segment it
// starts. A closed path does not repeat its first vertex; an open one ends in a vertex
// that starts nothing.
func (p *polyline) format(e *encoder) {
	e.WriteString(0, "LWPOLYLINE")
	p.node.Format(e)
	e.WriteString(100, "AcDbEntity")
	e.WriteString(8, p.layer.Name())
	e.WriteString(100, "AcDbPolyline")
	e.WriteInt(90, p.count())
	e.WriteInt(70, p.closed())
	curved := p.curved()
	for i := range p.path.Segments {
		s := &p.path.Segments[i]
		e.vertex(s.Start, s.Bulge, curved)
	}
	if !p.path.Closed {
		e.vertex(p.end(), 0, curved)
	}
}

// formatR12 writes the same as POLYLINE, VERTEX and SEQEND.
func (p *polyline) formatR12(e *encoder) {
	e.WriteString(0, "POLYLINE")
	e.WriteString(8, p.layer.Name())
	e.WriteInt(66, 1)  // vertices follow
	point(e, r2.Vec{}) // elevation; x and y must be zero
	e.WriteInt(70, p.closed())
	curved := p.curved()
	vertex := func(at r2.Vec, bulge float64) {
		e.WriteString(0, "VERTEX")
		e.WriteString(8, p.layer.Name())
		point(e, at)
		if curved {
			e.WriteFloat(42, bulge)
		}
	}
	for i := range p.path.Segments {
		s := &p.path.Segments[i]
		vertex(s.Start, s.Bulge)
	}
	if !p.path.Closed {
		vertex(p.end(), 0)
	}
	e.WriteString(0, "SEQEND")
	e.WriteString(8, p.layer.Name())
}

// end is the last point of the path.
func (p *polyline) end() r2.Vec { return p.path.Segments[len(p.path.Segments)-1].End }

func point(e *encoder, at r2.Vec) {
	e.WriteFloat(10, at.X)
	e.WriteFloat(20, at.Y)
	e.WriteFloat(30, 0)
}
