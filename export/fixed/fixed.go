// Package fixed rounds and writes the numbers of drawing files: fixed point,
// nine decimals, no exponent and no negative zero.
//
// Rounding happens here and nowhere else, so two segments that share a point
// show the same digits at it.
package fixed

import (
	"encoding/binary"
	"math"
	"math/bits"
	"slices"
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

	used := len(dst)
	dst = slices.Grow(dst, longest)
	text := (*[longest]byte)(dst[used : used+longest])
	at := 0
	if steps < 0 {
		text[0] = '-'
		at = 1
	}
	digits := eight(whole)
	leading := min(7, bits.TrailingZeros64(digits)/8) // zeros
	binary.LittleEndian.PutUint64(text[at:], (digits|zeros)>>(8*leading))
	at += 8 - leading
	const eighth = 100_000_000
	text[at], text[at+1] = '.', byte('0'+frac/eighth)
	digits = eight(frac % eighth)
	binary.LittleEndian.PutUint64(text[at+2:], digits|zeros)
	trailing := bits.LeadingZeros64(digits) / 8
	return dst[:used+at+Decimals+1-trailing]
}

// longest is how many bytes a number takes: sign, 8 digits, point, decimals.
const longest = 1 + 8 + 1 + Decimals

// zeros is the text of eight digits 0.
const zeros = 0x3030303030303030

// eight returns the eight decimal digits of n below 10^8, one a byte, the first in
// the lowest. All digits are parted at once: a number in a lane is halved into two
// lanes by its quotient and remainder, the quotient as a product and a shift.
func eight(n uint32) uint64 {
	v := uint64(n/10_000) | uint64(n%10_000)<<32
	q := v * 10_486 >> 20 & 0x0000_007f_0000_007f // by 100
	v = q | (v-100*q)<<16
	q = v * 103 >> 10 & 0x000f_000f_000f_000f // by 10
	return q | (v-10*q)<<8
}

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
