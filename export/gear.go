package export

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/fit"
)

// Gear is what a gear's sheet shows.
type Gear struct {
	Tooth     *profile.Tooth
	Drawn     *fit.Tooth
	Body      profile.Body
	Unit      Unit
	Turn      float64 // rad, counter-clockwise
	Extent    fit.Extent
	Reference bool // whether reference circles and center lines are shown
}

// Drawing lays the gear out: bore, outline, then what is not to be cut.
func (g Gear) Drawing() Drawing {
	d := Drawing{Unit: g.Unit}
	if g.Body.Bore > 0 {
		d.Items = append(d.Items, Item{Layer: LayerBore, Role: Hole, Circle: &Circle{Radius: g.Body.Bore / 2}})
	}
	outline := g.Drawn.Outline(g.Extent, g.Turn)
	d.Items = append(d.Items, Item{Layer: LayerOutline, Role: Outer, Path: &outline})
	if g.Reference {
		for _, c := range g.Tooth.ReferenceCircles() {
			d.Items = append(d.Items, Item{Layer: LayerReference, Role: Marker, Circle: &Circle{Radius: c.Radius}})
		}
		for _, angle := range [2]float64{0, math.Pi / 2} {
			d.Items = append(d.Items, marker(g.ray(angle+math.Pi), g.ray(angle)))
		}
	}
	if g.Extent.Partial() {
		from, to := g.Extent.Limits(g.Tooth.Pitch())
		d.Items = append(d.Items, marker(g.ray(from), r2.Vec{}, g.ray(to)))
	}
	return d
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
