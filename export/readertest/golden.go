package readertest

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// fixedPoint is a number with a point, as both formats write lengths.
var fixedPoint = regexp.MustCompile(`-?[0-9]+\.[0-9]+`)

// lastDigit is how far numbers of golden files may be off: two steps of the
// ninth decimal, since other processors round intermediate results otherwise.
const lastDigit = 2.5e-9

// Golden compares a file with testdata/name, words exactly and numbers with a
// point to the last digit. With update the golden file is written instead.
func Golden(t testing.TB, name string, got []byte, update bool) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if update {
		if err := os.MkdirAll("testdata", 0o777); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(path, got, 0o666); err != nil {
			t.Fatal(err)
		}
		return
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatalf("%v (run the test with -update)", err)
	}
	if err := sameText(string(got), string(want)); err != nil {
		t.Errorf("%s: %v", path, err)
	}
}

// GoldenNames fails if testdata holds other files than these: a golden file
// without a test says nothing.
func GoldenNames(t testing.TB, names []string) {
	t.Helper()
	entries, err := os.ReadDir("testdata")
	if err != nil {
		t.Fatal(err)
	}
	var have []string
	for _, e := range entries {
		if !e.IsDir() { // the fuzzer keeps its findings in a folder
			have = append(have, e.Name())
		}
	}
	slices.Sort(names)
	if !slices.Equal(have, names) {
		t.Errorf("testdata holds %v, the test knows %v", have, names)
	}
}

func sameText(got, want string) error {
	g, w := strings.Split(got, "\n"), strings.Split(want, "\n")
	if len(g) != len(w) {
		return fmt.Errorf("%d lines, want %d", len(g), len(w))
	}
	for i := range g {
		gn, wn := fixedPoint.FindAllString(g[i], -1), fixedPoint.FindAllString(w[i], -1)
		if fixedPoint.ReplaceAllString(g[i], "#") != fixedPoint.ReplaceAllString(w[i], "#") || len(gn) != len(wn) {
			return fmt.Errorf("line %d: %q, want %q", i+1, g[i], w[i])
		}
		for k := range gn {
			a, _ := strconv.ParseFloat(gn[k], 64)
			b, _ := strconv.ParseFloat(wn[k], 64)
			if math.Abs(a-b) > lastDigit {
				return fmt.Errorf("line %d: %s, want %s", i+1, gn[k], wn[k])
			}
		}
	}
	return nil
}
