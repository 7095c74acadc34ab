package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Path is a chain of segments: the End of each is the Start of the next, to the
// last bit. In a closed path the last End is the first Start as well.
type Path struct {
	Segments []Segment
	Closed   bool
}

// Area is the area a closed path encloses, positive when it runs
// counter-clockwise.
func (p Path) Area() float64 {
	sum := 0.0
	for _, s := range p.Segments {
		sum += s.SweptArea()
	}
	return sum
}

// Length is the sum of the lengths of the segments.
func (p Path) Length() float64 {
	sum := 0.0
	for _, s := range p.Segments {
		sum += s.Length()
	}
	return sum
}

// Bounds returns the least box around the path.
func (p Path) Bounds() r2.Box {
	inf := math.Inf(1)
	box := r2.Box{Min: r2.Vec{X: inf, Y: inf}, Max: r2.Vec{X: -inf, Y: -inf}}
	for _, s := range p.Segments {
		b := s.Bounds()
		box.Min = r2.Vec{X: math.Min(box.Min.X, b.Min.X), Y: math.Min(box.Min.Y, b.Min.Y)}
		box.Max = r2.Vec{X: math.Max(box.Max.X, b.Max.X), Y: math.Max(box.Max.Y, b.Max.Y)}
	}
	return box
}

// Count says how many segments of each kind the path holds.
func (p Path) Count() map[Kind]int {
	n := map[Kind]int{}
	for _, s := range p.Segments {
		n[s.Kind]++
	}
	return n
}

// Shortest is the length of the shortest segment, +Inf for an empty path.
func (p Path) Shortest() float64 {
	least := math.Inf(1)
	for _, s := range p.Segments {
		least = math.Min(least, s.Length())
	}
	return least
}

// Reversed is the same path travelled the other way.
func (p Path) Reversed() Path {
	n := len(p.Segments)
	out := make([]Segment, n)
	for i, s := range p.Segments {
		out[n-1-i] = s.Reversed()
	}
	return Path{Segments: out, Closed: p.Closed}
}
