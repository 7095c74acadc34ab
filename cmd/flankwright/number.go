package main

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
)

// plainNumber is what counts as a number: decimal, with a point. strconv alone
// would take NaN, hexadecimal and underscores.
var plainNumber = regexp.MustCompile(`^[+-]?([0-9]+(\.[0-9]*)?|\.[0-9]+)([eE][+-]?[0-9]+)?`)

// parseNumber reads a decimal number and whatever follows it.
func parseNumber(s string) (value float64, rest string, err error) {
	digits := plainNumber.FindString(s)
	rest = s[len(digits):]
	switch {
	case s == "":
		return 0, "", errors.New("the value is empty")
	case digits == "":
		return 0, "", errors.New("not a decimal number")
	case strings.HasPrefix(rest, ","):
		return 0, "", fmt.Errorf("the comma is not a decimal sign here: write %s.%s", digits, rest[1:])
	}
	value, err = strconv.ParseFloat(digits, 64)
	if err != nil || math.IsInf(value, 0) {
		return 0, "", errors.New("the number is too large")
	}
	return value, rest, nil
}

// unit is a unit of length by its suffix.
type unit struct {
	suffix string
	mm     float64 // how many mm it is
	inch   bool    // whether it belongs to the inch system
}

// units are the suffixes of a length. A micrometre is an exact thousandth and the
// inch exactly 25.4 mm.
func units() []unit {
	return []unit{{"mm", 1, false}, {"um", 0.001, false}, {"in", 25.4, true}, {"thou", 0.0254, true}}
}

// unitBySuffix finds a unit.
func unitBySuffix(suffix string) (unit, error) {
	var names []string
	for _, u := range units() {
		if u.suffix == suffix {
			return u, nil
		}
		names = append(names, u.suffix)
	}
	err := fmt.Errorf("unknown unit %q: lengths take %s", suffix, strings.Join(names, ", "))
	if near, ok := nearest(suffix, names); ok {
		err = fmt.Errorf("unknown unit %q: did you mean %s?", suffix, near)
	}
	return unit{}, err
}

// length is a length as given: a number and its unit, if it named one.
type length struct {
	number float64
	unit   *unit
}

// parseLength reads "12", "12mm", "0.5in", "1um", "2thou".
func parseLength(s string) (length, error) {
	v, suffix, err := parseNumber(s)
	if err != nil || suffix == "" {
		return length{number: v}, err
	}
	u, err := unitBySuffix(suffix)
	if err != nil {
		return length{}, err
	}
	return length{v, &u}, nil
}

// in is the length in mm, a bare number being in the unit given.
//
// Division by the exact reciprocal keeps decimal steps decimal: 1um is 1/1000 mm,
// not 0.001 with its rounding.
func (l length) in(bare unit) float64 {
	u := bare
	if l.unit != nil {
		u = *l.unit
	}
	switch u.suffix {
	case "um":
		return l.number / 1000
	case "thou":
		return l.number * 25.4 / 1000
	}
	return l.number * u.mm
}

// text is the length with its unit, to be read back anywhere.
func (l length) text(bare unit) string {
	u := bare
	if l.unit != nil {
		u = *l.unit
	}
	return plain(l.number) + u.suffix
}

// plain prints a number so that it reads back as the same one.
func plain(v float64) string { return strconv.FormatFloat(v+0, 'f', -1, 64) }
