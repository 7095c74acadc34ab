package main

import (
	"fmt"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/profile/fit"
)

// drawing reads how the gear is drawn.
func (r *reader) drawing(j *partJob, inch bool) {
	j.fit = fit.Options{Curves: fit.Arc, Tolerance: defaultTolerance}
	switch r.choice("curves", []string{"arcs", "cubics", "lines"}, "arcs") {
	case "cubics":
		j.fit.Curves = fit.Cubic
	case "lines":
		j.fit.Curves = fit.Line
	}
	if tolerance, ok := r.length("tolerance"); ok {
		j.fit.Tolerance = tolerance
	}
	r.extent(j)
	fallback := "mm"
	if inch {
		fallback = "in"
	}
	if r.choice("unit", []string{"mm", "in"}, fallback) == "in" {
		j.unit = export.Inch
	}
	if r.choice("dxf", []string{"r2000", "r12"}, "r2000") == "r12" {
		j.dxf.Version = dxf.R12
		if j.fit.Curves == fit.Cubic {
			r.fail("dxf", "r12", "this version has no splines", "draw with --curves arcs or lines, or write --dxf r2000")
		}
	}
	j.dxf.Loose = r.on("loose")
	j.turn, _ = r.angle("turn")
	j.reference = r.on("reference")
}

// extent reads how much of the outline is drawn: a word or a number of teeth.
func (r *reader) extent(j *partJob) {
	s, ok := r.value("extent")
	if !ok {
		return
	}
	if _, _, err := parseNumber(s); err != nil {
		switch r.choice("extent", []string{"all", "tooth", "space"}, "all") {
		case "tooth":
			j.extent.Kind, j.extent.Teeth = fit.ExtentTeeth, 1
		case "space":
			j.extent.Kind = fit.ExtentSpace
		}
		return
	}
	n, ok := r.count("extent")
	switch {
	case !ok:
	case n < 1 || n > j.spec.Teeth && j.spec.Teeth > 0:
		r.fail("extent", s, "so many teeth have no such part",
			fmt.Sprintf("give all, tooth, space, or 1 to %d teeth", j.spec.Teeth))
	case n < j.spec.Teeth:
		j.extent.Kind, j.extent.Teeth = fit.ExtentTeeth, n
	}
}
