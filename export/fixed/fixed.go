// Package fixed rounds and writes the numbers of drawing files: fixed point,
// nine decimals, no exponent and no negative zero.
//
// Rounding happens here and nowhere else, so two segments that share a point
// show the same digits at it.
package fixed

import (
	"math"
	"strconv"
)

// Decimals is the number of digits after the point. In millimetres the last
// one is a picometre, three below the finest tolerance a drawing is asked for,
// and coarse enough that fused multiply-add on another processor hardly ever
// shows.
const Decimals = 9

// Step is one unit of the last decimal.
const Step = 1e-9

// perUnit is the number of steps in a unit.
const perUnit = 1e9

// Limit bounds the coordinates of a drawing. Below it a coordinate counts fewer
// than 2^51 steps, so that Round(x)*1e9 is within half a step of an integer and
// a second rounding changes nothing.
const Limit = 1e6

// Round returns the double nearest to x rounded to nine decimals, which is the
// double a reader gets from the digits Append writes. Zero is always positive.
//
// It is idempotent for |x| < Limit; NaN and infinities come back unchanged.
func Round(x float64) float64 {
	return math.RoundToEven(x*perUnit)/perUnit + 0
}

// InRange reports whether x is finite and can be a coordinate.
func InRange(x float64) bool {
	return math.Abs(x) < Limit // false for NaN as well
}

// Append appends x in fixed point with at most nine decimals and at least one,
// trailing zeros trimmed. x must be finite.
func Append(dst []byte, x float64) []byte {
	// Counting in steps is exact up to 2^53 of them; longer numbers (radii of
	// nearly straight arcs) take the slow road.
	const exact = 1 << 53 / perUnit
	if !(math.Abs(x) < exact) {
		return trim(strconv.AppendFloat(dst, x, 'f', Decimals, 64))
	}
	steps := int64(math.RoundToEven(x * perUnit))
	n := uint64(max(steps, -steps))
	whole, frac := uint32(n/perUnit), uint32(n%perUnit) // 32 bits divide faster

	var text [1 + 7 + 1 + Decimals]byte // sign, at most 2^53/10^9 units, point
	const point = len(text) - Decimals - 1
	end := point + 2
	text[point], text[point+1] = '.', '0'
	if frac != 0 {
		end = len(text)
		text[end-1] = byte('0' + frac%10)
		frac /= 10
		for i := end - 3; i > point; i -= 2 {
			pair := frac % 100 * 2
			text[i], text[i+1] = pairs[pair], pairs[pair+1]
			frac /= 100
		}
		for text[end-1] == '0' {
			end--
		}
	}
	start := point
	for whole >= 10 {
		pair := whole % 100 * 2
		start -= 2
		text[start], text[start+1] = pairs[pair], pairs[pair+1]
		whole /= 100
	}
	if whole > 0 || start == point {
		start--
		text[start] = byte('0' + whole)
	}
	if steps < 0 {
		start--
		text[start] = '-'
	}
	return append(dst, text[start:end]...)
}

// pairs are the numbers of two digits one after the other.
const pairs = "00010203040506070809101112131415161718192021222324252627282930313233343536373839" +
	"40414243444546474849505152535455565758596061626364656667686970717273747576777879" +
	"8081828384858687888990919293949596979899"

// AppendDecimals appends x in fixed point with at most the given number of
// decimals, at least one. It serves the angles of DXF arcs, which need more
// digits than coordinates. x must be finite.
func AppendDecimals(dst []byte, x float64, decimals int) []byte {
	start := len(dst)
	dst = trim(strconv.AppendFloat(dst, x, 'f', decimals, 64))
	if string(dst[start:]) == "-0.0" {
		dst = append(dst[:start], "0.0"...)
	}
	return dst
}

// trim removes trailing zeros but keeps one digit after the point.
func trim(b []byte) []byte {
	for n := len(b); n > 2 && b[n-1] == '0' && b[n-2] != '.'; n-- {
		b = b[:n-1]
	}
	return b
}
