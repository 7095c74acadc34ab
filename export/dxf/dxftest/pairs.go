// Package dxftest reads DXF files for tests, strictly: what it accepts is what
// this module promises to write, not what the world's files look like.
//
// Read gives entities and header values; Check gives every rule of the
// container that a file breaks. Nothing here is shared with the writer, so that
// a mistake has to be made twice to go unseen.
package dxftest

import (
	"bytes"
	"fmt"
	"regexp"
	"strconv"
	"strings"
)

// Pair is a group: a code and its value as written.
type Pair struct {
	Code  int
	Value string
	Line  int // of the code, from 1
}

// Float is the value as a number; NaN never comes back, since Pairs refuses it.
func (p Pair) Float() float64 {
	x, _ := strconv.ParseFloat(p.Value, 64)
	return x
}

// Int is the value as an integer.
func (p Pair) Int() int {
	n, _ := strconv.Atoi(p.Value)
	return n
}

// Handle is the value as a hexadecimal handle.
func (p Pair) Handle() uint64 {
	h, _ := strconv.ParseUint(p.Value, 16, 64)
	return h
}

// kind is what a group may hold.
type kind uint8

const (
	text kind = iota
	real
	integer
	handle
)

// kindOf follows the table of group code types in the DXF reference.
func kindOf(code int) (kind, bool) {
	switch {
	case code == 5 || code == 105 || code >= 320 && code <= 369 || code >= 390 && code <= 399:
		return handle, true
	case code >= 0 && code <= 9 || code == 100 || code == 102:
		return text, true
	case code >= 10 && code <= 59 || code >= 110 && code <= 149 || code >= 210 && code <= 239:
		return real, true
	case code >= 60 && code <= 99 || code >= 170 && code <= 179 || code >= 270 && code <= 289 || code >= 370 && code <= 389:
		return integer, true
	}
	return text, false
}

// Fixed point with one to nine decimals, up to twelve for angles; no exponent,
// no superfluous sign or zero.
var (
	length = regexp.MustCompile(`^-?(0|[1-9][0-9]*)\.([0-9]|[0-9]{0,8}[1-9])$`)
	angle  = regexp.MustCompile(`^(0|[1-9][0-9]*)\.([0-9]|[0-9]{0,11}[1-9])$`)
	count  = regexp.MustCompile(`^(0|-?[1-9][0-9]*)$`)
	hex    = regexp.MustCompile(`^(0|[1-9A-F][0-9A-F]{0,15})$`)
)

// Pairs splits a file into groups and checks each on its own: one kind of line
// end, ASCII, code and value well formed, the last group 0 EOF with one newline
// and nothing after.
func Pairs(data []byte) ([]Pair, error) {
	if i := bytes.IndexFunc(data, func(r rune) bool { return r > '~' || r < ' ' && r != '\n' && r != '\r' }); i >= 0 {
		return nil, fmt.Errorf("line %d: byte %#x is not printable ASCII", 1+bytes.Count(data[:i], []byte("\n")), data[i])
	}
	end := "\n"
	if bytes.Contains(data, []byte("\r\n")) {
		end = "\r\n"
	}
	s, ok := strings.CutSuffix(string(data), end)
	if !ok {
		return nil, fmt.Errorf("the file does not end in a newline")
	}
	lines := strings.Split(s, end)
	if len(lines)%2 != 0 {
		return nil, fmt.Errorf("odd number of lines: %d", len(lines))
	}
	pairs := make([]Pair, 0, len(lines)/2)
	for i := 0; i < len(lines); i += 2 {
		p := Pair{Value: lines[i+1], Line: i + 1}
		if !count.MatchString(lines[i]) {
			return nil, fmt.Errorf("line %d: group code %q", i+1, lines[i])
		}
		p.Code, _ = strconv.Atoi(lines[i])
		if err := p.check(); err != nil {
			return nil, fmt.Errorf("line %d: group %d: %w", i+2, p.Code, err)
		}
		if p.Code == 0 && p.Value == "EOF" && i+2 != len(lines) {
			return nil, fmt.Errorf("line %d: EOF before the end", i+1)
		}
		pairs = append(pairs, p)
	}
	if last := pairs[len(pairs)-1]; last.Code != 0 || last.Value != "EOF" {
		return nil, fmt.Errorf("the file does not end in 0 EOF")
	}
	return pairs, nil
}

func (p Pair) check() error {
	k, known := kindOf(p.Code)
	if !known {
		return fmt.Errorf("unknown code")
	}
	if strings.ContainsAny(p.Value, "\r\n") {
		return fmt.Errorf("mixed line ends")
	}
	ok := true
	switch k {
	case real:
		re := length
		if p.Code == 50 || p.Code == 51 {
			re = angle
		}
		ok = re.MatchString(p.Value) && p.Value != "-0.0"
	case integer:
		ok = count.MatchString(p.Value)
	case handle:
		ok = hex.MatchString(p.Value)
	}
	if !ok {
		return fmt.Errorf("malformed value %q", p.Value)
	}
	return nil
}
