package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// TabbedOutline is the whole outline with gaps of the given width in mm in the middle of
// the lands of so many teeth, spread evenly and away from tooth 1: the open chains
// between them, counter-clockwise. A gap must be narrower than the land (LandWidth) and
// there must be fewer tabs than teeth.
func (f *Tooth) TabbedOutline(tabs int, gap, turn float64) []Path {
	landBefore, landAfter := parted(f.Land, (total(f.Land)-gap)/2), parted(reversed(f.Land), (total(f.Land)-gap)/2)
	after := reversed(landAfter)
	at := tabTeeth(f.exact.Teeth, tabs)
	var paths []Path
	for i, tooth := range at {
		next := f.exact.Teeth + at[0]
		if i+1 < len(at) {
			next = at[i+1]
		}
		c := f.chain(turn, next-tooth)
		c.add(float64(tooth), after, f.Side, f.Root, c.right)
		for k := tooth + 1; k < next; k++ {
			c.add(float64(k), f.Land, f.Side, f.Root, c.right)
		}
		c.add(float64(next), landBefore)
		paths = append(paths, Path{Segments: c.segments})
	}
	return paths
}

// tabTeeth are the teeth that carry a tab, counted from 0 for tooth 1, in rising order.
func tabTeeth(teeth, tabs int) []int {
	at := make([]int, tabs)
	for i := range at {
		// Half a spacing from tooth 1 on either side; at least one tooth away.
		at[i] = max(1, int(math.Floor((float64(i)+0.5)*float64(teeth)/float64(tabs))))
		if i > 0 && at[i] <= at[i-1] {
			at[i] = at[i-1] + 1
		}
	}
	return at
}

// LandWidth is the length in mm of the land as drawn.
func (f *Tooth) LandWidth() float64 { return total(f.Land) }

// parted is the part of a list of lines and arcs up to the given length in mm.
func parted(list []Segment, length float64) []Segment {
	var out []Segment
	for _, s := range list {
		l := s.Length()
		if l >= length {
			if share := length / l; share > 0 {
				out = append(out, s.upTo(share))
			}
			break
		}
		out = append(out, s)
		length -= l
	}
	return out
}

// upTo is the first part of a line or an arc, by its share of the length.
func (s Segment) upTo(share float64) Segment {
	if s.Kind != Arc || s.Bulge == 0 {
		return LineTo(s.Start, r2.Add(r2.Scale(1-share, s.Start), r2.Scale(share, s.End)))
	}
	turn := s.Included() * share
	return ArcTo(s.Start, r2.Rotate(s.Start, turn, s.Center()), math.Tan(turn/4))
}

// reversed is a list travelled backwards.
func reversed(list []Segment) []Segment { return Path{Segments: list}.Reversed().Segments }
