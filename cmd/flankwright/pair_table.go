package main

import (
	"fmt"
	"io"
	"strings"
	"text/tabwriter"

	"flankwright/export"
	"flankwright/export/files"
	"flankwright/export/sidecar"
	"flankwright/profile"
)

// print prints the mesh as a table, and the files that were written.
func (m *pairMade) print(out io.Writer, set []files.File) error {
	var b strings.Builder
	show := sidecar.Show(m.unit())
	fmt.Fprintf(&b, "member 1: %s\nmember 2: %s\n\n", m.members[0].title(), m.members[1].title())
	p := m.pair
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	length := func(v float64) string { return show(profile.LengthOf(v)) }
	line := func(name, symbol string, values ...string) {
		fmt.Fprintf(w, "%s\t%s\t%s\n", name, symbol, strings.Join(values, "\t"))
	}
	number := func(v float64) string { return profile.NumberOf(v).String() }
	rw := p.PitchRadii(p.CenterDistance)
	two := func(v [2]float64, of func(float64) string) []string {
		second := of(v[1])
		if v[1] == 0 {
			second = "-"
		}
		return []string{of(v[0]), second}
	}
	angle := func(v float64) string { return profile.AngleOf(v).String() }
	line("mesh", "symbol", "member 1", "member 2")
	line("center distance", "a", length(p.CenterDistance))
	line("reference center distance", "a_0", length(p.Reference()))
	line("operating pressure angle", "alpha_w", angle(p.OperatingAngle(p.CenterDistance)))
	line("sum of profile shifts", "x1+x2", number(p.ShiftSum))
	line("profile shift", "x", number(p.Shift[0]), number(p.Shift[1]))
	line("thinning", "E", length(p.Teeth[0].Spec.Thinning), length(p.Teeth[1].Spec.Thinning))
	line("tip shortening", "k", length(p.Shortened[0]), length(p.Shortened[1]))
	line("operating pitch diameter", "d_w", two([2]float64{2 * rw[0], 2 * rw[1]}, length)...)
	line("contact ratio", "eps", number(p.Ratio))
	line("backlash, circumferential", "j_t", length(p.Backlash.Circumferential))
	line("backlash, normal", "j_n", length(p.Backlash.Normal))
	line("backlash, angle", "phi_j", two(p.Backlash.Angle, angle)...)
	if p.Least != p.Most {
		least, most := p.Least.Circumferential, p.Most.Circumferential
		line("least and largest backlash", "j_t", length(min(least, most)), length(max(least, most)))
	}
	line("tip clearance", "c", length(p.TipClearance[0]), length(p.TipClearance[1]))
	line("active tip", "d_Na", length(p.ActiveTip[0]), length(p.ActiveTip[1]))
	line("active root", "d_Nf", length(p.ActiveRoot[0]), length(p.ActiveRoot[1]))
	line("largest specific sliding", "zeta", number(p.Sliding[0]), number(p.Sliding[1]))
	w.Flush()
	edge := "drawn curves"
	if m.kerfed {
		edge = "curves as the beam leaves them"
	}
	fmt.Fprintf(&b, "\nproof on the %s, rolled through a pitch: transmission error %s (their tolerances allow %s), backlash %s, smallest gap from tip to root %s, overlap %s\n",
		edge, micrometres(m.drawn.Error), micrometres(m.bound), length(m.drawn.Backlash), length(m.drawn.Gap), micrometres(m.drawn.Overlap))
	for _, f := range set {
		fmt.Fprintf(&b, "wrote %s, %d bytes\n", f.Name, len(f.Data))
	}
	for _, c := range export.Cautions() {
		fmt.Fprintf(&b, "caution: %s\n", c)
	}
	_, err := io.WriteString(out, b.String())
	return writeFailed("stdout", err)
}
