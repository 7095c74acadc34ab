package main

import (
	"flankwright/profile"
	"flankwright/profile/body"
)

// toothFeatures are the finest features of the teeth.
func toothFeatures(t *profile.Tooth) []body.Feature {
	d := t.Dimensions
	return []body.Feature{
		{Name: "inner radius", Place: "of the root fillets", Value: d.MinFilletRadius},
		{Name: "tip land", Place: "of the teeth", Value: d.TipLand},
	}
}

// judgeFeatures warns of features of the teeth that are finer than asked for; the body
// has judged its own.
func (m *maker) judgeFeatures() {
	m.made.features = toothFeatures(m.tooth)
	for _, f := range m.made.features {
		if f.Value < m.job.body.MinFeature {
			m.warnings = append(m.warnings, profile.Finding{Rule: body.RuleSmallFeature, Param: body.ParamMinFeature,
				Value: profile.LengthOf(f.Value), Bound: profile.LengthOf(m.job.body.MinFeature),
				Text: "the smallest " + f.Name + ", " + f.Place + ", is {value}, below the least feature {bound}"})
		}
	}
	if m.made.body != nil {
		m.made.features = append(m.made.features, m.made.body.Features...)
	}
}
