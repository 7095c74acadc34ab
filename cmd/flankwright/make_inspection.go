package main

import (
	"fmt"

	"flankwright/export"
	"flankwright/profile"
	"flankwright/profile/gauge"
	"flankwright/profile/mesh"
)

const (
	ruleMate       profile.Rule  = "mate-teeth"
	paramMateTeeth profile.Param = "mate-teeth"
)

// makeInspection works out what the part is inspected by, and what readings mean.
func (m *maker) makeInspection() error {
	ask := m.job.measuring
	d := m.tooth.Dimensions
	if ask.series != "" {
		allowance, err := gauge.AllowanceSeries(ask.series, d.ReferenceDiameter)
		if err != nil {
			return m.refuse(err)
		}
		ask.allowance = &allowance
	}
	system := gauge.Metric
	if m.job.unit == export.Inch {
		system = gauge.Inch
	}
	g, inspection, err := export.Inspect(m.tooth, m.made.part.Bar.Height, system, ask.pin, ask.allowance)
	m.made.inspection = inspection
	if err != nil {
		return m.refuse(err)
	}
	if ask.class != 0 {
		tolerances, err := gauge.FlankTolerances(ask.class, d.Teeth, d.ReferenceDiameter, d.Module)
		if err != nil {
			return m.refuse(err)
		}
		rounded := tolerances.Rounded()
		m.made.inspection.Class, m.made.inspection.ClassNumber = &rounded, ask.class
	}
	return m.readings(g)
}

// readings turns measured values into thicknesses.
func (m *maker) readings(g gauge.Gear) error {
	ask := m.job.measuring
	add := func(name string, measured, nominal float64, r gauge.Reading, err error) error {
		if err != nil {
			return m.refuse(err)
		}
		entry := export.Reading{Name: name, Measured: measured, Nominal: nominal, Reading: r}
		if ask.mateTeeth != 0 {
			play, err := m.play(r.Thinning)
			if err != nil {
				return m.refuse(err)
			}
			entry.Backlash = &play
		}
		m.made.inspection.Readings = append(m.made.inspection.Readings, entry)
		return nil
	}
	for _, s := range ask.spans {
		r, err := g.FromSpan(s.TeethSpanned, s.Value)
		nominal := 0.0
		if err == nil {
			var span gauge.Span
			if span, err = g.Span(s.TeethSpanned); err == nil {
				nominal = span.Value
			}
		}
		if err := add(fmt.Sprintf("span over %d teeth", s.TeethSpanned), s.Value, nominal, r, err); err != nil {
			return err
		}
	}
	p, c := m.made.inspection.Pins, m.made.inspection.Chord
	if p == nil && ask.overPins != nil || c == nil && ask.chords != nil {
		m.refused = append(m.refused, m.made.inspection.Missing...)
		return nil
	}
	if p != nil {
		for _, v := range ask.overPins {
			r, err := g.FromPins(p.Nominal.PinDiameter, v)
			if err := add(pinsLie(m.tooth.Form)+" pins", v, p.Nominal.Value, r, err); err != nil {
				return err
			}
		}
	}
	if c != nil {
		for _, v := range ask.chords {
			r, err := g.FromChord(c.Nominal.Height, v)
			if err := add("chordal thickness", v, c.Nominal.Thickness, r, err); err != nil {
				return err
			}
		}
	}
	return nil
}

// play is the backlash that a measured thinning has with a nominal mate, a gear.
func (m *maker) play(thinning float64) (mesh.Play, error) {
	ask, s := m.job.measuring, m.job.spec
	members := mesh.Members{Module: s.Module, PressureAngle: s.Rack.PressureAngle, Teeth: [2]int{ask.mateTeeth, s.Teeth}, Second: m.tooth.Form}
	if m.tooth.Form == profile.FormRing && ask.mateTeeth >= s.Teeth {
		return mesh.Play{}, profile.Violations{{Rule: ruleMate, Param: paramMateTeeth, Value: profile.NumberOf(float64(ask.mateTeeth)), Bound: profile.NumberOf(float64(s.Teeth - 1)),
			Text: "a gear of {value} teeth does not fit into the ring", Hint: "it must have at most {bound}"}}
	}
	a := ask.centerDistance
	if a == 0 {
		a = members.Reference()
	}
	return members.PlayAt(a, [2]float64{0, s.ProfileShift}, [2]float64{0, thinning})
}
