package export

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// LayerReport counts and measures what is on one layer, in mm and mm^2.
type LayerReport struct {
	Layer    Layer
	Loops    int
	Entities map[string]int // by kind: "arc", "line", "cubic", "circle"
	Shortest float64        // length of the shortest entity
	Area     float64        // sum of what its closed loops enclose, each counted positive
	Length   float64        // sum of the lengths of its loops
	Bounds   r2.Box
	Closed   bool // whether every loop is closed
	// Tolerance and Deviation are the largest of the layer's edges; zero without edges.
	Tolerance, Deviation float64
}

// kindName is the word for a kind of segment in reports.
func kindName(k fit.Kind) string {
	switch k {
	case fit.Arc:
		return "arc"
	case fit.Cubic:
		return "cubic"
	}
	return "line"
}

// Report describes the drawing layer by layer, in the order of first appearance.
func (d Drawing) Report() []LayerReport {
	var reports []LayerReport
	index := map[Layer]int{}
	for _, it := range d.Items {
		i, seen := index[it.Layer]
		if !seen {
			i = len(reports)
			index[it.Layer] = i
			reports = append(reports, LayerReport{Layer: it.Layer, Entities: map[string]int{},
				Shortest: math.Inf(1), Bounds: it.Bounds(), Closed: true})
		}
		reports[i].add(it)
	}
	return reports
}

// add counts one item in.
func (r *LayerReport) add(it Item) {
	r.Loops++
	r.Bounds = union(r.Bounds, it.Bounds())
	r.Tolerance = math.Max(r.Tolerance, it.Tolerance)
	r.Deviation = math.Max(r.Deviation, it.Deviation)
	if c := it.Circle; c != nil {
		around := 2 * math.Pi * c.Radius
		r.Entities["circle"]++
		r.Shortest = math.Min(r.Shortest, around)
		r.Area += math.Pi * c.Radius * c.Radius
		r.Length += around
		return
	}
	for _, s := range it.Path.Segments {
		r.Entities[kindName(s.Kind)]++
	}
	r.Shortest = math.Min(r.Shortest, it.Path.Shortest())
	r.Length += it.Path.Length()
	r.Closed = r.Closed && it.Path.Closed
	if it.Path.Closed {
		r.Area += math.Abs(it.Path.Area())
	}
}

// union is the least box around two boxes. Unlike r2.Box.Union it keeps boxes
// without width or height, such as those of a straight line.
func union(a, b r2.Box) r2.Box {
	return r2.Box{
		Min: r2.Vec{X: math.Min(a.Min.X, b.Min.X), Y: math.Min(a.Min.Y, b.Min.Y)},
		Max: r2.Vec{X: math.Max(a.Max.X, b.Max.X), Y: math.Max(a.Max.Y, b.Max.Y)},
	}
}
