package profile

import (
	"math"
	"testing"
)

// TestTrimmingTables: the smallest standard ring of 20 degrees that a pinion-type cutter
// cuts without trimming when fed in radially, addendum 1.25 m, sharp.
//
// Sources: SDP/SI, Elements of Metric Gear Technology, table 5-3a (found) for unshifted
// cutters, and table 5-3b (x_0 = 0.0075 z_0 + 0.05; partly found, other rows from memory);
// page T-46 there for the cutters that gouge the flanks of those rings.
func TestTrimmingTables(t *testing.T) {
	teeth := []int{15, 16, 17, 18, 19, 20, 21, 22, 24, 25, 27, 28, 30, 31, 32, 33, 34, 35, 38, 40, 42, 44, 48, 50, 56, 60, 64, 66, 80, 96, 100}
	for name, c := range map[string]struct {
		shift    func(z0 int) float64
		smallest []int
		gouging  int // the largest cutter that gouges
	}{
		"unshifted": {func(int) float64 { return 0 },
			[]int{34, 34, 35, 36, 37, 38, 39, 40, 42, 43, 45, 46, 48, 49, 50, 51, 52, 53, 56, 58, 60, 62, 66, 68, 74, 78, 82, 84, 98, 114, 118}, 22},
		"shifted": {func(z0 int) float64 { return 0.0075*float64(z0) + 0.05 },
			[]int{36, 38, 39, 40, 41, 42, 43, 45, 47, 48, 50, 52, 54, 55, 56, 58, 59, 60, 64, 66, 68, 71, 76, 78, 86, 90, 95, 98, 115, 136, 141}, 19},
	} {
		for i, z0 := range teeth {
			smallest := 34 // teeth, else the tip lies inside the base circle
			var g ringSpace
			var tool cutter
			for ; ; smallest++ {
				s := Spec{Form: FormRing, Module: 1, Teeth: smallest, CutterTeeth: z0, CutterShift: c.shift(z0),
					Rack: BasicRack{PressureAngle: 20 * math.Pi / 180, Addendum: 1, Dedendum: 1.25}}
				g = newRingSpace(s)
				if _, found := g.settleTip(s); found != nil {
					t.Fatal(found)
				}
				tool = g.newCutter(s, z0, 0)
				if !g.trims(tool, smallest) {
					break
				}
			}
			if smallest != c.smallest[i] {
				t.Errorf("%s cutter of %d teeth: ring of %d teeth, the table says %d", name, z0, smallest, c.smallest[i])
			}
			if got := g.gouges(tool); got != (z0 <= c.gouging) {
				t.Errorf("%s cutter of %d teeth in a ring of %d: gouges %v", name, z0, smallest, got)
			}
		}
	}
}
