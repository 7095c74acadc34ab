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
	Reference bool    // whether the reference circles are shown
}

// axes are the two center lines, as long as the tip circle is wide, one of them
// through the middle of tooth 1.
func (g Gear) axes() []Item {
	var items []Item
	for _, quarter := range [2]float64{0, math.Pi / 2} {
		sin, cos := math.Sincos(g.Turn + quarter)
		end := r2.Scale(g.Tooth.Dimensions.TipDiameter/2, r2.Vec{X: cos, Y: sin})
		line := fit.Path{Segments: []fit.Segment{fit.LineTo(r2.Scale(-1, end), end)}}
		items = append(items, Item{Layer: LayerReference, Role: Marker, Path: &line})
	}
	return items
}

// Drawing lays the gear out: bore, outline, then what is not to be cut.
func (g Gear) Drawing() Drawing {
	d := Drawing{Unit: g.Unit}
	if g.Body.Bore > 0 {
		d.Items = append(d.Items, Item{Layer: LayerBore, Role: Hole, Circle: &Circle{Radius: g.Body.Bore / 2}})
	}
	outline := g.Drawn.Outline(g.Turn)
	d.Items = append(d.Items, Item{Layer: LayerOutline, Role: Outer, Path: &outline})
	if g.Reference {
		for _, c := range g.Tooth.ReferenceCircles() {
			d.Items = append(d.Items, Item{Layer: LayerReference, Role: Marker, Circle: &Circle{Radius: c.Radius}})
		}
		d.Items = append(d.Items, g.axes()...)
	}
	return d
}
