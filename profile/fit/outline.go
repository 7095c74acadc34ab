package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Outline is the outline of that extent, counter-clockwise about the origin, turned by
// turn in rad. A whole outline starts in the middle of the land of tooth 1, the place
// where a closing segment harms least.
func (f *Tooth) Outline(e Extent, turn float64) Path {
	right := f.rightSide()
	landBefore, landAfter := halves(f.Land)
	rootBefore, rootAfter := halves(f.Root)
	c := chain{turn: turn, pitch: f.pitch}
	c.segments = make([]Segment, 0, f.teeth*(len(f.Land)+2*len(f.Side)+len(f.Root))+1)
	switch e.Kind {
	case ExtentSpace:
		c.add(0, landAfter, f.Side, f.Root, right)
		c.add(1, landBefore)
	case ExtentTeeth:
		c.add(-1, rootAfter, right)
		for i := range e.Teeth - 1 {
			c.add(i, f.Land, f.Side, f.Root, right)
		}
		c.add(e.Teeth-1, f.Land, f.Side, rootBefore)
	default:
		c.add(0, landAfter, f.Side, f.Root, right)
		for i := 1; i < f.teeth; i++ {
			c.add(i, f.Land, f.Side, f.Root, right)
		}
		c.add(f.teeth, landBefore)
		c.segments[len(c.segments)-1].End = c.segments[0].Start
	}
	return Path{Segments: c.segments, Closed: !e.Partial()}
}

// chain gathers segments, each starting in the very point where the one before ends.
type chain struct {
	turn, pitch float64
	segments    []Segment
}

// add appends lists turned by so many pitches.
func (c *chain) add(pitches int, lists ...[]Segment) {
	rotate := r2.NewRotation(c.turn+float64(pitches)*c.pitch, r2.Vec{}).Rotate
	for _, list := range lists {
		for i := range list {
			s := &list[i]
			m := Segment{Kind: s.Kind, End: rotate(s.End), Bulge: s.Bulge}
			if n := len(c.segments); n > 0 {
				m.Start = c.segments[n-1].End
			} else {
				m.Start = rotate(s.Start)
			}
			if s.Kind == Cubic {
				m.C1, m.C2 = rotate(s.C1), rotate(s.C2)
			}
			c.segments = append(c.segments, m)
		}
	}
}

// rightSide is the right side of the next tooth, from its root to its land: the mirror
// image of Side, reversed.
func (f *Tooth) rightSide() []Segment {
	rotate := r2.NewRotation(f.pitch, r2.Vec{}).Rotate
	right := make([]Segment, 0, len(f.Side))
	for i := len(f.Side) - 1; i >= 0; i-- {
		right = append(right, f.Side[i].Mapped(mirrored, true).Reversed().Mapped(rotate, false))
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
