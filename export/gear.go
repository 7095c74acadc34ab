package export

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/fit"
)

// Gear is what a gear's sheet shows. With a kerf, Drawn and Bore are the path of the
// beam, else the part's own edges.
type Gear struct {
	Tooth     *profile.Tooth
	Drawn     *fit.Tooth
	Bore      float64 // mm, diameter; 0 for none
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

// Drawing lays the gear out: bore, outline, then what is not an edge.
func (g Gear) Drawing() Drawing {
	d := Drawing{Unit: g.Unit}
	var leads []Item
	if g.Bore > 0 {
		d.Items = append(d.Items, Item{Layer: LayerBore, Role: Hole, Circle: &Circle{Radius: g.Bore / 2}})
		if g.Cut.LeadIn > 0 {
			// At its lowest place, opposite tooth 1; a hole is travelled clockwise, there
			// towards -X. It has room for half its radius.
			up := r2.Rotate(r2.Vec{Y: 1}, g.Turn, r2.Vec{})
			lowest := r2.Scale(-g.Bore/2, up)
			leads = append(leads, leadIn(lowest, r2.Vec{X: -up.Y, Y: up.X}, math.Min(g.Cut.LeadIn, g.Bore/4)))
		}
	}
	for _, path := range g.outline() {
		d.Items = append(d.Items, Item{Layer: LayerOutline, Role: Outer, Path: &path})
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
func (g Gear) outline() []fit.Path {
	if g.Cut.Tabs > 0 {
		return g.Drawn.TabbedOutline(g.Cut.Tabs, g.Cut.TabWidth, g.Turn)
	}
	return []fit.Path{g.Drawn.Outline(g.Extent, g.Turn)}
}

// reference is what helps to place the part and is not to be cut.
func (g Gear) reference() []Item {
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
func (g Gear) ray(angle float64) r2.Vec {
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
