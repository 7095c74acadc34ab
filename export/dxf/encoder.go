package dxf

import (
	"fmt"
	"io"
	"math"
	"strconv"

	"github.com/yofu/dxf/format"
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export/fixed"
)

// angleDecimals is the number of digits after the point of ARC angles, degrees.
// Half a unit of the twelfth moves an end point by 1e-14 of the radius, so up to
// a radius of 1e5 ends stay within a step of the coordinates.
const angleDecimals = 12

// encoder is a format.Formatter on a byte slice. It keeps the first error
// instead of writing what no reader takes: a number that is not finite, a
// string with anything but printable ASCII.
type encoder struct {
	buf []byte
	r12 bool // leave out the groups that AC1009 does not know
	err error
}

var _ format.Formatter = (*encoder)(nil)

// newerThanR12 reports whether a group code is unknown to AC1009 or belongs to
// the handles and markers of later versions. The records of this package and
// of yofu/dxf become R12 records when these are left out.
func newerThanR12(code int) bool {
	switch code {
	case 5, 100, 102, 105, 330, 340, 350, 370, 390:
		return true
	}
	return false
}

// Reset forgets what was written, and the error.
func (e *encoder) Reset() { e.buf, e.err = e.buf[:0], nil }

// WriteTo writes the bytes so far to w, or returns the error kept.
func (e *encoder) WriteTo(w io.Writer) (int64, error) {
	if e.err != nil {
		return 0, e.err
	}
	n, err := w.Write(e.buf)
	return int64(n), err
}

// SetPrecision does nothing: the number of digits is part of the contract.
func (e *encoder) SetPrecision(int) {}

// Output returns the bytes so far as a string and resets.
func (e *encoder) Output() string {
	s := string(e.buf)
	e.Reset()
	return s
}

// String, Hex, Int and Float return one group without writing it.
func (e *encoder) String(code int, val string) string {
	return e.alone(func(f *encoder) { f.WriteString(code, val) })
}

// Hex returns one group that holds a handle.
func (e *encoder) Hex(code int, h int) string {
	return e.alone(func(f *encoder) { f.WriteHex(code, h) })
}

// Int returns one group that holds an integer.
func (e *encoder) Int(code int, val int) string {
	return e.alone(func(f *encoder) { f.WriteInt(code, val) })
}

// Float returns one group that holds a number.
func (e *encoder) Float(code int, val float64) string {
	return e.alone(func(f *encoder) { f.WriteFloat(code, val) })
}

// alone runs one write into a fresh buffer, but keeps its error here.
func (e *encoder) alone(write func(*encoder)) string {
	f := encoder{r12: e.r12}
	write(&f)
	if e.err == nil {
		e.err = f.err
	}
	return string(f.buf)
}

// code starts a group; it reports false if the version has no such group.
func (e *encoder) code(code int) bool {
	if e.r12 && newerThanR12(code) {
		return false
	}
	e.buf = append(strconv.AppendInt(e.buf, int64(code), 10), '\n')
	return true
}

// WriteString writes a group that holds text.
func (e *encoder) WriteString(code int, val string) {
	for i := range len(val) {
		if c := val[i]; c < ' ' || c > '~' {
			e.fail(fmt.Errorf("dxf: group %d holds text that is not printable ASCII: %q", code, val))
			return
		}
	}
	if e.code(code) {
		e.buf = append(e.buf, val...)
		e.buf = append(e.buf, '\n')
	}
}

// WriteHex writes a group that holds a handle.
func (e *encoder) WriteHex(code int, h int) {
	if e.code(code) {
		start := len(e.buf)
		e.buf = strconv.AppendInt(e.buf, int64(h), 16)
		for i := start; i < len(e.buf); i++ {
			if c := e.buf[i]; c >= 'a' {
				e.buf[i] = c - 'a' + 'A'
			}
		}
		e.buf = append(e.buf, '\n')
	}
}

// WriteInt writes a group that holds an integer.
func (e *encoder) WriteInt(code int, val int) {
	if e.code(code) {
		e.buf = strconv.AppendInt(e.buf, int64(val), 10)
		e.buf = append(e.buf, '\n')
	}
}

// WriteFloat writes a group that holds a number, an angle if the code is 50 or
// 51 and a length or ratio otherwise.
func (e *encoder) WriteFloat(code int, val float64) {
	if math.IsNaN(val) || math.IsInf(val, 0) {
		e.fail(fmt.Errorf("dxf: group %d is %v", code, val))
		return
	}
	if !e.code(code) {
		return
	}
	if code == 50 || code == 51 {
		e.buf = fixed.AppendDecimals(e.buf, val, angleDecimals)
	} else {
		e.buf = fixed.Append(e.buf, val)
	}
	e.buf = append(e.buf, '\n')
}

// vertex writes the groups of a polyline's vertex at once, the bulge if asked for.
// The numbers are a sheet's, hence finite.
func (e *encoder) vertex(at r2.Vec, bulge float64, curved bool) {
	e.buf = fixed.Append(append(e.buf, "10\n"...), at.X)
	e.buf = fixed.Append(append(e.buf, "\n20\n"...), at.Y)
	if curved {
		e.buf = fixed.Append(append(e.buf, "\n42\n"...), bulge)
	}
	e.buf = append(e.buf, '\n')
}

// fail keeps the first error.
func (e *encoder) fail(err error) {
	if e.err == nil {
		e.err = err
	}
}
