package main

import (
	"fmt"
	"io"
	"strings"
	"text/tabwriter"

	"flankwright/export"
	"flankwright/export/sidecar"
	"flankwright/profile"
	"flankwright/profile/gauge"
)

// printGauge prints what a part is inspected by and what readings mean.
func printGauge(out io.Writer, m *partMade) error {
	var b strings.Builder
	fmt.Fprintf(&b, "%s\n", m.title())
	fmt.Fprintf(&b, "basic rack %s: %s\n", m.doc.BasicRack["name"], m.doc.BasicRack["source"])
	show := sidecar.Show(m.part.Unit)
	d := m.part.Tooth.Dimensions
	if m.part.Tooth.Form == profile.FormRack {
		fmt.Fprintf(&b, "tooth thickness on the datum line: %s; usable flank from %s to %s over it\n\n", show(profile.LengthOf(d.ToothThickness)),
			show(profile.LengthOf(d.FormHeight)), show(profile.LengthOf(d.TipFormHeight)))
	} else {
		fmt.Fprintf(&b, "tooth thickness on d: %s; usable flank from diameter %s to %s\n\n", show(profile.LengthOf(d.ToothThickness)),
			show(profile.LengthOf(d.FormDiameter)), show(profile.LengthOf(d.TipFormDiameter)))
	}
	printInspection(&b, m)
	printTolerances(&b, m.inspection)
	printReadings(&b, m.inspection, show)
	for _, c := range export.Cautions() {
		fmt.Fprintf(&b, "caution: %s\n", c)
	}
	_, err := io.WriteString(out, b.String())
	return writeFailed("stdout", err)
}

// printInspection prints the dimensions to measure, with limits if there are any.
func printInspection(b *strings.Builder, m *partMade) {
	i := m.inspection
	show := sidecar.Show(m.part.Unit)
	w := tabwriter.NewWriter(b, 0, 0, 2, ' ', 0)
	header := "inspection\tsymbol\tmm\tinch\ttouches at"
	withLimits := i.Chord != nil && i.Chord.Limits != nil || i.Pins != nil && i.Pins.Limits != nil
	if withLimits {
		header += "\tsmallest\tlargest"
	}
	fmt.Fprintln(w, header)
	line := func(name, symbol string, value, contact float64, l *gauge.Limits) {
		mm, inch := tableCells(profile.LengthOf(value))
		fmt.Fprintf(w, "%s\t%s\t%s\t%s\t", name, symbol, mm, inch)
		if contact != 0 {
			fmt.Fprintf(w, "%s", show(profile.LengthOf(contact)))
		}
		switch {
		case l != nil:
			fmt.Fprintf(w, "\t%s\t%s", show(profile.LengthOf(l.Smallest)), show(profile.LengthOf(l.Largest)))
		case withLimits:
			fmt.Fprint(w, "\t\t")
		}
		fmt.Fprintln(w)
	}
	for _, s := range i.Spans {
		line(fmt.Sprintf("span over %d teeth", s.Nominal.TeethSpanned), fmt.Sprintf("W_%d", s.Nominal.TeethSpanned), s.Nominal.Value, s.Nominal.ContactDiameter, s.Limits)
	}
	if p := i.Pins; p != nil {
		line(fmt.Sprintf("%s pins %s", pinsLie(m.part.Tooth.Form), show(profile.LengthOf(p.Nominal.PinDiameter))), "M_d", p.Nominal.Value, p.Nominal.Contact, p.Limits)
		line("ideal pin", "D_M", i.IdealPin, 0, nil)
	}
	if c := i.Chord; c != nil {
		line("chordal thickness", "s_c", c.Nominal.Thickness, c.Nominal.Contact, c.Limits)
		line("at the chordal height", "h_c", c.Nominal.Height, 0, nil)
	}
	w.Flush() // into memory, which does not fail
	for _, f := range i.Missing {
		message, hint := f.Describe(show)
		if hint != "" {
			message += "; " + hint
		}
		fmt.Fprintf(b, "not measured: %s\n", message)
	}
}

// pinsLie is how pins are measured on the part.
func pinsLie(form profile.Form) string {
	switch form {
	case profile.FormRing:
		return "between"
	case profile.FormRack:
		return "back over"
	}
	return "over"
}

// printTolerances prints the flank tolerances of a class.
func printTolerances(b *strings.Builder, i export.Inspection) {
	t := i.Class
	if t == nil {
		return
	}
	fmt.Fprintf(b, "\nflank tolerances, ISO 1328-1:2013 class %d (formulas from memory)\n", i.ClassNumber)
	w := tabwriter.NewWriter(b, 0, 0, 2, ' ', 0)
	for _, row := range []struct {
		name, symbol string
		value        float64
	}{
		{"single pitch", "f_pT", t.SinglePitch}, {"cumulative pitch, total", "F_pT", t.CumulativePitch}, {"profile, total", "F_alphaT", t.ProfileTotal},
		{"profile form", "f_falphaT", t.ProfileForm}, {"profile slope", "f_HalphaT", t.ProfileSlope}, {"runout", "F_rT", t.Runout},
	} {
		fmt.Fprintf(w, "%s\t%s\t%s\n", row.name, row.symbol, micrometres(row.value))
	}
	w.Flush()
}

// printReadings prints what measured values mean.
func printReadings(b *strings.Builder, i export.Inspection, show func(profile.Quantity) string) {
	if i.Readings == nil {
		return
	}
	length := func(v float64) string { return show(profile.LengthOf(v)) }
	fmt.Fprintln(b)
	w := tabwriter.NewWriter(b, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "measured\tvalue\tnominal\ttooth thickness\tdeviation\tas profile shift\tor as thinning\tbacklash j_t\tnormal j_n")
	for _, r := range i.Readings {
		fmt.Fprintf(w, "%s\t%s\t%s\t%s\t%s\t%s\t%s\t", r.Name, length(r.Measured), length(r.Nominal), length(r.Thickness), length(r.Deviation),
			profile.NumberOf(r.Shift), length(r.Thinning))
		if p := r.Backlash; p != nil {
			fmt.Fprintf(w, "%s\t%s", length(p.Circumferential), length(p.Normal))
		} else {
			fmt.Fprint(w, "-\t-")
		}
		fmt.Fprintln(w)
	}
	w.Flush()
}
