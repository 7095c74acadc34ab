package main

import (
	"fmt"
	"math"
	"strings"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/sidecar"
	"flankwright/profile"
	"flankwright/profile/body"
	"flankwright/profile/fit"
)

// defaultTolerance is the deviation allowed where none is asked for, mm: below
// what a laser or wire repeats, and still few entities.
const defaultTolerance = 0.001

// partJob is a request put into numbers.
type partJob struct {
	spec      profile.Spec
	body      body.Spec
	rack      sidecar.Rack
	fit       fit.Options
	unit      export.Unit
	extent    fit.Extent
	dxf       dxf.Options
	turn      float64 // rad
	reference bool
	kerf      float64 // mm; 0 draws the part's own edge
	leadIn    float64 // mm; 0 for none
	tabs      int
	tabWidth  float64 // mm
	label     string
	// labelHeight is in mm; 0 takes the largest that fits.
	labelHeight float64
	measuring   measuring
	rim         float64 // mm, outer diameter of a ring; 0 for none
	height      float64 // mm, of a rack; 0 takes ours
	input       map[string]any
}

func (j partJob) normalized() map[string]any { return j.input }
func (j partJob) make() (product, error)     { return makePart(j) }

// resolvePart reads a request for a gear. All that is malformed is reported
// together.
func resolvePart(req request) (partJob, error) {
	r := newReader(req)
	var j partJob
	switch req.command {
	case "ring":
		j.spec.Form = profile.FormRing
	case "rack":
		j.spec.Form = profile.FormRack
	}
	inch := r.size(&j)
	r.teeth(&j)
	r.rack(&j, inch)
	r.form(&j)
	r.body(&j)
	r.drawing(&j, inch)
	r.cut(&j)
	r.gauge(&j)
	j.input = r.input
	if r.found != nil {
		return partJob{}, r.found
	}
	return j, nil
}

// size reads which size is given, which settles the unit of bare lengths, and says
// whether it is in the inch system.
func (r *reader) size(j *partJob) (inch bool) {
	var named []string
	for _, name := range alternatives()[0] {
		if r.request.given(name) {
			named = append(named, "--"+name)
		}
	}
	if len(named) != 1 {
		message := "no size is given"
		if len(named) > 1 {
			message = "more than one size is given: " + strings.Join(named, ", ")
		}
		r.found = append(r.found, problem{message: message,
			hint: "give exactly one of --module, --diametral-pitch, --circular-pitch", exit: exitMalformed})
	}
	mm, in := units()[0], units()[2]
	switch {
	case r.request.given("diametral-pitch"):
		r.bare = in
		if pitch, ok := r.number("diametral-pitch", ""); ok {
			if pitch <= 0 {
				r.fail("diametral-pitch", plain(pitch), "must be above zero", "give teeth per inch of reference diameter, such as 16")
			} else {
				j.spec.Module = export.MillimetresPerInch / pitch
			}
		}
	case r.request.given("circular-pitch"):
		r.bare = mm
		s, _ := r.value("circular-pitch")
		if l, err := parseLength(s); err == nil && l.unit != nil && l.unit.inch {
			r.bare = in
		}
		if pitch, ok := r.length("circular-pitch"); ok {
			j.spec.Module = pitch / math.Pi
		}
	default:
		if m, ok := r.length("module"); ok {
			j.spec.Module = m
		}
	}
	if j.spec.Module > 0 {
		r.module = j.spec.Module
	} else if len(named) == 1 && r.found == nil {
		s, _ := r.value(named[0][2:])
		r.fail(named[0][2:], s, "must be above zero", fmt.Sprintf("the module may be from %v to %v mm", profile.MinModule, profile.MaxModule))
	}
	return r.bare.inch
}

// teeth reads the number of teeth, which has no default.
func (r *reader) teeth(j *partJob) {
	if !r.request.given("teeth") {
		r.found = append(r.found, problem{message: "the number of teeth is missing", hint: "give --teeth N", exit: exitMalformed})
		return
	}
	j.spec.Teeth, _ = r.count("teeth")
}

// rack reads the basic rack and what is changed of it.
func (r *reader) rack(j *partJob, inch bool) {
	fallback := "iso53-a"
	if inch {
		fallback = "full-depth-20"
	}
	name := r.choice("basic-rack", rackNames(), fallback)
	standard, _ := profile.LookupRack(name, r.module)
	j.rack = sidecar.Rack{Name: name, Source: standard.Source}
	if standard.Note != "" {
		j.rack.Source += "; " + standard.Note
	}
	var change profile.RackChange
	set := func(to **float64, v float64, ok bool) {
		if ok {
			*to = &v
		}
	}
	angle, ok := r.angle("pressure-angle")
	set(&change.PressureAngle, angle, ok)
	addendum, ok := r.coefficient("addendum")
	set(&change.Addendum, addendum, ok)
	dedendum, ok := r.coefficient("dedendum")
	set(&change.Dedendum, dedendum, ok)
	if s, _ := r.value("root-radius"); s == "full" {
		r.input["root-radius"] = s
		j.spec.Rounding = profile.RoundingFull
	} else if radius, ok := r.coefficient("root-radius"); ok {
		change.RootRadius = &radius
		j.spec.Rounding = profile.RoundingExplicit
	}
	j.spec.Rack = standard.For(r.module, change)
	var overrides []string
	for _, name := range []string{"pressure-angle", "addendum", "dedendum", "root-radius"} {
		if r.request.given(name) {
			overrides = append(overrides, name)
		}
	}
	if overrides != nil {
		j.rack.Source += "; changed: " + strings.Join(overrides, ", ")
	}
}

// form reads shift, thinning and tip.
func (r *reader) form(j *partJob) {
	s := &j.spec
	s.ProfileShift, _ = r.number("profile-shift", "")
	s.Thinning, _ = r.length("thinning")
	if r.choice("thinning-by", []string{"flank", "infeed"}, "flank") == "infeed" {
		s.ThinningBy = profile.ThinByInfeed
	}
	s.TipDiameter = r.positive("tip-diameter")
	s.TipShortening, _ = r.coefficient("tip-shortening")
	s.TipRadius, _ = r.length("tip-radius")
	s.TipChamfer, _ = r.length("tip-chamfer")
	s.MinTipThickness, _ = r.coefficient("min-tip-thickness")
	if n, ok := r.count("cutter-teeth"); ok {
		s.CutterTeeth = n
		if n == 0 {
			r.fail("cutter-teeth", "0", "must be above zero", "leave --cutter-teeth out for a root rounded by arcs")
		}
	}
	s.CutterShift, _ = r.number("cutter-shift", "")
	j.extent.HalfTeeth = r.choice("rack-ends", []string{"space", "tooth"}, "space") == "tooth"
	j.rim = r.positive("rim-diameter")
	j.height, _ = r.length("height")
}

// positive reads a length that must be above zero where it is given, since zero
// inside means that it is not.
func (r *reader) positive(name string) float64 {
	v, ok := r.length(name)
	if ok && v <= 0 {
		s, _ := r.value(name)
		r.fail(name, s, "must be above zero", fmt.Sprintf("leave --%s out for none", name))
	}
	return v
}
