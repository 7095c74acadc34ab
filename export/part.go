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

	// RimRadius is the outer edge of a ring, or the beam's path around it; 0 where the
	// drawing holds the toothed bore only.
	RimRadius float64
	Bar       fit.Bar // of a rack
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
		item := Item{Layer: LayerOutline, Role: Outer, Path: &path, Tolerance: g.Drawn.Tolerance, Deviation: g.Drawn.Deviation}
		room := g.Cut.LeadIn
		if g.Tooth.Form == profile.FormRing && path.Closed {
			item.Role = Hole
			room = math.Min(room, g.Tooth.Dimensions.TipDiameter/4)
		}
		d.Items = append(d.Items, item)
		if g.Cut.LeadIn > 0 {
			first := path.Segments[0]
			leads = append(leads, leadIn(first.Start, first.StartTangent(), room))
		}
	}
	if rim := g.RimRadius; rim > 0 && !g.Extent.Partial() {
		d.Items = append(d.Items, Item{Layer: LayerOutline, Role: Outer, Circle: &Circle{Radius: rim}, Tolerance: g.Fit.Tolerance})
		if g.Cut.LeadIn > 0 {
			up := r2.Rotate(r2.Vec{Y: 1}, g.Turn, r2.Vec{})
			// Counter-clockwise at the lowest place is towards +X.
			leads = append(leads, leadIn(r2.Scale(-rim, up), r2.Vec{X: up.Y, Y: -up.X}, g.Cut.LeadIn))
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

// outline is the toothed edge: one path, or the chains between tabs. That of a ring is a
// hole and runs clockwise; that of a whole rack goes round its back.
func (g Part) outline() []fit.Path {
	switch g.Tooth.Form {
	case profile.FormRing:
		return []fit.Path{g.Drawn.Outline(g.Extent, g.Turn).Reversed()}
	case profile.FormRack:
		if !g.Extent.Partial() {
			return []fit.Path{g.Drawn.Rack(g.Extent.HalfTeeth, g.Bar, g.Turn)}
		}
	}
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
	if g.Tooth.Form == profile.FormRack {
		return g.rackReference()
	}
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

// ray is the point of the part's outermost circle at an angle from +Y.
func (g Part) ray(angle float64) r2.Vec {
	sin, cos := math.Sincos(math.Pi/2 + g.Turn + angle)
	d := g.Tooth.Dimensions
	radius := math.Max(math.Max(d.TipDiameter, d.RootDiameter)/2, g.RimRadius)
	return r2.Scale(radius, r2.Vec{X: cos, Y: sin})
}

// rackReference is the datum line, and the limits of a partial extent across the teeth.
func (g Part) rackReference() []Item {
	d := g.Tooth.Dimensions
	at := func(x, y float64) r2.Vec { return r2.Rotate(r2.Vec{X: x, Y: y}, g.Turn, r2.Vec{}) }
	left, right := -d.CircularPitch/2, (float64(d.Teeth)-0.5)*d.CircularPitch
	if g.Extent.HalfTeeth {
		left, right = 0, float64(d.Teeth)*d.CircularPitch
	}
	switch {
	case g.Extent.Kind == fit.ExtentSpace:
		left, right = 0, d.CircularPitch
	case g.Extent.Partial():
		left, right = -d.CircularPitch/2, (float64(g.Extent.Teeth)-0.5)*d.CircularPitch
	}
	var items []Item
	if g.Reference {
		items = append(items, marker(at(left, 0), at(right, 0)))
	}
	if g.Extent.Partial() {
		for _, x := range [2]float64{left, right} {
			items = append(items, marker(at(x, -d.Dedendum-d.WholeDepth), at(x, d.Addendum)))
		}
	}
	return items
}

// marker is an open chain of straight lines that is not an edge of the part.
func marker(points ...r2.Vec) Item {
	var path fit.Path
	for i := 1; i < len(points); i++ {
		path.Segments = append(path.Segments, fit.LineTo(points[i-1], points[i]))
	}
	return Item{Layer: LayerReference, Role: Marker, Path: &path}
}
