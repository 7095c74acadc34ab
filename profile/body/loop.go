package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Kind says what an inner loop is for.
type Kind uint8

// The kinds of loops.
const (
	Bore Kind = iota // the bore, with its keyway or flat, or the hexagon
	Hole             // a round hole or a window
)

// Loop is a closed inner edge of the part: arcs (profile.CircleArc) and straight lines
// (profile.StraightLine), each ending where the next begins, travelled clockwise with
// the material on the left. A round hole is one arc of a full turn.
type Loop struct {
	Kind   Kind
	Name   string // what it is, such as "bore and keyway"; the same for all windows
	Pieces []profile.Piece
}

// Circle is the circle the loop consists of; ok is false for any other loop.
func (l Loop) Circle() (center r2.Vec, radius float64, ok bool) {
	if len(l.Pieces) != 1 {
		return r2.Vec{}, 0, false
	}
	c, ok := l.Pieces[0].Curve.(profile.CircleArc)
	return c.Center, c.Radius, ok
}

// Area is the area inside the loop in mm^2.
//
// Green's theorem: half the cross product of the ends of every piece, and for an arc of
// the signed sweep phi the segment r^2 (phi - sin phi)/2 beside its chord. The sum is
// negative for a clockwise loop.
func (l Loop) Area() float64 {
	sum := 0.0
	for _, p := range l.Pieces {
		sum += r2.Cross(profile.Start(p.Curve), profile.End(p.Curve)) / 2
		if c, ok := p.Curve.(profile.CircleArc); ok {
			phi := c.To - c.From
			sum += c.Radius * c.Radius * (phi - math.Sin(phi)) / 2
		}
	}
	return -sum
}

// Length is the length of the loop in mm.
func (l Loop) Length() float64 {
	sum := 0.0
	for _, p := range l.Pieces {
		sum += length(p.Curve)
	}
	return sum
}

// Contains says whether p is inside the loop. Points on it may count as either.
//
// The pieces turn by 2 pi as seen from inside and by 0 from outside. A chord turns by
// the angle between its ends; an arc turns by the same unless p is between it and its
// chord, which adds a full turn.
func (l Loop) Contains(p r2.Vec) bool {
	turn := 0.0
	for _, piece := range l.Pieces {
		c, ok := piece.Curve.(profile.CircleArc)
		if !ok {
			turn += angleBetween(r2.Sub(profile.Start(piece.Curve), p), r2.Sub(profile.End(piece.Curve), p))
			continue
		}
		parts := math.Ceil(math.Abs(c.To-c.From) / (math.Pi / 2))
		for i := range int(parts) {
			from := c.At(c.From + (c.To-c.From)*float64(i)/parts)
			to := c.At(c.From + (c.To-c.From)*float64(i+1)/parts)
			turn += angleBetween(r2.Sub(from, p), r2.Sub(to, p))
			sense := math.Copysign(1, c.To-c.From)
			beyondChord := sense*r2.Cross(r2.Sub(to, from), r2.Sub(p, from)) < 0
			if beyondChord && r2.Norm(r2.Sub(p, c.Center)) < c.Radius {
				turn += sense * 2 * math.Pi
			}
		}
	}
	return math.Abs(turn) > math.Pi
}

// angleBetween is the angle from a to b in (-pi, pi].
func angleBetween(a, b r2.Vec) float64 { return math.Atan2(r2.Cross(a, b), r2.Dot(a, b)) }

// Clearance is the distance from p to the loop, negative inside it.
func (l Loop) Clearance(p r2.Vec) float64 {
	least := math.Inf(1)
	for _, piece := range l.Pieces {
		least = math.Min(least, r2.Norm(r2.Sub(nearestOn(piece.Curve, p), p)))
	}
	if l.Contains(p) {
		return -least
	}
	return least
}

// farthest is the point of the loop farthest from p.
func (l Loop) farthest(p r2.Vec) r2.Vec {
	best, far := r2.Vec{}, -1.0
	for _, piece := range l.Pieces {
		q := farthestOn(piece.Curve, p)
		if away := r2.Norm(r2.Sub(q, p)); away > far {
			best, far = q, away
		}
	}
	return best
}

// reach is the largest distance of the loop from the gear axis.
func (l Loop) reach() float64 { return r2.Norm(l.farthest(r2.Vec{})) }

// shortest is the length of the loop's shortest piece.
func (l Loop) shortest() float64 {
	least := math.Inf(1)
	for _, p := range l.Pieces {
		least = math.Min(least, length(p.Curve))
	}
	return least
}

// length is the length of a line or an arc, both of which have a constant speed.
func length(c profile.Curve) float64 {
	from, to := c.Domain()
	return c.Speed(from) * math.Abs(to-from)
}
