package profile_test

import (
	"encoding/json"
	"errors"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"flankwright/profile"
)

// degree is one degree in radians.
const degree = math.Pi / 180

// inch is one inch in mm.
const inch = 25.4

// exact is the relative difference allowed to values recomputed with 50 digits and
// written with 17: a few dozen roundings of a double.
const exact = 1e-14

// reference is one row of testdata/reference-values.json; the file says how far
// to trust it.
type reference struct {
	ID            string         `json:"id"`
	Inputs        map[string]any `json:"inputs"`
	Outputs       map[string]any `json:"outputs"`
	PrintedDigits map[string]int `json:"printed_digits"`
	Recomputed    map[string]any `json:"recomputed"`
	Source        string         `json:"source"`
	Verdict       string         `json:"verdict"`
}

// references reads the rows by their names.
func references(t testing.TB) map[string]*reference {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("..", "testdata", "reference-values.json"))
	if err != nil {
		t.Fatal(err)
	}
	var file struct{ Rows []*reference }
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	rows := map[string]*reference{}
	for _, r := range file.Rows {
		if rows[r.ID] != nil {
			t.Fatalf("two rows are named %s", r.ID)
		}
		rows[r.ID] = r
	}
	return rows
}

// number is an entry of a row as a number; rows quote them to keep their digits.
func number(t testing.TB, id string, of map[string]any, key string) float64 {
	t.Helper()
	switch v := of[key].(type) {
	case float64:
		return v
	case string:
		if f, err := strconv.ParseFloat(v, 64); err == nil {
			return f
		}
	}
	t.Fatalf("%s: no number %q in %v", id, key, of)
	return 0
}

// value is a recomputed value of the row.
func (r *reference) value(t testing.TB, key string) float64 {
	t.Helper()
	return number(t, r.ID, r.Recomputed, key)
}

// check compares got with what the row prints for key, to half a unit of its last
// digit, and with the recomputed value.
func (r *reference) check(t *testing.T, key string, got float64) {
	t.Helper()
	if digits, printed := r.PrintedDigits[key]; printed {
		// Half a unit, and as much again as doubling the rounding of the print.
		tolerance := 0.5001 * math.Pow10(-digits)
		near(t, r.ID+" "+key+", as printed", got, number(t, r.ID, r.Outputs, key), tolerance)
	}
	r.checkRecomputed(t, key, got)
}

// checkRecomputed compares got with the recomputed value alone, for rows whose
// print is not to be trusted.
func (r *reference) checkRecomputed(t *testing.T, key string, got float64) {
	t.Helper()
	want := r.value(t, key)
	near(t, r.ID+" "+key+", recomputed", got, want, exact*math.Max(1, math.Abs(want)))
}

// near reports a value that is not within tolerance of want; NaN never is.
func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s: got %.17g, want %.17g (off by %.2g, allowed %.2g)", what, got, want, got-want, tolerance)
	}
}

// gear is a spec with a standard rack, without thinning.
func gear(rack string, module float64, teeth int, shift float64) profile.Spec {
	standard, ok := profile.LookupRack(rack, module)
	if !ok {
		panic("no rack " + rack)
	}
	return profile.Spec{Module: module, Teeth: teeth, Rack: standard.For(module, profile.RackChange{}), ProfileShift: shift}
}

// angled is the same with another pressure angle, in degrees.
func angled(rack string, module float64, teeth int, shift, pressureAngle float64) profile.Spec {
	standard, ok := profile.LookupRack(rack, module)
	if !ok {
		panic("no rack " + rack)
	}
	alpha := pressureAngle * degree
	return profile.Spec{Module: module, Teeth: teeth, ProfileShift: shift,
		Rack: standard.For(module, profile.RackChange{PressureAngle: &alpha})}
}

// solve makes a tooth that must be possible.
func solve(t testing.TB, s profile.Spec) *profile.Tooth {
	t.Helper()
	tooth, err := profile.Solve(s)
	if err != nil {
		t.Fatalf("%+v: %v", s, err)
	}
	return tooth
}

// refused is the finding of that rule with which a spec is refused.
func refused(t testing.TB, s profile.Spec, rule profile.Rule) profile.Finding {
	t.Helper()
	_, err := profile.Solve(s)
	if f, ok := finding(err, rule); ok {
		return f
	}
	t.Fatalf("%+v: not refused for %s: %v", s, rule, err)
	return profile.Finding{}
}

// finding picks the finding of that rule out of an error.
func finding(err error, rule profile.Rule) (profile.Finding, bool) {
	var all profile.Violations
	if errors.As(err, &all) {
		return pick(all, rule)
	}
	return profile.Finding{}, false
}

// pick is the first finding of that rule.
func pick(all []profile.Finding, rule profile.Rule) (profile.Finding, bool) {
	for _, f := range all {
		if f.Rule == rule {
			return f, true
		}
	}
	return profile.Finding{}, false
}

// failer is what helpers need of a test.
type failer interface {
	Helper()
	Fatal(...any)
}

// flankOf and filletOf are the exact curves of a tooth's side.
func flankOf(t failer, tooth *profile.Tooth) profile.Involute {
	t.Helper()
	for _, p := range tooth.Side {
		if c, ok := p.Curve.(profile.Involute); ok {
			return c
		}
	}
	t.Fatal("no flank")
	return profile.Involute{}
}

func filletOf(t failer, tooth *profile.Tooth) profile.Fillet {
	t.Helper()
	for _, p := range tooth.Side {
		if c, ok := p.Curve.(profile.Fillet); ok {
			return c
		}
	}
	t.Fatal("no fillet")
	return profile.Fillet{}
}
