package profile_test

import (
	"errors"
	"fmt"
	"testing"

	"flankwright/profile"
)

func sampleFinding() profile.Finding {
	return profile.Finding{Rule: profile.RulePointedTip, Param: profile.ParamTipDiameter,
		Value: profile.LengthOf(12.5), Bound: profile.LengthOf(11.99996).AtMost(), Also: []profile.Quantity{profile.NumberOf(3), profile.AngleOf(20 * degree)},
		Text: "{value} is over {bound} with {0} teeth at {1}", Hint: "stay below {bound}"}
}

func TestFindingText(t *testing.T) {
	f := sampleFinding()
	if got, want := f.Error(), "tip-diameter: 12.5 mm is over 11.9999 mm with 3 teeth at 20 deg"; got != want {
		t.Errorf("got  %q\nwant %q", got, want)
	}
	message, hint := f.Describe(func(q profile.Quantity) string { return "<" + q.Decimal(1, 2) + ">" })
	if message != "<12.5> is over <11.99> with <3> teeth at <0.35>" || hint != "stay below <11.99>" {
		t.Errorf("%q, hint %q", message, hint)
	}
	// A value that looks like a placeholder is not filled in again.
	f.Text = "{value}"
	if message, _ := f.Describe(func(profile.Quantity) string { return "{bound}" }); message != "{bound}" {
		t.Errorf("filled twice: %q", message)
	}
}

func TestViolations(t *testing.T) {
	a, b := sampleFinding(), sampleFinding()
	b.Rule, b.Text = profile.RuleRackPointed, "no"
	var err error = profile.Violations{a, b}
	if got, want := err.Error(), a.Error()+"; tip-diameter: no"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	wrapped := fmt.Errorf("row 7: %w", err)
	var one profile.Finding
	if !errors.As(wrapped, &one) || one.Rule != a.Rule {
		t.Errorf("errors.As finds %+v", one)
	}
	var all profile.Violations
	if !errors.As(wrapped, &all) || len(all) != 2 {
		t.Errorf("errors.As finds %v", all)
	}
}
