// Package sidecar writes the JSON document that goes with a drawing: the request,
// every dimension, what was drawn and how far it is from the exact profile, and
// checksums of the files. Its JSON Schema is part of the package.
package sidecar

import (
	"bytes"
	_ "embed"
	"encoding/json"
	"math"
	"strconv"

	gojson "github.com/goccy/go-json"

	"flankwright/export"
	"flankwright/export/fixed"
	"flankwright/profile"
)

// SchemaID names the version of the document.
const SchemaID = "flankwright/sidecar/v1"

// Schema is the JSON Schema of the document.
//
//go:embed sidecar.schema.json
var Schema string

// Document is the sidecar of one part.
type Document struct {
	Schema     string              `json:"schema"`
	Program    string              `json:"program"` // and its version
	Input      map[string]any      `json:"input"`
	Unit       string              `json:"unit"`
	BasicRack  map[string]any      `json:"basic_rack"`
	Dimensions map[string]any      `json:"dimensions,omitempty"` // of a part
	Inspection *Inspection         `json:"inspection,omitempty"` // likewise
	Members    []Member            `json:"members,omitempty"`    // of a pair
	Mesh       *Mesh               `json:"mesh,omitempty"`       // likewise
	Outline    map[string]*Outline `json:"outline"`
	Kerf       *Kerf               `json:"kerf,omitempty"`
	Features   []Feature           `json:"features"`
	Choices    []Choice            `json:"choices"`
	Files      []File              `json:"files"`
	Warnings   []Warning           `json:"warnings"`
	Cautions   []string            `json:"cautions"`
}

// Outline is what one layer holds.
type Outline struct {
	Loops          int            `json:"loops"`
	Entities       map[string]int `json:"entities"`
	ShortestEntity Value          `json:"shortest_entity"`
	Area           Value          `json:"area"`
	Perimeter      Value          `json:"perimeter"`
	Bounds         Bounds         `json:"bounds"`
	Closed         bool           `json:"closed"`
	Tolerance      *Value         `json:"tolerance,omitempty"`
	Deviation      *Value         `json:"deviation,omitempty"`
	ArcLimit       int            `json:"arc_limit,omitempty"`
}

// Kerf says that the drawing shows the path of a beam and not the part's edge.
type Kerf struct {
	Width         Value      `json:"width"`
	PartArea      Value      `json:"part_area"`      // the part's own, holes taken off
	PartPerimeter Value      `json:"part_perimeter"` // of its outline
	Leftover      []Leftover `json:"leftover"`
}

// Leftover is a place the beam cannot reach, and how thick the material stands there.
// Of the teeth only the places of one space are listed.
type Leftover struct {
	Place string `json:"place"`
	X     Value  `json:"x"`
	Y     Value  `json:"y"`
	Depth Value  `json:"depth"`
}

// Feature is one of the finest features of the part.
type Feature struct {
	Name  string `json:"name"`
	Place string `json:"place"`
	Value Value  `json:"value"`
}

// Choice is a value nobody gave and the program chose.
type Choice struct {
	Flag   string `json:"flag"`
	Value  any    `json:"value"`
	Reason string `json:"reason"`
}

// Bounds is the box around a layer.
type Bounds struct {
	MinX Value `json:"min_x"`
	MinY Value `json:"min_y"`
	MaxX Value `json:"max_x"`
	MaxY Value `json:"max_y"`
}

// File describes one file of the set.
type File struct {
	Name   string `json:"name"`
	Format string `json:"format"`
	Bytes  int    `json:"bytes"`
	SHA256 string `json:"sha256"`
}

// Warning is one warning by its code.
type Warning struct {
	Code    string `json:"code"`
	Message string `json:"message"`
}

// Value is a measured quantity with its unit and symbol.
type Value struct {
	Value  Decimal `json:"value"`
	Unit   string  `json:"unit"`
	Symbol string  `json:"symbol"`
}

// Decimal is a number written without exponent.
type Decimal float64

// decimals is how many decimals are written: as many as in the drawing, few enough
// that rounding of the last bits does not show on another machine.
const decimals = 9

// String is the number as it is written.
func (d Decimal) String() string {
	text, err := d.MarshalJSON()
	if err != nil {
		return err.Error()
	}
	return string(text)
}

// MarshalJSON rounds once.
func (d Decimal) MarshalJSON() ([]byte, error) { return d.append(nil) }

// append appends the text of the number.
func (d Decimal) append(dst []byte) ([]byte, error) {
	v := float64(d)
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return dst, &json.UnsupportedValueError{Str: strconv.FormatFloat(v, 'g', -1, 64)}
	}
	// The short way counts steps of the last decimal. It is taken where the count is off
	// by less than a sixteenth, unless that could decide which way to round.
	const perUnit, short, near = 1e9, 1e6, 1.0 / 16
	if steps := math.Abs(v) * perUnit; math.Abs(v) < short && math.Abs(steps-math.Floor(steps)-0.5) > near {
		return bytes.TrimSuffix(fixed.Append(dst, v), []byte(".0")), nil
	}
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(v, 'f', decimals, 64), 64)
	if err != nil {
		return dst, err
	}
	return strconv.AppendFloat(dst, rounded+0, 'f', -1, 64), nil // +0 turns -0 into 0
}

// Marshal writes the document, indented, with a final newline.
func (d *Document) Marshal() ([]byte, error) { return d.Append(nil) }

// Append appends what Marshal writes to dst, which may be a buffer kept from an earlier
// call. On error it returns dst as it was.
func (d *Document) Append(dst []byte) ([]byte, error) {
	// The standard library indents in a second pass that costs twice the first.
	text, err := gojson.MarshalIndent(d, "", "  ")
	if err != nil {
		return dst, err
	}
	return append(append(dst, text...), '\n'), nil
}

// value gives a quantity in the unit of the drawing: lengths in it, angles in
// degrees. Plain numbers stay plain.
func value(q profile.Quantity, symbol string, unit export.Unit) any {
	switch q.Dimension {
	case profile.Length:
		return length(q.Value, symbol, unit)
	case profile.Angle:
		return degrees(q.Value, symbol)
	}
	return Decimal(q.Value)
}

// degrees gives an angle of rad.
func degrees(rad float64, symbol string) Value {
	return Value{Decimal(rad * 180 / math.Pi), "deg", symbol}
}

// length gives a length of mm in the unit of the drawing.
func length(mm float64, symbol string, unit export.Unit) Value {
	return Value{Decimal(mm * unit.Scale()), unit.String(), symbol}
}
