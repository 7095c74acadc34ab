package sidecar

import (
	_ "embed"
	"encoding/csv"
	"encoding/json"
	"fmt"
	"io"
	"slices"
	"strconv"
	"strings"
	"unicode"

	gojson "github.com/goccy/go-json"
)

// FamilySchemaID names the version of the list of a family.
const FamilySchemaID = "flankwright/family/v1"

// FamilySchema is the JSON Schema of the list of a family.
//
//go:embed family.schema.json
var FamilySchema string

// FamilyRow is what the list of a family tells of one row of the table.
type FamilyRow struct {
	Line      int            `json:"line"` // of the table
	Name      string         `json:"name"`
	Form      string         `json:"form"`
	Unit      string         `json:"unit,omitempty"`
	Figures   map[string]any `json:"figures,omitempty"` // key figures, as in the sidecar's dimensions
	Entities  map[string]int `json:"entities,omitempty"`
	Tolerance *Value         `json:"tolerance,omitempty"`
	Deviation *Value         `json:"deviation,omitempty"` // the largest of all layers
	Warnings  []Warning      `json:"warnings"`
	Files     []File         `json:"files"` // the sidecar last
	Errors    []string       `json:"errors,omitempty"`
}

// keyFigures are the figures a list shows, in the order of its columns: dimensions of a
// part, then what is known of a pair.
func keyFigures() []string {
	return []string{"module", "diametral_pitch", "teeth", "reference_diameter", "tip_diameter", "root_diameter", "form_diameter", "tooth_thickness",
		"center_distance", "contact_ratio", "backlash_circumferential", "transmission_error"}
}

// FamilyRow sums the document of one row up. The sidecar is the file it was written to.
func (d *Document) FamilyRow(line int, name, form string, sidecar File) FamilyRow {
	row := FamilyRow{Line: line, Name: name, Form: form, Unit: d.Unit, Figures: map[string]any{}, Entities: map[string]int{},
		Warnings: d.Warnings, Files: append(slices.Clip(d.Files), sidecar)}
	for _, key := range keyFigures() {
		if v, ok := d.Dimensions[key]; ok {
			row.Figures[key] = v
		}
	}
	if m := d.Mesh; m != nil {
		row.Figures["center_distance"], row.Figures["contact_ratio"] = m.CenterDistance, m.ContactRatio
		row.Figures["backlash_circumferential"], row.Figures["transmission_error"] = m.BacklashCircumferential, m.DrawnMesh.TransmissionError
	}
	for layer, o := range d.Outline {
		if strings.HasPrefix(layer, "OUTLINE") {
			for kind, n := range o.Entities {
				row.Entities[kind] += n
			}
		}
		if o.Tolerance != nil && (row.Tolerance == nil || o.Tolerance.Value > row.Tolerance.Value) {
			row.Tolerance = o.Tolerance
		}
		if o.Deviation != nil && (row.Deviation == nil || o.Deviation.Value > row.Deviation.Value) {
			row.Deviation = o.Deviation
		}
	}
	return row
}

// FamilyHead is what the list of a family tells besides its rows.
type FamilyHead struct {
	Schema  string `json:"schema"`
	Program string `json:"program"`
	Table   string `json:"table"`
	Shard   string `json:"shard,omitempty"` // I/N where only every N-th row is listed
}

// FamilyTail closes the list.
type FamilyTail struct {
	Made     int      `json:"made"`
	Failed   int      `json:"failed"`
	Cautions []string `json:"cautions"`
}

// FamilyList writes the list of a family, row by row, as JSON and as CSV.
type FamilyList struct {
	json io.Writer
	csv  *csv.Writer
	rows int
}

// NewFamilyList begins a list.
func NewFamilyList(jsonOut, csvOut io.Writer, head FamilyHead) (*FamilyList, error) {
	head.Schema = FamilySchemaID
	l := &FamilyList{json: jsonOut, csv: csv.NewWriter(csvOut)}
	text, err := json.Marshal(head)
	if err != nil {
		return nil, err
	}
	if _, err := fmt.Fprintf(l.json, "%s,\n\"rows\": [", text[:len(text)-1]); err != nil {
		return nil, err
	}
	columns := append([]string{"line", "name", "form", "status", "unit"}, keyFigures()...)
	return l, l.csv.Write(append(columns, "tolerance", "deviation", "entities", "warnings", "files", "sha256", "errors"))
}

// Add lists a row.
func (l *FamilyList) Add(row FamilyRow) error {
	if row.Warnings == nil {
		row.Warnings = []Warning{}
	}
	if row.Files == nil {
		row.Files = []File{}
	}
	text, err := gojson.Marshal(row)
	if err != nil {
		return err
	}
	separator := ",\n"
	if l.rows == 0 {
		separator = "\n"
	}
	l.rows++
	if _, err := fmt.Fprintf(l.json, "%s%s", separator, text); err != nil {
		return err
	}
	return l.csv.Write(row.cells())
}

// Finish ends the list.
func (l *FamilyList) Finish(tail FamilyTail) error {
	text, err := json.Marshal(tail)
	if err != nil {
		return err
	}
	if _, err := fmt.Fprintf(l.json, "\n],\n%s\n", text[1:]); err != nil {
		return err
	}
	l.csv.Flush()
	return l.csv.Error()
}

// cells is the row as cells of a spreadsheet.
func (r FamilyRow) cells() []string {
	status := "made"
	if r.Errors != nil {
		status = "failed"
	}
	cells := []string{strconv.Itoa(r.Line), inert(r.Name), inert(r.Form), status, r.Unit}
	for _, key := range keyFigures() {
		cells = append(cells, figure(r.Figures[key]))
	}
	total := ""
	if r.Entities != nil {
		sum := 0
		for _, n := range r.Entities {
			sum += n
		}
		total = strconv.Itoa(sum)
	}
	var warnings, names, sums []string
	for _, w := range r.Warnings {
		warnings = append(warnings, w.Message)
	}
	for _, f := range r.Files {
		names, sums = append(names, f.Name), append(sums, f.SHA256)
	}
	return append(cells, figure(r.Tolerance), figure(r.Deviation), total, inert(strings.Join(warnings, "; ")),
		inert(strings.Join(names, "; ")), strings.Join(sums, "; "), inert(strings.Join(r.Errors, "; ")))
}

// figure is a number as a cell; "" for nothing.
func figure(v any) string {
	switch v := v.(type) {
	case Value:
		return v.Value.String()
	case *Value:
		if v != nil {
			return v.Value.String()
		}
	case Decimal:
		return v.String()
	}
	return ""
}

// inert is text that no spreadsheet takes for a formula: an apostrophe goes before
// what begins like one ("CSV Injection", OWASP).
func inert(s string) string {
	if trimmed := strings.TrimLeftFunc(s, unicode.IsSpace); trimmed != "" && strings.ContainsRune("=+-@", rune(trimmed[0])) {
		return "'" + s
	}
	return s
}
