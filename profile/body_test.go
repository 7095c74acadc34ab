package profile_test

import (
	"math"
	"testing"

	"flankwright/profile"
)

func TestBody(t *testing.T) {
	tooth := solve(t, gear("iso53-a", 2, 20, 0)) // root diameter 35, whole depth 4.5
	for _, tc := range []struct {
		bore    float64
		refused profile.Rule
		warned  bool
	}{
		{bore: 0},
		{bore: 10},
		// AGMA 2001-D04: the rim counts as thick from 1.2 whole depths, 5.4 mm, so
		// up to a bore of 35 - 10.8. It is from memory.
		{bore: 24.2 - 1e-9},
		{bore: 24.2 + 1e-9, warned: true},
		{bore: 35 - 1e-9, warned: true},
		{bore: 35, refused: profile.RuleBoreIntoRoots},
		{bore: 40, refused: profile.RuleBoreIntoRoots},
		{bore: -1, refused: profile.RuleOutOfRange},
		{bore: 1e300, refused: profile.RuleOutOfRange},
		{bore: math.NaN(), refused: profile.RuleNotFinite},
		{bore: math.Inf(1), refused: profile.RuleNotFinite},
	} {
		warnings, found := profile.Body{Bore: tc.bore}.Check(tooth)
		if len(found) > 1 || (len(found) == 1) != (tc.refused != "") || len(found) == 1 && (found[0].Rule != tc.refused || found[0].Param != profile.ParamBore) {
			t.Errorf("bore %v: %v, want %q", tc.bore, found, tc.refused)
		}
		if _, thin := pick(warnings, profile.RuleThinRim); thin != tc.warned {
			t.Errorf("bore %v: warnings %v", tc.bore, warnings)
		}
	}
	_, found := profile.Body{Bore: 40}.Check(tooth)
	if f := found[0]; f.Bound.Value != tooth.Dimensions.RootDiameter || f.Value.Value != 40 {
		t.Errorf("%+v", f)
	}
	if _, found := (profile.Body{Bore: found[0].Bound.Value * (1 - beside)}).Check(tooth); found != nil {
		t.Errorf("refused within the bound: %v", found)
	}
	warnings, _ := profile.Body{Bore: 30}.Check(tooth)
	if f, _ := pick(warnings, profile.RuleThinRim); f.Value.Value != 2.5 || math.Abs(f.Bound.Value-5.4) > exact*6 {
		t.Errorf("rim %+v", f)
	}
}
