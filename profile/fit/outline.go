package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Outline is the whole closed outline, counter-clockwise about the origin, turned
// by turn in rad. It starts in the middle of the land of tooth 1, the place
// where a closing segment harms least.
func (f *Tooth) Outline(turn float64) Path {
	pitch := f.pitchSegments()
	first, rest := f.splitLand()
	segments := make([]Segment, 0, f.teeth*len(pitch)+1)
	add := func(angle float64, list []Segment) {
		rotate := r2.NewRotation(angle, r2.Vec{}).Rotate
		for _, s := range list {
			m := s.Mapped(rotate, false)
			if n := len(segments); n > 0 {
				m.Start = segments[n-1].End
			}
			segments = append(segments, m)
		}
	}
	land := len(f.Land)
	add(turn, rest)
	add(turn, pitch[land:])
	for i := 1; i < f.teeth; i++ {
		add(turn+f.pitch*float64(i), pitch)
	}
	add(turn, first)
	if n := len(segments); n > 0 {
		segments[n-1].End = segments[0].Start
	}
	return Path{Segments: segments, Closed: true}
}

// pitchSegments are the segments of one pitch, from the right end of a land to
// that of the next: land, left side, root, and the next tooth's right side.
func (f *Tooth) pitchSegments() []Segment {
	segments := make([]Segment, 0, len(f.Land)+2*len(f.Side)+len(f.Root))
	segments = append(segments, f.Land...)
	segments = append(segments, f.Side...)
	segments = append(segments, f.Root...)
	rotate := r2.NewRotation(f.pitch, r2.Vec{}).Rotate
	for i := len(f.Side) - 1; i >= 0; i-- {
		right := f.Side[i].Mapped(mirrored, true).Reversed()
		segments = append(segments, right.Mapped(rotate, false))
	}
	return segments
}

// splitLand parts the land in its middle: the part before, which closes the
// outline, and the part after, which opens it. A land of an odd number of
// segments has its middle one halved.
func (f *Tooth) splitLand() (before, after []Segment) {
	n := len(f.Land)
	if n == 0 {
		return nil, nil
	}
	half := n / 2
	if n%2 == 0 {
		return f.Land[:half], f.Land[half:]
	}
	s := f.Land[half]
	// The middle of a segment symmetric about +Y lies on it: on the chord's
	// middle, raised by the sagitta b c/2 to the outside.
	middle := r2.Vec{Y: (s.Start.Y+s.End.Y)/2 + s.Bulge*s.Chord()/2}
	bulge := math.Tan(math.Atan(s.Bulge) / 2)
	left, right := s, s
	left.End, left.Bulge = middle, bulge
	right.Start, right.Bulge = middle, bulge
	before = append(append(before, f.Land[:half]...), left)
	after = append(append(after, right), f.Land[half+1:]...)
	return before, after
}
