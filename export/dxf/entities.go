package dxf

import (
	"github.com/yofu/dxf/entity"
	"github.com/yofu/dxf/table"

	"flankwright/export"
	"flankwright/export/sheet"
	"flankwright/profile/fit"
)

// entities is the ENTITIES section. One record of each kind serves the whole
// section: it is filled, written and filled again.
type entities struct {
	sheet  *sheet.Sheet
	opt    Options
	layers map[export.Layer]*table.Layer
	owner  *blockRecord // nil in R12
	first  int          // handle of the first entity
}

// SetHandle takes as many handles as there are entities.
func (es *entities) SetHandle(next *int) {
	es.first = *next
	for _, it := range es.sheet.Items {
		if it.Path != nil && single(it.Path, es.opt) {
			*next += len(it.Path.Segments)
		} else {
			*next++
		}
	}
}

// Format writes the section.
func (es *entities) Format(e *encoder) {
	w := newEntityWriter(e, es)
	e.section("ENTITIES", func() {
		for _, it := range es.sheet.Items {
			layer := es.layers[it.Layer]
			switch {
			case it.Circle != nil:
				w.circle(layer, it.Circle)
			case single(it.Path, es.opt):
				for i := range it.Path.Segments {
					w.segment(layer, &it.Path.Segments[i])
				}
			case es.opt.Version == R12:
				w.polyline.set(w, layer, it.Path)
				w.polyline.formatR12(e)
			default:
				w.polyline.set(w, layer, it.Path)
				w.polyline.format(e)
			}
		}
	})
}

// record is what the entities of yofu/dxf have in common.
type record interface {
	formatter
	SetHandle(*int)
	SetLayer(*table.Layer)
}

// entityWriter holds the records that are filled again and again.
type entityWriter struct {
	encoder  *encoder
	next     int // handle of the next entity
	line     *entity.Line
	arc      *entity.Arc
	disc     *entity.Circle
	spline   *entity.Spline
	polyline polyline
}

func newEntityWriter(e *encoder, es *entities) *entityWriter {
	w := &entityWriter{
		encoder: e, next: es.first,
		line: entity.NewLine(), arc: entity.NewArc(nil), disc: entity.NewCircle(), spline: entity.NewSpline(),
	}
	// In one of the Bezier pieces the knots are 0 0 0 0 1 1 1 1: clamped, no
	// weights; flag 8 says planar, and nothing else is true of it.
	w.spline.Flag = 8
	w.spline.Degree = 3
	w.spline.Knots = []float64{0, 0, 0, 0, 1, 1, 1, 1}
	points := make([]float64, 12)
	w.spline.Controls = [][]float64{points[0:3], points[3:6], points[6:9], points[9:12]}
	w.spline.Tolerance = []float64{splineTolerance, splineTolerance, splineTolerance}
	if es.owner != nil {
		w.line.SetOwner(es.owner)
		w.arc.SetOwner(es.owner)
		w.disc.SetOwner(es.owner)
		w.spline.SetOwner(es.owner)
		w.polyline.owner = es.owner
	}
	return w
}

// splineTolerance is the knot, control point and fit tolerance that DXF wants
// of a spline; the customary value, which no reader here makes use of.
const splineTolerance = 1e-7

func (w *entityWriter) write(r record, l *table.Layer) {
	r.SetHandle(&w.next)
	r.SetLayer(l)
	r.Format(w.encoder)
}

func (w *entityWriter) circle(l *table.Layer, c *export.Circle) {
	w.disc.Center[0], w.disc.Center[1] = c.Center.X, c.Center.Y
	w.disc.Radius = c.Radius
	w.write(w.disc, l)
}

// segment writes one piece as an entity of its own. An arc that the digits
// cannot tell from its chord is a LINE.
func (w *entityWriter) segment(l *table.Layer, s *fit.Segment) {
	switch {
	case s.Kind == fit.Cubic:
		for i, p := range [4]*[2]float64{
			{s.Start.X, s.Start.Y}, {s.C1.X, s.C1.Y}, {s.C2.X, s.C2.Y}, {s.End.X, s.End.Y},
		} {
			copy(w.spline.Controls[i], p[:])
		}
		w.write(w.spline, l)
	case sheet.Straight(*s):
		w.line.Start[0], w.line.Start[1] = s.Start.X, s.Start.Y
		w.line.End[0], w.line.End[1] = s.End.X, s.End.Y
		w.write(w.line, l)
	default:
		a := placeArc(s)
		w.arc.Center[0], w.arc.Center[1] = a.center.X, a.center.Y
		w.arc.Radius = a.radius
		w.arc.Angle[0], w.arc.Angle[1] = a.from, a.to
		w.write(w.arc, l)
	}
}
