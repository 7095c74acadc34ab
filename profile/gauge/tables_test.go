package gauge_test

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"flankwright/profile/gauge"
)

// angleKeys are the pressure angles of the tables over wires, in degrees.
var angleKeys = []string{"14.5", "17.5", "20", "25", "30"}

// TestWireTables checks dimensions over and between wires of 1 P. Some of these pins
// lie below the form circle a rack would leave, some internal tips inside the base
// circle: the flank is therefore taken to be usable as far as it is an involute.
func TestWireTables(t *testing.T) {
	for prefix, kind := range map[string]gauge.Kind{"T30-": gauge.External, "T31-": gauge.External, "T32-": gauge.Ring, "calc-N-": gauge.Ring} {
		for _, row := range withPrefix(t, prefix) {
			for _, key := range angleKeys {
				z, alpha := int(row.input(t, "N")), parse(t, key)*degree
				p, err := addendum(t, kind, 1, 1, z, alpha, 0).Pin(row.input(t, "wire"))
				if kind == gauge.Ring && reason(err) == gauge.RulePinTooSmall {
					// Wires of 1.44 do not stand proud of full-depth teeth.
					p, err = addendum(t, kind, 0.4, 1, z, alpha, 0).Pin(row.input(t, "wire"))
				}
				if err != nil {
					t.Errorf("%s at %s: %v", row.ID, key, err)
					continue
				}
				row.check(t, key, p.Value)
			}
		}
	}
}

// TestPinsByHand checks single worked examples.
func TestPinsByHand(t *testing.T) {
	rows := references(t)
	pin := func(g gauge.Gear, d float64) float64 {
		t.Helper()
		p, err := g.Pin(d)
		if err != nil {
			t.Fatal(err)
		}
		return p.Value
	}
	m := inch / 4
	row := rows["T21"]
	g := full(t, gauge.External, m, 32, 20*degree, 0)
	row.check(t, "M", pin(g, 1.728*m)/inch)
	row.check(t, "M_1DP", pin(g, 1.728*m)/m)
	rows["T23"].check(t, "dm", pin(full(t, gauge.External, 1, 20, 20*degree, 0), 1.7))
	rows["T25"].check(t, "dm", pin(full(t, gauge.Ring, 1, 40, 20*degree, 0), 1.7))

	// DIN 5480 W 50x2x24: shift -0.1 mm, tip as the standard gives it.
	spline := must(t, splineSpec())
	rows["T20"].check(t, "M1", pin(spline, 4))
	w, err := spline.Span(4)
	if err != nil {
		t.Fatal(err)
	}
	rows["T14"].check(t, "W4", w.Value)
}

// splineSpec is the shaft DIN 5480 W 50x2x24, of tip diameter 49.6 mm.
func splineSpec() gauge.Spec {
	return gauge.Spec{Module: 2, Teeth: 24, PressureAngle: 30 * degree, ProfileShift: -0.1 / 2, Tip: 24.8, TipForm: 24.8, Form: 22.9}
}

// TestIdealPins checks the diameters of pins that touch at d + 2 x m.
func TestIdealPins(t *testing.T) {
	rows := references(t)
	ideal := func(g gauge.Gear) float64 {
		t.Helper()
		d, err := g.IdealPin()
		if err != nil {
			t.Fatal(err)
		}
		return d
	}
	rows["T22"].check(t, "dp_ideal", ideal(full(t, gauge.External, 1, 20, 20*degree, 0)))
	rows["T24"].check(t, "dp_ideal", ideal(full(t, gauge.Ring, 1, 40, 20*degree, 0)))
	for _, row := range withPrefix(t, "T26-") {
		for key := range row.Outputs {
			x := parse(t, strings.TrimPrefix(key, "x="))
			z := int(row.input(t, "z"))
			// Tips as high as no tooth is, so that not the tip decides what pin does.
			r := float64(z) / 2
			s := gauge.Spec{Module: 1, Teeth: z, PressureAngle: 20 * degree, ProfileShift: x, Form: r * math.Cos(20*degree), Tip: r + x + 0.3}
			for s.TipForm = s.Tip; ; s.Form += 1e-3 {
				if _, err := gauge.New(s); reason(err) != gauge.RuleNoSpace {
					break
				}
			}
			row.check(t, key, ideal(must(t, s)))
		}
	}
}

// TestSpanTables checks spans of module 1 and of 1 P.
func TestSpanTables(t *testing.T) {
	rows := references(t)
	row := rows["T10"]
	g := full(t, gauge.External, 3, 24, 20*degree, 0.4)
	spans, err := g.Spans()
	if err != nil {
		t.Fatal(err)
	}
	row.check(t, "k", float64(spans[0].TeethSpanned))
	row.check(t, "W", spans[0].Value)
	for id, alpha := range map[string]float64{"T11": 20, "T12": 14.5} {
		for key := range rows[id].Outputs {
			z, k := splitKey(t, key)
			s, err := full(t, gauge.External, 1, z, alpha*degree, 0).Span(k)
			if err != nil {
				t.Errorf("%s %s: %v", id, key, err)
				continue
			}
			rows[id].check(t, key, s.Value)
		}
	}
	// W = m (A (k - 1/2) + B z): A is a step of k, B one of z.
	for key, alpha := range map[string]float64{"20": 20, "14.5": 14.5} {
		w := func(z, k int) float64 {
			s, err := full(t, gauge.External, 1, z, alpha*degree, 0).Span(k)
			if err != nil {
				t.Fatal(err)
			}
			return s.Value
		}
		rows["T13"].check(t, "A"+key, w(40, 5)-w(40, 4))
		rows["T13"].check(t, "B"+key, (w(41, 4)-w(39, 4))/2)
	}
}

// splitKey reads "teeth/teeth spanned".
func splitKey(t *testing.T, key string) (z, k int) {
	t.Helper()
	a, b, _ := strings.Cut(key, "/")
	z, err := strconv.Atoi(a)
	if err != nil {
		t.Fatal(err)
	}
	if k, err = strconv.Atoi(b); err != nil {
		t.Fatal(err)
	}
	return z, k
}

// TestChordTables checks chordal thicknesses and heights.
func TestChordTables(t *testing.T) {
	rows := references(t)
	g := must(t, gauge.Spec{Module: 10, Teeth: 12, PressureAngle: 20 * degree, ProfileShift: 0.3, Tip: 73, TipForm: 73, Form: 58})
	c, err := g.Chord()
	if err != nil {
		t.Fatal(err)
	}
	row := rows["T01"]
	row.check(t, "s", g.Thickness())
	row.check(t, "sj", c.Thickness)
	row.check(t, "hj", c.Height)
	row.check(t, "theta_deg", g.Thickness()/120/degree)
	for _, prefix := range []string{"T02-", "T03-"} {
		for _, row := range withPrefix(t, prefix) {
			z := int(row.input(t, "N"))
			r := float64(z) / 2
			g := must(t, gauge.Spec{Module: 1, Teeth: z, PressureAngle: 20 * degree, Tip: r + 1, TipForm: r + 1, Form: r * 0.97})
			c, err := g.Chord()
			if err != nil {
				t.Fatal(err)
			}
			row.check(t, "chordal_thickness", c.Thickness)
			row.check(t, "chordal_addendum", c.Height)
		}
	}
}

// TestFlankToleranceRows checks the formulas against values recomputed from them, and
// that they come out near the withdrawn ISO 1328-1:1995, of which tables are widely
// printed: the editions differ by up to a third, a formula recalled wrongly by more.
func TestFlankToleranceRows(t *testing.T) {
	const micrometre = 1e-3
	for _, row := range withPrefix(t, "calc-Q-") {
		d, m := row.input(t, "d"), row.input(t, "mn")
		got, err := gauge.FlankTolerances(int(row.input(t, "A")), int(d/m), d, m)
		if err != nil {
			t.Fatal(err)
		}
		for key, v := range map[string]float64{"f_pT": got.SinglePitch, "F_pT": got.CumulativePitch, "f_HalphaT": got.ProfileSlope,
			"f_falphaT": got.ProfileForm, "F_alphaT": got.ProfileTotal, "F_rT": got.Runout} {
			row.check(t, key, v/micrometre)
		}
	}
	const between = 0.35
	for id, d := range map[string]float64{"Q01": math.Sqrt(20 * 50), "Q02": math.Sqrt(50 * 125), "Q03": math.Sqrt(125 * 280)} {
		row := references(t)[id]
		m := math.Sqrt(2 * 3.5) // geometric means of the old table's ranges
		for class := 5; class <= 8; class++ {
			got, err := gauge.FlankTolerances(class, int(d/m), d, m)
			if err != nil {
				t.Fatal(err)
			}
			for key, v := range map[string]float64{"fpt": got.SinglePitch, "Fp": got.CumulativePitch, "fHa": got.ProfileSlope,
				"ffa": got.ProfileForm, "Fa": got.ProfileTotal, "Fr": got.Runout} {
				printed, ok := row.Outputs[key+" grade "+strconv.Itoa(class)]
				if !ok {
					continue
				}
				if old := parse(t, printed); math.Abs(math.Log(v/micrometre/old)) > between {
					t.Errorf("%s %s class %d: %.3g um, in the edition of 1995 %.3g", id, key, class, v/micrometre, old)
				}
			}
		}
	}
}

// TestEveryRowIsLookedAt keeps the list of rows and of tests together.
func TestEveryRowIsLookedAt(t *testing.T) {
	tested := []string{"T01", "T02-", "T03-", "T10", "T11", "T12", "T13", "T14", "T20", "T21", "T22", "T23", "T24", "T25", "T26-",
		"T30-", "T31-", "T32-", "calc-N-", "calc-Q-", "Q01", "Q02", "Q03", "Q10", "B10", "B11"} // Q10 holds the formulas themselves
rows:
	for id := range references(t) {
		for _, prefix := range tested {
			if strings.HasPrefix(id, prefix) {
				continue rows
			}
		}
		t.Errorf("row %s is not tested", id)
	}
}
