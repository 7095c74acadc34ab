package mesh

import (
	"math"
	"sort"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// piece is a segment with what its points are computed from.
type piece struct {
	fit.Segment
	center   r2.Vec  // of an arc
	included float64 // rad, of an arc; 0 for what is drawn straight
}

// pieces prepares a side.
func (s Side) pieces() []piece {
	out := make([]piece, len(s))
	for i, seg := range s {
		out[i] = piece{Segment: seg}
		if seg.Kind == fit.Arc && seg.Bulge != 0 {
			out[i].center, out[i].included = seg.Center(), seg.Included()
		}
	}
	return out
}

// at is the point at the share u: of the chord for a line, of the angle for an arc, the
// parameter for a cubic.
func (s *piece) at(u float64) r2.Vec {
	switch {
	case s.Kind == fit.Cubic:
		v := 1 - u
		a, b, c, d := v*v*v, 3*v*v*u, 3*v*u*u, u*u*u
		return r2.Vec{X: a*s.Start.X + b*s.C1.X + c*s.C2.X + d*s.End.X, Y: a*s.Start.Y + b*s.C1.Y + c*s.C2.Y + d*s.End.Y}
	case s.included != 0:
		sin, cos := math.Sincos(u * s.included)
		x, y := s.Start.X-s.center.X, s.Start.Y-s.center.Y
		return r2.Vec{X: s.center.X + x*cos - y*sin, Y: s.center.Y + x*sin + y*cos}
	}
	return r2.Vec{X: s.Start.X + u*(s.End.X-s.Start.X), Y: s.Start.Y + u*(s.End.Y-s.Start.Y)}
}

// lookup finds a drawn side's half angle (a rack's half width) by height. Sides rise or
// fall steadily from end to end.
type lookup struct {
	side    []piece
	rack    bool
	heights []float64 // of the starts and the last end
	rising  bool
}

func newLookup(side Side, rack bool) lookup {
	l := lookup{side: side.pieces(), rack: rack}
	for _, s := range l.side {
		l.heights = append(l.heights, l.height(s.Start))
	}
	l.heights = append(l.heights, l.height(side[len(side)-1].End))
	l.rising = l.heights[len(l.heights)-1] > l.heights[0]
	return l
}

func (l lookup) height(p r2.Vec) float64 {
	if l.rack {
		return p.Y
	}
	return math.Sqrt(p.X*p.X + p.Y*p.Y)
}

// half is the side's angle from +Y (a rack's way) at a height; false past its ends.
func (l lookup) half(h float64) (float64, bool) {
	n := len(l.side)
	first, last := l.heights[0], l.heights[n]
	if !(h >= math.Min(first, last) && h <= math.Max(first, last)) {
		return 0, false
	}
	i := sort.Search(n, func(i int) bool { return (l.heights[i+1] >= h) == l.rising || l.heights[i+1] == h })
	if i == n {
		i--
	}
	p := l.at(&l.side[i], h)
	if l.rack {
		return -p.X, true
	}
	return math.Atan2(-p.X, p.Y), true
}

// at is the point of a segment at a height between those of its ends, by secants with the
// Illinois correction: segments are short and rise or fall steadily, so that a few do.
func (l lookup) at(s *piece, h float64) r2.Vec {
	low, high := 0.0, 1.0
	flow, fhigh := l.height(s.Start)-h, l.height(s.End)-h
	if flow == 0 {
		return s.Start
	}
	if fhigh == 0 {
		return s.End
	}
	u := flow / (flow - fhigh)
	for range maxSteps {
		p := s.at(u)
		f := l.height(p) - h
		if f == 0 || high-low <= leastStep {
			return p
		}
		if (f < 0) == (flow < 0) {
			low, flow = u, f
			fhigh /= 2 // Illinois: keeps both ends moving
		} else {
			high, fhigh = u, f
			flow /= 2
		}
		next := low + (high-low)*flow/(flow-fhigh)
		if !(next > low && next < high) {
			next = low + (high-low)/2
		}
		if math.Abs(next-u) <= leastStep {
			return s.at(next)
		}
		u = next
	}
	return s.at(u)
}

// leastStep is a share of a segment below which its points differ by rounding only, and
// maxSteps more than halving down to it takes.
const (
	leastStep = 1e-15
	maxSteps  = 60
)
