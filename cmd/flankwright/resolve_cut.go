package main

import (
	"strconv"
	"strings"
)

// part reads a length that is part of a value; it must be above zero.
func (r *reader) part(name, whole, s, hint string) (length, bool) {
	l, err := parseLength(s)
	switch {
	case err != nil:
		r.fail(name, whole, strconv.Quote(s)+": "+err.Error(), hint)
	case l.number <= 0:
		r.fail(name, whole, strconv.Quote(s)+" must be above zero", hint)
	default:
		return l, true
	}
	return length{}, false
}

// wholePart reads a count above zero that is part of a value.
func (r *reader) wholePart(name, whole, s, hint string) (int, bool) {
	const most = 10000 // more of anything is a slip
	n, err := strconv.Atoi(s)
	if err != nil || n < 1 || n > most || strings.ContainsAny(s, "+_") {
		r.fail(name, whole, strconv.Quote(s)+" is not a count above zero", hint)
		return 0, false
	}
	return n, true
}

// cut reads the beam and the aids for it.
func (r *reader) cut(j *partJob) {
	j.kerf = r.positive("kerf")
	j.leadIn = r.positive("lead-in")
	if s, ok := r.value("tabs"); ok {
		const hint = "give number x width, such as 4x0.5"
		count, width, okX := strings.Cut(s, "x")
		if !okX {
			r.fail("tabs", s, "is not of the form NxW", hint)
		} else if n, ok := r.wholePart("tabs", s, count, hint); ok {
			if w, ok := r.part("tabs", s, width, hint); ok {
				j.tabs, j.tabWidth = n, w.in(r.bare)
				r.input["tabs"] = strconv.Itoa(n) + "x" + w.text(r.bare)
			}
		}
	}
	for _, name := range []string{"lead-in", "tabs"} {
		if j.extent.Partial() && r.request.given(name) {
			r.fail(name, "", "needs the whole outline", "leave --extent out")
		}
	}
	if s, ok := r.value("label"); ok {
		if strings.TrimSpace(s) == "" {
			r.fail("label", "", "is empty", "give the text, or leave --label out")
		}
		j.label = s
		r.input["label"] = s
	}
	j.labelHeight = r.positive("label-height")
	if r.request.given("label-height") && !r.request.given("label") {
		r.fail("label-height", "", "there is no label", "give --label TEXT as well")
	}
}
