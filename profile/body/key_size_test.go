package body_test

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
)

// inch is one inch in mm.
const inch = 25.4

// sizeRow is one row of testdata/key-sizes.json; the file says how far to trust it.
type sizeRow struct {
	ID            string
	Inputs        map[string]string
	Outputs       map[string]string
	PrintedDigits map[string]int `json:"printed_digits"`
	Recomputed    map[string]string
}

// sizeRows reads the rows whose names begin with a prefix.
func sizeRows(t *testing.T, prefix string) []sizeRow {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("..", "..", "testdata", "key-sizes.json"))
	if err != nil {
		t.Fatal(err)
	}
	var file struct{ Rows []sizeRow }
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	var out []sizeRow
	for _, r := range file.Rows {
		if strings.HasPrefix(r.ID, prefix) {
			out = append(out, r)
		}
	}
	if len(out) == 0 {
		t.Fatalf("no rows %s", prefix)
	}
	return out
}

// fraction reads "1 3/4", "3/4" or "1.75".
func fraction(t *testing.T, s string) float64 {
	t.Helper()
	sum := 0.0
	for _, part := range strings.Fields(s) {
		over, under, isFraction := strings.Cut(part, "/")
		v, err := strconv.ParseFloat(over, 64)
		if err == nil && isFraction {
			var u float64
			u, err = strconv.ParseFloat(under, 64)
			v /= u
		}
		if err != nil {
			t.Fatalf("%q: %v", s, err)
		}
		sum += v
	}
	return sum
}

// keyed is a bore with a keyway of a standard, and its measures taken on the loop: width
// between the straight sides, from the bottom across the bore, and the corners' radius.
func keyed(t *testing.T, bore float64, standard body.KeyStandard) (width, across, corner float64) {
	t.Helper()
	b := solve(t, body.Spec{Bore: bore, Keyway: body.Keyway{Standard: standard}}, plate(10*bore))
	low, high := math.Inf(1), math.Inf(-1)
	for _, p := range points(b.Loops[0], 720) {
		low, high = math.Min(low, p.Y), math.Max(high, p.Y)
	}
	left, right := math.NaN(), math.NaN()
	for _, p := range b.Loops[0].Pieces {
		switch c := p.Curve.(type) {
		case profile.StraightLine:
			if c.A.X == c.B.X && c.A.X < 0 {
				left = c.A.X
			} else if c.A.X == c.B.X {
				right = c.A.X
			}
		case profile.CircleArc:
			if (c.Center != r2.Vec{}) {
				corner = c.Radius
			}
		}
	}
	// The lowest point of the bore is the middle of its arc, which is sampled.
	return right - left, high - low, corner
}

// TestISOKeySizes compares with every row of the tables at both ends of its bores, the
// upper one belonging to it and the lower one to the row before.
func TestISOKeySizes(t *testing.T) {
	corners := map[string]string{}
	for _, r := range sizeRows(t, "K02") {
		corners = r.Outputs
	}
	rows := 0
	for _, id := range []string{"Y01", "Y02", "K01"} {
		for bores, size := range sizeRows(t, id)[0].Outputs {
			rows++
			var over, to, b, h, t1, t2 float64
			if _, err := fmt.Sscanf(bores+" "+size, "%g-%g %gx%g %g %g", &over, &to, &b, &h, &t1, &t2); err != nil {
				t.Fatal(err)
			}
			r2 := math.NaN()
			for widths, radii := range corners {
				var least, largest, low, high float64
				if _, err := fmt.Sscanf(widths+" "+radii, "%g-%g %g-%g", &least, &largest, &low, &high); err != nil {
					t.Fatal(err)
				}
				if least <= b && b <= largest {
					r2 = high
				}
			}
			for _, bore := range []float64{math.Nextafter(over*(1+1e-13), to), (over + to) / 2, to} {
				width, across, corner := keyed(t, bore, body.KeyISO)
				near(t, bores+" width b", width, b, rounding*b)
				near(t, bores+" across d + t2", across, bore+t2, 10*rounding*bore)
				near(t, bores+" corner r2", corner, r2, 0)
			}
		}
	}
	if rows != 26 {
		t.Errorf("%d rows, want the 26 of the standard", rows)
	}
}

// TestANSIKeySizes compares widths with the table, and T with its definition.
func TestANSIKeySizes(t *testing.T) {
	for _, id := range []string{"Y03", "K03"} {
		for bores, size := range sizeRows(t, id)[0].Outputs {
			overText, toText, _ := strings.Cut(bores, "-")
			over, to := fraction(t, overText), fraction(t, toText)
			squareText, rest, _ := strings.Cut(size, " sq")
			w := fraction(t, squareText)
			h := w
			if over >= 6.5 {
				h = fraction(t, strings.TrimSuffix(strings.TrimPrefix(rest, ", "), " rect"))
			}
			for _, bore := range []float64{math.Nextafter(over*(1+1e-13), to), (over + to) / 2, to} {
				width, across, corner := keyed(t, bore*inch, body.KeyANSI)
				y := (bore - math.Sqrt(bore*bore-w*w)) / 2
				near(t, bores+" width", width/inch, w, rounding*w)
				near(t, bores+" T", across/inch, bore-y+h/2+0.005, 10*rounding*bore)
				near(t, bores+" corner", corner, 0, 0)
			}
		}
	}
}

// TestANSIDepth compares T with the printed and recomputed values of square keys.
func TestANSIDepth(t *testing.T) {
	for _, r := range sizeRows(t, "Y04") {
		bore, printed, exact := fraction(t, r.Inputs["D"]), fraction(t, r.Outputs["T_sq"]), fraction(t, r.Recomputed["T_sq"])
		width, across, _ := keyed(t, bore*inch, body.KeyANSI)
		near(t, r.ID+" W", width/inch, fraction(t, r.Inputs["W"]), rounding)
		near(t, r.ID+" T", across/inch, exact, 10*rounding*bore)
		near(t, r.ID+" T, as printed", across/inch, printed, 0.5001*math.Pow10(-r.PrintedDigits["T_sq"]))
	}
}

// TestNoKeySize asks for bores beside the tables.
func TestNoKeySize(t *testing.T) {
	for _, tc := range []struct {
		standard body.KeyStandard
		bore     float64
		bound    float64
	}{
		{body.KeyISO, 6, 6}, {body.KeyISO, 2, 6}, {body.KeyISO, 500.01, 500},
		{body.KeyANSI, 5.0 / 16 * inch, 5.0 / 16 * inch}, {body.KeyANSI, 1, 5.0 / 16 * inch}, {body.KeyANSI, 11.01 * inch, 11 * inch},
	} {
		s := body.Spec{Bore: tc.bore, Keyway: body.Keyway{Standard: tc.standard}}
		found := refusal(t, s, plate(2000))
		if f := found[0]; len(found) != 1 || f.Rule != body.RuleNoKeySize || f.Bound.Value != tc.bound || f.Hint == "" {
			t.Errorf("bore %v: %+v", tc.bore, found)
		}
		// Just inside the bound there is one.
		s.Bore = tc.bound * (1 + 1e-9)
		if tc.bore > tc.bound {
			s.Bore = tc.bound
		}
		solve(t, s, plate(2000))
	}
}
