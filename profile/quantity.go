package profile

import (
	"math"
	"strconv"
)

// Dimension says what a Quantity counts, so that whoever prints it can choose
// the unit.
type Dimension uint8

// The dimensions a Quantity can have.
const (
	Number Dimension = iota // coefficient or count
	Length                  // mm
	Angle                   // rad
)

// Quantity is a value with its dimension: millimetres, radians or a plain
// number.
type Quantity struct {
	Value     float64
	Dimension Dimension
	Toward    Toward
}

// Toward says which way a bound must be rounded to stay a bound when printed.
type Toward int8

// The ways to round.
const (
	ToNearest Toward = iota
	Upward           // for a least value
	Downward         // for a largest value
)

// LengthOf is a length in millimetres.
func LengthOf(mm float64) Quantity { return Quantity{Value: mm, Dimension: Length} }

// AngleOf is an angle in radians.
func AngleOf(rad float64) Quantity { return Quantity{Value: rad, Dimension: Angle} }

// NumberOf is a coefficient or a count.
func NumberOf(v float64) Quantity { return Quantity{Value: v} }

// AtLeast is the quantity as a least value: it is printed rounded up.
func (q Quantity) AtLeast() Quantity { q.Toward = Upward; return q }

// AtMost is the quantity as a largest value: it is printed rounded down.
func (q Quantity) AtMost() Quantity { q.Toward = Downward; return q }

// String prints lengths in mm to 0.1 um, angles in degrees, numbers to four
// decimals; trailing zeros are dropped.
func (q Quantity) String() string {
	switch q.Dimension {
	case Length:
		return q.Decimal(1, 4) + " mm"
	case Angle:
		return q.Decimal(180/math.Pi, 4) + " deg"
	}
	return q.Decimal(1, 4)
}

// Decimal prints the value times scale with at most so many decimals, rounded
// the way the quantity asks, or with so many significant digits where the
// decimals would leave none of a value that is not zero.
func (q Quantity) Decimal(scale float64, decimals int) string {
	v := q.Value * scale
	if v == 0 {
		return "0"
	}
	if rounded := q.round(v, math.Pow10(decimals)); rounded != 0 {
		return strconv.FormatFloat(rounded, 'f', -1, 64)
	}
	first := int(math.Floor(math.Log10(math.Abs(v))))
	const longest = 12 // decimals; beyond them an exponent reads better than zeros
	if first >= -longest {
		return strconv.FormatFloat(q.round(v, math.Pow10(decimals-1-first)), 'f', -1, 64)
	}
	return strconv.FormatFloat(v, 'g', decimals, 64)
}

// round rounds v to a multiple of 1/unit the way the quantity asks. A bound that
// misses a multiple only by rounding noise is that multiple.
func (q Quantity) round(v, unit float64) float64 {
	nearest := math.Round(v * unit)
	if math.Abs(v*unit-nearest) > printNoise {
		switch q.Toward {
		case Upward:
			nearest = math.Ceil(v * unit)
		case Downward:
			nearest = math.Floor(v * unit)
		}
	}
	return nearest / unit
}

// printNoise is the part of the last printed digit within which a value counts
// as on it: far above rounding of a double, far below what a digit means.
const printNoise = 1e-6
