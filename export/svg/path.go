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

// chain writes the path data of p: M, then L, A or C for each segment, and Z if
// p is closed, where the last point repeats the first digit by digit.
func (w *writer) chain(p *fit.Path) {
	w.command('M')
	w.point(p.Segments[0].Start)
	for i := range p.Segments {
		s := &p.Segments[i]
		if s.Kind == fit.Arc {
			w.arc(s)
			continue
		}
		if s.Kind == fit.Cubic {
			w.command('C')
			w.point(s.C1)
			w.buf = append(w.buf, ' ')
			w.point(s.C2)
			w.buf = append(w.buf, ' ')
		} else {
			w.command('L')
		}
		w.point(s.End)
	}
	if p.Closed {
		w.close()
	}
}

// arc writes one or two A commands, or an L where the digits cannot tell the
// arc from its chord.
func (w *writer) arc(s *fit.Segment) {
	chord := s.Chord()
	if sheet.Flat(s.Bulge, chord) {
		w.command('L')
		w.point(s.End)
		return
	}
	radius := fit.ArcRadius(chord, s.Bulge)
	if math.Abs(s.Bulge) > maxBulge {
		w.arcTo(radius, s.Bulge > 0, middle(s))
	}
	w.arcTo(radius, s.Bulge > 0, s.End)
}

// middle is the point of an arc farthest from its chord: from the middle of the
// chord half the bulge times the chord to the right.
func middle(s *fit.Segment) r2.Vec {
	d := r2.Sub(s.End, s.Start)
	m := r2.Scale(0.5, r2.Add(s.Start, s.End))
	return r2.Add(m, r2.Scale(s.Bulge/2, r2.Vec{X: d.Y, Y: -d.X}))
}

// arcTo writes an A command to the point end of the drawing. ccw is the turn
// as seen in the drawing; on the page, whose y runs down, it looks the same and
// has the sweep flag 0. Flags are separated by blanks: packed ones are legal and
// still misread.
func (w *writer) arcTo(radius float64, ccw bool, end r2.Vec) {
	w.command('A')
	start := len(w.buf)
	w.buf = append(fixed.Append(w.buf, radius), ' ')
	w.buf = append(w.buf, w.buf[start:]...) // the other half-axis
	if ccw {
		w.buf = append(w.buf, "0 0 0 "...)
	} else {
		w.buf = append(w.buf, "0 0 1 "...)
	}
	w.point(end)
}

// circleData writes a circle as four quarter arcs.
func (w *writer) circleData(c *export.Circle, ccw bool) {
	at := func(x, y float64) r2.Vec { return r2.Vec{X: c.Center.X + x, Y: c.Center.Y + y} }
	r := c.Radius
	first := at(r, 0)
	w.command('M')
	w.point(first)
	turn := 1.0
	if !ccw {
		turn = -1
	}
	for _, p := range [4]r2.Vec{at(0, turn*r), at(-r, 0), at(0, -turn*r), first} {
		w.arcTo(r, ccw, p)
	}
	w.close()
}

// command writes a command letter and a blank, and one before unless it is the
// first of the attribute.
func (w *writer) command(letter byte) {
	if w.buf[len(w.buf)-1] != '"' {
		w.buf = append(w.buf, ' ')
	}
	w.buf = append(w.buf, letter, ' ')
}

// close writes the command that ends a loop.
func (w *writer) close() { w.buf = append(w.buf, " Z"...) }

// point writes the coordinates of a point of the drawing.
func (w *writer) point(v r2.Vec) {
	w.buf = append(fixed.Append(w.buf, v.X-w.left), ' ')
	w.buf = fixed.Append(w.buf, w.top-v.Y)
}
