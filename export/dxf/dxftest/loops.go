package dxftest

import (
	"cmp"
	"math"
	"slices"
)

// MaxGap is how far apart ends that meet may be, in drawing units: two ARC ends
// with one step of the ninth decimal each.
const MaxGap = 2e-9

// Chain is a run of pieces that meet, on one layer.
type Chain struct {
	Layer  string
	Closed bool
	Pieces int
	Area   float64    // enclosed, without sign; 0 for an open chain
	Length float64    // of all pieces
	Gap    float64    // the widest one between ends taken for one point
	Span   [4]float64 // least x, least y, greatest x, greatest y
}

// Chains joins the entities to chains. Polylines and circles are chains of
// their own; loose pieces are joined in file order, each to the one before if
// an end is within gap of it, in either direction.
func Chains(entities []Entity, gap float64) ([]Chain, error) {
	var chains []Chain
	for i := 0; i < len(entities); {
		e := &entities[i]
		pieces, err := e.Pieces()
		if err != nil {
			return nil, err
		}
		whole := e.Kind == "LWPOLYLINE" || e.Kind == "POLYLINE" || e.Kind == "CIRCLE"
		i++
		for !whole && i < len(entities) && entities[i].Layer == e.Layer {
			next, err := entities[i].Pieces()
			if err != nil || len(next) != 1 || entities[i].Closed || entities[i].Kind == "CIRCLE" {
				break
			}
			if closed(pieces, gap) || !join(&pieces, next[0], gap) {
				break
			}
			i++
		}
		chains = append(chains, chain(e, pieces, whole, gap))
	}
	return chains, nil
}

// join appends next to the pieces if it meets their end, turning it round, or
// turning a single first piece round, where that helps.
func join(pieces *[]Piece, next Piece, gap float64) bool {
	ps := *pieces
	candidates := []bool{false}
	if len(ps) == 1 {
		candidates = append(candidates, true)
	}
	best, turnFirst, turnNext := math.Inf(1), false, false
	for _, tf := range candidates {
		last := ps[len(ps)-1]
		if tf {
			last = last.Reversed()
		}
		for _, tn := range []bool{false, true} {
			n := next
			if tn {
				n = n.Reversed()
			}
			if d := math.Hypot(n.X0-last.X1, n.Y0-last.Y1); d < best {
				best, turnFirst, turnNext = d, tf, tn
			}
		}
	}
	if best > gap {
		return false
	}
	if turnFirst {
		ps[0] = ps[0].Reversed()
	}
	if turnNext {
		next = next.Reversed()
	}
	*pieces = append(ps, next)
	return true
}

// closed reports whether the pieces end where they start.
func closed(ps []Piece, gap float64) bool { return ends(ps) <= gap }

func ends(ps []Piece) float64 {
	a, z := ps[0], ps[len(ps)-1]
	return math.Hypot(z.X1-a.X0, z.Y1-a.Y0)
}

func chain(e *Entity, ps []Piece, whole bool, gap float64) Chain {
	c := Chain{Layer: e.Layer, Pieces: len(ps), Span: ps[0].Span}
	c.Closed = closed(ps, gap)
	if whole && e.Kind != "CIRCLE" {
		c.Closed = e.Closed
	}
	area := 0.0
	for i, p := range ps {
		area += p.Area
		c.Length += p.Length
		c.Span = [4]float64{min(c.Span[0], p.Span[0]), min(c.Span[1], p.Span[1]), max(c.Span[2], p.Span[2]), max(c.Span[3], p.Span[3])}
		if i > 0 {
			c.Gap = max(c.Gap, math.Hypot(p.X0-ps[i-1].X1, p.Y0-ps[i-1].Y1))
		}
	}
	if c.Closed {
		c.Area = math.Abs(area)
		c.Gap = max(c.Gap, ends(ps))
	}
	return c
}

// Layer is what stands on one layer.
type Layer struct {
	Name         string
	Entities     int
	Closed, Open int     // chains
	Area         float64 // of the closed chains, added up
	Length       float64 // of all chains
	Gap          float64 // the widest
}

// Measure sums up the chains by layer, sorted by name.
func Measure(entities []Entity, gap float64) ([]Layer, error) {
	chains, err := Chains(entities, gap)
	if err != nil {
		return nil, err
	}
	by := map[string]*Layer{}
	layer := func(name string) *Layer {
		if by[name] == nil {
			by[name] = &Layer{Name: name}
		}
		return by[name]
	}
	for _, e := range entities {
		layer(e.Layer).Entities++
	}
	for _, c := range chains {
		l := layer(c.Layer)
		if c.Closed {
			l.Closed++
		} else {
			l.Open++
		}
		l.Area += c.Area
		l.Length += c.Length
		l.Gap = max(l.Gap, c.Gap)
	}
	var out []Layer
	for _, l := range by {
		out = append(out, *l)
	}
	slices.SortFunc(out, func(a, b Layer) int { return cmp.Compare(a.Name, b.Name) })
	return out, nil
}

// Span is the least box around the entities: least x, least y, greatest x,
// greatest y.
func Span(entities []Entity) ([4]float64, error) {
	inf := math.Inf(1)
	s := [4]float64{inf, inf, -inf, -inf}
	for i := range entities {
		ps, err := entities[i].Pieces()
		if err != nil {
			return s, err
		}
		for _, p := range ps {
			s = [4]float64{min(s[0], p.Span[0]), min(s[1], p.Span[1]), max(s[2], p.Span[2]), max(s[3], p.Span[3])}
		}
	}
	return s, nil
}
