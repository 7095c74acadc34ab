package gauge_test

import (
	"encoding/json"
	"errors"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// degree is one degree in radians.
const degree = math.Pi / 180

// inch is one inch in mm.
const inch = 25.4

// recomputed is the relative difference allowed to values recomputed with 50 digits
// and written with 17: a few hundred roundings of a double.
const recomputed = 1e-13

// reference is one row of testdata/reference-values.json; the file says how far to
// trust it.
type reference struct {
	ID            string            `json:"id"`
	Inputs        map[string]any    `json:"inputs"`
	Outputs       map[string]string `json:"outputs"`
	PrintedDigits map[string]int    `json:"printed_digits"`
	Recomputed    map[string]string `json:"recomputed"`
	Verdict       string            `json:"verdict"`
	used          map[string]bool
}

// references reads the rows by their names.
func references(t testing.TB) map[string]*reference {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("testdata", "reference-values.json"))
	if err != nil {
		t.Fatal(err)
	}
	var file struct{ Rows []*reference }
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	rows := map[string]*reference{}
	for _, r := range file.Rows {
		r.used = map[string]bool{}
		rows[r.ID] = r
	}
	return rows
}

// withPrefix are the rows whose names begin so.
func withPrefix(t testing.TB, prefix string) []*reference {
	t.Helper()
	var found []*reference
	for id, r := range references(t) {
		if strings.HasPrefix(id, prefix) {
			found = append(found, r)
		}
	}
	if found == nil {
		t.Fatalf("no row %s", prefix)
	}
	return found
}

// input is a number the row was asked for.
func (r *reference) input(t testing.TB, key string) float64 {
	t.Helper()
	switch v := r.Inputs[key].(type) {
	case float64:
		return v
	case string:
		return parse(t, v)
	}
	t.Fatalf("%s: no input %q", r.ID, key)
	return 0
}

func parse(t testing.TB, s string) float64 {
	t.Helper()
	f, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return f
}

// check compares got with what the row prints for key, to one unit of its last
// digit unless the verdict is that the print is wrong, and with the recomputed value.
func (r *reference) check(t *testing.T, key string, got float64) {
	t.Helper()
	r.used[key] = true
	if digits, printed := r.PrintedDigits[key]; printed && r.Verdict != "CONTRADICTED" {
		near(t, r.ID+" "+key+", as printed", got, parse(t, r.Outputs[key]), 1.0001*math.Pow10(-digits))
	}
	want, ok := r.Recomputed[key]
	if !ok {
		t.Fatalf("%s: nothing recomputed for %q", r.ID, key)
	}
	value := parse(t, want)
	near(t, r.ID+" "+key+", recomputed", got, value, recomputed*math.Max(1, math.Abs(value)))
}

// near reports a value that is not within tolerance of want; NaN never is.
func near(t testing.TB, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s: got %.17g, want %.17g (off by %.2g, allowed %.2g)", what, got, want, got-want, tolerance)
	}
}

// must makes a gear that must be possible.
func must(t testing.TB, s gauge.Spec) gauge.Gear {
	t.Helper()
	g, err := gauge.New(s)
	if err != nil {
		t.Fatalf("%+v: %v", s, err)
	}
	return g
}

// full is a gear whose flank is usable from the base circle to where its tooth, or a
// ring's space, gets too narrow: for rows of tables that ask no more.
func full(t testing.TB, kind gauge.Kind, m float64, z int, alpha, x float64) gauge.Gear {
	t.Helper()
	return addendum(t, kind, 1, m, z, alpha, x)
}

// addendum is the same with the teeth so many modules high over the reference circle.
func addendum(t testing.TB, kind gauge.Kind, height, m float64, z int, alpha, x float64) gauge.Gear {
	t.Helper()
	r := m * float64(z) / 2
	rb := r * math.Cos(alpha)
	s := gauge.Spec{Kind: kind, Module: m, Teeth: z, PressureAngle: alpha, ProfileShift: x}
	for reach := height * m; reach > 0; reach -= 0.05 * m {
		if kind == gauge.Ring {
			s.Tip, s.Form = math.Max(rb, r-(height+x)*m), r+reach
			s.TipForm = s.Tip
		} else {
			s.Form, s.Tip = rb, r+x*m+reach
			s.TipForm = s.Tip
			// The space must be open on the base circle: else begin above it.
			for s.Form < s.Tip {
				if _, err := gauge.New(s); err == nil || reason(err) != gauge.RuleNoSpace {
					break
				}
				s.Form += 0.01 * m
			}
		}
		if g, err := gauge.New(s); err == nil {
			return g
		}
	}
	t.Fatalf("no such gear: %+v", s)
	return gauge.Gear{}
}

// reason is the rule of the first finding of an error.
func reason(err error) profile.Rule {
	var all profile.Violations
	if errors.As(err, &all) && len(all) > 0 {
		return all[0].Rule
	}
	return ""
}

// finding is the first finding of an error that must hold one of that rule.
func finding(t testing.TB, err error, rule profile.Rule) profile.Finding {
	t.Helper()
	var all profile.Violations
	if errors.As(err, &all) {
		for _, f := range all {
			if f.Rule == rule {
				return f
			}
		}
	}
	t.Fatalf("no finding %s in %v", rule, err)
	return profile.Finding{}
}

// tooth solves an external gear with a standard rack.
func tooth(t testing.TB, rack string, m float64, z int, x, thinning float64) *profile.Tooth {
	t.Helper()
	standard, ok := profile.LookupRack(rack, m)
	if !ok {
		t.Fatal("no rack", rack)
	}
	solved, err := profile.Solve(profile.Spec{Module: m, Teeth: z, ProfileShift: x, Thinning: thinning, Rack: standard.For(m, profile.RackChange{})})
	if err != nil {
		t.Fatal(err)
	}
	return solved
}

// thicker is the gear with teeth of another thickness, which must be possible.
func thicker(t testing.TB, g gauge.Gear, thickness float64) gauge.Gear {
	t.Helper()
	made, err := g.WithThickness(thickness)
	if err != nil {
		t.Fatal(err)
	}
	return made
}
