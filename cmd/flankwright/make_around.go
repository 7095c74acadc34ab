package main

import (
	"flankwright/profile"
	"flankwright/profile/body"
)

// ruleHeight is broken by a back that lies in a rack's teeth.
const ruleHeight profile.Rule = "height-above-root"

// ruleNoOuterEdge warns of a ring without a rim.
const ruleNoOuterEdge profile.Rule = "no-outer-edge"

// around is what the teeth leave for the body; false where there is nothing.
func (m *maker) around() (body.Around, bool) {
	d, j := m.tooth.Dimensions, m.job
	a := body.Around{Form: j.spec.Form, RootDiameter: d.RootDiameter, WholeDepth: d.WholeDepth, Module: d.Module, RimDiameter: j.rim}
	switch j.spec.Form {
	case profile.FormRing:
		if j.rim == 0 && !j.measuring.only {
			m.warnings = append(m.warnings, profile.Finding{Rule: ruleNoOuterEdge, Param: profile.ParamRimDiameter,
				Text: "the outer edge is missing: the drawing holds the toothed bore only; give --rim-diameter"})
		}
	case profile.FormRack:
		height := m.rackHeight()
		if height <= 0 {
			return a, false
		}
		a.RootDiameter = 1 // of no meaning
		half := d.CircularPitch / 2
		a.Bar = body.Bar{Left: -half, Right: (float64(d.Teeth) - 0.5) * d.CircularPitch, Back: -height, Root: -d.Dedendum}
		if j.extent.HalfTeeth {
			a.Bar.Left, a.Bar.Right = 0, a.Bar.Right+half
		}
	}
	return a, true
}

// rackHeight settles how far the back lies below the datum line; 0 where it cannot.
func (m *maker) rackHeight() float64 {
	d, height := m.tooth.Dimensions, m.job.height
	const backup = 1.2 // whole depths below the roots, as rims are given
	if _, given := m.job.input["height"]; !given {
		height = d.Dedendum + backup*d.WholeDepth
		m.choose(string(profile.ParamHeight), profile.LengthOf(height), "1.2 whole depths below the roots")
	}
	// The walls of the bar must have some length to be drawn.
	const least = 1e-3 // modules
	if lowest := d.Dedendum + least*d.Module; height < lowest {
		m.refused = append(m.refused, profile.Finding{Rule: ruleHeight, Param: profile.ParamHeight, Value: profile.LengthOf(height),
			Bound: profile.LengthOf(lowest).AtLeast(), Also: []profile.Quantity{profile.LengthOf(d.Dedendum)},
			Text: "a height of {value} ends above the root line, which lies {0} below the datum line", Hint: "make the height at least {bound}"})
		return 0
	}
	m.made.part.Bar.Height = height
	return height
}
