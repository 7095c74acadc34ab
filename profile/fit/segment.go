// Package fit turns the exact curves of a solved tooth into drawable paths:
// tangent-continuous arcs or chords that stay within a tolerance, with the
// deviation measured on the result. Lengths are millimetres, angles radians.
package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Kind says what a drawn segment is.
type Kind uint8

// The kinds of segment that a drawing can hold.
const (
	Line Kind = iota
	Arc
	Cubic
)

// Segment is one drawn piece from Start to End.
//
// An Arc is held as its bulge, the tangent of a quarter of the included angle,
// positive when it turns counter-clockwise; the included angle stays below pi,
// so |Bulge| < 1. A Cubic is a Bezier curve with the handles C1 and C2.
type Segment struct {
	Kind       Kind
	Start, End r2.Vec
	Bulge      float64
	C1, C2     r2.Vec
}

// LineTo returns the straight segment from a to b.
func LineTo(a, b r2.Vec) Segment { return Segment{Kind: Line, Start: a, End: b} }

// ArcTo returns the circular segment from a to b with the given bulge.
func ArcTo(a, b r2.Vec, bulge float64) Segment {
	return Segment{Kind: Arc, Start: a, End: b, Bulge: bulge}
}

// Chord is the distance from Start to End. Coordinates are far from where squares
// overflow or vanish, so the plain root does, at a fraction of the time of math.Hypot.
func (s *Segment) Chord() float64 {
	dx, dy := s.End.X-s.Start.X, s.End.Y-s.Start.Y
	return math.Sqrt(dx*dx + dy*dy)
}

// Radius is the radius of an Arc, ArcRadius of its chord and bulge. It is +Inf for a
// straight segment.
func (s Segment) Radius() float64 {
	if s.Kind != Arc || s.Bulge == 0 {
		return math.Inf(1)
	}
	return ArcRadius(s.Chord(), s.Bulge)
}

// ArcRadius is the radius in mm of an arc of chord c in mm and bulge b other than 0:
//
//	R = c (1 + b^2) / (4 |b|)
func ArcRadius(chord, bulge float64) float64 {
	return chord * (1 + bulge*bulge) / (4 * math.Abs(bulge))
}

// Included is the signed angle an Arc turns through, 4 atan(bulge); 0 for the
// other kinds.
func (s Segment) Included() float64 {
	if s.Kind != Arc {
		return 0
	}
	return 4 * math.Atan(s.Bulge)
}

// Center is the center of an Arc: the middle of the chord plus its left normal
// times (1 - b^2)/(4 b). It is meaningless for a straight segment.
func (s Segment) Center() r2.Vec {
	h := (1 - s.Bulge*s.Bulge) / (4 * s.Bulge)
	d := r2.Sub(s.End, s.Start)
	mid := r2.Scale(0.5, r2.Add(s.Start, s.End))
	return r2.Add(mid, r2.Vec{X: -h * d.Y, Y: h * d.X})
}

// Length is the arc length: exact for lines and arcs, by Gauss-Legendre
// quadrature on each of eight parts for cubics.
func (s Segment) Length() float64 {
	switch s.Kind {
	case Arc:
		if s.Bulge == 0 {
			return s.Chord()
		}
		return s.Radius() * math.Abs(s.Included())
	case Cubic:
		return s.cubicLength()
	}
	return s.Chord()
}

// SweptArea is the signed area between the segment and the origin, the
// segment's share of 1/2 the integral of x dy - y dx. Summed over a closed
// path it is the enclosed area, positive for a counter-clockwise loop.
func (s Segment) SweptArea() float64 {
	cross := r2.Cross(s.Start, s.End) / 2
	switch s.Kind {
	case Arc:
		if s.Bulge == 0 {
			return cross
		}
		return cross + arcCap(s.Radius(), s.Included())
	case Cubic:
		return s.cubicArea()
	}
	return cross
}

// measure is Length and SweptArea at once.
func (s *Segment) measure() (length, area float64) {
	if s.Kind != Arc || s.Bulge == 0 {
		return s.Length(), s.SweptArea()
	}
	r := ArcRadius(s.Chord(), s.Bulge)
	phi := 4 * math.Atan(s.Bulge)
	return r * math.Abs(phi), r2.Cross(s.Start, s.End)/2 + arcCap(r, phi)
}

// arcCap is the area between an arc of radius r and its chord, r^2 (phi - sin phi)/2,
// with the sign of the included angle phi. For small angles the difference is taken
// from its series, which keeps full precision where subtraction would not.
func arcCap(r, phi float64) float64 {
	const series = 0.1 // rad; the next term is below 1e-16 of the first there
	if math.Abs(phi) < series {
		q := phi * phi
		diff := phi * q / 6 * (1 - q/20*(1-q/42*(1-q/72*(1-q/110))))
		return r * r * diff / 2
	}
	return r * r * (phi - math.Sin(phi)) / 2
}

// Bounds returns the least box around the segment.
func (s Segment) Bounds() r2.Box {
	b := r2.Box{
		Min: r2.Vec{X: math.Min(s.Start.X, s.End.X), Y: math.Min(s.Start.Y, s.End.Y)},
		Max: r2.Vec{X: math.Max(s.Start.X, s.End.X), Y: math.Max(s.Start.Y, s.End.Y)},
	}
	switch s.Kind {
	case Arc:
		if s.Bulge != 0 {
			s.arcBounds(&b)
		}
	case Cubic:
		s.cubicBounds(&b)
	}
	return b
}

// arcBounds widens b by the quadrant points the arc passes through.
func (s Segment) arcBounds(b *r2.Box) {
	c, r := s.Center(), s.Radius()
	quadrants := [4]r2.Vec{{X: c.X + r, Y: c.Y}, {X: c.X, Y: c.Y + r}, {X: c.X - r, Y: c.Y}, {X: c.X, Y: c.Y - r}}
	chord := r2.Sub(s.End, s.Start)
	for _, q := range quadrants {
		// The arc lies right of its chord when it turns counter-clockwise.
		side := r2.Cross(chord, r2.Sub(q, s.Start))
		if side*s.Bulge >= 0 {
			continue
		}
		b.Min = r2.Vec{X: math.Min(b.Min.X, q.X), Y: math.Min(b.Min.Y, q.Y)}
		b.Max = r2.Vec{X: math.Max(b.Max.X, q.X), Y: math.Max(b.Max.Y, q.Y)}
	}
}

// Reversed is the same piece travelled from End to Start.
func (s Segment) Reversed() Segment {
	return Segment{Kind: s.Kind, Start: s.End, End: s.Start, Bulge: -s.Bulge, C1: s.C2, C2: s.C1}
}

// Mapped is the piece with every point moved by f, which must be an isometry;
// mirrored says that it turns the orientation round.
func (s Segment) Mapped(f func(r2.Vec) r2.Vec, mirrored bool) Segment {
	m := Segment{Kind: s.Kind, Start: f(s.Start), End: f(s.End), Bulge: s.Bulge}
	if mirrored {
		m.Bulge = -m.Bulge
	}
	if s.Kind == Cubic {
		m.C1, m.C2 = f(s.C1), f(s.C2)
	}
	return m
}

// StartTangent is the unit direction of travel at Start.
func (s Segment) StartTangent() r2.Vec {
	switch s.Kind {
	case Arc:
		return r2.Unit(r2.Rotate(r2.Sub(s.End, s.Start), -s.Included()/2, r2.Vec{}))
	case Cubic:
		return r2.Unit(r2.Sub(s.C1, s.Start))
	}
	return r2.Unit(r2.Sub(s.End, s.Start))
}

// EndTangent is the unit direction of travel at End.
func (s Segment) EndTangent() r2.Vec {
	return r2.Scale(-1, s.Reversed().StartTangent())
}
