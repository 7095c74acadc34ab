package svg

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/fixed"
	"flankwright/export/sheet"
	"flankwright/profile/fit"
)

// maxBulge is the bulge (106 degrees) above which an arc is written in two.
//
// SVG gives an arc by its ends and radius, and readers find the center at
// h = sqrt(R^2 - c^2/4) from the chord. An error dR of the last digit of R
// moves it by dR R/h, which grows without bound towards the half circle: at 179
// degrees half a nanometre becomes 60. Up to 106 degrees it stays below 1.7 dR.
// A quarter turn is not split.
const maxBulge = 0.5

// chain appends the path data of p: M, then L, A or C for each segment, and Z if
// p is closed, where the last point repeats the first digit by digit.
func (w *writer) chain(dst []byte, p *fit.Path) []byte {
	dst = w.point(command(dst, 'M'), p.Segments[0].Start)
	for i := range p.Segments {
		s := &p.Segments[i]
		switch {
		case s.Kind == fit.Cubic:
			dst = w.point(command(dst, 'C'), s.C1)
			dst = w.point(append(dst, ' '), s.C2)
			dst = w.point(append(dst, ' '), s.End)
		case sheet.Straight(*s):
			dst = w.point(command(dst, 'L'), s.End)
		default:
			dst = w.arc(dst, s)
		}
	}
	if p.Closed {
		dst = append(dst, " Z"...)
	}
	return dst
}

// arc appends one or two A commands. Flags are separated by blanks: packed ones
// are legal and still misread.
func (w *writer) arc(dst []byte, s *fit.Segment) []byte {
	radius := s.Radius()
	if math.Abs(s.Bulge) > maxBulge {
		mid := middle(s)
		dst = w.arcTo(dst, radius, s.Bulge > 0, mid)
	}
	return w.arcTo(dst, radius, s.Bulge > 0, s.End)
}

// middle is the point of an arc farthest from its chord: from the middle of the
// chord half the bulge times the chord to the right.
func middle(s *fit.Segment) r2.Vec {
	d := r2.Sub(s.End, s.Start)
	m := r2.Scale(0.5, r2.Add(s.Start, s.End))
	return r2.Add(m, r2.Scale(s.Bulge/2, r2.Vec{X: d.Y, Y: -d.X}))
}

// arcTo appends an A command to the point end of the drawing. ccw is the turn
// as seen in the drawing; on the page, whose y runs down, it looks the same and
// has the sweep flag 0.
func (w *writer) arcTo(dst []byte, radius float64, ccw bool, end r2.Vec) []byte {
	dst = fixed.Append(command(dst, 'A'), radius)
	dst = fixed.Append(append(dst, ' '), radius)
	if ccw {
		dst = append(dst, " 0 0 0 "...)
	} else {
		dst = append(dst, " 0 0 1 "...)
	}
	return w.point(dst, end)
}

// circleData appends a circle as four quarter arcs.
func (w *writer) circleData(dst []byte, c *export.Circle, ccw bool) []byte {
	at := func(x, y float64) r2.Vec { return r2.Vec{X: c.Center.X + x, Y: c.Center.Y + y} }
	r := c.Radius
	first := at(r, 0)
	dst = w.point(command(dst, 'M'), first)
	turn := 1.0
	if !ccw {
		turn = -1
	}
	for _, p := range [4]r2.Vec{at(0, turn*r), at(-r, 0), at(0, -turn*r), first} {
		dst = w.arcTo(dst, r, ccw, p)
	}
	return append(dst, " Z"...)
}

// command appends a command letter and a blank.
func command(dst []byte, letter byte) []byte {
	if len(dst) > 0 {
		dst = append(dst, ' ')
	}
	return append(dst, letter, ' ')
}

// point appends the coordinates of a point of the drawing.
func (w *writer) point(dst []byte, v r2.Vec) []byte {
	p := w.at(v)
	dst = fixed.Append(dst, p.X)
	return fixed.Append(append(dst, ' '), p.Y)
}
