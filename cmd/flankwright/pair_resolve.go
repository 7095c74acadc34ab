package main

import (
	"math"
	"strconv"

	"flankwright/profile/mesh"
)

// pairJob is a pair's request put into numbers.
type pairJob struct {
	forms   [2]string
	members [2]partJob
	mesh    mesh.Request
	drive   string
	bare    unit
	input   map[string]any
}

func (j pairJob) normalized() map[string]any { return j.input }
func (j pairJob) make() (product, error)     { return j.makePair() }

// newReaderOf is a reader with the unit of the pair's bare lengths.
func newReaderOf(j pairJob) *reader {
	r := newReader(request{})
	r.bare = j.bare
	return r
}

// sharedFlags are the same for both members.
func sharedFlags() []string {
	return []string{"module", "diametral-pitch", "circular-pitch", "pressure-angle", "unit", "dxf", "loose", "curves", "tolerance", "extent", "reference"}
}

// resolvePair reads a pair's request: each member's as that of a part, then how they mesh.
func resolvePair(req request) (pairJob, error) {
	j := pairJob{forms: [2]string{"gear", "gear"}, drive: "ccw"}
	r := newReader(req)
	internal := r.on("internal")
	members, found := splitMembers(req, &j.forms, internal)
	if found != nil {
		return j, found
	}
	for i := range members {
		job, err := resolvePart(members[i])
		if err != nil {
			found = append(found, ofMember(err, i)...)
			continue
		}
		j.members[i] = job
	}
	if found != nil {
		return j, found
	}
	// The size settles what bare lengths mean.
	var size partJob
	r.size(&size)
	j.bare = r.bare
	r.input = map[string]any{"command": "pair"}
	r.mesh(&j, members)
	if j.members[0].spec.Rack.PressureAngle != j.members[1].spec.Rack.PressureAngle {
		r.fail("basic-rack", "", "the members' pressure angles differ", "give both one basic rack")
	}
	if r.found != nil {
		return j, r.found
	}
	j.input = joinInputs(j.members[0].input, j.members[1].input, r.input)
	if j.forms[1] == "rack" {
		j.input["teeth"] = strconv.Itoa(j.members[0].spec.Teeth) + ",rack"
	}
	return j, nil
}

// mesh reads how the members run together.
func (r *reader) mesh(j *pairJob, members [2]request) {
	m := &j.mesh
	for i := range m.Specs {
		m.Specs[i] = j.members[i].spec
		m.ShiftGiven = m.ShiftGiven || members[i].given("profile-shift")
		m.TipGiven[i] = members[i].given("tip-diameter") || members[i].given("tip-shortening")
	}
	m.CenterDistance = r.positive("center-distance")
	m.Tolerance = r.positive("center-distance-tolerance")
	switch r.choice("shift-balance", []string{"sliding", "equal", "first"}, "sliding") {
	case "equal":
		m.Balance = mesh.BalanceEqual
	case "first":
		m.Balance = mesh.BalanceFirst
	}
	if r.request.given("shift-balance") && (m.ShiftGiven || m.CenterDistance == 0) {
		r.fail("shift-balance", "", "there is no sum of shifts to part", "give --center-distance, and no --profile-shift")
	}
	m.Backlash, m.BacklashGiven = r.length("backlash")
	if m.Backlash < 0 {
		r.fail("backlash", plain(m.Backlash), "must not be negative", "give the play, or 0")
	}
	switch r.choice("backlash-rule", []string{"agma", "iso"}, "") {
	case "agma":
		m.Rule = mesh.RuleAGMA
	case "iso":
		m.Rule = mesh.RuleISO
	}
	if m.BacklashGiven && m.Rule != mesh.NoRule {
		r.fail("backlash-rule", "", "the backlash is given as well", "give --backlash or --backlash-rule")
	}
	if (m.BacklashGiven || m.Rule != mesh.NoRule) && (members[0].given("thinning") || members[1].given("thinning")) {
		r.fail("thinning", "", "the backlash settles the thinning", "give --backlash, --backlash-rule or --thinning")
	}
	m.Split = 0.5
	if v, ok := r.number("backlash-split", ""); ok {
		m.Split = v
		if v < 0 || v > 1 {
			r.fail("backlash-split", plain(v), "is no share", "give a number from 0 to 1")
		}
		if !m.BacklashGiven && m.Rule == mesh.NoRule {
			r.fail("backlash-split", "", "there is no backlash to part", "give --backlash or --backlash-rule")
		}
	}
	j.drive = r.choice("drive", []string{"cw", "ccw"}, "ccw")
	m.AllowShort = r.on("allow-short-contact")
	if r.on("internal") {
		r.input["internal"] = true
	}
	m.Slack = math.Max(j.members[0].fit.Tolerance, j.members[1].fit.Tolerance)
}
