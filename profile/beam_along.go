package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// beamAlong is the path of a beam along a ring or a rack: every curve's parallel on the
// scrap side, which is left of travel in a ring, and arcs about convex corners. A beam
// wider than an arc of the root cannot cut the flank down to its form circle, since the
// disc that touches both flank and root touches the flank above its end; there false is
// returned.
func (t *Tooth) beamAlong(width float64) (*Beam, bool) {
	d := width / 2
	side := d // to the right of travel
	if t.Form == FormRing {
		side = -d
	}
	b := &Beam{Width: width, Outline: Outline{Form: t.Form, Teeth: t.Teeth, Advance: t.Advance, LandSmooth: true,
		Land: t.Land.Parallel(side)}}
	chain := append([]Piece{{Curve: t.Land, SmoothEnd: t.LandSmooth}}, t.Side...)
	if t.Root != nil {
		chain = append(chain, Piece{Curve: t.Root})
		b.Root = t.Root.Parallel(side)
	}
	for i, p := range chain[1:] {
		before := chain[i]
		if !before.SmoothEnd {
			_, to := before.Curve.Domain()
			from, _ := p.Curve.Domain()
			arc, convex := aboutCorner(End(before.Curve), before.Curve.Heading(to), p.Curve.Heading(from), side)
			if !convex {
				return nil, false
			}
			b.Side = append(b.Side, Piece{Part: p.Part, Curve: arc, SmoothEnd: true})
		}
		if i+1 > len(t.Side) {
			break // the root is not part of the side
		}
		switch c := p.Curve.(type) {
		case CutterFillet:
			if !t.beamInCutRoot(b, c, d) {
				return nil, false
			}
			continue
		case CircleArc:
			if p.Part == PartFillet && c.Radius < d {
				return nil, false
			}
		}
		b.Side = append(b.Side, Piece{Part: p.Part, Curve: p.Curve.Parallel(side), SmoothEnd: true})
	}
	return b, true
}

// aboutCorner is the arc about a corner of the part on the side of travel that side
// counts to the right of; false where the path turns into a hollow.
func aboutCorner(at r2.Vec, before, after, side float64) (CircleArc, bool) {
	turn := math.Remainder(after-before, 2*math.Pi)
	from := before - math.Copysign(math.Pi/2, side)
	return CircleArc{Center: at, Radius: math.Abs(side), From: from, To: from + turn}, turn*side > 0
}

// beamInCutRoot adds the path along a root cut by a cutter. Where the fillet's parallel
// folds, at the root, it is cut where it meets the root circle's parallel, or the other
// side's in the middle of the space, and what stays is reported.
func (t *Tooth) beamInCutRoot(b *Beam, exact CutterFillet, d float64) bool {
	f := exact.Parallel(-d).(CutterFillet)
	if f.rate(f.To) <= 0 {
		return false
	}
	if f.rate(f.From) >= 0 {
		b.Side = append(b.Side, Piece{Part: PartFillet, Curve: f, SmoothEnd: true})
		return true
	}
	land := b.Land.(CircleArc)
	radius := func(u float64) float64 { return r2.Norm(f.At(u)) }
	fold := bracketedRoot(f.rate, f.From, f.To)
	if radius(fold) <= land.Radius || radius(f.To) >= land.Radius {
		return false
	}
	f.From = bracketedRoot(func(u float64) float64 { return radius(u) - land.Radius }, fold, f.To)
	inMiddle := polarAngle(Start(f)) <= 0
	if inMiddle {
		if polarAngle(End(f)) <= 0 {
			return false
		}
		f.From = bracketedRoot(func(u float64) float64 { return polarAngle(f.At(u)) }, f.From, f.To)
	}
	half := math.Max(0, polarAngle(Start(f)))
	if inMiddle {
		half, land.Radius = 0, radius(f.From)
	}
	land.From, land.To = math.Pi/2-half, math.Pi/2+half
	b.Land, b.LandSmooth = land, false
	b.Side = append(b.Side, Piece{Part: PartFillet, Curve: f, SmoothEnd: true})
	disc, worst := Start(f), Leftover{}
	judge := func(p r2.Vec) float64 {
		depth := r2.Norm(r2.Sub(p, disc)) - d
		if depth > worst.Depth {
			worst = Leftover{At: p, Depth: depth}
		}
		return depth
	}
	search(func(u float64) float64 { return judge(exact.At(exact.From + u*(f.From-exact.From))) })
	// The disc touches the root circle over its center, and the exact land ends beside.
	exactLand := t.Land.(CircleArc)
	if touch := math.Pi/2 + half; touch < exactLand.To {
		search(func(u float64) float64 { return judge(exactLand.At(touch + u*(exactLand.To-touch))) })
	}
	b.Leftovers = []Leftover{worst}
	if !inMiddle {
		b.Leftovers = append(b.Leftovers, Leftover{At: r2.Vec{X: -worst.At.X, Y: worst.At.Y}, Depth: worst.Depth})
	}
	return true
}
