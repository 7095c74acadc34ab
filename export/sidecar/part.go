package sidecar

import (
	"flankwright/export"
	"flankwright/profile"
	"flankwright/profile/body"
)

// Rack names the basic rack of a request.
type Rack struct {
	Name   string
	Source string
}

// KerfReport is what is known of the beam's path besides the drawing. Lengths are mm.
type KerfReport struct {
	Width, PartArea, PartPerimeter float64
	Leftover                       []LeftoverAt
}

// Chosen is a value nobody gave, and why it was chosen.
type Chosen struct {
	Flag   string
	Value  profile.Quantity
	Reason string
}

// LeftoverAt is material left, with the name of its place.
type LeftoverAt struct {
	Place string
	profile.Leftover
}

// Made is all that a document of a gear tells.
type Made struct {
	Program  string // and its version
	Input    map[string]any
	Rack     Rack
	Part     export.Part
	Drawing  export.Drawing
	Features []body.Feature
	Kerf     *KerfReport // nil without a kerf

	Inspection export.Inspection
	Choices    []Chosen
	Warnings   []profile.Finding
}

// Of builds the document of a part; files are added when their bytes are known.
func Of(m Made) *Document {
	unit := m.Part.Unit
	doc := &Document{
		Schema:     SchemaID,
		Program:    m.Program,
		Input:      m.Input,
		Unit:       unit.String(),
		BasicRack:  map[string]any{"name": m.Rack.Name, "source": m.Rack.Source},
		Dimensions: map[string]any{},
		Outline:    map[string]*Outline{},
		Features:   []Feature{},
		Choices:    []Choice{},
		Files:      []File{},
		Warnings:   []Warning{},
		Cautions:   export.Cautions(),
	}
	for _, r := range export.RackRows(m.Part.Tooth.Spec.Rack) {
		doc.BasicRack[r.Key] = value(r.Value, r.Symbol, unit)
	}
	for _, r := range export.DimensionRows(m.Part.Tooth) {
		doc.Dimensions[r.Key] = value(r.Value, r.Symbol, unit)
	}
	doc.Inspection = inspection(m.Inspection, unit, m.Part.Tooth.Form == profile.FormRack)
	for _, r := range m.Drawing.Report() {
		o := outline(r, unit)
		if r.Tolerance > 0 {
			tolerance, deviation := length(r.Tolerance, "e", unit), length(r.Deviation, "e_max", unit)
			o.Tolerance, o.Deviation = &tolerance, &deviation
		}
		if r.Layer == export.LayerOutline {
			o.ArcLimit = m.Part.Drawn.ArcLimit(m.Part.Extent)
		}
		doc.Outline[string(r.Layer)] = o
	}
	if m.Kerf != nil {
		doc.Kerf = kerf(*m.Kerf, unit)
	}
	for _, f := range m.Features {
		doc.Features = append(doc.Features, Feature{Name: f.Name, Place: f.Place, Value: length(f.Value, featureSymbol(f.Name), unit)})
	}
	for _, c := range m.Choices {
		doc.Choices = append(doc.Choices, Choice{Flag: c.Flag, Value: value(c.Value, c.Flag, unit), Reason: c.Reason})
	}
	for _, w := range m.Warnings {
		message, _ := w.Describe(Show(unit))
		doc.Warnings = append(doc.Warnings, Warning{Code: string(w.Rule), Message: message})
	}
	return doc
}

// featureSymbol is the symbol of a feature by its name; ours, but for the tip land's.
func featureSymbol(name string) string {
	switch name {
	case "inner radius":
		return "r_i"
	case "tip land":
		return "s_aK"
	case "web":
		return "w"
	}
	return "g"
}

// kerf gives the report of a beam's path in the unit of the drawing.
func kerf(k KerfReport, unit export.Unit) *Kerf {
	scale := unit.Scale()
	doc := &Kerf{
		Width:         length(k.Width, "W", unit),
		PartArea:      Value{Decimal(k.PartArea * scale * scale), unit.String() + "^2", "A"},
		PartPerimeter: length(k.PartPerimeter, "L", unit),
		Leftover:      []Leftover{},
	}
	for _, l := range k.Leftover {
		doc.Leftover = append(doc.Leftover, Leftover{Place: l.Place, X: length(l.At.X, "x", unit), Y: length(l.At.Y, "y", unit), Depth: length(l.Depth, "h", unit)})
	}
	return doc
}

// outline gives a layer's report in the unit of the drawing.
func outline(r export.LayerReport, unit export.Unit) *Outline {
	scale := unit.Scale()
	return &Outline{
		Loops:          r.Loops,
		Entities:       r.Entities,
		ShortestEntity: length(r.Shortest, "l_min", unit),
		Area:           Value{Decimal(r.Area * scale * scale), unit.String() + "^2", "A"},
		Perimeter:      length(r.Length, "L", unit),
		Bounds: Bounds{
			MinX: length(r.Bounds.Min.X, "x_min", unit), MinY: length(r.Bounds.Min.Y, "y_min", unit),
			MaxX: length(r.Bounds.Max.X, "x_max", unit), MaxY: length(r.Bounds.Max.Y, "y_max", unit),
		},
		Closed: r.Closed,
	}
}

// Show prints quantities for people who work in the unit: lengths in mm to four
// decimals or in inch to five, angles in degrees.
func Show(unit export.Unit) func(profile.Quantity) string {
	if unit == export.Millimetre {
		return profile.Quantity.String
	}
	return func(q profile.Quantity) string {
		const inchDecimals = 5
		if q.Dimension == profile.Length {
			return q.Decimal(unit.Scale(), inchDecimals) + " in"
		}
		return q.String()
	}
}
