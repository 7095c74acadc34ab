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
				Shortest: math.Inf(1), Bounds: nowhere(), Closed: true})
		}
		reports[i].add(it)
	}
	return reports
}

// add counts one item in.
func (r *LayerReport) add(it Item) {
	r.Loops++
	r.Tolerance = math.Max(r.Tolerance, it.Tolerance)
	r.Deviation = math.Max(r.Deviation, it.Deviation)
	if c := it.Circle; c != nil {
		around := 2 * math.Pi * c.Radius
		r.Entities["circle"]++
		r.Bounds = union(r.Bounds, it.Bounds())
		r.Shortest = math.Min(r.Shortest, around)
		r.Area += math.Pi * c.Radius * c.Radius
		r.Length += around
		return
	}
	m := it.Path.Measure()
	for kind, n := range m.Count {
		if n > 0 {
			r.Entities[kindName(fit.Kind(kind))] += n
		}
	}
	r.Bounds = union(r.Bounds, m.Bounds)
	r.Shortest = math.Min(r.Shortest, m.Shortest)
	r.Length += m.Length
	r.Closed = r.Closed && it.Path.Closed
	if it.Path.Closed {
		r.Area += math.Abs(m.Area)
	}
}

// nowhere is the box around nothing.
func nowhere() r2.Box {
	inf := math.Inf(1)
	return r2.Box{Min: r2.Vec{X: inf, Y: inf}, Max: r2.Vec{X: -inf, Y: -inf}}
}

// union is the least box around two boxes. Unlike r2.Box.Union it keeps boxes
// without width or height, such as those of a straight line.
func union(a, b r2.Box) r2.Box {
	return r2.Box{
		Min: r2.Vec{X: math.Min(a.Min.X, b.Min.X), Y: math.Min(a.Min.Y, b.Min.Y)},
		Max: r2.Vec{X: math.Max(a.Max.X, b.Max.X), Y: math.Max(a.Max.Y, b.Max.Y)},
	}
}
