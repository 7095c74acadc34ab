package label_test

import (
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
	"flankwright/profile/label"
)

// TestEffort: the region, which may have thousands of edges, is not asked too often, even
// where an edge runs along the text at just the margin.
func TestEffort(t *testing.T) {
	long := strings.Repeat("E", label.MaxLength)
	for name, c := range map[string]struct {
		region label.Region
		text   string
		height float64
		most   int
	}{
		"annulus, fitted": {annulus(10, 38, 0), "Z40 M2", 0, 20000},
		"holes, fitted":   {annulus(8, 40, 4, ring(6, 24)...), "Z40 M2", 0, 60000},
		"refused":         {annulus(9.5, 10, 0), long, 0, 1000000},
		"level":           {bar{r2.Box{Min: r2.Vec{X: -400, Y: -5 * 1.4}, Max: r2.Vec{X: 400}}}, long, 5, 1000000},
		"level, refused":  {bar{r2.Box{Min: r2.Vec{X: -400, Y: -5*1.4 + 1e-9}, Max: r2.Vec{X: 400}}}, long, 5, 1000000},
	} {
		asked := 0
		_, err := label.Place(c.text, c.height, counted{c.region, &asked})
		t.Logf("%s: asked %d times, %v", name, asked, err)
		if asked > c.most {
			t.Errorf("%s: asked %d times", name, asked)
		}
	}
}

func BenchmarkPlace(b *testing.B) {
	for _, c := range []struct {
		name   string
		height float64
		region label.Region
	}{
		{"given", 5, annulus(10, 38, 0)},
		{"fitted", 0, annulus(10, 38, 0)},
		{"holes", 0, annulus(8, 40, 4, ring(6, 24)...)},
		{"refused", 0, annulus(9, 12, 0)},
	} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			var last fit.Path
			for b.Loop() {
				if p, err := label.Place("Z40 M2", c.height, c.region); err == nil {
					last = p.Paths[0]
				}
			}
			_ = last
		})
	}
}
