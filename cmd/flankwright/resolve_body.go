package main

import (
	"strconv"
	"strings"

	"flankwright/profile/body"
)

// body reads bore, keyway, holes and windows.
func (r *reader) body(j *partJob) {
	b := &j.body
	b.Bore = r.positive("bore")
	b.BoreFlat = r.positive("bore-flat")
	b.BoreHex = r.positive("bore-hex")
	r.keyway(b)
	for _, s := range r.request.values["hole-circle"] {
		r.holeCircle(b, s)
	}
	if n, ok := r.count("windows"); ok {
		if n < 1 {
			r.fail("windows", strconv.Itoa(n), "must be above zero", "leave --windows out for none")
		}
		b.Windows.N = n
	}
	b.Windows.RimWidth = r.positive("rim-width")
	b.Windows.HubDiameter = r.positive("hub-diameter")
	b.Windows.ArmWidth = r.positive("arm-width")
	b.Windows.CornerRadius = r.positive("window-radius")
	for _, name := range []string{"rim-width", "hub-diameter", "arm-width", "window-radius"} {
		if r.request.given(name) && !r.request.given("windows") {
			r.fail(name, "", "shapes windows, and none are asked for", "give --windows N as well")
		}
	}
	b.MinFeature = r.positive("min-feature")
}

// keyway reads iso, ansi or WxD.
func (r *reader) keyway(b *body.Spec) {
	s, ok := r.value("keyway")
	if !ok {
		return
	}
	width, depth, isSize := strings.Cut(s, "x")
	if !isSize {
		switch r.choice("keyway", []string{"iso", "ansi"}, "") {
		case "iso":
			b.Keyway.Standard = body.KeyISO
		case "ansi":
			b.Keyway.Standard = body.KeyANSI
		}
		return
	}
	const hint = "give iso, ansi, or width x depth from the bore's crown such as 6x2.8"
	w, okW := r.part("keyway", s, width, hint)
	d, okD := r.part("keyway", s, depth, hint)
	if okW && okD {
		b.Keyway = body.Keyway{Standard: body.KeyCustom, Width: w.in(r.bare), Depth: d.in(r.bare)}
		r.input["keyway"] = w.text(r.bare) + "x" + d.text(r.bare)
	}
}

// holeCircle reads NxD@BCD: N holes of diameter D on a circle of diameter BCD.
func (r *reader) holeCircle(b *body.Spec, s string) {
	const hint = "give number x diameter @ bolt circle diameter, such as 6x5.5@40"
	count, sizes, okX := strings.Cut(s, "x")
	diameter, circle, okAt := strings.Cut(sizes, "@")
	if !okX || !okAt {
		r.fail("hole-circle", s, "is not of the form NxD@BCD", hint)
		return
	}
	n, okN := r.wholePart("hole-circle", s, count, hint)
	d, okD := r.part("hole-circle", s, diameter, hint)
	c, okC := r.part("hole-circle", s, circle, hint)
	if okN && okD && okC {
		b.HoleCircles = append(b.HoleCircles, body.HoleCircle{N: n, Diameter: d.in(r.bare), Circle: c.in(r.bare)})
		list, _ := r.input["hole-circle"].([]string)
		r.input["hole-circle"] = append(list, strconv.Itoa(n)+"x"+d.text(r.bare)+"@"+c.text(r.bare))
	}
}
