package fit

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
)

// TestExtents: each partial extent is an open chain that starts and ends on its radial
// limits, and its copies, turned by what it covers, close the whole outline.
func TestExtents(t *testing.T) {
	for name, tooth := range variety(t) {
		for _, kind := range []Kind{Arc, Cubic, Line} {
			f := drawn(t, tooth, kind, 1e-3)
			whole := f.Outline(Extent{}, 0)
			for _, e := range []Extent{{Kind: ExtentTeeth, Teeth: 1}, {Kind: ExtentTeeth, Teeth: 3}, {Kind: ExtentSpace}} {
				const turn = 0.2
				o := f.Outline(e, turn)
				if o.Closed {
					t.Errorf("%s: extent %v is closed", name, e)
				}
				from, to := e.Limits(tooth.Pitch())
				first, last := o.Segments[0].Start, o.Segments[len(o.Segments)-1].End
				for _, end := range []struct {
					p     r2.Vec
					angle float64
				}{{first, from}, {last, to}} {
					want := math.Pi/2 + turn + end.angle
					if off := math.Remainder(math.Atan2(end.p.Y, end.p.X)-want, 2*math.Pi); math.Abs(off)*r2.Norm(end.p) > 1e-9 {
						t.Errorf("%s: extent %v ends %g rad off its limit", name, e, off)
					}
				}
				for i := 1; i < len(o.Segments); i++ {
					if o.Segments[i].Start != o.Segments[i-1].End {
						t.Fatalf("%s: gap in extent %v", name, e)
					}
				}
				// Length and swept area are those of the part of the whole.
				part := (to - from) / (2 * math.Pi)
				if got, want := o.Length(), whole.Length()*part; math.Abs(got-want) > 1e-9*want {
					t.Errorf("%s: extent %v is %g long, want %g", name, e, got, want)
				}
				if got, want := o.Area(), whole.Area()*part; math.Abs(got-want) > 1e-9*want {
					t.Errorf("%s: extent %v sweeps %g, want %g", name, e, got, want)
				}
			}
		}
	}
}

// TestArcLimitCountsPieces: the limits of teeth and of all agree with one another.
func TestArcLimitCountsPieces(t *testing.T) {
	f := drawn(t, solved(t, 2, 24, nil), Arc, 1e-3)
	all, one := f.ArcLimit(Extent{}), f.ArcLimit(Extent{Kind: ExtentTeeth, Teeth: 1})
	if all != 24*(one-1) { // a tooth alone has its root arc in two halves
		t.Errorf("limit of all %d, of a tooth %d", all, one)
	}
	if used := len(f.Outline(Extent{}, 0).Segments) - 1; used < all { // the first land is halved
		t.Errorf("%d arcs are fewer than the least %d", used, all)
	}
}
