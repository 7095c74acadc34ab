package main

import (
	"encoding/json"
	"fmt"
	"math"
	"slices"
	"strings"
	"text/tabwriter"

	"flankwright/export"
	"flankwright/export/sidecar"
	"flankwright/profile"
	"flankwright/profile/gauge"
)

// defaultUncertainty is the most by which a caliper's reading is off, mm: common
// practice, no source.
const defaultUncertainty = 0.02

// mostListed is how many candidates are printed.
const mostListed = 10

// runUnknown sizes an unmarked gear.
func runUnknown(io streams, req request, out output) error {
	r := newReader(req)
	unit := export.Millimetre
	if r.choice("unit", []string{"mm", "in"}, "mm") == "in" {
		unit, r.bare = export.Inch, units()[2]
	}
	m := gauge.Measurements{Uncertainty: defaultUncertainty}
	m.Teeth, _ = r.count("teeth")
	if !req.given("teeth") {
		r.found = append(r.found, problem{message: "the number of teeth is missing", hint: "count them and give --teeth N", exit: exitMalformed})
	}
	m.TipDiameter = r.positive("measured-tip-diameter")
	m.Spans = r.spans()
	pin := r.positive("pin-diameter")
	for _, v := range r.lengths("measured-over-pins") {
		m.Pins = append(m.Pins, gauge.PinReading{PinDiameter: pin, Value: v})
	}
	if m.Pins != nil && pin == 0 {
		r.fail("measured-over-pins", "", "the pins' diameter is missing", "give --pin-diameter L")
	}
	if u, ok := r.length("uncertainty"); ok {
		m.Uncertainty = u
	}
	known := []string{"unknown", "form", "teeth", "measured-tip-diameter", "measured-span", "measured-over-pins", "pin-diameter", "uncertainty", "unit", "json", "quiet"}
	for name := range req.values {
		if !slices.Contains(known, name) {
			r.fail(name, "", "does not go with --unknown, which finds it", "leave it out")
		}
	}
	if form, _ := r.value("form"); form != "" && form != "gear" {
		r.fail("form", form, "only external gears can be sized", "leave it out")
	}
	if r.found != nil {
		return r.found
	}
	found, err := gauge.Identify(m)
	if err != nil {
		return fromFindings(err, sidecar.Show(unit))
	}
	switch {
	case out.json:
		data, err := json.MarshalIndent(identified(m, found, unit), "", "  ")
		if err == nil {
			_, err = fmt.Fprintf(io.out, "%s\n", data)
		}
		return writeFailed("stdout", err)
	case out.quiet:
		return nil
	}
	_, err = fmt.Fprint(io.out, identification(m, found, unit))
	return writeFailed("stdout", err)
}

// sizeName is a size as the trade says it.
func sizeName(r gauge.Result) string {
	if r.DiametralPitch != 0 {
		return plain(r.DiametralPitch) + " P"
	}
	return "module " + plain(r.Module)
}

// identification is the answer in words.
func identification(m gauge.Measurements, found gauge.Identification, unit export.Unit) string {
	show := sidecar.Show(unit)
	length := func(v float64) string { return show(profile.LengthOf(v)) }
	var b strings.Builder
	fmt.Fprintf(&b, "%d gears explain every reading within %s\n\n", len(found.Results), length(m.Uncertainty))
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "\tsize\tpressure angle\tprofile shift\tthinning\ttip shortening\tworst residual\tmisfit")
	listed := found.Results[:min(len(found.Results), mostListed)]
	for i, r := range listed {
		worst := 0.0
		for _, v := range r.Residuals {
			worst = math.Max(worst, math.Abs(v))
		}
		fmt.Fprintf(w, "%d\t%s\t%s\t%.3f\t%s\t%s\t%s\t%.2f\n", i+1, sizeName(r), profile.AngleOf(r.PressureAngle), r.Shift, length(r.Thinning), length(r.Shortening), length(worst), r.Misfit)
	}
	w.Flush()
	if more := len(found.Results) - len(listed); more > 0 {
		fmt.Fprintf(&b, "and %d more that fit less well\n", more)
	}
	fmt.Fprintln(&b)
	for i, r := range listed {
		fmt.Fprintf(&b, "%d: %s\n", i+1, drawCommand(m, r))
	}
	fmt.Fprintln(&b)
	if found.Unique {
		fmt.Fprintln(&b, "unique: no other preferred size and pressure angle explains the readings")
	} else {
		fmt.Fprintln(&b, "not unique: these readings do not tell the sizes apart")
	}
	if d := found.Next; d != nil {
		fmt.Fprintf(&b, "measure %s: 1 would give %s and 2 %s%s\n", distinctionName(*d, length), length(d.Predicted[0]), length(d.Predicted[1]),
			map[bool]string{false: ", a difference your uncertainty may hide"}[d.Enough])
	}
	return b.String()
}

// distinctionName is a measurement in words.
func distinctionName(d gauge.Distinction, length func(float64) string) string {
	switch d.Param {
	case gauge.ParamMeasuredSpan:
		return fmt.Sprintf("the span over %d teeth", d.TeethSpanned)
	case gauge.ParamMeasuredOverPins:
		return "over pins " + length(d.PinDiameter)
	}
	return "the tip diameter"
}

// drawCommand is the command that draws a candidate.
func drawCommand(m gauge.Measurements, r gauge.Result) string {
	number := func(v float64) string { return plain(math.Round(v*1e4) / 1e4) }
	s := "flankwright gear --module " + plain(r.Module)
	if r.DiametralPitch != 0 {
		s = "flankwright gear --diametral-pitch " + plain(r.DiametralPitch)
	}
	s += fmt.Sprintf(" --teeth %d", m.Teeth)
	if len(r.Racks) > 0 {
		s += " --basic-rack " + r.Racks[0]
	} else {
		s += " --pressure-angle " + plain(math.Round(r.PressureAngle*180/math.Pi*1e6)/1e6) + " --addendum " + number(r.Addendum)
	}
	if x := number(r.Shift); x != "0" {
		s += " --profile-shift " + x
	}
	if e := number(r.Thinning); e != "0" {
		s += " --thinning " + e + "mm"
	}
	if k := number(r.Shortening); k != "0" {
		s += " --tip-shortening " + k + "mm"
	}
	return s
}

// identifiedGear is a candidate as JSON. Lengths are in the unit named.
type identifiedGear struct {
	Module         sidecar.Value   `json:"module"`
	DiametralPitch float64         `json:"diametral_pitch,omitempty"`
	PressureAngle  sidecar.Value   `json:"pressure_angle"`
	Racks          []string        `json:"basic_racks,omitempty"`
	Shift          float64         `json:"profile_shift"`
	ShiftRange     [2]float64      `json:"profile_shift_range"`
	Thinning       sidecar.Value   `json:"thinning"`
	Shortening     sidecar.Value   `json:"tip_shortening"`
	Residuals      []sidecar.Value `json:"residuals"`
	Misfit         float64         `json:"misfit"`
	Command        string          `json:"command"`
}

// identified is the answer as JSON.
func identified(m gauge.Measurements, found gauge.Identification, unit export.Unit) any {
	length := func(mm float64, symbol string) sidecar.Value {
		return sidecar.Value{Value: sidecar.Decimal(mm * unit.Scale()), Unit: unit.String(), Symbol: symbol}
	}
	var list []identifiedGear
	for _, r := range found.Results {
		g := identifiedGear{Module: length(r.Module, "m"), DiametralPitch: r.DiametralPitch,
			PressureAngle: sidecar.Value{Value: sidecar.Decimal(r.PressureAngle * 180 / math.Pi), Unit: "deg", Symbol: "alpha"},
			Racks:         r.Racks, Shift: r.Shift, ShiftRange: [2]float64{r.ShiftMin, r.ShiftMax},
			Thinning: length(r.Thinning, "E"), Shortening: length(r.Shortening, "k"), Misfit: r.Misfit, Command: drawCommand(m, r)}
		for _, v := range r.Residuals {
			g.Residuals = append(g.Residuals, length(v, "v"))
		}
		list = append(list, g)
	}
	answer := map[string]any{"schema": "flankwright/identification/v1", "unique": found.Unique, "candidates": list, "cautions": export.Cautions()}
	if d := found.Next; d != nil {
		answer["next"] = map[string]any{"measure": distinctionName(*d, func(v float64) string { return sidecar.Show(unit)(profile.LengthOf(v)) }),
			"first": length(d.Predicted[0], "M"), "second": length(d.Predicted[1], "M"), "enough": d.Enough}
	}
	return answer
}
