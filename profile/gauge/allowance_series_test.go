package gauge_test

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"flankwright/profile"
	"flankwright/profile/gauge"
)

// TestAllowanceSeriesRows compares the table with the recalled rows of DIN 3967 in
// testdata, and asks for what a series of allowances must be: larger gears and earlier
// letters have the larger allowance, higher numbers the larger tolerance.
func TestAllowanceSeriesRows(t *testing.T) {
	rows := references(t)
	letters := strings.Fields("a ab b bc c cd d e f g h")
	inside := map[string]float64{"<=10": 10, "10-50": 50, "50-125": 50.001, "125-280": 200, "280-560": 560, "560-1000": 561, "1000-1600": 1600}
	series := func(name string, d float64) gauge.Allowance {
		t.Helper()
		a, err := gauge.AllowanceSeries(name, d)
		if err != nil {
			t.Fatal(err)
		}
		return a
	}
	for key, d := range inside {
		for i, field := range strings.Fields(rows["B10"].Outputs[key]) {
			near(t, letters[i]+" "+key, series(letters[i]+"25", d).Upper, parse(t, field)/1000, 1e-15)
		}
		for i, field := range strings.Fields(rows["B11"].Outputs[key]) {
			a := series("h"+strconv.Itoa(21+i), d)
			near(t, "tolerance "+key, a.Upper-a.Lower, parse(t, field)/1000, 1e-15)
		}
	}
	diameters := []float64{5, 30, 80, 200, 400, 800, 1200}
	for i := range letters {
		for j, d := range diameters {
			for n := 21; n <= 30; n++ {
				a := series(letters[i]+strconv.Itoa(n), d)
				if j > 0 {
					if smaller := series(letters[i]+strconv.Itoa(n), diameters[j-1]); a.Upper > smaller.Upper || a.Upper-a.Lower <= smaller.Upper-smaller.Lower {
						t.Errorf("%s%d at %v: %v after %v", letters[i], n, d, a, smaller)
					}
				}
				if i > 0 {
					if before := series(letters[i-1]+strconv.Itoa(n), d); a.Upper <= before.Upper {
						t.Errorf("%s at %v: %v after %v", letters[i], d, a, before)
					}
				}
				if n > 21 {
					if finer := series(letters[i]+strconv.Itoa(n-1), d); a.Lower >= finer.Lower {
						t.Errorf("%s%d at %v: %v after %v", letters[i], n, d, a, finer)
					}
				}
			}
		}
	}
}

// TestAllowanceSeriesRefusals asks for names and sizes the table does not have.
func TestAllowanceSeriesRefusals(t *testing.T) {
	for _, tc := range []struct {
		name string
		d    float64
		rule profile.Rule
	}{
		{"", 50, gauge.RuleUnknownSeries}, {"cd", 50, gauge.RuleUnknownSeries}, {"25", 50, gauge.RuleUnknownSeries}, {"cd20", 50, gauge.RuleUnknownSeries},
		{"cd31", 50, gauge.RuleUnknownSeries}, {"i25", 50, gauge.RuleUnknownSeries}, {"CD25", 50, gauge.RuleUnknownSeries}, {"cd99999999999999999999", 50, gauge.RuleUnknownSeries},
		{"cd25", 1601, profile.RuleOutOfRange}, {"cd25", 0, profile.RuleOutOfRange}, {"cd25", math.NaN(), profile.RuleNotFinite},
	} {
		if _, err := gauge.AllowanceSeries(tc.name, tc.d); reason(err) != tc.rule {
			t.Errorf("%q at %v: %v, want %s", tc.name, tc.d, err, tc.rule)
		}
	}
}
