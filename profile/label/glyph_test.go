package label

import (
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
)

// TestRoundingsFit: the arcs at the two ends of a line do not take more than the line,
// and no stroke begins or ends in a rounding.
func TestRoundingsFit(t *testing.T) {
	for _, c := range Characters() {
		g, ok := glyphOf(c)
		if !ok {
			t.Fatalf("%q has no drawing", c)
		}
		for _, s := range g.strokes {
			if len(s) < 2 || s[0].radius != 0 || s[len(s)-1].radius != 0 {
				t.Errorf("%q: %v", c, s)
			}
			trim := make([]float64, len(s))
			for i := 1; i < len(s)-1; i++ {
				if s[i].radius > 0 {
					_, trim[i] = s.rounding(i)
				}
			}
			for i := range len(s) - 1 {
				length := r2.Norm(r2.Sub(s[i+1].at(r2.Vec{}), s[i].at(r2.Vec{})))
				if over := trim[i] + trim[i+1] - length; over > stub {
					t.Errorf("%q: the roundings at %v and %v are %g longer than the line", c, s[i], s[i+1], over)
				}
			}
		}
	}
}

// TestNoOtherGlyphs: the drawings and Characters agree on every rune up to U+FFFF.
func TestNoOtherGlyphs(t *testing.T) {
	drawn := map[rune]bool{}
	for _, c := range Characters() {
		drawn[c] = true
	}
	for c := rune(-1); c <= 0xffff; c++ {
		if _, ok := glyphOf(c); ok != drawn[c] {
			t.Errorf("%q: has a drawing: %v", c, ok)
		}
	}
}
