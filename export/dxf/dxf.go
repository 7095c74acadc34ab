package dxf

import (
	"fmt"
	"slices"

	"github.com/yofu/dxf/format"

	"flankwright/export"
	"flankwright/export/sheet"
	"flankwright/profile/fit"
)

// Version is a DXF version that can be written.
type Version uint8

// The versions. The zero value is the default.
const (
	R2000 Version = iota // AC1015
	R12                  // AC1009, for machines that take nothing newer
)

// String is the version as the command line spells it: "r2000" or "r12".
func (v Version) String() string {
	switch v {
	case R2000:
		return "r2000"
	case R12:
		return "r12"
	}
	return fmt.Sprintf("Version(%d)", uint8(v))
}

// acadver is the value of $ACADVER.
func (v Version) acadver() string {
	if v == R12 {
		return "AC1009"
	}
	return "AC1015"
}

// Options say how a drawing becomes DXF. The zero value writes R2000 with one
// polyline for each loop.
type Options struct {
	Version Version
	// Loose writes every segment as a LINE or ARC of its own instead of one
	// polyline for each path.
	Loose bool
}

// Marshal returns the drawing as a DXF file. An error is a *sheet.Error that
// says which rule the drawing breaks; no bytes come with it.
//
// Paths of lines and arcs become one polyline, or LINE and ARC with Loose. A
// path with cubics becomes one SPLINE, ARC or LINE for each segment, and cannot
// be written as R12. Circles are CIRCLE. R12 files do not name their unit: the
// format has no variable for it.
func Marshal(d export.Drawing, opt Options) ([]byte, error) {
	return Append(nil, d, opt)
}

// Append appends the file to dst, which may be a buffer kept from an earlier
// call. On error it returns dst as it was.
func Append(dst []byte, d export.Drawing, opt Options) ([]byte, error) {
	s, err := sheet.New(d)
	if err != nil {
		return dst, err
	}
	return AppendSheet(dst, s, opt)
}

// AppendSheet does the same for a drawing that is a sheet already.
func AppendSheet(dst []byte, s *sheet.Sheet, opt Options) ([]byte, error) {
	if opt.Version > R12 {
		return dst, &sheet.Error{Rule: sheet.RuleOptions, Item: -1, Segment: -1, Detail: opt.Version.String()}
	}
	if err := expressible(s, opt); err != nil {
		return dst, err
	}
	e := &encoder{buf: slices.Grow(dst, sizeEstimate(s, opt)), r12: opt.Version == R12}
	doc := newDocument(s, opt)
	doc.Format(e)
	if e.err != nil {
		return dst, e.err
	}
	return e.buf, nil
}

// expressible checks what depends on the version rather than on the drawing.
func expressible(s *sheet.Sheet, opt Options) error {
	for i, it := range s.Items {
		if it.Path == nil || !single(it.Path, opt) {
			continue
		}
		for j := range it.Path.Segments {
			seg := &it.Path.Segments[j]
			rule := sheet.Rule("")
			switch {
			case seg.Kind == fit.Cubic && opt.Version == R12:
				rule = sheet.RuleVersion
			case seg.Kind == fit.Arc && seg.Radius() > maxArcRadius && !sheet.Straight(*seg):
				rule = sheet.RulePrecision
			default:
				continue
			}
			mm := 1 / s.Unit.Scale()
			at := seg.Start
			at.X, at.Y = at.X*mm, at.Y*mm
			return &sheet.Error{Rule: rule, Layer: it.Layer, Item: i, Segment: j, At: at}
		}
	}
	return nil
}

// single reports whether the segments of the path are entities of their own.
func single(p *fit.Path, opt Options) bool {
	return opt.Loose || sheet.Has(p, fit.Cubic)
}

// sizeEstimate is a little more than the bytes of the file, so that the buffer
// need not grow: a polyline vertex with bulge takes up to 60 bytes, a record of
// its own up to 400, and the container 6000.
func sizeEstimate(s *sheet.Sheet, opt Options) int {
	const container, record, vertex, vertexR12 = 6000, 400, 60, 110
	n := container
	for _, it := range s.Items {
		switch {
		case it.Path == nil:
			n += record
		case single(it.Path, opt):
			n += record * len(it.Path.Segments)
		case opt.Version == R12:
			n += record + vertexR12*len(it.Path.Segments)
		default:
			n += record + vertex*len(it.Path.Segments)
		}
	}
	return n
}

// formatter is what every part of a document can do.
type formatter interface {
	Format(format.Formatter)
}
