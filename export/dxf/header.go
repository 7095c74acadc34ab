package dxf

import (
	"math"

	"github.com/yofu/dxf/format"
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/sheet"
)

// header is the HEADER section.
type header struct {
	sheet    *sheet.Sheet
	version  Version
	handseed int // above every handle of the file
}

// Codes of $INSUNITS and $MEASUREMENT, from the DXF reference for AC1015.
const (
	insunitsInch       = 1
	insunitsMillimetre = 4
	measurementInch    = 0
	measurementMetric  = 1
)

// Format writes the section. R12 gets the variables it knows and no others;
// there is none for the unit among them.
func (h *header) Format(e *encoder) {
	box := h.sheet.Bounds
	e.section("HEADER", func() {
		e.WriteString(9, "$ACADVER")
		e.WriteString(1, h.version.acadver())
		if h.version == R2000 {
			e.WriteString(9, "$DWGCODEPAGE")
			e.WriteString(3, "ANSI_1252")
		}
		variable3(e, "$INSBASE", r2.Vec{})
		variable3(e, "$EXTMIN", box.Min)
		variable3(e, "$EXTMAX", box.Max)
		variable2(e, "$LIMMIN", box.Min)
		variable2(e, "$LIMMAX", box.Max)
		e.WriteString(9, "$LTSCALE")
		e.WriteFloat(40, 1)
		e.WriteString(9, "$CLAYER")
		e.WriteString(8, layerZero)
		e.WriteString(9, "$CELTYPE")
		e.WriteString(6, "BYLAYER")
		e.WriteString(9, "$CECOLOR")
		e.WriteInt(62, 256) // by layer
		integer(e, "$LUNITS", 2)
		integer(e, "$LUPREC", 4)
		integer(e, "$AUNITS", 0)
		if h.version == R12 {
			return
		}
		e.WriteString(9, "$TEXTSTYLE")
		e.WriteString(7, standard)
		e.WriteString(9, "$DIMSTYLE")
		e.WriteString(2, standard)
		if h.sheet.Unit == export.Inch {
			integer(e, "$INSUNITS", insunitsInch)
			integer(e, "$MEASUREMENT", measurementInch)
		} else {
			integer(e, "$INSUNITS", insunitsMillimetre)
			integer(e, "$MEASUREMENT", measurementMetric)
		}
		e.WriteString(9, "$HANDSEED")
		e.WriteHex(5, h.handseed)
	})
}

func variable3(f format.Formatter, name string, v r2.Vec) {
	variable2(f, name, v)
	f.WriteFloat(30, 0)
}

func variable2(f format.Formatter, name string, v r2.Vec) {
	f.WriteString(9, name)
	f.WriteFloat(10, v.X)
	f.WriteFloat(20, v.Y)
}

func integer(f format.Formatter, name string, v int) {
	f.WriteString(9, name)
	f.WriteInt(70, v)
}

// classes is the CLASSES section: the two object classes that the plot style
// dictionary needs and AC1015 does not have built in.
type classes struct{}

// Format writes the section.
func (classes) Format(e *encoder) {
	e.section("CLASSES", func() {
		for _, c := range [2][2]string{
			{"ACDBDICTIONARYWDFLT", "AcDbDictionaryWithDefault"},
			{"ACDBPLACEHOLDER", "AcDbPlaceHolder"},
		} {
			e.WriteString(0, "CLASS")
			e.WriteString(1, c[0])
			e.WriteString(2, c[1])
			e.WriteString(3, "ObjectDBX Classes")
			e.WriteInt(90, 0)
			e.WriteInt(280, 0)
			e.WriteInt(281, 0)
		}
	})
}

// view returns the center and height of a view that shows the whole box with a
// little room, in a window of the given width over height.
func view(box r2.Box, aspect float64) (center r2.Vec, height float64) {
	const room = 1.05
	size := r2.Sub(box.Max, box.Min)
	return r2.Scale(0.5, r2.Add(box.Min, box.Max)), room * math.Max(size.Y, size.X/aspect)
}
