package svgtest_test

import (
	"math"
	"strings"
	"testing"

	"flankwright/export/readertest"
	"flankwright/export/svg"
	"flankwright/export/svg/svgtest"
)

// Known areas and lengths; counter-clockwise as one sees it is positive.
func TestParse(t *testing.T) {
	for _, tc := range []struct {
		d            string
		area, length float64
		commands     string
	}{
		{"M 0.0 0.0 L 0.0 2.0 L 2.0 2.0 L 2.0 0.0 L 0.0 0.0 Z", 4, 8, "MLLLLZ"},
		{"M 0.0 0.0 L 2.0 0.0 L 2.0 2.0 L 0.0 2.0 L 0.0 0.0 Z", -4, 8, "MLLLLZ"},
		{"M 2.0 0.0 A 2.0 2.0 0 0 0 0.0 -2.0 A 2.0 2.0 0 0 0 -2.0 0.0 A 2.0 2.0 0 0 0 0.0 2.0 A 2.0 2.0 0 0 0 2.0 0.0 Z",
			4 * math.Pi, 4 * math.Pi, "MAAAAZ"},
		{"M 2.0 0.0 A 2.0 2.0 0 0 1 0.0 2.0 L 0.0 0.0 L 2.0 0.0 Z", -math.Pi, math.Pi + 4, "MALLZ"},
		{"M 0.0 0.0 C 0.333333333 -0.333333333 0.666666667 -0.333333333 1.0 0.0 L 0.0 0.0 Z",
			-1.0 / 6, 1 + (math.Sqrt2+math.Asinh(1))/2, "MCLZ"},
		{"M 0.0 0.0 L 3.0 4.0", 0, 5, "ML"},
	} {
		sub, err := svgtest.Parse(tc.d)
		if err != nil || len(sub) != 1 {
			t.Errorf("%s: %v %v", tc.d, sub, err)
			continue
		}
		const tol = 1e-6
		if s := sub[0]; s.Commands != tc.commands || math.Abs(s.Length-tc.length) > tol || math.Abs(s.Area-tc.area) > tol {
			t.Errorf("%s: %+v, want area %v, length %v", tc.d, s, tc.area, tc.length)
		}
	}
}

// Each of these changes to a good file must be found.
func TestReadFinds(t *testing.T) {
	data, err := svg.Marshal(readertest.Sample{Lobes: 4, Size: 20, Reference: true}.Drawing(), svg.Options{})
	if err != nil {
		t.Fatal(err)
	}
	good := string(data)
	for _, tc := range []struct{ name, from, to string }{
		{"relative command", " L ", " l "},
		{"relative arc", " A ", " a "},
		{"large arc", " 0 0 1 ", " 0 1 1 "},
		{"packed flags", " 0 0 1 ", " 0 01 "},
		{"no closure", " Z", ""},
		{"exponent", "M ", "M 1e1 "},
		{"units in the view box", `viewBox="0 0 `, `viewBox="1 0 `},
		{"pixel size", `mm"`, `px"`},
		{"no fill rule", `fill-rule="evenodd"`, ``},
		{"transform", `<g id`, `<g transform="scale(1 -1)" id`},
		{"style", `<g id`, `<g style="fill:none" id`},
		{"text", `</g>`, `<text>x</text></g>`},
		{"off the page", "M ", "M -"},
		{"named colour", "#000000", "black"},
		{"cut off", "</svg>", ""},
	} {
		bad := strings.Replace(good, tc.from, tc.to, 1)
		if tc.name == "relative command" {
			bad = strings.Replace(good, " A ", " L ", 1) // an arc's numbers after L
		}
		if bad == good {
			t.Errorf("%s: nothing to change", tc.name)
			continue
		}
		if _, err := svgtest.Read([]byte(bad)); err == nil {
			t.Errorf("%s: not found", tc.name)
		}
	}
}

// The reader takes any bytes without a panic.
func FuzzRead(f *testing.F) {
	data, err := svg.Marshal(readertest.Sample{Lobes: 2, Size: 20, Reference: true, Style: readertest.Cubics}.Drawing(), svg.Options{})
	if err != nil {
		f.Fatal(err)
	}
	f.Add(data)
	f.Add([]byte("<svg><path d='M 0.0 0.0 A 1.0 1.0 0 0 0 1.0 0.0'/></svg>"))
	f.Fuzz(func(t *testing.T, data []byte) {
		_, _ = svgtest.Read(data)
	})
}
