package dxftest

import (
	"fmt"
	"math"
)

// Vertex is a vertex of a polyline; Bulge belongs to the piece it starts.
type Vertex struct {
	X     float64 `json:"x"`
	Y     float64 `json:"y"`
	Bulge float64 `json:"bulge"`
}

// Entity is one entity with the fields of its kind. It has JSON names so that
// outside readers can report what they saw in the same form.
type Entity struct {
	// Kind is LWPOLYLINE, POLYLINE, LINE, ARC, CIRCLE or SPLINE; or Run, for a
	// curve that a reader gave as chords.
	Kind   string `json:"kind"`
	Layer  string `json:"layer"`
	Handle uint64 `json:"-"`
	Owner  uint64 `json:"-"`
	Line   int    `json:"-"` // of the file

	Closed   bool     `json:"closed,omitempty"`
	Vertices []Vertex `json:"vertices,omitempty"` // of polylines, ends of a LINE, control points of a SPLINE

	Center Vertex  `json:"center,omitzero"`
	Radius float64 `json:"radius,omitempty"`
	From   float64 `json:"from,omitempty"` // degrees, counter-clockwise to To
	To     float64 `json:"to,omitempty"`

	Flag   int       `json:"-"`
	Degree int       `json:"-"`
	Knots  []float64 `json:"-"`

	groups []Pair
	counts map[int]int // declared numbers: 90, 72, 73, 74
}

// Run is the kind of an entity that a reader turned into chords.
const Run = "RUN"

// Piece is a smooth part of an entity, from one end to the other. Area is what
// it sweeps seen from the origin, so that the pieces of a loop add up to the
// area enclosed.
type Piece struct {
	X0, Y0, X1, Y1 float64
	Area, Length   float64
	Span           [4]float64 // least x, least y, greatest x, greatest y
}

// Reversed is the piece travelled the other way.
func (p Piece) Reversed() Piece {
	p.X0, p.Y0, p.X1, p.Y1, p.Area = p.X1, p.Y1, p.X0, p.Y0, -p.Area
	return p
}

// Pieces takes the entity apart.
func (e *Entity) Pieces() ([]Piece, error) {
	switch e.Kind {
	case "LWPOLYLINE", "POLYLINE":
		n := len(e.Vertices)
		if n < 2 {
			return nil, fmt.Errorf("%s with %d vertices", e.Kind, n)
		}
		last := n - 1
		if e.Closed {
			last = n
		}
		var ps []Piece
		for i := range last {
			ps = append(ps, bulgePiece(e.Vertices[i], e.Vertices[(i+1)%n]))
		}
		return ps, nil
	case Run:
		if len(e.Vertices) < 2 {
			return nil, fmt.Errorf("run of %d vertices", len(e.Vertices))
		}
		sum := bulgePiece(e.Vertices[0], e.Vertices[1])
		for i := 1; i+1 < len(e.Vertices); i++ {
			sum = sum.joined(bulgePiece(e.Vertices[i], e.Vertices[i+1]))
		}
		return []Piece{sum}, nil
	case "LINE":
		if len(e.Vertices) != 2 {
			return nil, fmt.Errorf("LINE with %d ends", len(e.Vertices))
		}
		return []Piece{bulgePiece(e.Vertices[0], e.Vertices[1])}, nil
	case "ARC":
		turn := math.Mod(e.To-e.From, 360)
		if turn <= 0 {
			turn += 360
		}
		from := math.Mod(e.From, 360) * math.Pi / 180
		return []Piece{arcPiece(e.Center.X, e.Center.Y, e.Radius, from, turn*math.Pi/180)}, nil
	case "CIRCLE":
		return []Piece{arcPiece(e.Center.X, e.Center.Y, e.Radius, 0, 2*math.Pi)}, nil
	case "SPLINE":
		if len(e.Vertices) != 4 {
			return nil, fmt.Errorf("SPLINE with %d control points", len(e.Vertices))
		}
		return []Piece{cubicPiece(e.Vertices)}, nil
	}
	return nil, fmt.Errorf("unexpected entity %s", e.Kind)
}

// joined is p and q taken as one, q starting where p ends.
func (p Piece) joined(q Piece) Piece {
	return Piece{
		X0: p.X0, Y0: p.Y0, X1: q.X1, Y1: q.Y1,
		Area: p.Area + q.Area, Length: p.Length + q.Length,
		Span: [4]float64{
			min(p.Span[0], q.Span[0]), min(p.Span[1], q.Span[1]),
			max(p.Span[2], q.Span[2]), max(p.Span[3], q.Span[3]),
		},
	}
}

func linePiece(x0, y0, x1, y1 float64) Piece {
	return Piece{
		X0: x0, Y0: y0, X1: x1, Y1: y1,
		Area: (x0*y1 - x1*y0) / 2, Length: math.Hypot(x1-x0, y1-y0),
		Span: [4]float64{min(x0, x1), min(y0, y1), max(x0, x1), max(y0, y1)},
	}
}

// bulgePiece is the arc (or line) from a to b with the bulge of a: included
// angle 4 atan(bulge), center left of the chord for a positive bulge below 1.
func bulgePiece(a, b Vertex) Piece {
	line := linePiece(a.X, a.Y, b.X, b.Y)
	if a.Bulge == 0 {
		return line
	}
	turn := 4 * math.Atan(a.Bulge)
	radius := line.Length / 2 / math.Sin(math.Abs(turn)/2)
	h := (1 - a.Bulge*a.Bulge) / (4 * a.Bulge)
	cx := (a.X+b.X)/2 - h*(b.Y-a.Y)
	cy := (a.Y+b.Y)/2 + h*(b.X-a.X)
	p := arcPiece(cx, cy, radius, math.Atan2(a.Y-cy, a.X-cx), turn)
	// The ends are known exactly and the area between arc and chord is far
	// better conditioned than the sector for a flat arc.
	p.X0, p.Y0, p.X1, p.Y1 = a.X, a.Y, b.X, b.Y
	segment := radius * radius / 2 * (turn - math.Sin(turn))
	if math.Abs(turn) < 1e-3 { // next term of the series is below 1e-14 of it
		segment = radius * radius / 12 * turn * turn * turn * (1 - turn*turn/20)
	}
	p.Area = line.Area + segment
	return p
}

// arcPiece is the arc around (cx, cy) from the angle a through turn, radians.
func arcPiece(cx, cy, r, a, turn float64) Piece {
	at := func(a float64) (float64, float64) { return cx + r*math.Cos(a), cy + r*math.Sin(a) }
	x0, y0 := at(a)
	x1, y1 := at(a + turn)
	p := linePiece(x0, y0, x1, y1)
	// Green's theorem: half the integral of x dy - y dx over the arc.
	p.Area = (r*r*turn + cx*(y1-y0) - cy*(x1-x0)) / 2
	p.Length = r * math.Abs(turn)
	lo, hi := min(a, a+turn), max(a, a+turn)
	for k := math.Ceil(lo / (math.Pi / 2)); k*math.Pi/2 <= hi; k++ {
		x, y := at(k * math.Pi / 2)
		p.Span = [4]float64{min(p.Span[0], x), min(p.Span[1], y), max(p.Span[2], x), max(p.Span[3], y)}
	}
	return p
}

// cubicPiece samples a Bezier cubic finely: simple, and good to 1e-7 of its
// size, which is what tests of areas need.
func cubicPiece(c []Vertex) Piece {
	const steps = 2000
	var p Piece
	x, y := c[0].X, c[0].Y
	for i := 1; i <= steps; i++ {
		u := float64(i) / steps
		v := 1 - u
		w := [4]float64{v * v * v, 3 * v * v * u, 3 * v * u * u, u * u * u}
		nx, ny := 0.0, 0.0
		for k := range 4 {
			nx += w[k] * c[k].X
			ny += w[k] * c[k].Y
		}
		q := linePiece(x, y, nx, ny)
		if i == 1 {
			p = q
		} else {
			p = p.joined(q)
		}
		x, y = nx, ny
	}
	p.X0, p.Y0, p.X1, p.Y1 = c[0].X, c[0].Y, c[3].X, c[3].Y
	return p
}
