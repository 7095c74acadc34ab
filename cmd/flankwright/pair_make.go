package main

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/sidecar"
	"flankwright/profile"
	"flankwright/profile/fit"
	"flankwright/profile/mesh"
)

// pairMade is a pair ready to be written or reported.
type pairMade struct {
	job      pairJob
	pair     *mesh.Pair
	members  [2]*partMade
	drawn    mesh.Drawn
	bound    float64 // mm, of the transmission error
	kerfed   bool    // the drawn mesh is that of what beams leave
	assembly export.Drawing
	doc      *sidecar.Document
}

func (m *pairMade) unit() export.Unit           { return m.members[0].part.Unit }
func (m *pairMade) document() *sidecar.Document { return m.doc }

// sheets are both members and the assembly.
func (m *pairMade) sheets() []sheetOf {
	return []sheetOf{{m.members[0].drawing, m.members[0].dxf}, {m.members[1].drawing, m.members[1].dxf}, {m.assembly, m.members[0].dxf}}
}

// makePair solves both members, draws them, rolls the drawings and lays them out.
func (j pairJob) makePair() (*pairMade, error) {
	show := sidecar.Show(j.members[0].unit)
	pair, err := mesh.Solve(j.mesh)
	if err != nil {
		return nil, fromFindings(err, show)
	}
	m := &pairMade{job: j, pair: pair}
	var found problems
	for i := range m.members {
		job := j.members[i]
		job.spec = pair.Teeth[i].Spec
		made, err := makePart(job)
		if err != nil {
			found = append(found, ofMember(err, i)...)
			continue
		}
		m.members[i] = made
		// Those of the teeth are known from the pair.
		for _, w := range made.warnings {
			if !isAmong(w, pair.Teeth[i].Warnings) {
				w.Text = fmt.Sprintf("member %d: %s", i+1, w.Text)
				pair.Warnings = append(pair.Warnings, w)
			}
		}
	}
	if found != nil {
		return nil, found
	}
	if err := m.roll(show); err != nil {
		return nil, err
	}
	place, err := m.assemble()
	if err != nil {
		return nil, err
	}
	m.describe(place, show)
	return m, nil
}

func isAmong(f profile.Finding, list []profile.Finding) bool {
	for _, other := range list {
		if f.Rule == other.Rule && f.Param == other.Param {
			return true
		}
	}
	return false
}

// ruleDrawnMesh is broken by drawings that do not run together.
const ruleDrawnMesh profile.Rule = "drawn-mesh"

// roll proves the mesh on the drawn curves: of the parts, or of what the beams leave.
func (m *pairMade) roll(show func(profile.Quantity) string) error {
	var curves [2]mesh.Curves
	allowed := 0.0
	for i, member := range m.members {
		outline := member.part.Tooth.Outline
		if kerf := m.job.members[i].kerf; kerf > 0 {
			beam, err := member.part.Tooth.Beam(kerf)
			if err != nil {
				return fromFindings(err, show)
			}
			m.kerfed = true
			outline = beam.Leaves()
		}
		drawn, err := fit.NewTooth(outline, m.job.members[i].fit)
		if err != nil {
			return fromFindings(err, show)
		}
		curves[i] = mesh.CurvesOf(outline, drawn)
		allowed += drawn.Tolerance
	}
	p := m.pair
	m.drawn = p.Roll(p.CenterDistance, curves[0], curves[1])
	// Each flank may stand off by its tolerance along the normal, either way.
	m.bound = 2 * allowed / math.Cos(p.OperatingAngle(p.CenterDistance))
	var found profile.Violations
	if m.drawn.Overlap > m.bound {
		found = append(found, profile.Finding{Rule: ruleDrawnMesh, Param: mesh.ParamCenterDistance, Value: profile.LengthOf(p.CenterDistance), Bound: profile.LengthOf(m.drawn.Overlap),
			Text: "the drawn members overlap by {bound}", Hint: "give more --backlash or another --center-distance"})
	}
	if m.drawn.Gap <= 0 {
		found = append(found, profile.Finding{Rule: ruleDrawnMesh, Param: profile.ParamKerf, Value: profile.LengthOf(m.drawn.Gap),
			Text: "a drawn tip meets what is left in the other's root, by {value}", Hint: "take a narrower beam, or shorten the tip"})
	}
	if m.drawn.Error > m.bound && p.Ratio >= 1 {
		found = append(found, profile.Finding{Rule: ruleDrawnMesh, Param: profile.ParamTipShortening, Value: profile.LengthOf(m.drawn.Error), Bound: profile.LengthOf(m.bound),
			Text: "the drawn members run with a transmission error of {value}, and their tolerances allow {bound}: they touch beside their flanks",
			Hint: "shorten the tips, or give an undercut member more profile shift"})
	}
	if found != nil {
		return fromFindings(found, show)
	}
	return nil
}

// placement is where the assembly has member 2.
type placement struct {
	turns [2]float64
	at    r2.Vec
}

// assemble lays both parts out in mesh: member 1 at the origin, member 2 on +X, a tooth of
// 1 in a space of 2, with contact on the driving flank. Parts are shown, not the paths of
// beams.
func (m *pairMade) assemble() (placement, error) {
	p := m.pair
	second := m.members[1].part.Tooth
	play := m.drawn.Backlash / 2
	if m.job.drive == "cw" {
		play = -play // the other flank
	}
	place := placement{turns: [2]float64{-math.Pi / 2, math.Pi / 2}, at: r2.Vec{X: p.CenterDistance}}
	own := 0.0 // a rack's way along itself
	switch second.Form {
	case profile.FormRing:
		// The mesh is opposite the ring's axis, on -X.
		place.turns[0] = math.Pi / 2
		place.turns[1] += second.Pitch()/2 - play/p.PitchRadii(p.CenterDistance)[1]
	case profile.FormRack:
		middle := math.Floor(float64(second.Teeth)/2) - 0.5 // a space, counted in pitches
		if m.job.members[1].extent.HalfTeeth {
			middle++
		}
		own = -math.Max(middle, 0.5)*second.Advance - play
		place.at = r2.Add(place.at, r2.Rotate(r2.Vec{X: own}, place.turns[1], r2.Vec{}))
	default:
		place.turns[1] += second.Pitch()/2 + play/p.PitchRadii(p.CenterDistance)[1]
	}
	var drawings []export.Drawing
	for i := range m.members {
		job := m.job.members[i]
		job.spec, job.kerf, job.leadIn, job.tabs, job.turn = p.Teeth[i].Spec, 0, 0, 0, place.turns[i]
		made, err := makePart(job)
		if err != nil {
			return place, ofMember(err, i)
		}
		drawings = append(drawings, made.drawing)
	}
	m.assembly = export.Assembly(m.unit(), drawings, []r2.Vec{{}, place.at})
	return place, nil
}

// describe builds the sidecar.
func (m *pairMade) describe(place placement, show func(profile.Quantity) string) {
	unit := m.unit()
	mm := sidecar.MeshOf(m.pair, m.drawn, m.bound, unit)
	mm.DrawnMesh.Edge = "part"
	if m.kerfed {
		mm.DrawnMesh.Edge = "what the beam leaves"
	}
	mm.Placement = sidecar.PlacementOf(place.at, place.turns, m.job.drive, unit)
	var warnings []sidecar.Warning
	for _, w := range m.pair.Warnings {
		message, _ := w.Describe(show)
		warnings = append(warnings, sidecar.Warning{Code: string(w.Rule), Message: message})
	}
	if warnings == nil {
		warnings = []sidecar.Warning{}
	}
	docs := [2]*sidecar.Document{m.members[0].document(), m.members[1].document()}
	thinning := [2]float64{m.pair.Teeth[0].Spec.Thinning, m.pair.Teeth[1].Spec.Thinning}
	m.doc = sidecar.OfPair(program(), m.job.input, docs, mm, mm.ProfileShift, thinning, m.assembly, warnings)
}
