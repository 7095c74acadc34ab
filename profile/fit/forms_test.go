package fit

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// formSpecs are rings and racks.
func formSpecs() map[string]profile.Spec {
	rack, _ := profile.LookupRack("iso53-a", 2)
	base := profile.Spec{Module: 2, Teeth: 48, Rack: rack.For(2, profile.RackChange{})}
	list := map[string]profile.Spec{}
	for name, change := range map[string]func(*profile.Spec){
		"ring":        func(s *profile.Spec) { s.Form = profile.FormRing },
		"ring, full":  func(s *profile.Spec) { s.Form, s.Rounding = profile.FormRing, profile.RoundingFull },
		"ring, edges": func(s *profile.Spec) { s.Form, s.TipRadius, s.ProfileShift = profile.FormRing, 0.3, 0.3 },
		"ring, cut":   func(s *profile.Spec) { s.Form, s.CutterTeeth = profile.FormRing, 28 },
		"ring, sharp": func(s *profile.Spec) {
			s.Form, s.Rounding, s.Rack.RootRadius = profile.FormRing, profile.RoundingExplicit, 0
		},
		"rack":         func(s *profile.Spec) { s.Form, s.Teeth = profile.FormRack, 7 },
		"rack, full":   func(s *profile.Spec) { s.Form, s.Teeth, s.Rounding = profile.FormRack, 7, profile.RoundingFull },
		"rack, edges":  func(s *profile.Spec) { s.Form, s.Teeth, s.TipChamfer, s.Thinning = profile.FormRack, 7, 0.3, 0.1 },
		"single pitch": func(s *profile.Spec) { s.Form, s.Teeth = profile.FormRack, 1 },
	} {
		s := base
		change(&s)
		list[name] = s
	}
	return list
}

// TestFormsWithinTolerance measures the drawn curves of one repetition against the exact
// ones, by the nearest of many points of those, and demands that the tolerance is used.
func TestFormsWithinTolerance(t *testing.T) {
	for name, s := range formSpecs() {
		tooth, err := profile.Solve(s)
		if err != nil {
			t.Fatal(err)
		}
		for _, kind := range []Kind{Arc, Cubic, Line} {
			for _, tolerance := range []float64{1e-3, 1e-5} {
				f, err := NewTooth(tooth.Outline, Options{Curves: kind, Tolerance: tolerance})
				if err != nil {
					t.Fatal(err)
				}
				if !(f.Deviation <= tolerance) {
					t.Errorf("%s, kind %d: deviation %g of %g", name, kind, f.Deviation, tolerance)
				}
				worst := 0.0
				for i, list := range [][]Segment{f.Land, f.Side, f.Root} {
					for _, seg := range list {
						for _, u := range []float64{0.02, 0.25, 0.5, 0.77} {
							p := pointAt(seg, u)
							worst = math.Max(worst, distanceToPart(tooth.Outline, i, p))
						}
					}
				}
				if worst > tolerance*(1+1e-6) {
					t.Errorf("%s, kind %d, tolerance %g: a drawn point is %g off", name, kind, tolerance, worst)
				}
				// Racks are straight, and one cubic a curve is much nearer than asked.
				if s.Form == profile.FormRing && kind != Cubic && worst < 0.3*tolerance {
					t.Errorf("%s, kind %d: of the tolerance %g only %g is used", name, kind, tolerance, worst)
				}
			}
		}
	}
}

// distanceToPart is how far p is from the land (0), side (1) or root (2).
func distanceToPart(o profile.Outline, part int, p r2.Vec) float64 {
	var curves []profile.Curve
	switch part {
	case 0:
		curves = append(curves, o.Land)
	case 1:
		for _, piece := range o.Side {
			curves = append(curves, piece.Curve)
		}
	default:
		curves = append(curves, o.Root)
	}
	least := math.Inf(1)
	for _, c := range curves {
		least = math.Min(least, distanceFrom(c, p))
	}
	return least
}

// distanceFrom closes in on the point of c nearest to p.
func distanceFrom(c profile.Curve, p r2.Vec) float64 {
	from, to := c.Domain()
	at := func(share float64) float64 { return r2.Norm(r2.Sub(c.At(from+(to-from)*share), p)) }
	const coarse = 200
	best, where := math.Inf(1), 0.0
	for i := range coarse + 1 {
		if d := at(float64(i) / coarse); d < best {
			best, where = d, float64(i)/coarse
		}
	}
	for step := 1.0 / coarse; step > 1e-12; step /= 2 {
		for _, share := range [2]float64{math.Max(0, where-step), math.Min(1, where+step)} {
			if d := at(share); d < best {
				best, where = d, share
			}
		}
	}
	return best
}

// TestFormOutlines: whole outlines close or end as they should, partial ones lie where
// they are asked for.
func TestFormOutlines(t *testing.T) {
	for name, s := range formSpecs() {
		tooth, err := profile.Solve(s)
		if err != nil {
			t.Fatal(err)
		}
		f, err := NewTooth(tooth.Outline, Options{Curves: Arc, Tolerance: 1e-3})
		if err != nil {
			t.Fatal(err)
		}
		d := tooth.Dimensions
		for _, turn := range []float64{0, 0.7} {
			back := r2.NewRotation(-turn, r2.Vec{}).Rotate
			whole := f.Outline(Extent{}, turn)
			label := fmt.Sprintf("%s, turn %g", name, turn)
			if s.Form == profile.FormRing {
				if !whole.Closed || !(whole.Area() > math.Pi*d.TipDiameter*d.TipDiameter/4) || !(whole.Area() < math.Pi*d.RootDiameter*d.RootDiameter/4) {
					t.Errorf("%s: closed %v, area %g", label, whole.Closed, whole.Area())
				}
			} else {
				first, last := back(whole.Segments[0].Start), back(whole.Segments[len(whole.Segments)-1].End)
				p := d.CircularPitch
				if whole.Closed || math.Abs(first.X-(float64(s.Teeth)-0.5)*p) > 1e-9 || math.Abs(last.X+p/2) > 1e-9 || math.Abs(first.Y+d.Dedendum) > 1e-9 {
					t.Errorf("%s: from %v to %v", label, first, last)
				}
				half := f.Outline(Extent{HalfTeeth: true}, turn)
				first, last = back(half.Segments[0].Start), back(half.Segments[len(half.Segments)-1].End)
				if math.Abs(first.X-float64(s.Teeth)*p) > 1e-9 || math.Abs(last.X) > 1e-9 || math.Abs(first.Y-d.Addendum) > 1e-9 {
					t.Errorf("%s, half teeth: from %v to %v", label, first, last)
				}
			}
			// One tooth is centered on +Y and has the tip in its middle.
			one := f.Outline(Extent{Kind: ExtentTeeth, Teeth: 1}, turn)
			first, last := back(one.Segments[0].Start), back(one.Segments[len(one.Segments)-1].End)
			if math.Abs(first.X+last.X) > 1e-9 || math.Abs(first.Y-last.Y) > 1e-9 || one.Closed {
				t.Errorf("%s: a tooth from %v to %v", label, first, last)
			}
			tip, root := d.Addendum, -d.Dedendum
			if s.Form == profile.FormRing {
				tip, root = d.TipDiameter/2, d.RootDiameter/2
			}
			for _, end := range []r2.Vec{first, last} {
				if math.Abs(tooth.Outline.Height(end)-root) > 1e-6 {
					t.Errorf("%s: a tooth ends at %v, not on the root", label, end)
				}
			}
			space := f.Outline(Extent{Kind: ExtentSpace}, turn)
			for _, end := range []r2.Vec{space.Segments[0].Start, space.Segments[len(space.Segments)-1].End} {
				if math.Abs(tooth.Outline.Height(back(end))-tip) > 1e-6 {
					t.Errorf("%s: a space ends at %v, not on the tip", label, end)
				}
			}
		}
	}
}

// TestRackLoops: area and perimeter are those of the bar and its teeth, and a beam's loop
// is as much larger as a convex outline's would be at its corners.
func TestRackLoops(t *testing.T) {
	for name, s := range formSpecs() {
		if s.Form != profile.FormRack {
			continue
		}
		tooth, err := profile.Solve(s)
		if err != nil {
			t.Fatal(err)
		}
		for _, kind := range []Kind{Arc, Cubic, Line} {
			f, err := NewTooth(tooth.Outline, Options{Curves: kind, Tolerance: 1e-4})
			if err != nil {
				t.Fatal(err)
			}
			for _, half := range []bool{false, true} {
				const height = 9.0
				loop := f.Rack(half, Bar{Height: height}, 0.3)
				d := tooth.Dimensions
				// Land, sides and root of one repetition over the back, by the trapezoid rule
				// on the exact curves.
				area := float64(s.Teeth) * areaOver(tooth.Outline, height)
				if math.Abs(loop.Area()-area) > 1e-4*float64(s.Teeth)*4*d.WholeDepth {
					t.Errorf("%s, kind %d, half teeth %v: area %g, not %g", name, kind, half, loop.Area(), area)
				}
				if !loop.Closed {
					t.Errorf("%s is open", name)
				}
				const width = 0.4
				beam, err := tooth.Beam(width)
				if err != nil {
					t.Fatal(err)
				}
				g, err := NewTooth(beam.Outline, Options{Curves: kind, Tolerance: 1e-4})
				if err != nil {
					t.Fatal(err)
				}
				around := g.Rack(half, Bar{Height: height, Outside: width / 2}, 0.3)
				// Steiner's formula holds for any outline whose parallel does not fold.
				want := loop.Area() + loop.Length()*width/2 + math.Pi*width*width/4
				if math.Abs(around.Area()-want) > 2e-4*loop.Length() {
					t.Errorf("%s, kind %d, half teeth %v: the beam's area %g, not %g", name, kind, half, around.Area(), want)
				}
			}
		}
	}
}

// areaOver is the area of one repetition of a rack down to its back.
func areaOver(o profile.Outline, height float64) float64 {
	sum := 0.0
	add := func(c profile.Curve, times float64) {
		from, to := c.Domain()
		const steps = 2000
		at := c.At(from)
		for i := range steps {
			next := c.At(from + (to-from)*float64(i+1)/steps)
			sum += times * (at.X - next.X) * (at.Y + next.Y + 2*height) / 2
			at = next
		}
	}
	add(o.Land, 1)
	for _, p := range o.Side {
		add(p.Curve, 2)
	}
	if o.Root != nil {
		add(o.Root, 1)
	}
	return sum
}
