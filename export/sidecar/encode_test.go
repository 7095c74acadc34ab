package sidecar_test

import (
	"encoding/json"
	"math"
	"math/big"
	"math/rand/v2"
	"reflect"
	"strconv"
	"strings"
	"testing"
	"time"

	"flankwright/export/sidecar"
)

// fill gives every member of a value something to write, so that one that is added to
// the document is compared as well.
func fill(v reflect.Value, n *int) {
	*n++
	switch v.Kind() {
	case reflect.Pointer:
		v.Set(reflect.New(v.Type().Elem()))
		fill(v.Elem(), n)
	case reflect.Struct:
		for i := range v.NumField() {
			fill(v.Field(i), n)
		}
	case reflect.Slice:
		v.Set(reflect.MakeSlice(v.Type(), 2, 2))
		fill(v.Index(0), n)
		fill(v.Index(1), n)
	case reflect.Map:
		v.Set(reflect.MakeMap(v.Type()))
		for range 3 {
			value := reflect.New(v.Type().Elem()).Elem()
			fill(value, n)
			v.SetMapIndex(reflect.ValueOf("k"+strconv.Itoa(*n)), value)
		}
	case reflect.Interface:
		values := []any{"text", true, 7, 2.5, nil, []string{"a", "b"}, []string{}, map[string]any{"z": 1, "a": []any{1.5, "x", nil}},
			map[string]any{}, sidecar.Decimal(-0.25), sidecar.Value{Value: 3, Unit: "mm", Symbol: "d"}, json.RawMessage(`{"raw":[1,2]}`),
			time.Second, big.NewInt(5), []byte("bytes"), map[int]string{1: "one"}}
		if value := values[*n%len(values)]; value != nil {
			v.Set(reflect.ValueOf(value))
		}
	case reflect.String:
		v.SetString([]string{"plain", `quote " and \`, "<&>", "\u00e4\u2028", "line\nbreak", "\x7f\xff", ""}[*n%7])
	case reflect.Int:
		v.SetInt(int64(*n))
	case reflect.Float64:
		v.SetFloat(float64(*n) / 3)
	case reflect.Bool:
		v.SetBool(*n%2 == 0)
	}
}

// TestAppendIsIndentedJSON: the document is, byte for byte, what encoding/json writes.
func TestAppendIsIndentedJSON(t *testing.T) {
	for seed := range 200 {
		var d sidecar.Document
		if seed > 0 { // else everything is empty
			n := seed
			fill(reflect.ValueOf(&d).Elem(), &n)
		}
		want, err := json.MarshalIndent(&d, "", "  ")
		if err != nil {
			t.Fatal(err)
		}
		got, err := d.Append([]byte("before"))
		if err != nil {
			t.Fatal(err)
		}
		if string(got) != "before"+string(want)+"\n" {
			t.Fatalf("seed %d:\n%s\nwant\n%s", seed, got, want)
		}
	}
}

// TestAppendRefusesWhatIsNoNumber: nothing of a document with a NaN is kept.
func TestAppendRefusesWhatIsNoNumber(t *testing.T) {
	for _, value := range []any{sidecar.Decimal(math.NaN()), math.Inf(1), func() {}} {
		d := sidecar.Document{Dimensions: map[string]any{"x": value}}
		if got, err := d.Append([]byte("before")); err == nil || string(got) != "before" {
			t.Errorf("%v: %q, %v", value, got, err)
		}
	}
}

// TestDecimalDigits: numbers are rounded where their exact decimal expansion says, also
// next to the middle between two steps.
func TestDecimalDigits(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	for range 200_000 {
		v := (2*rng.Float64() - 1) * math.Pow(10, 14*rng.Float64()-6)
		if rng.IntN(2) == 0 { // a middle, as near as there is a double
			v = (math.Floor(v*1e9) + 0.5) / 1e9
		}
		want := strings.TrimRight(strings.TrimRight(strconv.FormatFloat(v, 'f', 9, 64), "0"), ".")
		if math.Abs(v) > 1e6 { // more digits than a double holds: any that read back
			rounded, _ := strconv.ParseFloat(want, 64)
			want = strconv.FormatFloat(rounded, 'f', -1, 64)
		}
		if want == "-0" || want == "" || want == "-" {
			want = "0"
		}
		if got, err := json.Marshal(sidecar.Decimal(v)); err != nil || string(got) != want {
			t.Fatalf("%v is written as %s, %v, want %s", v, got, err, want)
		}
	}
}
