package profile

import "math"

// Leaves is the edge that the beam leaves of the part: its path moved back by half its
// width, with what it could not reach left standing as arcs of that radius where its path
// turns sharply.
func (b *Beam) Leaves() Outline {
	d := b.Width / 2
	back := -d // to the right of travel
	if b.Form == FormRing {
		back = d
	}
	o := Outline{Form: b.Form, Teeth: b.Teeth, Advance: b.Advance, Land: b.Land.Parallel(back)}
	chain := append([]Piece{{Curve: b.Land, SmoothEnd: b.LandSmooth}}, b.Side...)
	if b.Root != nil {
		chain = append(chain, Piece{Curve: b.Root})
		o.Root = b.Root.Parallel(back)
	}
	// At a sharp turn the beam's disc stands still; its edge goes from one parallel's end to
	// the other's start.
	disc := func(p, next Piece) {
		if p.SmoothEnd {
			return
		}
		_, to := p.Curve.Domain()
		from, _ := next.Curve.Domain()
		before, after := p.Curve.Heading(to), next.Curve.Heading(from)
		turn := math.Remainder(after-before, 2*math.Pi)
		if math.Abs(turn) < leastTurn {
			return
		}
		start := before + math.Copysign(math.Pi/2, -back)
		o.Side = append(o.Side, Piece{Part: PartFillet, Curve: CircleArc{Center: End(p.Curve), Radius: d, From: start, To: start + turn}})
	}
	for i, p := range chain[1:] {
		if i == 0 {
			disc(chain[0], p)
		}
		if i >= len(b.Side) {
			break
		}
		c := p.Curve.Parallel(back)
		if arc, ok := c.(CircleArc); !ok || arc.Radius > leastTurn*d {
			o.Side = append(o.Side, Piece{Part: p.Part, Curve: c})
		}
		if i+2 < len(chain) {
			disc(p, chain[i+2])
		} else if !p.SmoothEnd {
			// The other side's path comes from the mirror image in the next repetition.
			mirror := chain[len(chain)-1]
			_, to := mirror.Curve.Domain()
			heading := mirror.Curve.Heading(to)
			middle := math.Pi + b.Pitch()/2 // the way the path would go on without the turn
			turn := 2 * math.Remainder(middle-heading, 2*math.Pi)
			if math.Abs(turn) >= leastTurn {
				start := heading + math.Copysign(math.Pi/2, -back)
				o.Side = append(o.Side, Piece{Part: PartFillet, Curve: CircleArc{Center: End(mirror.Curve), Radius: d, From: start, To: start + turn/2}})
			}
		}
	}
	return o
}

// leastTurn is a turn in rad, and a share of a beam's radius, that is rounding: far above
// the 1e-15 of headings, far below what shows.
const leastTurn = 1e-9
