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

// Measure is what there is to measure of a path; lengths in mm.
type Measure struct {
	Length   float64
	Area     float64 // enclosed by a closed path, positive when it runs counter-clockwise
	Shortest float64 // length of the shortest segment, +Inf for an empty path
	Bounds   r2.Box
	Count    [Cubic + 1]int // of segments by their Kind
}

// Measure measures the path, looking at each segment once.
func (p Path) Measure() Measure {
	m := Measure{Shortest: math.Inf(1), Bounds: p.Bounds()}
	for i := range p.Segments {
		s := &p.Segments[i]
		m.Count[s.Kind]++
		length, area := s.measure()
		m.Length += length
		m.Area += area
		if length < m.Shortest {
			m.Shortest = length
		}
	}
	return m
}

// Bounds returns the least box around the path. Few segments of an outline reach past
// the box of all their ends, so extremes are looked for only in those that may.
func (p Path) Bounds() r2.Box {
	inf := math.Inf(1)
	box := r2.Box{Min: r2.Vec{X: inf, Y: inf}, Max: r2.Vec{X: -inf, Y: -inf}}
	n := len(p.Segments)
	if n == 0 {
		return box
	}
	for i := range p.Segments {
		grow(&box, p.Segments[i].Start) // the end of the one before
	}
	grow(&box, p.Segments[n-1].End)
	for i := range p.Segments {
		if s := &p.Segments[i]; s.Kind != Line && !s.within(box) {
			b := s.Bounds()
			grow(&box, b.Min)
			grow(&box, b.Max)
		}
	}
	return box
}

// grow widens a box to a point.
func grow(box *r2.Box, p r2.Vec) {
	if p.X < box.Min.X {
		box.Min.X = p.X
	}
	if p.X > box.Max.X {
		box.Max.X = p.X
	}
	if p.Y < box.Min.Y {
		box.Min.Y = p.Y
	}
	if p.Y > box.Max.Y {
		box.Max.Y = p.Y
	}
}

// within reports whether s lies in the box for certain: a cubic where its handles do,
// an arc where its ends do with room for the sagitta |b| c/2. The sum of the legs
// stands for the chord c; it is longer and needs no root.
func (s *Segment) within(box r2.Box) bool {
	if s.Kind == Cubic {
		return contains(box, s.C1, 0) && contains(box, s.C2, 0)
	}
	legs := math.Abs(s.End.X-s.Start.X) + math.Abs(s.End.Y-s.Start.Y)
	room := math.Abs(s.Bulge) * legs // twice the sagitta, so that rounding is no matter
	return contains(box, s.Start, room) && contains(box, s.End, room)
}

// contains reports whether the box holds a point with that much room around it.
func contains(box r2.Box, p r2.Vec, room float64) bool {
	return p.X-room >= box.Min.X && p.X+room <= box.Max.X &&
		p.Y-room >= box.Min.Y && p.Y+room <= box.Max.Y
}

// CounterClockwise reports whether a closed path runs so, as Area > 0 does. The area
// of the polygon of its points settles it unless the caps of the arcs could outweigh
// it: a cap is below 0.4 |b| c^2, with c the chord.
func (p Path) CounterClockwise() bool {
	const capShare = 0.4 // pi/8 at |b| = 1, 1/3 for small ones
	polygon, caps := 0.0, 0.0
	for i := range p.Segments {
		s := &p.Segments[i]
		if s.Kind == Cubic {
			return p.Area() > 0
		}
		dx, dy := s.End.X-s.Start.X, s.End.Y-s.Start.Y
		polygon += (s.Start.X*dy - s.Start.Y*dx) / 2
		caps += capShare * math.Abs(s.Bulge) * (dx*dx + dy*dy)
	}
	// Rounding of the sums is far below a tenth of an area that is not nothing.
	if math.Abs(polygon) > 1.1*caps {
		return polygon > 0
	}
	return p.Area() > 0
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
