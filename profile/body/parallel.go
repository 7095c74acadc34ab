package body

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// finestArc is the radius in mm at or below which an arc of a path is as good as the
// corner of its neighbours: a few steps of the last decimal written, in inches too.
const finestArc = 1e-7

// reachSlack is how much nearer to the part's edge than asked, in mm, the path may come
// where an arc was taken for a corner. Turning by up to 160 degrees, an arc of finestArc
// is less than 5 finestArc from the corner.
const reachSlack = 10 * finestArc

// Parallel is the path of the middle of a beam along the loop, the exact parallel at the
// distance d in mm to the right of travel: in the hole, away from the material. It is a
// loop of the same kind and name.
//
// Lines move sideways; arcs that turn right, into a hollow of the material, have the
// radius r - d, those that turn left r + d. Where travel turns left at a corner, the
// path is an arc of radius d about it. Where it turns right, the neighbours' parallels
// are cut where they cross; so are the neighbours of an arc with r <= d, which has no
// parallel. There the beam leaves material: a Leftover for each such place, with the
// depth |p - c| - d of the point p of the part's edge farthest from the corner c of the
// path.
//
// A path must follow every other piece somewhere, keep d from all of them and not cross
// itself. A beam too wide for that is refused with Violations, with the largest that can
// follow.
func (l Loop) Parallel(d float64) (Loop, []profile.Leftover, error) {
	width := profile.LengthOf(2 * d)
	if f, bad := (limit{param: profile.ParamKerf, value: 2 * d, high: maxLength, open: true}).check(); bad {
		return Loop{}, nil, profile.Violations{f}
	}
	if path, left, ok := l.parallel(d); ok {
		return path, left, nil
	}
	return Loop{}, nil, profile.Violations{{Rule: profile.RuleKerfTooWide, Param: profile.ParamKerf, Value: width,
		Bound: profile.LengthOf(2 * l.largestParallel(d)).AtMost(),
		Text:  fmt.Sprintf("a beam {value} wide cannot follow the %s", l.Name),
		Hint:  "it can be at most {bound} wide"}}
}

// largestParallel bisects for the largest distance below d at which there is a path.
func (l Loop) largestParallel(d float64) float64 {
	low, high := 0.0, d
	for {
		middle := low + (high-low)/2
		if middle == low || middle == high {
			return low
		}
		if _, _, ok := l.parallel(middle); ok {
			low = middle
		} else {
			high = middle
		}
	}
}

// track is a piece of a path while it is made.
type track struct {
	curve  profile.Curve
	joined bool // its end is already the start of the next
	smooth bool // and travel goes on in the same direction
	// skipped is what the path does not follow before the next piece: a corner
	// that turns right, or arcs without a parallel.
	skipped []profile.Curve
	corner  r2.Vec // where that is
}

// parallel is Parallel without the words; false where the beam cannot follow.
func (l Loop) parallel(d float64) (path Loop, left []profile.Leftover, ok bool) {
	path = Loop{Kind: l.Kind, Name: l.Name}
	if center, radius, circle := l.Circle(); circle {
		c := l.Pieces[0].Curve.(profile.CircleArc)
		c.Center, c.Radius = center, radius-d
		path.Pieces = []profile.Piece{{Curve: c, SmoothEnd: true}}
		return path, nil, c.Radius >= leastPiece
	}
	tracks := l.tracks(d)
	if len(tracks) < 2 {
		return path, nil, false
	}
	for i := range tracks {
		t, next := &tracks[i], &tracks[(i+1)%len(tracks)]
		if t.joined {
			continue
		}
		at, crosses := nearestCrossing(t.curve, next.curve, t.corner)
		if !crosses {
			return path, nil, false
		}
		t.curve, next.curve = withEnd(t.curve, at), withStart(next.curve, at)
		if place, stays := leftAt(at, d, t); stays {
			left = append(left, place)
		}
	}
	for i := range tracks {
		if tracks[i].curve == nil {
			return path, nil, false // cut back beyond its other end
		}
		path.Pieces = append(path.Pieces, profile.Piece{Curve: tracks[i].curve, SmoothEnd: tracks[i].smooth})
	}
	return path, left, l.holds(path, d)
}

// tracks are the parallels of the pieces, with arcs about the corners that turn left,
// not cut yet.
func (l Loop) tracks(d float64) []track {
	var out []track
	n := len(l.Pieces)
	first := 0
	for first < n && hollow(l.Pieces[first].Curve, d) {
		first++
	}
	for k := range n {
		p := l.Pieces[(first+k)%n]
		next := l.Pieces[(first+k+1)%n]
		if hollow(p.Curve, d) {
			if len(out) == 0 {
				return nil // nothing but hollows
			}
			before := &out[len(out)-1]
			from, to := p.Curve.Domain()
			before.joined, before.smooth = false, false
			before.skipped = append(before.skipped, p.Curve)
			before.corner = p.Curve.At((from + to) / 2)
			continue
		}
		t := track{curve: p.Curve.Parallel(d), joined: p.SmoothEnd, smooth: p.SmoothEnd, corner: profile.End(p.Curve)}
		_, to := p.Curve.Domain()
		from, _ := next.Curve.Domain()
		before := p.Curve.Heading(to)
		turn := math.Remainder(next.Curve.Heading(from)-before, 2*math.Pi)
		if p.SmoothEnd || turn <= 0 {
			out = append(out, t)
			continue
		}
		t.joined, t.smooth = true, true
		start := before - math.Pi/2
		about := profile.CircleArc{Center: t.corner, Radius: d, From: start, To: start + turn}
		out = append(out, t, track{curve: about, joined: true, smooth: true, corner: t.corner})
	}
	return out
}

// hollow says that the curve is an arc that turns right too sharply to have a parallel.
func hollow(c profile.Curve, d float64) bool {
	arc, ok := c.(profile.CircleArc)
	return ok && arc.To < arc.From && arc.Radius-d <= finestArc
}

// holds says whether the path is a simple loop that keeps the distance d from l.
//
// All of it is on parallels of the edge and nowhere nearer to the edge than they are, so
// it is a part of the boundary of the places the beam's middle may be. That boundary
// consists of closed curves that do not cross; the path is closed, so it is one of them.
func (l Loop) holds(path Loop, d float64) bool {
	if path.shortest() < finestArc || !(path.Area() > 0) {
		return false
	}
	for _, p := range path.Pieces {
		for _, edge := range l.Pieces {
			if !(between(p.Curve, edge.Curve).length >= d-reachSlack) {
				return false
			}
		}
	}
	return l.Contains(profile.Start(path.Pieces[0].Curve))
}
