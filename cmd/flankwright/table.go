package main

import (
	"fmt"
	"io"
	"strconv"
	"strings"
	"text/tabwriter"

	"flankwright/export"
	"flankwright/export/sidecar"
	"flankwright/profile"
)

// The decimals of the dimension table: as many as a good micrometer reads.
const (
	tableDecimals = 4
	inchPerMM     = 1 / export.MillimetresPerInch
)

// printTable prints the dimension table for the workshop wall: name, symbol, value
// in mm and in inch.
func printTable(out io.Writer, m *partMade) error {
	var b strings.Builder
	fmt.Fprintf(&b, "%s\n", m.title())
	fmt.Fprintf(&b, "basic rack %s: %s\n", m.doc.BasicRack["name"], m.doc.BasicRack["source"])
	for _, line := range sizeNotes(m.part.Tooth.Dimensions.Module) {
		fmt.Fprintln(&b, line)
	}
	fmt.Fprintln(&b)
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "dimension\tsymbol\tmm\tinch")
	rows := export.DimensionRows(m.part.Tooth)
	spec := m.part.Tooth.Spec
	rows = append(rows, export.RackRows(spec.Rack)...)
	rows = append(rows,
		export.Row{Name: "profile shift coefficient", Symbol: "x", Value: profile.NumberOf(spec.ProfileShift)},
		export.Row{Name: "thinning on d", Symbol: "E", Value: profile.LengthOf(spec.Thinning)})
	for _, r := range rows {
		mm, inch := tableCells(r.Value)
		fmt.Fprintf(w, "%s\t%s\t%s\t%s\n", r.Name, r.Symbol, mm, inch)
	}
	if err := w.Flush(); err != nil {
		return err
	}
	fmt.Fprintln(&b)
	printInspection(&b, m)
	fmt.Fprintln(&b)
	for _, line := range m.reportLines() {
		fmt.Fprintln(&b, line)
	}
	for _, c := range export.Cautions() {
		fmt.Fprintf(&b, "caution: %s\n", c)
	}
	_, err := io.WriteString(out, b.String())
	return writeFailed("stdout", err)
}

// tableCells prints a value in both columns; numbers and angles stand in the first.
func tableCells(q profile.Quantity) (mm, inch string) {
	if q.Dimension != profile.Length {
		return strings.TrimSuffix(q.String(), " deg") + degreeMark(q), ""
	}
	return strconv.FormatFloat(q.Value, 'f', tableDecimals, 64),
		strconv.FormatFloat(q.Value*inchPerMM, 'f', tableDecimals, 64)
}

func degreeMark(q profile.Quantity) string {
	if q.Dimension == profile.Angle {
		return " deg"
	}
	return ""
}

// sizeNotes tells the nearest preferred module and pitch where the size is
// neither.
func sizeNotes(module float64) []string {
	nearModule, isModule := profile.NearestPreferred(module, profile.PreferredModules())
	pitch := export.MillimetresPerInch / module
	nearPitch, isPitch := profile.NearestPreferred(pitch, profile.PreferredPitches())
	if isModule || isPitch {
		return nil
	}
	return []string{fmt.Sprintf("not a preferred size: the nearest preferred module is %s mm, the nearest preferred diametral pitch %s",
		plain(nearModule), plain(nearPitch))}
}

// micrometres prints a length of mm that is small.
func micrometres(mm float64) string { return profile.NumberOf(mm*1000).String() + " um" }

// reportLines tell what is drawn, how the beam's path differs from the part, and what
// was chosen.
func (m *partMade) reportLines() []string {
	lines := []string{outlineLine(m)}
	show := sidecar.Show(m.part.Unit)
	if k := m.kerf; k != nil {
		line := fmt.Sprintf("kerf %s: drawn is the path of the beam", show(profile.LengthOf(k.Width)))
		tip := m.part.Tooth.Dimensions.TipDiameter
		drawn := tip + k.Width
		if m.part.Tooth.Form == profile.FormRing {
			drawn = tip - k.Width
		}
		if m.part.Tooth.Form != profile.FormRack {
			line += fmt.Sprintf(", tip diameter %s for the part's %s", show(profile.LengthOf(drawn)), show(profile.LengthOf(tip)))
		}
		lines = append(lines, line)
	}
	var finest []string
	for _, f := range m.features {
		finest = append(finest, fmt.Sprintf("%s %s (%s)", f.Name, show(profile.LengthOf(f.Value)), f.Place))
	}
	lines = append(lines, "finest features: "+strings.Join(finest, "; "))
	for _, c := range m.choices {
		lines = append(lines, fmt.Sprintf("chosen: --%s %s, %s", c.Flag, show(c.Value), c.Reason))
	}
	return lines
}

// outlineLine sums up what is drawn: entities, deviation, and the size to check
// after import.
func outlineLine(m *partMade) string {
	for _, r := range m.drawing.Report() {
		if r.Layer != export.LayerOutline {
			continue
		}
		var entities []string
		for _, kind := range []string{"arc", "cubic", "line"} {
			if n := r.Entities[kind]; n > 0 {
				entities = append(entities, fmt.Sprintf("%d %ss", n, kind))
			}
		}
		size := r.Bounds.Size()
		return fmt.Sprintf("outline: %s (least possible: %d arcs), shortest %s; deviation %s of %s allowed; extents %.4f x %.4f mm (%.4f x %.4f in)",
			strings.Join(entities, ", "), m.part.Drawn.ArcLimit(m.part.Extent), sidecar.Show(m.part.Unit)(profile.LengthOf(r.Shortest)), micrometres(m.part.Drawn.Deviation),
			micrometres(m.part.Drawn.Tolerance), size.X, size.Y, size.X*inchPerMM, size.Y*inchPerMM)
	}
	return ""
}
