package export

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
	"flankwright/profile/fit"
)

// cutGear is a gear with a keyed bore, holes and windows, to be cut with lead-ins.
func cutGear(t *testing.T, cut Cut, turn float64) Part {
	t.Helper()
	rack, _ := profile.LookupRack("iso53-a", 2)
	tooth, err := profile.Solve(profile.Spec{Module: 2, Teeth: 60, Rack: rack.For(2, profile.RackChange{})})
	if err != nil {
		t.Fatal(err)
	}
	d := tooth.Dimensions
	inside, err := body.Solve(body.Spec{Bore: 20, Keyway: body.Keyway{Standard: body.KeyISO},
		HoleCircles: []body.HoleCircle{{N: 4, Diameter: 4, Circle: 40}}, Windows: body.Windows{N: 4, HubDiameter: 52}},
		body.Around{RootDiameter: d.RootDiameter, WholeDepth: d.WholeDepth})
	if err != nil {
		t.Fatal(err)
	}
	o := fit.Options{Curves: fit.Arc, Tolerance: 1e-3}
	drawn, err := fit.NewTooth(tooth.Outline, o)
	if err != nil {
		t.Fatal(err)
	}
	return Part{Tooth: tooth, Drawn: drawn, Holes: inside.Loops, Fit: o, Cut: cut, Turn: turn}
}

// TestLeadIns: every edge has one lead-in; it arrives on the edge, in the direction of
// travel with the material on the left, and comes from the scrap side: pierced outside
// the outline or inside the hole, nowhere nearer to the edge than at its end.
func TestLeadIns(t *testing.T) {
	for _, cut := range []Cut{{LeadIn: 1.5}, {LeadIn: 1.5, Tabs: 3, TabWidth: 0.3}} {
		d := cutGear(t, cut, 0.4).Drawing()
		var edges, leads []Item
		for _, it := range d.Items {
			switch {
			case it.Layer == LayerLead:
				leads = append(leads, it)
			case it.Role != Marker:
				edges = append(edges, it)
			}
		}
		if len(leads) != len(edges) {
			t.Fatalf("%d lead-ins for %d edges", len(leads), len(edges))
		}
		for i, it := range leads {
			arc := it.Path.Segments[0]
			const rounding = 1e-9 // mm and rad
			off, along := onEdge(edges[i], arc.End)
			if off > rounding {
				t.Errorf("lead-in %d ends %g mm off its edge", i, off)
			}
			if turn := r2.Norm(r2.Sub(arc.EndTangent(), along)); turn > rounding {
				t.Errorf("lead-in %d arrives %g rad off the direction of travel", i, turn)
			}
			right := r2.Vec{X: along.Y, Y: -along.X}
			if side := r2.Dot(r2.Sub(arc.Start, arc.End), right); side <= 0 {
				t.Errorf("lead-in %d is pierced on the material's side", i)
			}
			if reach := arc.Radius(); reach > cut.LeadIn+rounding || reach < 0.2 {
				t.Errorf("lead-in %d has a radius of %g", i, reach)
			}
		}
	}
}

// onEdge is how far a point is from where an edge can be led into, and the direction of
// travel there: any place of a circle, the start of a path.
func onEdge(it Item, p r2.Vec) (off float64, along r2.Vec) {
	if c := it.Circle; c != nil {
		out := r2.Sub(p, c.Center)
		// Clockwise, with the material outside on the left.
		return math.Abs(r2.Norm(out) - c.Radius), r2.Unit(r2.Vec{X: out.Y, Y: -out.X})
	}
	s := it.Path.Segments[0]
	return r2.Norm(r2.Sub(p, s.Start)), s.StartTangent()
}

// TestBoreIsLedIntoAwayFromTheKeyway: at its lowest place, and turned with the part.
func TestBoreIsLedIntoAwayFromTheKeyway(t *testing.T) {
	const turn = 0.4
	for _, it := range cutGear(t, Cut{LeadIn: 1}, turn).Drawing().Items {
		if it.Layer != LayerBore {
			continue
		}
		start := r2.Rotate(it.Path.Segments[0].Start, -turn, r2.Vec{})
		if off := r2.Norm(r2.Sub(start, r2.Vec{Y: -10})); off > 1e-9 {
			t.Errorf("the bore starts at %v, want (0, -10)", start)
		}
	}
}

// TestInnerLoopsComeFirst: bore, holes and windows before the outline, edges before what
// is not cut.
func TestInnerLoopsComeFirst(t *testing.T) {
	last := Hole
	for i, it := range cutGear(t, Cut{LeadIn: 1}, 0).Drawing().Items {
		rank := map[Role]int{Hole: 0, Outer: 1, Marker: 2}
		if rank[it.Role] < rank[last] {
			t.Errorf("item %d on %s comes after one of role %d", i, it.Layer, last)
		}
		last = it.Role
	}
}

// TestReportTellsTheDeviationOfEachLayer: chords of a keyed bore deviate, and say so.
func TestReportTellsTheDeviationOfEachLayer(t *testing.T) {
	g := cutGear(t, Cut{}, 0)
	g.Fit.Curves = fit.Line
	for _, r := range g.Drawing().Report() {
		if r.Tolerance != 1e-3 || r.Deviation <= 0 || r.Deviation > r.Tolerance {
			t.Errorf("%s: deviation %g of %g", r.Layer, r.Deviation, r.Tolerance)
		}
	}
}
