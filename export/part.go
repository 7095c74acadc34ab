package export

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/body"
	"flankwright/profile/fit"
)

// Part is what the sheet of a gear, ring or rack shows. With a kerf, Drawn and Holes are the paths of the
// beam, else the part's own edges.
type Part struct {
	Tooth     *profile.Tooth
	Drawn     *fit.Tooth
	Holes     []body.Loop
	Fit       fit.Options // of the holes
	Unit      Unit
	Turn      float64 // rad, counter-clockwise
	Extent    fit.Extent
	Reference bool // whether reference circles and center lines are shown
	Cut       Cut
	Label     []fit.Path // mm, not yet turned
}

// Cut are aids for cutting; zero values leave them out. Lengths are mm.
type Cut struct {
	LeadIn   float64 // radius of the lead-ins
	Tabs     int     // gaps in the outline, on tip lands
	TabWidth float64
}

// Drawing lays the gear out: inner loops, outline, then what is not an edge.
func (g Part) Drawing() Drawing {
	d := Drawing{Unit: g.Unit}
	var leads []Item
	for _, l := range g.Holes {
		item, lead := g.hole(l)
		d.Items = append(d.Items, item)
		leads = append(leads, lead...)
	}
	for _, path := range g.outline() {
		d.Items = append(d.Items, Item{Layer: LayerOutline, Role: Outer, Path: &path,
			Tolerance: g.Drawn.Tolerance, Deviation: g.Drawn.Deviation})
		if g.Cut.LeadIn > 0 {
			first := path.Segments[0]
			leads = append(leads, leadIn(first.Start, first.StartTangent(), g.Cut.LeadIn))
		}
	}
	d.Items = append(d.Items, g.reference()...)
	d.Items = append(d.Items, leads...)
	rotate := r2.NewRotation(g.Turn, r2.Vec{}).Rotate
	for _, p := range g.Label {
		turned := fit.Path{}
		for _, s := range p.Segments {
			turned.Segments = append(turned.Segments, s.Mapped(rotate, false))
		}
		d.Items = append(d.Items, Item{Layer: LayerLabel, Role: Marker, Path: &turned})
	}
	return d
}

// outline is the toothed edge: one path, or the chains between tabs.
func (g Part) outline() []fit.Path {
	if g.Cut.Tabs > 0 {
		return g.Drawn.TabbedOutline(g.Cut.Tabs, g.Cut.TabWidth, g.Turn)
	}
	return []fit.Path{g.Drawn.Outline(g.Extent, g.Turn)}
}

// hole is an inner loop and its lead-in, if asked for. A bore is led into at its lowest
// place, opposite the keyway on +Y; a window at its outer edge.
func (g Part) hole(l body.Loop) (item Item, leads []Item) {
	layer := LayerHoles
	if l.Kind == body.Bore {
		layer = LayerBore
	}
	up := r2.Rotate(r2.Vec{Y: 1}, g.Turn, r2.Vec{})
	if center, radius, ok := l.Circle(); ok {
		center = r2.Rotate(center, g.Turn, r2.Vec{})
		if g.Cut.LeadIn > 0 {
			lowest := r2.Sub(center, r2.Scale(radius, up))
			// Clockwise at the lowest place is towards -X.
			leads = append(leads, leadIn(lowest, r2.Vec{X: -up.Y, Y: up.X}, math.Min(g.Cut.LeadIn, radius/2)))
		}
		return Item{Layer: layer, Role: Hole, Circle: &Circle{Center: center, Radius: radius}, Tolerance: g.Fit.Tolerance}, leads
	}
	path, deviation := fit.Loop(l.Pieces, g.Fit, g.Turn)
	if g.Cut.LeadIn > 0 {
		rate := r2.Norm
		if l.Kind == body.Bore {
			rate = func(p r2.Vec) float64 { return -r2.Dot(p, up) }
		}
		path = path.StartAt(path.BestStart(rate))
		first := path.Segments[0]
		leads = append(leads, leadIn(first.Start, first.StartTangent(), math.Min(g.Cut.LeadIn, roomForLead(path))))
	}
	return Item{Layer: layer, Role: Hole, Path: &path, Tolerance: g.Fit.Tolerance, Deviation: deviation}, leads
}

// reference is what helps to place the part and is not to be cut.
func (g Part) reference() []Item {
	var items []Item
	if g.Reference {
		for _, c := range g.Tooth.ReferenceCircles() {
			items = append(items, Item{Layer: LayerReference, Role: Marker, Circle: &Circle{Radius: c.Radius}})
		}
		for _, angle := range [2]float64{0, math.Pi / 2} {
			items = append(items, marker(g.ray(angle+math.Pi), g.ray(angle)))
		}
	}
	if g.Extent.Partial() {
		from, to := g.Extent.Limits(g.Tooth.Pitch())
		items = append(items, marker(g.ray(from), r2.Vec{}, g.ray(to)))
	}
	return items
}

// ray is the point of the tip circle at an angle from +Y.
func (g Part) ray(angle float64) r2.Vec {
	sin, cos := math.Sincos(math.Pi/2 + g.Turn + angle)
	return r2.Scale(g.Tooth.Dimensions.TipDiameter/2, r2.Vec{X: cos, Y: sin})
}

// marker is an open chain of straight lines that is not an edge of the part.
func marker(points ...r2.Vec) Item {
	var path fit.Path
	for i := 1; i < len(points); i++ {
		path.Segments = append(path.Segments, fit.LineTo(points[i-1], points[i]))
	}
	return Item{Layer: LayerReference, Role: Marker, Path: &path}
}
