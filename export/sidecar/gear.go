package sidecar

import (
	"flankwright/export"
	"flankwright/profile"
)

// Rack names the basic rack of a request.
type Rack struct {
	Name   string
	Source string
}

// Gear builds the document of a gear; files are added when their bytes are known.
func Gear(input map[string]any, rack Rack, g export.Gear, d export.Drawing, warnings []profile.Finding) *Document {
	doc := &Document{
		Schema:     SchemaID,
		Input:      input,
		Unit:       g.Unit.String(),
		BasicRack:  map[string]any{"name": rack.Name, "source": rack.Source},
		Dimensions: map[string]any{},
		Outline:    map[string]*Outline{},
		Files:      []File{},
		Warnings:   []Warning{},
		Cautions:   export.Cautions(),
	}
	for _, r := range export.RackRows(g.Tooth.Spec.Rack) {
		doc.BasicRack[r.Key] = value(r.Value, r.Symbol, g.Unit)
	}
	for _, r := range export.DimensionRows(g.Tooth.Dimensions) {
		doc.Dimensions[r.Key] = value(r.Value, r.Symbol, g.Unit)
	}
	for _, r := range d.Report() {
		o := outline(r, d.Unit)
		if r.Layer == export.LayerOutline {
			tolerance := length(g.Drawn.Tolerance, "e", d.Unit)
			deviation := length(g.Drawn.Deviation, "e_max", d.Unit)
			o.Tolerance, o.Deviation = &tolerance, &deviation
			o.ArcLimit = g.Drawn.ArcLimit(g.Extent)
		}
		doc.Outline[string(r.Layer)] = o
	}
	for _, w := range warnings {
		message, _ := w.Describe(Show(g.Unit))
		doc.Warnings = append(doc.Warnings, Warning{Code: string(w.Rule), Message: message})
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
