package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Outline is the edge of that extent, turned by turn in rad about the origin, with the
// material on the left for a gear or rack, on the right for a ring. The whole outline of
// a gear or ring is closed and starts in the middle of the tip of tooth 1, the place where
// a closing segment harms least; that of a rack is an open chain, which Rack closes.
//
// Tooth 1 is on +Y. A ring's outline is one of spaces, which stand half a pitch beside
// its teeth; a rack's teeth follow each other towards +X, against the way of travel.
func (f *Tooth) Outline(e Extent, turn float64) Path {
	teeth, spaces := f.span(e)
	c := f.chain(turn, teeth+spaces)
	switch {
	case teeth > 0:
		c.overTeeth(f.first(teeth, e), teeth)
	default:
		c.overSpaces(f.first(spaces, e), spaces)
	}
	closed := !e.Partial() && f.exact.Form != profile.FormRack
	if closed {
		c.segments[len(c.segments)-1].End = c.segments[0].Start
	}
	return Path{Segments: c.segments, Closed: closed}
}

// span says over how many repetitions an extent goes: from root middle to root middle, or
// from land middle to land middle.
func (f *Tooth) span(e Extent) (teeth, spaces int) {
	ring, rack := f.exact.Form == profile.FormRing, f.exact.Form == profile.FormRack
	switch {
	case e.Kind == ExtentSpace && ring:
		return 1, 0
	case e.Kind == ExtentSpace:
		return 0, 1
	case e.Kind == ExtentTeeth && ring:
		return 0, e.Teeth
	case e.Kind == ExtentTeeth:
		return e.Teeth, 0
	case ring || rack && !e.HalfTeeth:
		return f.exact.Teeth, 0
	}
	return 0, f.exact.Teeth
}

// first is the repetition an extent begins with.
func (f *Tooth) first(n int, e Extent) float64 {
	switch f.exact.Form {
	case profile.FormRing:
		if e.Kind == ExtentTeeth {
			return -0.5
		}
		return 0.5
	case profile.FormRack:
		if teeth, _ := f.span(e); teeth > 0 {
			return float64(1 - n)
		}
		return float64(-n)
	}
	return 0
}

// chain gathers segments, each starting in the very point where the one before ends.
type chain struct {
	of       *Tooth
	right    []Segment
	turn     float64
	segments []Segment
}

// chain is an empty chain, with room for so many repetitions.
func (f *Tooth) chain(turn float64, repetitions int) chain {
	room := (repetitions+1)*(len(f.Land)+2*len(f.Side)+len(f.Root)) + 2
	return chain{of: f, right: f.rightSide(), turn: turn, segments: make([]Segment, 0, room)}
}

// overTeeth adds n teeth from root middle to root middle.
func (c *chain) overTeeth(first float64, n int) {
	f := c.of
	before, after := halves(f.Root)
	c.add(first-1, after, c.right)
	for i := range n - 1 {
		c.add(first+float64(i), f.Land, f.Side, f.Root, c.right)
	}
	c.add(first+float64(n-1), f.Land, f.Side, before)
}

// overSpaces adds n spaces from land middle to land middle.
func (c *chain) overSpaces(first float64, n int) {
	f := c.of
	before, after := halves(f.Land)
	c.add(first, after, f.Side, f.Root, c.right)
	for i := 1; i < n; i++ {
		c.add(first+float64(i), f.Land, f.Side, f.Root, c.right)
	}
	c.add(first+float64(n), before)
}

// add appends lists moved by so many repetitions.
func (c *chain) add(step float64, lists ...[]Segment) {
	place := c.of.exact.Step(step, c.turn)
	for _, list := range lists {
		for i := range list {
			s := &list[i]
			m := Segment{Kind: s.Kind, End: place(s.End), Bulge: s.Bulge}
			if n := len(c.segments); n > 0 {
				m.Start = c.segments[n-1].End
			} else {
				m.Start = place(s.Start)
			}
			if s.Kind == Cubic {
				m.C1, m.C2 = place(s.C1), place(s.C2)
			}
			c.segments = append(c.segments, m)
		}
	}
}

// rightSide is the right side of the next tooth, from its root to its land: the mirror
// image of Side, reversed.
func (f *Tooth) rightSide() []Segment {
	next := f.exact.Step(1, 0)
	right := make([]Segment, 0, len(f.Side))
	for i := len(f.Side) - 1; i >= 0; i-- {
		right = append(right, f.Side[i].Mapped(mirrored, true).Reversed().Mapped(next, false))
	}
	return right
}

// halves parts a symmetric land or root in its middle. Of an odd number of segments
// the middle one is halved, on its chord's middle moved out by the sagitta b c/2.
func halves(list []Segment) (before, after []Segment) {
	half := len(list) / 2
	if len(list)%2 == 0 {
		return list[:half], list[half:]
	}
	s := list[half]
	d := r2.Sub(s.End, s.Start)
	middle := r2.Add(r2.Scale(0.5, r2.Add(s.Start, s.End)), r2.Scale(s.Bulge/2, r2.Vec{X: d.Y, Y: -d.X}))
	first, second := s, s
	first.End, second.Start = middle, middle
	first.Bulge = math.Tan(math.Atan(s.Bulge) / 2)
	second.Bulge = first.Bulge
	before = append(append(before, list[:half]...), first)
	after = append(append(after, second), list[half+1:]...)
	return before, after
}
