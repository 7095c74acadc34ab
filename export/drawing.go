// Package export says what is on the sheet: loops and open curves on named
// layers, in the unit the file will be written in. Geometry stays in
// millimetres here; the writers below this package scale and round it, once.
package export

import (
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// Unit is the unit of the numbers in a drawing file.
type Unit uint8

// The units a drawing can be written in.
const (
	Millimetre Unit = iota
	Inch
)

// MillimetresPerInch is exact by definition (ISO 31-1, the international inch).
const MillimetresPerInch = 25.4

// Scale is the factor from millimetres to the unit.
func (u Unit) Scale() float64 {
	if u == Inch {
		return 1 / MillimetresPerInch
	}
	return 1
}

// String is the symbol of the unit: "mm" or "in".
func (u Unit) String() string {
	if u == Inch {
		return "in"
	}
	return "mm"
}

// Layer is the name of a layer; only [A-Z0-9_-] occur.
type Layer string

// The layers of a part.
const (
	LayerOutline   Layer = "OUTLINE"   // the part's toothed edge
	LayerBore      Layer = "BORE"      // the bore with its keyway, flat or hexagon
	LayerHoles     Layer = "HOLES"     // hole circles and windows
	LayerReference Layer = "REFERENCE" // circles, center lines, radial limits; not to be cut
	LayerLead      Layer = "LEAD"      // ways from pierce points onto the cuts
	LayerLabel     Layer = "LABEL"     // single-stroke characters
)

// Role says what an item does to the part.
type Role uint8

// The roles of an item.
const (
	Outer  Role = iota // the outer edge; runs counter-clockwise
	Hole               // an inner edge
	Marker             // not an edge of the part
)

// Circle is a full circle, drawn as such and never as a polygon.
type Circle struct {
	Center r2.Vec
	Radius float64
}

// Item is one loop or open chain. Exactly one of Path and Circle is set.
type Item struct {
	Layer  Layer
	Role   Role
	Path   *fit.Path
	Circle *Circle
	// Tolerance and Deviation are, for an edge, the largest distance from the exact edge
	// that was allowed and that was found, in mm.
	Tolerance, Deviation float64
}

// Bounds returns the least box around the item.
func (it Item) Bounds() r2.Box {
	if c := it.Circle; c != nil {
		d := r2.Vec{X: c.Radius, Y: c.Radius}
		return r2.Box{Min: r2.Sub(c.Center, d), Max: r2.Add(c.Center, d)}
	}
	return it.Path.Bounds()
}

// Drawing is a sheet: items in file order, inner loops before the outer one.
type Drawing struct {
	Unit  Unit
	Items []Item
}

// Bounds returns the least box around all items.
func (d Drawing) Bounds() r2.Box {
	box := nowhere()
	for _, it := range d.Items {
		box = union(box, it.Bounds())
	}
	return box
}
