package fit

import (
	"gonum.org/v1/gonum/spatial/r2"
)

// StartAt is a closed path of lines and arcs that begins at the share of the length of
// its segment i, which is parted there unless the share is 0.
func (p Path) StartAt(i int, share float64) Path {
	n := len(p.Segments)
	out := make([]Segment, 0, n+1)
	if share == 0 {
		out = append(append(out, p.Segments[i:]...), p.Segments[:i]...)
		return Path{Segments: out, Closed: true}
	}
	s := p.Segments[i]
	first := s.upTo(share)
	second := s.Reversed().upTo(1 - share).Reversed()
	second.Start = first.End
	out = append(out, second)
	out = append(append(out, p.Segments[i+1:]...), p.Segments[:i]...)
	return Path{Segments: append(out, first), Closed: true}
}

// BestStart finds the place of a closed path, the middle of a segment, that rates
// highest.
func (p Path) BestStart(rate func(r2.Vec) float64) (segment int, share float64) {
	best := 0.0
	for i, s := range p.Segments {
		if v := rate(s.upTo(0.5).End); i == 0 || v > best {
			best, segment = v, i
		}
	}
	return segment, 0.5
}
