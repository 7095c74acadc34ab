package fixed

import (
	"math"
	"math/rand/v2"
	"strconv"
	"strings"
	"testing"
)

func TestAppend(t *testing.T) {
	for _, tc := range []struct {
		x    float64
		want string
	}{
		{0, "0.0"},
		{math.Copysign(0, -1), "0.0"},
		{-4e-10, "0.0"},
		{1, "1.0"},
		{-20, "-20.0"},
		{0.1, "0.1"},
		{1.0000000004, "1.0"},
		{1.0000000006, "1.000000001"},
		{-0.000000001, "-0.000000001"},
		{1234.5678, "1234.5678"},
		{999999.999999999, "999999.999999999"},
		{0.9999999999, "1.0"},
		{1e15, "1000000000000000.0"},
		{100, "100.0"},
	} {
		if got := string(Append(nil, tc.x)); got != tc.want {
			t.Errorf("Append(%v) = %q, want %q", tc.x, got, tc.want)
		}
	}
}

func TestAppendDecimals(t *testing.T) {
	for _, tc := range []struct {
		x    float64
		want string
	}{{-1e-14, "0.0"}, {90, "90.0"}, {33.123456789012, "33.123456789012"}, {359.5, "359.5"}} {
		if got := string(AppendDecimals(nil, tc.x, 12)); got != tc.want {
			t.Errorf("AppendDecimals(%v) = %q, want %q", tc.x, got, tc.want)
		}
	}
}

// The digits written for a rounded number read back as that very number, and a
// second rounding changes nothing.
func TestRoundTrip(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for range 200_000 {
		x := (2*rng.Float64() - 1) * math.Pow(10, 12*rng.Float64()-6)
		r := Round(x)
		if Round(r) != r {
			t.Fatalf("Round(Round(%v)) = %v, not %v", x, Round(r), r)
		}
		got, err := strconv.ParseFloat(string(Append(nil, r)), 64)
		if err != nil || got != r {
			t.Fatalf("%v reads back as %v (%v)", r, got, err)
		}
		if string(Append(nil, x)) != string(Append(nil, r)) {
			t.Fatalf("digits of %v differ before and after rounding", x)
		}
		if d := math.Abs(r - x); d > Step/2+math.Abs(x)*1e-15 {
			t.Fatalf("Round(%v) is %v away", x, d)
		}
	}
}

// Digits are those of strconv, for whole numbers of steps of every length.
func TestAppendDigits(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	for range 100_000 {
		n := rng.Int64N(1<<51) >> rng.IntN(51) // below Limit, half a step is seen exactly
		if rng.IntN(2) == 0 {
			n -= n % 1000
		}
		x := float64(n) / 1e9
		want := strings.TrimRight(strconv.FormatFloat(-x, 'f', Decimals, 64), "0")
		if strings.HasSuffix(want, ".") {
			want += "0"
		}
		if n == 0 {
			want = "0.0"
		}
		if got := string(Append([]byte("x"), -x)); got != "x"+want {
			t.Fatalf("Append(%v) = %q, want %q", -x, got, want)
		}
	}
}

func TestInRange(t *testing.T) {
	for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), Limit, -Limit} {
		if InRange(x) {
			t.Errorf("InRange(%v)", x)
		}
	}
	if !InRange(0) || !InRange(-999999) {
		t.Error("small numbers must be in range")
	}
}

func BenchmarkAppend(b *testing.B) {
	buf := make([]byte, 0, 64)
	b.ReportAllocs()
	for b.Loop() {
		buf = Append(buf[:0], 21.123456789)
	}
}
