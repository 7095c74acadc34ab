package main

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

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
func (j pairJob) suffixes() []string         { return []string{"-1", "-2", "-assembly"} }

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

// splitMembers parts a pair's flags between its members, and settles their forms.
func splitMembers(req request, forms *[2]string, internal bool) (members [2]request, found problems) {
	fail := func(flag, value, message, hint string) {
		found = append(found, problem{flag: flag, value: value, message: message, hint: hint, exit: exitMalformed})
	}
	if internal {
		forms[1] = "ring"
	}
	if teeth := req.values["teeth"]; len(teeth) > 0 {
		first, second, two := strings.Cut(teeth[0], ",")
		switch {
		case !two:
			fail("teeth", teeth[0], "a pair has two numbers of teeth", "give them with a comma between, such as 17,43 or 17,rack")
		case strings.TrimSpace(second) == "rack" && internal:
			fail("internal", "", "member 2 is a rack", "leave --internal out")
		case strings.TrimSpace(second) == "rack":
			forms[1] = "rack"
			// As many pitches as the gear has teeth: a full turn.
			req = request{command: req.command, values: mapsWith(req.values, "teeth", []string{first + "," + first})}
		}
	}
	var allowed [2]map[string]bool
	for i, form := range forms {
		members[i] = request{command: form, values: map[string][]string{}}
		allowed[i] = flagsOf(form)
	}
	for _, p := range memberParameters() {
		values := req.values[p.name]
		if len(values) == 0 {
			continue
		}
		if !allowed[0][p.name] && !allowed[1][p.name] {
			fail(p.name, "", fmt.Sprintf("is no flag of a %s or a %s", forms[0], forms[1]), "leave it out")
			continue
		}
		for _, v := range values {
			parts := strings.Split(v, ",")
			switch {
			case len(parts) > 2:
				fail(p.name, v, "a pair has two members", "give one value, or two with a comma between")
				continue
			case len(parts) == 1:
				parts = []string{v, v}
			case slices.Contains(sharedFlags(), p.name):
				fail(p.name, v, "is the same for both members", "give one value")
				continue
			}
			for i, part := range parts {
				part = strings.TrimSpace(part)
				switch {
				case part == "":
				case allowed[i][p.name]:
					members[i].values[p.name] = append(members[i].values[p.name], part)
				case strings.Contains(v, ","):
					fail(p.name, v, fmt.Sprintf("member %d, a %s, has no such flag", i+1, forms[i]), "leave its value empty")
				}
			}
		}
	}
	return members, found
}

// flagsOf are the flags of a form by its name.
func flagsOf(name string) map[string]bool {
	flags := map[string]bool{}
	for _, p := range partParameters(name) {
		if !p.transient {
			flags[p.name] = true
		}
	}
	return flags
}

// mapsWith is a copy of values with one replaced.
func mapsWith(values map[string][]string, name string, v []string) map[string][]string {
	out := map[string][]string{}
	for k, old := range values {
		out[k] = old
	}
	out[name] = v
	return out
}

// ofMember says whose problems these are.
func ofMember(err error, i int) problems {
	found, ok := err.(problems)
	if !ok {
		return problems{malformed(err)}
	}
	out := make(problems, len(found))
	for k, p := range found {
		p.message = fmt.Sprintf("member %d: %s", i+1, p.message)
		out[k] = p
	}
	return out
}

// joinInputs is the pair's normalized request: what both members share once, the rest
// with a comma between.
func joinInputs(first, second, own map[string]any) map[string]any {
	joined := map[string]any{}
	for name := range mapsUnion(first, second) {
		if name == "command" {
			continue
		}
		a, b := first[name], second[name]
		switch {
		case fmt.Sprint(a) == fmt.Sprint(b):
			joined[name] = a
		case name == "hole-circle":
			joined[name] = joinLists(a, b)
		default:
			joined[name] = textOf(a) + "," + textOf(b)
		}
	}
	for name, v := range own {
		joined[name] = v
	}
	return joined
}

// joinLists pairs two lists up, the shorter one with empty values.
func joinLists(a, b any) []string {
	first, _ := a.([]string)
	second, _ := b.([]string)
	var out []string
	for i := range max(len(first), len(second)) {
		var one, two string
		if i < len(first) {
			one = first[i]
		}
		if i < len(second) {
			two = second[i]
		}
		out = append(out, one+","+two)
	}
	return out
}

func mapsUnion(a, b map[string]any) map[string]bool {
	all := map[string]bool{}
	for k := range a {
		all[k] = true
	}
	for k := range b {
		all[k] = true
	}
	return all
}

// textOf is a normalized value as it stands in a list; "" for none.
func textOf(v any) string {
	switch v := v.(type) {
	case nil:
		return ""
	case bool:
		return strconv.FormatBool(v)
	}
	return fmt.Sprint(v)
}
