package mesh

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// Request is a pair as asked for. Both specs have the same module and pressure angle.
type Request struct {
	Specs          [2]profile.Spec // shifts only if ShiftGiven; thinning as given
	ShiftGiven     bool            // else 0, or what a center distance asks for
	TipGiven       [2]bool         // the tip is as its spec says
	CenterDistance float64         // mm; 0 follows from the shifts
	Tolerance      float64         // mm, of the center distance, either way
	Balance        Balance

	Backlash      float64 // mm, circumferential
	BacklashGiven bool
	Rule          Rule
	Split         float64 // share of the thinning that member 1 takes

	AllowShort bool
	Slack      float64 // mm, the drawing's tolerance: so far a tip may reach into a fillet
}

// Members are the sizes of both.
func (r Request) Members() Members {
	return Members{Module: r.Specs[0].Module, PressureAngle: r.Specs[0].Rack.PressureAngle,
		Teeth: [2]int{r.Specs[0].Teeth, r.Specs[1].Teeth}, Second: r.Specs[1].Form}
}

// Pair is a solved pair.
type Pair struct {
	Members
	Teeth          [2]*profile.Tooth
	CenterDistance float64 // mm
	ShiftSum       float64
	Shift          [2]float64
	Backlash       Play
	// Least and Most are the plays at the ends of the center distance's tolerance; a ring's
	// is least where it is largest.
	Least, Most Play
	Contact
	Shortened [2]float64 // mm, by how much tips are shorter than their specs' own
	Note      string     // how the sum of shifts was parted, where a limit decided
	Warnings  []profile.Finding
}

// Play is the backlash at a center distance, in mm; Angle is what it turns either member
// by, in rad, 0 for a rack.
type Play struct {
	Circumferential, Normal float64
	Angle                   [2]float64
}

// play works the backlash out. What rounding leaves of members without any is none.
func (m Members) play(a float64, shift, thinning [2]float64) Play {
	const rounding = 16 // last places of the largest term
	j := m.Backlash(a, shift, thinning)
	rw := m.PitchRadii(a)
	if size := math.Max(m.Module, math.Max(rw[0], rw[1])); math.Abs(j) <= rounding*(math.Nextafter(size, math.Inf(1))-size) {
		j = 0
	}
	p := Play{Circumferential: j, Normal: j * math.Cos(m.OperatingAngle(a))}
	for i, r := range rw {
		if r > 0 {
			p.Angle[i] = j / r
		}
	}
	return p
}

// PlayAt is the backlash of members with these shifts and thinnings at a center distance
// in mm, negative where the teeth jam; refused below a0 cos alpha, where there is no
// operating angle.
func (m Members) PlayAt(a float64, shift, thinning [2]float64) (Play, error) {
	p := m.play(a, shift, thinning)
	if math.IsNaN(p.Normal) {
		return Play{}, profile.Violations{{Rule: RuleTooClose, Param: ParamCenterDistance, Value: profile.LengthOf(a),
			Bound: profile.LengthOf(m.Reference() * math.Cos(m.PressureAngle)).AtLeast(),
			Text:  "the center distance {value} is too small for these teeth", Hint: "it must be at least {bound}"}}
	}
	return p, nil
}

// Solve makes the pair, or says why it cannot work: the error is of type
// profile.Violations and holds all that was found.
func Solve(r Request) (*Pair, error) {
	m := r.Members()
	if m.Second == profile.FormRing && m.Teeth[1] <= m.Teeth[0] {
		return nil, profile.Violations{{Rule: RuleRingTooSmall, Param: profile.ParamTeeth, Value: profile.NumberOf(float64(m.Teeth[1])), Bound: profile.NumberOf(float64(m.Teeth[0] + 1)),
			Text: "a ring of {value} teeth is not larger than its gear", Hint: "give it at least {bound}, and about ten more than the gear to mesh freely"}}
	}
	p := &Pair{Members: m}
	if err := p.place(r); err != nil {
		return nil, err
	}
	if r.Tolerance > 0 {
		if found := append(p.checkDistance(p.CenterDistance-r.Tolerance), p.checkDistance(p.CenterDistance+r.Tolerance)...); found != nil {
			for i := range found {
				found[i].Text = "within its tolerance " + found[i].Text
			}
			return nil, found
		}
	}
	specs := r.Specs
	for i := range specs {
		specs[i].ProfileShift = p.Shift[i]
	}
	if err := p.thin(r, &specs); err != nil {
		return nil, err
	}
	if err := p.solveTeeth(r, specs); err != nil {
		return nil, err
	}
	thinning := [2]float64{p.Teeth[0].Spec.Thinning, p.Teeth[1].Spec.Thinning}
	a := p.CenterDistance
	p.Backlash = m.play(a, p.Shift, thinning)
	p.Least, p.Most = m.play(a-r.Tolerance, p.Shift, thinning), m.play(a+r.Tolerance, p.Shift, thinning)
	if p.Most.Circumferential < p.Least.Circumferential {
		p.Least, p.Most = p.Most, p.Least
	}
	p.Contact = m.contact(a, edgesOf(p.Teeth[0]), edgesOf(p.Teeth[1]))
	warnings, found := p.judge(r)
	p.Warnings = append(p.Warnings, warnings...)
	if found != nil {
		return nil, found
	}
	return p, nil
}

// place settles center distance and shifts.
func (p *Pair) place(r Request) error {
	m := p.Members
	if r.ShiftGiven || r.CenterDistance == 0 { // without either both are unshifted
		p.Shift = [2]float64{r.Specs[0].ProfileShift, r.Specs[1].ProfileShift}
		p.ShiftSum = p.Shift[0] + p.Shift[1]
		p.CenterDistance = r.CenterDistance
		if p.CenterDistance == 0 {
			p.CenterDistance = m.CenterDistance(p.ShiftSum)
		}
		if math.IsNaN(p.CenterDistance) {
			return profile.Violations{{Rule: RuleNoDistance, Param: profile.ParamProfileShift, Value: profile.NumberOf(p.ShiftSum),
				Text: "no center distance goes with a sum of shifts of {value}", Hint: "bring the sum nearer to zero"}}
		}
		if found := p.checkDistance(p.CenterDistance); found != nil {
			return found
		}
		return nil
	}
	p.CenterDistance = r.CenterDistance
	if found := p.checkDistance(p.CenterDistance); found != nil {
		return found
	}
	p.ShiftSum = tidy(m.ShiftSum(p.CenterDistance))
	p.Shift, p.Note = r.part(p.ShiftSum, p.CenterDistance)
	return nil
}

// tidy takes the rounding off a sum of shifts that is nothing else.
func tidy(shift float64) float64 {
	const noise = 1e-12 // far above the rounding of the involute function at many teeth
	if math.Abs(shift) < noise {
		return 0
	}
	return shift
}

// checkDistance refuses a center distance beyond what shifts can give.
func (p *Pair) checkDistance(a float64) profile.Violations {
	least, largest := p.Range()
	f := profile.Finding{Param: ParamCenterDistance, Value: profile.LengthOf(a),
		Also: []profile.Quantity{profile.LengthOf(least).AtLeast(), profile.LengthOf(largest).AtMost()},
		Hint: "it can be from {0} to {1} with shifts within their limits"}
	switch {
	case !(a >= least):
		f.Rule, f.Bound, f.Text = RuleTooClose, f.Also[0], "the center distance {value} is too small for these teeth"
	case !(a <= largest):
		f.Rule, f.Bound, f.Text = RuleTooFar, f.Also[1], "the center distance {value} is too large for these teeth"
	default:
		return nil
	}
	return profile.Violations{f}
}

// thin settles the thinning of both members.
func (p *Pair) thin(r Request, specs *[2]profile.Spec) error {
	m, a := p.Members, p.CenterDistance
	want, asked := r.Backlash, r.BacklashGiven
	switch r.Rule {
	case RuleAGMA:
		want, asked = LeastBacklash(r.Rule, a, m.Module), true
	case RuleISO:
		want, asked = LeastBacklash(r.Rule, a, m.Module)/math.Cos(m.OperatingAngle(a)), true
	}
	if !asked {
		return nil
	}
	have := m.Backlash(a, p.Shift, [2]float64{})
	sum := m.ThinningFor(want-have, a)
	if sum < -roundingOf*m.Module && r.BacklashGiven { // a rule's is the least
		higher := p.ThinningFor(have-want, a) / (2 * m.Module * math.Tan(m.PressureAngle))
		return profile.Violations{{Rule: RuleTooLoose, Param: ParamBacklash, Value: profile.LengthOf(want), Bound: profile.LengthOf(have).AtLeast(),
			Also: []profile.Quantity{profile.NumberOf(p.ShiftSum + higher)},
			Text: "at this center distance and with these shifts the backlash is {bound} without any thinning, more than the {value} asked for",
			Hint: "ask for {bound} or more, or for a sum of shifts of {0}"}}
	}
	sum = math.Max(0, sum)
	specs[0].Thinning, specs[1].Thinning = r.Split*sum, (1-r.Split)*sum
	for i := range specs {
		if left := m.thickness(p.Shift[i], specs[i].Thinning); left <= 0 {
			largest := m.Backlash(a, p.Shift, [2]float64{m.thickness(p.Shift[0], 0) * r.Split, m.thickness(p.Shift[1], 0) * (1 - r.Split)})
			return profile.Violations{{Rule: RuleThinnedAway, Param: ParamBacklash, Value: profile.LengthOf(want), Bound: profile.LengthOf(largest).AtMost(),
				Text: fmt.Sprintf("a backlash of {value} would thin member %d away", i+1), Hint: "keep it well below {bound}"}}
		}
	}
	return nil
}

// roundingOf is the thinning in modules below zero that is rounding and not negative
// backlash: a few hundred units in the last place of a center distance of many modules.
const roundingOf = 1e-10

// solveTeeth solves both, shortening tips nobody gave.
func (p *Pair) solveTeeth(r Request, specs [2]profile.Spec) error {
	m, a := p.Members, p.CenterDistance
	k := r.standardShortening(p.ShiftSum, a)
	for i := range specs {
		if !r.TipGiven[i] && m.Second == profile.FormGear {
			specs[i].TipShortening = k
			p.Shortened[i] = k
		}
	}
	var found profile.Violations
	solve := func(i int) {
		tooth, err := profile.Solve(specs[i])
		if err != nil {
			for _, f := range err.(profile.Violations) {
				f.Text = fmt.Sprintf("member %d: %s", i+1, f.Text)
				found = append(found, f)
			}
			return
		}
		p.Teeth[i] = tooth
	}
	if solve(0); found != nil {
		return found
	}
	if !r.TipGiven[1] && m.Second != profile.FormGear {
		p.keepOffFillet(&specs[1])
	}
	if solve(1); found != nil {
		return found
	}
	for i, t := range p.Teeth {
		for _, w := range t.Warnings {
			w.Text = fmt.Sprintf("member %d: %s", i+1, w.Text)
			p.Warnings = append(p.Warnings, w)
		}
	}
	return nil
}

// keepOffFillet shortens the tip of a ring or rack so that it ends where the pinion's
// flank does,
//
//	ring  r_a2 = sqrt(r_b2^2 + (a sin aw + max(L_F1, 0))^2)
//	rack  y_a2 = (a - r) + (r sin alpha - L_F1) sin alpha
func (p *Pair) keepOffFillet(s *profile.Spec) {
	c := p.action(p.CenterDistance)
	form := length(edgesOf(p.Teeth[0]).form, c.rb1)
	limit := c.onSecond(form)
	standard := s.Rack.Addendum + s.ProfileShift*p.Module - s.TipShortening
	shorter := 0.0
	if s.Form == profile.FormRack {
		shorter = standard - limit
	} else {
		shorter = limit - (p.Module*float64(s.Teeth)/2 - standard)
	}
	if shorter > 0 {
		s.TipShortening += shorter
		p.Shortened[1] = shorter
	}
}
