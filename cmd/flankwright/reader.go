package main

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
)

// reader takes the values of a request apart, collects everything wrong with them,
// and keeps their normalized text for the sidecar.
type reader struct {
	request request
	bare    unit    // of lengths without a suffix
	module  float64 // mm, what coefficients count in
	found   problems
	input   map[string]any
}

// newReader starts reading a request; bare lengths are mm until a size says else.
func newReader(r request) *reader {
	return &reader{request: r, bare: units()[0], module: 1, input: map[string]any{"command": r.command}}
}

// fail notes that a flag's value is malformed.
func (r *reader) fail(name, value, message, hint string) {
	r.found = append(r.found, problem{flag: name, value: value, message: message, hint: hint, exit: exitMalformed})
}

// value is the text of a flag; false where it is not given.
func (r *reader) value(name string) (string, bool) {
	v := r.request.values[name]
	if len(v) == 0 {
		return "", false
	}
	return v[0], true
}

// length is a length in mm; false where it is not given or malformed.
func (r *reader) length(name string) (float64, bool) {
	s, ok := r.value(name)
	if !ok {
		return 0, false
	}
	l, err := parseLength(s)
	if err != nil {
		r.fail(name, s, err.Error(), "give a length such as 2mm, 0.08in, 5um or 3thou")
		return 0, false
	}
	r.input[name] = l.text(r.bare)
	return l.in(r.bare), true
}

// coefficient is a multiple of the module, or a length by its unit, in mm.
func (r *reader) coefficient(name string) (float64, bool) {
	s, ok := r.value(name)
	if !ok {
		return 0, false
	}
	l, err := parseLength(s)
	if err != nil {
		r.fail(name, s, err.Error(), "give a coefficient such as 1.25, or a length with its unit such as 2.5mm")
		return 0, false
	}
	if l.unit != nil {
		r.input[name] = l.text(r.bare)
		return l.in(r.bare), true
	}
	r.input[name] = plain(l.number)
	return l.number * r.module, true
}

// number is a plain decimal number, with one optional suffix.
func (r *reader) number(name, suffix string) (float64, bool) {
	s, ok := r.value(name)
	if !ok {
		return 0, false
	}
	v, rest, err := parseNumber(s)
	if err == nil && rest != "" && (suffix == "" || rest != suffix) {
		err = fmt.Errorf("%q is not part of a number", rest)
	}
	if err != nil {
		r.fail(name, s, err.Error(), "give a plain decimal number")
		return 0, false
	}
	r.input[name] = plain(v)
	return v, true
}

// angle is an angle given in degrees, in rad.
func (r *reader) angle(name string) (float64, bool) {
	v, ok := r.number(name, "deg")
	return v * math.Pi / 180, ok
}

// count is a whole decimal number.
func (r *reader) count(name string) (int, bool) {
	s, ok := r.value(name)
	if !ok {
		return 0, false
	}
	v, rest, err := parseNumber(s)
	const largest = 1e9 // beyond any count; keeps the conversion exact
	switch {
	case err != nil:
		r.fail(name, s, err.Error(), "give a whole number")
		return 0, false
	case rest != "" || v != math.Trunc(v) || math.Abs(v) > largest || strings.ContainsAny(s, ".eE"):
		r.fail(name, s, "not a whole number", "give a whole number")
		return 0, false
	}
	r.input[name] = strconv.Itoa(int(v))
	return int(v), true
}

// choice is one of a flag's words; the fallback where it is not given.
func (r *reader) choice(name string, choices []string, fallback string) string {
	s, ok := r.value(name)
	if !ok {
		return fallback
	}
	if !slices.Contains(choices, s) {
		hint := "it is one of " + strings.Join(choices, ", ")
		if near, ok := nearest(s, choices); ok {
			hint = fmt.Sprintf("did you mean %s? %s", near, hint)
		}
		r.fail(name, s, "unknown word", hint)
		return fallback
	}
	r.input[name] = s
	return s
}

// on is a switch.
func (r *reader) on(name string) bool {
	s, ok := r.value(name)
	if !ok {
		return false
	}
	switch s {
	case "true":
		r.input[name] = true
		return true
	case "false":
		return false
	}
	r.fail(name, s, "a switch is true or false", fmt.Sprintf("give --%s alone", name))
	return false
}
