package svg

import (
	"fmt"
	"slices"
	"strings"

	svgo "github.com/ajstarks/svgo/float"
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/fixed"
	"flankwright/export/sheet"
)

// DefaultStrokeWidth is the width of lines in mm where Options leave it open: a
// hairline to most cutters, and still visible on a screen.
const DefaultStrokeWidth = 0.1

// Options say how a drawing becomes SVG. The zero value draws hairlines and
// fills nothing.
type Options struct {
	// StrokeWidth is the width of all lines in mm; 0 means DefaultStrokeWidth.
	StrokeWidth float64
	// Filled fills the part, for pictures. Markers are never filled.
	Filled bool
}

// Colours of the lines and of the filled part.
const (
	partColor   = "#000000"
	markerColor = "#0000ff"
	fillColor   = "#c0c0c0"
)

// Marshal returns the drawing as an SVG file. An error is a *sheet.Error that
// says which rule the drawing breaks; no bytes come with it.
//
// The page is the box of the drawing and one stroke width more on each side, so
// that the border does not cut lines in half. Its corner is the origin, and y
// runs down: the point (x, y) of the drawing stands at
//
//	(x - xmin + w, ymax - y + w)
//
// with w the stroke width, in the unit of the drawing.
func Marshal(d export.Drawing, opt Options) ([]byte, error) {
	s, err := sheet.New(d)
	if err != nil {
		return nil, err
	}
	return AppendSheet(nil, s, opt)
}

// AppendSheet appends the file of a sheet to dst, which may be a buffer kept from
// an earlier call. On error it returns dst as it was.
func AppendSheet(dst []byte, s *sheet.Sheet, opt Options) ([]byte, error) {
	if opt.StrokeWidth == 0 {
		opt.StrokeWidth = DefaultStrokeWidth
	}
	stroke := fixed.Round(opt.StrokeWidth * s.Unit.Scale())
	if !(stroke > 0) || !fixed.InRange(stroke) {
		return dst, &sheet.Error{
			Rule: sheet.RuleOptions, Item: -1, Segment: -1,
			Detail: fmt.Sprintf("stroke width %v mm", opt.StrokeWidth),
		}
	}
	w := &writer{
		page:  newPage(s.Bounds, stroke),
		width: string(fixed.Append(nil, stroke)),
		fill:  "none",
		buf:   slices.Grow(dst, sizeEstimate(s)),
	}
	w.SVG = svgo.SVG{Writer: w, Decimals: fixed.Decimals} // drops errors, and w has none
	if opt.Filled {
		w.fill = fillColor
	}
	w.start(s.Unit)
	for _, m := range members(s.Items) {
		w.member(m)
	}
	w.markers(s.Items)
	w.End()
	return w.buf, nil
}

// sizeEstimate is about as many bytes as the file takes, rather more than fewer.
func sizeEstimate(s *sheet.Sheet) int {
	const shell, element, segment = 500, 300, 75
	n := shell
	for _, it := range s.Items {
		n += element
		if it.Path != nil {
			n += segment * len(it.Path.Segments)
		}
	}
	return n
}

// page places the drawing on the page; lengths in the unit of the drawing.
type page struct {
	left, top     float64 // page coordinates are x - left and top - y
	width, height float64
}

func newPage(box r2.Box, margin float64) page {
	return page{
		left: box.Min.X - margin, top: box.Max.Y + margin,
		width: box.Max.X - box.Min.X + 2*margin, height: box.Max.Y - box.Min.Y + 2*margin,
	}
}

// at is where a point of the drawing stands on the page. Both are rounded, so
// points that were equal still are. Path data are rounded where they are written.
func (p page) at(v r2.Vec) r2.Vec {
	return r2.Vec{X: fixed.Round(v.X - p.left), Y: fixed.Round(p.top - v.Y)}
}

// writer writes one file.
type writer struct {
	svgo.SVG
	page
	width string // of the stroke
	fill  string // of the part
	buf   []byte // the file so far
}

// Write appends what svgo writes.
func (w *writer) Write(p []byte) (int, error) {
	w.buf = append(w.buf, p...)
	return len(p), nil
}

// path writes a path element whose data are written by data.
func (w *writer) path(data func(), attributes ...string) {
	w.buf = append(w.buf, `<path d="`...)
	data()
	w.buf = append(w.buf, `" `...)
	for _, a := range attributes {
		w.buf = append(append(w.buf, a...), ' ')
	}
	w.buf = append(w.buf, "/>\n"...)
}

// start writes the root element. The method of svgo for that pads every number
// with zeros, hence the raw one.
func (w *writer) start(u export.Unit) {
	wide, high := string(fixed.Append(nil, w.page.width)), string(fixed.Append(nil, w.page.height))
	unit := u.String()
	w.Startraw(
		`width="`+wide+unit+`"`,
		`height="`+high+unit+`"`,
		`viewBox="0 0 `+wide+` `+high+`"`,
		`version="1.1"`,
	)
}

// stroke returns the attributes of a line in the given colour.
func (w *writer) stroke(color string) []string {
	return []string{`stroke="` + color + `"`, `stroke-width="` + w.width + `"`}
}

// member is the part, or one of several in an assembly.
type member struct {
	suffix string // of its layers: "" or "-1", "-2"
	items  []export.Item
}

// members gathers what is not a marker by the number in the layer name, outer
// loops first.
func members(items []export.Item) []member {
	var ms []member
	for _, role := range []export.Role{export.Outer, export.Hole} {
		for _, it := range items {
			if it.Role != role {
				continue
			}
			suffix := ""
			if i := strings.IndexByte(string(it.Layer), '-'); i >= 0 {
				suffix = string(it.Layer[i:])
			}
			k := 0
			for k < len(ms) && ms[k].suffix != suffix {
				k++
			}
			if k == len(ms) {
				ms = append(ms, member{suffix: suffix})
			}
			ms[k].items = append(ms[k].items, it)
		}
	}
	return ms
}

// member writes the closed loops as one path and each open chain as another,
// which is never filled.
func (w *writer) member(m member) {
	closed := func(it export.Item) bool { return it.Circle != nil || it.Path.Closed }
	stroke := w.stroke(partColor)
	if slices.ContainsFunc(m.items, closed) {
		w.path(func() {
			for _, it := range m.items {
				if closed(it) {
					w.loop(it)
				}
			}
		}, append([]string{`id="part` + strings.ToLower(m.suffix) + `"`, `fill="` + w.fill + `"`, `fill-rule="evenodd"`}, stroke...)...)
	}
	for _, it := range m.items {
		if !closed(it) {
			w.path(func() { w.chain(it.Path) }, append([]string{`fill="none"`}, stroke...)...)
		}
	}
}

// loop writes a closed item, counter-clockwise in the drawing if it is an
// outer one and clockwise if it is a hole.
func (w *writer) loop(it export.Item) {
	if c := it.Circle; c != nil {
		w.circleData(c, it.Role == export.Outer)
		return
	}
	path := it.Path
	if path.CounterClockwise() != (it.Role == export.Outer) {
		turned := path.Reversed()
		path = &turned
	}
	w.chain(path)
}

// markers writes the markers, one group for each layer in the order of their
// first items.
func (w *writer) markers(items []export.Item) {
	var layers []export.Layer
	for _, it := range items {
		if it.Role == export.Marker && !slices.Contains(layers, it.Layer) {
			layers = append(layers, it.Layer)
		}
	}
	attributes := append([]string{`fill="none"`}, w.stroke(markerColor)...)
	for _, l := range layers {
		w.Group(append([]string{`id="` + strings.ToLower(string(l)) + `"`}, attributes...)...)
		for _, it := range items {
			if it.Role != export.Marker || it.Layer != l {
				continue
			}
			if c := it.Circle; c != nil {
				p := w.at(c.Center)
				w.Circle(p.X, p.Y, c.Radius)
				continue
			}
			w.path(func() { w.chain(it.Path) })
		}
		w.Gend()
	}
}
