package profile

import "math"

// Body is what is inside the teeth. Lengths are mm.
type Body struct {
	Bore float64 // diameter of a plain round bore; 0 for none
}

// backupRatio is the rim thickness under the teeth, in whole depths, below which
// the rim bends noticeably with its teeth: AGMA 2001-D04 reduces the rated load
// below m_B = 1.2.
const backupRatio = 1.2

// Check judges the body against the teeth around it: violations that forbid it,
// and warnings.
func (b Body) Check(t *Tooth) (warnings []Finding, found Violations) {
	if b.Bore == 0 {
		return nil, nil
	}
	l := limit{param: ParamBore, value: b.Bore, low: 0, high: MaxTeeth * MaxModule, dimension: Length, open: true}
	if f, bad := l.check(); bad {
		return nil, Violations{f}
	}
	root := t.Dimensions.RootDiameter
	rim := (root - b.Bore) / 2
	if rim <= 0 {
		return nil, Violations{{Rule: RuleBoreIntoRoots, Param: ParamBore, Value: LengthOf(b.Bore), Bound: LengthOf(root).AtMost(),
			Text: "the bore {value} cuts into the roots at diameter {bound}",
			Hint: "keep the bore below {bound}"}}
	}
	if least := backupRatio * t.Dimensions.WholeDepth; rim < least {
		warnings = []Finding{{Rule: RuleThinRim, Param: ParamBore, Value: LengthOf(rim), Bound: LengthOf(least).AtLeast(),
			Text: "the rim between roots and bore is only {value} thick; AGMA 2001-D04 reduces the load below {bound} (1.2 whole depths)"}}
	}
	return warnings, nil
}

// Area is what the bore takes off the part, in mm^2.
func (b Body) Area() float64 { return math.Pi * b.Bore * b.Bore / 4 }

// Beam is the diameter of the path of a beam of that width along the bore: the bore
// less the width. A bore no wider than the beam is refused.
func (b Body) Beam(width float64) (float64, error) {
	if width >= b.Bore {
		return 0, Violations{{Rule: RuleKerfTooWide, Param: ParamKerf, Value: LengthOf(width), Bound: LengthOf(b.Bore).AtMost(),
			Text: "a beam {value} wide does not fit into the bore of {bound}",
			Hint: "it must be narrower than {bound}"}}
	}
	return b.Bore - width, nil
}
