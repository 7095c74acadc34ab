package label_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/label"
)

// refusal is the one finding of a label without room.
func refusal(t interface{ Fatalf(string, ...any) }, err error) profile.Finding {
	var found profile.Violations
	if !errors.As(err, &found) || len(found) != 1 || found[0].Rule != label.RuleNoRoom {
		t.Fatalf("%v: want one refusal for want of room", err)
	}
	return found[0]
}

// TestLargestHeight: the bound of a refusal works, also as printed in inches, and by
// trial nothing 3/100 larger does.
func TestLargestHeight(t *testing.T) {
	for name, region := range map[string]label.Region{
		"annulus":    annulus(10, 38, 0),
		"small":      annulus(3, 8, 0),
		"solid":      annulus(0, 6, 0),
		"holes":      annulus(8, 40, 4, ring(6, 24)...),
		"bar":        bar{r2.Box{Min: r2.Vec{X: -40, Y: -15}, Max: r2.Vec{X: 40, Y: 0}}},
		"narrow bar": bar{r2.Box{Min: r2.Vec{X: -40, Y: -3}, Max: r2.Vec{X: 40, Y: 0}}},
	} {
		const text = "Z40"
		_, err := label.Place(text, 30, region)
		f := refusal(t, err)
		bound := f.Bound.Value
		message, hint := f.Describe(profile.Quantity.String)
		if f.Param != label.ParamHeight || f.Value.Value != 30 || bound <= 0 || !strings.Contains(hint, f.Bound.String()) || !strings.Contains(message, "30 mm") {
			t.Errorf("%s: %s; %s: %+v", name, message, hint, f)
		}
		for _, h := range []float64{bound, math.Floor(bound/25.4*1e4) / 1e4 * 25.4, math.Floor(bound/25.4*1e3) / 1e3 * 25.4} {
			p, err := label.Place(text, h, region)
			if err != nil {
				t.Errorf("%s: %g: %v", name, h, err)
				continue
			}
			if least, ok := keeps(p, region); !ok {
				t.Errorf("%s: %g high: %g from the edge", name, h, least)
			}
		}
		if h := bound * 1.03; found(t, text, h, region) {
			t.Errorf("%s: refused above %g, but %g fits", name, bound, h)
		}
	}
}

// found tries places below, above and beside the axis, every hundredth of the height.
func found(t testing.TB, text string, height float64, region label.Region) bool {
	paths, width := drawn(t, text)
	points := cloud(paths, 0.02)
	for _, d := range []r2.Vec{{Y: -1}, {Y: 1}, {X: -1}, {X: 1}} {
		for at := 0.0; at < 60; at += height / 100 {
			origin := r2.Sub(r2.Scale(at, d), r2.Scale(height, r2.Vec{X: width / 2, Y: 0.5}))
			fits := true
			for _, q := range points {
				if region.Clearance(r2.Add(origin, r2.Scale(height, q))) < label.Margin(height) {
					fits = false
					break
				}
			}
			if fits {
				return true
			}
		}
	}
	return false
}

func TestNoRoomAtAll(t *testing.T) {
	for name, c := range map[string]struct {
		region label.Region
		text   string
		height float64
		param  profile.Param
		room   bool // at a smaller height
	}{
		"thin rim":            {annulus(9.5, 10, 0), "Z40", 0, label.ParamLabel, false},
		"thin rim, given":     {annulus(9.5, 10, 0), "Z40", 2, label.ParamHeight, false},
		"rim for small types": {annulus(8, 10, 0), "Z", 0, label.ParamLabel, true},
		"long":                {annulus(2, 10, 0), strings.Repeat("W", 40), 0, label.ParamLabel, false},
		"nothing anywhere":    {web{{radius: -1}}, "Z40", 0, label.ParamLabel, false},
	} {
		_, err := label.Place(c.text, c.height, c.region)
		f := refusal(t, err)
		_, hint := f.Describe(profile.Quantity.String)
		if f.Param != c.param || (f.Bound.Value > 0) != c.room || strings.Contains(hint, "label-height") != c.room {
			t.Errorf("%s: %+v", name, f)
		}
	}
}
