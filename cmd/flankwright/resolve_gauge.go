package main

import (
	"strconv"
	"strings"

	"flankwright/profile/gauge"
)

// measuring is what is asked of a part's inspection. Lengths are mm; zero values ask
// for nothing beyond the dimensions themselves.
type measuring struct {
	only           bool // nothing is to be drawn
	pin            float64
	series         string // of DIN 3967, in place of the allowance
	allowance      *gauge.Allowance
	class          int
	spans          []gauge.SpanReading
	overPins       []float64
	chords         []float64
	mateTeeth      int
	centerDistance float64
}

// gauge reads the flags of the gauge command; without them nothing is asked for.
func (r *reader) gauge(j *partJob) {
	m := &j.measuring
	m.pin = r.positive("pin-diameter")
	r.allowance(m)
	m.class, _ = r.count("flank-class")
	m.spans = r.spans()
	m.overPins = r.lengths("measured-over-pins")
	m.chords = r.lengths("measured-chord")
	m.mateTeeth, _ = r.count("mate-teeth")
	m.centerDistance = r.positive("center-distance")
	if m.centerDistance != 0 && !r.request.given("mate-teeth") {
		r.fail("center-distance", "", "there is no mate", "give --mate-teeth as well")
	}
	if m.mateTeeth != 0 && len(m.spans)+len(m.overPins)+len(m.chords) == 0 {
		r.fail("mate-teeth", "", "there is no measured value to find the backlash of", "give a measured value as well")
	}
}

// allowance reads UPPER,LOWER or the name of a series.
func (r *reader) allowance(m *measuring) {
	const name = "thickness-allowance"
	s, ok := r.value(name)
	if !ok {
		return
	}
	upper, lower, isPair := strings.Cut(s, ",")
	if !isPair {
		m.series = s
		r.input[name] = s
		return
	}
	const hint = "give upper and lower deviation, such as -0.05,-0.1, or a series such as cd25"
	u, errU := parseLength(upper)
	l, errL := parseLength(lower)
	for _, err := range []error{errU, errL} {
		if err != nil {
			r.fail(name, s, err.Error(), hint)
			return
		}
	}
	m.allowance = &gauge.Allowance{Upper: u.in(r.bare), Lower: l.in(r.bare)}
	r.input[name] = u.text(r.bare) + "," + l.text(r.bare)
}

// spans reads K:L, each time it is given.
func (r *reader) spans() []gauge.SpanReading {
	const name, hint = "measured-span", "give teeth : length, such as 4:21.32"
	var list []gauge.SpanReading
	var texts []string
	for _, s := range r.request.values[name] {
		count, value, ok := strings.Cut(s, ":")
		if !ok {
			r.fail(name, s, "is not of the form K:L", hint)
			continue
		}
		k, okK := r.wholePart(name, s, count, hint)
		l, okL := r.part(name, s, value, hint)
		if okK && okL {
			list = append(list, gauge.SpanReading{TeethSpanned: k, Value: l.in(r.bare)})
			texts = append(texts, strconv.Itoa(k)+":"+l.text(r.bare))
		}
	}
	if texts != nil {
		r.input[name] = texts
	}
	return list
}

// lengths reads a repeatable length.
func (r *reader) lengths(name string) []float64 {
	var list []float64
	var texts []string
	for _, s := range r.request.values[name] {
		if l, ok := r.part(name, s, s, "give a length such as 2mm, 0.08in, 5um or 3thou"); ok {
			list = append(list, l.in(r.bare))
			texts = append(texts, l.text(r.bare))
		}
	}
	if texts != nil {
		r.input[name] = texts
	}
	return list
}
