package main

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/sidecar"
	"flankwright/profile"
	"flankwright/profile/body"
	"flankwright/profile/fit"
	"flankwright/profile/label"
)

// partMade is a gear ready to be written or reported.
type partMade struct {
	part     export.Part
	body     *body.Body
	kerf     *sidecar.KerfReport
	features []body.Feature
	drawing  export.Drawing
	dxf      dxf.Options
	doc      *sidecar.Document
	warnings []profile.Finding
	choices  []sidecar.Chosen

	inspection export.Inspection
}

func (m *partMade) document() *sidecar.Document { return m.doc }
func (m *partMade) sheets() []sheetOf           { return []sheetOf{{m.drawing, m.dxf}} }

// maker collects what the geometry refuses and warns of while a gear is made.
type maker struct {
	job      partJob
	tooth    *profile.Tooth
	made     *partMade
	refused  profile.Violations
	warnings []profile.Finding
}

// refuse notes violations; anything else is returned.
func (m *maker) refuse(err error) error {
	var found profile.Violations
	if err == nil || !errors.As(err, &found) {
		return err
	}
	m.refused = append(m.refused, found...)
	return nil
}

// makePart solves, fits and lays out. Everything the geometry refuses is reported
// together, as far as it can be judged.
func makePart(j partJob) (*partMade, error) {
	show := sidecar.Show(j.unit)
	tooth, err := profile.Solve(j.spec)
	if err != nil {
		return nil, fromFindings(err, show)
	}
	m := &maker{job: j, tooth: tooth, made: &partMade{dxf: j.dxf}, warnings: tooth.Warnings}
	m.made.part = export.Part{Tooth: tooth, Fit: j.fit, Unit: j.unit, Turn: j.turn, Extent: j.extent, Reference: j.reference,
		Cut: export.Cut{LeadIn: j.leadIn, Tabs: j.tabs, TabWidth: j.tabWidth}}
	for _, step := range []func() error{m.makeBody, m.makeInspection, m.makeOutline, m.makeLabel} {
		if err := step(); err != nil {
			return nil, err
		}
	}
	if m.refused != nil {
		return nil, fromFindings(m.refused, show)
	}
	m.judgeFeatures()
	made := m.made
	made.drawing = made.part.Drawing()
	made.warnings = m.warnings
	made.doc = sidecar.Of(sidecar.Made{Program: program(), Input: j.input, Rack: j.rack, Part: made.part, Drawing: made.drawing,
		Features: made.features, Kerf: made.kerf, Choices: made.choices, Warnings: m.warnings, Inspection: made.inspection})
	return made, nil
}

// makeBody solves bore, holes and windows, and the beam's path along them.
func (m *maker) makeBody() error {
	around, ok := m.around()
	if !ok {
		return nil
	}
	solved, err := body.Solve(m.job.body, around)
	if err != nil {
		return m.refuse(err)
	}
	m.made.body = solved
	for _, c := range solved.Choices {
		m.choose(string(c.Param), c.Value, c.Why)
	}
	m.warnings = append(m.warnings, solved.Warnings...)
	m.made.part.Holes = solved.Loops
	if m.job.kerf == 0 {
		return nil
	}
	m.made.kerf = &sidecar.KerfReport{Width: m.job.kerf}
	m.made.part.Holes = nil
	for _, l := range solved.Loops {
		path, left, err := l.Parallel(m.job.kerf / 2)
		if err != nil {
			return m.refuse(err)
		}
		m.made.part.Holes = append(m.made.part.Holes, path)
		for _, at := range left {
			m.leave("corner of the "+l.Name, at)
		}
	}
	return nil
}

// choose notes a value nobody gave.
func (m *maker) choose(flag string, v profile.Quantity, reason string) {
	m.made.choices = append(m.made.choices, sidecar.Chosen{Flag: flag, Value: v, Reason: reason})
}

// makeOutline fits the toothed edge, or the beam's path along it.
func (m *maker) makeOutline() error {
	outline := m.tooth.Outline
	if m.job.kerf > 0 {
		beam, err := m.tooth.Beam(m.job.kerf)
		if err != nil {
			return m.refuse(err)
		}
		outline = beam.Outline
		for _, at := range beam.Leftovers {
			m.leave("root fillet", at)
		}
	}
	drawn, err := fit.NewTooth(outline, m.job.fit)
	if err != nil {
		return m.refuse(err)
	}
	m.made.part.Drawn = drawn
	m.made.part.Bar.Outside = m.job.kerf / 2
	if m.job.rim > 0 {
		m.made.part.RimRadius = (m.job.rim + m.job.kerf) / 2
	}
	if m.made.kerf != nil {
		if err := m.measurePart(); err != nil {
			return m.refuse(err)
		}
	}
	m.checkTabs(drawn)
	return nil
}

// measurePart measures the part itself where the beam's path is drawn.
func (m *maker) measurePart() error {
	part, err := fit.NewTooth(m.tooth.Outline, m.job.fit)
	if err != nil {
		return err
	}
	k := m.made.kerf
	if m.job.spec.Form == profile.FormRack {
		edge := part.Rack(m.job.extent.HalfTeeth, fit.Bar{Height: m.made.part.Bar.Height}, 0)
		k.PartArea, k.PartPerimeter = edge.Area(), edge.Length()
		return nil
	}
	edge := part.Outline(fit.Extent{}, 0)
	k.PartArea, k.PartPerimeter = edge.Area(), edge.Length()
	if m.job.spec.Form == profile.FormRing {
		rim := m.job.rim / 2
		k.PartArea = math.Max(0, math.Pi*rim*rim-k.PartArea)
	}
	if m.made.body != nil {
		k.PartArea -= m.made.body.HoleArea()
	}
	return nil
}

// leave notes a place the beam cannot reach, where it is in the drawing; the warning is
// given once for places alike.
func (m *maker) leave(place string, at profile.Leftover) {
	at.At = r2.Rotate(at.At, m.job.turn, r2.Vec{})
	known := false
	for _, l := range m.made.kerf.Leftover {
		known = known || l.Place == place
	}
	m.made.kerf.Leftover = append(m.made.kerf.Leftover, sidecar.LeftoverAt{Place: place, Leftover: at})
	if known {
		return
	}
	m.warnings = append(m.warnings, profile.Finding{Rule: profile.RuleKerfLeaves, Param: profile.ParamKerf,
		Value: profile.LengthOf(m.job.kerf), Bound: profile.LengthOf(at.Depth),
		Also: []profile.Quantity{profile.LengthOf(at.At.X), profile.LengthOf(at.At.Y)},
		Text: fmt.Sprintf("a beam {value} wide leaves {bound} of material at the %s near ({0}, {1}) and places like it", place)})
}

// checkTabs judges tabs against the lands they lie on.
func (m *maker) checkTabs(drawn *fit.Tooth) {
	j := m.job
	if j.tabs == 0 {
		return
	}
	if j.tabs >= j.spec.Teeth {
		m.refused = append(m.refused, profile.Finding{Rule: profile.RuleOutOfRange, Param: "tabs", Value: profile.NumberOf(float64(j.tabs)),
			Bound: profile.NumberOf(float64(j.spec.Teeth - 1)),
			Text:  "{value} tabs do not fit on the tip lands beside tooth 1", Hint: "ask for at most {bound}"})
	}
	if land := drawn.LandWidth(); j.tabWidth >= land {
		m.refused = append(m.refused, profile.Finding{Rule: ruleTabTooWide, Param: "tabs", Value: profile.LengthOf(j.tabWidth),
			Bound: profile.LengthOf(land).AtMost(),
			Text:  "a tab {value} wide reaches onto the flanks: the tip land is {bound} wide", Hint: "make tabs narrower than {bound}"})
	}
}

// ruleTabTooWide is broken by tabs wider than the land.
const ruleTabTooWide profile.Rule = "tab-too-wide"

// makeLabel places the label on the web.
func (m *maker) makeLabel() error {
	if m.job.label == "" || m.made.body == nil {
		return nil
	}
	if m.job.spec.Form == profile.FormRing && m.job.rim == 0 {
		m.refused = append(m.refused, profile.Finding{Rule: label.RuleNoRoom, Param: label.ParamLabel,
			Text: "a label has no rim to lie on", Hint: "give --rim-diameter as well"})
		return nil
	}
	placed, err := label.Place(m.job.label, m.job.labelHeight, m.made.body)
	if err != nil {
		return m.refuse(err)
	}
	m.made.part.Label = placed.Paths
	if placed.Chosen {
		m.choose(string(label.ParamHeight), profile.LengthOf(placed.Height), "the largest ISO 3098 lettering height that fits on the web")
	}
	return nil
}
